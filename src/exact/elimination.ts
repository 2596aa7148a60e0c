// Fraction-free elimination over a ring (E. Bareiss, 1968, Sylvester's identity and multistep
// integer-preserving Gaussian elimination): every entry stays a minor of the matrix given.
import type { Ring } from './ring.js';

/** Where an elimination found its pivots: `rows[i]` met `columns[i]`; both have rank entries. */
export interface Pivots {
  readonly rows: readonly number[];
  readonly columns: readonly number[];
}

/**
 * A maximal independent set of rows, greedily from the first, and columns in which they are
 * independent. Rows may be many; the work is rows * rank * columns.
 */
export function findPivots<E>(ring: Ring<E>, matrix: readonly (readonly E[])[]): Pivots {
  const reduced: E[][] = [];
  const rows: number[] = [];
  const columns: number[] = [];
  const width = matrix.length === 0 ? 0 : matrix[0].length;
  for (let i = 0; i < matrix.length && rows.length < width; i++) {
    let row = matrix[i].slice();
    let previous = ring.one;
    for (let k = 0; k < reduced.length; k++) {
      const pivotRow = reduced[k];
      const pivot = pivotRow[columns[k]];
      const factor = row[columns[k]];
      row = row.map((x, j) =>
        ring.divideExactly(
          ring.subtract(ring.multiply(pivot, x), ring.multiply(factor, pivotRow[j])),
          previous,
        ),
      );
      previous = pivot;
    }
    const column = row.findIndex((x) => ring.sign(x) !== 0);
    if (column < 0) continue;
    reduced.push(row);
    rows.push(i);
    columns.push(column);
  }
  return { rows, columns };
}
