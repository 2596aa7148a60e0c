// One flat of the recursion, at one level. Level e holds a flat of dimension e with every hyperplane
// that does not contain it, parallel ones merged into classes. Coordinate 0 is the first hyperplane's
// own value, so class 0 always has the normal (positive, 0, .., 0) and the work is done where it is
// positive. Entries are minors of the top matrix (fraction-free elimination).
import type { Ring } from '../exact/ring.js';

/**
 * Largest entry that plain arithmetic carries from level to level, down to dimension 3; see
 * restriction.ts for the proof, and for dimension 2.
 */
export const PLAIN_ENTRY_LIMIT = 2 ** 40;

/** n hyperplanes, W words a row; every array is allocated once, for n classes. */
export class FlatLevel {
  /** Dimension of the flat. */
  readonly dimension: number;
  /** Classes in use; their least hyperplanes ascend. */
  classes = 0;
  /** True when `entries` holds the normals, false when `elements` does. */
  plain = true;
  /** Row c of `dimension` exact integers: the normal of class c, its first non-zero entry positive. */
  readonly entries: Float64Array;
  /** The largest absolute value in use in `entries`. */
  largest = 0;
  /** The pivot of the elimination that led here, positive: it divides every 2 x 2 step taken from here. */
  pivot = 1;
  /** The same normals over the ring, when plain numbers do not suffice. */
  elements: unknown[][] = [];
  pivotElement: unknown = null;
  /** Row c of W words: hyperplanes of class c that are positive where its normal is. */
  readonly along: Int32Array;
  /** Row c of W words: hyperplanes of class c that are positive where its normal is negative. */
  readonly against: Int32Array;
  /** Least hyperplane of each class. */
  readonly least: Int32Array;

  constructor(dimension: number, hyperplanes: number, wordsPerRow: number) {
    this.dimension = dimension;
    this.entries = new Float64Array(hyperplanes * dimension);
    this.along = new Int32Array(hyperplanes * wordsPerRow);
    this.against = new Int32Array(hyperplanes * wordsPerRow);
    this.least = new Int32Array(hyperplanes);
  }

  /** The normals over the ring, whichever way they are held. */
  elementRows(ring: Ring<unknown>): unknown[][] {
    if (!this.plain) return this.elements;
    const e = this.dimension;
    return Array.from({ length: this.classes }, (_, c) =>
      Array.from({ length: e }, (_, q) => ring.fromInteger(BigInt(this.entries[c * e + q]))),
    );
  }

  /** The pivot over the ring, whichever way it is held. */
  pivotOver(ring: Ring<unknown>): unknown {
    return this.plain ? ring.fromInteger(BigInt(this.pivot)) : this.pivotElement;
  }

  /** Takes over normals given over the ring: as plain numbers when every one is small enough. */
  adopt(ring: Ring<unknown>, rows: unknown[][], pivot: unknown): void {
    this.classes = rows.length;
    this.plain = false;
    this.elements = rows;
    this.pivotElement = pivot;
    if (ring.radicand !== null) return;
    const e = this.dimension;
    let largest = 0;
    const small = Number(pivot as bigint);
    if (small > PLAIN_ENTRY_LIMIT) return;
    for (let c = 0; c < rows.length; c++) {
      for (let q = 0; q < e; q++) {
        const x = Number(rows[c][q] as bigint);
        this.entries[c * e + q] = x;
        largest = Math.max(largest, Math.abs(x));
      }
    }
    if (largest > PLAIN_ENTRY_LIMIT) return;
    this.plain = true;
    this.largest = largest;
    this.pivot = small;
    this.elements = [];
  }
}
