// Random generator lists with ranges, and every sum of chosen ends, for tests of the zonotope.
import fc from 'fast-check';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import {
  addNumbers,
  type ExactNumber,
  exactNumber,
  exactZero,
  multiplyNumbers,
} from '../../src/exact/number.js';
import type { Range } from '../../src/input/generators.js';
import { arrangementOf, smallRows } from '../support/arrangements.js';

export interface RangedRows {
  readonly rows: number[][];
  readonly ranges: Range[];
}

/** Rows with low ends in whole, half or third steps, and lengths 1 or 2: segments are lattice vectors. */
export function rangedRows(options: {
  dimension: number;
  maximum: number;
  bound: number;
  denominator: number;
}): fc.Arbitrary<RangedRows> {
  const range = fc
    .tuple(fc.integer({ min: -3, max: 3 }), fc.integer({ min: 1, max: 2 }))
    .map(([low, length]) => {
      const from = exactNumber(BigInt(low), 0n, BigInt(options.denominator));
      return { low: from, high: addNumbers(from, exactNumber(BigInt(length))) };
    });
  return smallRows(options).chain((rows) =>
    fc
      .array(range, { minLength: rows.length, maxLength: rows.length })
      .map((ranges) => ({ rows, ranges })),
  );
}

export function rangedArrangement({ rows, ranges }: RangedRows): Arrangement<bigint> {
  return arrangementOf(rows, { ranges }) as Arrangement<bigint>;
}

/** Every sum of one chosen end for each generator, by the definition of the zonotope. */
export function sumsOfEnds(arrangement: Arrangement): ExactNumber[][] {
  const { normals, ranges } = arrangement.generators;
  let sums: ExactNumber[][] = [normals[0].map(() => exactZero)];
  normals.forEach((normal, j) => {
    const ends = [ranges?.[j].low ?? exactZero, ranges?.[j].high ?? exactNumber(1n)];
    sums = sums.flatMap((sum) =>
      ends.map((t) => sum.map((x, i) => addNumbers(x, multiplyNumbers(t, normal[i], 0n)))),
    );
  });
  return sums;
}
