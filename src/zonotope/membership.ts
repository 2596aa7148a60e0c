// Whether a point lies in the zonotope, exactly, and the evidence either way: how far each generator
// is turned up, or a direction in which the point is beyond the whole zonotope. Bounded dual simplex
// steps with least-index choices, which cannot cycle (R. Bland, 1977, New finite pivoting rules for
// the simplex method); fraction-free exchange, so that entries stay minors of the data.
import type { Arrangement } from '../arrangement/arrangement.js';
import { exchangePivot } from '../exact/exchange.js';
import { gcd, integerRing } from '../exact/integers.js';
import {
  addNumbers,
  commonDenominator,
  type ExactNumber,
  exactNumber,
  exactOne,
  exactZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { type Quadratic, quadraticRing } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';

/**
 * A direction (d numbers of the ring, without a common factor) for a point outside: its product with
 * the point is above its product with every point of the zonotope. Null for a point inside.
 */
export type Beyond = readonly ExactNumber[] | null;

/** Asks about points, in the field of the arrangement or, where that is Q, in Q(sqrt(radicand)). */
export class ZonotopeMembership {
  private readonly dimension: number;
  private readonly radicand: bigint | null;
  /** The sum of all low ends, and for each generator the segment from its low to its high end. */
  private readonly start: readonly ExactNumber[];
  private readonly segments: readonly (readonly ExactNumber[])[];

  constructor(arrangement: Arrangement, radicand: bigint | null = null) {
    const { normals, ranges } = arrangement.generators;
    this.dimension = arrangement.dimension;
    this.radicand = arrangement.generators.radicand ?? radicand;
    const k = this.radicand ?? 0n;
    let start = normals[0].map(() => exactZero);
    this.segments = normals.map((normal, i) => {
      const low = ranges?.[i].low ?? exactZero;
      const high = ranges?.[i].high ?? exactOne;
      const width = addNumbers(high, negateNumber(low));
      start = start.map((x, j) => addNumbers(x, multiplyNumbers(low, normal[j], k)));
      return normal.map((x) => multiplyNumbers(width, x, k));
    });
    this.start = start;
  }

  /** Null when the point (d numbers) lies in the zonotope, its boundary included. */
  beyond(point: readonly ExactNumber[]): Beyond {
    const target = point.map((x, j) => addNumbers(x, negateNumber(this.start[j])));
    const d = commonDenominator([...target, ...this.segments.flat()]);
    const rows = Array.from({ length: this.dimension }, (_, i) => [
      ...this.segments.map((segment) => segment[i]),
      target[i],
    ]);
    if (this.radicand === null) {
      const integer = (x: ExactNumber): bigint => (x.a * d) / x.d;
      const direction = separate(
        integerRing,
        rows.map((row) => row.map(integer)),
      );
      return direction && reduced(direction.map((a) => ({ a, b: 0n })));
    }
    const element = (x: ExactNumber): Quadratic => ({ a: (x.a * d) / x.d, b: (x.b * d) / x.d });
    const direction = separate(
      quadraticRing(this.radicand),
      rows.map((row) => row.map(element)),
    );
    return direction && reduced(direction);
  }
}

function reduced(direction: readonly Quadratic[]): ExactNumber[] {
  const g = direction.reduce((sum, { a, b }) => gcd(sum, gcd(a, b)), 0n);
  return direction.map(({ a, b }) => exactNumber(a / g, b / g));
}

/**
 * `rows`: d rows of n coefficients and a target. Null when some t in [0,1]^n gives every row its
 * target; otherwise a direction g with g . target above g . (rows t) for every such t.
 */
function separate<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): E[] | null {
  const { add, subtract, negate, sign } = ring;
  const height = rows.length;
  const count = rows[0].length - 1;
  // Row i is the residue of row i: its target less its coefficients times t; later some t. Entries
  // are numerators over the positive `denominator`; t_j goes by j, residue i by ~i.
  const tableau = rows.map((row) => row.map((x, j) => (j < count ? negate(x) : x)));
  let denominator = ring.one;
  const basic = rows.map((_, i) => ~i);
  const free = Array.from({ length: count }, (_, j) => j);
  const isUp = new Array<boolean>(count).fill(false);

  const exchange = (p: number, q: number): void => {
    denominator = exchangePivot(ring, tableau, p, q, denominator);
    [basic[p], free[q]] = [free[q], basic[p]];
  };
  /** Coefficients of the residues in row i: with u residues, row i = constant + sum c t + g . u. */
  const residuePart = (i: number): E[] => {
    const g = Array.from({ length: height }, () => ring.zero);
    free.forEach((name, j) => {
      if (name < 0) g[~name] = tableau[i][j];
    });
    return g;
  };

  // Residues are to be 0: each leaves for some t. One that depends on no t is a combination of the
  // others, or shows that the target is outside the span.
  for (let i = 0; i < height; i++) {
    const q = free.findIndex((name, j) => name >= 0 && sign(tableau[i][j]) !== 0);
    if (q >= 0) {
      exchange(i, q);
      continue;
    }
    const missing = sign(tableau[i][count]);
    if (missing === 0) continue;
    // residue_i - g . (other residues) is this constant whatever t is.
    const g = residuePart(i).map(negate);
    g[i] = denominator;
    return missing > 0 ? g : g.map(negate);
  }

  for (;;) {
    let leaving = -1;
    let below = false;
    for (let i = 0; i < height; i++) {
      if (basic[i] < 0 || (leaving >= 0 && basic[i] > basic[leaving])) continue;
      let value = tableau[i][count];
      free.forEach((name, j) => {
        if (name >= 0 && isUp[name]) value = add(value, tableau[i][j]);
      });
      const tooLow = sign(value) < 0;
      if (!tooLow && sign(subtract(value, denominator)) <= 0) continue;
      leaving = i;
      below = tooLow;
    }
    if (leaving < 0) return null;
    let entering = -1;
    free.forEach((name, j) => {
      if (name < 0 || (entering >= 0 && name > free[entering])) return;
      // Moving t_name off its end raises the row where the signs agree.
      const effect = isUp[name] ? -sign(tableau[leaving][j]) : sign(tableau[leaving][j]);
      if (below ? effect > 0 : effect < 0) entering = j;
    });
    if (entering < 0) {
      // t_leaving = constant + sum c t + g . residues, and its right side cannot reach [0, 1] without
      // residues: so g . target = -constant is beyond g . (rows t) = sum c t - t_leaving.
      const g = residuePart(leaving);
      return below ? g : g.map(negate);
    }
    isUp[basic[leaving]] = !below;
    exchange(leaving, entering);
  }
}
