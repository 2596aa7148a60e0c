import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  divideByLinear,
  evaluatePolynomial,
  formatFactors,
  formatFactorsLatex,
  formatPolynomial,
  formatPolynomialLatex,
  integerRoots,
  multiplyPolynomials,
} from '../../src/exact/polynomial.js';

const seed = { seed: 20240607, numRuns: 200 };
const coefficients = fc
  .array(fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }), { minLength: 1, maxLength: 7 })
  .map((p) => {
    while (p.length > 1 && p[p.length - 1] === 0n) p.pop();
    return p;
  });

/** Powers of a summed one by one: no Horner. */
function valueByPowers(p: readonly bigint[], a: bigint): bigint {
  return p.reduce((sum, c, k) => sum + c * a ** BigInt(k), 0n);
}

describe('arithmetic', () => {
  it('evaluates as the sum of powers', () => {
    fc.assert(
      fc.property(coefficients, fc.bigInt({ min: -50n, max: 50n }), (p, a) => {
        expect(evaluatePolynomial(p, a)).toBe(valueByPowers(p, a));
      }),
      seed,
    );
  });

  it('multiplies so that values multiply at more points than the degree', () => {
    fc.assert(
      fc.property(coefficients, coefficients, (p, q) => {
        const product = multiplyPolynomials(p, q);
        for (let a = -7n; a <= 7n; a++) {
          expect(valueByPowers(product, a)).toBe(valueByPowers(p, a) * valueByPowers(q, a));
        }
      }),
      seed,
    );
  });

  it('divides with the remainder p(a)', () => {
    fc.assert(
      fc.property(coefficients, fc.bigInt({ min: -9n, max: 9n }), (p, a) => {
        const { quotient, remainder } = divideByLinear(p, a);
        expect(remainder).toBe(valueByPowers(p, a));
        for (let x = -7n; x <= 7n; x++) {
          expect(valueByPowers(quotient, x) * (x - a) + remainder).toBe(valueByPowers(p, x));
        }
      }),
      seed,
    );
  });
});

describe('integer roots', () => {
  it('finds the roots a product was made of, zero and negative ones too', () => {
    const roots = fc.array(fc.integer({ min: -40, max: 40 }), { minLength: 1, maxLength: 7 });
    fc.assert(
      fc.property(roots, (list) => {
        const p = list.reduce<bigint[]>((q, a) => multiplyPolynomials(q, [BigInt(-a), 1n]), [1n]);
        const found = integerRoots(p)!.flatMap(({ root, multiplicity }) =>
          new Array<number>(multiplicity).fill(Number(root)),
        );
        expect(found).toEqual([...list].sort((a, b) => a - b));
      }),
      seed,
    );
  });

  it('says null when a root is not an integer', () => {
    expect(integerRoots([1n, 0n, 1n])).toBeNull(); // t^2 + 1
    expect(integerRoots([-2n, 0n, 1n])).toBeNull(); // t^2 - 2
    expect(integerRoots([-3n, 6n, -4n, 1n])).toBeNull(); // (t - 1)(t^2 - 3 t + 3)
    expect(integerRoots([0n, 1n, 1n, 1n])).toBeNull(); // t (t^2 + t + 1)
    expect(integerRoots([0n, 2n, 1n])).toEqual([
      { root: -2n, multiplicity: 1 },
      { root: 0n, multiplicity: 1 },
    ]);
    expect(integerRoots([1n])).toEqual([]);
  });

  it('wants a monic polynomial', () => {
    expect(() => integerRoots([1n, 2n])).toThrow('monic');
  });
});

describe('writing', () => {
  it('writes text and LaTeX', () => {
    const p = [-3n, 6n, -4n, 1n];
    expect(formatPolynomial(p)).toBe('t^3 - 4 t^2 + 6 t - 3');
    expect(formatPolynomialLatex(p)).toBe('t^{3} - 4 t^{2} + 6 t - 3');
    expect(formatPolynomial([0n])).toBe('0');
    expect(formatPolynomial([0n, -1n, 0n, -1n])).toBe('-t^3 - t');
    expect(formatPolynomial([5n])).toBe('5');
    const long = [1n, 10n ** 40n, -1n, 1n];
    expect(formatPolynomialLatex(long)).toBe(`t^{3} - t^{2} + 1${'0'.repeat(40)} t + 1`);
  });

  it('writes factors', () => {
    const roots = [
      { root: -2n, multiplicity: 1 },
      { root: 0n, multiplicity: 3 },
      { root: 1n, multiplicity: 12 },
    ];
    expect(formatFactors(roots)).toBe('(t + 2) t^3 (t - 1)^12');
    expect(formatFactorsLatex(roots)).toBe('(t + 2) t^{3} (t - 1)^{12}');
    expect(formatFactors([])).toBe('1');
  });
});
