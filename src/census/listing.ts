// The list of regions as commands want it: counted by the polynomial first, refused where it would
// not fit, and held against that count when it is there.
import type { Arrangement } from '../arrangement/arrangement.js';
import { wordsFor } from '../bits/signs.js';
import { Disagreement, LimitError } from '../errors.js';
import { bytesPerListedWord, quickPolynomialSeconds, regionsListedPerSecond } from '../limits.js';
import { type RegionTable, regionCount } from '../region/regions.js';
import { genericRegions } from './closed-forms.js';
import {
  type CensusListener,
  type Need,
  type PolynomialRoute,
  polynomialBy,
  silentListener,
} from './polynomial.js';
import { formatBytes, formatCount, formatSeconds } from './quantities.js';
import { type Stages, standardStages } from './stages.js';

/** What listing `rows` faces takes; a sign table of half the regions is the largest thing held. */
export function needOfListing(
  arrangement: Arrangement,
  rows: bigint,
  regions: bigint,
  rowsPerSecond: number,
): Need {
  const words = wordsFor(arrangement.hyperplanes.length) + 4;
  return {
    seconds: Number(rows) / rowsPerSecond,
    bytes: (Number(regions) / 2) * words * bytesPerListedWord,
  };
}

/** How many regions there will be, and by which route that is known; null where it is only a bound. */
export interface Expected {
  readonly regions: bigint;
  readonly route: PolynomialRoute | null;
}

/**
 * The number of regions before any is listed. The polynomial is left out only where it would take
 * long and even the most regions that so many hyperplanes can have (the generic number) fit.
 * LimitError where the tables of a listing would pass `memoryBytes`.
 */
export function expectRegions(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
  stages: Stages = standardStages,
): Expected {
  const most = genericRegions(arrangement.hyperplanes.length, arrangement.rank);
  const needFor = (regions: bigint): Need =>
    needOfListing(arrangement, regions, regions, regionsListedPerSecond);
  const quick = stages.estimateDeletion(arrangement).seconds <= quickPolynomialSeconds;
  if (!quick && needFor(most).bytes <= memoryBytes) return { regions: most, route: null };
  const route = quick ? 'deletion-restriction' : null;
  const expected = polynomialBy(arrangement, route, memoryBytes, listener, stages);
  const need = needFor(expected.regions);
  if (need.bytes <= memoryBytes) return expected;
  throw new LimitError(
    `a list of ${formatCount(expected.regions)} regions`,
    `${formatBytes(need.bytes)} and ${formatSeconds(need.seconds)}`,
    formatBytes(memoryBytes),
    'raise it with --memory SIZE; census and polynomial count without a list',
  );
}

/** Disagreement when a listing and the polynomial count differently. */
export function holdAgainst(expected: Expected, listed: bigint): void {
  if (expected.route === null || listed === expected.regions) return;
  throw new Disagreement(
    `regions: ${listed} by listing, ${expected.regions} by ${expected.route}; ` +
      'do not use this list, and please report it',
  );
}

/** All regions, held against the polynomial; LimitError past `memoryBytes`. */
export function listChecked(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
  stages: Stages = standardStages,
): RegionTable {
  const expected = expectRegions(arrangement, memoryBytes, listener, stages);
  const about = expected.route === null ? 'at most ' : '';
  listener.stage(`listing ${about}${formatCount(expected.regions)} regions`);
  const table = stages.listRegions(arrangement);
  holdAgainst(expected, BigInt(regionCount(table)));
  return table;
}
