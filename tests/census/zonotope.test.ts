// The measure of the zonotope in the census and alone: faults planted in one route are caught by the
// others, rows of facets are held against plain sums, kinds of faces against a listing of all faces.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { describeDisagreement, disagreements, takeCensus } from '../../src/census/census.js';
import { standardStages } from '../../src/census/stages.js';
import { listEdges, listFacets, listVertices } from '../../src/census/zonotope-lists.js';
import { standardZonotopeStages, type ZonotopeStages } from '../../src/census/zonotope-measure.js';
import { formatZonotopePage } from '../../src/census/zonotope-page.js';
import { reportZonotope, type ZonotopeReport } from '../../src/census/zonotope-report.js';
import { rootText } from '../../src/census/zonotope-wording.js';
import { Disagreement, LimitError } from '../../src/errors.js';
import { exactNumber, formatNumber } from '../../src/exact/number.js';
import { facesByFlat } from '../../src/face/faces.js';
import { listFlats } from '../../src/flat/lattice.js';
import { movedToOrigin } from '../../src/zonotope/shape.js';
import { allSubsets, arrangementOf, smallRows } from '../support/arrangements.js';

const fourPlanes = arrangementOf([
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
  [1, 1, 1],
]);
const ample = { secondsPerRoute: 60, memoryBytes: 1e9 };

function withFault(fault: Partial<ZonotopeStages>): string[] {
  const stages = { ...standardStages, zonotope: { ...standardZonotopeStages, ...fault } };
  const record = takeCensus(fourPlanes, { stages });
  const { checks } = reportZonotope(fourPlanes, { ...ample, stages });
  const claims = disagreements(record).map(({ claim }) => claim);
  expect(checks.filter(({ agrees }) => !agrees).map(({ claim }) => claim)).toEqual(claims);
  return claims;
}

describe('a planted fault', () => {
  it('is caught when a route to the Ehrhart polynomial loses a term', () => {
    const claims = withFault({
      ehrhartByContraction: () => [{ order: 1n, coefficients: [1n, 4n, 6n, 3n] }],
    });
    expect(claims).toEqual(['Ehrhart polynomial', 'volume of the zonotope']);
  });

  it('is caught when all routes lose the same term, by the points counted within the facets', () => {
    const wrong = () => [{ order: 1n, coefficients: [1n, 4n, 5n, 4n] }];
    const claims = withFault({
      ehrhartByContraction: wrong,
      ehrhartByFlats: wrong,
      ehrhartBySubsets: wrong,
    });
    expect(claims).toEqual([
      'lattice points, dilates 1 to 3',
      'interior lattice points, dilates 1 to 3',
    ]);
  });

  it('is caught when a facet is moved', () => {
    const claims = withFault({
      *facetsOf(arrangement, lattice) {
        let number = 0;
        for (const facet of standardZonotopeStages.facetsOf(arrangement, lattice)) {
          yield number++ === 4 ? { ...facet, offset: exactNumber(facet.offset.a - 1n) } : facet;
        }
      },
    });
    expect(claims.length).toBeGreaterThan(0);
    expect(claims.every((claim) => claim.includes('lattice points'))).toBe(true);
  });

  it('is caught when a route finds itself in contradiction, and says its words', () => {
    const stages = {
      ...standardStages,
      zonotope: {
        ...standardZonotopeStages,
        ehrhartByFlats: () => {
          throw new Disagreement('a sum 7 is not divisible by 2');
        },
      },
    };
    const [check] = disagreements(takeCensus(fourPlanes, { stages }));
    expect(describeDisagreement(check)).toContain('a sum 7 is not divisible by 2');
  });

  it('shows both values on the page of the zonotope', () => {
    const stages = {
      ...standardStages,
      zonotope: { ...standardZonotopeStages, volumeByAngles: () => exactNumber(5n) },
    };
    const page = formatZonotopePage(
      fourPlanes,
      reportZonotope(fourPlanes, { ...ample, stages }),
      false,
    );
    expect(page).toMatch(/^Checks: 1 of \d DISAGREE$/m);
    expect(page).toMatch(/^ {2}volume of the zonotope +DISAGREE$/m);
    expect(page).toMatch(/^ {4}bases, by angle in planes +5$/m);
  });
});

describe('what is left out', () => {
  it('says which routes were run where others are too dear', () => {
    const record = takeCensus(fourPlanes, { secondsPerRoute: 1e-9 });
    expect(record.zonotope).toMatchObject({ volume: null, ehrhart: null, latticePoints: null });
    expect(record.notes.join('\n')).toContain('volume: the routes to it were too dear');
    const routes = record.run.notRun.map(({ route }) => route).join('\n');
    for (const route of ['subsets', 'deletion-contraction', 'flats']) {
      expect(routes).toContain(`Ehrhart polynomial by ${route}`);
    }
  });

  it('takes the cheapest route within its patience, and no other', () => {
    const limits = { secondsPerRoute: 1e-9, memoryBytes: 1e9, patienceSeconds: 60 };
    const { measures, notRun, checks } = reportZonotope(fourPlanes, limits);
    expect(measures.ehrhart).toEqual(['1', '4', '6', '4']);
    expect(notRun.filter(({ route }) => route.startsWith('Ehrhart'))).toHaveLength(2);
    expect(checks.map(({ claim }) => claim)).not.toContain('Ehrhart polynomial');
  });

  it('refuses lists that would not fit', () => {
    const big = arrangementOf(allSubsets(5));
    expect(() => [...listVertices(big, 1000)]).toThrow(LimitError);
    expect(() => [...listFacets(big, false, 1000)]).toThrow(LimitError);
  });
});

/** Faces by what spans them, from a listing of every one: generators free on each, and how many. */
function slowKinds(arrangement: Arrangement, codimension: number): Map<number, number> {
  const kinds = new Map<number, number>();
  for (const { dimension, zero, rows, mirrored } of facesByFlat(arrangement)) {
    if (dimension !== arrangement.rank - codimension) continue;
    let hyperplanes = 0;
    for (let h = 0; h < arrangement.hyperplanes.length; h++) {
      hyperplanes += (zero[h >> 5] >>> (h & 31)) & 1;
    }
    kinds.set(hyperplanes, (kinds.get(hyperplanes) ?? 0) + (mirrored ? 2 * rows : rows));
  }
  return kinds;
}

const rows3 = smallRows({ dimension: 3, maximum: 7 });

describe('kinds of faces', () => {
  it('are as many as a listing of all faces has', () => {
    fc.assert(
      fc.property(rows3, (rows) => {
        const arrangement = arrangementOf(rows);
        const report = reportZonotope(arrangement, ample);
        const edges = report.edgeClasses.reduce((sum, edge) => sum + Number(edge.edges), 0);
        expect(edges).toBe(slowKinds(arrangement, 1).get(1));
        if (arrangement.rank < 2) return;
        const polygons = new Map(
          report.polygons!.map(({ sides, count }) => [sides / 2, Number(count)]),
        );
        expect(polygons).toEqual(slowKinds(arrangement, 2));
        // In rank 3 facets are the polygons, and have as many vertices as sides.
        if (arrangement.rank !== 3) return;
        expect(report.facetsByVertices!.map(({ vertices, count }) => [vertices, count])).toEqual(
          report.polygons!.map(({ sides, count }) => [String(sides), count]),
        );
      }),
      { numRuns: 40 },
    );
  });
});

describe('lists', () => {
  it('name for each facet exactly the vertices where its inequality is an equation', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const vertices = [...listVertices(arrangement, 1e9)].map(({ vertex }) =>
          vertex.map(({ a }) => a),
        );
        const facets = [...listFacets(arrangement, true, 1e9)];
        const { rankOffsets, rank } = listFlats(arrangement);
        expect(facets).toHaveLength(2 * (rankOffsets[rank] - rankOffsets[rank - 1]));
        for (const { normal, offset, vertexRows, vertices: count, signs } of facets) {
          const on = vertices.flatMap((vertex, i) => {
            const value = vertex.reduce((sum, x, c) => sum + x * normal[c].a, 0n);
            expect(value <= offset.a).toBe(true);
            return value === offset.a ? [i + 1] : [];
          });
          expect(vertexRows).toEqual(on);
          expect(count).toBe(BigInt(on.length));
          rows.forEach((row, j) => {
            const value = row.reduce((sum, x, c) => sum + BigInt(x) * normal[c].a, 0n);
            expect(signs[j]).toBe(value > 0n ? '+' : value < 0n ? '-' : '0');
          });
        }
      }),
      { numRuns: 40 },
    );
  });

  it('give edges whose ends are vertices, each as long as its class', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const text = (vertex: readonly { a: bigint }[]) => vertex.map(({ a }) => a).join();
        const vertices = new Set(
          [...listVertices(arrangement, 1e9)].map(({ vertex }) => text(vertex)),
        );
        const lengths = new Map(
          reportZonotope(arrangement, ample).edgeClasses.map((edge) => [
            edge.generators.join(),
            edge.squaredLength,
          ]),
        );
        for (const { from, to, generators } of listEdges(arrangement, 1e9)) {
          expect(vertices).toContain(text(from));
          expect(vertices).toContain(text(to));
          const square = from.reduce((sum, { a }, i) => sum + (to[i].a - a) ** 2n, 0n);
          expect(lengths.get(generators.join())).toBe(String(square));
        }
      }),
      { numRuns: 30 },
    );
  });
});

describe('the zonotope moved to the origin', () => {
  it('has its vertices in opposite pairs, and the volume it had', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const moved = movedToOrigin(arrangement);
        const vertices = [...listVertices(moved, 1e9)].map(({ vertex }) => vertex);
        for (let i = 0; i < vertices.length; i += 2) {
          const texts = vertices[i].map((x) => formatNumber(x, null));
          const opposite = vertices[i + 1].map(({ a, b, d }) =>
            formatNumber({ a: -a, b, d }, null),
          );
          expect(texts).toEqual(opposite);
        }
        const measured = (report: ZonotopeReport) => report.measures.volume;
        const report = reportZonotope(moved, ample);
        expect(report.checks.filter(({ agrees }) => !agrees)).toEqual([]);
        expect(measured(report)).toBe(measured(reportZonotope(arrangement, ample)));
        expect(report.centre).toEqual(['0', '0', '0']);
      }),
      { numRuns: 25 },
    );
  });
});

describe('ranges', () => {
  const end = fc.integer({ min: -4, max: 4 });
  const ends = fc
    .tuple(end, end, fc.integer({ min: 1, max: 3 }))
    .filter(([a, b]) => a !== b)
    .map(([a, b, d]) => ({
      low: exactNumber(BigInt(Math.min(a, b)), 0n, BigInt(d)),
      high: exactNumber(BigInt(Math.max(a, b)), 0n, BigInt(d)),
    }));

  it('leave every check standing, and each volume times the lengths', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 2, maximum: 4, bound: 2 }).chain((rows) =>
          fc.tuple(fc.constant(rows), fc.tuple(...rows.map(() => ends))),
        ),
        ([rows, ranges]) => {
          const { checks, measures } = reportZonotope(arrangementOf(rows, { ranges }), ample);
          expect(checks.filter(({ agrees }) => !agrees)).toEqual([]);
          expect(checks.map(({ claim }) => claim).join()).toContain('lattice points');
          if (measures.volume === null || arrangementOf(rows).rank < 2) return;
          // The area of a zonotope is the sum over pairs (G. Shephard, 1974).
          let area = 0;
          rows.forEach(([a, b], i) => {
            rows.slice(0, i).forEach(([c, d], j) => {
              const length = [i, j].map((k) => {
                const { low, high } = ranges[k];
                return Number(high.a) / Number(high.d) - Number(low.a) / Number(low.d);
              });
              area += Math.abs(a * d - b * c) * length[0] * length[1];
            });
          });
          expect(Number(measures.euclideanVolume!.decimal)).toBeCloseTo(area, 9);
        },
      ),
      { numRuns: 40 },
    );
  });
});

describe('roots in words', () => {
  it.each([
    ['4', '2', '2'],
    ['1/4', '0.5', '1/2'],
    ['1000000', '1000', '1,000'],
    ['2', '1.41421356237309', 'about 1.41421356237309, the square root of 2'],
    ['1/2', '0.707106781186547', 'about 0.707106781186547, the square root of 1/2'],
    ['6+2*sqrt(5)', '3.23606797749978', 'about 3.23606797749978, the square root of 6+2*sqrt(5)'],
  ])('the root of %s', (square, decimal, text) => {
    expect(rootText({ square, decimal })).toBe(text);
  });
});
