// The list of flats as CSV, NDJSON and JSON.
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt } from '../bits/signs.js';
import type { FlatLattice } from '../flat/lattice.js';
import type { RowWriter } from './chunks.js';
import { writeRows } from './chunks.js';
import { csvLine, jsonInteger } from './fields.js';
import { jsonListEnd, jsonListRow, jsonListStart } from './heading.js';
import type { ListFormat } from './regions.js';

/** A flat as it is written out. */
export interface FlatRow {
  /** Codimension: 0 for the whole space. */
  readonly rank: number;
  /** Above the lineality space. */
  readonly dimension: number;
  /** 1-based numbers of all normals that vanish on it, parallel ones included, ascending. */
  readonly normals: readonly number[];
  /** Moebius value between the whole space and the flat. */
  readonly moebius: bigint;
}

/** The flats of a lattice in its order: by rank, the whole space first. */
export function* flatRows(arrangement: Arrangement, lattice: FlatLattice): Generator<FlatRow> {
  const { rankOffsets, wordsPerRow, zero, moebius } = lattice;
  const hyperplaneOf = Array.from(arrangement.hyperplaneOf);
  for (let rank = 0; rank <= lattice.rank; rank++) {
    for (let flat = rankOffsets[rank]; flat < rankOffsets[rank + 1]; flat++) {
      const normals: number[] = [];
      hyperplaneOf.forEach((h, i) => {
        if (bitAt(zero, flat * wordsPerRow, h) === 1) normals.push(i + 1);
      });
      yield { rank, dimension: lattice.rank - rank, normals, moebius: moebius[flat] };
    }
  }
}

/**
 * How a flat becomes text. CSV has the columns `rank,dimension,normals,moebius`, normals separated
 * by blanks; the other formats as for regions.
 */
export function flatWriter(arrangement: Arrangement, format: ListFormat): RowWriter<FlatRow> {
  if (format === 'csv') {
    return {
      head: csvLine(['rank', 'dimension', 'normals', 'moebius']),
      row: ({ rank, dimension, normals, moebius }) =>
        `${rank},${dimension},${normals.join(' ')},${moebius}\n`,
      tail: '',
    };
  }
  const record = (row: FlatRow) => ({ ...row, moebius: jsonInteger(row.moebius) });
  if (format === 'ndjson') {
    return { head: '', row: (row) => `${JSON.stringify(record(row))}\n`, tail: '' };
  }
  return {
    head: jsonListStart('signwright/flats/1', arrangement, 'flats'),
    row: (row, index) => jsonListRow(record(row), index),
    tail: jsonListEnd,
  };
}

/** The whole list in chunks of text. */
export function writeFlats(
  arrangement: Arrangement,
  lattice: FlatLattice,
  format: ListFormat,
): Generator<string> {
  return writeRows(flatWriter(arrangement, format), flatRows(arrangement, lattice));
}
