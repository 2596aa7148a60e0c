// Which routes an arrangement can afford, and their running: estimates first, then the cheapest way
// to the polynomial, which knows how many regions there are before any is listed (T. Zaslavsky,
// 1975), then the listings that fit the time and the memory given.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { FlatLattice } from '../flat/lattice.js';
import {
  facesListedPerSecond,
  polynomialPatienceSeconds,
  regionsListedPerSecond,
} from '../limits.js';
import { regionCount } from '../region/regions.js';
import type { RegionEvidence } from './evidence.js';
import { needOfListing } from './listing.js';
import {
  type CensusListener,
  cheapestPolynomialRoute,
  type Need,
  regionsFromPolynomial,
} from './polynomial.js';
import { formatBytes, formatCount, formatSeconds } from './quantities.js';
import type { NotRun } from './record.js';
import type { Stages } from './stages.js';

export interface RouteLimits {
  /** Seconds a route may take by estimate. */
  readonly secondsPerRoute: number;
  /** Bytes a route may allocate by estimate. */
  readonly memoryBytes: number;
}

/** What the routes found; null where a route was not run. Polynomials in essential rank. */
export interface Findings {
  readonly polynomialByDeletion: readonly bigint[] | null;
  readonly polynomialByFlats: readonly bigint[] | null;
  readonly lattice: FlatLattice | null;
  /** Faces by dimension 0..rank. */
  readonly facesByMoebius: readonly bigint[] | null;
  readonly facesByListing: readonly bigint[] | null;
  readonly regionsByListing: bigint | null;
  readonly evidence: RegionEvidence | null;
  readonly notRun: readonly NotRun[];
}

/** Runs what fits; LimitError when no route to the polynomial does. */
export function runRoutes(
  arrangement: Arrangement,
  limits: RouteLimits,
  stages: Stages,
  listener: CensusListener,
): Findings {
  const notRun: NotRun[] = [];
  const within = (need: Need): boolean =>
    need.seconds <= limits.secondsPerRoute && need.bytes <= limits.memoryBytes;
  const leaveOut = (route: string, what: string, need: Need): void => {
    notRun.push({ route, why: `${what}${needed(need, limits)}` });
  };

  listener.stage('estimating');
  const needs = {
    deletion: { bytes: 0, ...stages.estimateDeletion(arrangement) },
    flats: stages.estimateFlats(arrangement),
  };
  let byDeletion = within(needs.deletion);
  let byFlats = within(needs.flats);
  if (!byDeletion && !byFlats) {
    const patience = Math.max(limits.secondsPerRoute, polynomialPatienceSeconds);
    const cheapest = cheapestPolynomialRoute(needs, patience, limits.memoryBytes);
    byDeletion = cheapest === 'deletion-restriction';
    byFlats = cheapest === 'flats';
  }

  let polynomialByDeletion: readonly bigint[] | null = null;
  if (byDeletion) {
    listener.stage(
      `polynomial by deletion-restriction, about ${formatSeconds(needs.deletion.seconds)}`,
    );
    polynomialByDeletion = stages.polynomialByDeletion(arrangement, (bases) =>
      listener.part(bases, needs.deletion.bases),
    );
  } else leaveOut('polynomial by deletion-restriction', '', needs.deletion);

  let lattice: FlatLattice | null = null;
  let polynomialByFlats: readonly bigint[] | null = null;
  let facesByMoebius: readonly bigint[] | null = null;
  if (byFlats) {
    listener.stage(`flats and their Moebius values, about ${formatSeconds(needs.flats.seconds)}`);
    lattice = stages.listFlats(arrangement, (done, total) => listener.part(done, total));
    polynomialByFlats = stages.polynomialByFlats(lattice);
    const need = { bytes: 0, seconds: stages.estimateMoebius(lattice) };
    if (within(need)) {
      listener.stage(`faces by Moebius values, about ${formatSeconds(need.seconds)}`);
      facesByMoebius = stages.facesByMoebius(lattice);
    } else leaveOut('faces by Moebius values', '', need);
  } else leaveOut('flats with Moebius values, and all counts by dimension', '', needs.flats);

  const regions = regionsFromPolynomial((polynomialByDeletion ?? polynomialByFlats)!);
  const listing = needOfListing(arrangement, regions, regions, regionsListedPerSecond);
  let regionsByListing: bigint | null = null;
  let evidence: RegionEvidence | null = null;
  if (within(listing)) {
    listener.stage(
      `listing ${formatCount(regions)} regions, about ${formatSeconds(listing.seconds)}`,
    );
    const table = stages.listRegions(arrangement);
    regionsByListing = BigInt(regionCount(table));
    listener.stage('looking at every region on its own');
    evidence = stages.examineRegions(arrangement, table);
  } else leaveOut('regions by listing', `${formatCount(regions)} regions: `, listing);

  let facesByListing: readonly bigint[] | null = null;
  if (facesByMoebius === null) {
    notRun.push({
      route: 'faces by listing',
      why: 'how many there are is not known without the faces by Moebius values',
    });
  } else {
    const faces = facesByMoebius.reduce((sum, count) => sum + count, 0n);
    const need = needOfListing(arrangement, faces, regions, facesListedPerSecond);
    if (within(need)) {
      listener.stage(`listing ${formatCount(faces)} faces, about ${formatSeconds(need.seconds)}`);
      facesByListing = stages.countFaces(arrangement).map(BigInt);
    } else leaveOut('faces by listing', `${formatCount(faces)} faces: `, need);
  }

  return {
    polynomialByDeletion,
    polynomialByFlats,
    lattice,
    facesByMoebius,
    facesByListing,
    regionsByListing,
    evidence,
    notRun,
  };
}

/** What a route would need, and the options that would let it run. */
function needed(need: Need, limits: RouteLimits): string {
  const memory = need.bytes > 0 ? ` and ${formatBytes(need.bytes)}` : '';
  const what = `would need about ${formatSeconds(need.seconds)}${memory}`;
  // Beyond a thousand years or a petabyte no option will do.
  if (need.seconds > 3e10 || need.bytes > 1024 ** 5) return what;
  const options: string[] = [];
  if (need.seconds > limits.secondsPerRoute) {
    options.push(`--budget ${roundUp(need.seconds * 1.2)}`);
  }
  if (need.bytes > limits.memoryBytes) {
    options.push(`--memory ${roundUp((need.bytes * 1.1) / 1024 ** 3)}GB`);
  }
  return `${what}; ${options.join(' ')} allows it`;
}

/** To two digits, upward, so that the option named is enough. */
function roundUp(value: number): string {
  if (value < 10) return String(Math.ceil(value));
  const unit = 10 ** (Math.floor(Math.log10(value)) - 1);
  return BigInt(Math.ceil(value / unit) * unit).toString();
}
