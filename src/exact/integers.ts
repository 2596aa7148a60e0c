// Integers: the few number-theoretic helpers everybody needs, and Z as a ring.
import type { Ring } from './ring.js';

/** Absolute value. */
export function magnitude(a: bigint): bigint {
  return a < 0n ? -a : a;
}

/** Greatest common divisor, never negative; gcd(0, 0) = 0. A plain loop: measured faster than big-integer's. */
export function gcd(a: bigint, b: bigint): bigint {
  let x = magnitude(a);
  let y = magnitude(b);
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** Least common multiple, never negative. */
export function lcm(a: bigint, b: bigint): bigint {
  return a === 0n || b === 0n ? 0n : magnitude((a / gcd(a, b)) * b);
}

/** Quotient rounded to the nearest integer (halves upward), divisor positive. */
export function roundedQuotient(a: bigint, b: bigint): bigint {
  const twice = 2n * a + b;
  const q = twice / (2n * b);
  return twice < 0n && q * 2n * b !== twice ? q - 1n : q;
}

/** Bits of |a|; 0 for 0. */
export function bitLength(a: bigint): number {
  const hex = magnitude(a).toString(16);
  return a === 0n ? 0 : 4 * (hex.length - 1) + (32 - Math.clz32(Number.parseInt(hex[0], 16)));
}

/**
 * a/b as a double with relative error at most 2^-51: two conversions and a division, 2^-53 each.
 * Operands beyond doubles are shifted down to 63 bits first (each loses less than 2^-62 of itself).
 * NaN when the quotient leaves the range of normal doubles.
 */
export function integerRatio(a: bigint, b: bigint): number {
  if (a === 0n) return 0;
  const quick = Number(a) / Number(b);
  if (Math.abs(quick) < 2 ** 800 && Math.abs(quick) > 2 ** -800) return quick;
  const shiftA = Math.max(0, bitLength(a) - 63);
  const shiftB = Math.max(0, bitLength(b) - 63);
  const exponent = shiftA - shiftB;
  if (exponent > 800 || exponent < -800) return Number.NaN;
  const top = Number(magnitude(a) >> BigInt(shiftA)) / Number(magnitude(b) >> BigInt(shiftB));
  return (a < 0n !== b < 0n ? -top : top) * 2 ** exponent;
}

/** Z. */
export const integerRing: Ring<bigint> = {
  radicand: null,
  zero: 0n,
  one: 1n,
  fromInteger: (value) => value,
  add: (a, b) => a + b,
  subtract: (a, b) => a - b,
  multiply: (a, b) => a * b,
  negate: (a) => -a,
  divideExactly(a, b) {
    const q = a / b;
    if (q * b !== a) throw new RangeError(`integers: ${b} does not divide ${a}`);
    return q;
  },
  sign: (a) => (a > 0n ? 1 : a < 0n ? -1 : 0),
  content: magnitude,
  ratio: integerRatio,
  format: (a) => a.toString(),
};
