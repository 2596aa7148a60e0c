// Parallel classes of rows over a ring.
import type { Ring } from '../exact/ring.js';

/** Rows that are multiples of one another; `normal` is the first, its first non-zero entry positive. */
export interface MergedRows {
  readonly normal: unknown[];
  /** Row numbers ascending; sign is that of the row's first non-zero entry. */
  readonly members: { readonly row: number; readonly sign: number }[];
}

/** Classes in the order of their first rows; no row is zero. */
export function mergeParallel(
  ring: Ring<unknown>,
  rows: readonly (readonly unknown[])[],
): MergedRows[] {
  const classes: MergedRows[] = [];
  const firsts: number[] = [];
  const ratios: number[] = [];
  rows.forEach((row, i) => {
    const first = row.findIndex((x) => ring.sign(x) !== 0);
    const sign = ring.sign(row[first]);
    // A ratio within 2^-48 tells most pairs apart; those it cannot are multiplied out.
    const ratio = first + 1 < row.length ? ring.ratio(row[first + 1], row[first]) : 0;
    for (let j = 0; j < classes.length; j++) {
      if (firsts[j] !== first) continue;
      const bound = 2 ** -46 * (Math.abs(ratio) + Math.abs(ratios[j]));
      if (Math.abs(ratio - ratios[j]) > bound) continue;
      if (!proportional(ring, row, classes[j].normal, first)) continue;
      classes[j].members.push({ row: i, sign });
      return;
    }
    const normal = sign < 0 ? row.map((x) => ring.negate(x)) : row.slice();
    classes.push({ normal, members: [{ row: i, sign }] });
    firsts.push(first);
    ratios.push(ratio);
  });
  return classes;
}

function proportional(
  ring: Ring<unknown>,
  row: readonly unknown[],
  other: readonly unknown[],
  first: number,
): boolean {
  for (let q = first + 1; q < row.length; q++) {
    const left = ring.multiply(row[q], other[first]);
    const right = ring.multiply(other[q], row[first]);
    if (ring.sign(ring.subtract(left, right)) !== 0) return false;
  }
  return true;
}
