// The order of exact numbers: of Q, and of Q(sqrt(k)) inside the reals.
import { addNumbers, type ExactNumber, negateNumber } from './number.js';
import { quadraticRing } from './quadratic.js';

/** -1, 0 or 1, exactly; k is null for Q. */
export function signOfNumber(x: ExactNumber, k: bigint | null): number {
  if (x.b === 0n) return x.a > 0n ? 1 : x.a < 0n ? -1 : 0;
  if (k === null) throw new RangeError('signOfNumber: number: expected a rational one');
  return quadraticRing(k).sign({ a: x.a, b: x.b });
}

/** The sign of x - y. */
export function compareNumbers(x: ExactNumber, y: ExactNumber, k: bigint | null): number {
  return signOfNumber(addNumbers(x, negateNumber(y)), k);
}
