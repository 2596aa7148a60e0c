// The shape of the zonotope by kinds: its centre, its edges by generator, its 2-faces by sides and
// its facets by vertices, all counted over flats and none listed. A face belongs to the flat that its
// cone spans: a class of parallel edges to a hyperplane, a polygon with 2 m sides to a flat of rank
// 2 on m hyperplanes (P. McMullen, 1971, On zonotopes).
import type { Arrangement } from '../arrangement/arrangement.js';
import { countBits } from '../bits/signs.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { regionsThroughFlats } from '../flat/by-localization.js';
import { faceCountsOfRank } from '../flat/by-moebius.js';
import type { FlatLattice } from '../flat/lattice.js';
import { type Range, unitRange } from '../input/generators.js';

/** Half the sum of both ends of every generator: d numbers. */
export function centreOf(arrangement: Arrangement): ExactNumber[] {
  const { normals, ranges, radicand } = arrangement.generators;
  const half = exactNumber(1n, 0n, 2n);
  let centre = normals[0].map(() => exactZero);
  normals.forEach((normal, j) => {
    const { low, high } = ranges?.[j] ?? unitRange;
    const middle = multiplyNumbers(half, addNumbers(low, high), 0n);
    centre = centre.map((x, i) =>
      addNumbers(x, multiplyNumbers(middle, normal[i], radicand ?? 0n)),
    );
  });
  return centre;
}

/** The same arrangement with its zonotope moved so that the centre is the origin. */
export function movedToOrigin<E>(arrangement: Arrangement<E>): Arrangement<E> {
  const { generators } = arrangement;
  const half = exactNumber(1n, 0n, 2n);
  const ranges = generators.normals.map((_, j): Range => {
    const { low, high } = generators.ranges?.[j] ?? unitRange;
    const reach = multiplyNumbers(half, addNumbers(high, negateNumber(low)), 0n);
    return { low: negateNumber(reach), high: reach };
  });
  return { ...arrangement, generators: { ...generators, ranges } };
}

/** All edges in one direction. */
export interface EdgeClass {
  /** 0-based generators that add up to the edge, ascending. */
  readonly generators: readonly number[];
  /** d numbers: the edge as a vector, along the first of its generators. */
  readonly vector: readonly ExactNumber[];
  /** The square of its length. */
  readonly squaredLength: ExactNumber;
  /** How many there are; null without the flats. */
  readonly edges: bigint | null;
}

/** A class for each hyperplane, in their order. */
export function edgeClassesOf(arrangement: Arrangement, lattice: FlatLattice | null): EdgeClass[] {
  const { hyperplanes, generators, factorOf } = arrangement;
  const { normals, ranges, radicand } = generators;
  const k = radicand ?? 0n;
  // Flats of rank 1 are the hyperplanes, but not in their order.
  const counts = new Map<number, bigint>();
  if (lattice !== null) {
    faceCountsOfRank(lattice, 1).forEach((count, i) => {
      counts.set(membersOf(lattice, lattice.rankOffsets[1] + i)[0], count);
    });
  }
  return hyperplanes.map(({ members }, h) => {
    // In lengths of the first generator: t with the edge = t times it.
    let total = exactZero;
    for (const j of members) {
      const { low, high } = ranges?.[j] ?? unitRange;
      const reach = addNumbers(high, negateNumber(low));
      total = addNumbers(total, multiplyNumbers(factorOf[j], reach, k));
    }
    const first = normals[members[0]];
    const unit = factorOf[members[0]];
    const vector = first.map((x) => divideNumbers(multiplyNumbers(total, x, k), unit, k));
    const squaredLength = vector.reduce(
      (sum, x) => addNumbers(sum, multiplyNumbers(x, x, k)),
      exactZero,
    );
    return { generators: members, vector, squaredLength, edges: counts.get(h) ?? null };
  });
}

/** 2-faces by number of sides, ascending; rank 2 or more. */
export function polygonsOf(lattice: FlatLattice): { sides: number; polygons: bigint }[] {
  const { rankOffsets, zero, wordsPerRow } = lattice;
  return tallied(
    faceCountsOfRank(lattice, 2).map((count, i) => {
      const flat = rankOffsets[2] + i;
      return [2n * BigInt(countBits(zero, flat * wordsPerRow, wordsPerRow)), count] as const;
    }),
  ).map(([sides, polygons]) => ({ sides: Number(sides), polygons }));
}

/** Facets by number of vertices, ascending. */
export function facetKindsOf(lattice: FlatLattice): { vertices: bigint; facets: bigint }[] {
  const kinds = regionsThroughFlats(lattice, lattice.rank - 1).map((count) => [count, 2n] as const);
  return tallied(kinds).map(([vertices, facets]) => ({ vertices, facets }));
}

/** Hyperplanes through a flat, ascending. */
export function membersOf({ zero, wordsPerRow: W }: FlatLattice, flat: number): number[] {
  const members: number[] = [];
  for (let w = 0; w < W; w++) {
    for (let bits = zero[flat * W + w]; bits !== 0; bits &= bits - 1) {
      members.push((w << 5) + 31 - Math.clz32(bits & -bits));
    }
  }
  return members;
}

function tallied(pairs: readonly (readonly [bigint, bigint])[]): [bigint, bigint][] {
  const sums = new Map<bigint, bigint>();
  for (const [key, count] of pairs) sums.set(key, (sums.get(key) ?? 0n) + count);
  return [...sums].sort(([a], [b]) => (a < b ? -1 : 1));
}
