// A number as users write it: (a + b sqrt(k)) / d. The radicand k belongs to the list it is in.
import { gcd, lcm } from './integers.js';

/** (a + b sqrt(k)) / d in lowest terms, d > 0; rational exactly when b = 0. */
export interface ExactNumber {
  readonly a: bigint;
  readonly b: bigint;
  readonly d: bigint;
}

/** Lowest terms of (a + b sqrt(k)) / d; RangeError when d is 0. */
export function exactNumber(a: bigint, b: bigint = 0n, d: bigint = 1n): ExactNumber {
  if (d === 0n) throw new RangeError('exactNumber: denominator: expected non-zero, got 0');
  const g = d < 0n ? -gcd(gcd(a, b), d) : gcd(gcd(a, b), d);
  return { a: a / g, b: b / g, d: d / g };
}

export const exactZero: ExactNumber = { a: 0n, b: 0n, d: 1n };
export const exactOne: ExactNumber = { a: 1n, b: 0n, d: 1n };

export function isZero(x: ExactNumber): boolean {
  return x.a === 0n && x.b === 0n;
}

export function equalNumbers(x: ExactNumber, y: ExactNumber): boolean {
  return x.a === y.a && x.b === y.b && x.d === y.d;
}

export function addNumbers(x: ExactNumber, y: ExactNumber): ExactNumber {
  return exactNumber(x.a * y.d + y.a * x.d, x.b * y.d + y.b * x.d, x.d * y.d);
}

export function negateNumber(x: ExactNumber): ExactNumber {
  return { a: -x.a, b: -x.b, d: x.d };
}

/** Product in Q(sqrt(k)); any k (0n, say) serves for two rationals. */
export function multiplyNumbers(x: ExactNumber, y: ExactNumber, k: bigint): ExactNumber {
  return exactNumber(x.a * y.a + k * x.b * y.b, x.a * y.b + x.b * y.a, x.d * y.d);
}

/** x / y in Q(sqrt(k)), y not zero. */
export function divideNumbers(x: ExactNumber, y: ExactNumber, k: bigint): ExactNumber {
  const norm = y.a * y.a - k * y.b * y.b;
  if (norm === 0n) throw new RangeError('divideNumbers: divisor: expected non-zero, got 0');
  return exactNumber((x.a * y.a - k * x.b * y.b) * y.d, (x.b * y.a - x.a * y.b) * y.d, x.d * norm);
}

/** The least positive integer that clears every denominator. */
export function commonDenominator(numbers: Iterable<ExactNumber>): bigint {
  let d = 1n;
  for (const x of numbers) d = lcm(d, x.d);
  return d;
}

/** As users write it, and as the readers take it back: `-3/4`, `1/2+3/2*sqrt(5)`. */
export function formatNumber(x: ExactNumber, k: bigint | null): string {
  const fraction = (n: bigint): string => {
    const g = gcd(n, x.d);
    return x.d === g ? (n / g).toString() : `${n / g}/${x.d / g}`;
  };
  if (x.b === 0n) return fraction(x.a);
  const coefficient = fraction(x.b < 0n ? -x.b : x.b);
  const root = `${coefficient === '1' ? '' : `${coefficient}*`}sqrt(${k})`;
  if (x.a === 0n) return x.b < 0n ? `-${root}` : root;
  return `${fraction(x.a)}${x.b < 0n ? '-' : '+'}${root}`;
}
