// The facets of the zonotope, each from a ray of the arrangement: the functional that a ray is takes
// its greatest value on a facet, where the generators on which it vanishes are free and every other
// stands at the end that is better for it (P. McMullen, 1971, On zonotopes). The rays are the two
// directions of each line, and the lines are the flats of rank r - 1.
import type { Arrangement } from '../arrangement/arrangement.js';
import { gcd } from '../exact/integers.js';
import {
  addNumbers,
  commonDenominator,
  type ExactNumber,
  exactNumber,
  exactZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import type { Quadratic } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';
import type { FlatLattice } from '../flat/lattice.js';
import { unitRange } from '../input/generators.js';
import { largestOf, plainIntegerRing, squaredMinorBound } from './plain-ring.js';

/** normal . z <= offset on the whole zonotope, with equality on the facet. */
export interface Facet<E = unknown> {
  /** d entries, outward: primitive over Q, content-free over Z[sqrt(k)]; a ray of the arrangement. */
  readonly normal: readonly E[];
  /** The same in essential coordinates: its products with the hyperplanes' essential vectors are those
   * of `normal` with their normals. Over Q these are coordinates of `arrangement.spanBasis`. */
  readonly essential: readonly E[];
  readonly offset: ExactNumber;
  /** 0-based generators that are free on it, ascending: it is a translate of their zonotope. */
  readonly generators: readonly number[];
}

/**
 * Every facet, two and two opposite: first that whose normal has its first non-zero essential
 * coordinate positive. The lattice is that of the same arrangement (listFlats). In rank 1 the two end
 * points. Exact.
 */
export function* facetsOf<E>(
  arrangement: Arrangement<E>,
  lattice: FlatLattice,
): Generator<Facet<E>> {
  const { ring, hyperplanes, lift } = arrangement;
  const ends = endsOf(arrangement);
  const rays = fastestRays(arrangement, ends, lattice);
  const toNumber = (e: E): ExactNumber =>
    ring.radicand === null
      ? exactNumber(e as bigint, 0n, ends.denominator)
      : exactNumber((e as Quadratic).a, (e as Quadratic).b, ends.denominator);
  const opposite = (v: readonly E[]): E[] => v.map((x) => ring.negate(x));
  for (const { direction, most, least, zero } of rays) {
    const normal = lift.map((row) =>
      row.reduce((sum, x, i) => ring.add(sum, ring.multiply(x, direction[i])), ring.zero),
    );
    const generators = zero.flatMap((h) => hyperplanes[h].members).sort((a, b) => a - b);
    yield { normal, essential: direction, offset: toNumber(most), generators };
    yield {
      normal: opposite(normal),
      essential: opposite(direction),
      offset: negateNumber(toNumber(least)),
      generators,
    };
  }
}

function fastestRays<E>(
  arrangement: Arrangement<E>,
  ends: Ends<E>,
  lattice: FlatLattice,
): Iterable<Ray<E>> {
  const { ring, hyperplanes } = arrangement;
  if (ring.radicand === null) {
    const rational = arrangement as unknown as Arrangement<bigint>;
    const rationalEnds = ends as unknown as Ends<bigint>;
    if (fitsPlain(rational, rationalEnds)) {
      const rays = inBigIntegers(plainRays(rational, rationalEnds, lattice));
      return rays as Iterable<Ray<unknown>> as Iterable<Ray<E>>;
    }
  }
  return raysOf(
    ring,
    hyperplanes.map((h) => h.essential),
    ends,
    lattice,
  );
}

/** For each hyperplane the ends of its generators' sum along its normal, over one denominator. */
interface Ends<E> {
  readonly high: readonly E[];
  readonly low: readonly E[];
  readonly denominator: bigint;
}

/** A line's primitive direction with the bounds of its functional on Z, times the denominator. */
interface Ray<E> {
  readonly direction: readonly E[];
  readonly most: E;
  readonly least: E;
  readonly zero: readonly number[];
}

function endsOf<E>(arrangement: Arrangement<E>): Ends<E> {
  const { ring, generators, hyperplanes, orientationOf, factorOf } = arrangement;
  const k = generators.radicand ?? 0n;
  const along = hyperplanes.map(({ members }) => {
    let [high, low] = [exactZero, exactZero];
    for (const j of members) {
      const range = generators.ranges?.[j] ?? unitRange;
      const top = multiplyNumbers(factorOf[j], range.high, k);
      const bottom = multiplyNumbers(factorOf[j], range.low, k);
      const forward = orientationOf[j] > 0;
      high = addNumbers(high, forward ? top : negateNumber(bottom));
      low = addNumbers(low, forward ? bottom : negateNumber(top));
    }
    return { high, low };
  });
  const denominator = commonDenominator(along.flatMap(({ high, low }) => [high, low]));
  const scaled = (x: ExactNumber): E => {
    const a = (x.a * denominator) / x.d;
    const b = (x.b * denominator) / x.d;
    return ring.radicand === null ? ring.fromInteger(a) : ({ a, b } as E);
  };
  return {
    high: along.map(({ high }) => scaled(high)),
    low: along.map(({ low }) => scaled(low)),
    denominator,
  };
}

/**
 * Doubles do when all of these stay below 2^53: twice the square of a minor of r - 1 normals; r
 * products of one with an entry, which bound an elimination step and the functional's value on a
 * normal; and the sum over all hyperplanes of such a value times an end.
 */
function fitsPlain(arrangement: Arrangement<bigint>, ends: Ends<bigint>): boolean {
  const { rank, hyperplanes } = arrangement;
  const rows = hyperplanes.map((h) => h.essential);
  const minor = squaredMinorBound(rows, rank - 1);
  const value = minor * (BigInt(rank) * largestOf(rows)) ** 2n;
  const sum = value * (BigInt(rows.length) * (largestOf([ends.high, ends.low]) + 1n)) ** 2n;
  return minor < 1n << 52n && sum < 1n << 106n;
}

function plainRays(
  arrangement: Arrangement<bigint>,
  { high, low, denominator }: Ends<bigint>,
  lattice: FlatLattice,
): Generator<Ray<number>> {
  return raysOf(
    plainIntegerRing,
    arrangement.hyperplanes.map((h) => h.essential.map(Number)),
    { high: high.map(Number), low: low.map(Number), denominator },
    lattice,
  );
}

function* inBigIntegers(rays: Iterable<Ray<number>>): Generator<Ray<bigint>> {
  for (const { direction, most, least, zero } of rays) {
    yield { direction: direction.map(BigInt), most: BigInt(most), least: BigInt(least), zero };
  }
}

function* raysOf<E>(
  ring: Ring<E>,
  normals: readonly (readonly E[])[],
  ends: Ends<E>,
  lattice: FlatLattice,
): Generator<Ray<E>> {
  const { rank, rankOffsets, zero, wordsPerRow: W } = lattice;
  const kernel = new KernelSearch(ring, rank);
  for (let flat = rankOffsets[rank - 1]; flat < rankOffsets[rank]; flat++) {
    const inside: number[] = [];
    for (let w = 0; w < W; w++) {
      for (let bits = zero[flat * W + w]; bits !== 0; bits &= bits - 1) {
        inside.push((w << 5) + 31 - Math.clz32(bits & -bits));
      }
    }
    const direction = kernel.find(inside.map((h) => normals[h]));
    let most = ring.zero;
    let least = ring.zero;
    normals.forEach((normal, h) => {
      let value = ring.zero;
      for (let c = 0; c < rank; c++) {
        value = ring.add(value, ring.multiply(direction[c], normal[c]));
      }
      const sign = ring.sign(value);
      if (sign === 0) return;
      const [up, down] = sign > 0 ? [ends.high[h], ends.low[h]] : [ends.low[h], ends.high[h]];
      most = ring.add(most, ring.multiply(value, up));
      least = ring.add(least, ring.multiply(value, down));
    });
    yield { direction, most, least, zero: inside };
  }
}

/** The line on which normals of rank r - 1 vanish, by fraction-free Gauss-Jordan elimination. */
class KernelSearch<E> {
  private readonly ring: Ring<E>;
  private readonly rank: number;

  constructor(ring: Ring<E>, rank: number) {
    this.ring = ring;
    this.rank = rank;
  }

  /** Content-free, the first non-zero entry positive. */
  find(normals: readonly (readonly E[])[]): E[] {
    const { ring, rank: r } = this;
    const rows: E[][] = [];
    const columns: number[] = [];
    // Every row has the common pivot in its own pivot column and zeros in those of the others.
    let pivot = ring.one;
    for (const normal of normals) {
      if (rows.length === r - 1) break;
      const row = normal.map((x, c) => {
        let sum = ring.multiply(pivot, x);
        for (let i = 0; i < rows.length; i++) {
          sum = ring.subtract(sum, ring.multiply(normal[columns[i]], rows[i][c]));
        }
        return sum;
      });
      const column = row.findIndex((x) => ring.sign(x) !== 0);
      if (column < 0) continue;
      const next = row[column];
      for (let i = 0; i < rows.length; i++) {
        const factor = rows[i][column];
        rows[i] = rows[i].map((x, c) =>
          ring.divideExactly(
            ring.subtract(ring.multiply(next, x), ring.multiply(factor, row[c])),
            pivot,
          ),
        );
      }
      rows.push(row);
      columns.push(column);
      pivot = next;
    }
    if (rows.length !== r - 1) throw new RangeError('facets: the flat is not a line');
    const free = Array.from({ length: r }, (_, c) => c).find((c) => !columns.includes(c))!;
    const direction = new Array<E>(r).fill(ring.zero);
    direction[free] = pivot;
    columns.forEach((column, i) => {
      direction[column] = ring.negate(rows[i][free]);
    });
    return this.primitive(direction);
  }

  private primitive(direction: readonly E[]): E[] {
    const { ring } = this;
    let content = 0n;
    for (const x of direction) content = gcd(content, ring.content(x));
    const lead = direction.find((x) => ring.sign(x) !== 0)!;
    const divisor = ring.fromInteger(ring.sign(lead) < 0 ? -content : content);
    return direction.map((x) => (ring.sign(x) === 0 ? ring.zero : ring.divideExactly(x, divisor)));
  }
}
