// Walls against a slow certificate: a hyperplane is a wall exactly when some point satisfies all
// the other inequalities strictly and this one reversed (Fourier-Motzkin decides).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bitAt } from '../../src/bits/signs.js';
import { negatedWord, RegionIndex, WallFinder } from '../../src/region/walls.js';
import { allSubsets, arrangementOf, smallRows, typeA } from '../support/arrangements.js';
import { hasPoint, slowRegions } from '../support/slow-regions.js';

function slowWalls(arrangement: ReturnType<typeof arrangementOf>, words: Int32Array, at: number) {
  const { ring, hyperplanes } = arrangement;
  const rows = hyperplanes.map((plane, h) =>
    plane.essential.map((x) => (bitAt(words, at, h) === 1 ? x : ring.negate(x))),
  );
  return rows.flatMap((row, h) => {
    const flipped = rows.with(
      h,
      row.map((x) => ring.negate(x)),
    );
    return hasPoint(ring, flipped) ? [h] : [];
  });
}

describe('walls', () => {
  it('are those whose inequality alone can be reversed, in any small arrangement', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          smallRows({ dimension: 1, maximum: 3 }),
          smallRows({ dimension: 2, maximum: 6 }),
          smallRows({ dimension: 3, maximum: 7 }),
          smallRows({ dimension: 4, maximum: 6 }),
        ),
        (rows) => {
          const arrangement = arrangementOf(rows);
          const table = slowRegions(arrangement);
          const finder = new WallFinder(table);
          for (let row = 0; row < table.half.rows; row++) {
            const expected = slowWalls(arrangement, table.half.words, row * table.half.wordsPerRow);
            expect(finder.wallsOf(row)).toEqual(expected);
            expect(finder.wallCount(row)).toBe(expected.length);
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('number the rank in every region of a reflection arrangement', () => {
    // Orlik and Solomon, 1980: reflection arrangements are simplicial; type A4 has 120 regions.
    const table = slowRegions(arrangementOf(typeA(4)));
    const finder = new WallFinder(table);
    expect(table.half.rows).toBe(60);
    for (let row = 0; row < 60; row++) expect(finder.wallsOf(row)).toHaveLength(4);
  });

  it('give each edge of the zonotope twice', () => {
    // All 0/1 vectors in R^3: 32 vertices and 48 edges, computed by two separate slow programs.
    const table = slowRegions(arrangementOf(allSubsets(3)));
    const finder = new WallFinder(table);
    let walls = 0;
    for (let row = 0; row < table.half.rows; row++) walls += 2 * finder.wallCount(row);
    expect(2 * table.half.rows).toBe(32);
    expect(walls).toBe(2 * 48);
  });

  it('are found across word borders', () => {
    // n lines in the plane: every region has two walls, neighbours in the order of slopes.
    const n = 70;
    const arrangement = arrangementOf(Array.from({ length: n }, (_, i) => [1, i]));
    const table = slowRegions(arrangement);
    const finder = new WallFinder(table);
    expect(table.half.rows).toBe(n);
    const pairs = new Set<string>();
    for (let row = 0; row < n; row++) pairs.add(finder.wallsOf(row).join('-'));
    const expected = Array.from({ length: n - 1 }, (_, i) => `${i}-${i + 1}`);
    expect([...pairs].sort()).toEqual([...expected, `0-${n - 1}`].sort());
  });
});

describe('the index of regions', () => {
  it('finds every region and its negation and nothing else', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 7 }), (rows) => {
        const table = slowRegions(arrangementOf(rows));
        const { half, hyperplanes } = table;
        const index = new RegionIndex(table);
        const listed = new Set<number>();
        for (let row = 0; row < half.rows; row++) {
          listed.add(half.words[row]);
          listed.add(negatedWord(half.words, row, hyperplanes)[0]);
          expect(index.regionOf(half.words, row)).toBe(row);
          const opposite = negatedWord(half.words, row, hyperplanes);
          expect(index.regionOf(opposite, 0)).toBe(half.rows + row);
        }
        for (let word = 0; word < 2 ** hyperplanes; word++) {
          expect(index.regionOf(Int32Array.of(word), 0) >= 0).toBe(listed.has(word));
        }
      }),
      { numRuns: 40 },
    );
  });
});
