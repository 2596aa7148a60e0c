// The quotient of Z^r by a primitive vector, as an integer map: unimodular row operations take the
// vector to one coordinate, and the others are coordinates of the quotient.
import { magnitude, roundedQuotient } from '../exact/integers.js';

/**
 * r - 1 rows of r integers: a surjection of Z^r onto Z^(r-1) whose kernel is spanned by the vector.
 * The rows are a short basis of the lattice of functionals that vanish on it.
 */
export function quotientMap(primitive: readonly bigint[]): bigint[][] {
  const r = primitive.length;
  const values = primitive.slice();
  const rows = values.map((_, i) => values.map((__, j) => (i === j ? 1n : 0n)));
  for (;;) {
    let least = -1;
    let others = false;
    for (let i = 0; i < r; i++) {
      if (values[i] === 0n) continue;
      if (least >= 0) others = true;
      if (least < 0 || magnitude(values[i]) < magnitude(values[least])) least = i;
    }
    if (!others) {
      if (least < 0 || magnitude(values[least]) !== 1n) {
        throw new RangeError('quotientMap: vector: expected a primitive one');
      }
      rows.splice(least, 1);
      shortenRows(rows);
      return rows;
    }
    const pivot = values[least];
    for (let i = 0; i < r; i++) {
      if (i === least || values[i] === 0n) continue;
      const q = roundedQuotient(pivot < 0n ? -values[i] : values[i], magnitude(pivot));
      values[i] -= q * pivot;
      for (let j = 0; j < r; j++) rows[i][j] -= q * rows[least][j];
    }
  }
}

/** The images of vectors under a map of rows. */
export function imagesUnder(
  map: readonly (readonly bigint[])[],
  vectors: readonly (readonly bigint[])[],
): bigint[][] {
  return vectors.map((v) => map.map((row) => dot(row, v)));
}

function dot(u: readonly bigint[], v: readonly bigint[]): bigint {
  let sum = 0n;
  for (let i = 0; i < u.length; i++) sum += u[i] * v[i];
  return sum;
}

/**
 * Pairwise reduction (after C. F. Gauss, 1801): multiples of rows are taken from others, in place,
 * until that shortens none. Each step does, so it ends.
 */
export function shortenRows(rows: bigint[][]): void {
  for (let changed = true; changed; ) {
    changed = false;
    for (let i = 0; i < rows.length; i++) {
      for (let j = 0; j < rows.length; j++) {
        if (i === j) continue;
        const length = dot(rows[j], rows[j]);
        const inner = dot(rows[i], rows[j]);
        if (2n * magnitude(inner) <= length) continue;
        const q = roundedQuotient(inner, length);
        for (let c = 0; c < rows[i].length; c++) rows[i][c] -= q * rows[j][c];
        changed = true;
      }
    }
  }
}
