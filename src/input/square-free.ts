// n = s^2 k with k square-free, by trial division. After dividing out every prime up to B, what is
// left and below B^3 is 1, a prime, a square of a prime or a product of two primes: a test for
// squares settles it. A perfect square needs no division.
import { bitLength } from '../exact/integers.js';
import { integerSquareRoot } from '../exact/quadratic.js';
import { expandedDigits, squareFreeTrialDivisor } from '../limits.js';

/** n = square^2 * free, free square-free. */
export interface SplitSquare {
  readonly square: bigint;
  readonly free: bigint;
}

const known = new Map<bigint, SplitSquare | null>();

/** Splits n >= 0 (0 as 0^2 * 1); null where a factor beyond the trial divisors would have to be found. */
export function splitSquare(n: bigint): SplitSquare | null {
  let split = known.get(n);
  if (split === undefined) {
    split = search(n);
    if (known.size < 1000) known.set(n, split);
  }
  return split;
}

function search(n: bigint): SplitSquare | null {
  if (bitLength(n) > 4 * expandedDigits) return null;
  const root = integerSquareRoot(n);
  if (root * root === n) return { square: root, free: 1n };
  let rest = n;
  let square = 1n;
  let free = 1n;
  for (let p = 2; p <= squareFreeTrialDivisor; p += p === 2 ? 1 : 2) {
    const prime = BigInt(p);
    if (prime * prime * prime > rest) return settle(rest, square, free);
    let odd = false;
    while (rest % prime === 0n) {
      rest /= prime;
      if (odd) square *= prime;
      odd = !odd;
    }
    if (odd) free *= prime;
  }
  const bound = BigInt(squareFreeTrialDivisor);
  const last = integerSquareRoot(rest);
  return rest < bound * bound * bound || last * last === rest ? settle(rest, square, free) : null;
}

/** rest is 1, p, p^2 or p q, or a perfect square. */
function settle(rest: bigint, square: bigint, free: bigint): SplitSquare {
  const root = integerSquareRoot(rest);
  return root * root === rest ? { square: square * root, free } : { square, free: free * rest };
}
