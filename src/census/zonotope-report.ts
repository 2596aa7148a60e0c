// The zonotope alone: its faces by number and kind, its measure, one dilate and where a point is in
// it, as one plain value that JSON can carry. Numbers are texts, exact as the readers take them back.
import type { Arrangement } from '../arrangement/arrangement.js';
import { type ExactNumber, formatNumber } from '../exact/number.js';
import { squareRootDecimal } from '../exact/root-decimal.js';
import type { FlatLattice } from '../flat/lattice.js';
import { quickPolynomialSeconds } from '../limits.js';
import {
  boundaryPointsIn,
  type EhrhartTerms,
  interiorPointsIn,
  latticePointsIn,
} from '../zonotope/ehrhart-terms.js';
import { centreOf, edgeClassesOf, facetKindsOf, polygonsOf } from '../zonotope/shape.js';
import { zonotopeFaceCounts } from '../zonotope/vertices.js';
import { compare } from './compare.js';
import { type MarginReport, marginReport } from './margin-report.js';
import { type CensusListener, regionsFromPolynomial, silentListener } from './polynomial.js';
import { formatBytes, formatSeconds } from './quantities.js';
import type { Check, NotRun } from './record.js';
import { type Stages, standardStages } from './stages.js';
import { caution } from './wording.js';
import { measureZonotope } from './zonotope-measure.js';
import { measureChecks, measuresOf, type ZonotopeMeasures } from './zonotope-record.js';

export interface ZonotopeOptions {
  /** Seconds a route may take by estimate. */
  readonly secondsPerRoute: number;
  /** Seconds that the cheapest route to the volume may take by estimate, when that is more. */
  readonly patienceSeconds?: number;
  /** Bytes a route may allocate by estimate. */
  readonly memoryBytes: number;
  /** A dilate to count lattice points in. */
  readonly dilate?: bigint | null;
  /** A point, d numbers, to say margins of. */
  readonly point?: readonly ExactNumber[] | null;
  readonly listener?: CensusListener;
  /** The computations; others than the standard ones serve to test the checks. */
  readonly stages?: Stages;
}

/** Edges in one direction. */
export interface EdgeClassReport {
  /** 1-based numbers of generators, and their labels where they have any. */
  readonly generators: readonly number[];
  readonly labels: readonly (string | null)[] | null;
  readonly vector: readonly string[];
  readonly squaredLength: string;
  readonly length: string;
  readonly edges: string | null;
}

export interface ZonotopeReport {
  readonly centre: readonly string[];
  /** By dimension 0..rank; null where the flats were too dear, and `vertices` may still be known. */
  readonly faces: readonly string[] | null;
  readonly vertices: string | null;
  readonly measures: ZonotopeMeasures;
  readonly dilate: {
    readonly factor: string;
    readonly latticePoints: string;
    readonly interiorPoints: string;
    readonly boundaryPoints: string;
  } | null;
  readonly edgeClasses: readonly EdgeClassReport[];
  readonly polygons: readonly { readonly sides: number; readonly count: string }[] | null;
  readonly facetsByVertices:
    | readonly { readonly vertices: string; readonly count: string }[]
    | null;
  readonly margins: MarginReport | null;
  readonly checks: readonly Check[];
  readonly notRun: readonly NotRun[];
  readonly notes: readonly string[];
  /** Where something of this could be taken for a rating; null otherwise. */
  readonly caution: string | null;
}

/** Everything that the limits allow; what is left out is in `notRun`. */
export function reportZonotope(arrangement: Arrangement, options: ZonotopeOptions): ZonotopeReport {
  const listener = options.listener ?? silentListener;
  const stages = options.stages ?? standardStages;
  const { secondsPerRoute } = options;
  const { rank, generators } = arrangement;
  const text = (x: ExactNumber): string => formatNumber(x, generators.radicand);
  const counted = countFaces(arrangement, options, stages, listener);
  const { lattice, faces, vertices } = counted;
  const measure = measureZonotope(arrangement, lattice, {
    secondsPerRoute,
    patienceSeconds: options.patienceSeconds ?? 0,
    listener,
    stages: stages.zonotope,
  });
  const { measures, notes } = measuresOf(arrangement, measure);
  const terms = measure.ehrhart[0]?.terms ?? null;
  const dilate = options.dilate ?? null;
  if (dilate !== null && terms === null) notes.push(`dilate ${dilate}: no Ehrhart polynomial`);
  if (lattice !== null && faces === null) {
    notes.push('edges by generator and 2-faces by sides: left out with the faces');
  }
  listener.stage('kinds of faces');
  const kinds = faces === null ? null : lattice;
  const point = options.point ?? null;
  return {
    centre: centreOf(arrangement).map(text),
    faces: faces?.map(String) ?? null,
    vertices: vertices === null ? null : String(vertices),
    measures,
    dilate: dilate === null || terms === null ? null : dilateOf(terms, dilate),
    edgeClasses: edgeClassesOf(arrangement, kinds).map((edge) => ({
      generators: edge.generators.map((j) => j + 1),
      labels: generators.labels && edge.generators.map((j) => generators.labels![j]),
      vector: edge.vector.map(text),
      squaredLength: text(edge.squaredLength),
      length: squareRootDecimal(edge.squaredLength, generators.radicand),
      edges: edge.edges === null ? null : String(edge.edges),
    })),
    polygons:
      kinds === null || rank < 2
        ? null
        : polygonsOf(kinds).map(({ sides, polygons }) => ({ sides, count: String(polygons) })),
    facetsByVertices:
      kinds === null || rank < 2
        ? null
        : facetKindsOf(kinds).map((kind) => ({
            vertices: String(kind.vertices),
            count: String(kind.facets),
          })),
    margins: point === null ? null : marginReport(arrangement, lattice, point, options),
    checks: [
      compare('vertices', [
        ['Moebius values of flats', faces?.[0] ?? null],
        ['deletion-restriction, |chi(-1)|', counted.verticesByDeletion],
      ]),
      compare('alternating sum of the faces', [
        ['Moebius values of flats', faces && alternatingSum(faces)],
        ['Euler relation', faces && 1n],
      ]),
      ...measureChecks(arrangement, measure, lattice, null),
    ].filter((check) => check !== null),
    notRun: [...counted.notRun, ...measure.notRun],
    notes,
    caution:
      point !== null || generators.ranges !== null || generators.coordinates !== null
        ? caution
        : null,
  };
}

interface Counted {
  readonly lattice: FlatLattice | null;
  /** Of the zonotope, by dimension 0..rank. */
  readonly faces: readonly bigint[] | null;
  readonly vertices: bigint | null;
  readonly verticesByDeletion: bigint | null;
  readonly notRun: NotRun[];
}

function countFaces(
  arrangement: Arrangement,
  { secondsPerRoute, memoryBytes }: ZonotopeOptions,
  stages: Stages,
  listener: CensusListener,
): Counted {
  const notRun: NotRun[] = [];
  listener.stage('estimating');
  const flats = stages.estimateFlats(arrangement);
  let lattice: FlatLattice | null = null;
  let faces: bigint[] | null = null;
  if (flats.seconds <= secondsPerRoute && flats.bytes <= memoryBytes) {
    listener.stage(`flats, about ${formatSeconds(flats.seconds)}`);
    lattice = stages.listFlats(arrangement, (done, total) => listener.part(done, total));
    const moebius = stages.estimateMoebius(lattice);
    if (moebius <= secondsPerRoute) {
      listener.stage(`faces by Moebius values, about ${formatSeconds(moebius)}`);
      faces = zonotopeFaceCounts([...stages.facesByMoebius(lattice)]);
    } else {
      notRun.push({
        route: 'faces by Moebius values',
        why: `would need about ${formatSeconds(moebius)}`,
      });
    }
  } else {
    notRun.push({
      route: 'flats, and with them faces and facets',
      why: `would need about ${formatSeconds(flats.seconds)} and ${formatBytes(flats.bytes)}; allow more with --budget SECONDS or --memory SIZE`,
    });
  }
  const deletion = stages.estimateDeletion(arrangement).seconds;
  const patience =
    faces === null ? secondsPerRoute : Math.min(secondsPerRoute, quickPolynomialSeconds);
  let verticesByDeletion: bigint | null = null;
  if (deletion <= patience) {
    listener.stage(`vertices by deletion-restriction, about ${formatSeconds(deletion)}`);
    verticesByDeletion = regionsFromPolynomial(stages.polynomialByDeletion(arrangement, () => {}));
  } else {
    notRun.push({
      route: 'vertices by deletion-restriction',
      why: `would need about ${formatSeconds(deletion)}`,
    });
  }
  return { lattice, faces, vertices: faces?.[0] ?? verticesByDeletion, verticesByDeletion, notRun };
}

function dilateOf(terms: EhrhartTerms, factor: bigint): ZonotopeReport['dilate'] {
  return {
    factor: String(factor),
    latticePoints: String(latticePointsIn(terms, factor)),
    interiorPoints: String(interiorPointsIn(terms, factor)),
    boundaryPoints: String(boundaryPointsIn(terms, factor)),
  };
}

function alternatingSum(faces: readonly bigint[]): bigint {
  return faces.reduce((sum, count, k) => (k % 2 === 0 ? sum + count : sum - count), 0n);
}
