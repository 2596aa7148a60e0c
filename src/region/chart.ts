// Arrangements as the enumerators take them: hyperplanes joined in classes, in coordinates in which
// the first class is x0 = 0.
import { setBit, wordsFor } from '../bits/signs.js';
import type { Ring } from '../exact/ring.js';
import { mergeParallel } from './parallel.js';

/** Classes of hyperplanes in a flat: a normal a class, and which hyperplanes point which way. */
export interface Classes {
  /** Row a class, over the ring; pairwise not parallel. */
  readonly normals: readonly (readonly unknown[])[];
  /** Row of W words a class: its hyperplanes that are positive where its normal is. */
  readonly along: Int32Array;
  /** The same for those that are positive where it is negative. */
  readonly against: Int32Array;
  /** Least hyperplane of each class, ascending. */
  readonly least: Int32Array;
}

/** Classes whose normals have coordinate 0 first, so that class 0 is (positive, 0, .., 0). */
export interface Chart extends Classes {
  /** The positive pivot that divides every later step of the elimination. */
  readonly pivot: unknown;
}

/** Every hyperplane its own class, n of them, bit k for hyperplane k. */
export function separateClasses(normals: readonly (readonly unknown[])[]): Classes {
  const n = normals.length;
  const W = wordsFor(n);
  const along = new Int32Array(n * W);
  for (let k = 0; k < n; k++) setBit(along, k * W, k);
  const least = Int32Array.from({ length: n }, (_, k) => k);
  return { normals, along, against: new Int32Array(n * W), least };
}

/**
 * Classes of rank r in a chart of dimension r. With a the first normal and p its last non-zero entry,
 * x0 = a . x takes the place of coordinate p; every normal is scaled by |a_p|.
 */
export function chartOf(ring: Ring<unknown>, classes: Classes): Chart {
  const { normals, least } = classes;
  const W = classes.along.length / normals.length;
  const along = classes.along.slice();
  const against = classes.against.slice();
  const a = normals[0];
  let p = a.length - 1;
  while (ring.sign(a[p]) === 0) p--;
  const flipped = ring.sign(a[p]) < 0;
  const pivot = flipped ? ring.negate(a[p]) : a[p];
  const rows = normals.map((normal, k) => {
    const factor = flipped ? ring.negate(normal[p]) : normal[p];
    const row: unknown[] = [factor];
    for (let q = 0; q < normal.length; q++) {
      if (q === p) continue;
      row.push(ring.subtract(ring.multiply(pivot, normal[q]), ring.multiply(factor, a[q])));
    }
    if (ring.sign(row.find((x) => ring.sign(x) !== 0)) > 0) return row;
    along.set(classes.against.subarray(k * W, (k + 1) * W), k * W);
    against.set(classes.along.subarray(k * W, (k + 1) * W), k * W);
    return row.map((x) => ring.negate(x));
  });
  return { normals: rows, along, against, least, pivot };
}

/** The classes of a chart inside its class 0: coordinate 0 dropped, parallels merged, contents removed. */
export function insideFirst(ring: Ring<unknown>, chart: Chart): Classes {
  const W = chart.along.length / chart.normals.length;
  const merged = mergeParallel(
    ring,
    chart.normals.slice(1).map((row) => row.slice(1)),
  );
  const along = new Int32Array(merged.length * W);
  const against = new Int32Array(merged.length * W);
  merged.forEach(({ members }, target) => {
    for (const { row, sign } of members) {
      const source = (row + 1) * W;
      const [plus, minus] = sign > 0 ? [along, against] : [against, along];
      for (let w = 0; w < W; w++) {
        plus[target * W + w] |= chart.along[source + w];
        minus[target * W + w] |= chart.against[source + w];
      }
    }
  });
  return {
    normals: merged.map(({ normal }) => withoutContent(ring, normal)),
    along,
    against,
    least: Int32Array.from(merged, ({ members }) => chart.least[members[0].row + 1]),
  };
}

function withoutContent(ring: Ring<unknown>, row: readonly unknown[]): unknown[] {
  let content = 0n;
  for (const x of row) {
    let [a, b] = [content, ring.content(x)];
    while (b !== 0n) [a, b] = [b, a % b];
    content = a;
  }
  const divisor = ring.fromInteger(content);
  return row.map((x) => ring.divideExactly(x, divisor));
}
