// A list written in the text, CSV or JSON form, so that the readers take it back as it is.
import { InputError } from '../errors.js';
import { type ExactNumber, formatNumber } from '../exact/number.js';
import { type GeneratorList, type Range, unitRange } from './generators.js';
import { isNumber } from './number-text.js';
import { reservedColumns } from './read-csv.js';
import { quoted } from './source.js';

/**
 * The text form, title and names of coordinates in comments. Throws InputError where the list has
 * ranges, a label that a comment sign would cut, or a coordinate that a comma would.
 */
export function formatText(list: GeneratorList): string {
  if (list.ranges !== null) {
    throw new InputError('the text form has no ranges', 'write CSV or JSON');
  }
  const lines = list.normals.map((normal, i) => {
    const label = list.labels?.[i] ?? null;
    if (label?.includes('#')) {
      const what = `the text form cannot hold the label ${quoted(label)}`;
      throw new InputError(what, 'write CSV or JSON: # starts a comment');
    }
    const numbers = normal.map((x) => formatNumber(x, list.radicand)).join(' ');
    return label === null ? numbers : `${label}: ${numbers}`;
  });
  const comma = list.coordinates?.find((name) => name.includes(','));
  if (comma !== undefined) {
    const what = `the text form cannot hold the coordinate ${quoted(comma)}`;
    throw new InputError(what, 'write CSV or JSON: commas separate names');
  }
  const title = list.title === null ? [] : [`# title: ${list.title}`];
  const names = list.coordinates ? [`# coordinates: ${list.coordinates.join(', ')}`] : [];
  return `${[...title, ...names, ...lines].join('\n')}\n`;
}

/** The text form where it can hold the list, else the JSON form, which holds every list. */
export function formatPlain(list: GeneratorList): string {
  try {
    return formatText(list);
  } catch (error) {
    if (error instanceof InputError) return formatJson(list);
    throw error;
  }
}

/**
 * The CSV form. The title is not kept; coordinates without names become x1, x2, ... Throws
 * InputError where a coordinate goes by the name of a column with another meaning.
 */
export function formatCsv(list: GeneratorList): string {
  const names = list.coordinates ?? list.normals[0]!.map((_, i) => `x${i + 1}`);
  const clash = names.find((name) => reservedColumns.includes(name.toLowerCase()));
  if (clash !== undefined) {
    const what = `the CSV form cannot name a coordinate ${quoted(clash)}`;
    throw new InputError(what, 'write JSON, or name it otherwise');
  }
  const { labels, ranges, radicand } = list;
  if (!labels && !ranges && names.every(isNumber)) {
    const what = 'a CSV header of numbers alone would be taken for a normal';
    throw new InputError(what, 'write JSON, or name the coordinates otherwise');
  }
  const header = [...(labels ? ['label'] : []), ...names, ...(ranges ? ['low', 'high'] : [])];
  const rows = list.normals.map((normal, i) => {
    const cells = normal.map((x) => formatNumber(x, radicand));
    if (labels) cells.unshift(labels[i] ?? '');
    if (ranges) cells.push(...bounds(ranges[i]!, radicand));
    return cells;
  });
  return [header, ...rows].map((cells) => `${cells.map(csvCell).join(',')}\n`).join('');
}

/** The JSON form, one normal a line. Integers are numbers, everything else is a string. */
export function formatJson(list: GeneratorList): string {
  const number = (x: ExactNumber) => {
    const text = formatNumber(x, list.radicand);
    return x.b === 0n && x.d === 1n ? text : JSON.stringify(text);
  };
  const parts: string[] = [];
  if (list.title !== null) parts.push(`"title": ${JSON.stringify(list.title)}`);
  if (list.coordinates) parts.push(`"coordinates": ${jsonList(list.coordinates)}`);
  const lines = list.normals.map((normal) => `    [${normal.map(number).join(', ')}]`);
  parts.push(`"normals": [\n${lines.join(',\n')}\n  ]`);
  if (list.labels) parts.push(`"labels": ${jsonList(list.labels)}`);
  if (list.ranges) {
    const ranges = list.ranges.map(({ low, high }) => `[${number(low)}, ${number(high)}]`);
    parts.push(`"ranges": [${ranges.join(', ')}]`);
  }
  return `{\n  ${parts.join(',\n  ')}\n}\n`;
}

function jsonList(items: readonly (string | null)[]): string {
  return `[${items.map((item) => JSON.stringify(item)).join(', ')}]`;
}

function bounds(range: Range, radicand: bigint | null): [string, string] {
  if (range === unitRange) return ['', ''];
  return [formatNumber(range.low, radicand), formatNumber(range.high, radicand)];
}

function csvCell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
