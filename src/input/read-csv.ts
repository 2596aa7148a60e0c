// The CSV form: a header; columns `label`, `low` and `high` are optional, every other column is a
// coordinate and names it.
import { InputError } from '../errors.js';
import { exactOne, exactZero } from '../exact/number.js';
import { type CsvTable, readTable } from './csv-table.js';
import type { GeneratorList } from './generators.js';
import { cleanName, ListBuilder } from './list-builder.js';
import { isNumber } from './number-text.js';
import { quoted, type SourceText } from './source.js';

/** The columns of the CSV form that are no coordinates. */
export const reservedColumns: readonly string[] = ['label', 'low', 'high'];

/** Reads a list in the CSV form; throws InputError. */
export async function readCsv(source: SourceText): Promise<GeneratorList> {
  const table = await readTable(source);
  refuseDoubtfulHeader(table);
  const columns = table.header.map((_, column) => column);
  const labelColumn = table.header.indexOf('label');
  const lowColumn = table.header.indexOf('low');
  const highColumn = table.header.indexOf('high');
  const coordinates = columns.filter((c) => !reservedColumns.includes(table.header[c]!));
  if (coordinates.length === 0) {
    const remedy = 'add a column for each coordinate of the normals';
    throw new InputError('no column is a coordinate', remedy, table.place(-1, 0));
  }
  if (table.rows.length === 0) {
    const remedy = 'give a row for each below the names of the columns';
    throw new InputError('there is no normal', remedy, { file: source.name });
  }
  const builder = new ListBuilder();
  table.rows.forEach((cells, row) => {
    const placeOf =
      (column: number) =>
      (offset = 0) =>
        table.place(row, column, offset);
    const read = (column: number) => builder.number(cells[column]!, placeOf(column));
    const bound = (column: number) =>
      column >= 0 && cells[column]!.trim() !== '' ? read(column) : null;
    const low = bound(lowColumn);
    const high = bound(highColumn);
    const labelPlace = placeOf(Math.max(labelColumn, 0));
    builder.add({
      entries: coordinates.map(read),
      label: labelColumn < 0 ? null : cleanName(cells[labelColumn]!, labelPlace),
      range:
        low === null && high === null ? null : { low: low ?? exactZero, high: high ?? exactOne },
      place: placeOf(coordinates[0]!),
      labelPlace,
      rangePlace: placeOf(low === null ? highColumn : lowColumn),
    });
  });
  return builder.finish(
    null,
    coordinates.map((c) => table.header[c]!),
    source,
  );
}

function refuseDoubtfulHeader({ header, place }: CsvTable): void {
  if (header.every(isNumber)) {
    const remedy = 'put a line with the names of the columns above, such as x,y,z';
    throw new InputError(
      'the first line holds numbers, not names of columns',
      remedy,
      place(-1, 0),
    );
  }
  header.forEach((name, column) => {
    const meant = reservedColumns.find((reserved) => reserved === name.toLowerCase());
    if (meant === undefined || meant === name) return;
    const what = `the column ${quoted(name)} may be ${meant} or a coordinate`;
    throw new InputError(
      what,
      `write ${meant} in small letters, or another name`,
      place(-1, column),
    );
  });
}
