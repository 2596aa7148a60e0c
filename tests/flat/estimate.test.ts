import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { multiplyPolynomials } from '../../src/exact/polynomial.js';
import { estimateDeletion, estimateFlats } from '../../src/flat/estimate.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { allSubsets, arrangementOf } from '../support/arrangements.js';

function within(factor: number, estimate: number, truth: number): void {
  expect(estimate).toBeGreaterThan(truth / factor);
  expect(estimate).toBeLessThan(truth * factor);
}

/** |coefficient of t^3| of the product of (t - exponent). */
function thirdCoefficient(exponents: number[]): number {
  const chi = exponents.reduce<bigint[]>((p, e) => multiplyPolynomials(p, [BigInt(-e), 1n]), [1n]);
  return Math.abs(Number(chi[3]));
}

describe('estimates', () => {
  // Exponents: J. Humphreys, 1990, Reflection Groups and Coxeter Groups, section 3.20.
  // Flats: P. Orlik, L. Solomon, 1983, Coxeter arrangements (totals also computed independently).
  it.each([
    ['B4', [1, 3, 5, 7], 116],
    ['E6', [1, 4, 5, 7, 8, 11], 4598],
    ['E7', [1, 5, 7, 9, 11, 13, 17], 90_408],
    ['E8', [1, 7, 11, 13, 17, 19, 23, 29], 5_506_504],
    ['H4', [1, 11, 19, 29], 2104],
  ])('come within a factor of 1.5 for %s', (type, exponents, flats) => {
    const arrangement = buildArrangement(reflectionArrangement(type));
    within(1.5, estimateDeletion(arrangement).bases, thirdCoefficient(exponents));
    within(1.5, estimateFlats(arrangement).flats, flats);
  });

  it('come within a factor of 1.5 for all 0/1 vectors in R^6', () => {
    const arrangement = arrangementOf(allSubsets(6));
    within(1.5, estimateDeletion(arrangement).bases, 22_435);
    within(1.5, estimateFlats(arrangement).flats, 1 + 63 + 1351 + 11445 + 35525 + 28875 + 1);
  });

  it('are right for normals in general position', () => {
    const rows = Array.from({ length: 30 }, (_, i) => [1, i, i * i, i ** 3, i ** 4]);
    const arrangement = arrangementOf(rows);
    within(1.05, estimateDeletion(arrangement).bases, 435);
    within(1.05, estimateFlats(arrangement).flats, 1 + 30 + 435 + 4060 + 27405 + 1);
  });

  it('work in every low rank', () => {
    const lines = Array.from({ length: 9 }, (_, i) => [1, i]);
    const planes = lines.map(([a, b]) => [a, b, b * b]);
    const cases: [Arrangement, number, number][] = [
      [arrangementOf([[5]]), 0, 2],
      [arrangementOf(lines), 0, 11],
      [arrangementOf(planes), 1, 1 + 9 + 36 + 1],
    ];
    for (const [arrangement, bases, flats] of cases) {
      expect(estimateDeletion(arrangement).bases).toBe(bases);
      expect(estimateFlats(arrangement).flats).toBe(flats);
    }
  });

  it('are the same every time, and grow with the arrangement', () => {
    const small = arrangementOf(allSubsets(5));
    const large = arrangementOf(allSubsets(7));
    expect(estimateFlats(small)).toEqual(estimateFlats(small));
    expect(estimateDeletion(small)).toEqual(estimateDeletion(small));
    expect(estimateFlats(large).bytes).toBeGreaterThan(100 * estimateFlats(small).bytes);
    expect(estimateDeletion(large).seconds).toBeGreaterThan(estimateDeletion(small).seconds);
  });

  it('know that large numbers are slower', () => {
    const rows = (scale: bigint) =>
      allSubsets(5).map((row, i) => row.map((x, j) => BigInt(x) + (scale - 1n) * BigInt(i * j)));
    const small = arrangementOf(rows(1n));
    const large = arrangementOf(rows(10n ** 20n));
    const perFlat = ({ seconds, flats }: { seconds: number; flats: number }) => seconds / flats;
    expect(perFlat(estimateFlats(large))).toBeGreaterThan(5 * perFlat(estimateFlats(small)));
  });
});
