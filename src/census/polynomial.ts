// The characteristic polynomial by the route asked for, or by the one that is estimated to be
// quicker; what the census, the command of that name and the listing of regions start from.
import type { Arrangement } from '../arrangement/arrangement.js';
import { LimitError } from '../errors.js';
import { evaluatePolynomial, integerRoots } from '../exact/polynomial.js';
import type { FlatLattice } from '../flat/lattice.js';
import { polynomialPatienceSeconds } from '../limits.js';
import { formatBytes, formatSeconds } from './quantities.js';
import { type Stages, standardStages } from './stages.js';

/** Told what begins, in a few words, and how far it is. */
export interface CensusListener {
  stage(text: string): void;
  part(done: number, total: number): void;
}

/** Hears and says nothing. */
export const silentListener: CensusListener = { stage() {}, part() {} };

/** What a route takes by estimate. */
export interface Need {
  readonly seconds: number;
  readonly bytes: number;
}

export type PolynomialRoute = 'deletion-restriction' | 'flats';

export interface PolynomialFound {
  readonly route: PolynomialRoute;
  /** From t^0 up, in the ambient dimension. */
  readonly coefficients: readonly bigint[];
  /** Each as often as it occurs, ascending; null unless all roots are integers. */
  readonly integerRoots: readonly bigint[] | null;
  readonly regions: bigint;
}

/** Regions as the polynomial counts them, |chi(-1)| (T. Zaslavsky, 1975). */
export function regionsFromPolynomial(polynomial: readonly bigint[]): bigint {
  const value = evaluatePolynomial(polynomial, -1n);
  return value < 0n ? -value : value;
}

/** Each root as often as it occurs, ascending; null unless all are integers. */
export function rootsOf(polynomial: readonly bigint[]): bigint[] | null {
  const roots = integerRoots(polynomial);
  return (
    roots?.flatMap(({ root, multiplicity }) => new Array<bigint>(multiplicity).fill(root)) ?? null
  );
}

/** An essential polynomial in the coordinates given: one factor t a dimension of lineality. */
export function inAmbientSpace(
  { dimension, rank }: Arrangement,
  polynomial: readonly bigint[],
): bigint[] {
  return [...new Array<bigint>(dimension - rank).fill(0n), ...polynomial];
}

/**
 * The polynomial by `route`, or by the cheapest when that is null. A route asked for may take its
 * time; otherwise LimitError past an hour by estimate, and always past `memoryBytes`.
 */
export function polynomialBy(
  arrangement: Arrangement,
  route: PolynomialRoute | null,
  memoryBytes: number,
  listener: CensusListener = silentListener,
  stages: Stages = standardStages,
): PolynomialFound {
  listener.stage('estimating');
  const deletion = stages.estimateDeletion(arrangement);
  const flats = stages.estimateFlats(arrangement);
  const needs = { deletion: { bytes: 0, seconds: deletion.seconds }, flats };
  const taken =
    route ?? cheapestPolynomialRoute(needs, polynomialPatienceSeconds, memoryBytes, '--route NAME');
  let polynomial: readonly bigint[];
  if (taken === 'flats') {
    polynomial = stages.polynomialByFlats(
      listFlatsWithin(arrangement, memoryBytes, listener, stages),
    );
  } else {
    listener.stage(`deletion-restriction, about ${formatSeconds(deletion.seconds)}`);
    polynomial = stages.polynomialByDeletion(arrangement, (bases) =>
      listener.part(bases, deletion.bases),
    );
  }
  const coefficients = inAmbientSpace(arrangement, polynomial);
  return {
    route: taken,
    coefficients,
    integerRoots: rootsOf(coefficients),
    regions: regionsFromPolynomial(polynomial),
  };
}

/** All flats; LimitError where their table would pass `memoryBytes`. */
export function listFlatsWithin(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
  stages: Stages = standardStages,
): FlatLattice {
  const need = stages.estimateFlats(arrangement);
  if (need.bytes > memoryBytes) {
    throw new LimitError(
      'list of flats',
      `${formatBytes(need.bytes)} and ${formatSeconds(need.seconds)}`,
      formatBytes(memoryBytes),
      'raise it with --memory SIZE; the polynomial can be had by deletion-restriction without it',
    );
  }
  listener.stage(`listing flats, about ${formatSeconds(need.seconds)}`);
  return stages.listFlats(arrangement, (done, total) => listener.part(done, total));
}

/** The quicker of the routes that fit; LimitError, with the options that help, when none does. */
export function cheapestPolynomialRoute(
  needs: { readonly deletion: Need; readonly flats: Need },
  patienceSeconds: number,
  memoryBytes: number,
  timeOption = '--budget SECONDS',
): PolynomialRoute {
  const { deletion, flats } = needs;
  const affordable = (need: Need): boolean =>
    need.seconds <= patienceSeconds && need.bytes <= memoryBytes;
  if (affordable(deletion) && !(affordable(flats) && flats.seconds < deletion.seconds)) {
    return 'deletion-restriction';
  }
  if (affordable(flats)) return 'flats';
  throw new LimitError(
    'characteristic polynomial',
    `${formatSeconds(deletion.seconds)} by deletion-restriction, or ${formatSeconds(flats.seconds)} ` +
      `and ${formatBytes(flats.bytes)} by flats`,
    `${formatSeconds(patienceSeconds)} and ${formatBytes(memoryBytes)}`,
    `allow more with ${timeOption} or --memory SIZE, or take fewer normals`,
  );
}
