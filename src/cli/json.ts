/** JSON for people too: two blanks a level, lists of plain values on one line, a final line feed. */
export function jsonText(value: unknown): string {
  // A line break inside a string is written \n, so what is matched is never inside one.
  const text = JSON.stringify(value, null, 2).replace(/\[\n\s+([^[\]{}]*?)\n\s+\]/g, (_, items) => {
    return `[${(items as string).replace(/,\n\s+/g, ', ')}]`;
  });
  return `${text}\n`;
}
