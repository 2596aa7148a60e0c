// Points in and out of the zonotope, against its facets: in space their normals are cross products of
// two generators (H. Coxeter, 1948, Regular Polytopes, 2.8), so trying all of them decides.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type ExactNumber, exactNumber } from '../../src/exact/number.js';
import { ZonotopeMembership } from '../../src/zonotope/membership.js';
import { arrangementOf, smallRows } from '../support/arrangements.js';

/** Greatest value of direction . x on the zonotope of integer rows with ranges 0..1. */
function support(rows: readonly number[][], direction: readonly bigint[]): bigint {
  let sum = 0n;
  for (const row of rows) {
    const value = row.reduce((total, x, j) => total + BigInt(x) * direction[j], 0n);
    if (value > 0n) sum += value;
  }
  return sum;
}

const product = (a: readonly bigint[], b: readonly bigint[]): bigint =>
  a.reduce((sum, x, j) => sum + x * b[j], 0n);

/** Normals of facets in up to three dimensions: all cross products of pairs, both ways. */
function facetNormals(rows: readonly number[][]): bigint[][] {
  const normals: bigint[][] = [];
  for (const u of rows) {
    for (const v of rows) {
      const [a, b, c] = u.map(BigInt);
      const [x, y, z] = v.map(BigInt);
      normals.push([b * z - c * y, c * x - a * z, a * y - b * x]);
    }
  }
  return normals;
}

const integers = (v: readonly ExactNumber[]): bigint[] => v.map((x) => x.a);

describe('membership in the zonotope', () => {
  it('is decided as the facets decide it, with a direction for each point outside', () => {
    let inside = 0;
    let outside = 0;
    fc.assert(
      fc.property(
        smallRows({ dimension: 3, maximum: 6 }),
        fc.array(fc.tuple(...[0, 1, 2].map(() => fc.integer({ min: -4, max: 8 }))), {
          minLength: 4,
          maxLength: 4,
        }),
        (rows, targets) => {
          const arrangement = arrangementOf(rows);
          fc.pre(arrangement.rank === 3);
          const membership = new ZonotopeMembership(arrangement);
          for (const target of targets) {
            const point = target.map(BigInt);
            const halves = membership.beyond(point.map((x) => exactNumber(x, 0n, 2n)));
            const beyondFacet = facetNormals(rows).some(
              (normal) => product(normal, point) > 2n * support(rows, normal),
            );
            expect(halves !== null).toBe(beyondFacet);
            if (halves === null) inside++;
            else {
              outside++;
              const g = integers(halves);
              expect(product(g, point) > 2n * support(rows, g)).toBe(true);
            }
          }
        },
      ),
      { numRuns: 100 },
    );
    expect(Math.min(inside, outside)).toBeGreaterThan(60);
  });

  it('refuses points off the span, by a direction in which the zonotope is flat', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 4, maximum: 3, bound: 2 }),
        fc.array(fc.integer({ min: -3, max: 3 }), { minLength: 4, maxLength: 4 }),
        fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 3, maxLength: 3 }),
        (rows, target, thirds) => {
          const membership = new ZonotopeMembership(arrangementOf(rows));
          const direction = membership.beyond(target.map((x) => exactNumber(BigInt(x))));
          if (direction !== null) {
            const g = integers(direction);
            expect(product(g, target.map(BigInt)) > support(rows, g)).toBe(true);
          }
          // A sum of parts of the generators is inside by definition.
          const sum = rows[0].map((_, j) =>
            rows.reduce((total, row, i) => total + row[j] * thirds[i % 3], 0),
          );
          expect(membership.beyond(sum.map((x) => exactNumber(BigInt(x), 0n, 3n)))).toBeNull();
        },
      ),
    );
  });

  it('takes ranges and a golden field', () => {
    const half = exactNumber(1n, 0n, 2n);
    const ranges = [
      { low: exactNumber(-1n), high: half },
      { low: exactNumber(0n), high: exactNumber(0n, 1n) },
    ];
    const box = new ZonotopeMembership(
      arrangementOf(
        [
          [1, 0],
          [[0, 1], 1],
        ],
        { ranges },
      ),
    );
    // Corners of the parallelogram: -u, u/2, and sqrt(5) v = (5, sqrt(5)) added.
    expect(box.beyond([exactNumber(9n, 0n, 2n), exactNumber(0n, 1n)])).toBeNull();
    expect(box.beyond([exactNumber(11n, 0n, 2n), exactNumber(0n, 1n)])).toBeNull();
    expect(box.beyond([exactNumber(56n, 0n, 10n), exactNumber(0n, 1n)])).not.toBeNull();
    expect(box.beyond([exactNumber(4n), exactNumber(2237n, 0n, 1000n)])).not.toBeNull();
  });
});
