// Plain text for a terminal: widths, wrapping and aligned tables. Nothing here knows of arrangements.

// East Asian wide forms and emoji take two columns, combining marks and joiners none.
const wide =
  /[\u1100-\u115f\u2e80-\ua4cf\ua960-\ua97f\uac00-\ud7a3\uf900-\ufaff\ufe30-\ufe6f\uff01-\uff60\uffe0-\uffe6\u{1f300}-\u{1faff}\u{20000}-\u{3fffd}]/u;
const zeroWidth = /\p{Mn}|\p{Me}|\p{Cf}/u;
const unprintable = /[\p{Cc}\u2028\u2029\u202a-\u202e\u2066-\u2069]/gu;

/** Text of an input made safe to print on one line: controls and direction marks become U+FFFD. */
export function printable(text: string): string {
  return text.replace(/[\t\r\n]+/g, ' ').replace(unprintable, '\ufffd');
}

/** Terminal columns a printable text takes. */
export function columnsOf(text: string): number {
  let columns = 0;
  for (const character of text) {
    columns += wide.test(character) ? 2 : zeroWidth.test(character) ? 0 : 1;
  }
  return columns;
}

/** The text, or as much of its beginning as fits with an ellipsis. */
export function cut(text: string, columns: number): string {
  if (columnsOf(text) <= columns) return text;
  let kept = '';
  let used = 1;
  for (const character of text) {
    used += columnsOf(character);
    if (used > columns) break;
    kept += character;
  }
  return `${kept}…`;
}

/** Left text padded to a width. */
export function padRight(text: string, columns: number): string {
  return text + ' '.repeat(Math.max(0, columns - columnsOf(text)));
}

/** Right-aligned in a width. */
export function padLeft(text: string, columns: number): string {
  return ' '.repeat(Math.max(0, columns - columnsOf(text))) + text;
}

/** Lines of at most `columns`, broken at blanks; a word that is longer is broken where it must. */
export function wrap(text: string, columns: number): string[] {
  const lines: string[] = [];
  let line = '';
  const add = (word: string): void => {
    const joined = line === '' ? word : `${line} ${word}`;
    if (columnsOf(joined) <= columns) {
      line = joined;
      return;
    }
    if (line !== '') lines.push(line);
    line = '';
    for (const character of word) {
      if (columnsOf(line + character) > columns) {
        lines.push(line);
        line = '';
      }
      line += character;
    }
  };
  for (const word of text.split(' ')) if (word !== '') add(word);
  if (line !== '' || lines.length === 0) lines.push(line);
  return lines;
}

/** A polynomial or a product whose terms and factors stay whole when it is wrapped. */
export function unbroken(formula: string): string {
  return formula
    .replace(/\(t ([+-]) /g, '(t\u00a0$1\u00a0')
    .replace(/ ([+-]) /g, ' $1\u00a0')
    .replace(/(\d) t/g, '$1\u00a0t');
}

/** `first` and then the text wrapped beside it, hanging under its own beginning. */
export function hanging(first: string, text: string, columns: number): string[] {
  const indent = columnsOf(first);
  return wrap(text, columns - indent).map(
    (line, i) => (i === 0 ? first : ' '.repeat(indent)) + line.replaceAll('\u00a0', ' '),
  );
}

/** Decimal digits in groups of three: `39,296,883`; other text is left as it is. */
export function grouped(integer: string, separator = ','): string {
  return integer.replace(/\d{4,}/g, (digits) => digits.replace(/\B(?=(\d{3})+$)/g, separator));
}

/**
 * Right-aligned columns under their headings, two blanks apart, each row indented by two. Columns
 * that do not fit beside the first go into further tables below, and a cell that is wider than the
 * page is wrapped in a block of its own.
 */
export function table(
  headings: readonly string[],
  rows: readonly (readonly string[])[],
  columns: number,
): string[] {
  const widths = headings.map((heading, c) =>
    Math.max(columnsOf(heading), ...rows.map((row) => columnsOf(row[c]))),
  );
  const lines: string[] = [];
  let from = 1;
  while (from < headings.length) {
    let to = from;
    let used = 2 + widths[0];
    while (to < headings.length && used + 2 + widths[to] <= columns) used += 2 + widths[to++];
    if (lines.length > 0) lines.push('');
    if (to === from) {
      lines.push(`  ${headings[0]}  ${headings[from]}`);
      for (const row of rows) {
        lines.push(...hanging(`  ${padLeft(row[0], widths[0])}  `, row[from], columns));
      }
      from++;
      continue;
    }
    const shown = [0, ...Array.from({ length: to - from }, (_, i) => from + i)];
    for (const row of [headings, ...rows]) {
      lines.push(`  ${shown.map((c) => padLeft(row[c], widths[c])).join('  ')}`.trimEnd());
    }
    from = to;
  }
  return lines;
}
