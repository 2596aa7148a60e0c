// Numbers a + b sqrt(k) with integer a, b: the ring Z[sqrt(k)] inside the reals, k > 1 square-free.
import { gcd, integerRatio, magnitude } from './integers.js';
import type { Ring } from './ring.js';

/** a + b sqrt(k); k belongs to the ring. */
export interface Quadratic {
  readonly a: bigint;
  readonly b: bigint;
}

function signOf(a: bigint, b: bigint, k: bigint): number {
  if (b === 0n) return a > 0n ? 1 : a < 0n ? -1 : 0;
  if (a === 0n || a > 0n === b > 0n) return b > 0n ? 1 : -1;
  // Opposite signs: the larger square wins; they differ because k is not a square.
  return a * a > k * b * b ? (a > 0n ? 1 : -1) : b > 0n ? 1 : -1;
}

/** Floor of the square root; n not negative. */
export function integerSquareRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt((n.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (x + n / x) >> 1n;
    if (next >= x) return x;
    x = next;
  }
}

/** Z[sqrt(k)] for a square-free k above 1. */
export function quadraticRing(k: bigint): Ring<Quadratic> {
  const make = (a: bigint, b: bigint): Quadratic => ({ a, b });
  /** floor(x 2^80) for x = |a + b sqrt(k)|, up to one unit, after scaling so that x is at least 1. */
  const scaled = (x: Quadratic): { value: bigint; shift: bigint } => {
    const negative = signOf(x.a, x.b, k) < 0;
    const a = negative ? -x.a : x.a;
    const b = negative ? -x.b : x.b;
    // |a + b sqrt(k)| >= 1 / (|a| + |b| sqrt(k)), since the norm is a non-zero integer; so this many
    // extra bits leave at least 64 significant ones.
    const size = BigInt(
      (magnitude(a) + magnitude(b) * (integerSquareRoot(k) + 1n)).toString(2).length,
    );
    const shift = size + 64n;
    const root = integerSquareRoot((b * b * k) << (2n * shift));
    return { value: (a << shift) + (b < 0n ? -root : root), shift };
  };
  const format = (x: Quadratic): string => {
    if (x.b === 0n) return x.a.toString();
    const factor = magnitude(x.b) === 1n ? '' : `${magnitude(x.b)}*`;
    const root = `${factor}sqrt(${k})`;
    if (x.a === 0n) return x.b < 0n ? `-${root}` : root;
    return `${x.a}${x.b < 0n ? '-' : '+'}${root}`;
  };
  return {
    radicand: k,
    zero: make(0n, 0n),
    one: make(1n, 0n),
    fromInteger: (value) => make(value, 0n),
    add: (x, y) => make(x.a + y.a, x.b + y.b),
    subtract: (x, y) => make(x.a - y.a, x.b - y.b),
    multiply: (x, y) => make(x.a * y.a + k * x.b * y.b, x.a * y.b + x.b * y.a),
    negate: (x) => make(-x.a, -x.b),
    divideExactly(x, y) {
      const norm = y.a * y.a - k * y.b * y.b;
      const a = x.a * y.a - k * x.b * y.b;
      const b = x.b * y.a - x.a * y.b;
      if (norm === 0n || a % norm !== 0n || b % norm !== 0n) {
        throw new RangeError(`quadratic numbers: ${format(y)} does not divide ${format(x)}`);
      }
      return make(a / norm, b / norm);
    },
    sign: (x) => signOf(x.a, x.b, k),
    content: (x) => gcd(x.a, x.b),
    ratio(x, y) {
      if (x.b === 0n && y.b === 0n) return integerRatio(x.a, y.a);
      const sx = signOf(x.a, x.b, k);
      if (sx === 0) return 0;
      const p = scaled(x);
      const q = scaled(y);
      const raised = p.shift > q.shift ? q.value << (p.shift - q.shift) : q.value;
      const lowered = p.shift < q.shift ? p.value << (q.shift - p.shift) : p.value;
      return sx * signOf(y.a, y.b, k) * integerRatio(lowered, raised);
    },
    format,
  };
}
