// Integer normals in a basis taken from among themselves: however large the numbers of the input,
// an arrangement with structure has small ones here (roots in a basis of roots, say). The
// arrangement is the same up to a linear change of coordinates and positive scales.
import { findPivots } from '../exact/elimination.js';
import { gcd, integerRing } from '../exact/integers.js';
import { minorBounds } from './deletion-residue.js';

/** The rows as they are or in their own first basis, whichever has the smaller bound on minors. */
export function inSmallCoordinates(
  rows: readonly (readonly bigint[])[],
): readonly (readonly bigint[])[] {
  const own = inOwnBasis(rows);
  const r = rows[0].length;
  return minorBounds(integerRing, own)[r] < minorBounds(integerRing, rows)[r] ? own : rows;
}

/** Primitive coordinates of m rows of full rank r in the greedily first basis among them. */
export function inOwnBasis(rows: readonly (readonly bigint[])[]): bigint[][] {
  const basis = findPivots(integerRing, rows).rows;
  // Fraction-free Gauss-Jordan elimination (E. Bareiss, 1968) of the transposed rows: the basis
  // columns become a multiple of the identity, and every column its coordinates times that.
  let matrix = rows[0].map((_, i) => rows.map((row) => row[i]));
  let previous = 1n;
  basis.forEach((column, k) => {
    const at = matrix.findIndex((row, i) => i >= k && row[column] !== 0n);
    [matrix[k], matrix[at]] = [matrix[at], matrix[k]];
    const pivotRow = matrix[k];
    const pivot = pivotRow[column];
    matrix = matrix.map((row, i) =>
      i === k ? row : row.map((x, j) => (pivot * x - row[column] * pivotRow[j]) / previous),
    );
    previous = pivot;
  });
  return rows.map((_, j) => {
    const coordinates = matrix.map((row) => row[j]);
    const content = coordinates.reduce(gcd, 0n);
    return coordinates.map((x) => x / content);
  });
}
