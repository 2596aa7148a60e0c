// Deletion-restriction in plain doubles, for normals whose minors stay small: the fast side.
//
// A node of depth k is the restriction to the flat of k chosen hyperplanes: one row of s = r - k
// entries for each hyperplane left, first occurrences in order. Rows come by fraction-free
// elimination (E. Bareiss, 1968), so every entry is a minor of the normals, an integer, and
// (a b - c d) / pivot is known to be one before it is computed. With M a bound on the entries:
//  - M <= 2^26: a b and c d are at most 2^52, their difference at most 2^53: all exact, and the
//    correctly rounded quotient of two integers that divide is exact.
//  - M^2 <= 2^48 |pivot|, in the closed form only: the products err by at most 2^-53 M^2 each and
//    their difference by 2^-52 M^2 more, together at most 2^-51 (1 + 2^-50) M^2, so by less than
//    0.13 after the division; the quotient is at most 2^49, which the division rounds by at most
//    2^-4. The sum is below 1/2 and rounding to the nearest integer is exact.
//  - otherwise the node is handed over to `handOver`.
// Two rows are parallel exactly when their entries over the first non-zero one agree. Correctly
// rounded division is monotone, so doubles that differ prove ratios that differ. Doubles that agree
// prove equal ratios when the integers are at most 2^26: distinct ratios f < g = u/t then have
// g - f >= g / (2^26 2^26), more than the width of the interval that rounds to one double. Larger
// ones are cross-multiplied exactly.
import type { DeletionTally } from './deletion-tally.js';

const EXACT_RATIOS = 2 ** 26;
const ROUNDED_QUOTIENTS = 2 ** 48;
/** Adding and subtracting it rounds |x| < 2^51 to the nearest integer. */
const ROUNDER = 1.5 * 2 ** 52;
const SCAN = 12;
const view = new Float64Array(2);
const words = new Uint32Array(view.buffer);

/** Whether a d = b c, for integers below 2^53, by exact products (T. Dekker, 1971). */
function equalProducts(a: number, d: number, b: number, c: number): boolean {
  const p = a * d;
  if (p !== b * c) return false;
  return productError(a, d, p) === productError(b, c, p);
}

/** a b - fl(a b), exactly. */
function productError(a: number, b: number, product: number): number {
  const wideA = 134217729 * a;
  const highA = wideA - (wideA - a);
  const lowA = a - highA;
  const wideB = 134217729 * b;
  const highB = wideB - (wideB - b);
  const lowB = b - highB;
  return lowA * lowB - (product - highA * highB - lowA * highB - highA * lowB);
}

/** One run over m rows of r entries (r >= 3), integers below 2^53, no two parallel. */
export class PlainDeletion {
  private readonly rank: number;
  private readonly tally: DeletionTally;
  private readonly handOver: (path: Int32Array, depth: number, rows: Int32Array, n: number) => void;
  /** By depth: the rows, the same over their first non-zero entry, the hyperplane of each row. */
  private readonly rows: Float64Array[] = [];
  private readonly ratios: Float64Array[] = [];
  private readonly origin: Int32Array[] = [];
  /** By depth: the pivot the next elimination divides by, and the bound on the entries. */
  private readonly divisor: Float64Array;
  private readonly bound: Float64Array;
  /** The hyperplanes whose restriction we are in. */
  private readonly path: Int32Array;
  /** Open addressing; a slot is in use when its stamp is the current one. */
  private readonly slots: Int32Array;
  private readonly stamps: Int32Array;
  private stamp = 0;
  private handed = 0;
  private closed = 0;
  private readonly keys: Float64Array;
  private readonly numerators: Float64Array;
  private readonly denominators: Float64Array;

  /** `handOver(path, depth, rows, n)` counts a node whose first n rows are those hyperplanes. */
  constructor(
    normals: Float64Array,
    m: number,
    rank: number,
    tally: DeletionTally,
    handOver: (path: Int32Array, depth: number, rows: Int32Array, n: number) => void,
  ) {
    this.rank = rank;
    this.tally = tally;
    this.handOver = handOver;
    for (let s = rank; s >= 3; s--) {
      this.rows.push(s === rank ? normals : new Float64Array(m * s));
      this.ratios.push(new Float64Array(m * s));
      this.origin.push(Int32Array.from({ length: m }, (_, i) => i));
    }
    this.divisor = new Float64Array(rank).fill(1);
    this.bound = new Float64Array(rank);
    this.bound[0] = normals.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
    this.path = new Int32Array(rank);
    const size = 1 << Math.max(4, 34 - Math.clz32(m));
    this.slots = new Int32Array(size);
    this.stamps = new Int32Array(size);
    this.keys = new Float64Array(m);
    this.numerators = new Float64Array(m);
    this.denominators = new Float64Array(m);
  }

  /** Counts the node at `depth` that has n rows. */
  visit(depth: number, n: number): void {
    const { tally, path } = this;
    const origin = this.origin[depth];
    if (this.rank - depth === 3) {
      if (!this.close(depth, n)) {
        this.handed++;
        this.handOver(path, depth, origin, n);
      }
      return;
    }
    if (n <= 2) {
      tally.closeSmall(depth, n);
      return;
    }
    // Where most of what is begun has to be handed over, do it early.
    if (depth > 0 && this.handed > 256 && this.handed > this.closed) {
      this.handOver(path, depth, origin, n);
      return;
    }
    tally.open(depth);
    for (let i = 0; i < n; i++) {
      path[depth] = origin[i];
      const left = this.descend(depth, i);
      if (left >= 0) {
        this.visit(depth + 1, left);
      } else {
        this.handed++;
        this.handOver(path, depth + 1, origin, i);
      }
    }
  }

  private nextStamp(): number {
    if (this.stamp === 0x7fffffff) {
      this.stamps.fill(0);
      this.stamp = 0;
    }
    return ++this.stamp;
  }

  /** The column to eliminate: a unit if there is one (entries do not grow), else the largest. */
  private pivotColumn(rows: Float64Array, offset: number, s: number): number {
    let best = 0;
    let size = 0;
    for (let j = 0; j < s; j++) {
      const x = Math.abs(rows[offset + j]);
      if (x === 1) return j;
      if (x > size) {
        size = x;
        best = j;
      }
    }
    return best;
  }

  /** Restricts rows 0..i-1 to row i; the number of rows left, or -1 when the gate says no. */
  private descend(depth: number, i: number): number {
    const s = this.rank - depth;
    const t = s - 1;
    const rows = this.rows[depth];
    const from = this.origin[depth];
    const out = this.rows[depth + 1];
    const ratios = this.ratios[depth + 1];
    const to = this.origin[depth + 1];
    const { slots, stamps } = this;
    const mask = slots.length - 1;
    const pivotRow = i * s;
    const column = this.pivotColumn(rows, pivotRow, s);
    const pivot = rows[pivotRow + column];
    const divisor = this.divisor[depth];
    const bound = this.bound[depth];
    // Larger ones would be too large for the closed form anyway.
    if (bound > EXACT_RATIOS) return -1;
    const divides = divisor !== 1 && divisor !== -1;
    const stamp = this.nextStamp();
    let left = 0;
    let most = 0;
    for (let j = 0; j < i; j++) {
      const row = j * s;
      const factor = rows[row + column];
      const start = left * t;
      let lead = 0;
      let hash = 0;
      let write = start;
      for (let x = 0; x < s; x++) {
        if (x === column) continue;
        let y = pivot * rows[row + x] - factor * rows[pivotRow + x];
        if (divides) y /= divisor;
        out[write] = y;
        if (y !== 0) {
          if (lead === 0) lead = y;
          const size = y < 0 ? -y : y;
          if (size > most) most = size;
          const ratio = y / lead;
          ratios[write] = ratio;
          hash = hash * 1.9375 + ratio;
        } else {
          ratios[write] = 0;
          hash *= 1.9375;
        }
        write++;
      }
      view[0] = hash;
      let slot = Math.imul(words[0] ^ Math.imul(words[1], 0x9e3779b1), 0x85ebca6b);
      slot = (slot ^ (slot >>> 15)) & mask;
      let fresh = true;
      while (stamps[slot] === stamp) {
        if (this.sameRow(out, ratios, slots[slot] * t, start, t)) {
          fresh = false;
          break;
        }
        slot = (slot + 1) & mask;
      }
      if (fresh) {
        stamps[slot] = stamp;
        slots[slot] = left;
        to[left++] = from[j];
      }
    }
    this.divisor[depth + 1] = pivot;
    this.bound[depth + 1] = most;
    return left;
  }

  private sameRow(
    rows: Float64Array,
    ratios: Float64Array,
    a: number,
    b: number,
    t: number,
  ): boolean {
    for (let x = 0; x < t; x++) if (ratios[a + x] !== ratios[b + x]) return false;
    let lead = 0;
    while (rows[a + lead] === 0) lead++;
    for (let x = lead + 1; x < t; x++) {
      const u = rows[a + x];
      const v = rows[b + x];
      const far = Math.max(
        Math.abs(u),
        Math.abs(v),
        Math.abs(rows[a + lead]),
        Math.abs(rows[b + lead]),
      );
      if (far > EXACT_RATIOS && !equalProducts(u, rows[b + lead], v, rows[a + lead])) return false;
    }
    return true;
  }

  /**
   * A node of rank 3: its rank-2 flats counted with Moebius value m - 1, m the planes through one:
   * that is, for each plane p, the distinct lines in which earlier planes meet it. False when the
   * gate says no.
   */
  private close(depth: number, n: number): boolean {
    const rows = this.rows[depth];
    const bound = this.bound[depth];
    const divisor = this.divisor[depth];
    const { keys, numerators, denominators, slots, stamps } = this;
    const mask = slots.length - 1;
    const rounds = bound > EXACT_RATIOS;
    if (rounds && bound * bound > ROUNDED_QUOTIENTS * Math.abs(divisor)) return false;
    // Bound on the two coordinates of a line: equal doubles above it need a second look.
    const doubtful = (rounds ? 2 ** 49 : 2 * bound * bound) > EXACT_RATIOS;
    let w2 = 0;
    for (let p = 1; p < n; p++) {
      const centre = 3 * p;
      const c = rows[centre + 2] !== 0 ? 2 : rows[centre + 1] !== 0 ? 1 : 0;
      const a = c === 0 ? 1 : 0;
      const b = c === 2 ? 1 : 2;
      const pc = rows[centre + c];
      const pa = rows[centre + a];
      const pb = rows[centre + b];
      const scans = p <= SCAN;
      const stamp = scans ? 0 : this.nextStamp();
      let k = 0;
      for (let q = 0; q < 3 * p; q += 3) {
        const f = rows[q + c];
        let u = pc * rows[q + a] - f * pa;
        let t = pc * rows[q + b] - f * pb;
        if (rounds) {
          u = u / divisor + ROUNDER - ROUNDER;
          t = t / divisor + ROUNDER - ROUNDER;
        }
        // + 0 makes one zero of the two.
        const key = t === 0 ? Number.POSITIVE_INFINITY : u / t + 0;
        let fresh = true;
        if (scans) {
          for (let x = 0; x < k; x++) {
            if (
              keys[x] === key &&
              (!doubtful || equalProducts(u, denominators[x], numerators[x], t))
            ) {
              fresh = false;
              break;
            }
          }
        } else {
          view[0] = key;
          let slot = Math.imul(words[0] ^ Math.imul(words[1], 0x9e3779b1), 0x85ebca6b);
          slot = (slot ^ (slot >>> 15)) & mask;
          while (stamps[slot] === stamp) {
            const x = slots[slot];
            if (
              keys[x] === key &&
              (!doubtful || equalProducts(u, denominators[x], numerators[x], t))
            ) {
              fresh = false;
              break;
            }
            slot = (slot + 1) & mask;
          }
          if (fresh) {
            stamps[slot] = stamp;
            slots[slot] = k;
          }
        }
        if (fresh) {
          keys[k] = key;
          if (doubtful) {
            numerators[k] = u;
            denominators[k] = t;
          }
          k++;
        }
      }
      w2 += k;
    }
    this.closed++;
    this.tally.close(n, w2);
    return true;
  }
}
