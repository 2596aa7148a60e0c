// The traces of an arrangement on a chain of flats. On a flat of rank k each hyperplane that does
// not contain it leaves a hyperplane of the flat; hyperplanes with one trace form a class, and a
// class is kept as one row of r - k entries, found by fraction-free elimination (E. Bareiss, 1968),
// so that every entry is a minor of the normals.
import type { Ring } from '../exact/ring.js';

/** Integers up to this have exact products, and those exact differences. */
const EXACT_FACTOR = 2 ** 26;
const view = new Float64Array(1);
const halves = new Int32Array(view.buffer);

/**
 * Traces in plain doubles, as far as they are proved exact. (a b - c d) / previous pivot is an
 * integer. With entries up to 2^26 all of it is exact. With entries up to M and M^2 at most
 * 2^48 |previous pivot|, the products and their difference err together by less than 2^-50.9 M^2,
 * which is below 0.14 after division; the quotient, at most 2^49, is rounded by at most 2^-4; so
 * the nearest integer is the value. Beyond that the ring has to do it.
 *
 * Rows are compared by the doubles of their ratios to the first non-zero entry. Division rounds
 * monotonically, so different doubles are different ratios; equal doubles are equal ratios for
 * integers up to 2^26 (two that differ are at least 2^-52 of themselves apart, too far for one
 * double), and are multiplied out in BigInt for larger ones.
 */
export class PlainTraces {
  private readonly r: number;
  private readonly rows: Float64Array[];
  /** Largest entry by rank, and the pivot that made the rows. */
  private readonly largest: Float64Array;
  private readonly pivots: Float64Array;
  private readonly ratios: Float64Array;
  private readonly table: Int32Array;

  /** `normals`: m rows of r integers below 2^53. */
  constructor(normals: Float64Array, r: number) {
    const m = normals.length / r;
    this.r = r;
    this.rows = Array.from({ length: r }, (_, k) =>
      k === 0 ? normals : new Float64Array(m * (r - k)),
    );
    this.largest = new Float64Array(r);
    for (const x of normals) this.largest[0] = Math.max(this.largest[0], Math.abs(x));
    this.pivots = new Float64Array(r).fill(1);
    this.ratios = new Float64Array(m * r);
    this.table = new Int32Array(1 << Math.max(4, 33 - Math.clz32(m)));
  }

  /**
   * From the flat of rank `rank` with `classes` classes to the flat its class c cuts out: writes
   * the new rows, and into groupOf[i] the new class of class i (-1 for c), numbered by first
   * occurrence. Returns how many there are, or null when exactness is not proved here.
   */
  descend(rank: number, classes: number, c: number, groupOf: Int32Array): number | null {
    const bound = this.largest[rank];
    const previous = this.pivots[rank];
    const wide = bound > EXACT_FACTOR;
    if (wide && bound * bound > 2 ** 48 * Math.abs(previous)) return null;
    const width = this.r - rank;
    const narrow = width - 1;
    const source = this.rows[rank];
    const target = this.rows[rank + 1];
    const { ratios, table } = this;
    let size = 16;
    while (size < 2 * classes) size *= 2;
    table.fill(0, 0, size);
    const base = c * width;
    const column = this.pivotColumn(source, base, width, bound > 2 ** 10);
    const pivot = source[base + column];
    // New entries are at most 2 M^2 / |previous pivot|: above 2^26 equal doubles are looked at again.
    const checks = (2.01 * bound * bound) / Math.abs(previous) > EXACT_FACTOR;
    let count = 0;
    let largest = 0;
    for (let i = 0; i < classes; i++) {
      if (i === c) {
        groupOf[i] = -1;
        continue;
      }
      const from = i * width;
      const into = count * narrow;
      const factor = source[from + column];
      let first = 0;
      let mix = 0;
      for (let j = 0, w = into; j < width; j++) {
        if (j === column) continue;
        let value = (source[from + j] * pivot - source[base + j] * factor) / previous;
        if (wide) value = Math.round(value);
        target[w] = value;
        let ratio = 0;
        if (value !== 0) {
          if (first === 0) first = value;
          ratio = value / first;
          largest = Math.max(largest, Math.abs(value));
        }
        ratios[w] = ratio;
        mix = mix * 2.6180339 + ratio;
        w++;
      }
      view[0] = mix;
      let h = Math.imul(halves[0] + Math.imul(halves[1], 0x2c1b3c6d), 0x297a2d39);
      h = (h ^ (h >>> 14)) & (size - 1);
      let group = -1;
      for (let entry = table[h]; entry !== 0; entry = table[h]) {
        const other = (entry - 1) * narrow;
        let j = 0;
        while (j < narrow && ratios[other + j] === ratios[into + j]) j++;
        if (j === narrow && (!checks || this.equalRows(target, other, into, narrow))) {
          group = entry - 1;
          break;
        }
        h = (h + 1) & (size - 1);
      }
      if (group < 0) {
        group = count++;
        table[h] = count;
      }
      groupOf[i] = group;
    }
    this.largest[rank + 1] = largest;
    this.pivots[rank + 1] = pivot;
    return count;
  }

  /** A small pivot keeps small numbers small; a large one lets large numbers be divided exactly. */
  private pivotColumn(rows: Float64Array, base: number, width: number, large: boolean): number {
    let column = -1;
    for (let j = 0; j < width; j++) {
      const x = Math.abs(rows[base + j]);
      if (x === 0) continue;
      const best = column < 0 ? -1 : Math.abs(rows[base + column]);
      if (best < 0 || (large ? x > best : x < best)) column = j;
    }
    return column;
  }

  private equalRows(rows: Float64Array, a: number, b: number, width: number): boolean {
    let first = 0;
    while (rows[a + first] === 0) first++;
    const p = BigInt(rows[a + first]);
    const q = BigInt(rows[b + first]);
    for (let j = first + 1; j < width; j++) {
      if (BigInt(rows[a + j]) * q !== BigInt(rows[b + j]) * p) return false;
    }
    return true;
  }
}

/** Traces in the ring: any size, any numbers. Doubles only tell apart what differs by far. */
export class RingTraces<E> {
  private readonly ring: Ring<E>;
  private readonly rows: E[][][];
  private readonly pivots: E[];

  constructor(ring: Ring<E>, normals: readonly (readonly E[])[]) {
    this.ring = ring;
    this.rows = [normals.map((row) => row.slice())];
    this.pivots = [ring.one];
  }

  /** As PlainTraces.descend, always with an answer. */
  descend(rank: number, c: number, groupOf: Int32Array): number {
    const { ring } = this;
    const source = this.rows[rank];
    const base = source[c];
    const previous = this.pivots[rank];
    const column = base.findIndex((x) => ring.sign(x) !== 0);
    const pivot = base[column];
    const target: E[][] = [];
    const buckets = new Map<string, { row: E[]; ratios: number[]; group: number }[]>();
    source.forEach((from, i) => {
      if (i === c) {
        groupOf[i] = -1;
        return;
      }
      const row: E[] = [];
      for (let j = 0; j < from.length; j++) {
        if (j === column) continue;
        const cross = ring.subtract(
          ring.multiply(from[j], pivot),
          ring.multiply(base[j], from[column]),
        );
        row.push(ring.divideExactly(cross, previous));
      }
      const first = row.findIndex((x) => ring.sign(x) !== 0);
      const ratios = row.map((x) => ring.ratio(x, row[first]));
      // Parallel rows have their zeros, and the signs of their ratios, in the same places.
      const pattern = row.map((x) => ring.sign(x) * ring.sign(row[first])).join();
      const bucket = buckets.get(pattern) ?? [];
      buckets.set(pattern, bucket);
      const known = bucket.find(
        (other) => near(other.ratios, ratios) && this.parallel(other.row, row, first),
      );
      if (known !== undefined) {
        groupOf[i] = known.group;
        return;
      }
      groupOf[i] = target.length;
      bucket.push({ row, ratios, group: target.length });
      target.push(row);
    });
    this.rows[rank + 1] = target;
    this.pivots[rank + 1] = pivot;
    return target.length;
  }

  private parallel(a: readonly E[], b: readonly E[], first: number): boolean {
    const { ring } = this;
    return a.every(
      (x, j) =>
        ring.sign(ring.subtract(ring.multiply(x, b[first]), ring.multiply(b[j], a[first]))) === 0,
    );
  }
}

/** False only where two ratios are proved different: each is within 2^-48 of itself; NaN is anything. */
function near(a: readonly number[], b: readonly number[]): boolean {
  return a.every((x, j) => !(Math.abs(x - b[j]) > 2 ** -46 * Math.abs(x)));
}
