// Lattice points of a small zonotope counted one line at a time from its facet inequalities alone: a
// check of the Ehrhart polynomial that knows nothing of independent sets. All coordinates but one run
// through the box around Z; for the last the inequalities leave an interval.
import type { Arrangement } from '../arrangement/arrangement.js';
import { LimitError } from '../errors.js';
import { addNumbers, type ExactNumber, exactNumber, negateNumber } from '../exact/number.js';
import type { Facet } from './facets.js';
import { latticeGenerators } from './lattice-generators.js';
import { largestOf } from './plain-ring.js';

/** Lattice points of the span in a dilate, and those of them in its relative interior. */
export interface DirectCount {
  readonly points: bigint;
  readonly interior: bigint;
}

/** Seconds for each inequality looked at, one core of a 2-core machine with Node 20. */
const perStep = 3e-9;

/** Every inequality is kept in doubles: a box or a normal past this is refused. */
const plainLimit = 1n << 52n;

/** Counts the points of dilates of Z, or of Z moved so that its centre is the origin. */
export class DirectPoints {
  private readonly rank: number;
  private readonly normals: readonly (readonly bigint[])[];
  /** For each pair of opposite facets the bounds low <= normal . z <= high on Z. */
  private readonly bounds: readonly { readonly low: ExactNumber; readonly high: ExactNumber }[];
  private readonly box: readonly { readonly low: ExactNumber; readonly high: ExactNumber }[];

  /** The facets of facetsOf, in its order; over Q. */
  constructor(
    arrangement: Arrangement,
    facets: readonly Facet<bigint>[],
    options: { readonly centred?: boolean } = {},
  ) {
    const { rank, scale, vectors, corner, denominator } = latticeGenerators(arrangement);
    const centred = (low: ExactNumber, high: ExactNumber) => {
      if (options.centred !== true) return { low, high };
      const width = addNumbers(high, negateNumber(low));
      const half = exactNumber(width.a, 0n, 2n * width.d);
      return { low: negateNumber(half), high: half };
    };
    const upper = facets.filter((_, i) => i % 2 === 0);
    this.rank = rank;
    this.normals = upper.map((facet) => facet.essential);
    this.bounds = upper.map((facet, i) =>
      centred(negateNumber(facets[2 * i + 1].offset), facet.offset),
    );
    this.box = corner.map((x, c) => {
      let [low, high] = [0n, 0n];
      for (const v of vectors) {
        if (v[c] > 0n) high += v[c];
        else low += v[c];
      }
      const at = (sum: bigint): ExactNumber =>
        exactNumber(x + sum * denominator, 0n, denominator * scale);
      return centred(at(low), at(high));
    });
  }

  /** About how long `count` takes; Infinity where it refuses. */
  estimateSeconds(dilate: number): number {
    const { lows, highs, last } = this.rangesFor(dilate);
    let lines = 1;
    for (let c = 0; c < this.rank; c++) {
      if (c !== last) lines *= Math.max(0, Number(highs[c] - lows[c]) + 1);
    }
    const most = largestOf([lows, highs]);
    const largest = largestOf(this.normals);
    // Bounds on Z are at most what its box allows, plus one for their rounding.
    const fits = BigInt(2 * this.rank) * largest * (most + 1n) < plainLimit;
    return fits ? lines * this.normals.length * perStep : Number.POSITIVE_INFINITY;
  }

  private rangesFor(dilate: number): { lows: bigint[]; highs: bigint[]; last: number } {
    const t = BigInt(dilate);
    const lows = this.box.map(({ low }) => -floorOf(-t * low.a, low.d));
    const highs = this.box.map(({ high }) => floorOf(t * high.a, high.d));
    let last = 0;
    for (let c = 1; c < this.rank; c++) {
      if (highs[c] - lows[c] > highs[last] - lows[last]) last = c;
    }
    return { lows, highs, last };
  }

  /** Exact; LimitError where numbers do not fit doubles. Mind estimateSeconds first. */
  count(dilate: number): DirectCount {
    if (this.estimateSeconds(dilate) === Number.POSITIVE_INFINITY) {
      throw new LimitError(
        'counting lattice points one by one',
        'numbers past 2^52',
        '2^52',
        'take the Ehrhart polynomial instead',
      );
    }
    const { lows, highs, last } = this.rangesFor(dilate);
    return new LineCount(this.normals, this.bounds, BigInt(dilate), lows, highs, last).run();
  }
}

class LineCount {
  private readonly order: number[];
  private readonly lows: number[];
  private readonly highs: number[];
  private readonly columns: Float64Array[];
  /** Closed and open bounds of each functional, as integers it may reach. */
  private readonly closed: { low: Float64Array; high: Float64Array };
  private readonly open: { low: Float64Array; high: Float64Array };
  /** By depth the value of each functional on the coordinates chosen. */
  private readonly sums: Float64Array[];
  private points = 0;
  private interior = 0;

  constructor(
    normals: readonly (readonly bigint[])[],
    bounds: readonly { readonly low: ExactNumber; readonly high: ExactNumber }[],
    t: bigint,
    lows: readonly bigint[],
    highs: readonly bigint[],
    last: number,
  ) {
    const r = lows.length;
    this.order = [...Array.from({ length: r }, (_, c) => c).filter((c) => c !== last), last];
    this.lows = this.order.map((c) => Number(lows[c]));
    this.highs = this.order.map((c) => Number(highs[c]));
    this.columns = this.order.map((c) => Float64Array.from(normals, (y) => Number(y[c])));
    const over = (f: (bound: { low: ExactNumber; high: ExactNumber }) => bigint): Float64Array =>
      Float64Array.from(bounds, (bound) => Number(f(bound)));
    this.closed = {
      low: over(({ low }) => -floorOf(-t * low.a, low.d)),
      high: over(({ high }) => floorOf(t * high.a, high.d)),
    };
    this.open = {
      low: over(({ low }) => floorOf(t * low.a, low.d) + 1n),
      high: over(({ high }) => -floorOf(-t * high.a, high.d) - 1n),
    };
    this.sums = this.order.map(() => new Float64Array(normals.length));
  }

  run(): DirectCount {
    this.descend(0);
    return { points: BigInt(this.points), interior: BigInt(this.interior) };
  }

  private descend(depth: number): void {
    if (depth + 1 === this.order.length) {
      this.points += this.lineLength(this.closed);
      this.interior += this.lineLength(this.open);
      return;
    }
    const column = this.columns[depth];
    const sums = this.sums[depth];
    const next = this.sums[depth + 1];
    for (let x = this.lows[depth]; x <= this.highs[depth]; x++) {
      for (let f = 0; f < next.length; f++) next[f] = sums[f] + x * column[f];
      this.descend(depth + 1);
    }
  }

  /** Values of the last coordinate within the bounds. A quotient of integers below 2^52 that is no
   * integer is farther from one than its rounding error, so its floor is exact. */
  private lineLength({ low, high }: { low: Float64Array; high: Float64Array }): number {
    const depth = this.order.length - 1;
    const column = this.columns[depth];
    const sums = this.sums[depth];
    let from = this.lows[depth];
    let to = this.highs[depth];
    for (let f = 0; f < column.length; f++) {
      const a = column[f];
      const below = low[f] - sums[f];
      const above = high[f] - sums[f];
      if (a === 0) {
        if (below > 0 || above < 0) return 0;
        continue;
      }
      const first = Math.ceil(a > 0 ? below / a : above / a);
      const end = Math.floor(a > 0 ? above / a : below / a);
      if (first > from) from = first;
      if (end < to) to = end;
      if (from > to) return 0;
    }
    return to - from + 1;
  }
}

function floorOf(a: bigint, d: bigint): bigint {
  const q = a / d;
  return a < 0n && q * d !== a ? q - 1n : q;
}
