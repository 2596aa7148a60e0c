// Vertices and faces of the zonotope against the definition: on every sum of chosen ends a region's
// interior point is at most what it is on the region's vertex; against a convex hull of all such
// sums (quickhull3d); and against published counts.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { bitAt } from '../../src/bits/signs.js';
import {
  addNumbers,
  type ExactNumber,
  exactNumber,
  formatNumber,
  multiplyNumbers,
  negateNumber,
} from '../../src/exact/number.js';
import type { Range } from '../../src/input/generators.js';
import { InteriorPoints } from '../../src/region/interior.js';
import { listRegions, type RegionTable } from '../../src/region/regions.js';
import { negatedWord } from '../../src/region/walls.js';
import { findRival } from '../../src/zonotope/extremes.js';
import { ZonotopeVertices, zonotopeFaceCounts } from '../../src/zonotope/vertices.js';
import {
  allSubsets,
  arrangementOf,
  type Entry,
  sequence,
  smallRows,
} from '../support/arrangements.js';
import { hullCorners } from '../support/convex-hull.js';

type Vector = ExactNumber[];

/** Every sum of one chosen end for each generator, by the definition. */
function allSums(arrangement: Arrangement): Vector[] {
  const { normals, ranges, radicand } = arrangement.generators;
  let sums: Vector[] = [normals[0].map(() => exactNumber(0n))];
  normals.forEach((normal, i) => {
    const ends = [ranges?.[i].low ?? exactNumber(0n), ranges?.[i].high ?? exactNumber(1n)];
    sums = sums.flatMap((sum) =>
      ends.map((t) =>
        sum.map((x, j) => addNumbers(x, multiplyNumbers(t, normal[j], radicand ?? 0n))),
      ),
    );
  });
  return sums;
}

function rowsOf(table: RegionTable): { words: Int32Array }[] {
  const { words, wordsPerRow, rows } = table.half;
  return Array.from({ length: 2 * rows }, (_, i) => {
    const at = (i % rows) * wordsPerRow;
    return i < rows
      ? { words: words.slice(at, at + wordsPerRow) }
      : { words: negatedWord(words, at, table.hyperplanes) };
  });
}

function verticesOf(arrangement: Arrangement, table: RegionTable): Vector[] {
  const vertices = new ZonotopeVertices(arrangement);
  return rowsOf(table).map(({ words }) => vertices.vertexOf(words, 0));
}

function pointsOf(arrangement: Arrangement, table: RegionTable): bigint[][] {
  const points = new InteriorPoints(arrangement);
  return rowsOf(table).map(({ words }) => points.pointOf(words, 0, null));
}

function sign(x: ExactNumber, k: bigint): number {
  const { a, b } = x;
  if (a >= 0n && b >= 0n) return a === 0n && b === 0n ? 0 : 1;
  if (a <= 0n && b <= 0n) return -1;
  return a * a > k * b * b === a > 0n ? 1 : -1;
}

function product(point: readonly bigint[], v: Vector): ExactNumber {
  return v.reduce(
    (sum, x, j) => addNumbers(sum, multiplyNumbers(exactNumber(point[j]), x, 0n)),
    exactNumber(0n),
  );
}

const text = (v: Vector): string => v.map((x) => formatNumber(x, 5n)).join(' ');

const fraction = fc
  .tuple(fc.integer({ min: -4, max: 4 }), fc.integer({ min: 1, max: 3 }))
  .map(([a, d]) => exactNumber(BigInt(a), 0n, BigInt(d)));
const range: fc.Arbitrary<Range> = fc
  .tuple(fraction, fc.integer({ min: 1, max: 5 }))
  .map(([low, width]) => ({ low, high: addNumbers(low, exactNumber(BigInt(width), 0n, 2n)) }));

function expectVertices(arrangement: Arrangement): void {
  const k = arrangement.generators.radicand ?? 0n;
  const table = listRegions(arrangement);
  const vertices = verticesOf(arrangement, table);
  const points = pointsOf(arrangement, table);
  const sums = allSums(arrangement);
  points.forEach((point, i) => {
    const best = product(point, vertices[i]);
    for (const sum of sums) {
      const lead = sign(addNumbers(best, negateNumber(product(point, sum))), k);
      expect(lead > 0 || (lead === 0 && text(sum) === text(vertices[i]))).toBe(true);
    }
  });
  expect(findRival(vertices, points, arrangement.generators.radicand)).toBeNull();
}

describe('vertices of the zonotope', () => {
  it('are the only maxima among all sums, parallels, low ranks and ranges included', () => {
    const input = fc
      .oneof(
        smallRows({ dimension: 2, maximum: 6 }),
        smallRows({ dimension: 3, maximum: 6, bound: 2 }),
        smallRows({ dimension: 4, maximum: 5, bound: 1 }),
      )
      .chain((rows) =>
        fc.tuple(
          fc.constant(rows),
          fc.option(fc.array(range, { minLength: rows.length, maxLength: rows.length })),
        ),
      );
    fc.assert(
      fc.property(input, ([rows, ranges]) => {
        expectVertices(arrangementOf(rows, ranges === null ? {} : { ranges }));
      }),
      { numRuns: 40 },
    );
  });

  it('are so for entries of 25 digits', () => {
    const a = 1_234_567_890_123_456_789_012_345n;
    expectVertices(
      arrangementOf([
        [a, a + 7n, 3n],
        [-a, -a - 7n, -3n],
        [a + 1n, a + 7n, 3n],
        [1, 0, -1],
        [2, 0, -2],
      ]),
    );
  });

  it('are so over the golden field, with as many as the rhombic triacontahedron has', () => {
    // 32 vertices (H. Coxeter, 1948, Regular Polytopes, 2.7); two zones doubled change no count.
    const rows: Entry[][] = [
      [0, 2, [1, 1]],
      [0, 2, [-1, -1]],
      [[1, 1], 0, 2],
      [[-1, -1], 0, 2],
      [2, [1, 1], 0],
      [2, [-1, -1], 0],
    ];
    rows.push([0, -4, [-2, -2]]);
    const arrangement = arrangementOf(rows);
    expect(arrangement.hyperplanes).toHaveLength(6);
    expect(verticesOf(arrangement, listRegions(arrangement))).toHaveLength(32);
    expectVertices(arrangement);
  });

  it('are the corners of the convex hull of all sums', () => {
    const next = sequence(3);
    let compared = 0;
    for (let run = 0; run < 12; run++) {
      const rows = Array.from({ length: 4 + (run % 5) }, () => {
        return [next(9) - 4, next(9) - 4, next(9) - 4];
      }).filter((row) => row.some((x) => x !== 0));
      const arrangement = arrangementOf(rows);
      if (arrangement.rank < 3) continue;
      compared++;
      const sums = allSums(arrangement).map((v) => v.map((x) => Number(x.a)));
      const distinct = [...new Map(sums.map((v) => [v.join(' '), v])).values()];
      const ours = verticesOf(arrangement, listRegions(arrangement)).map(text);
      const corners = hullCorners(distinct).map((i) => distinct[i].join(' '));
      expect(ours.sort()).toEqual(corners.sort());
    }
    expect(compared).toBeGreaterThan(8);
  });
});

describe('faces of the zonotope', () => {
  it('are vertices when nothing is free, and hold the vertices of the regions around', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const vertices = new ZonotopeVertices(arrangement);
        const table = listRegions(arrangement);
        const { normals } = arrangement.generators;
        for (const { words } of rowsOf(table)) {
          expect(vertices.faceOf(words, 0, Int32Array.of(0), 0)).toEqual({
            base: vertices.vertexOf(words, 0),
            free: [],
          });
          for (let h = 0; h < table.hyperplanes; h++) {
            const face = vertices.faceOf(words, 0, Int32Array.of(1 << h), 0);
            expect(face.free).toEqual(arrangement.hyperplanes[h].members);
            // With its free generators at the ends their signs ask for, it is the vertex.
            const vertex = face.free.reduce((sum, i) => {
              const up = (bitAt(words, 0, h) === 1 ? 1 : -1) * arrangement.orientationOf[i] > 0;
              return up ? sum.map((x, j) => addNumbers(x, normals[i][j])) : sum;
            }, face.base);
            expect(vertex).toEqual(vertices.vertexOf(words, 0));
          }
        }
      }),
      { numRuns: 30 },
    );
  });

  it('are counted in reversed order', () => {
    // All 0/1 vectors in R^3: cones 1 18 48 32, faces of the zonotope 32 48 18 1, computed by two
    // separate slow programs; the formula V - E + F = 2 (L. Euler, 1758) holds.
    const faces = zonotopeFaceCounts([1, 18, 48, 32]);
    expect(faces).toEqual([32, 48, 18, 1]);
    expect(faces[0] - faces[1] + faces[2]).toBe(2);
  });
});

describe('the check of extremes', () => {
  const arrangement = arrangementOf(allSubsets(3));
  const table = listRegions(arrangement);
  const vertices = verticesOf(arrangement, table);
  const points = pointsOf(arrangement, table);

  it('passes 32 vertices of the 0/1 vectors in R^3', () => {
    expect(vertices).toHaveLength(32);
    expect(findRival(vertices, points, null)).toBeNull();
  });

  it('finds a vertex listed twice, a vertex moved inside, and a point of the wrong region', () => {
    expect(findRival([...vertices, vertices[4]], [...points, points[4]], null)).toEqual({
      vertex: 4,
      rival: 32,
    });
    const centre = [2n, 2n, 2n].map((x) => exactNumber(x));
    expect(findRival(vertices.with(9, centre), points, null)?.vertex).toBe(9);
    expect(findRival(vertices, points.with(5, points[6]), null)?.vertex).toBe(5);
  });

  it('finds the same in numbers past 2^53 and over the golden field', () => {
    const scale = (v: Vector, x: ExactNumber): Vector => v.map((y) => multiplyNumbers(y, x, 5n));
    for (const [factor, radicand] of [
      [exactNumber(10n ** 40n), null],
      [exactNumber(-2n, 1n, 3n), 5n],
      [exactNumber(-2n * 10n ** 30n, 10n ** 30n), 5n],
    ] as const) {
      const scaled = vertices.map((v) => scale(v, factor));
      expect(findRival(scaled, points, radicand)).toBeNull();
      expect(findRival(scaled, points.with(5, points[6]), radicand)?.vertex).toBe(5);
    }
  });
});
