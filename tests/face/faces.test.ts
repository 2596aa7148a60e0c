import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { SignText } from '../../src/bits/sign-text.js';
import { integerRing } from '../../src/exact/integers.js';
import { quadraticRing } from '../../src/exact/quadratic.js';
import { countFaces } from '../../src/face/faces.js';
import { buildFacePoset } from '../../src/face/poset.js';
import { slowCovectors } from '../support/circuits.js';
import { listOf, seededIntegers } from '../support/lists.js';

const smallRows = fc
  .integer({ min: 1, max: 4 })
  .chain((d) =>
    fc.array(fc.array(fc.integer({ min: -2, max: 2 }), { minLength: d, maxLength: d }), {
      minLength: 1,
      maxLength: 6,
    }),
  )
  .map((rows) => rows.filter((row) => row.some((x) => x !== 0)))
  .filter((rows) => rows.length > 0);

/** Faces as text with dimension, and covers as pairs of text. */
function describePoset(list: ReturnType<typeof listOf>) {
  const arrangement = buildArrangement(list);
  const poset = buildFacePoset(arrangement);
  const writer = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const W = poset.wordsPerRow;
  const texts: string[] = [];
  for (let f = 0; f < poset.faceCount; f++) {
    texts.push(writer.write(poset.positive, f * W, poset.flatZero, poset.flatOf[f] * W));
  }
  const covers: string[] = [];
  for (let f = 0; f < poset.faceCount; f++) {
    for (let i = poset.coverOffsets[f]; i < poset.coverOffsets[f + 1]; i++) {
      covers.push(`${texts[f]} < ${texts[poset.coverTargets[i]]}`);
    }
  }
  return { poset, texts, covers: covers.sort(), counts: countFaces(arrangement) };
}

/** Covers of the order "equal wherever the lower is not zero", with nothing in between. */
function slowCovers(words: readonly string[]): string[] {
  const below = (a: string, b: string) =>
    a !== b && [...a].every((sign, i) => sign === '0' || sign === b[i]);
  const out: string[] = [];
  for (const a of words) {
    const above = words.filter((b) => below(a, b));
    for (const b of above) {
      if (!above.some((c) => below(c, b))) out.push(`${a} < ${b}`);
    }
  }
  return out.sort();
}

describe('faces and their poset', () => {
  it('are the covectors and their covers, by the circuits', () => {
    fc.assert(
      fc.property(smallRows, (rows) => {
        const slow = slowCovectors(
          integerRing,
          rows.map((row) => row.map(BigInt)),
          '+-0',
        );
        const { poset, texts, covers, counts } = describePoset(listOf(rows));
        expect([...texts].sort()).toEqual(slow);
        expect(covers).toEqual(slowCovers(slow));
        expect(counts).toEqual(
          counts.map((_, k) => poset.dimensionOffsets[k + 1] - poset.dimensionOffsets[k]),
        );
        expect(counts.reduce((sum, x) => sum + x, 0)).toBe(slow.length);
      }),
      { seed: 5, numRuns: 80 },
    );
  });

  it('are the same over Q(sqrt(2))', () => {
    const next = seededIntegers(31);
    for (let trial = 0; trial < 8; trial++) {
      const d = next(2, 3);
      const rows = Array.from({ length: 5 }, () =>
        Array.from({ length: d }, () => [next(-2, 2), next(-1, 1)] as [number, number]),
      ).filter((row) => row.some(([a, b]) => a !== 0 || b !== 0));
      const elements = rows.map((row) => row.map(([a, b]) => ({ a: BigInt(a), b: BigInt(b) })));
      const slow = slowCovectors(quadraticRing(2n), elements, '+-0');
      const { texts, covers } = describePoset(listOf(rows, 2n));
      expect([...texts].sort()).toEqual(slow);
      expect(covers).toEqual(slowCovers(slow));
    }
  });

  it('satisfy the Euler relation with 25-digit entries', () => {
    const next = seededIntegers(77);
    const rows = Array.from({ length: 9 }, () =>
      Array.from(
        { length: 4 },
        () => BigInt(next(-999, 999)) * 10n ** 22n + BigInt(next(1, 10 ** 8)),
      ),
    );
    const counts = countFaces(buildArrangement(listOf(rows)));
    // Sum of (-1)^dim over all cones of a central arrangement is (-1)^rank: L. Euler's relation for
    // the zonotope, common practice.
    expect(counts.reduce((sum, x, k) => sum + (k % 2 === 0 ? x : -x), 0)).toBe(1);
  });
});
