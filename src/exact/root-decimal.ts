// Square roots as decimals: the one inexact thing said of exact results, cut off, never rounded up.
import { magnitude } from './integers.js';
import type { ExactNumber } from './number.js';
import { integerSquareRoot } from './quadratic.js';

/**
 * The square root of x >= 0 in Q or Q(sqrt(k)), to `digits` significant digits, the rest cut off:
 * `2.44948974278317`, `1.5e+40` where the point would stand far away, `0`.
 */
export function squareRootDecimal(x: ExactNumber, k: bigint | null, digits = 15): string {
  if (x.a === 0n && x.b === 0n) return '0';
  // floor(sqrt(x) 10^shift), with the shift raised until there are digits enough. Where a and the
  // root part nearly cancel, x 10^(2 shift) is small against its parts, but they are exact enough:
  // the root is taken of b^2 k 10^(4 shift), to the unit.
  for (let shift = 8 + digits; ; shift *= 2) {
    const power = 10n ** BigInt(2 * shift);
    const root = integerSquareRoot(x.b * x.b * (k ?? 0n) * power * power);
    const square = (x.a * power + (x.b < 0n ? -root : root)) / x.d;
    if (square < 0n) continue;
    const value = integerSquareRoot(square).toString();
    if (value.length >= digits + 4) return pointed(value, shift, digits);
  }
}

/** An exact number x of Q or Q(sqrt(k)) to `digits` significant digits, the rest cut off. */
export function decimalOf(x: ExactNumber, k: bigint | null, digits = 15): string {
  if (x.a === 0n && x.b === 0n) return '0';
  for (let shift = 8 + digits; ; shift *= 2) {
    const power = 10n ** BigInt(shift);
    const root = integerSquareRoot(x.b * x.b * (k ?? 0n) * power * power);
    const value = (x.a * power + (x.b < 0n ? -root : root)) / x.d;
    const text = magnitude(value).toString();
    if (text.length >= digits + 4) return `${value < 0n ? '-' : ''}${pointed(text, shift, digits)}`;
  }
}

/** `value` over 10^shift, cut to `digits` significant digits, trailing zeros off. */
function pointed(value: string, shift: number, digits: number): string {
  const exponent = value.length - 1 - shift;
  const kept = value.slice(0, digits).replace(/0+$/, '');
  if (exponent < -7 || exponent > 20) {
    const fraction = kept.slice(1);
    const sign = exponent < 0 ? '-' : '+';
    return `${kept[0]}${fraction === '' ? '' : `.${fraction}`}e${sign}${Math.abs(exponent)}`;
  }
  if (exponent < 0) return `0.${'0'.repeat(-exponent - 1)}${kept}`;
  const whole = kept.slice(0, exponent + 1).padEnd(exponent + 1, '0');
  const fraction = kept.slice(exponent + 1);
  return fraction === '' ? whole : `${whole}.${fraction}`;
}
