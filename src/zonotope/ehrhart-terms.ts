// The Ehrhart polynomial of a zonotope, and its quasi-polynomial where a corner is not a lattice
// point. Z is a disjoint union of half-open parallelepipeds, one for each independent set I of
// generators (R. Stanley, 1991, A zonotope associated with graphical degree sequences, theorem 2.2),
// and t Z has t^|I| index(I) lattice points in the one of I if the affine span of that tile meets the
// lattice, none otherwise. It meets it exactly for the multiples t of one positive integer, the order
// of I: 1 for every I when the corner is a lattice point (F. Ardila, M. Beck, J. McWhirter, 2020, The
// arithmetic of Coxeter permutahedra).
import { lcm } from '../exact/integers.js';

/** What the independent sets of one order contribute. */
export interface EhrhartTerm {
  /** These sets count in t Z when it divides t. */
  readonly order: bigint;
  /** rank + 1 coefficients, from t^0 up: the sum of index(I) over the sets of each size. */
  readonly coefficients: readonly bigint[];
}

/**
 * A quasi-polynomial: terms by ascending order, a single one of order 1 for a lattice zonotope. The
 * term of order 1 is always there, and its last coefficient is the volume.
 */
export type EhrhartTerms = readonly EhrhartTerm[];

/** One polynomial of a quasi-polynomial. */
export interface Constituent {
  /** It holds for the t whose greatest common divisor with the period is this. */
  readonly divisor: bigint;
  readonly coefficients: readonly bigint[];
}

/** Terms in canonical form from a map of orders to coefficients. */
export function termsOf(byOrder: ReadonlyMap<bigint, readonly bigint[]>): EhrhartTerms {
  return [...byOrder]
    .filter(([order, coefficients]) => order === 1n || coefficients.some((c) => c !== 0n))
    .sort(([p], [q]) => (p < q ? -1 : 1))
    .map(([order, coefficients]) => ({ order, coefficients }));
}

/** The least t after which the same polynomials come again: 1 for a lattice zonotope. */
export function ehrhartPeriod(terms: EhrhartTerms): bigint {
  return terms.reduce((period, { order }) => lcm(period, order), 1n);
}

/** The coefficients that hold at t: the polynomial itself for a lattice zonotope. */
export function coefficientsAt(terms: EhrhartTerms, t: bigint): bigint[] {
  const sum = terms[0].coefficients.map(() => 0n);
  for (const { order, coefficients } of terms) {
    if (t % order !== 0n) continue;
    for (let k = 0; k < sum.length; k++) sum[k] += coefficients[k];
  }
  return sum;
}

/**
 * Every constituent, by the common divisors of t and the period that tell them apart, ascending. A
 * half-integral zonotope has two: divisor 1 for odd t, 2 for even t.
 */
export function ehrhartConstituents(terms: EhrhartTerms): Constituent[] {
  // t is told apart by which orders divide it, and the least common multiple of those does.
  let divisors = new Set([1n]);
  for (const { order } of terms) {
    divisors = new Set([...divisors, ...[...divisors].map((d) => lcm(d, order))]);
  }
  return [...divisors]
    .sort((p, q) => (p < q ? -1 : 1))
    .map((divisor) => ({ divisor, coefficients: coefficientsAt(terms, divisor) }));
}

function valueAt(coefficients: readonly bigint[], t: bigint): bigint {
  return coefficients.reduceRight((value, c) => value * t + c, 0n);
}

/** Lattice points of the t-th dilate, t >= 0. */
export function latticePointsIn(terms: EhrhartTerms, t: bigint): bigint {
  if (t < 0n) throw new RangeError(`latticePointsIn: t: expected 0 or more, got ${t}`);
  return valueAt(coefficientsAt(terms, t), t);
}

/**
 * Lattice points in the relative interior of the t-th dilate, t >= 1, by reciprocity (I. Macdonald,
 * 1971, Polynomials associated with finite cell-complexes; for quasi-polynomials R. Stanley, 1974,
 * Combinatorial reciprocity theorems): (-1)^rank times the value at -t.
 */
export function interiorPointsIn(terms: EhrhartTerms, t: bigint): bigint {
  if (t < 1n) throw new RangeError(`interiorPointsIn: t: expected 1 or more, got ${t}`);
  const coefficients = coefficientsAt(terms, t);
  const value = valueAt(coefficients, -t);
  return coefficients.length % 2 === 1 ? value : -value;
}

/** Lattice points on the relative boundary of the t-th dilate, t >= 1. */
export function boundaryPointsIn(terms: EhrhartTerms, t: bigint): bigint {
  return latticePointsIn(terms, t) - interiorPointsIn(terms, t);
}

/** Volume relative to the lattice of the span: the top coefficient, whatever the corner. */
export function latticeVolume(terms: EhrhartTerms): bigint {
  return terms[0].coefficients[terms[0].coefficients.length - 1];
}
