// Volume, Ehrhart polynomial and lattice points of the zonotope by every route that can be afforded:
// the cheapest first, a second one as its check, and any other that is quick. Which were left out is
// said. Lattice points of small zonotopes are counted from the facets besides.
import type { Arrangement } from '../arrangement/arrangement.js';
import { Disagreement } from '../errors.js';
import { divideNumbers, type ExactNumber, exactNumber } from '../exact/number.js';
import type { FlatLattice } from '../flat/lattice.js';
import { directCountSeconds, quickRouteSeconds } from '../limits.js';
import {
  type ContractionEstimate,
  ehrhartByContraction,
  estimateContraction,
} from '../zonotope/ehrhart-by-contraction.js';
import { ehrhartByFlats, estimateEhrhartByFlats } from '../zonotope/ehrhart-by-flats.js';
import { ehrhartBySubsets, estimateSubsets } from '../zonotope/ehrhart-by-subsets.js';
import { type EhrhartTerms, latticeVolume } from '../zonotope/ehrhart-terms.js';
import { type Facet, facetsOf } from '../zonotope/facets.js';
import {
  type LatticeGenerators,
  latticeGenerators,
  latticeObstacle,
} from '../zonotope/lattice-generators.js';
import { DirectPoints } from '../zonotope/points-direct.js';
import {
  estimateVolumeByAngles,
  estimateVolumeBySubsets,
  volumeByAngles,
  volumeBySubsets,
} from '../zonotope/volume.js';
import type { CensusListener } from './polynomial.js';
import { formatSeconds } from './quantities.js';
import type { NotRun } from './record.js';

/** Told how far a computation is, now and then. */
type Progress = (done: number) => void;

/** The computations, as one value, so that a test can put a wrong one in and see it caught. */
export interface ZonotopeStages {
  readonly ehrhartBySubsets: (generators: LatticeGenerators, onDone: Progress) => EhrhartTerms;
  readonly ehrhartByContraction: (generators: LatticeGenerators, onDone: Progress) => EhrhartTerms;
  readonly ehrhartByFlats: (
    arrangement: Arrangement,
    generators: LatticeGenerators,
    lattice: FlatLattice,
    onDone: Progress,
  ) => EhrhartTerms;
  readonly volumeByAngles: (arrangement: Arrangement) => ExactNumber;
  readonly volumeBySubsets: (arrangement: Arrangement) => ExactNumber;
  readonly facetsOf: (arrangement: Arrangement, lattice: FlatLattice) => Iterable<Facet>;
}

export const standardZonotopeStages: ZonotopeStages = {
  ehrhartBySubsets: (generators, onProgress) => ehrhartBySubsets(generators, { onProgress }),
  ehrhartByContraction: (generators, onProgress) =>
    ehrhartByContraction(generators, { onProgress }),
  ehrhartByFlats: (arrangement, generators, lattice, onProgress) =>
    ehrhartByFlats(arrangement, generators, lattice, { onProgress }),
  volumeByAngles,
  volumeBySubsets,
  facetsOf,
};

/** What the routes found. */
export interface Measure {
  /** Why there are no lattice results; null where there are. */
  readonly obstacle: string | null;
  /** scale Z in the lattice of the span; null where there is no lattice. */
  readonly generators: LatticeGenerators | null;
  /** Of scale Z, by each route that was run. */
  readonly ehrhart: readonly { readonly route: string; readonly terms: EhrhartTerms }[];
  /** Of Z, relative to the lattice of the span, by each route that was run. */
  readonly volumes: readonly { readonly route: string; readonly value: ExactNumber }[];
  /** Points of t scale Z, counted one line at a time. */
  readonly counted: readonly {
    readonly dilate: number;
    readonly points: bigint;
    readonly interior: bigint;
  }[];
  /** Points of Z itself where the scale is not 1, counted in the same way; null where not counted. */
  readonly unscaled: { readonly points: bigint; readonly interior: bigint } | null;
  /** Routes that came upon a contradiction, with its words. */
  readonly faults: readonly { readonly route: string; readonly why: string }[];
  readonly notRun: readonly NotRun[];
}

export interface MeasureOptions {
  readonly secondsPerRoute: number;
  /** Seconds that the cheapest route may take by estimate, when that is more. */
  readonly patienceSeconds?: number;
  readonly listener: CensusListener;
  readonly stages: ZonotopeStages;
}

interface Route<T> {
  readonly name: string;
  readonly seconds: number;
  readonly total: number;
  run(onDone: Progress): T;
}

/** Null lattice: the flats were not listed, and the routes that need them are left out. */
export function measureZonotope(
  arrangement: Arrangement,
  lattice: FlatLattice | null,
  options: MeasureOptions,
): Measure {
  const { stages } = options;
  const notRun: NotRun[] = [];
  const faults: { route: string; why: string }[] = [];
  const obstacle = latticeObstacle(arrangement);
  const volumeRoutes: Route<ExactNumber>[] = [
    {
      name: 'bases, by angle in planes',
      seconds: estimateVolumeByAngles(arrangement),
      total: 0,
      run: () => stages.volumeByAngles(arrangement),
    },
    {
      name: 'determinants of all bases',
      seconds: estimateVolumeBySubsets(arrangement),
      total: 0,
      run: () => stages.volumeBySubsets(arrangement),
    },
  ];
  if (obstacle !== null) {
    const volumes = runAffordable('volume', volumeRoutes, options, notRun, faults);
    return {
      obstacle,
      generators: null,
      ehrhart: [],
      volumes,
      counted: [],
      unscaled: null,
      faults,
      notRun,
    };
  }
  const generators = latticeGenerators(arrangement);
  const routes = ehrhartRoutes(arrangement, generators, lattice, stages);
  if (lattice === null) {
    notRun.push({ route: 'Ehrhart polynomial by flats', why: 'the flats were not listed' });
  }
  const ehrhart = runAffordable('Ehrhart polynomial', routes, options, notRun, faults).map(
    ({ route, value }) => ({ route, terms: value }),
  );
  const unit = exactNumber(generators.scale ** BigInt(generators.rank));
  const volumes = ehrhart.map(({ route, terms }) => ({
    route: `Ehrhart polynomial by ${route}`,
    value: divideNumbers(exactNumber(latticeVolume(terms)), unit, 0n),
  }));
  // Another sum over bases, as a check while it costs next to nothing.
  const [angles] = volumeRoutes;
  if (ehrhart.length > 0 && angles.seconds <= directCountSeconds) {
    volumes.push({ route: angles.name, value: angles.run(() => {}) });
  }
  const direct =
    ehrhart.length > 0 && lattice !== null
      ? countDirectly(arrangement, generators, lattice, options)
      : { counted: [], unscaled: null };
  return { obstacle, generators, ehrhart, volumes, ...direct, faults, notRun };
}

function ehrhartRoutes(
  arrangement: Arrangement,
  generators: LatticeGenerators,
  lattice: FlatLattice | null,
  stages: ZonotopeStages,
): Route<EhrhartTerms>[] {
  const subsets = estimateSubsets(generators);
  const contraction: ContractionEstimate = estimateContraction(generators);
  const routes: Route<EhrhartTerms>[] = [
    {
      name: 'subsets',
      seconds: subsets.seconds,
      total: subsets.subsets,
      run: (onDone) => stages.ehrhartBySubsets(generators, onDone),
    },
    {
      name: 'deletion-contraction',
      seconds: contraction.seconds,
      total: contraction.leaves,
      run: (onDone) => stages.ehrhartByContraction(generators, onDone),
    },
  ];
  if (lattice !== null) {
    routes.push({
      name: 'flats',
      seconds: estimateEhrhartByFlats(arrangement, lattice.flatCount),
      total: lattice.flatCount,
      run: (onDone) => stages.ehrhartByFlats(arrangement, generators, lattice, onDone),
    });
  }
  return routes;
}

/** The two cheapest that fit the time for a route, and any other that is quick. */
function runAffordable<T>(
  what: string,
  routes: readonly Route<T>[],
  { secondsPerRoute, patienceSeconds = 0, listener }: MeasureOptions,
  notRun: NotRun[],
  faults: { route: string; why: string }[],
): { route: string; value: T }[] {
  const found: { route: string; value: T }[] = [];
  for (const route of [...routes].sort((a, b) => a.seconds - b.seconds)) {
    const { name, seconds, total } = route;
    const enough = found.length >= 2;
    const most = found.length === 0 ? Math.max(patienceSeconds, secondsPerRoute) : secondsPerRoute;
    if (seconds <= (enough ? Math.min(quickRouteSeconds, most) : most)) {
      listener.stage(`${what} by ${name}, about ${formatSeconds(seconds)}`);
      try {
        found.push({ route: name, value: route.run((done) => listener.part(done, total)) });
      } catch (error) {
        if (!(error instanceof Disagreement)) throw error;
        faults.push({ route: name, why: error.message });
      }
      continue;
    }
    const remedy = enough
      ? 'two others were run'
      : seconds < 3e10
        ? `--budget ${Math.ceil(seconds * 1.2)} allows it`
        : 'no budget will do';
    notRun.push({
      route: `${what} by ${name}`,
      why: `would need about ${formatSeconds(seconds)}; ${remedy}`,
    });
  }
  return found;
}

function countDirectly(
  arrangement: Arrangement,
  generators: LatticeGenerators,
  lattice: FlatLattice,
  { listener, stages }: MeasureOptions,
): Pick<Measure, 'counted' | 'unscaled'> {
  // Lines through the box of Z times inequalities, before any facet is made.
  const scale = Number(generators.scale);
  const sides = generators.corner.map((_, c) =>
    generators.vectors.reduce((sum, v) => sum + Math.abs(Number(v[c])) / scale, 1),
  );
  const lines = sides.reduce((product, side) => product * side, 1) / Math.max(...sides);
  const facetCount = lattice.rankOffsets[lattice.rank] - lattice.rankOffsets[lattice.rank - 1];
  if (lines * facetCount * 3e-9 > directCountSeconds) {
    return { counted: [], unscaled: null };
  }
  listener.stage('lattice points one by one');
  const facets = [...stages.facetsOf(arrangement, lattice)] as Facet<bigint>[];
  const points = new DirectPoints(arrangement, facets);
  const counted: { dilate: number; points: bigint; interior: bigint }[] = [];
  for (const dilate of [1, 2, 3]) {
    const whole = dilate * scale;
    if (!Number.isSafeInteger(whole) || points.estimateSeconds(whole) > directCountSeconds) break;
    counted.push({ dilate, ...points.count(whole) });
  }
  const affordable = scale !== 1 && points.estimateSeconds(1) <= directCountSeconds;
  return { counted, unscaled: affordable ? points.count(1) : null };
}
