// The list of regions as CSV, NDJSON and JSON.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { RegionRow } from '../census/region-rows.js';
import type { RowWriter } from './chunks.js';
import { writeRows } from './chunks.js';
import { coordinateColumns, csvLine, csvNumber, jsonInteger, jsonNumber } from './fields.js';
import { jsonListEnd, jsonListRow, jsonListStart } from './heading.js';

/** The formats every list can be written in. */
export type ListFormat = 'csv' | 'ndjson' | 'json';

/**
 * How a region becomes text. CSV has the columns `signs,walls,point_*,vertex_*`, walls separated by
 * blanks; NDJSON an object a line; JSON one object, the arrangement first and then `regions`.
 * Integers in the last two are numbers up to 2^53 - 1 and decimal strings beyond; fractions and
 * roots are strings.
 */
export function regionWriter(arrangement: Arrangement, format: ListFormat): RowWriter<RegionRow> {
  const { dimension, generators } = arrangement;
  const { coordinates, radicand } = generators;
  if (format === 'csv') {
    const columns = [
      'signs',
      'walls',
      ...coordinateColumns('point', dimension, coordinates),
      ...coordinateColumns('vertex', dimension, coordinates),
    ];
    return {
      head: csvLine(columns),
      row: ({ signs, walls, point, vertex }) =>
        `${signs},${walls.join(' ')},${point.join(',')},${vertex
          .map((x) => csvNumber(x, radicand))
          .join(',')}\n`,
      tail: '',
    };
  }
  const record = (row: RegionRow) => ({
    signs: row.signs,
    walls: row.walls,
    point: row.point.map(jsonInteger),
    vertex: row.vertex.map((x) => jsonNumber(x, radicand)),
  });
  if (format === 'ndjson') {
    return { head: '', row: (row) => `${JSON.stringify(record(row))}\n`, tail: '' };
  }
  return {
    head: jsonListStart('signwright/regions/1', arrangement, 'regions'),
    row: (row, index) => jsonListRow(record(row), index),
    tail: jsonListEnd,
  };
}

/** The whole list in chunks of text. */
export function writeRegions(
  arrangement: Arrangement,
  rows: Iterable<RegionRow>,
  format: ListFormat,
): Generator<string> {
  return writeRows(regionWriter(arrangement, format), rows);
}
