// Counts where the arithmetic changes its ways: entries and minors on both sides of the bounds up to
// which plain numbers serve, normals that differ in the last digit, crossings that are equal as
// doubles and not in truth, structure hidden behind large coordinates, numbers a + b sqrt(k) that
// almost vanish, and rows of one word, two and more. Every count is had in ways that share no code.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bitAt } from '../../src/bits/signs.js';
import { evaluatePolynomial } from '../../src/exact/polynomial.js';
import { countFaces } from '../../src/face/faces.js';
import { characteristicPolynomialByDeletion } from '../../src/flat/by-deletion.js';
import { characteristicPolynomialByFlats } from '../../src/flat/by-flats.js';
import { faceCountsByMoebius } from '../../src/flat/by-moebius.js';
import { listFlats } from '../../src/flat/lattice.js';
import { residueFieldFor } from '../../src/flat/residue-field.js';
import { InteriorPoints } from '../../src/region/interior.js';
import { listRegions } from '../../src/region/regions.js';
import { WallFinder } from '../../src/region/walls.js';
import { allSubsets, arrangementOf, type Entry, sequence, typeA } from '../support/arrangements.js';
import { shuffled, unimodularChange } from '../support/coordinates.js';

/** Holds every count against every other; returns the number of regions. */
function agreedRegions(rows: readonly (readonly Entry[])[], radicand?: bigint): number {
  const arrangement = arrangementOf(rows, radicand === undefined ? {} : { radicand });
  const { rank, ring, hyperplanes } = arrangement;
  const polynomial = characteristicPolynomialByDeletion(arrangement);
  const lattice = listFlats(arrangement);
  expect(characteristicPolynomialByFlats(lattice)).toEqual(polynomial);
  expect(characteristicPolynomialByDeletion(arrangement, { arithmetic: 'residues' })).toEqual(
    polynomial,
  );
  const table = listRegions(arrangement);
  const { rows: half, words, wordsPerRow: W } = table.half;
  // T. Zaslavsky, 1975, Facing up to Arrangements: |chi(-1)| regions.
  const regions = evaluatePolynomial(polynomial, -1n);
  expect(BigInt(2 * half)).toBe(regions < 0n ? -regions : regions);
  const faces = countFaces(arrangement);
  expect(faces.map(BigInt)).toEqual(faceCountsByMoebius(lattice));
  const finder = new WallFinder(table);
  const points = new InteriorPoints(arrangement);
  const seen = new Set<string>();
  let walls = 0;
  for (let i = 0; i < half; i++) {
    seen.add(words.subarray(i * W, (i + 1) * W).join());
    walls += finder.wallCount(i);
    // A region that is not there would have no point.
    if (i % Math.ceil(half / 8) !== 0) continue;
    const point = points.pointOf(words, i * W, null).map((x) => ring.fromInteger(x));
    const signs = hyperplanes.map(({ normal }) =>
      ring.sign(normal.reduce((sum, x, j) => ring.add(sum, ring.multiply(x, point[j])), ring.zero)),
    );
    expect(signs).toEqual(hyperplanes.map((_, h) => (bitAt(words, i * W, h) === 1 ? 1 : -1)));
  }
  expect(seen.size).toBe(half);
  // Every facet is a wall of two regions, and half of the regions are listed.
  expect(walls).toBe(faces[rank - 1]);
  return 2 * half;
}

const bits = fc.constantFrom(12, 13, 20, 25, 26, 27, 40, 41, 52, 53, 54, 70);

/** Entries at most four from +-2^b, or 0, 1, 2, or anything below 2^b. */
function entriesAt(b: number): fc.Arbitrary<bigint> {
  const top = 1n << BigInt(b);
  const size = fc.oneof(fc.bigInt(top - 3n, top), fc.bigInt(0n, 2n), fc.bigInt(0n, top));
  return fc.tuple(size, fc.boolean()).map(([x, negative]) => (negative ? -x : x));
}

function rowsOf<T>(entry: fc.Arbitrary<T>, d: number, n: number): fc.Arbitrary<T[][]> {
  const row = fc.array(entry, { minLength: d, maxLength: d });
  return fc.array(row, { minLength: n, maxLength: n });
}

const withoutZeros = (rows: bigint[][]): bigint[][] =>
  rows.filter((row) => row.some((x) => x !== 0n));

const shapes = fc.constantFrom([2, 9], [3, 9], [4, 7], [5, 7]);

describe('counts at the bounds of plain arithmetic', () => {
  it('entries just below and above each bound', () => {
    const cases = fc
      .tuple(shapes, bits)
      .chain(([[d, n], b]) => rowsOf(entriesAt(b), d, n))
      .map(withoutZeros)
      .filter((rows) => rows.length > 0);
    fc.assert(
      fc.property(cases, (rows) => agreedRegions(rows) > 0),
      { numRuns: 80 },
    );
  });

  it('normals that differ from parallel ones in the last digit only', () => {
    const nudge = fc.bigInt(-1n, 1n);
    const cases = fc.tuple(shapes, bits).chain(([[d, n], b]) =>
      fc
        .tuple(rowsOf(entriesAt(b), d, 2), rowsOf(nudge, d, n), rowsOf(fc.bigInt(1n, 3n), 1, n))
        .map(([bases, nudges, factors]) =>
          withoutZeros(
            nudges.map((row, i) => row.map((x, j) => factors[i][0] * bases[i % 2][j] + x)),
          ),
        )
        .filter((rows) => rows.length > 0),
    );
    fc.assert(
      fc.property(cases, (rows) => agreedRegions(rows) > 0),
      { numRuns: 80 },
    );
  });

  it('planes through few common points, and planes that just miss them', () => {
    // A normal orthogonal to p from two coordinates of p: the planes through p meet there exactly.
    const random = sequence(77);
    for (let trial = 0; trial < 40; trial++) {
      const d = 3 + random(3);
      const size = 2 ** (2 + random(43));
      const points = Array.from({ length: 3 }, () => Array.from({ length: d }, () => random(size)));
      const rows = Array.from({ length: [16, 10, 8][d - 3] }, () => {
        const p = points[random(3)].map(BigInt);
        const row = new Array<bigint>(d).fill(0n);
        for (let t = 0; t < d - 1; t++) {
          const i = random(d);
          const j = (i + 1 + random(d - 1)) % d;
          const c = BigInt(random(2000) - 1000);
          row[i] += c * p[j];
          row[j] -= c * p[i];
        }
        if (random(8) === 0) row[random(d)] += 1n;
        return row;
      });
      agreedRegions(withoutZeros([...rows, new Array<bigint>(d).fill(1n)]));
    }
  });

  it('structure behind large coordinates', () => {
    // (n + 1)! regions of A_n; 370 of the 0/1 vectors in R^4 (OEIS A034997, from memory).
    const known: [number[][], number][] = [
      [typeA(3), 24],
      [typeA(5), 720],
      [allSubsets(4), 370],
    ];
    for (const [rows, regions] of known) {
      for (const factor of [3, 1000, 2 ** 14, 2 ** 30]) {
        for (const seed of [5, 6]) {
          const changed = unimodularChange(rows, { seed, steps: 5, factor });
          expect(agreedRegions(shuffled(changed, seed))).toBe(regions);
        }
      }
    }
  });

  it('numbers a + b sqrt(k) that almost vanish though a and b are large', () => {
    // Powers of a unit below 1: |a + b sqrt(k)| falls while a and b grow.
    const units: [bigint, bigint, bigint][] = [
      [2n, 1n, -1n],
      [3n, 2n, -1n],
      [5n, 2n, -1n],
    ];
    const random = sequence(78);
    for (let trial = 0; trial < 40; trial++) {
      const [k, u, v] = units[trial % 3];
      const power = (e: number): [bigint, bigint] => {
        let [a, b] = [1n, 0n];
        for (let i = 0; i < e; i++) [a, b] = [a * u + k * b * v, a * v + b * u];
        return [a, b];
      };
      const d = 2 + random(3);
      const base = Array.from({ length: d }, () => BigInt(random(5) - 2));
      const rows = Array.from({ length: 7 }, (): [bigint, bigint][] => {
        const [a, b] = power(random(40));
        return base.map((x) => {
          const [p, q] = power(random(60));
          const y = BigInt(random(3) - 1);
          return [x * a + y * p, x * b + y * q];
        });
      }).filter((row) => row.some(([a, b]) => a !== 0n || b !== 0n));
      if (rows.length > 0) agreedRegions(rows, k);
    }
  });

  it.each([31, 32, 33, 63, 64, 65, 96, 97])('%i hyperplanes, in rank 3', (n) => {
    // Pairwise different points of the moment curve are in general position: n^2 - n + 2 regions.
    const rows = Array.from({ length: n }, (_, i) => [1, i - 40, (i - 40) ** 2]);
    for (const factor of [1, 2 ** 20]) {
      const changed = unimodularChange(rows, { seed: n, steps: 4, factor });
      expect(agreedRegions(shuffled(changed, n))).toBe(n * n - n + 2);
    }
  });
});

describe('regressions', () => {
  it('deletion took two normals with parts past the range of doubles for parallel', () => {
    // They agree modulo the prime, and the bound that was to prove them equal was not a number.
    const N = BigInt(residueFieldFor(2n, 0).p) * 10n ** 330n;
    const unit = (i: number): number[] => [0, 1, 2, 3].map((j) => (i === j ? 1 : 0));
    const huge: Entry[] = [1n, 2n, 3n, 4n].map((c) => [1n + c * N, (c + 1n) * N] as const);
    const rows = [unit(0), unit(1), unit(2), unit(3), [1, 1, 1, 1], huge];
    expect(agreedRegions(rows, 2n)).toBe(52);
  });

  it('a thin region had its point shrunk one unit at a time, for hours', () => {
    const rows = [
      [-407861334029n, -3n, -88596393114n],
      [1n, 32452220381n, 3n],
      [4940349122117186n, -4517936961269779n, 8201687692393171n],
      [1n, 165986n, 637997n],
      [-444566883n, 1n, 314094569n],
      [-335443615036334n, -3n, 1n],
      [3n, -1044899568726n, 3n],
      [623784849266n, 955683956136n, -3n],
      [-18403658484352458n, -28807345012041372n, 1n],
      [0n, 5954163730n, 0n],
    ];
    const arrangement = arrangementOf(rows);
    const table = listRegions(arrangement);
    const finder = new WallFinder(table);
    const points = new InteriorPoints(arrangement);
    for (let i = 0; i < table.half.rows; i++) {
      const point = points.pointOf(table.half.words, i, finder.wallsOf(i));
      const word = arrangement.hyperplanes.reduce((bitsSoFar, { normal }, h) => {
        const value = normal.reduce<bigint>((sum, x, j) => sum + (x as bigint) * point[j], 0n);
        return value > 0n ? bitsSoFar | (1 << h) : bitsSoFar;
      }, 0);
      expect(word).toBe(table.half.words[i]);
    }
  });
});
