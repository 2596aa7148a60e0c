// Unimodular column reduction of an integer matrix (after C. Hermite): the lattice side of
// essential coordinates. Rounded quotients and a last pass of pairwise reduction keep entries small.
import { magnitude, roundedQuotient } from './integers.js';

type Matrix = bigint[][];

/** N U = [L | 0] with U unimodular; all three exact, rows outermost. */
export interface ColumnReduction {
  /** d x r: the first r columns of U; x = lift y has N x = L y. */
  readonly lift: readonly (readonly bigint[])[];
  /** r x d: the first r rows of the inverse of U, a basis of the lattice span(N) cut with Z^d. */
  readonly basis: readonly (readonly bigint[])[];
}

function dot(u: readonly bigint[], v: readonly bigint[]): bigint {
  let sum = 0n;
  for (let i = 0; i < u.length; i++) sum += u[i] * v[i];
  return sum;
}

function subtractMultiple(target: bigint[], q: bigint, source: readonly bigint[]): void {
  for (let i = 0; i < target.length; i++) target[i] -= q * source[i];
}

/**
 * Reduces the columns of `rows` (r independent rows of d integers). Columns of U are held as rows
 * here, and the rows of its inverse move the opposite way with every step.
 */
export function reduceColumns(rows: readonly (readonly bigint[])[]): ColumnReduction {
  const r = rows.length;
  const d = rows[0].length;
  const unit = (i: number): bigint[] => Array.from({ length: d }, (_, j) => (i === j ? 1n : 0n));
  const columns: Matrix = Array.from({ length: d }, (_, j) => rows.map((row) => row[j]));
  const lift: Matrix = Array.from({ length: d }, (_, i) => unit(i));
  const inverse: Matrix = Array.from({ length: d }, (_, i) => unit(i));
  const subtract = (target: number, q: bigint, source: number): void => {
    if (q === 0n) return;
    subtractMultiple(columns[target], q, columns[source]);
    subtractMultiple(lift[target], q, lift[source]);
    subtractMultiple(inverse[source], -q, inverse[target]);
  };
  const swap = (i: number, j: number): void => {
    for (const m of [columns, lift, inverse]) [m[i], m[j]] = [m[j], m[i]];
  };
  for (let k = 0; k < r; k++) {
    for (;;) {
      let least = -1;
      let others = false;
      for (let j = k; j < d; j++) {
        if (columns[j][k] === 0n) continue;
        if (least >= 0) others = true;
        if (least < 0 || magnitude(columns[j][k]) < magnitude(columns[least][k])) least = j;
      }
      if (least < 0) throw new RangeError('reduceColumns: rows: expected independent rows');
      swap(k, least);
      if (!others) break;
      const pivot = columns[k][k];
      for (let j = k + 1; j < d; j++) {
        const q = roundedQuotient(columns[j][k] * (pivot < 0n ? -1n : 1n), magnitude(pivot));
        subtract(j, q, k);
      }
    }
  }
  shorten(columns, 0, r, subtract);
  shorten(lift, r, d, subtract);
  // The kernel columns move no value of N: they may shorten the lift freely.
  for (let i = 0; i < r; i++) {
    for (let j = r; j < d; j++) {
      subtract(i, roundedQuotient(dot(lift[i], lift[j]), dot(lift[j], lift[j])), j);
    }
  }
  return {
    lift: Array.from({ length: d }, (_, i) => lift.slice(0, r).map((column) => column[i])),
    basis: inverse.slice(0, r),
  };
}

/** Pairwise (Gauss) reduction of vectors[from..to): each step strictly shortens one of them. */
function shorten(
  vectors: Matrix,
  from: number,
  to: number,
  subtract: (target: number, q: bigint, source: number) => void,
): void {
  for (let changed = true; changed; ) {
    changed = false;
    for (let i = from; i < to; i++) {
      for (let j = from; j < to; j++) {
        if (i === j) continue;
        const length = dot(vectors[j], vectors[j]);
        const inner = dot(vectors[i], vectors[j]);
        if (2n * magnitude(inner) <= length) continue;
        subtract(i, roundedQuotient(inner, length), j);
        changed = true;
      }
    }
  }
}
