// How large the minors of a list of normals can be (J. Hadamard, 1893): at most the product of the
// lengths of their rows.
import type { Quadratic } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';

/** Log2 of a bound on |minors| (times |conjugate minors|) of k of the rows, for k = 0..r. */
export function minorBounds<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): number[] {
  const root = ring.radicand === null ? 0 : Math.sqrt(Number(ring.radicand));
  // A double errs by a few parts in 2^53; 2^-20 on a logarithm is far more.
  const logNorm = (row: readonly E[], sign: number): number => {
    const entries = row.map((x) => {
      if (ring.radicand === null) return Number(x as bigint);
      const { a, b } = x as Quadratic;
      const part = Number(b) * root * sign;
      return Math.abs(Number(a) + part) + 2 ** -48 * (Math.abs(Number(a)) + Math.abs(part));
    });
    const length = Math.log2(Math.hypot(...entries));
    // Parts past the range of doubles may cancel to NaN: no bound is known then.
    return Number.isNaN(length) ? Number.POSITIVE_INFINITY : Math.max(0, length + 2 ** -20);
  };
  const logs = rows.map((row) =>
    ring.radicand === null ? logNorm(row, 1) : logNorm(row, 1) + logNorm(row, -1),
  );
  // Not b - a, which is NaN for two infinities.
  logs.sort((a, b) => (a < b ? 1 : a > b ? -1 : 0));
  const bounds = [0];
  for (let k = 0; k < rows[0].length && k < logs.length; k++) bounds.push(bounds[k] + logs[k]);
  return bounds;
}
