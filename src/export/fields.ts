// Single values as CSV and JSON want them.
import type { ExactNumber } from '../exact/number.js';
import { formatNumber } from '../exact/number.js';

/**
 * A CSV field, quoted as RFC 4180 (Y. Shafranovich, 2005) asks: when it holds a comma, a quote or a
 * line break. Lines end in a single line feed, as Unix tools expect.
 */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/**
 * A field of free text from the user's file. A spreadsheet would run one that begins with =, +, -,
 * @, a tab or a return as a formula, so it gets an apostrophe in front. Columns of signs and of
 * numbers are our own format and never pass through here.
 */
export function csvLabel(text: string): string {
  return csvField(/^[=+\-@\t\r]/.test(text) ? `'${text}` : text);
}

/** One CSV line from fields that are already fit for it. */
export function csvLine(fields: readonly string[]): string {
  return `${fields.join(',')}\n`;
}

/** `<prefix>_1` to `<prefix>_d`, or `<prefix>_<name>` where the coordinates have names. */
export function coordinateColumns(
  prefix: string,
  dimension: number,
  names: readonly string[] | null,
): string[] {
  return Array.from({ length: dimension }, (_, i) => csvField(`${prefix}_${names?.[i] ?? i + 1}`));
}

/** An exact number as users write it; integers, nearly all of a list, by the short way. */
export function csvNumber(value: ExactNumber, radicand: bigint | null): string {
  return value.b === 0n && value.d === 1n ? value.a.toString() : formatNumber(value, radicand);
}

/**
 * An integer in JSON: a number up to 2^53 - 1 in size, a decimal string beyond, where a reader that
 * takes doubles would lose digits.
 */
export function jsonInteger(value: bigint): number | string {
  const number = Number(value);
  return Number.isSafeInteger(number) ? number : value.toString();
}

/** An exact number in JSON: an integer as above; a fraction or a root as a string. */
export function jsonNumber(value: ExactNumber, radicand: bigint | null): number | string {
  return value.b === 0n && value.d === 1n ? jsonInteger(value.a) : formatNumber(value, radicand);
}
