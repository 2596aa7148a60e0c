import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { SignText } from '../../src/bits/sign-text.js';
import { integerRing } from '../../src/exact/integers.js';
import { quadraticRing } from '../../src/exact/quadratic.js';
import { listRegions, regionCount } from '../../src/region/regions.js';
import { slowCovectors } from '../support/circuits.js';
import { listOf, seededIntegers } from '../support/lists.js';

function texts(list: ReturnType<typeof listOf>): string[] {
  const arrangement = buildArrangement(list);
  const { half } = listRegions(arrangement);
  const writer = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const W = half.wordsPerRow;
  const out: string[] = [];
  for (let i = 0; i < half.rows; i++) {
    const text = writer.write(half.words, i * W);
    out.push(
      text,
      text.replace(/[+-]/g, (s) => (s === '+' ? '-' : '+')),
    );
  }
  return out.sort();
}

const smallRows = fc
  .integer({ min: 1, max: 4 })
  .chain((d) =>
    fc.array(fc.array(fc.integer({ min: -2, max: 2 }), { minLength: d, maxLength: d }), {
      minLength: 1,
      maxLength: 7,
    }),
  )
  .map((rows) => rows.filter((row) => row.some((x) => x !== 0)))
  .filter((rows) => rows.length > 0);

describe('listRegions', () => {
  it('lists exactly the sign vectors orthogonal to every circuit', () => {
    fc.assert(
      fc.property(smallRows, (rows) => {
        const big = rows.map((row) => row.map(BigInt));
        expect(texts(listOf(rows))).toEqual(slowCovectors(integerRing, big, '+-'));
      }),
      { seed: 3, numRuns: 120 },
    );
  });

  it('does the same over Q(sqrt(5)), where only the ring computes', () => {
    const next = seededIntegers(9);
    for (let trial = 0; trial < 12; trial++) {
      const d = next(2, 4);
      const rows = Array.from({ length: next(2, 6) }, () =>
        Array.from({ length: d }, () => [next(-2, 2), next(-1, 1)] as [number, number]),
      ).filter((row) => row.some(([a, b]) => a !== 0 || b !== 0));
      if (rows.length === 0) continue;
      const elements = rows.map((row) => row.map(([a, b]) => ({ a: BigInt(a), b: BigInt(b) })));
      expect(texts(listOf(rows, 5n))).toEqual(slowCovectors(quadraticRing(5n), elements, '+-'));
    }
  });

  it('does not depend on the size of entries: shears with 25-digit factors change no sign vector', () => {
    const next = seededIntegers(21);
    const huge = 10n ** 25n + 9n;
    for (let trial = 0; trial < 15; trial++) {
      const d = next(2, 5);
      const rows = Array.from({ length: 8 }, () =>
        Array.from({ length: d }, () => next(-3, 3)),
      ).filter((row) => row.some((x) => x !== 0));
      const sheared = rows.map((row) => {
        const out = row.map(BigInt);
        for (let j = 1; j < d; j++) out[j] += huge * out[j - 1];
        return out;
      });
      expect(texts(listOf(sheared))).toEqual(texts(listOf(rows)));
    }
  });

  it('tells two normals apart that differ in the last of 25 digits', () => {
    const x = 1234567890123456789012345n;
    const rows = [
      [1n, 0n, 0n],
      [0n, 1n, 0n],
      [0n, 0n, 1n],
      [x, x + 1n, 1n],
      [x, x + 2n, 1n],
      [x + 1n, x + 2n, 1n],
    ];
    expect(texts(listOf(rows))).toEqual(slowCovectors(integerRing, rows, '+-'));
  });

  it('counts hundreds of parallel copies as one hyperplane', () => {
    const rows = Array.from({ length: 400 }, (_, i) => (i % 2 === 0 ? [i + 1, 0, 0] : [0, -i, i]));
    rows.push([1, 1, 1]);
    expect(regionCount(listRegions(buildArrangement(listOf(rows))))).toBe(8);
  });
});
