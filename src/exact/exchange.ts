// One pivot step of a tableau over a ring, fraction-free (after J. Edmonds, 1967, Systems of distinct
// representatives and linear algebra): all entries share one positive denominator.
import type { Ring } from './ring.js';

/**
 * Exchanges row p with column q in place, where the entry is not zero, and returns the new common
 * denominator. Rows are linear forms in the column variables; the last column is the constant.
 */
export function exchangePivot<E>(
  ring: Ring<E>,
  tableau: readonly E[][],
  p: number,
  q: number,
  denominator: E,
): E {
  const pivotRow = tableau[p];
  const pivot = pivotRow[q];
  const flip = ring.sign(pivot) < 0;
  tableau.forEach((row, i) => {
    if (i === p) return;
    const factor = row[q];
    for (let j = 0; j < row.length; j++) {
      if (j === q) continue;
      const difference = ring.subtract(
        ring.multiply(pivot, row[j]),
        ring.multiply(factor, pivotRow[j]),
      );
      const entry = ring.divideExactly(difference, denominator);
      row[j] = flip ? ring.negate(entry) : entry;
    }
    if (flip) row[q] = ring.negate(factor);
  });
  for (let j = 0; j < pivotRow.length; j++) {
    if (j === q) pivotRow[j] = flip ? ring.negate(denominator) : denominator;
    else if (!flip) pivotRow[j] = ring.negate(pivotRow[j]);
  }
  return flip ? ring.negate(pivot) : pivot;
}
