// Restriction of a flat to one of its classes: one step of fraction-free elimination (E. Bareiss,
// 1968), then parallel normals are merged and their sign masks joined.
//
// A new entry is (a b - c d) / pivot, an integer. Plain numbers carry it exactly in two cases:
//   direct:  2 B^2 <= 2^53, B the largest entry: products, difference and exact quotient are exact.
//   rounded: B^2 <= 2^49 pivot: the products err by at most 2^-53 B^2 each, their difference by
//            2^-53 2 B^2 more, together 2^-51 B^2, which the division brings to at most 2^-2, and
//            itself errs by 2^-53 times a quotient below 2^41: under 1/2 in all, so rounding to the
//            nearest integer gives the true one. A result above 2^40 is refused, not used. In
//            dimension 2 results up to 2^50 serve: the division errs by 2^-3, still under 1/2 in all.
// Everything else goes through the ring.
import type { Ring } from '../exact/ring.js';
import { type FlatLevel, PLAIN_ENTRY_LIMIT } from './level.js';
import { mergeParallel } from './parallel.js';

const DIRECT_LIMIT = 2 ** 26;
const ROUNDED_FACTOR = 2 ** 49;
/** In dimension 2 no further product is taken in doubles but to be compared. */
const LAST_ENTRY_LIMIT = 2 ** 50;
/** Multipliers below 2^9 times this stay below 2^53: the sums behind the hash are exact. */
const HASH_SUM_LIMIT = 2 ** 44;

/** Restricts one level to a class of it, into the level below. Scratch is reused between calls. */
export class Restriction {
  readonly #ring: Ring<unknown>;
  readonly #wordsPerRow: number;
  readonly #row: Float64Array;
  /** Open addressing from a projective hash to a class; a slot is live when its stamp is current. */
  readonly #slotClass: Int32Array;
  readonly #slotHash: Float64Array;
  readonly #slotStamp: Int32Array;
  #stamp = 0;

  constructor(ring: Ring<unknown>, hyperplanes: number, rank: number, wordsPerRow: number) {
    this.#ring = ring;
    this.#wordsPerRow = wordsPerRow;
    this.#row = new Float64Array(rank);
    const slots = 1 << (34 - Math.clz32(hyperplanes));
    this.#slotClass = new Int32Array(slots);
    this.#slotHash = new Float64Array(slots);
    this.#slotStamp = new Int32Array(slots);
  }

  /** `c` is a class of `from` other than 0; `into` is one dimension lower, 2 or more, and is overwritten. */
  restrict(from: FlatLevel, c: number, into: FlatLevel): void {
    if (from.plain) {
      const B = from.largest;
      if (B <= DIRECT_LIMIT) {
        if (this.#restrictPlain(from, c, into, false)) return;
      } else if (B * B <= ROUNDED_FACTOR * from.pivot) {
        if (this.#restrictPlain(from, c, into, true)) return;
      }
    }
    this.#restrictOverRing(from, c, into);
  }

  /** Stamps are kept in 32 bits: before they run out every slot is cleared. */
  #nextStamp(): number {
    if (this.#stamp === 0x7fffffff) {
      this.#slotStamp.fill(0);
      this.#stamp = 0;
    }
    return ++this.#stamp;
  }

  #restrictPlain(from: FlatLevel, c: number, into: FlatLevel, rounded: boolean): boolean {
    const e = from.dimension;
    const f = e - 1;
    const W = this.#wordsPerRow;
    const { entries, along, against, least } = from;
    const out = into.entries;
    const outAlong = into.along;
    const outAgainst = into.against;
    const outLeast = into.least;
    const row = this.#row;
    const slotClass = this.#slotClass;
    const slotHash = this.#slotHash;
    const slotStamp = this.#slotStamp;
    const slotMask = slotClass.length - 1;
    const stamp = this.#nextStamp();
    const previous = from.pivot;
    const base = c * e;
    let p = e - 1;
    while (entries[base + p] === 0) p--;
    const flip = entries[base + p] < 0 ? -1 : 1;
    const pivot = flip * entries[base + p];
    const count = from.classes;
    // Two coordinates are a fraction as they stand; more are folded into one by two functionals.
    const multipliersAbove = f === 2 ? FIRST : MULTIPLIERS_ABOVE;
    const multipliersBelow = f === 2 ? SECOND : MULTIPLIERS_BELOW;
    let classes = 0;
    let largest = 0;
    for (let k = 0; k < count; k++) {
      if (k === c) continue;
      const offset = k * e;
      const factor = flip * entries[offset + p];
      let lead = 0;
      let at = 0;
      // Two integer functionals with exact sums: their quotient is the same double for proportional
      // rows, because division rounds the same rational the same way.
      let above = 0;
      let below = 0;
      for (let q = 0; q < e; q++) {
        if (q === p) continue;
        let x = pivot * entries[offset + q] - factor * entries[base + q];
        if (previous !== 1) x /= previous;
        if (rounded) x = Math.round(x);
        if (lead === 0) lead = x;
        row[at] = x;
        above += x * multipliersAbove[at & 15];
        below += x * multipliersBelow[at & 15];
        at++;
        const size = x < 0 ? -x : x;
        if (size > largest) largest = size;
      }
      const hash = below === 0 ? Number.POSITIVE_INFINITY : above / below + 0;
      let slot = hashDouble(hash) & slotMask;
      let target = -1;
      while (slotStamp[slot] === stamp) {
        if (slotHash[slot] === hash && proportional(row, out, slotClass[slot] * f, f)) {
          target = slotClass[slot];
          break;
        }
        slot = (slot + 1) & slotMask;
      }
      const straight = lead > 0;
      const kAlong = straight ? along : against;
      const kAgainst = straight ? against : along;
      let source = k * W;
      if (target >= 0) {
        if (W === 2) {
          outAlong[2 * target] |= kAlong[source];
          outAlong[2 * target + 1] |= kAlong[source + 1];
          outAgainst[2 * target] |= kAgainst[source];
          outAgainst[2 * target + 1] |= kAgainst[source + 1];
          continue;
        }
        const end = (target + 1) * W;
        for (let w = target * W; w < end; w++, source++) {
          outAlong[w] |= kAlong[source];
          outAgainst[w] |= kAgainst[source];
        }
        continue;
      }
      target = classes++;
      slotStamp[slot] = stamp;
      slotHash[slot] = hash;
      slotClass[slot] = target;
      outLeast[target] = least[k];
      const start = target * f;
      for (let q = 0; q < f; q++) out[start + q] = straight ? row[q] : -row[q];
      if (W === 2) {
        outAlong[2 * target] = kAlong[source];
        outAlong[2 * target + 1] = kAlong[source + 1];
        outAgainst[2 * target] = kAgainst[source];
        outAgainst[2 * target + 1] = kAgainst[source + 1];
        continue;
      }
      const end = (target + 1) * W;
      for (let w = target * W; w < end; w++, source++) {
        outAlong[w] = kAlong[source];
        outAgainst[w] = kAgainst[source];
      }
    }
    if (f === 2 ? largest > LAST_ENTRY_LIMIT : largest > PLAIN_ENTRY_LIMIT) return false;
    if (f !== 2 && largest * f > HASH_SUM_LIMIT) return false;
    into.classes = classes;
    into.plain = true;
    into.largest = largest;
    into.pivot = pivot;
    return true;
  }

  #restrictOverRing(from: FlatLevel, c: number, into: FlatLevel): void {
    const ring = this.#ring;
    const rows = from.elementRows(ring);
    const previous = from.pivotOver(ring);
    const own = rows[c];
    let p = own.length - 1;
    while (ring.sign(own[p]) === 0) p--;
    const flipped = ring.sign(own[p]) < 0;
    const pivot = flipped ? ring.negate(own[p]) : own[p];
    const restricted: unknown[][] = [];
    const sources: number[] = [];
    for (let k = 0; k < rows.length; k++) {
      if (k === c) continue;
      const factor = flipped ? ring.negate(rows[k][p]) : rows[k][p];
      const row: unknown[] = [];
      for (let q = 0; q < own.length; q++) {
        if (q === p) continue;
        const difference = ring.subtract(
          ring.multiply(pivot, rows[k][q]),
          ring.multiply(factor, own[q]),
        );
        row.push(ring.divideExactly(difference, previous));
      }
      restricted.push(row);
      sources.push(k);
    }
    const classes = mergeParallel(ring, restricted);
    classes.forEach(({ members }, target) => {
      members.forEach(({ row, sign }, i) => {
        if (i === 0) this.#copyMasks(from, sources[row], into, target, sign);
        else this.#joinMasks(from, sources[row], into, target, sign);
      });
    });
    into.adopt(
      ring,
      classes.map((merged) => merged.normal),
      pivot,
    );
  }

  #copyMasks(from: FlatLevel, k: number, into: FlatLevel, target: number, sign: number): void {
    const W = this.#wordsPerRow;
    const along = sign > 0 ? from.along : from.against;
    const against = sign > 0 ? from.against : from.along;
    for (let w = 0; w < W; w++) {
      into.along[target * W + w] = along[k * W + w];
      into.against[target * W + w] = against[k * W + w];
    }
    into.least[target] = from.least[k];
  }

  #joinMasks(from: FlatLevel, k: number, into: FlatLevel, target: number, sign: number): void {
    const W = this.#wordsPerRow;
    const along = sign > 0 ? from.along : from.against;
    const against = sign > 0 ? from.against : from.along;
    for (let w = 0; w < W; w++) {
      into.along[target * W + w] |= along[k * W + w];
      into.against[target * W + w] |= against[k * W + w];
    }
  }
}

const FIRST = Float64Array.of(1, 0);
const SECOND = Float64Array.of(0, 1);

// Any integers below 2^9 do.
const MULTIPLIERS_ABOVE = Float64Array.of(
  277,
  101,
  431,
  59,
  389,
  173,
  347,
  227,
  499,
  131,
  283,
  409,
  89,
  197,
  461,
  313,
);
const MULTIPLIERS_BELOW = Float64Array.of(
  113,
  367,
  241,
  457,
  79,
  311,
  149,
  503,
  191,
  421,
  61,
  271,
  337,
  487,
  103,
  229,
);

const doubleView = new Float64Array(1);
const wordView = new Int32Array(doubleView.buffer);

function hashDouble(x: number): number {
  doubleView[0] = x;
  let h = Math.imul(wordView[0] ^ Math.imul(wordView[1], 0x9e3779b1), 0x85ebca6b);
  h ^= h >>> 15;
  return Math.imul(h, 0xc2b2ae35) >>> 8;
}

/** a b = c d, exactly, for integers below 2^53 in absolute value. */
export function productsEqual(a: number, b: number, c: number, d: number): boolean {
  const left = a * b;
  const right = c * d;
  if (left !== right) return false;
  if (left < 2 ** 53 && left > -(2 ** 53)) return true;
  return BigInt(a) * BigInt(b) === BigInt(c) * BigInt(d);
}

function proportional(
  row: Float64Array,
  rows: Float64Array,
  offset: number,
  length: number,
): boolean {
  let first = 0;
  while (row[first] === 0 && rows[offset + first] === 0) first++;
  const u = row[first];
  const v = rows[offset + first];
  if (u === 0 || v === 0) return false;
  for (let q = first + 1; q < length; q++) {
    if (!productsEqual(row[q], v, rows[offset + q], u)) return false;
  }
  return true;
}
