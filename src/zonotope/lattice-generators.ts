// The zonotope as a lattice polytope: its segments in a basis of the lattice span cut with Z^d,
// scaled until they are lattice vectors, and the place of its low corner relative to that lattice.
import type { Arrangement } from '../arrangement/arrangement.js';
import { gcd } from '../exact/integers.js';
import {
  addNumbers,
  commonDenominator,
  type ExactNumber,
  exactZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { unitRange } from '../input/generators.js';
import { shortenRows } from './lattice-quotient.js';

/**
 * scale Z = corner + the sum of the segments [0, vectors[j]], in coordinates of
 * `arrangement.spanBasis`. Every generator as given has its vector, parallel ones too.
 */
export interface LatticeGenerators {
  readonly rank: number;
  /** The least positive integer that makes every segment a lattice vector. */
  readonly scale: bigint;
  /** For each generator scale (high - low) u_j, `rank` integers; never zero. */
  readonly vectors: readonly (readonly bigint[])[];
  /** Numerators over `denominator`, lowest terms: a multiple of the corner is a lattice point
   * exactly when `denominator` divides the multiple. */
  readonly corner: readonly bigint[];
  readonly denominator: bigint;
}

/** Why an arrangement has no lattice results, or null where it has them. */
export function latticeObstacle(arrangement: Arrangement): string | null {
  const { radicand } = arrangement.generators;
  return radicand === null
    ? null
    : `the generators are over Q(sqrt(${radicand})), where they span no lattice with Z^d`;
}

/** The generators over Q as lattice vectors; RangeError over a quadratic field (latticeObstacle). */
export function latticeGenerators(arrangement: Arrangement): LatticeGenerators {
  const obstacle = latticeObstacle(arrangement);
  if (obstacle !== null) throw new RangeError(`latticeGenerators: ${obstacle}`);
  const { generators, hyperplanes, hyperplaneOf, rank } = arrangement;
  const directions = (arrangement as Arrangement<bigint>).hyperplanes.map((h) => h.essential);
  const lengths = signedLengths(arrangement);
  const scale = commonDenominator(lengths);
  const low = hyperplanes.map(() => exactZero);
  signedFactors(arrangement).forEach((factor, j) => {
    const range = generators.ranges?.[j] ?? unitRange;
    const h = hyperplaneOf[j];
    low[h] = addNumbers(low[h], multiplyNumbers(factor, range.low, 0n));
  });
  const denominator = commonDenominator(low);
  const corner = new Array<bigint>(rank).fill(0n);
  low.forEach(({ a, d }, h) => {
    const times = (scale * a * denominator) / d;
    directions[h].forEach((x, i) => {
      corner[i] += times * x;
    });
  });
  return {
    rank,
    scale,
    vectors: lengths.map(({ a, d }, j) => {
      const times = (scale * a) / d;
      return directions[hyperplaneOf[j]].map((x) => times * x);
    }),
    ...lowestTerms(corner, denominator),
  };
}

/** For each generator t with u_j = t times the normal of its hyperplane. */
function signedFactors(arrangement: Arrangement): ExactNumber[] {
  return arrangement.factorOf.map((factor, j) =>
    arrangement.orientationOf[j] < 0 ? negateNumber(factor) : factor,
  );
}

/** For each generator t with (high - low) u_j = t times the normal of its hyperplane. */
export function signedLengths(arrangement: Arrangement): ExactNumber[] {
  const { ranges, radicand } = arrangement.generators;
  return signedFactors(arrangement).map((factor, j) => {
    const { low, high } = ranges?.[j] ?? unitRange;
    return multiplyNumbers(factor, addNumbers(high, negateNumber(low)), radicand ?? 0n);
  });
}

/** The same zonotope moved so that its centre is the origin: its corner is then half-integral. */
export function centredGenerators(generators: LatticeGenerators): LatticeGenerators {
  const sum = generators.vectors[0].map((_, i) =>
    generators.vectors.reduce((total, v) => total - v[i], 0n),
  );
  return { ...generators, ...lowestTerms(sum, 2n) };
}

/**
 * The same in another basis of the lattice, in which the numbers are small if any such is found
 * quickly: coordinates are taken from one another while that makes all of them together shorter.
 */
export function inShortCoordinates(generators: LatticeGenerators): LatticeGenerators {
  const { vectors, corner } = generators;
  const rows = corner.map((x, c) => [...vectors.map((v) => v[c]), x]);
  shortenRows(rows);
  return {
    ...generators,
    vectors: vectors.map((_, j) => rows.map((row) => row[j])),
    corner: rows.map((row) => row[vectors.length]),
  };
}

function lowestTerms(
  numerators: readonly bigint[],
  denominator: bigint,
): { corner: bigint[]; denominator: bigint } {
  const common = numerators.reduce(gcd, denominator);
  return { corner: numerators.map((x) => x / common), denominator: denominator / common };
}

/**
 * The least positive t for which t times the rational point with these numerators is a lattice
 * point; the coordinates may be those of any quotient of the lattice.
 */
export function orderOf(numerators: readonly bigint[], denominator: bigint): bigint {
  return denominator / numerators.reduce(gcd, denominator);
}
