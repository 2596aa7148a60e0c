// The three directions in which the generators spread most, as exact rational vectors: eigenvectors of
// the sum of u u^T over the segments u (C. Jacobi, 1846, rotations), each divided by its largest
// entry and every entry replaced by the simplest fraction close by. Which vectors come out matters
// to the look alone: what is done with them afterwards is exact.
import { InputError } from '../errors.js';
import {
  addNumbers,
  type ExactNumber,
  exactNumber,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { decimalOf } from '../exact/root-decimal.js';
import type { GeneratorList } from '../input/generators.js';
import { unitRange } from '../input/generators.js';

/** How far an entry of an axis, at most 1 in size, may be moved to be a simple fraction. */
const closeness = 1e-4;
const sweeps = 60;

/** Three vectors of d rational entries, the direction of most spread first; for rank 3 or more. */
export function principalAxes(generators: GeneratorList): ExactNumber[][] {
  const { normals, ranges, radicand } = generators;
  const segments = normals.map((normal, j) => {
    const { low, high } = ranges?.[j] ?? unitRange;
    const length = addNumbers(high, negateNumber(low));
    return normal.map((x) =>
      Number(decimalOf(multiplyNumbers(length, x, radicand ?? 0n), radicand)),
    );
  });
  const largest = Math.max(...segments.flat().map(Math.abs));
  if (!Number.isFinite(largest)) {
    throw new InputError(
      'the normals are too long to find principal axes',
      'name three coordinates, as --project=1,2,3, or scale the normals',
    );
  }
  const d = segments[0].length;
  const spread = Array.from({ length: d }, (_, a) =>
    Array.from({ length: d }, (__, b) =>
      segments.reduce((sum, u) => sum + (u[a] / largest) * (u[b] / largest), 0),
    ),
  );
  const { values, vectors } = eigen(spread);
  const total = values.reduce((sum, x) => sum + x, 0);
  const order = Array.from(values.keys());
  // Equal spreads come out equal up to rounding: then the earlier coordinate goes first.
  const rounded = values.map((x) => Math.round((x / total) * 1e9));
  order.sort((a, b) => rounded[b] - rounded[a] || a - b);
  return order.slice(0, 3).map((c) => simplified(vectors.map((row) => row[c])));
}

/** Eigenvalues, and eigenvectors as columns, of a symmetric matrix, by cyclic rotations. */
function eigen(matrix: readonly (readonly number[])[]): { values: number[]; vectors: number[][] } {
  const d = matrix.length;
  const a = matrix.map((row) => row.slice());
  const v = matrix.map((_, i) => matrix.map((__, j) => (i === j ? 1 : 0)));
  const turn = (m: number[][], p: number, q: number, c: number, s: number): void => {
    for (const row of m) [row[p], row[q]] = [c * row[p] - s * row[q], s * row[p] + c * row[q]];
  };
  const trace = a.reduce((sum, row, i) => sum + row[i], 0);
  for (let sweep = 0; sweep < sweeps; sweep++) {
    let changed = false;
    for (let p = 0; p < d; p++) {
      for (let q = p + 1; q < d; q++) {
        if (Math.abs(a[p][q]) <= 1e-15 * trace) continue;
        changed = true;
        const theta = (a[q][q] - a[p][p]) / (2 * a[p][q]);
        const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
        const c = 1 / Math.sqrt(t * t + 1);
        turn(a, p, q, c, t * c);
        const [rowP, rowQ] = [a[p].slice(), a[q].slice()];
        for (let i = 0; i < d; i++) {
          a[p][i] = c * rowP[i] - t * c * rowQ[i];
          a[q][i] = t * c * rowP[i] + c * rowQ[i];
        }
        turn(v, p, q, c, t * c);
      }
    }
    if (!changed) break;
  }
  return { values: a.map((row, i) => row[i]), vectors: v };
}

function simplified(vector: readonly number[]): ExactNumber[] {
  const largest = vector.reduce((best, x) => (Math.abs(x) > Math.abs(best) + 1e-9 ? x : best), 0);
  return vector.map((x) => simplestFraction(x / largest));
}

/** The fraction with the least denominator within `closeness` of x. */
function simplestFraction(x: number): ExactNumber {
  for (let q = 1; ; q++) {
    const p = Math.round(x * q);
    if (Math.abs(x - p / q) <= closeness) return exactNumber(BigInt(p), 0n, BigInt(q));
  }
}
