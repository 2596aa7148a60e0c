// Normals in a basis taken from among themselves. Two uses: an arrangement with structure has small
// numbers there, however large those of the input are (roots in a basis of roots, say); and the
// irreducible parts show, for two basis normals belong together when some normal needs both.
// Each is the same arrangement up to a linear change of coordinates and positive scales.
import { findPivots } from '../exact/elimination.js';
import { gcd } from '../exact/integers.js';
import type { Ring } from '../exact/ring.js';
import { minorBounds } from './minor-bounds.js';

/** Rows of full rank; no two parallel. */
export type Rows<E> = readonly (readonly E[])[];

/**
 * The parts of which the arrangement is the product, each in as many coordinates as its rank; the
 * polynomial is the product of theirs. `rows` are m of full rank r.
 */
export function irreducibleParts<E>(ring: Ring<E>, rows: Rows<E>): Rows<E>[] {
  const own = inOwnBasis(ring, rows);
  const r = rows[0].length;
  const partOf = Array.from({ length: r }, (_, i) => i);
  const supports = own.map((row) => [...row.keys()].filter((i) => ring.sign(row[i]) !== 0));
  for (const [first, ...others] of supports) {
    for (const other of others) {
      const from = partOf[other];
      const into = partOf[first];
      for (let i = 0; i < r; i++) if (partOf[i] === from) partOf[i] = into;
    }
  }
  const names = [...new Set(partOf)];
  if (names.length > 1) {
    return names.map((name) =>
      own
        .filter((_, j) => partOf[supports[j][0]] === name)
        .map((row) => row.filter((_, i) => partOf[i] === name)),
    );
  }
  const smaller = minorBounds(ring, own)[r] < minorBounds(ring, rows)[r];
  return [smaller ? own : rows];
}

/** Coordinates in the greedily first basis, without content. */
function inOwnBasis<E>(ring: Ring<E>, rows: Rows<E>): E[][] {
  const basis = findPivots(ring, rows).rows;
  // Fraction-free Gauss-Jordan elimination (E. Bareiss, 1968) of the transposed rows: the basis
  // columns become a multiple of the identity, and every column its coordinates times that.
  let matrix = rows[0].map((_, i) => rows.map((row) => row[i]));
  let previous = ring.one;
  basis.forEach((column, k) => {
    const at = matrix.findIndex((row, i) => i >= k && ring.sign(row[column]) !== 0);
    [matrix[k], matrix[at]] = [matrix[at], matrix[k]];
    const pivotRow = matrix[k];
    const pivot = pivotRow[column];
    matrix = matrix.map((row, i) =>
      i === k
        ? row
        : row.map((x, j) =>
            ring.divideExactly(
              ring.subtract(ring.multiply(pivot, x), ring.multiply(row[column], pivotRow[j])),
              previous,
            ),
          ),
    );
    previous = pivot;
  });
  return rows.map((_, j) => {
    const coordinates = matrix.map((row) => row[j]);
    const content = ring.fromInteger(coordinates.reduce((g, x) => gcd(g, ring.content(x)), 0n));
    return coordinates.map((x) => ring.divideExactly(x, content));
  });
}
