// Faces of the zonotope against the face poset: a face of the arrangement of dimension k stands for a
// face of dimension rank - k, and the order is reversed (P. McMullen, 1971, On zonotopes). Facets are
// counted by a convex hull package besides.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { addNumbers, type ExactNumber } from '../../src/exact/number.js';
import { buildFacePoset, type FacePoset } from '../../src/face/poset.js';
import { ZonotopeVertices, zonotopeFaceCounts } from '../../src/zonotope/vertices.js';
import { allSubsets, arrangementOf, sequence, smallRows } from '../support/arrangements.js';
import { hullFacets } from '../support/convex-hull.js';

/** Rank of rows of small integers, by exact elimination. */
function rankOf(rows: readonly number[][]): number {
  const left = rows.map((row) => row.map(BigInt));
  let rank = 0;
  for (let column = 0; column < (rows[0]?.length ?? 0); column++) {
    const at = left.findIndex((row, i) => i >= rank && row[column] !== 0n);
    if (at < 0) continue;
    [left[rank], left[at]] = [left[at], left[rank]];
    const pivot = left[rank];
    for (let i = rank + 1; i < left.length; i++) {
      const factor = left[i][column];
      left[i] = left[i].map((x, j) => x * pivot[column] - factor * pivot[j]);
    }
    rank++;
  }
  return rank;
}

function facesOf(arrangement: Arrangement, poset: FacePoset) {
  const vertices = new ZonotopeVertices(arrangement);
  const W = poset.wordsPerRow;
  return Array.from({ length: poset.faceCount }, (_, f) =>
    vertices.faceOf(poset.positive, f * W, poset.flatZero, poset.flatOf[f] * W),
  );
}

/** The sum of `base` and chosen generators. */
function plus(base: readonly ExactNumber[], rows: readonly number[][], chosen: number[]): string {
  const sum = chosen.reduce<readonly ExactNumber[]>(
    (total, i) => total.map((x, j) => addNumbers(x, { a: BigInt(rows[i][j]), b: 0n, d: 1n })),
    base,
  );
  return sum.map((x) => x.a).join(' ');
}

describe('faces of the zonotope', () => {
  it('have the dimension of their free generators, and lie in each other in reversed order', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          smallRows({ dimension: 2, maximum: 5 }),
          smallRows({ dimension: 3, maximum: 6 }),
          smallRows({ dimension: 4, maximum: 5, bound: 1 }),
        ),
        (rows) => {
          const arrangement = arrangementOf(rows);
          const poset = buildFacePoset(arrangement);
          const faces = facesOf(arrangement, poset);
          for (let f = 0; f < poset.faceCount; f++) {
            const { free } = faces[f];
            expect(rankOf(free.map((i) => rows[i]))).toBe(
              poset.rank - poset.flatDimension[poset.flatOf[f]],
            );
            for (let c = poset.coverOffsets[f]; c < poset.coverOffsets[f + 1]; c++) {
              const upper = faces[poset.coverTargets[c]];
              const fixed = free.filter((i) => !upper.free.includes(i));
              expect(upper.free.every((i) => free.includes(i))).toBe(true);
              // Fixing each of the others at one of its ends leads from one face to the other.
              const ways = Array.from({ length: 2 ** fixed.length }, (_, bits) =>
                plus(
                  faces[f].base,
                  rows,
                  fixed.filter((_, k) => ((bits >> k) & 1) === 1),
                ),
              );
              expect(ways).toContain(plus(upper.base, rows, []));
            }
          }
        },
      ),
      { numRuns: 30 },
    );
  });

  it('are as many facets as the convex hull of all sums has', () => {
    const next = sequence(21);
    const inputs = [allSubsets(3)];
    for (let n = 4; n <= 7; n++) {
      inputs.push(Array.from({ length: n }, () => [next(7) - 3, next(7) - 3, next(7) - 3]));
    }
    for (const input of inputs) {
      const rows = input.filter((row) => row.some((x) => x !== 0));
      const arrangement = arrangementOf(rows);
      expect(arrangement.rank).toBe(3);
      const sums = new Map<string, number[]>();
      for (let bits = 0; bits < 2 ** rows.length; bits++) {
        const sum = rows.reduce(
          (total, row, i) => (((bits >> i) & 1) === 1 ? total.map((x, j) => x + row[j]) : total),
          [0, 0, 0],
        );
        sums.set(sum.join(' '), sum);
      }
      const { dimensionOffsets } = buildFacePoset(arrangement);
      const counts = zonotopeFaceCounts(
        [0, 1, 2, 3].map((k) => dimensionOffsets[k + 1] - dimensionOffsets[k]),
      );
      expect(counts[2]).toBe(hullFacets([...sums.values()]));
      expect(counts[0] - counts[1] + counts[2]).toBe(2);
    }
  });
});
