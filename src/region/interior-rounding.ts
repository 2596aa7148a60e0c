// Exact directions made small: integer vectors of any size rounded to few digits, as long as a
// certificate accepts them.
import { bitLength, gcd, magnitude, roundedQuotient } from '../exact/integers.js';
import type { Quadratic } from '../exact/quadratic.js';
import { integerSquareRoot } from '../exact/quadratic.js';

/** The same direction with coordinates that share no factor. */
export function withoutCommonFactor(x: readonly bigint[]): bigint[] {
  let g = 0n;
  for (const value of x) {
    g = gcd(g, value);
    if (g === 1n) break;
  }
  return g < 2n ? x.slice() : x.map((value) => value / g);
}

/** floor(2^bits x) for each coordinate, up to one unit. */
export function approximate(x: readonly Quadratic[], k: bigint, bits: bigint): bigint[] {
  return x.map(({ a, b }) => {
    const root = integerSquareRoot((b * b * k) << (2n * bits));
    return (a << bits) + (b < 0n ? -root : root);
  });
}

/**
 * The first accepted rounding of the direction x to a largest coordinate of 1, 2, 4, ..., refined in
 * eighths; null when none is accepted up to the size of x itself.
 */
export function roundedDown(
  x: readonly bigint[],
  accepts: (point: readonly bigint[]) => boolean,
): bigint[] | null {
  let largest = 0n;
  for (const value of x) if (magnitude(value) > largest) largest = magnitude(value);
  if (largest === 0n) return null;
  const rounded = (size: bigint): bigint[] =>
    x.map((value) => roundedQuotient(value * size, largest));
  for (let power = 0; power <= bitLength(largest); power++) {
    const size = 1n << BigInt(power);
    const coarse = rounded(size);
    if (!accepts(coarse)) continue;
    for (let eighths = 5n; power >= 3 && eighths < 8n; eighths++) {
      const finer = rounded((size * eighths) >> 3n);
      if (accepts(finer)) return finer;
    }
    return coarse;
  }
  return null;
}
