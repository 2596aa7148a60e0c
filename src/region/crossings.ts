// The order in which the lines of a flat of dimension 3 cross one of them (in dimension 2: the
// order of the points on it). In the chart where coordinate 0 is 1, class c is the line
// a0 + ap xp + aq xq = 0; along it, by s = xq, class k has the value x + y s and changes side at
// s = -x/y. Only the crossings with active classes are sorted; an inactive class is noted at the
// first of them that it does not come after.
//
// Correctly rounded division is monotone: of two exact integer fractions, different doubles are
// already in their true order, and only equal doubles can hide a difference; none hides when
// |x|, |y| <= 2^26, since two such fractions then differ by more than 2^-52 of themselves. x and y
// are exact by the same two gates as in restriction.ts (rounded quotients reach 2^50 here, and err by
// at most 2^-2 + 2^-3); otherwise, or when a difference hides, the ring decides.
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
  /** Active classes in the order of their crossings, `count` of them. */
  order: Int32Array;
  /** Position of each crossing along the line: ascending, equal exactly where they coincide. */
  position: Float64Array;
  count = 0;
  /** Per class other than c: 1 where the start of the line lies on its positive side, else 0. */
  readonly startsPositive: Uint8Array;
  /**
   * For crossing i the inactive classes to be crossed before it is over and after crossing i - 1:
   * `firstWaiting[i]`, then `nextWaiting[k]` after k, until -1.
   */
  readonly firstWaiting: Int32Array;
  readonly nextWaiting: Int32Array;
  readonly #approximate: Float64Array;
  /**
   * The line walked along: |a_p|, then a_0 and a_q with the sign of a_p, then what divides products
   * (0 where they are exact as they are). A typed array, so that no number is boxed on the way.
   */
  readonly #line = new Float64Array(4);
  #spareOrder: Int32Array;
  #sparePosition: Float64Array;

  constructor(ring: Ring<unknown>, hyperplanes: number) {
    this.ring = ring;
    this.order = new Int32Array(hyperplanes);
    this.position = new Float64Array(hyperplanes);
    this.startsPositive = new Uint8Array(hyperplanes);
    this.firstWaiting = new Int32Array(hyperplanes);
    this.nextWaiting = new Int32Array(hyperplanes);
    this.#approximate = new Float64Array(hyperplanes);
    this.#spareOrder = new Int32Array(hyperplanes);
    this.#sparePosition = new Float64Array(hyperplanes);
  }

  /** Along class c >= 1 of a level 3; classes 1 to active - 1 are active, class 0 lies at infinity. */
  alongLine(level: FlatLevel, c: number, active: number): void {
    const B = level.largest;
    if (level.plain && (B <= DIRECT_LIMIT || B * B <= ROUNDED_FACTOR * level.pivot)) {
      const { entries } = level;
      const p = entries[3 * c + 2] === 0 ? 1 : 2;
      const q = 3 - p;
      const flip = entries[3 * c + p] < 0 ? -1 : 1;
      const line = this.#line;
      line[0] = flip * entries[3 * c + p];
      line[1] = flip * entries[3 * c];
      line[2] = flip * entries[3 * c + q];
      line[3] = B <= DIRECT_LIMIT ? 0 : level.pivot;
      this.#take(level, active, c, p, q);
      if ((line[3] === 0 && 2 * B * B <= TIE_FREE_LIMIT) || this.#nothingHides(level, p, q)) return;
    }
    const { ring } = this;
    const rows = level.elementRows(ring);
    const own = rows[c];
    const p = ring.sign(own[2]) === 0 ? 1 : 2;
    const q = 3 - p;
    const flipped = ring.sign(own[p]) < 0;
    const pivot = flipped ? ring.negate(own[p]) : own[p];
    const x: unknown[] = [];
    const y: unknown[] = [];
    for (const row of rows) {
      const factor = flipped ? ring.negate(row[p]) : row[p];
      x.push(ring.subtract(ring.multiply(pivot, row[0]), ring.multiply(factor, own[0])));
      y.push(ring.subtract(ring.multiply(pivot, row[q]), ring.multiply(factor, own[q])));
    }
    this.#overRing(x, y, c, active);
  }

  /** The points of a level 2, class 0 (at infinity) left out; classes 1 to active - 1 are active. */
  alongItself(level: FlatLevel, active: number): void {
    if (level.plain) {
      this.#line.set([1, 0, 0, 0]);
      this.#take(level, active, 0, 0, 1);
      if (this.#nothingHides(level, 0, 1)) return;
    }
    const rows = level.elementRows(this.ring);
    this.#overRing(
      rows.map((row) => row[0]),
      rows.map((row) => row[1]),
      0,
      active,
    );
  }

  /**
   * Values x + y s of all classes but 0 and c, coordinate p eliminated by class c (which changes
   * nothing where c = 0), s being coordinate q.
   */
  #take(level: FlatLevel, active: number, c: number, p: number, q: number): void {
    const { entries, classes, dimension } = level;
    const line = this.#line;
    const pivot = line[0];
    const own0 = line[1];
    const ownq = line[2];
    const divisor = line[3];
    const { startsPositive, position, order } = this;
    let count = 0;
    for (let k = 1; k < active; k++) {
      if (k === c) continue;
      const offset = dimension * k;
      const factor = entries[offset + p];
      let x = pivot * entries[offset] - factor * own0;
      let y = pivot * entries[offset + q] - factor * ownq;
      if (divisor !== 0) {
        x = Math.round(x / divisor);
        y = Math.round(y / divisor);
      }
      if (y === 0) {
        startsPositive[k] = x > 0 ? 1 : 0;
        continue;
      }
      startsPositive[k] = y < 0 ? 1 : 0;
      position[count] = -x / y;
      order[count++] = k;
    }
    this.count = count;
    this.#sort();
    this.firstWaiting.fill(-1, 0, count);
    if (active < classes) this.#wait(level, active, p, q);
  }

  /** The inactive classes: each waits for the first crossing not before its own. */
  #wait(level: FlatLevel, active: number, p: number, q: number): void {
    const { entries, classes, dimension } = level;
    const line = this.#line;
    const pivot = line[0];
    const own0 = line[1];
    const ownq = line[2];
    const divisor = line[3];
    const { startsPositive, position, firstWaiting, nextWaiting, count } = this;
    for (let k = active; k < classes; k++) {
      const offset = dimension * k;
      const factor = entries[offset + p];
      let x = pivot * entries[offset] - factor * own0;
      let y = pivot * entries[offset + q] - factor * ownq;
      if (divisor !== 0) {
        x = Math.round(x / divisor);
        y = Math.round(y / divisor);
      }
      if (y === 0) {
        startsPositive[k] = x > 0 ? 1 : 0;
        continue;
      }
      startsPositive[k] = y < 0 ? 1 : 0;
      const here = -x / y;
      let low = 0;
      let high = count;
      while (low < high) {
        const middle = (low + high) >> 1;
        if (position[middle] < here) low = middle + 1;
        else high = middle;
      }
      if (low === count) continue;
      nextWaiting[k] = firstWaiting[low];
      firstWaiting[low] = k;
    }
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

  /**
   * True when active crossings at equal doubles coincide exactly. An inactive class at an equal
   * double may then lie just before or after, but still before the next crossing: either way its sign
   * is that of a point of the line there.
   */
  #nothingHides(level: FlatLevel, p: number, q: number): boolean {
    const { position, order, count } = this;
    const { entries, dimension } = level;
    const line = this.#line;
    const pivot = line[0];
    const own0 = line[1];
    const ownq = line[2];
    const divisor = line[3];
    const value = (k: number, j: number, own: number): number => {
      const x = pivot * entries[dimension * k + j] - entries[dimension * k + p] * own;
      return divisor === 0 ? x : Math.round(x / divisor);
    };
    for (let i = 1; i < count; i++) {
      if (position[i] !== position[i - 1]) continue;
      const k = order[i];
      const l = order[i - 1];
      const left = [value(k, 0, own0), value(l, q, ownq)];
      const right = [value(l, 0, own0), value(k, q, ownq)];
      if (!productsEqual(left[0], left[1], right[0], right[1])) return false;
    }
    return true;
  }

  #overRing(x: unknown[], y: unknown[], c: number, active: number): void {
    const { ring } = this;
    const approximate = this.#approximate;
    const crossing: number[] = [];
    for (let k = 1; k < x.length; k++) {
      if (k === c) continue;
      const side = ring.sign(y[k]);
      this.startsPositive[k] = (side === 0 ? ring.sign(x[k]) > 0 : side < 0) ? 1 : 0;
      if (side === 0) continue;
      approximate[k] = -ring.ratio(x[k], y[k]);
      crossing.push(k);
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
    crossing.sort(compare);
    this.count = 0;
    let rank = 0;
    // Inactive classes wait for the first active crossing at their own place or later.
    let waiting: number[] = [];
    let sameRankStart = 0;
    crossing.forEach((k, i) => {
      if (i > 0 && compare(crossing[i - 1], k) !== 0) {
        rank++;
        sameRankStart = this.count;
      }
      if (k < active) {
        this.firstWaiting[this.count] = -1;
        this.position[this.count] = rank;
        this.order[this.count++] = k;
      } else {
        waiting.push(k);
      }
      if (sameRankStart === this.count) return;
      for (const inactive of waiting) {
        this.nextWaiting[inactive] = this.firstWaiting[sameRankStart];
        this.firstWaiting[sameRankStart] = inactive;
      }
      waiting = [];
    });
  }
}
