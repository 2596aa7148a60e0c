// Deletion-contraction of lattice vectors in integers of any size: the slow twin of the plain kernel,
// for what does not fit doubles. Terms are kept by order, see ehrhart-terms.
import { gcd } from '../exact/integers.js';
import { orderOf } from './lattice-generators.js';
import { imagesUnder, quotientMap } from './lattice-quotient.js';

/** Primitive vectors of a lattice Z^rank, none parallel to another, and a rational point's numerators. */
export interface LatticeVectors {
  readonly rank: number;
  readonly vectors: readonly (readonly bigint[])[];
  /** For each vector the sum of the contents merged into it. */
  readonly weights: readonly bigint[];
  readonly corner: readonly bigint[];
  readonly denominator: bigint;
}

/** By order the coefficients, rank + 1 of them, from t^0 up. */
export type TermMap = Map<bigint, bigint[]>;

/** Makes vectors primitive, drops zero ones, and merges parallel and opposite ones. */
export function mergeParallel(
  vectors: readonly (readonly bigint[])[],
  weights: readonly bigint[],
): { vectors: bigint[][]; weights: bigint[] } {
  const classes = new Map<string, number>();
  const merged: { vectors: bigint[][]; weights: bigint[] } = { vectors: [], weights: [] };
  vectors.forEach((v, i) => {
    const content = v.reduce(gcd, 0n);
    if (content === 0n) return;
    const lead = v.find((x) => x !== 0n)!;
    const divisor = lead < 0n ? -content : content;
    const primitive = v.map((x) => x / divisor);
    const key = primitive.join();
    const known = classes.get(key);
    if (known === undefined) {
      classes.set(key, merged.vectors.length);
      merged.vectors.push(primitive);
      merged.weights.push(weights[i] * content);
    } else merged.weights[known] += weights[i] * content;
  });
  return merged;
}

/** All terms. Vector i is contracted among those before it, so each set is met once, last first. */
export function contractAll(input: LatticeVectors): TermMap {
  const { rank, vectors, weights, corner, denominator } = input;
  const terms: TermMap = new Map();
  addTo(terms, orderOf(corner, denominator), 0, 1n, rank);
  if (rank === 0) return terms;
  if (rank === 1) {
    for (const w of weights) addTo(terms, 1n, 1, w, rank);
    return terms;
  }
  if (rank === 2 && denominator === 1n) {
    for (const w of weights) addTo(terms, 1n, 1, w, rank);
    addTo(terms, 1n, 2, areaOf(vectors.map((v, i) => v.map((x) => weights[i] * x))), rank);
    return terms;
  }
  for (let i = 0; i < vectors.length; i++) addContraction(terms, input, i);
  return terms;
}

/** Adds the terms of the sets that have vector i as their last. */
export function addContraction(terms: TermMap, input: LatticeVectors, i: number): void {
  const { rank, vectors, weights, corner, denominator } = input;
  const map = quotientMap(vectors[i]);
  const child = contractAll({
    rank: rank - 1,
    ...mergeParallel(imagesUnder(map, vectors.slice(0, i)), weights),
    ...lowered(imagesUnder(map, [corner])[0], denominator),
  });
  for (const [order, coefficients] of child) {
    coefficients.forEach((c, k) => {
      if (c !== 0n) addTo(terms, order, k + 1, weights[i] * c, rank);
    });
  }
}

/** The sum of |det(u, v)| over all pairs: by angle, each vector against the sum of those before it. */
function areaOf(vectors: readonly (readonly bigint[])[]): bigint {
  const upper = vectors.map(([x, y]) => (y < 0n || (y === 0n && x < 0n) ? [-x, -y] : [x, y]));
  upper.sort(([a, b], [c, d]) => {
    const turn = a * d - b * c;
    return turn > 0n ? -1 : turn < 0n ? 1 : 0;
  });
  let area = 0n;
  let [sumX, sumY] = [0n, 0n];
  for (const [x, y] of upper) {
    area += sumX * y - sumY * x;
    sumX += x;
    sumY += y;
  }
  return area;
}

/** The point modulo the lattice, over its own order. */
function lowered(
  corner: readonly bigint[],
  denominator: bigint,
): { corner: bigint[]; denominator: bigint } {
  const order = orderOf(corner, denominator);
  const common = denominator / order;
  return { corner: corner.map((x) => (x / common) % order), denominator: order };
}

function addTo(terms: TermMap, order: bigint, k: number, value: bigint, rank: number): void {
  let coefficients = terms.get(order);
  if (coefficients === undefined) {
    coefficients = new Array<bigint>(rank + 1).fill(0n);
    terms.set(order, coefficients);
  }
  coefficients[k] += value;
}
