// A CSV file by RFC 4180 as a header and rows of cells, each with its line and column for messages.
import { InputError, type Position } from '../errors.js';
import { cleanName, count } from './list-builder.js';
import { isNumber } from './number-text.js';
import { quoted, type SourceText } from './source.js';

/** Every row has as many cells as the header, names of columns are distinct and not empty. */
export interface CsvTable {
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Where a cell stands; row -1 is the header. */
  place(row: number, column: number, offset?: number): Position;
}

/** Reads a table with a header; throws InputError. */
export async function readTable(source: SourceText): Promise<CsvTable> {
  const { parse, CsvError } = await import('csv-parse/sync');
  let records: string[][];
  try {
    records = parse(source.text, {
      relax_column_count: true,
      skip_empty_lines: true,
      record_delimiter: ['\r\n', '\n', '\r'],
    });
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    throw quotingFault(error.code, source);
  }
  const place = (row: number, column: number, offset = 0) =>
    source.place(fieldStart(source.text, row + 1, column) + offset);
  refuseOtherSeparators(records, source);
  const header = readHeader(records[0]!, (column) => place(-1, column));
  const rows = records.slice(1);
  rows.forEach((row, index) => {
    if (row.length === header.length) return;
    const what = `this row has ${count(row.length, 'cell')}, the header has ${header.length}`;
    const remedy = 'give every row as many cells as the header, and quote cells that have commas';
    throw new InputError(what, remedy, place(index, Math.min(row.length - 1, header.length)));
  });
  return { header, rows, place };
}

function refuseOtherSeparators([header, first]: readonly string[][], source: SourceText): void {
  if (header!.length !== 1) return;
  const numbers = first?.length === 1 ? first[0]!.trim().split(/\s+/) : [];
  if (/[;\t]/.test(header![0]!.trim()) || (numbers.length > 1 && numbers.every(isNumber))) {
    const what = 'the cells are not separated by commas';
    throw source.fault(fieldStart(source.text, 0, 0), what, 'save the file with commas');
  }
}

function readHeader(cells: readonly string[], place: (column: number) => Position): string[] {
  const seen = new Map<string, number>();
  return cells.map((cell, column) => {
    const name = cleanName(cell, () => place(column));
    if (name === null) {
      throw new InputError(
        `column ${column + 1} has no name`,
        'name it in the first line',
        place(column),
      );
    }
    const earlier = seen.get(name);
    if (earlier !== undefined) {
      const what = `columns ${earlier + 1} and ${column + 1} are both named ${quoted(name)}`;
      throw new InputError(what, 'give each column its own name', place(column));
    }
    seen.set(name, column);
    return name;
  });
}

function quotingFault(code: string, source: SourceText): InputError {
  const { offset, stop } = lastField(source.text);
  if (code === 'CSV_QUOTE_NOT_CLOSED') {
    const remedy = 'end the cell with a quote, and write a quote inside it twice';
    return source.fault(offset, 'this quote is not closed', remedy);
  }
  if (code === 'CSV_INVALID_CLOSING_QUOTE') {
    const remedy =
      'let a comma or the end of the line follow it, or write a quote inside a cell twice';
    return source.fault(stop, 'text after a closing quote', remedy);
  }
  const remedy = 'put the whole cell in quotes, blanks too, and write the quote inside it twice';
  return source.fault(stop, 'a quote inside a cell that does not begin with one', remedy);
}

interface Field {
  readonly record: number;
  readonly column: number;
  /** Of the first character, the opening quote where there is one. */
  readonly offset: number;
  readonly quoted: boolean;
  /** Of the character after the field, where reading went on or could not. */
  readonly stop: number;
}

// Only run for messages: the fields as RFC 4180 has them, up to the first fault in quoting.
function* fields(text: string): Generator<Field> {
  const cell = /"(?:[^"]|"")*"?|[^",\r\n]*/y;
  let record = 0;
  let column = 0;
  for (let offset = 0; offset <= text.length; ) {
    cell.lastIndex = offset;
    const stop = offset + cell.exec(text)![0].length;
    const next = text.charAt(stop);
    const emptyLine = stop === offset && column === 0 && next !== ',';
    if (!emptyLine) yield { record, column, offset, quoted: text.charAt(offset) === '"', stop };
    offset = stop + (text.startsWith('\r\n', stop) ? 2 : 1);
    if (next === ',') column += 1;
    else if (next === '\r' || next === '\n') {
      if (!emptyLine) record += 1;
      column = 0;
    } else return;
  }
}

function fieldStart(text: string, record: number, column: number): number {
  for (const field of fields(text)) {
    if (field.record === record && field.column === column) {
      return field.offset + (field.quoted ? 1 : 0);
    }
  }
  return text.length;
}

function lastField(text: string): Field {
  let last: Field = { record: 0, column: 0, offset: 0, quoted: false, stop: 0 };
  for (const field of fields(text)) last = field;
  return last;
}
