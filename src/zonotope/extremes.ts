// Evidence that listed vertices are the vertices they are said to be: for each the functional that
// its region's interior point is, exactly, takes its greatest value at that vertex and nowhere else
// on the list. Then they are distinct, and each is a vertex of the hull of the list.

import { magnitude } from '../exact/integers.js';
import type { ExactNumber } from '../exact/number.js';
import { commonDenominator } from '../exact/number.js';
import { quadraticRing } from '../exact/quadratic.js';

/** A vertex that is not the only maximum of its own functional, and one at least as high. */
export interface ExtremeFault {
  readonly vertex: number;
  readonly rival: number;
}

/**
 * The first vertex whose functional points[i] is not greatest at vertices[i] alone; null when there is
 * none. Exact: N^2 d steps for N vertices in d coordinates, plain numbers where they are bounded.
 * `radicand` is that of the vertices' field.
 */
export function findRival(
  vertices: readonly (readonly ExactNumber[])[],
  points: readonly (readonly bigint[])[],
  radicand: bigint | null,
): ExtremeFault | null {
  const count = vertices.length;
  if (points.length !== count) {
    throw new RangeError(`findRival: points: expected ${count}, got ${points.length}`);
  }
  if (count === 0) return null;
  const denominator = commonDenominator(vertices.flat());
  const scaled: Scaled = {
    count,
    dimension: vertices[0].length,
    radicand,
    integers: vertices.flatMap((vertex) => vertex.map((x) => (x.a * denominator) / x.d)),
    roots:
      radicand === null ? [] : vertices.flatMap((v) => v.map((x) => (x.b * denominator) / x.d)),
    points: points.flat(),
  };
  const entry = largest([...scaled.integers, ...scaled.roots]);
  // A difference of two products of d terms each, and every partial sum of it, stays below 2^53.
  const bound = 2n * BigInt(scaled.dimension) * entry * largest(scaled.points);
  return bound < BigInt(Number.MAX_SAFE_INTEGER) ? searchPlain(scaled) : searchExactly(scaled);
}

/** Vertices as numerators over one denominator, d a vertex, and the points, flat. */
interface Scaled {
  readonly count: number;
  readonly dimension: number;
  readonly radicand: bigint | null;
  readonly integers: readonly bigint[];
  readonly roots: readonly bigint[];
  readonly points: readonly bigint[];
}

function largest(values: readonly bigint[]): bigint {
  let most = 0n;
  for (const x of values) if (magnitude(x) > most) most = magnitude(x);
  return most;
}

function searchPlain({ count, dimension: d, radicand, ...lists }: Scaled): ExtremeFault | null {
  const integers = Float64Array.from(lists.integers, Number);
  const roots = radicand === null ? null : Float64Array.from(lists.roots, Number);
  const points = Float64Array.from(lists.points, Number);
  const root = Math.sqrt(Number(radicand ?? 0n));
  const ring = radicand === null ? null : quadraticRing(radicand);
  for (let i = 0; i < count; i++) {
    for (let rival = 0; rival < count; rival++) {
      if (rival === i) continue;
      let a = 0;
      for (let j = 0; j < d; j++) {
        a += points[i * d + j] * (integers[i * d + j] - integers[rival * d + j]);
      }
      if (roots === null) {
        if (a > 0) continue;
        return { vertex: i, rival };
      }
      let b = 0;
      for (let j = 0; j < d; j++) {
        b += points[i * d + j] * (roots[i * d + j] - roots[rival * d + j]);
      }
      // a and b are exact; root, product and sum are each off by 2^-53 of themselves at most.
      const tail = b * root;
      const value = a + tail;
      const clear = Math.abs(value) > 2 ** -50 * (Math.abs(a) + Math.abs(tail));
      if (clear ? value > 0 : ring!.sign({ a: BigInt(a), b: BigInt(b) }) > 0) continue;
      return { vertex: i, rival };
    }
  }
  return null;
}

function searchExactly(scaled: Scaled): ExtremeFault | null {
  const { count, dimension: d, radicand, integers, roots, points } = scaled;
  const ring = quadraticRing(radicand ?? 2n);
  const advantage = (parts: readonly bigint[], i: number, rival: number): bigint => {
    let sum = 0n;
    for (let j = 0; j < d; j++)
      sum += points[i * d + j] * (parts[i * d + j] - parts[rival * d + j]);
    return sum;
  };
  for (let i = 0; i < count; i++) {
    for (let rival = 0; rival < count; rival++) {
      if (rival === i) continue;
      const a = advantage(integers, i, rival);
      const b = radicand === null ? 0n : advantage(roots, i, rival);
      if (ring.sign({ a, b }) <= 0) return { vertex: i, rival };
    }
  }
  return null;
}
