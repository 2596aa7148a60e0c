// Text of any origin made fit for XML 1.0.

// Everything outside the production Char of XML 1.0 (W3C Recommendation, fifth edition, 2008,
// section 2.2); with the u flag a lone surrogate matches as itself and a pair does not.
const forbidden = /[^\t\n\r\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]/gu;

/** The text with every character that XML cannot hold, escaped or not, replaced by U+FFFD. */
export function cleanText(text: string): string {
  return text.replace(forbidden, '\ufffd');
}

const entities: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&apos;',
  '\t': '&#9;',
  '\n': '&#10;',
  '\r': '&#13;',
};

/** Clean text escaped for element content and for attribute values alike. */
export function escapeXml(text: string): string {
  return cleanText(text).replace(/[&<>"'\t\n\r]/g, (character) => entities[character]);
}
