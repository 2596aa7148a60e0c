// Numbers read exactly: against values worked by hand, and against plain rational arithmetic.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactNumber, formatNumber } from '../../src/exact/number.js';
import { NumberFault, parseNumber } from '../../src/input/number-text.js';
import { splitSquare } from '../../src/input/square-free.js';

function faultOf(text: string): NumberFault {
  try {
    parseNumber(text);
  } catch (fault) {
    if (fault instanceof NumberFault) return fault;
    throw fault;
  }
  throw new Error(`${text} was read`);
}

const text = (written: string) => {
  const { value, radicand } = parseNumber(written);
  return formatNumber(value, radicand);
};

describe('numbers as written', () => {
  it.each([
    ['0', '0'],
    ['-0', '0'],
    ['+7', '7'],
    ['007', '7'],
    ['123456789012345678901234567890', '123456789012345678901234567890'],
    ['-3/4', '-3/4'],
    ['6/-4', '-3/2'],
    ['0.125', '1/8'],
    ['.5', '1/2'],
    ['5.', '5'],
    ['1e-3', '1/1000'],
    ['1.50E+2', '150'],
    ['1.5/2', '3/4'],
    ['1/2/3', '1/6'],
    ['2*3-4*5', '-14'],
    ['(1+2)*(3-5)/4', '-3/2'],
    ['\u22122', '-2'],
    ['sqrt(4)', '2'],
    ['sqrt(0)', '0'],
    ['sqrt(8)', '2*sqrt(2)'],
    ['sqrt(1/2)', '1/2*sqrt(2)'],
    ['sqrt(0.2)', '1/5*sqrt(5)'],
    ['\u221a(5)', 'sqrt(5)'],
    ['2+3*sqrt(5)', '2+3*sqrt(5)'],
    ['(1-sqrt(5))/2', '1/2-1/2*sqrt(5)'],
    ['-sqrt(2)/3', '-1/3*sqrt(2)'],
    ['1/(1+sqrt(2))', '-1+sqrt(2)'],
    ['((1+sqrt(5))/2)*((1+sqrt(5))/2)', '3/2+1/2*sqrt(5)'],
    ['sqrt(2)*sqrt(8)', '4'],
    ['sqrt(5)-sqrt(5)', '0'],
    [' 1 + 2 * sqrt( 5 ) ', '1+2*sqrt(5)'],
    ['sqrt(1e40)', `1${'0'.repeat(20)}`],
    ['sqrt(999999999999999989)', 'sqrt(999999999999999989)'],
  ])('%s is %s', (written, expected) => {
    expect(text(written)).toBe(expected);
  });

  it('takes integers and decimals of any length', () => {
    const digits = '7'.repeat(30_000);
    expect(parseNumber(digits).value.a).toBe(BigInt(digits));
    expect(parseNumber(`0.${digits}`).value).toEqual(
      exactNumber(BigInt(digits), 0n, 10n ** 30_000n),
    );
  });

  it('reads every decimal as the fraction of its digits', () => {
    fc.assert(
      fc.property(
        fc.bigInt(-(10n ** 30n), 10n ** 30n),
        fc.integer({ min: 0, max: 12 }),
        fc.integer({ min: -40, max: 40 }),
        (digits, places, exponent) => {
          const padded = (digits < 0n ? -digits : digits).toString().padStart(places + 1, '0');
          const whole = padded.slice(0, padded.length - places);
          const written = `${digits < 0n ? '-' : ''}${whole}.${padded.slice(whole.length)}e${exponent}`;
          const shift = BigInt(exponent - places);
          const expected =
            shift < 0n
              ? exactNumber(digits, 0n, 10n ** -shift)
              : exactNumber(digits * 10n ** shift);
          expect(parseNumber(written).value).toEqual(expected);
        },
      ),
    );
  });

  it('agrees with floating point on random expressions', () => {
    const { expression } = fc.letrec<{ expression: string }>((tie) => ({
      expression: fc.oneof(
        { maxDepth: 4 },
        fc.constantFrom('sqrt(3)', 'sqrt(12)', 'sqrt(1/3)', '2', '0.25', '7/3', '1e-1'),
        fc
          .tuple(tie('expression'), fc.constantFrom('+', '-', '*', '/'), tie('expression'))
          .map(([x, operator, y]) => `(${x}${operator}${y})`),
      ),
    }));
    let compared = 0;
    fc.assert(
      fc.property(expression, (written) => {
        const script = written.replaceAll('sqrt', 'Math.sqrt');
        const expected = new Function(`return ${script}`)() as number;
        fc.pre(Number.isFinite(expected) && Math.abs(expected) > 1e-6 && Math.abs(expected) < 1e6);
        const { value } = parseNumber(written);
        const found = (Number(value.a) + Number(value.b) * Math.sqrt(3)) / Number(value.d);
        expect(Math.abs(found / expected - 1)).toBeLessThan(1e-6);
        compared += 1;
      }),
    );
    expect(compared).toBeGreaterThan(30);
  });

  it('reads back what is written for any number of a quadratic field', () => {
    const part = fc.bigInt(-(10n ** 25n), 10n ** 25n);
    fc.assert(
      fc.property(part, part, fc.bigInt(1n, 10n ** 20n), (a, b, d) => {
        const x = exactNumber(a, b, d);
        const { value, radicand } = parseNumber(formatNumber(x, 7n));
        expect(value).toEqual(x);
        expect(radicand).toBe(b === 0n ? null : 7n);
      }),
    );
  });
});

describe('texts that are no numbers', () => {
  it.each([
    ['', 0, 'a number is missing'],
    ['  ', 0, 'a number is missing'],
    ['x', 0, 'cannot read "x" as a number'],
    ['1 2', 2, 'cannot read "1 2" as a number'],
    ['0x10', 1, 'cannot read "0x10" as a number'],
    ['1_000', 1, 'cannot read "1_000" as a number'],
    ['nan', 0, 'cannot read "nan" as a number'],
    ['1+', 2, 'cannot read "1+" as a number: it stops short'],
    ['2--3', 2, 'cannot read "2--3" as a number'],
    ['1/0', 2, 'division by zero'],
    ['1/(2-2)', 2, 'division by zero'],
    ['1/(sqrt(2)-sqrt(2))', 2, 'division by zero'],
    ['(1+2', 0, 'a parenthesis is not closed'],
    ['1)', 1, 'cannot read "1)" as a number'],
    ['sqrt 5', 5, 'a root has no parenthesis'],
    ['1+sqrt(-4)', 2, 'a root of a negative number'],
    ['sqrt(1+sqrt(2))', 0, 'a root of a number that is not rational'],
    ['sqrt(2)+sqrt(3)', 8, 'sqrt(3) beside sqrt(2): two different square roots'],
    ['1e999999999', 0, 'the exponent 999999999 is out of range'],
    ['1e-999999999', 0, 'the exponent -999999999 is out of range'],
    [`1e${'9'.repeat(50)}`, 0, 'the exponent is out of range'],
    ['1e9000*1e9000', 0, 'a number with more than 10000 digits beyond those written'],
    ['3sqrt(5)', 1, 'cannot read "3sqrt(5)" as a number'],
  ])('%s', (written, offset, what) => {
    const fault = faultOf(written);
    expect(fault.what).toBe(what);
    expect(fault.offset).toBe(offset);
    expect(fault.remedy).not.toBe('');
  });

  it('says how to write what was meant', () => {
    expect(faultOf('0,5').remedy).toContain('0.5');
    expect(faultOf('3sqrt(5)').remedy).toContain('3*sqrt(5)');
    expect(faultOf('5^2').remedy).toContain('write powers out');
  });

  it('refuses at once what would take long', () => {
    const start = performance.now();
    faultOf('1e999999999');
    faultOf('sqrt(1e10000*10)*1e9999999999');
    faultOf('('.repeat(100_000));
    faultOf(`sqrt(${'7'.repeat(50_000)})`);
    expect(performance.now() - start).toBeLessThan(2000);
  });

  it('does not guess a square-free part it cannot find', () => {
    // Two primes next above 10^12 and 10^13, from memory; their product has no small factor.
    const fault = faultOf(`sqrt(${1_000_000_000_039n * 10_000_000_000_037n})`);
    expect(fault.what).toContain('cannot be found cheaply');
  });
});

describe('square and square-free part', () => {
  it('matches a slow search', () => {
    for (let n = 1n; n <= 600n; n += 1n) {
      let square = 1n;
      for (let s = 1n; s * s <= n; s += 1n) if (n % (s * s) === 0n) square = s;
      expect(splitSquare(n)).toEqual({ square, free: n / (square * square) });
    }
  });

  it('takes squares out of products of large primes', () => {
    const p = 1_000_003n;
    const q = 999_983n;
    expect(splitSquare(p * p * 6n)).toEqual({ square: p, free: 6n });
    expect(splitSquare(q * q * q)).toEqual({ square: q, free: q });
    expect(splitSquare(p * q * 4n)).toEqual({ square: 2n, free: p * q });
    expect(splitSquare(p ** 6n)).toEqual({ square: p ** 3n, free: 1n });
  });
});
