// The order in which the lines of a flat of dimension 3 cross one of them (in dimension 2: the
// order of the points on it). In the chart where coordinate 0 is 1, class c is the line
// a0 + ap xp + aq xq = 0; along it, by s = xq, class k has the value x + y s and changes side at
// s = -x/y.
//
// Correctly rounded division is monotone: of two exact integer fractions, different doubles are
// already in their true order, and only equal doubles can hide a difference; none hides when
// |x|, |y| <= 2^26, since two such fractions then differ by more than 2^-52 of themselves. x and y
// are exact by the same two gates as in restriction.ts (rounded quotients reach 2^50 here, and err by
// at most 2^-2 + 2^-3); otherwise the ring decides.
import type { Ring } from '../exact/ring.js';
import type { FlatLevel } from './level.js';
import { productsEqual } from './restriction.js';

const DIRECT_LIMIT = 2 ** 26;
const ROUNDED_FACTOR = 2 ** 49;
/** Up to here -x/y tells any two fractions apart. */
const TIE_FREE_LIMIT = 2 ** 26;
const RUN = 12;

/** The crossings along one line; n classes at most, scratch reused between calls. */
export class Crossings {
  readonly ring: Ring<unknown>;
  /** Classes in the order of their crossings, `count` of them. */
  order: Int32Array;
  /** Position of each crossing along the line: ascending, equal exactly where they coincide. */
  position: Float64Array;
  count = 0;
  /** Per class: 1 where the start of the line lies on the positive side of it, 0 on the negative. */
  readonly startsPositive: Uint8Array;
  /** Classes that never cross it (parallel in the chart), `parallelCount` of them. */
  readonly parallel: Int32Array;
  parallelCount = 0;
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  #spareOrder: Int32Array;
  #sparePosition: Float64Array;

  constructor(ring: Ring<unknown>, hyperplanes: number) {
    this.ring = ring;
    this.order = new Int32Array(hyperplanes);
    this.position = new Float64Array(hyperplanes);
    this.startsPositive = new Uint8Array(hyperplanes);
    this.parallel = new Int32Array(hyperplanes);
    this.#x = new Float64Array(hyperplanes);
    this.#y = new Float64Array(hyperplanes);
    this.#spareOrder = new Int32Array(hyperplanes);
    this.#sparePosition = new Float64Array(hyperplanes);
  }

  /** Crossings of the other classes (class 0, at infinity, left out) along class c >= 1 of a level 3. */
  alongLine(level: FlatLevel, c: number): void {
    if (level.plain) {
      const B = level.largest;
      if (B <= DIRECT_LIMIT) {
        this.#plainLine(level, c, 0);
        this.#sort();
        if (2 * B * B > TIE_FREE_LIMIT) this.#settleTies();
        return;
      }
      if (B * B <= ROUNDED_FACTOR * level.pivot) {
        this.#plainLine(level, c, level.pivot);
        this.#sort();
        this.#settleTies();
        return;
      }
    }
    const rows = level.elementRows(this.ring);
    const own = rows[c];
    const ring = this.ring;
    let p = 2;
    if (ring.sign(own[2]) === 0) p = 1;
    const q = 3 - p;
    const flipped = ring.sign(own[p]) < 0;
    const pivot = flipped ? ring.negate(own[p]) : own[p];
    const x: unknown[] = [];
    const y: unknown[] = [];
    for (let k = 0; k < rows.length; k++) {
      const factor = flipped ? ring.negate(rows[k][p]) : rows[k][p];
      x.push(ring.subtract(ring.multiply(pivot, rows[k][0]), ring.multiply(factor, own[0])));
      y.push(ring.subtract(ring.multiply(pivot, rows[k][q]), ring.multiply(factor, own[q])));
    }
    this.#overRing(x, y, c);
  }

  /** The points of a level 2, class 0 (at infinity) left out. */
  onPlane(level: FlatLevel): void {
    if (level.plain) {
      const entries = level.entries;
      this.count = 0;
      this.parallelCount = 0;
      for (let k = 1; k < level.classes; k++) this.#take(k, entries[2 * k], entries[2 * k + 1]);
      this.#sort();
      this.#settleTies();
      return;
    }
    const rows = level.elements;
    this.#overRing(
      rows.map((row) => row[0]),
      rows.map((row) => row[1]),
      0,
    );
  }

  #take(k: number, x: number, y: number): void {
    if (y === 0) {
      this.parallel[this.parallelCount++] = k;
      this.startsPositive[k] = x > 0 ? 1 : 0;
      return;
    }
    this.startsPositive[k] = y < 0 ? 1 : 0;
    this.#x[k] = x;
    this.#y[k] = y;
    this.position[this.count] = -x / y;
    this.order[this.count++] = k;
  }

  /** `divisor` is 0 where products are exact as they are, else the pivot that divides them. */
  #plainLine(level: FlatLevel, c: number, divisor: number): void {
    const entries = level.entries;
    const base = 3 * c;
    let p = 2;
    if (entries[base + 2] === 0) p = 1;
    const q = 3 - p;
    const flip = entries[base + p] < 0 ? -1 : 1;
    const pivot = flip * entries[base + p];
    const own0 = entries[base];
    const ownq = entries[base + q];
    const count = level.classes;
    const { startsPositive, position, order, parallel } = this;
    const xs = this.#x;
    const ys = this.#y;
    let crossings = 0;
    let parallels = 0;
    for (let k = 1; k < count; k++) {
      if (k === c) continue;
      const offset = 3 * k;
      const factor = flip * entries[offset + p];
      let x = pivot * entries[offset] - factor * own0;
      let y = pivot * entries[offset + q] - factor * ownq;
      if (divisor !== 0) {
        x = Math.round(x / divisor);
        y = Math.round(y / divisor);
      }
      if (y === 0) {
        parallel[parallels++] = k;
        startsPositive[k] = x > 0 ? 1 : 0;
      } else {
        startsPositive[k] = y < 0 ? 1 : 0;
        xs[k] = x;
        ys[k] = y;
        position[crossings] = -x / y;
        order[crossings++] = k;
      }
    }
    this.count = crossings;
    this.parallelCount = parallels;
  }

  /** Insertion sort in runs, then bottom-up merging: ascending by position. */
  #sort(): void {
    const count = this.count;
    let position = this.position;
    let order = this.order;
    const run = count <= 4 * RUN ? count : RUN;
    for (let start = 0; start < count; start += run) {
      const end = Math.min(start + run, count);
      for (let i = start + 1; i < end; i++) {
        const t = position[i];
        const k = order[i];
        let j = i - 1;
        while (j >= start && position[j] > t) {
          position[j + 1] = position[j];
          order[j + 1] = order[j];
          j--;
        }
        position[j + 1] = t;
        order[j + 1] = k;
      }
    }
    if (run >= count) return;
    let sparePosition = this.#sparePosition;
    let spareOrder = this.#spareOrder;
    for (let width = run; width < count; width *= 2) {
      for (let start = 0; start < count; start += 2 * width) {
        const middle = Math.min(start + width, count);
        const end = Math.min(start + 2 * width, count);
        let i = start;
        let j = middle;
        let at = start;
        while (i < middle && j < end) {
          if (position[i] <= position[j]) {
            sparePosition[at] = position[i];
            spareOrder[at++] = order[i++];
          } else {
            sparePosition[at] = position[j];
            spareOrder[at++] = order[j++];
          }
        }
        while (i < middle) {
          sparePosition[at] = position[i];
          spareOrder[at++] = order[i++];
        }
        while (j < end) {
          sparePosition[at] = position[j];
          spareOrder[at++] = order[j++];
        }
      }
      [position, sparePosition] = [sparePosition, position];
      [order, spareOrder] = [spareOrder, order];
    }
    this.position = position;
    this.#sparePosition = sparePosition;
    this.order = order;
    this.#spareOrder = spareOrder;
  }

  /** Where equal doubles hide different fractions, orders them exactly and renumbers all positions. */
  #settleTies(): void {
    const { position, order, count } = this;
    const x = this.#x;
    const y = this.#y;
    let settled = true;
    for (let i = 1; i < count && settled; i++) {
      if (position[i] !== position[i - 1]) continue;
      settled = productsEqual(x[order[i]], y[order[i - 1]], x[order[i - 1]], y[order[i]]);
    }
    if (settled) return;
    const before = (k: number, l: number): number => {
      const a = -BigInt(x[k]) * BigInt(y[l]);
      const b = -BigInt(x[l]) * BigInt(y[k]);
      const same = y[k] > 0 === y[l] > 0;
      return a === b ? 0 : a < b === same ? -1 : 1;
    };
    for (let start = 0; start < count; ) {
      let end = start + 1;
      while (end < count && position[end] === position[start]) end++;
      if (end - start > 1) order.subarray(start, end).sort(before);
      start = end;
    }
    this.#renumber((k, l) => before(k, l) === 0);
  }

  #renumber(coincide: (k: number, l: number) => boolean): void {
    const { position, order, count } = this;
    let rank = 0;
    for (let i = 0; i < count; i++) {
      if (i > 0 && !coincide(order[i], order[i - 1])) rank++;
      position[i] = rank;
    }
  }

  #overRing(x: unknown[], y: unknown[], c: number): void {
    const ring = this.ring;
    const approximate = this.#x;
    this.count = 0;
    this.parallelCount = 0;
    for (let k = 1; k < x.length; k++) {
      if (k === c) continue;
      const side = ring.sign(y[k]);
      if (side === 0) {
        this.parallel[this.parallelCount++] = k;
        this.startsPositive[k] = ring.sign(x[k]) > 0 ? 1 : 0;
        continue;
      }
      this.startsPositive[k] = side < 0 ? 1 : 0;
      approximate[k] = -ring.ratio(x[k], y[k]);
      this.order[this.count++] = k;
    }
    const compare = (k: number, l: number): number => {
      const difference = approximate[k] - approximate[l];
      const bound = 2 ** -46 * (Math.abs(approximate[k]) + Math.abs(approximate[l]));
      if (difference > bound) return 1;
      if (difference < -bound) return -1;
      const left = ring.negate(ring.multiply(x[k], y[l]));
      const right = ring.negate(ring.multiply(x[l], y[k]));
      const order = ring.sign(ring.subtract(left, right));
      return ring.sign(y[k]) === ring.sign(y[l]) ? order : -order;
    };
    this.order.subarray(0, this.count).sort(compare);
    this.#renumber((k, l) => compare(k, l) === 0);
  }
}
