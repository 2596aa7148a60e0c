// Interior points of regions as they are written out: small integer points, each certified by its
// exact signs on every hyperplane. A central direction found in doubles is scaled up step by step
// and rounded; the first multiple that the certificate accepts is taken. Where doubles find nothing
// (needle-thin regions, entries of many digits) an exact direction takes their place.
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt } from '../bits/signs.js';
import type { Quadratic } from '../exact/quadratic.js';
import { CentreFinder } from './interior-centre.js';
import { conePoint } from './interior-exact.js';
import { projectedLift } from './interior-lift.js';
import { approximate, roundedDown, withoutCommonFactor } from './interior-rounding.js';
import { SignCertifier } from './interior-signs.js';
import { negatedWord } from './walls.js';

/** Largest coordinate tried along a direction in doubles, which has fewer than 48 good bits. */
const DOUBLE_LIMIT = 2 ** 44;

/** Largest dimension in which every way of rounding a point is tried. */
const SHRINK_DIMENSIONS = 6;

/** Times a point is shrunk by one step before the step doubles, and rounds of shrinking in all. */
const SHRINK_STREAK = 16;
const SHRINK_ROUNDS = 512;

/** Finds interior points of the regions of one arrangement. */
export class InteriorPoints {
  private readonly arrangement: Arrangement;
  private readonly certifier: SignCertifier;
  private readonly centre: CentreFinder;
  /** d x rank: an ambient x near the span over each essential y; null where the spaces are one. */
  private readonly shortLift: Float64Array | null;
  private readonly everyHyperplane: Int32Array;
  /** Largest coordinate the certificate takes in plain numbers, 0 when it takes none. */
  private readonly plainLimit: number;
  /** Unit normals: a first sieve for candidates that plain numbers cannot certify. */
  private readonly unitNormals: Float64Array;
  private readonly direction: Float64Array;
  private readonly candidate: Float64Array;
  private readonly best: Float64Array;

  constructor(arrangement: Arrangement) {
    const { dimension, rank, ring, hyperplanes } = arrangement;
    const count = hyperplanes.length;
    this.arrangement = arrangement;
    this.certifier = new SignCertifier(arrangement);
    this.plainLimit = Math.min(this.certifier.plainLimit, DOUBLE_LIMIT);
    this.everyHyperplane = Int32Array.from({ length: count }, (_, h) => h);
    this.direction = new Float64Array(dimension);
    this.candidate = new Float64Array(dimension);
    this.best = new Float64Array(dimension);
    // One scale for all, so that the three lengths of a functional stay comparable.
    let scale = ring.one;
    if (this.plainLimit === 0) {
      for (const plane of hyperplanes) {
        for (const x of [...plane.normal, ...plane.essential]) {
          const size = ring.sign(x) < 0 ? ring.negate(x) : x;
          if (ring.sign(ring.subtract(size, scale)) > 0) scale = size;
        }
      }
    }
    const rows = new Float64Array(count * rank);
    const slacks = new Float64Array(count * 2);
    this.unitNormals = new Float64Array(count * dimension);
    hyperplanes.forEach((plane, h) => {
      const normal = plane.normal.map((x) => ring.ratio(x, scale));
      const essential = plane.essential.map((x) => ring.ratio(x, scale));
      const length = Math.hypot(...normal);
      const essentialLength = Math.hypot(...essential);
      for (let j = 0; j < dimension; j++) this.unitNormals[h * dimension + j] = normal[j] / length;
      for (let j = 0; j < rank; j++) rows[h * rank + j] = essential[j] / essentialLength;
      const sum = normal.reduce((total, x) => total + Math.abs(x), 0);
      slacks[2 * h] = ring.ratio(ring.one, scale) / essentialLength;
      slacks[2 * h + 1] = (0.5 * sum) / essentialLength;
    });
    this.centre = new CentreFinder(rank, rows, slacks);
    this.shortLift = rank === dimension ? null : projectedLift(arrangement, this.unitNormals);
  }

  /**
   * An ambient integer point strictly inside the region of the sign word, coordinates without a
   * common factor. `walls` are the hyperplanes that bound the region, or null when not known. The
   * point of the negated word is the negation. RangeError when no point has these signs.
   */
  pointOf(words: Int32Array, offset: number, walls: readonly number[] | null): bigint[] {
    if ((words[offset] & 1) === 0) {
      const negated = negatedWord(words, offset, this.arrangement.hyperplanes.length);
      return this.pointOf(negated, 0, walls).map((x) => -x);
    }
    const bounds = walls ?? this.everyHyperplane;
    const near = this.nearby(words, offset, bounds);
    if (near !== null) return withoutCommonFactor(near);
    const exact =
      this.exactly(words, offset, bounds) ?? this.exactly(words, offset, this.everyHyperplane);
    if (exact === null) throw new RangeError('pointOf: signs: expected signs that some point has');
    return withoutCommonFactor(exact);
  }

  /** The smallest certified rounding of the central directions; null when doubles find none. */
  private nearby(words: Int32Array, offset: number, bounds: ArrayLike<number>): bigint[] | null {
    const { candidate, best } = this;
    const found = this.centre.find(words, offset, bounds, bounds.length);
    let limit = this.plainLimit === 0 ? DOUBLE_LIMIT : this.plainLimit;
    let success = false;
    for (let k = 0; k < found; k++) {
      const size = this.scaleUp(k, words, offset, bounds, limit);
      if (size === 0) continue;
      success = true;
      best.set(candidate);
      limit = size - 1;
    }
    if (success) this.shrink(words, offset, bounds);
    return success ? Array.from(best, BigInt) : null;
  }

  /**
   * Tries direction k rounded to largest coordinate 1, 2, ... up to `limit`; leaves the first that is
   * certified in `candidate` and returns its largest coordinate, or 0.
   */
  private scaleUp(
    k: number,
    words: Int32Array,
    offset: number,
    bounds: ArrayLike<number>,
    limit: number,
  ): number {
    const { candidate, direction } = this;
    const length = this.liftDirection(k);
    if (!(length > 0 && length < Number.POSITIVE_INFINITY)) return 0;
    for (let size = 1; size <= limit; size = size < 16 ? size + 1 : Math.ceil(size * 1.125)) {
      const factor = size / length;
      for (let j = 0; j < candidate.length; j++) candidate[j] = Math.round(direction[j] * factor);
      if (this.isCertified(words, offset, bounds)) return size;
    }
    return 0;
  }

  /**
   * Shrinks `best` by an eighth, a sixteenth, ... and last by one unit, each as long as some rounding
   * of the result, every coordinate up or down, is certified. Few dimensions only: there are 2^d. In a
   * thin region a step may fail and billions of smaller ones succeed: hence the doubling and the end.
   */
  private shrink(words: Int32Array, offset: number, bounds: ArrayLike<number>): void {
    const { candidate, best } = this;
    const d = best.length;
    if (d > SHRINK_DIMENSIONS) return;
    let largest = 0;
    for (let j = 0; j < d; j++) largest = Math.max(largest, Math.abs(best[j]));
    let step = Math.max(1, Math.floor(largest / 8));
    let streak = 0;
    for (let round = 0; round < SHRINK_ROUNDS && step >= 1 && largest > step; round++) {
      let smaller = false;
      for (let ups = 0; ups < 1 << d && !smaller; ups++) {
        for (let j = 0; j < d; j++) {
          const value = (best[j] * (largest - step)) / largest;
          candidate[j] = ((ups >> j) & 1) === 1 ? Math.ceil(value) : Math.floor(value);
        }
        smaller = this.isCertified(words, offset, bounds);
      }
      if (smaller) {
        best.set(candidate);
        largest -= step;
        if (++streak < SHRINK_STREAK) continue;
        step *= 2;
      } else step = Math.floor(step / 2);
      streak = 0;
    }
  }

  private isCertified(words: Int32Array, offset: number, bounds: ArrayLike<number>): boolean {
    const { certifier, candidate } = this;
    if (this.plainLimit > 0) {
      return (
        certifier.isWithin(words, offset, bounds, bounds.length, candidate) &&
        certifier.isInside(words, offset, candidate)
      );
    }
    return (
      this.looksWithin(words, offset, bounds) &&
      certifier.isInsideExactly(words, offset, Array.from(candidate, BigInt))
    );
  }

  /** False only where the candidate is clearly outside; decides nothing by itself. */
  private looksWithin(words: Int32Array, offset: number, bounds: ArrayLike<number>): boolean {
    const { candidate, unitNormals } = this;
    const d = candidate.length;
    for (let i = 0; i < bounds.length; i++) {
      let value = 0;
      for (let j = 0; j < d; j++) value += unitNormals[bounds[i] * d + j] * candidate[j];
      if (bitAt(words, offset, bounds[i]) === 1 ? value < -0.25 : value > 0.25) return false;
    }
    return true;
  }

  /** Writes direction k in ambient coordinates; returns its largest magnitude. */
  private liftDirection(k: number): number {
    const { direction, shortLift } = this;
    const { rank } = this.arrangement;
    const { directions } = this.centre;
    let largest = 0;
    for (let j = 0; j < direction.length; j++) {
      let sum = 0;
      if (shortLift === null) sum = directions[k * rank + j];
      else for (let i = 0; i < rank; i++) sum += shortLift[j * rank + i] * directions[k * rank + i];
      direction[j] = sum;
      largest = Math.max(largest, Math.abs(sum));
    }
    return largest;
  }

  /** A certified point along an exact direction; null when the bounds, or all signs, allow none. */
  private exactly(words: Int32Array, offset: number, bounds: ArrayLike<number>): bigint[] | null {
    const { ring, hyperplanes, lift } = this.arrangement;
    const rows = Array.from(bounds, (h) => {
      const { essential } = hyperplanes[h];
      return bitAt(words, offset, h) === 1 ? essential : essential.map((x) => ring.negate(x));
    });
    const y = conePoint(ring, rows);
    if (y === null) return null;
    const direction = lift.map((row) =>
      row.reduce((sum, x, i) => ring.add(sum, ring.multiply(x, y[i])), ring.zero),
    );
    const accepts = (x: readonly bigint[]): boolean =>
      this.certifier.isInsideExactly(words, offset, x);
    // Over Z the direction itself is the last candidate; over Z[sqrt(k)] its approximations get
    // finer without end, and an open cone holds one of them. Bounds that miss a wall end here.
    if (ring.radicand === null) {
      const x = withoutCommonFactor(direction as bigint[]);
      return roundedDown(x, accepts) ?? (accepts(x) ? x : null);
    }
    if (!this.isInteriorDirection(words, offset, direction)) return null;
    for (let bits = 16n; ; bits *= 2n) {
      const x = roundedDown(approximate(direction as Quadratic[], ring.radicand, bits), accepts);
      if (x !== null) return x;
    }
  }

  private isInteriorDirection(
    words: Int32Array,
    offset: number,
    direction: readonly unknown[],
  ): boolean {
    const { ring, hyperplanes } = this.arrangement;
    return hyperplanes.every(({ normal }, h) => {
      const value = normal.reduce(
        (sum, x, j) => ring.add(sum, ring.multiply(x, direction[j])),
        ring.zero,
      );
      return ring.sign(value) === (bitAt(words, offset, h) === 1 ? 1 : -1);
    });
  }
}
