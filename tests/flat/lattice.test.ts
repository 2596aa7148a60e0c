import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { faceCountsByMoebius } from '../../src/flat/by-moebius.js';
import { type FlatLattice, listFlats } from '../../src/flat/lattice.js';
import { moebiusValues } from '../../src/flat/moebius.js';
import { arrangementOf, type Entry, smallRows } from '../support/arrangements.js';
import { shuffled, unimodularChange } from '../support/coordinates.js';
import { slowFlats, slowMoebius } from '../support/slow-flats.js';

/** The lattice as plain objects, for up to 31 hyperplanes. */
function plainly(lattice: FlatLattice) {
  const { rank, rankOffsets, zero, moebius, coverOffsets, coverTargets } = lattice;
  expect(lattice.wordsPerRow).toBe(1);
  return Array.from({ length: lattice.flatCount }, (_, f) => ({
    set: zero[f],
    rank: rankOffsets.findIndex((end) => f < end) - 1,
    moebius: Number(moebius[f]),
    covers: Array.from(coverTargets.subarray(coverOffsets[f], coverOffsets[f + 1]), (t) => zero[t]),
    last: rank,
  }));
}

function expectSlowFlats(arrangement: Arrangement): void {
  const flats = plainly(listFlats(arrangement));
  const slow = slowFlats(arrangement);
  const found = flats.map(({ set, rank, moebius }) => ({ set, rank, moebius }));
  expect(found.sort((a, b) => a.rank - b.rank || a.set - b.set)).toEqual(slow);
  for (const { set, rank, covers } of flats) {
    const above = slow.filter((x) => x.rank === rank + 1 && (x.set & set) === set);
    expect([...covers].sort((a, b) => a - b)).toEqual(above.map((x) => x.set));
  }
}

const sum = (list: number[]): number => list.reduce((a, b) => a + b, 0);

/** Faces by dimension from the definition of mu(X, Y), flat by flat. */
function slowFaceCounts(arrangement: Arrangement): bigint[] {
  const flats = slowFlats(arrangement);
  const counts = new Array<bigint>(arrangement.rank + 1).fill(0n);
  for (const x of flats) {
    for (const y of slowMoebius(flats, x.set)) {
      counts[arrangement.rank - x.rank] += BigInt(Math.abs(y.moebius));
    }
  }
  return counts;
}

const rowsOf = (dimension: number, maximum: number) => smallRows({ dimension, maximum });

describe('flats', () => {
  it('are the closed subsets, with covers and Moebius values by the definition', () => {
    fc.assert(fc.property(rowsOf(3, 8), (rows) => expectSlowFlats(arrangementOf(rows))));
    fc.assert(
      fc.property(rowsOf(4, 8), (rows) => expectSlowFlats(arrangementOf(rows))),
      { numRuns: 40 },
    );
    fc.assert(
      fc.property(smallRows({ dimension: 5, maximum: 8, bound: 1 }), (rows) =>
        expectSlowFlats(arrangementOf(rows)),
      ),
      { numRuns: 40 },
    );
  });

  it('are right in ranks 1 and 2', () => {
    expectSlowFlats(arrangementOf([[3]]));
    expectSlowFlats(
      arrangementOf([
        [1, 2, 3],
        [-2, -4, -6],
      ]),
    );
    expectSlowFlats(
      arrangementOf([
        [1, 0],
        [0, 1],
        [1, 1],
        [2, 2],
      ]),
    );
    expectSlowFlats(
      arrangementOf([
        [1, 0, 0],
        [0, 0, 1],
        [5, 0, 7],
      ]),
    );
  });

  it('stay the same with 25-digit and with middling entries', () => {
    const changes = [
      { steps: 6, factor: 40 },
      { steps: 8, factor: 3000 },
      { steps: 12, factor: 99_999 },
    ];
    fc.assert(
      fc.property(rowsOf(4, 8), fc.nat(), (rows, seed) => {
        for (const change of changes) {
          expectSlowFlats(arrangementOf(unimodularChange(rows, { seed, ...change })));
        }
      }),
      { numRuns: 12 },
    );
  });

  it('are exact over a + b sqrt(5) and a + b sqrt(2)', () => {
    const entry = fc.tuple(fc.integer({ min: -2, max: 2 }), fc.integer({ min: -1, max: 1 }));
    const rows = fc.array(
      fc.array(entry, { minLength: 3, maxLength: 3 }).filter((row) => row.some(([a, b]) => a || b)),
      { minLength: 1, maxLength: 7 },
    );
    fc.assert(
      fc.property(rows, fc.constantFrom(2n, 5n), (list, radicand) => {
        expectSlowFlats(arrangementOf(list as Entry[][], { radicand }));
      }),
      { numRuns: 40 },
    );
  });

  it('tell nearly parallel normals apart', () => {
    const big = 10n ** 24n;
    for (const x of [2n ** 30n, 2n ** 52n, big]) {
      // (x, x-1) and (x+1, x) agree as doubles of their ratios, and so do the two lines they give.
      expectSlowFlats(
        arrangementOf([
          [1, 0, 0],
          [0, x, x - 1n],
          [1, x + 1n, x],
          [1, x, x - 1n],
          [0, 1, 0],
        ]),
      );
      expectSlowFlats(
        arrangementOf([
          [1, 0, 0, 0],
          [0, 1, 0, 0],
          [1, 2, x, x - 1n],
          [2, 1, x + 1n, x],
          [3, 1, x, x - 1n],
        ]),
      );
    }
  });

  it('take parallel copies as one hyperplane', () => {
    const copies = Array.from({ length: 300 }, (_, i) => [i + 1, -(i + 1), 0]);
    const lattice = listFlats(arrangementOf([...copies, [0, 1, 0], [0, 0, 1], [1, 0, 0]]));
    expect(lattice.hyperplanes).toBe(4);
    // Three planes through a line, one across it.
    expect([...lattice.rankOffsets]).toEqual([0, 1, 5, 9, 10]);
  });

  it('report their progress', () => {
    const rows = Array.from({ length: 31 }, (_, i) => [1, i, i * i, i ** 3, i ** 4]);
    const seen: number[] = [];
    const lattice = listFlats(arrangementOf(rows), {
      onProgress: ({ flats, done, of }) => {
        expect(done).toBeLessThan(of);
        seen.push(flats);
      },
    });
    expect(seen.every((flats, i) => i === 0 || flats >= seen[i - 1])).toBe(true);
    // Moment curve: in general position, so every subset below the rank is a flat.
    expect(lattice.flatCount).toBe(1 + 31 + 465 + 4495 + 31_465 + 1);
    expect(seen.length).toBeGreaterThan(0);
  });
});

describe('values past 2^53', () => {
  // Not of an arrangement (those need more flats than fit), but a graded order with the same data:
  // one bottom, 8 ranks of 129 elements, one top, everything below everything of the next rank, and
  // sets so that the atom taken is never below: each value is -129 times one of the rank before.
  const N = 129;
  const r = 9;
  const sizes = [1, ...new Array<number>(r - 1).fill(N), 1];
  const rankOffsets = Int32Array.from([0, ...sizes.map((_, k) => sum(sizes.slice(0, k + 1)))]);
  const flatCount = rankOffsets[r + 1];
  const zero = new Int32Array(flatCount);
  const coverOffsets = new Int32Array(flatCount + 1);
  const targets: number[] = [];
  for (let k = 0; k <= r; k++) {
    for (let f = rankOffsets[k]; f < rankOffsets[k + 1]; f++) {
      zero[f] = k === 0 ? 0 : 1 << (r - k);
      if (k < r) for (let y = rankOffsets[k + 1]; y < rankOffsets[k + 2]; y++) targets.push(y);
      coverOffsets[f + 1] = targets.length;
    }
  }
  const covers = {
    rank: r,
    hyperplanes: r,
    wordsPerRow: 1,
    flatCount,
    rankOffsets,
    zero,
    coverOffsets,
    coverTargets: Int32Array.from(targets),
  };

  it('are exact', () => {
    const moebius = moebiusValues(covers);
    const power = (k: number) => BigInt(N) ** BigInt(k);
    for (let k = 1; k <= r; k++) {
      const expected = k % 2 === 0 ? power(k - 1) : -power(k - 1);
      for (let f = rankOffsets[k]; f < rankOffsets[k + 1]; f++) expect(moebius[f]).toBe(expected);
    }
    // 129^8 is odd and above 2^56: no double holds it.
    expect(moebius[flatCount - 1]).toBe(-(129n ** 8n));
    // Above an element of rank j: itself, 129^i over all of rank j + i, and the top.
    const above = (j: number): bigint => {
      if (j === r) return 1n;
      let total = 1n + power(r - 1 - j);
      for (let i = 1; i <= r - 1 - j; i++) total += power(i);
      return total;
    };
    const expected = sizes.map((size, j) => BigInt(size) * above(j)).reverse();
    expect(faceCountsByMoebius({ ...covers, moebius })).toEqual(expected);
  });
});

describe('faces by Moebius values', () => {
  it('are the sums of |mu(X, Y)| by the definition', () => {
    fc.assert(
      fc.property(rowsOf(4, 8), (rows) => {
        const arrangement = arrangementOf(rows);
        expect(faceCountsByMoebius(listFlats(arrangement))).toEqual(slowFaceCounts(arrangement));
      }),
      { numRuns: 40 },
    );
  });

  it('have the Euler characteristic of R^r and do not change with the coordinates', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 4, maximum: 14 }), fc.nat(), (rows, seed) => {
        const counts = faceCountsByMoebius(listFlats(arrangementOf(rows)));
        const euler = counts.reduce((sum, f, k) => (k % 2 === 0 ? sum + f : sum - f), 0n);
        expect(euler).toBe(counts.length % 2 === 1 ? 1n : -1n);
        const changed = unimodularChange(shuffled(rows, seed), { seed, steps: 6, factor: 50 });
        expect(faceCountsByMoebius(listFlats(arrangementOf(changed)))).toEqual(counts);
      }),
      { numRuns: 30 },
    );
  });
});
