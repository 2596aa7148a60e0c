// A point of an open cone, or the proof that there is none, by exact arithmetic: a dual simplex
// method (C. Lemke, 1954) on A y >= 1 with least-index choices, which cannot cycle (R. Bland, 1977,
// New finite pivoting rules for the simplex method), and fraction-free exchange steps, so that
// every entry of the tableau is a minor of the data.
import { exchangePivot } from '../exact/exchange.js';
import type { Ring } from '../exact/ring.js';

/**
 * Some y with row . y > 0 for every row, all of one width, up to a positive factor; null when no
 * real y has. At least one row.
 */
export function conePoint<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): E[] | null {
  const width = rows[0].length;
  const height = rows.length;
  const { add, subtract, multiply, negate, sign } = ring;
  // Row i states slack i as a function of the coordinates: row . y - 1. The last row is the
  // objective. All entries are numerators over the positive `denominator`.
  const tableau = rows.map((row) => [...row, negate(ring.one)]);
  tableau.push(Array.from({ length: width + 1 }, () => ring.zero));
  let denominator = ring.one;
  /** What a row or column stands for: slack i is i, coordinate j is ~j. */
  const basic = rows.map((_, i) => i);
  const free = Array.from({ length: width }, (_, j) => ~j);

  const exchange = (p: number, q: number): void => {
    denominator = exchangePivot(ring, tableau, p, q, denominator);
    [basic[p], free[q]] = [free[q], basic[p]];
  };

  // Coordinates leave for the first slacks that depend on them. A coordinate that no slack depends
  // on any more stays at 0; its column is 0 in every slack's row from there on.
  for (let q = 0; q < width; q++) {
    const p = basic.findIndex((name, i) => name >= 0 && sign(tableau[i][q]) !== 0);
    if (p >= 0) exchange(p, q);
  }
  // The least sum of the slacks chosen: dual feasible from the start.
  for (let q = 0; q < width; q++) if (free[q] >= 0) tableau[height][q] = denominator;

  for (;;) {
    let leaving = -1;
    for (let i = 0; i < height; i++) {
      if (basic[i] < 0 || sign(tableau[i][width]) >= 0) continue;
      if (leaving < 0 || basic[i] < basic[leaving]) leaving = i;
    }
    if (leaving < 0) break;
    const row = tableau[leaving];
    const cost = tableau[height];
    let entering = -1;
    for (let j = 0; j < width; j++) {
      if (free[j] < 0 || sign(row[j]) <= 0) continue;
      if (entering >= 0) {
        const order = sign(
          subtract(multiply(cost[j], row[entering]), multiply(cost[entering], row[j])),
        );
        if (order > 0 || (order === 0 && free[j] > free[entering])) continue;
      }
      entering = j;
    }
    // A slack that is negative at 0 and no free slack can raise: no point has all of them positive.
    if (entering < 0) return null;
    exchange(leaving, entering);
  }
  const point = Array.from({ length: width }, () => ring.zero);
  basic.forEach((name, i) => {
    if (name < 0) point[~name] = add(tableau[i][width], ring.zero);
  });
  return point;
}
