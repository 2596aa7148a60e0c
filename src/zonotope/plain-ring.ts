// Z in doubles as a ring, for generic code whose caller has proved that no sum, product or difference
// of products reaches 2^53: several times as fast as big integers.
import { magnitude } from '../exact/integers.js';
import type { Ring } from '../exact/ring.js';

/** Z while all stays below 2^53. */
export const plainIntegerRing: Ring<number> = {
  radicand: null,
  zero: 0,
  one: 1,
  fromInteger: Number,
  add: (a, b) => a + b,
  subtract: (a, b) => a - b,
  multiply: (a, b) => a * b,
  negate: (a) => 0 - a,
  divideExactly(a, b) {
    const q = a / b;
    if (q * b !== a) throw new RangeError(`plain integers: ${b} does not divide ${a}`);
    return q;
  },
  sign: Math.sign,
  content: (a) => BigInt(Math.abs(a)),
  ratio: (a, b) => a / b,
  format: String,
};

/** The product of the k greatest squared lengths: no minor of k rows is larger, squared (J. Hadamard, 1893). */
export function squaredMinorBound(rows: readonly (readonly bigint[])[], k: number): bigint {
  const squares = rows.map((row) => row.reduce((sum, x) => sum + x * x, 0n));
  squares.sort((a, b) => (a > b ? -1 : a < b ? 1 : 0));
  return squares.slice(0, k).reduce((product, x) => product * x, 1n);
}

/** The largest absolute value of an entry; 0 where there is none. */
export function largestOf(rows: readonly (readonly bigint[])[]): bigint {
  let most = 0n;
  for (const row of rows) {
    for (const x of row) if (magnitude(x) > most) most = magnitude(x);
  }
  return most;
}
