// Interior points: every point is certified by the exact definition (the sign of each normal's
// product with it, in integers or a + b sqrt(5)), small ones are held against a full search.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { bitAt } from '../../src/bits/signs.js';
import { integerRing } from '../../src/exact/integers.js';
import { quadraticRing } from '../../src/exact/quadratic.js';
import { InteriorPoints } from '../../src/region/interior.js';
import { conePoint } from '../../src/region/interior-exact.js';
import type { RegionTable } from '../../src/region/regions.js';
import { negatedWord, WallFinder } from '../../src/region/walls.js';
import {
  allSubsets,
  arrangementOf,
  type Entry,
  sequence,
  smallRows,
  typeA,
} from '../support/arrangements.js';
import { hasPoint, slowRegions } from '../support/slow-regions.js';

/** Signs of the generators as given at an integer point, in exact arithmetic of the test's own. */
function signsAt(arrangement: Arrangement, x: readonly bigint[]): number[] {
  const k = arrangement.generators.radicand ?? 0n;
  return arrangement.generators.normals.map((normal) => {
    let a = 0n;
    let b = 0n;
    const denominator = normal.reduce((product, n) => product * n.d, 1n);
    normal.forEach((n, j) => {
      a += ((n.a * denominator) / n.d) * x[j];
      b += ((n.b * denominator) / n.d) * x[j];
    });
    if (a >= 0n && b >= 0n) return a === 0n && b === 0n ? 0 : 1;
    if (a <= 0n && b <= 0n) return -1;
    return a * a > k * b * b === a > 0n ? 1 : -1;
  });
}

function expectInside(
  arrangement: Arrangement,
  words: Int32Array,
  offset: number,
  x: readonly bigint[],
): void {
  const expected = Array.from(arrangement.hyperplaneOf, (h, i) => {
    return (bitAt(words, offset, h) === 1 ? 1 : -1) * arrangement.orientationOf[i];
  });
  expect(x).toHaveLength(arrangement.dimension);
  expect(signsAt(arrangement, x)).toEqual(expected);
}

function expectAllInside(arrangement: Arrangement, table: RegionTable): bigint[][] {
  const { words, wordsPerRow, rows } = table.half;
  const points = new InteriorPoints(arrangement);
  const walls = new WallFinder(table);
  const found: bigint[][] = [];
  for (let row = 0; row < rows; row++) {
    const at = row * wordsPerRow;
    const x = points.pointOf(words, at, walls.wallsOf(row));
    expectInside(arrangement, words, at, x);
    expectInside(arrangement, words, at, points.pointOf(words, at, null));
    const opposite = negatedWord(words, at, table.hyperplanes);
    expect(points.pointOf(opposite, 0, walls.wallsOf(row))).toEqual(x.map((v) => -v));
    found.push(x);
  }
  return found;
}

const goldenRows: Entry[][] = [
  [0, 2, [1, 1]],
  [0, 2, [-1, -1]],
  [[1, 1], 0, 2],
  [[-1, -1], 0, 2],
  [2, [1, 1], 0],
  [2, [-1, -1], 0],
];

describe('interior points', () => {
  it('lie in their regions, whatever the arrangement', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          smallRows({ dimension: 1, maximum: 3 }),
          smallRows({ dimension: 2, maximum: 6 }),
          smallRows({ dimension: 3, maximum: 7 }),
          smallRows({ dimension: 4, maximum: 6, bound: 1 }),
          smallRows({ dimension: 5, maximum: 5, bound: 2 }),
        ),
        (rows) => {
          const arrangement = arrangementOf(rows);
          expectAllInside(arrangement, slowRegions(arrangement));
        },
      ),
    );
  });

  it('lie in their regions for entries of 25 digits', () => {
    const digit = fc.bigInt({ min: -(10n ** 25n), max: 10n ** 25n });
    const row = fc
      .array(digit, { minLength: 3, maxLength: 3 })
      .filter((r) => r.some((x) => x !== 0n));
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 6 }), (rows) => {
        const arrangement = arrangementOf(rows);
        expectAllInside(arrangement, slowRegions(arrangement));
      }),
      { numRuns: 15 },
    );
  });

  it('lie in regions between normals that differ in the last of 25 digits', () => {
    const a = 1_234_567_890_123_456_789_012_345n;
    const rows: Entry[][] = [
      [a, a + 7n, 3n],
      [a, a + 7n, 4n],
      [a + 1n, a + 7n, 3n],
      [1, 0, -1],
    ];
    const arrangement = arrangementOf(rows);
    const points = expectAllInside(arrangement, slowRegions(arrangement));
    const length = Math.max(...points.flat().map((x) => x.toString().length));
    expect(length).toBeGreaterThan(20);
    expect(length).toBeLessThan(30);
  });

  it('lie in needle-thin regions that doubles can still tell apart, and in thinner ones', () => {
    for (const n of [10n ** 4n, 10n ** 7n, 10n ** 12n, 10n ** 15n, 10n ** 16n]) {
      const arrangement = arrangementOf([
        [n, n + 1n, 0],
        [n + 1n, n + 2n, 1],
        [n - 1n, n, 1],
        [0, 0, 1],
        [1, 1, n],
      ]);
      expectAllInside(arrangement, slowRegions(arrangement));
    }
  });

  it('lie in their regions over the golden field, in integers', () => {
    // Rhombic triacontahedron: 6 zones, 32 vertices (H. Coxeter, 1948, Regular Polytopes, 2.7).
    const arrangement = arrangementOf(goldenRows);
    const table = slowRegions(arrangement);
    expect(2 * table.half.rows).toBe(32);
    expectAllInside(arrangement, table);
  });

  it('lie in regions over the golden field that only many digits show', () => {
    // Fibonacci ratios: a plane within 10^-40 of another.
    let [f, g] = [1n, 1n];
    for (let i = 0; i < 100; i++) [f, g] = [g, f + g];
    const arrangement = arrangementOf([
      [[1, 1], -2, 0],
      [g, -f, 0],
      [[1, 1], -2, 1],
      [g, -f, 1],
    ]);
    expectAllInside(arrangement, slowRegions(arrangement));
  });

  it('are as small as a full search finds for the 0/1 vectors and type A', () => {
    for (const rows of [
      allSubsets(3),
      typeA(3),
      [
        [1, 0],
        [1, 1],
        [0, 1],
        [1, -1],
      ],
    ]) {
      const arrangement = arrangementOf(rows);
      const table = slowRegions(arrangement);
      const smallest = fullSearch(arrangement, table, 4);
      const points = expectAllInside(arrangement, table);
      expect(points.map(largest)).toEqual(smallest);
    }
  });

  it('are seldom far from the smallest for random planes', () => {
    const next = sequence(7);
    const rows = Array.from({ length: 9 }, () => [next(5) - 2, next(5) - 2, next(5) - 2]);
    const arrangement = arrangementOf(rows.filter((row) => row.some((x) => x !== 0)));
    const table = slowRegions(arrangement);
    const smallest = fullSearch(arrangement, table, 20);
    const points = expectAllInside(arrangement, table).map(largest);
    const total = (values: number[]): number => values.reduce((sum, x) => sum + x, 0);
    expect(total(points)).toBeLessThan(1.25 * total(smallest));
    points.forEach((size, i) => {
      expect(size).toBeGreaterThanOrEqual(smallest[i]);
    });
  });

  it('refuse signs that no point has', () => {
    const arrangement = arrangementOf([
      [1, 0],
      [0, 1],
      [1, 1],
    ]);
    const points = new InteriorPoints(arrangement);
    expect(() => points.pointOf(Int32Array.of(0b011), 0, null)).toThrow(RangeError);
    expect(() => points.pointOf(Int32Array.of(0b011), 0, [0, 1])).toThrow(RangeError);
  });

  it('are found, by all hyperplanes, even when the walls named are not all of them', () => {
    const arrangement = arrangementOf(allSubsets(3));
    const { words, rows } = slowRegions(arrangement).half;
    const points = new InteriorPoints(arrangement);
    for (let row = 0; row < rows; row++) {
      expectInside(arrangement, words, row, points.pointOf(words, row, [0, 1, 3]));
    }
  });
});

describe('the exact search for a point of a cone', () => {
  it('agrees with Fourier-Motzkin elimination on random systems, feasible or not', () => {
    let feasible = 0;
    let infeasible = 0;
    fc.assert(
      fc.property(
        fc.oneof(
          smallRows({ dimension: 2, maximum: 5 }),
          smallRows({ dimension: 3, maximum: 7 }),
          smallRows({ dimension: 4, maximum: 7, bound: 2 }),
        ),
        (numbers) => {
          const rows = numbers.map((row) => row.map(BigInt));
          const point = conePoint(integerRing, rows);
          expect(point !== null).toBe(hasPoint(integerRing, rows));
          if (point === null) infeasible++;
          else {
            feasible++;
            for (const row of rows) {
              expect(row.reduce((sum, x, j) => sum + x * point[j], 0n) > 0n).toBe(true);
            }
          }
        },
      ),
      { numRuns: 300 },
    );
    expect(Math.min(feasible, infeasible)).toBeGreaterThan(30);
  });

  it('does the same over the golden field', () => {
    const ring = quadraticRing(5n);
    const part = fc.integer({ min: -2, max: 2 });
    const entry = fc.record({ a: part.map(BigInt), b: part.map(BigInt) });
    const row = fc.array(entry, { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 5 }), (rows) => {
        const point = conePoint(ring, rows);
        expect(point !== null).toBe(hasPoint(ring, rows));
        for (const r of point === null ? [] : rows) {
          const value = r.reduce(
            (sum, x, j) => ring.add(sum, ring.multiply(x, point![j])),
            ring.zero,
          );
          expect(ring.sign(value)).toBe(1);
        }
      }),
    );
  });
});

function largest(x: readonly bigint[]): number {
  return Math.max(...x.map((value) => Math.abs(Number(value))));
}

/** The least largest coordinate of an integer point in each region, by trying all up to `bound`. */
function fullSearch(arrangement: Arrangement, table: RegionTable, bound: number): number[] {
  const finder = new WallFinder(table);
  const d = arrangement.dimension;
  const least = new Array<number>(table.half.rows).fill(Number.POSITIVE_INFINITY);
  const normals = arrangement.hyperplanes.map((h) => h.normal.map(Number));
  for (let code = 0; code < (2 * bound + 1) ** d; code++) {
    const x = Array.from({ length: d }, (_, j) => {
      return (Math.floor(code / (2 * bound + 1) ** j) % (2 * bound + 1)) - bound;
    });
    const values = normals.map((n) => n.reduce((sum, a, j) => sum + a * x[j], 0));
    if (values.includes(0)) continue;
    const word = values.reduce((bits, value, h) => bits | (value > 0 ? 1 << h : 0), 0);
    const region = finder.regionOf(Int32Array.of(word), 0) % table.half.rows;
    least[region] = Math.min(least[region], Math.max(...x.map(Math.abs)));
  }
  expect(least.every((size) => size <= bound)).toBe(true);
  return least;
}
