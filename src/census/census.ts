// The census of an arrangement: runs the routes it can afford, holds them against each other, and
// returns the record. Nothing is printed or written here.
import type { Arrangement } from '../arrangement/arrangement.js';
import { formatNumber } from '../exact/number.js';
import { formatPolynomial } from '../exact/polynomial.js';
import { defaultMemoryBytes, defaultRouteSeconds } from '../limits.js';
import { checksOf } from './checks.js';
import {
  type CensusListener,
  inAmbientSpace,
  regionsFromPolynomial,
  rootsOf,
  silentListener,
} from './polynomial.js';
import { propertiesOf } from './properties.js';
import type { CensusRecord, Check } from './record.js';
import { runRoutes } from './routes.js';
import { type Stages, standardStages } from './stages.js';
import { version } from './version.js';
import { measureZonotope } from './zonotope-measure.js';
import { measureChecks, measuresOf } from './zonotope-record.js';

export interface CensusOptions {
  /** Seconds a route may take by estimate; the cheapest way to the polynomial may take longer. */
  readonly secondsPerRoute?: number;
  /** Bytes a route may allocate by estimate. */
  readonly memoryBytes?: number;
  /** Told what begins, and how far it is. */
  readonly listener?: CensusListener;
  /** The computations; others than the standard ones serve to test the checks. */
  readonly stages?: Stages;
}

/**
 * Every count of the arrangement by every route that fits the limits. A check that fails is in the
 * record with `agrees: false`, for the caller to act on. LimitError when not even the polynomial can
 * be had within the limits.
 */
export function takeCensus(arrangement: Arrangement, options: CensusOptions = {}): CensusRecord {
  const started = performance.now();
  const { rank, dimension, hyperplanes } = arrangement;
  const limits = {
    secondsPerRoute: options.secondsPerRoute ?? defaultRouteSeconds,
    memoryBytes: options.memoryBytes ?? defaultMemoryBytes,
  };
  const stages = options.stages ?? standardStages;
  const listener = options.listener ?? silentListener;
  const found = runRoutes(arrangement, limits, stages, listener);
  const { lattice } = found;
  const polynomial = (found.polynomialByDeletion ?? found.polynomialByFlats)!;
  const faces = found.facesByListing ?? found.facesByMoebius;
  const roots = rootsOf(polynomial);
  const { properties, notes } = propertiesOf(arrangement, polynomial, roots, lattice, faces);
  if (faces === null) notes.push('faces: the routes that count them were too dear');
  if (lattice === null) notes.push('flats: the route that lists them was too dear');
  const measure = measureZonotope(arrangement, lattice, {
    secondsPerRoute: limits.secondsPerRoute,
    listener,
    stages: stages.zonotope,
  });
  const { measures, notes: measureNotes } = measuresOf(arrangement, measure);
  notes.push(...measureNotes);

  const ambient = inAmbientSpace(arrangement, polynomial);
  const faceCounts = faces?.map(String) ?? null;
  return {
    schema: 'signwright/record/1',
    input: inputOf(arrangement),
    arrangement: {
      hyperplanes: hyperplanes.length,
      rank,
      lineality: dimension - rank,
      parallelClasses: hyperplanes.map(({ members }) => members.map((i) => i + 1)),
    },
    regions: String(found.regionsByListing ?? regionsFromPolynomial(polynomial)),
    faces: faceCounts,
    flats:
      lattice &&
      Array.from({ length: rank + 1 }, (_, k) =>
        String(lattice.rankOffsets[k + 1] - lattice.rankOffsets[k]),
      ),
    characteristicPolynomial: {
      coefficients: ambient.map(String),
      text: formatPolynomial(ambient),
      integerRoots: rootsOf(ambient)?.map(String) ?? null,
    },
    properties,
    zonotope: {
      faces: faceCounts && [...faceCounts].reverse(),
      ...measures,
    },
    checks: [
      ...checksOf(arrangement, found),
      ...measureChecks(arrangement, measure, lattice, found.facesByListing?.[1] ?? null),
    ],
    lists: [],
    run: {
      version,
      seconds: Number(((performance.now() - started) / 1000).toFixed(3)),
      threads: 1,
      notRun: [...found.notRun, ...measure.notRun],
    },
    notes,
  };
}

/** The checks whose routes differ. */
export function disagreements(record: CensusRecord): Check[] {
  return record.checks.filter((check) => !check.agrees);
}

/** One line for each check that fails, with every route and its value. */
export function describeDisagreement({ claim, routes }: Check): string {
  return `${claim}: ${routes.map(({ route, value }) => `${value} by ${route}`).join(', ')}`;
}

function inputOf({ generators, dimension }: Arrangement): CensusRecord['input'] {
  const { radicand, coordinates, labels, ranges } = generators;
  return {
    title: generators.title,
    source: generators.source.name,
    sha256: generators.source.sha256,
    normalCount: generators.normals.length,
    ambientDimension: dimension,
    field: radicand === null ? 'Q' : `Q(sqrt(${radicand}))`,
    coordinates: coordinates && [...coordinates],
    labels: labels && [...labels],
    normals: generators.normals.map((normal) => normal.map((x) => formatNumber(x, radicand))),
    ranges:
      ranges?.map(({ low, high }) => [formatNumber(low, radicand), formatNumber(high, radicand)]) ??
      null,
  };
}
