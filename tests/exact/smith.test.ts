// The Smith form against its definition: unimodular transforms, a chain of divisors, and the theorem
// that the first k divisors multiply to the gcd of all k-minors (H. J. S. Smith, 1861), the minors by
// slow expansion.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gcd } from '../../src/exact/integers.js';
import { elementaryDivisors, smithForm } from '../../src/exact/smith.js';
import { determinant, minorGcd } from '../support/minors.js';

type Matrix = readonly (readonly bigint[])[];

const small = fc.integer({ min: -6, max: 6 }).map(BigInt);
const large = fc.bigInt({ min: -(10n ** 25n), max: 10n ** 25n });

function matrices(entry: fc.Arbitrary<bigint>): fc.Arbitrary<bigint[][]> {
  return fc
    .tuple(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 4 }))
    .chain(([m, n]) =>
      fc.array(fc.array(entry, { minLength: n, maxLength: n }), { minLength: m, maxLength: m }),
    );
}

function multiply(a: Matrix, b: Matrix): bigint[][] {
  return a.map((row) => b[0].map((_, j) => row.reduce((sum, x, i) => sum + x * b[i][j], 0n)));
}

function check(matrix: Matrix): void {
  const { divisors, left, right } = smithForm(matrix);
  expect([1n, -1n]).toContain(determinant(left));
  expect([1n, -1n]).toContain(determinant(right));
  const expected = matrix.map((row, i) => row.map((_, j) => (i === j ? (divisors[i] ?? 0n) : 0n)));
  expect(multiply(multiply(left, matrix), right)).toEqual(expected);
  divisors.forEach((d, i) => {
    expect(d > 0n).toBe(true);
    if (i > 0) expect(d % divisors[i - 1]).toBe(0n);
  });
  let product = 1n;
  for (let k = 1; k <= Math.min(matrix.length, matrix[0].length); k++) {
    product *= divisors[k - 1] ?? 0n;
    expect(minorGcd(matrix, k)).toBe(product);
  }
  expect(elementaryDivisors(matrix)).toEqual(divisors);
}

describe('the Smith form', () => {
  it('is what it is defined to be, for small entries, singular ones among them', () => {
    fc.assert(fc.property(matrices(small), check), { numRuns: 100 });
  });

  it('is so for entries of 25 digits', () => {
    fc.assert(fc.property(matrices(large), check), { numRuns: 30 });
  });

  it('is so for matrices with a common factor and a dependent row', () => {
    fc.assert(
      fc.property(matrices(small), fc.integer({ min: 2, max: 9 }), (matrix, factor) => {
        const scaled = matrix.map((row) => row.map((x) => x * BigInt(factor)));
        check([...scaled, scaled.reduce((sum, row) => sum.map((x, i) => x + row[i]))]);
      }),
      { numRuns: 60 },
    );
  });

  it('has no divisor for a zero matrix', () => {
    expect(smithForm([[0n, 0n]])).toEqual({
      divisors: [],
      left: [[1n]],
      right: [
        [1n, 0n],
        [0n, 1n],
      ],
    });
  });

  it('keeps the transforms of a random 30 x 6 matrix small', () => {
    let state = 7;
    const next = (): bigint => {
      state = (Math.imul(state, 1103515245) + 12345) >>> 0;
      return BigInt((state >>> 16) % 9) - 4n;
    };
    const matrix = Array.from({ length: 30 }, () => Array.from({ length: 6 }, next));
    const { divisors, left, right } = smithForm(matrix);
    expect(divisors.reduce(gcd)).toBe(1n);
    expect(multiply(multiply(left, matrix), right).map((row, i) => row[i] ?? 0n)).toEqual(
      Array.from({ length: 30 }, (_, i) => divisors[i] ?? 0n),
    );
    const largest = [...left.flat(), ...right.flat()].reduce(
      (most, x) => (x > most ? x : -x > most ? -x : most),
      0n,
    );
    expect(largest < 10n ** 6n).toBe(true);
  });
});
