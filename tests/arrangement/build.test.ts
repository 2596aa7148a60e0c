import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { findPivots } from '../../src/exact/elimination.js';
import { integerRing } from '../../src/exact/integers.js';
import type { Quadratic } from '../../src/exact/quadratic.js';
import { listOf } from '../support/lists.js';

const times = (rows: readonly (readonly bigint[])[], matrix: readonly (readonly bigint[])[]) =>
  rows.map((row) => matrix[0].map((_, j) => row.reduce((s, x, i) => s + x * matrix[i][j], 0n)));

/** gcd of all r x r minors of an r x d matrix, by cofactors: slow and obvious. */
function minorGcd(rows: readonly (readonly bigint[])[]): bigint {
  const minor = (columns: number[]): bigint => {
    const det = (m: bigint[][]): bigint =>
      m.length === 0
        ? 1n
        : m[0].reduce(
            (s, x, j) =>
              s + (j % 2 ? -x : x) * det(m.slice(1).map((row) => row.filter((_, c) => c !== j))),
            0n,
          );
    return det(rows.map((row) => columns.map((c) => row[c])));
  };
  const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? (a < 0n ? -a : a) : gcd(b, a % b));
  let total = 0n;
  const choose = (from: number, chosen: number[]): void => {
    if (chosen.length === rows.length) total = gcd(total, minor(chosen));
    else for (let c = from; c < rows[0].length; c++) choose(c + 1, [...chosen, c]);
  };
  choose(0, []);
  return total;
}

describe('buildArrangement', () => {
  it('groups parallel and opposite normals and keeps their scales', () => {
    const a = buildArrangement(
      listOf([
        [2, -4],
        [0, 3],
        [-1, 2],
        [5, -10],
      ]),
    ) as Arrangement<bigint>;
    expect(a.hyperplanes.map((h) => h.members)).toEqual([[0, 2, 3], [1]]);
    expect(a.hyperplanes[0].normal).toEqual([1n, -2n]);
    expect([...a.orientationOf]).toEqual([1, 1, -1, 1]);
    expect(a.factorOf.map((f) => f.a)).toEqual([2n, 3n, 1n, 5n]);
  });

  it('sees that 1 + sqrt(5) times a normal is parallel to it', () => {
    const a = buildArrangement(
      listOf(
        [
          [[1, 1], 2],
          [
            [6, 2],
            [2, 2],
          ],
          [[1, -1], 2],
        ],
        5n,
      ),
    ) as Arrangement<Quadratic>;
    expect([...a.hyperplaneOf]).toEqual([0, 0, 1]);
    expect(a.factorOf[1]).toEqual({ a: 1n, b: 1n, d: 1n });
  });

  it('gives lattice coordinates: the span basis is saturated, normals and lifts agree with it', () => {
    const matrix = fc
      .integer({ min: 1, max: 5 })
      .chain((d) =>
        fc.array(fc.array(fc.integer({ min: -6, max: 6 }), { minLength: d, maxLength: d }), {
          minLength: 1,
          maxLength: 5,
        }),
      )
      .map((rows) => rows.filter((row) => row.some((x) => x !== 0)))
      .filter((rows) => rows.length > 0);
    fc.assert(
      fc.property(matrix, (rows) => {
        const a = buildArrangement(listOf(rows)) as Arrangement<bigint>;
        expect(a.rank).toBe(
          findPivots(
            integerRing,
            rows.map((row) => row.map(BigInt)),
          ).rows.length,
        );
        expect(minorGcd(a.spanBasis)).toBe(1n);
        const identity = a.spanBasis.map((_, i) => a.spanBasis.map((_, j) => (i === j ? 1n : 0n)));
        expect(times(a.spanBasis, a.lift)).toEqual(identity);
        for (const h of a.hyperplanes) {
          expect(times([h.essential], a.spanBasis)).toEqual([h.normal]);
          expect(times([h.normal], a.lift)).toEqual([h.essential]);
        }
      }),
      { seed: 11, numRuns: 300 },
    );
  });
});
