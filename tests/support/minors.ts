// Determinants and minors by expansion and by listing every choice: slow and obvious.
import { gcd } from '../../src/exact/integers.js';

type Rows = readonly (readonly bigint[])[];

/** Expansion along the first row; the empty determinant is 1. */
export function determinant(rows: Rows): bigint {
  if (rows.length === 0) return 1n;
  return rows[0].reduce((sum, x, j) => {
    if (x === 0n) return sum;
    const minor = determinant(rows.slice(1).map((row) => row.filter((_, c) => c !== j)));
    return j % 2 === 0 ? sum + x * minor : sum - x * minor;
  }, 0n);
}

/** All k-element subsets of 0..n-1, ascending. */
export function choices(n: number, k: number, from = 0): number[][] {
  if (k === 0) return [[]];
  const lists: number[][] = [];
  for (let i = from; i + k <= n; i++) {
    for (const rest of choices(n, k - 1, i + 1)) lists.push([i, ...rest]);
  }
  return lists;
}

/** The gcd of all k-minors of a matrix. */
export function minorGcd(rows: Rows, k: number): bigint {
  let g = 0n;
  for (const chosen of choices(rows.length, k)) {
    for (const columns of choices(rows[0].length, k)) {
      g = gcd(g, determinant(chosen.map((i) => columns.map((c) => rows[i][c]))));
    }
  }
  return g;
}
