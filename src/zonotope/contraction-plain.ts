// Deletion-contraction of lattice vectors in doubles. Each level holds the vectors of one lattice
// quotient, coordinate by coordinate, so that a unimodular change is a few passes over arrays. Every
// operation is bounded before it is done; a quotient that would pass 2^53 is handed over.
import { ExactSums, exactLimit } from './exact-sums.js';
import { plainGcd, planeMap } from './plane-map.js';

/** Vectors up to `count` at one level, for whoever takes over: coordinate c of vector j is rows[c][j]. */
export interface PlainLevel {
  readonly rank: number;
  readonly rows: readonly Float64Array[];
  readonly weights: Float64Array;
  /** Numerators of the corner over `denominator`, reduced. */
  readonly corner: Float64Array;
}

/** What contracting vector i among those before it adds: by order, the coefficients from t^0 up. */
export type HandOver = (level: PlainLevel, i: number) => ReadonlyMap<bigint, readonly bigint[]>;

/** Largest denominator of a corner that is taken: products with it stay far below 2^53. */
export const cornerLimit = 2 ** 20;

/** Coordinates of a quotient stay below this, or are handed over. */
export const entryLimit = 2 ** 31;

/** Passes of pairwise reduction over the coordinates of a quotient: more gain nothing. */
const reductionPasses = 2;

const tableSize = 256;

export class PlainContraction {
  private readonly denominator: number;
  private readonly stride: number;
  private readonly levels: PlainLevel[] = [];
  private readonly sums: ExactSums[] = [];
  /** The orders met, each with its place in the sums; order 1 has place 0. */
  private readonly orders: number[] = [1];
  private readonly handOver: HandOver;
  private readonly onProgress: ((leaves: number) => void) | null;
  private readonly table = new Uint8Array(tableSize * tableSize);
  private readonly slots: Int32Array;
  private readonly xs: Float64Array;
  private readonly ys: Float64Array;
  /** Rank-2 quotients closed so far. */
  leaves = 0;
  private reported = 0;

  constructor(
    rank: number,
    count: number,
    denominator: number,
    handOver: HandOver,
    onProgress: ((leaves: number) => void) | null,
  ) {
    this.denominator = denominator;
    this.stride = rank + 1;
    for (let k = 0; k <= rank; k++) {
      // A level is made in the rows of the one above: one row more than its rank.
      this.levels.push({
        rank: k,
        rows: Array.from({ length: k + 1 }, () => new Float64Array(count)),
        weights: new Float64Array(count),
        corner: new Float64Array(k + 1),
      });
      this.sums.push(new ExactSums(this.stride));
    }
    this.handOver = handOver;
    this.onProgress = onProgress;
    for (let a = 0; a < tableSize; a++) {
      for (let b = 0; b < tableSize; b++) this.table[a * tableSize + b] = plainGcd(a, b) & 255;
    }
    let size = 16;
    while (size < 4 * count) size *= 2;
    this.slots = new Int32Array(size);
    this.xs = new Float64Array(count);
    this.ys = new Float64Array(count);
  }

  /** To be filled by the caller before `visit`: the vectors, primitive and not parallel. */
  get top(): PlainLevel {
    return this.levels[this.levels.length - 1];
  }

  /** The level of a rank: what `contract` on the one above has made. */
  levelOf(rank: number): PlainLevel {
    return this.levels[rank];
  }

  /** All terms of the first `count` vectors of the top level, rank 3 or more: coefficients by order. */
  visit(count: number): Map<bigint, bigint[]> {
    const { rank } = this.top;
    this.descend(rank, count);
    const sums = this.sums[rank];
    const result = new Map<bigint, bigint[]>();
    this.orders.forEach((order, place) => {
      const at = place * this.stride;
      result.set(
        BigInt(order),
        Array.from({ length: rank + 1 }, (_, k) => sums.valueOf(at + k)),
      );
    });
    return result;
  }

  private descend(rank: number, count: number): void {
    const level = this.levels[rank];
    const sums = this.sums[rank];
    sums.clear(this.stride);
    this.addTerm(sums, this.orderAt(level), 0, 1);
    for (let i = 0; i < count; i++) {
      if (rank === 3) {
        if (this.close(level, i, sums)) continue;
      } else {
        const merged = this.contract(level, i);
        if (merged >= 0) {
          this.descend(rank - 1, merged);
          // Below, no set has as many members as the rank here: the top places are free.
          sums.addMultiple(level.weights[i], this.sums[rank - 1], 1);
          continue;
        }
      }
      for (const [order, coefficients] of this.handOver(level, i)) {
        const at = this.placeOf(Number(order)) * this.stride;
        sums.extend(at + this.stride);
        coefficients.forEach((c, k) => {
          if (c !== 0n) sums.addBig(at + k, c);
        });
      }
    }
    if (this.onProgress !== null && this.leaves - this.reported > 200_000) {
      this.reported = this.leaves;
      this.onProgress(this.leaves);
    }
  }

  private placeOf(order: number): number {
    let place = this.orders.indexOf(order);
    if (place < 0) {
      place = this.orders.length;
      this.orders.push(order);
    }
    return place;
  }

  private addTerm(sums: ExactSums, order: number, k: number, x: number): void {
    const at = this.placeOf(order) * this.stride;
    sums.extend(at + this.stride);
    sums.add(at + k, x);
  }

  private orderAt({ rank, corner }: PlainLevel): number {
    let common = this.denominator;
    for (let c = 0; c < rank && common > 1; c++) common = plainGcd(common, Math.abs(corner[c]));
    return this.denominator / common;
  }

  /**
   * Fills the level below with the vectors before i modulo vector i, primitive and merged; returns
   * their number, -1 where a number would pass its bound.
   */
  contract(level: PlainLevel, i: number): number {
    const r = level.rank;
    const below = this.levels[r - 1];
    const { rows, corner } = below;
    for (let c = 0; c < r; c++) {
      rows[c].set(level.rows[c].subarray(0, i + 1));
      corner[c] = level.corner[c];
    }
    if (!this.clearColumn(rows, corner, r, i)) return -1;
    return this.reduceRows(rows, corner, r - 1, i) ? this.merge(level, below, i) : -1;
  }

  /** Row operations until column i has one entry, 1 or -1, in the last row. */
  private clearColumn(
    rows: readonly Float64Array[],
    corner: Float64Array,
    r: number,
    i: number,
  ): boolean {
    const list = rows as Float64Array[];
    for (;;) {
      let least = -1;
      let others = false;
      for (let c = 0; c < r; c++) {
        const x = Math.abs(list[c][i]);
        if (x === 0) continue;
        if (least >= 0) others = true;
        if (least < 0 || x < Math.abs(list[least][i])) least = c;
      }
      if (!others) {
        const last = list[least];
        list[least] = list[r - 1];
        list[r - 1] = last;
        corner[least] = corner[r - 1];
        return true;
      }
      const pivot = list[least];
      for (let c = 0; c < r; c++) {
        if (c === least || list[c][i] === 0) continue;
        const q = Math.round(list[c][i] / pivot[i]);
        if (!this.subtract(list[c], q, pivot, i + 1)) return false;
        corner[c] = this.reduced(corner[c] - (q % this.denominator) * corner[least]);
      }
    }
  }

  /** target -= q source on the first `length` entries; false where a result may pass 2^53. */
  private subtract(target: Float64Array, q: number, source: Float64Array, length: number): boolean {
    let most = 0;
    for (let j = 0; j < length; j++) {
      const x = target[j] - q * source[j];
      target[j] = x;
      const size = Math.abs(x) + Math.abs(q * source[j]);
      if (size > most) most = size;
    }
    // |x| + |q y| below 2^52 as rounded: then q y, and x, and their sum were exact integers.
    return most < exactLimit / 2;
  }

  private reduced(x: number): number {
    return x % this.denominator;
  }

  /** Shortens the rows by multiples of one another; false where an entry stays too large. */
  private reduceRows(
    rows: readonly Float64Array[],
    corner: Float64Array,
    r: number,
    length: number,
  ): boolean {
    for (let pass = 0; pass < reductionPasses; pass++) {
      let changed = false;
      for (let a = 0; a < r; a++) {
        const source = rows[a];
        let square = 0;
        for (let j = 0; j < length; j++) square += source[j] * source[j];
        if (square === 0) continue;
        for (let b = 0; b < r; b++) {
          if (b === a) continue;
          const target = rows[b];
          let inner = 0;
          for (let j = 0; j < length; j++) inner += target[j] * source[j];
          // Any integer serves; the sums need not be exact.
          const q = Math.round(inner / square);
          if (q === 0) continue;
          if (!this.subtract(target, q, source, length)) return false;
          corner[b] = this.reduced(corner[b] - (q % this.denominator) * corner[a]);
          changed = true;
        }
      }
      if (!changed) break;
    }
    for (let c = 0; c < r; c++) {
      for (let j = 0; j < length; j++) if (Math.abs(rows[c][j]) >= entryLimit) return false;
    }
    return true;
  }

  /** Divides contents out of the first `length` columns, drops zeros, merges equal directions. */
  private merge(level: PlainLevel, below: PlainLevel, length: number): number {
    const { rows, weights, rank: r } = below;
    const { slots } = this;
    let size = 16;
    while (size < 4 * length) size *= 2;
    slots.fill(0, 0, size);
    let merged = 0;
    for (let j = 0; j < length; j++) {
      let content = 0;
      let sign = 0;
      for (let c = 0; c < r; c++) {
        const x = rows[c][j];
        if (x === 0) continue;
        if (sign === 0) sign = x > 0 ? 1 : -1;
        content = this.gcdOf(content, Math.abs(x));
      }
      if (content === 0) continue;
      const divisor = sign * content;
      const weight = level.weights[j] * content;
      let hash = 0;
      for (let c = 0; c < r; c++) {
        const x = divisor === 1 ? rows[c][j] : rows[c][j] / divisor + 0;
        rows[c][merged] = x;
        hash = Math.imul(hash ^ x, 0x9e3779b1);
        hash ^= hash >>> 15;
      }
      let slot = hash & (size - 1);
      let known = -1;
      for (; slots[slot] !== 0; slot = (slot + 1) & (size - 1)) {
        const other = slots[slot] - 1;
        let c = 0;
        while (c < r && rows[c][other] === rows[c][merged]) c++;
        if (c === r) {
          known = other;
          break;
        }
      }
      const sum = known < 0 ? weight : weights[known] + weight;
      if (sum >= exactLimit) return -1;
      if (known >= 0) weights[known] = sum;
      else {
        slots[slot] = ++merged;
        weights[merged - 1] = sum;
      }
    }
    return merged;
  }

  private gcdOf(a: number, b: number): number {
    return a < tableSize && b < tableSize ? this.table[a * tableSize + b] : plainGcd(a, b);
  }

  /**
   * Adds what contracting vector i of a rank-3 level gives: the plane quotient in closed form, its
   * area as the sum of all determinants. False where a number would pass its bound.
   */
  private close(level: PlainLevel, i: number, sums: ExactSums): boolean {
    const { rows, weights, corner } = level;
    const map = planeMap(rows[0][i], rows[1][i], rows[2][i]);
    if (map === null) return false;
    const [m0, m1, m2, m3, m4, m5] = map;
    const { xs, ys } = this;
    const [row0, row1, row2] = rows;
    let mostX = 0;
    let mostY = 0;
    let lengths = 0;
    const q = this.denominator;
    const cx = q === 1 ? 0 : (m0 * corner[0] + m1 * corner[1] + m2 * corner[2]) % q;
    const cy = q === 1 ? 0 : (m3 * corner[0] + m4 * corner[1] + m5 * corner[2]) % q;
    const whole = cx === 0 && cy === 0;
    for (let j = 0; j < i; j++) {
      const x = m0 * row0[j] + m1 * row1[j] + m2 * row2[j];
      const y = m3 * row0[j] + m4 * row1[j] + m5 * row2[j];
      const w = weights[j];
      const g = this.gcdOf(Math.abs(x), Math.abs(y));
      lengths += w * g;
      xs[j] = w * x;
      ys[j] = w * y;
      mostX = Math.max(mostX, Math.abs(xs[j]));
      mostY = Math.max(mostY, Math.abs(ys[j]));
    }
    // Each product, and each difference of two, is below 2^53 and exact.
    if (2 * mostX * mostY >= exactLimit || lengths >= exactLimit) return false;
    let area = 0;
    for (let j = 1; j < i; j++) {
      const x = xs[j];
      const y = ys[j];
      for (let k = 0; k < j; k++) area += Math.abs(x * ys[k] - y * xs[k]);
    }
    if (area >= exactLimit) return false;
    const w = weights[i];
    this.leaves++;
    sums.addProduct(3, w, area);
    if (whole) {
      sums.addProduct(1, w, 1);
      sums.addProduct(2, w, lengths);
      return true;
    }
    this.addTerm(sums, q / plainGcd(plainGcd(q, Math.abs(cx)), Math.abs(cy)), 1, w);
    for (let j = 0; j < i; j++) {
      const g = this.gcdOf(Math.abs(xs[j]), Math.abs(ys[j]));
      if (g === 0) continue;
      // Weights cancel: (xs, ys) / g is primitive. Modulo q all products are below 2^40.
      const side = Math.abs((cx * ((ys[j] / g) % q) - cy * ((xs[j] / g) % q)) % q);
      const at = this.placeOf(q / plainGcd(q, side)) * this.stride;
      sums.extend(at + this.stride);
      sums.addProduct(at + 2, w, g);
    }
    return true;
  }
}
