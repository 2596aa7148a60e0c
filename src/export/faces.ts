// The list of faces as CSV, NDJSON and JSON; rows may stream past, flat by flat.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { FaceRow } from '../census/face-rows.js';
import type { RowWriter } from './chunks.js';
import { writeRows } from './chunks.js';
import { coordinateColumns, csvLine, csvNumber, jsonNumber } from './fields.js';
import { jsonListEnd, jsonListRow, jsonListStart } from './heading.js';
import type { ListFormat } from './regions.js';

/**
 * How a face becomes text. CSV has the columns `signs,dimension,zonotope_dimension,base_*,free`,
 * free generators by 1-based number, separated by blanks; the other formats as for regions, with
 * `zonotopeDimension`, `base` and `free`.
 */
export function faceWriter(arrangement: Arrangement, format: ListFormat): RowWriter<FaceRow> {
  const { coordinates, radicand } = arrangement.generators;
  if (format === 'csv') {
    const base = coordinateColumns('base', arrangement.dimension, coordinates);
    return {
      head: csvLine(['signs', 'dimension', 'zonotope_dimension', ...base, 'free']),
      row: (row) => {
        const numbers = row.base.map((x) => csvNumber(x, radicand)).join(',');
        const { signs, dimension, zonotopeDimension, free } = row;
        return `${signs},${dimension},${zonotopeDimension},${numbers},${free.join(' ')}\n`;
      },
      tail: '',
    };
  }
  const record = (row: FaceRow) => ({
    signs: row.signs,
    dimension: row.dimension,
    zonotopeDimension: row.zonotopeDimension,
    base: row.base.map((x) => jsonNumber(x, radicand)),
    free: row.free,
  });
  if (format === 'ndjson') {
    return { head: '', row: (row) => `${JSON.stringify(record(row))}\n`, tail: '' };
  }
  return {
    head: jsonListStart('signwright/faces/1', arrangement, 'faces'),
    row: (row, index) => jsonListRow(record(row), index),
    tail: jsonListEnd,
  };
}

/** The whole list in chunks of text. */
export function writeFaces(
  arrangement: Arrangement,
  rows: Iterable<FaceRow>,
  format: ListFormat,
): Generator<string> {
  return writeRows(faceWriter(arrangement, format), rows);
}
