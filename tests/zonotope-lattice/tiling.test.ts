// The half-open tiling against what a tiling is: every point of the zonotope in exactly one tile and
// no other point in any (by the facets, and by a simplex method for membership), a tile for every
// independent set, volumes and lattice points that add up.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import {
  addNumbers,
  type ExactNumber,
  exactNumber,
  exactZero,
  multiplyNumbers,
} from '../../src/exact/number.js';
import type { Range } from '../../src/input/generators.js';
import { ehrhartByContraction } from '../../src/zonotope/ehrhart-by-contraction.js';
import { latticePointsIn } from '../../src/zonotope/ehrhart-terms.js';
import { ZonotopeMembership } from '../../src/zonotope/membership.js';
import { boundTiles, type Tile, TileSearch, tilesOf } from '../../src/zonotope/tiling.js';
import { latticePointsByTiles } from '../../src/zonotope/tiling-points.js';
import { allSubsets, arrangementOf, sequence, smallRows } from '../support/arrangements.js';
import { choices, determinant, minorGcd } from '../support/minors.js';
import { rangedArrangement, rangedRows, sumsOfEnds } from './ranged.js';
import { generatorsFor } from './routes.js';

type Rows = readonly (readonly number[])[];

function boxOf(arrangement: Arrangement): { low: number; high: number }[] {
  const sums = sumsOfEnds(arrangement);
  return sums[0].map((_, i) => {
    const values = sums.map((sum) => Number(sum[i].a) / Number(sum[i].d));
    return { low: Math.floor(Math.min(...values)), high: Math.ceil(Math.max(...values)) };
  });
}

/** Every lattice point of the box times t. */
function latticeBox(box: readonly { low: number; high: number }[], t: number): bigint[][] {
  let points: bigint[][] = [[]];
  for (const { low, high } of box) {
    points = points.flatMap((point) =>
      Array.from({ length: t * (high - low) + 1 }, (_, i) => [...point, BigInt(t * low + i)]),
    );
  }
  return points;
}

function check(arrangement: Arrangement, seed: number, points: number): void {
  const tiles = [...tilesOf(arrangement)];
  const search = new TileSearch(arrangement);
  const membership = new ZonotopeMembership(arrangement);
  const box = boxOf(arrangement);
  const random = sequence(seed);
  for (let trial = 0; trial < points; trial++) {
    // Lattice points, points of finer lattices, and corners: sums of ends, where tiles meet.
    const denominator = 1 + random(4);
    const point = box.map(({ low, high }) =>
      exactNumber(
        BigInt(low * denominator + random((high - low) * denominator + 1)),
        0n,
        BigInt(denominator),
      ),
    );
    const inside = membership.beyond(point) === null;
    expect(search.containing(tiles, point)).toHaveLength(inside ? 1 : 0);
  }
  const corners = sumsOfEnds(arrangement);
  for (let trial = 0; trial < 20; trial++) {
    expect(search.containing(tiles, corners[random(corners.length)])).toHaveLength(1);
  }
}

describe('the half-open tiling', () => {
  it('has every point of the zonotope in exactly one tile, and no other point', () => {
    fc.assert(
      fc.property(
        rangedRows({ dimension: 2, maximum: 6, bound: 3, denominator: 2 }),
        fc.nat(),
        (input, seed) => check(rangedArrangement(input), seed, 40),
      ),
      { numRuns: 30 },
    );
    fc.assert(
      fc.property(
        rangedRows({ dimension: 3, maximum: 6, bound: 2, denominator: 3 }),
        fc.nat(),
        (input, seed) => check(rangedArrangement(input), seed, 40),
      ),
      { numRuns: 20 },
    );
  });

  it('has a tile for every independent set and no other', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 4, maximum: 7, bound: 2 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const sets = [...tilesOf(arrangement)].map((tile) => tile.generators.join());
        const integers = rows.map((row) => row.map(BigInt));
        const independent = Array.from({ length: 5 }, (_, k) => choices(rows.length, k))
          .flat()
          .filter((set) =>
            set.length === 0
              ? true
              : minorGcd(
                  set.map((i) => integers[i]),
                  set.length,
                ) !== 0n,
          )
          .map((set) => set.join());
        expect(sets.sort()).toEqual(independent.sort());
        expect(sets.length).toBeLessThanOrEqual(boundTiles(arrangement));
      }),
      { numRuns: 30 },
    );
  });

  it('has full tiles whose volumes add up to that of the zonotope', () => {
    for (const rows of [allSubsets(3), allSubsets(4)]) {
      const full = [...tilesOf(arrangementOf(rows))].filter(
        (tile) => tile.generators.length === rows[0].length,
      );
      const volume = full.reduce((sum, tile) => {
        const d = determinant(tile.generators.map((j) => rows[j].map(BigInt)));
        return sum + (d < 0n ? -d : d);
      }, 0n);
      const terms = ehrhartByContraction(generatorsFor(arrangementOf(rows)));
      expect(volume).toBe(terms[0].coefficients.at(-1));
    }
  });

  it('has tiles whose lattice points add up, dilate by dilate, to the Ehrhart polynomial', () => {
    // A tile of the t-th dilate: shift and segments t times as long.
    const dilated = (rows: Rows, ranges: readonly Range[], t: number): Arrangement => {
      const times = (x: ExactNumber): ExactNumber => multiplyNumbers(x, exactNumber(BigInt(t)), 0n);
      return arrangementOf(rows, {
        ranges: ranges.map(({ low, high }) => ({ low: times(low), high: times(high) })),
      });
    };
    fc.assert(
      fc.property(
        rangedRows({ dimension: 2, maximum: 4, bound: 2, denominator: 2 }),
        ({ rows, ranges }) => {
          const arrangement = rangedArrangement({ rows, ranges });
          const terms = ehrhartByContraction(generatorsFor(arrangement));
          for (const t of [1, 2, 3]) {
            const large = dilated(rows, ranges, t);
            const tiles = [...tilesOf(large)];
            const search = new TileSearch(large);
            const points = latticeBox(boxOf(arrangement), t).map((p) =>
              p.map((x) => exactNumber(x)),
            );
            const total = tiles.reduce(
              (sum, tile) => sum + points.filter((point) => search.contains(tile, point)).length,
              0,
            );
            expect(BigInt(total)).toBe(latticePointsIn(terms, BigInt(t)));
          }
        },
      ),
      { numRuns: 15 },
    );
  });

  it('has the lattice points of the Ehrhart polynomial by the Smith form of each tile', () => {
    const dilates = [0n, 1n, 2n, 3n, 4n, 6n, 25n];
    fc.assert(
      fc.property(
        fc
          .integer({ min: 1, max: 4 })
          .chain((denominator) => rangedRows({ dimension: 3, maximum: 6, bound: 3, denominator })),
        (input) => {
          const arrangement = rangedArrangement(input);
          const terms = ehrhartByContraction(generatorsFor(arrangement));
          expect(latticePointsByTiles(arrangement, tilesOf(arrangement), dilates)).toEqual(
            dilates.map((t) => latticePointsIn(terms, t)),
          );
        },
      ),
    );
  });

  it('starts each tile where its generators and those not raised are low', () => {
    const rows = allSubsets(3);
    for (const { generators, raised, shift } of tilesOf(arrangementOf(rows))) {
      expect(raised.some((j) => generators.includes(j))).toBe(false);
      const sum = rows[0].map((_, i) =>
        raised.reduce((total, j) => addNumbers(total, exactNumber(BigInt(rows[j][i]))), exactZero),
      );
      expect(shift).toEqual(sum);
    }
  });

  it('is the same in numbers past doubles', () => {
    const shape = (tiles: Iterable<Tile>): string[] =>
      [...tiles].map(({ generators, open, raised }) => `${generators}|${open}|${raised}`);
    const rows = [
      [1, 0, 2],
      [1, 1, 0],
      [0, 2, 1],
      [1, -1, 3],
      [2, 1, 1],
    ];
    const scaled = rows.map((row, i) => row.map((x) => BigInt(x) * (10n ** 30n + BigInt(i))));
    expect(shape(tilesOf(arrangementOf(scaled)))).toEqual(shape(tilesOf(arrangementOf(rows))));
    const sheared = rows.map(([x, y, z]) => [
      BigInt(x),
      BigInt(y),
      BigInt(z) + 10n ** 20n * BigInt(x),
    ]);
    check(arrangementOf(rows), 4, 30);
    expect([...tilesOf(arrangementOf(sheared))]).toHaveLength(
      [...tilesOf(arrangementOf(rows))].length,
    );
  });

  it('tiles the rhombic triacontahedron with golden rhombohedra', () => {
    // 20 rhombohedra, 10 of each shape (H. Coxeter, 1973, Regular Polytopes, section 2.7 and 13.8;
    // from memory); 6 + C(6,2) + 20 + 1 independent sets in all.
    const golden: [number, number] = [1, 1];
    const arrangement = arrangementOf([
      [0, 2, golden],
      [golden, 0, 2],
      [2, golden, 0],
      [0, 2, [-1, -1]],
      [[-1, -1], 0, 2],
      [2, [-1, -1], 0],
    ]);
    const tiles = [...tilesOf(arrangement)];
    expect([0, 1, 2, 3].map((k) => tiles.filter((t) => t.generators.length === k).length)).toEqual([
      1, 6, 15, 20,
    ]);
    const search = new TileSearch(arrangement);
    const membership = new ZonotopeMembership(arrangement);
    const random = sequence(11);
    for (let trial = 0; trial < 60; trial++) {
      const point = [0, 1, 2].map(() =>
        exactNumber(BigInt(random(33) - 16), BigInt(random(5) - 2), 2n),
      );
      const inside = membership.beyond(point) === null;
      expect(search.containing(tiles, point)).toHaveLength(inside ? 1 : 0);
    }
  });
});
