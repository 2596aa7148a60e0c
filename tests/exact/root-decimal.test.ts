// Decimals of square roots and of numbers of a quadratic field: bracketed exactly, and known digits.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactNumber, multiplyNumbers } from '../../src/exact/number.js';
import { compareNumbers, signOfNumber } from '../../src/exact/number-order.js';
import { decimalOf, squareRootDecimal } from '../../src/exact/root-decimal.js';

/** The decimal as a fraction, and the same with its last digit one higher. */
function bracket(text: string): [ReturnType<typeof exactNumber>, ReturnType<typeof exactNumber>] {
  const [mantissa, exponent = '0'] = text.split('e');
  const [whole, fraction = ''] = mantissa.split('.');
  const digits = `${whole}${fraction}`.replace(/^0+/, '');
  // The unit of the fifteenth significant digit is 10^unit.
  const unit = digits.length - 15 - fraction.length + Number(exponent);
  const value = BigInt(digits.padEnd(15, '0').slice(0, 15));
  const at = (n: bigint) =>
    unit < 0 ? exactNumber(n, 0n, 10n ** BigInt(-unit)) : exactNumber(n * 10n ** BigInt(unit));
  return [at(value), at(value + 1n)];
}

describe('square roots as decimals', () => {
  it.each([
    [exactNumber(2n), '1.41421356237309'],
    [exactNumber(9n, 0n, 4n), '1.5'],
    [exactNumber(0n), '0'],
    [exactNumber(10n ** 60n), '1e+30'],
    [exactNumber(1n, 0n, 10n ** 40n), '1e-20'],
    [exactNumber(10n ** 40n), '100000000000000000000'],
    [exactNumber(1n, 0n, 400n), '0.05'],
  ])('%o', (x, text) => {
    expect(squareRootDecimal(x, null)).toBe(text);
  });

  it('are cut off, never rounded up, over Q', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n, max: 10n ** 40n }),
        fc.bigInt({ min: 1n, max: 10n ** 20n }),
        (a, d) => {
          const x = exactNumber(a, 0n, d);
          const [low, high] = bracket(squareRootDecimal(x, null));
          expect(compareNumbers(multiplyNumbers(low, low, 0n), x, null)).toBeLessThanOrEqual(0);
          expect(compareNumbers(multiplyNumbers(high, high, 0n), x, null)).toBe(1);
        },
      ),
    );
  });

  it('are so for numbers of a quadratic field, nearly cancelling ones among them', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n }),
        fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n }),
        (a, b) => {
          const x = exactNumber(a, b, 7n);
          fc.pre(signOfNumber(x, 5n) > 0);
          const [low, high] = bracket(squareRootDecimal(x, 5n));
          expect(compareNumbers(multiplyNumbers(low, low, 5n), x, 5n)).toBeLessThanOrEqual(0);
          expect(compareNumbers(multiplyNumbers(high, high, 5n), x, 5n)).toBe(1);
          const [from, to] = bracket(decimalOf(x, 5n));
          expect(compareNumbers(from, x, 5n)).toBeLessThanOrEqual(0);
          expect(compareNumbers(to, x, 5n)).toBe(1);
        },
      ),
    );
    // 161 - 72 sqrt(5) = (sqrt(5) - 2)^4, about 0.0031; its root is 9 - 4 sqrt(5).
    expect(squareRootDecimal(exactNumber(161n, -72n), 5n)).toBe(
      decimalOf(exactNumber(9n, -4n), 5n),
    );
  });

  it('of negative numbers keep their sign', () => {
    expect(decimalOf(exactNumber(-1n, 0n, 3n), null)).toBe('-0.333333333333333');
    expect(decimalOf(exactNumber(2n, -1n), 5n)).toBe('-0.236067977499789');
  });
});
