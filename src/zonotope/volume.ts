// The volume of the zonotope over Q or a quadratic field: the sum of |det| over all bases among the
// generators as given (P. McMullen, 1971, On zonotopes; G. Shephard, 1974, Combinatorial properties of
// associated zonotopes), relative to the lattice of the span, and as Euclid has it. Two routes here;
// over Q the Ehrhart polynomials have it too.
import type { Arrangement } from '../arrangement/arrangement.js';
import {
  commonDenominator,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  multiplyNumbers,
} from '../exact/number.js';
import type { Quadratic } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';
import { squareRootDecimal } from '../exact/root-decimal.js';
import { binomial, exteriorSteps } from './exterior-steps.js';
import { signedLengths } from './lattice-generators.js';
import { largestOf, plainIntegerRing, squaredMinorBound } from './plain-ring.js';

/** Volume in the span, where a unit cell of spanBasis need not have volume 1. */
export interface EuclideanVolume {
  /** Its square, exact. */
  readonly square: ExactNumber;
  /** 15 significant digits, the rest cut off. */
  readonly decimal: string;
}

/**
 * The volume relative to spanBasis, the lattice of the span over Q: every basis by the expansion of
 * its determinant, depth first.
 */
export function volumeBySubsets(arrangement: Arrangement): ExactNumber {
  return measured(arrangement, sumBySubsets);
}

/**
 * The same by projection along r - 2 of the generators, in fraction-free elimination (E. Bareiss,
 * 1968), down to planes, where the vectors ordered by angle have a closed form: r times faster and
 * more, the larger the number of generators.
 */
export function volumeByAngles(arrangement: Arrangement): ExactNumber {
  return measured(arrangement, sumByAngles);
}

/** About how long volumeBySubsets takes at most. */
export function estimateVolumeBySubsets(arrangement: Arrangement): number {
  const { rank, generators, ring } = arrangement;
  let steps = 0;
  for (let k = 1; k <= rank; k++) {
    steps += binomial(generators.normals.length, k) * binomial(rank, k) * k;
  }
  return steps * (ring.radicand === null ? 8e-8 : 2e-7);
}

/** About how long volumeByAngles takes at most. */
export function estimateVolumeByAngles(arrangement: Arrangement): number {
  const { rank, generators, ring } = arrangement;
  const n = generators.normals.length;
  const planes = binomial(n, Math.max(0, rank - 2));
  const each = (n / Math.max(1, rank - 1)) * (2 + Math.log2(n));
  return planes * each * (ring.radicand === null ? 3e-7 : 1e-6);
}

/** The Euclidean volume from the relative one. */
export function euclideanVolume<E>(
  arrangement: Arrangement<E>,
  relative: ExactNumber,
): EuclideanVolume {
  const k = arrangement.generators.radicand;
  const covolume = squaredCovolume(arrangement);
  const square = multiplyNumbers(multiplyNumbers(relative, relative, k ?? 0n), covolume, k ?? 0n);
  return { square, decimal: squareRootDecimal(square, k) };
}

/** The square of the volume of a cell of spanBasis: its Gram determinant (J. Gram, 1883). */
export function squaredCovolume<E>(arrangement: Arrangement<E>): ExactNumber {
  const { ring, spanBasis, rank, dimension } = arrangement;
  if (rank === dimension) return exactNumber(1n);
  const gram = spanBasis.map((u) => spanBasis.map((v) => dot(ring, u, v)));
  return numberOf(ring, sumBySubsets(ring, gram, rank));
}

/** The size of the determinant of spanBasis in essential coordinates: 1 over Q. */
function basisDeterminant<E>(arrangement: Arrangement<E>): ExactNumber {
  const { ring, spanBasis, lift, rank } = arrangement;
  const columns = Array.from({ length: rank }, (_, c) => lift.map((row) => row[c]));
  const essential = spanBasis.map((u) => columns.map((column) => dot(ring, u, column)));
  return numberOf(ring, sumBySubsets(ring, essential, rank));
}

function dot<E>(ring: Ring<E>, u: readonly E[], v: readonly E[]): E {
  return u.reduce((sum, x, i) => ring.add(sum, ring.multiply(x, v[i])), ring.zero);
}

function numberOf<E>(ring: Ring<E>, e: E): ExactNumber {
  return ring.radicand === null
    ? exactNumber(e as bigint)
    : exactNumber((e as Quadratic).a, (e as Quadratic).b);
}

type DeterminantSum = <E>(ring: Ring<E>, vectors: readonly (readonly E[])[], rank: number) => E;

function measured<E>(arrangement: Arrangement<E>, sum: DeterminantSum): ExactNumber {
  const { ring, rank, hyperplanes, hyperplaneOf, generators } = arrangement;
  const lengths = signedLengths(arrangement);
  const scale = commonDenominator(lengths);
  const vectors = lengths.map((length, j) => {
    const a = (length.a * scale) / length.d;
    const b = (length.b * scale) / length.d;
    const times = ring.radicand === null ? ring.fromInteger(a) : ({ a, b } as E);
    return hyperplanes[hyperplaneOf[j]].essential.map((x) => ring.multiply(times, x));
  });
  const total =
    generators.radicand === null
      ? exactNumber(rationalSum(vectors as unknown as bigint[][], rank, ring, sum))
      : numberOf(ring, sum(ring, vectors, rank));
  const relative = divideNumbers(total, basisDeterminant(arrangement), generators.radicand ?? 0n);
  return multiplyNumbers(relative, exactNumber(1n, 0n, scale ** BigInt(rank)), 0n);
}

/**
 * In doubles where twice the square of a minor, times the number of bases or of vectors, stays below
 * 2^53, and so do 2 r products of a minor and an entry: these bound all that either route comes by.
 */
function rationalSum(
  vectors: readonly (readonly bigint[])[],
  rank: number,
  ring: Ring<unknown>,
  sum: DeterminantSum,
): bigint {
  const minor = squaredMinorBound(vectors, rank);
  const bases = BigInt(Math.ceil(binomial(vectors.length, rank)));
  const entry = largestOf(vectors) + 1n;
  const step = minor * (BigInt(2 * rank) * entry) ** 2n;
  const terms = bases + BigInt(vectors.length);
  const fits = step < 1n << 104n && 2n * minor * terms < 1n << 53n;
  return fits
    ? BigInt(
        sum(
          plainIntegerRing,
          vectors.map((v) => v.map(Number)),
          rank,
        ),
      )
    : (sum(ring, vectors, rank) as bigint);
}

function sumBySubsets<E>(ring: Ring<E>, vectors: readonly (readonly E[])[], rank: number): E {
  const steps = exteriorSteps(rank);
  let total = ring.zero;
  const visit = (k: number, start: number, minors: readonly E[]): void => {
    const { size, from, coordinate, sign } = steps[k];
    for (let i = start; i + rank - k <= vectors.length; i++) {
      const next: E[] = [];
      let zero = true;
      for (let at = 0; at < from.length; ) {
        let sum = ring.zero;
        for (let s = 0; s < size; s++, at++) {
          const product = ring.multiply(minors[from[at]], vectors[i][coordinate[at]]);
          sum = sign[at] > 0 ? ring.add(sum, product) : ring.subtract(sum, product);
        }
        if (ring.sign(sum) !== 0) zero = false;
        next.push(sum);
      }
      if (zero) continue;
      if (k + 1 < rank) visit(k + 1, i + 1, next);
      else total = ring.add(total, absolute(ring, next[0]));
    }
  };
  visit(0, 0, [ring.one]);
  return total;
}

function absolute<E>(ring: Ring<E>, x: E): E {
  return ring.sign(x) < 0 ? ring.negate(x) : x;
}

function sumByAngles<E>(ring: Ring<E>, vectors: readonly (readonly E[])[], rank: number): E {
  // Vectors hold minors with the generators projected along; `previous` is the last pivot.
  const visit = (list: readonly (readonly E[])[], r: number, previous: E): E => {
    if (r === 1) return list.reduce((sum, [x]) => ring.add(sum, absolute(ring, x)), ring.zero);
    if (r === 2) return absolute(ring, ring.divideExactly(areaOf(ring, list), previous));
    let total = ring.zero;
    for (let i = r - 1; i < list.length; i++) {
      const along = list[i];
      const p = along.findIndex((x) => ring.sign(x) !== 0);
      if (p < 0) continue;
      const projected = list.slice(0, i).map((v) => {
        const image: E[] = [];
        for (let c = 0; c < r; c++) {
          if (c === p) continue;
          const cross = ring.subtract(ring.multiply(along[p], v[c]), ring.multiply(v[p], along[c]));
          image.push(ring.divideExactly(cross, previous));
        }
        return image;
      });
      total = ring.add(total, visit(projected, r - 1, along[p]));
    }
    return total;
  };
  return visit(vectors, rank, ring.one);
}

/** The sum of |det(u, v)| over all pairs: by angle, each vector against the sum of those before it. */
function areaOf<E>(ring: Ring<E>, vectors: readonly (readonly E[])[]): E {
  const turn = ([a, b]: readonly E[], [c, d]: readonly E[]): E =>
    ring.subtract(ring.multiply(a, d), ring.multiply(b, c));
  const upper = vectors
    .filter(([x, y]) => ring.sign(x) !== 0 || ring.sign(y) !== 0)
    .map((v) => {
      const side = ring.sign(v[1]) || ring.sign(v[0]);
      return side < 0 ? v.map((x) => ring.negate(x)) : v;
    })
    .sort((u, v) => -ring.sign(turn(u, v)));
  let area = ring.zero;
  let sum: readonly E[] = [ring.zero, ring.zero];
  for (const v of upper) {
    area = ring.add(area, turn(sum, v));
    sum = [ring.add(sum[0], v[0]), ring.add(sum[1], v[1])];
  }
  return area;
}
