// The quotient of Z^3 by a primitive vector, in doubles.

/** Entries of a map stay below this: three products with numbers below 2^31 add up below 2^53. */
const mapLimit = 2 ** 20;

/** Two functionals on Z^3, row after row. */
export type PlaneMap = readonly [number, number, number, number, number, number];

/**
 * Two short functionals, three entries each, that span those vanishing on the primitive vector
 * (a, b, c); null where an entry passes its bound.
 */
export function planeMap(a: number, b: number, c: number): PlaneMap | null {
  // Two coordinates first: u a + v b = g; then (b/g, -a/g, 0) and (u c, v c, -g) vanish on it, and
  // their cross product is the vector itself, up to sign: they span.
  if (a === 0 && b === 0) return [1, 0, 0, 0, 1, 0];
  let [g, u, v, h, s, t] = [a, 1, 0, b, 0, 1];
  while (h !== 0) {
    const q = Math.round(g / h);
    [g, u, v, h, s, t] = [h, s, t, g - q * h, u - q * s, v - q * t];
  }
  let [x0, x1, x2] = [b / g, -a / g, 0];
  let [y0, y1, y2] = [u * c, v * c, -g];
  if (Math.max(...[x0, x1, y0, y1, y2].map(Math.abs)) >= 2 ** 25) return null;
  for (;;) {
    const xx = x0 * x0 + x1 * x1 + x2 * x2;
    const yy = y0 * y0 + y1 * y1 + y2 * y2;
    if (yy < xx) {
      [x0, x1, x2, y0, y1, y2] = [y0, y1, y2, x0, x1, x2];
      continue;
    }
    const q = Math.round((x0 * y0 + x1 * y1 + x2 * y2) / xx);
    if (q === 0) break;
    y0 -= q * x0;
    y1 -= q * x1;
    y2 -= q * x2;
    if (y0 * y0 + y1 * y1 + y2 * y2 >= yy) break;
  }
  const most = Math.max(...[x0, x1, x2, y0, y1, y2].map(Math.abs));
  return most < mapLimit ? [x0, x1, x2, y0, y1, y2] : null;
}

/** Greatest common divisor of two non-negative integers below 2^53. */
export function plainGcd(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}
