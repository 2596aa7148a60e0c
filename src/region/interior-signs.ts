// The certificate of an interior point: its exact sign on every hyperplane. Plain numbers serve
// while every product and partial sum stays below 2^53; beyond that, ring elements.
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt } from '../bits/signs.js';
import type { Quadratic } from '../exact/quadratic.js';

const SAFE = Number.MAX_SAFE_INTEGER;

/** Decides exactly whether an integer point has given signs on all hyperplanes. */
export class SignCertifier {
  /**
   * Largest magnitude of a coordinate for which plain numbers are exact: `isInside` may be asked up
   * to it; 0 when the normals themselves are too large.
   */
  readonly plainLimit: number;
  private readonly arrangement: Arrangement;
  private readonly dimension: number;
  private readonly count: number;
  /** Integer parts of the normals, and parts at the root (null over Q): count rows of d. */
  private readonly integers: Float64Array;
  private readonly roots: Float64Array | null;
  private readonly root: number;

  constructor(arrangement: Arrangement) {
    const { dimension, hyperplanes, ring } = arrangement;
    this.arrangement = arrangement;
    this.dimension = dimension;
    this.count = hyperplanes.length;
    this.integers = new Float64Array(this.count * dimension);
    this.roots = ring.radicand === null ? null : new Float64Array(this.count * dimension);
    this.root = ring.radicand === null ? 0 : Math.sqrt(Number(ring.radicand));
    let largest = 1;
    hyperplanes.forEach(({ normal }, h) => {
      let integerSum = 0;
      let rootSum = 0;
      normal.forEach((x, j) => {
        const a = this.roots === null ? (x as bigint) : (x as Quadratic).a;
        const b = this.roots === null ? 0n : (x as Quadratic).b;
        this.integers[h * dimension + j] = Number(a);
        if (this.roots !== null) this.roots[h * dimension + j] = Number(b);
        integerSum += Math.abs(Number(a));
        rootSum += Math.abs(Number(b));
      });
      largest = Math.max(largest, integerSum, rootSum);
    });
    // |sum a_j x_j| <= (sum |a_j|) max |x_j| < 2^53, and so is every partial sum. Past 2^53 the sums
    // themselves may have been rounded, but then the limit is 0 or 1 whichever way; take 0.
    this.plainLimit = largest > SAFE / 4 ? 0 : Math.floor(SAFE / largest);
  }

  /** Sign of hyperplane h's normal at x, max |x_j| <= plainLimit. */
  private plainSign(h: number, x: Float64Array): number {
    const { dimension, integers, roots } = this;
    const start = h * dimension;
    let a = 0;
    for (let j = 0; j < dimension; j++) a += integers[start + j] * x[j];
    if (roots === null) return a;
    let b = 0;
    for (let j = 0; j < dimension; j++) b += roots[start + j] * x[j];
    // a and b are exact. The double sqrt(k) is off by 2^-53 of itself (and so is k as a double, at
    // most), the product and the sum by as much again: under 2^-50 (|a| + |b| sqrt(k)) in all.
    const tail = b * this.root;
    const value = a + tail;
    if (Math.abs(value) > 2 ** -50 * (Math.abs(a) + Math.abs(tail))) return value;
    const { ring } = this.arrangement;
    const exact = { a: BigInt(a), b: BigInt(b) } as unknown;
    return ring.sign(exact);
  }

  /** Whether the integer point x, max |x_j| <= plainLimit, lies strictly inside the region. */
  isInside(words: Int32Array, offset: number, x: Float64Array): boolean {
    for (let h = 0; h < this.count; h++) {
      const sign = this.plainSign(h, x);
      if (bitAt(words, offset, h) === 1 ? !(sign > 0) : !(sign < 0)) return false;
    }
    return true;
  }

  /** The same on the hyperplanes listed only: a first sieve for candidates. */
  isWithin(
    words: Int32Array,
    offset: number,
    walls: ArrayLike<number>,
    count: number,
    x: Float64Array,
  ): boolean {
    for (let i = 0; i < count; i++) {
      const sign = this.plainSign(walls[i], x);
      if (bitAt(words, offset, walls[i]) === 1 ? !(sign > 0) : !(sign < 0)) return false;
    }
    return true;
  }

  /** Whether the integer point x of any size lies strictly inside the region. */
  isInsideExactly(words: Int32Array, offset: number, x: readonly bigint[]): boolean {
    const { ring, hyperplanes } = this.arrangement;
    const point = x.map((value) => ring.fromInteger(value));
    for (let h = 0; h < this.count; h++) {
      const { normal } = hyperplanes[h];
      let sum = ring.zero;
      for (let j = 0; j < point.length; j++) {
        sum = ring.add(sum, ring.multiply(normal[j], point[j]));
      }
      if (ring.sign(sum) !== (bitAt(words, offset, h) === 1 ? 1 : -1)) return false;
    }
    return true;
  }
}
