// Regions by slow obvious code: signs are chosen one hyperplane at a time, and a choice is kept when
// Fourier-Motzkin elimination (J. Fourier, 1827; T. Motzkin, 1936) finds a point with these signs.
// Shares nothing with the kernels but the ring. For up to about ten hyperplanes in rank up to four.
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { setBit, WordTable, wordsFor } from '../../src/bits/signs.js';
import type { Ring } from '../../src/exact/ring.js';
import type { RegionTable } from '../../src/region/regions.js';

/** Whether some real y has row . y > 0 for every row. */
export function hasPoint<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): boolean {
  let system = rows.map((row) => row.slice());
  const width = rows.length === 0 ? 0 : rows[0].length;
  for (let column = 0; column < width; column++) {
    const above = system.filter((row) => ring.sign(row[column]) < 0);
    const below = system.filter((row) => ring.sign(row[column]) > 0);
    const next = system.filter((row) => ring.sign(row[column]) === 0);
    for (const low of below) {
      for (const high of above) {
        const p = low[column];
        const q = ring.negate(high[column]);
        next.push(low.map((x, j) => ring.add(ring.multiply(q, x), ring.multiply(p, high[j]))));
      }
    }
    const seen = new Set<string>();
    system = next.filter((row) => {
      const key = row.map((x) => ring.format(x)).join(' ');
      return !seen.has(key) && seen.add(key);
    });
  }
  // What is left reads 0 > 0, once for every contradiction.
  return system.length === 0;
}

/** All sign choices with a point, hyperplane 0 positive, as +1 and -1. */
export function slowSigns<E>(arrangement: Arrangement<E>): number[][] {
  const { ring, hyperplanes } = arrangement;
  let partial: number[][] = [[1]];
  for (let h = 1; h < hyperplanes.length; h++) {
    partial = partial.flatMap((signs) =>
      [1, -1]
        .map((sign) => [...signs, sign])
        .filter((longer) =>
          hasPoint(
            ring,
            longer.map((s, i) => hyperplanes[i].essential.map((x) => (s > 0 ? x : ring.negate(x)))),
          ),
        ),
    );
  }
  return partial;
}

/** The same as a half table. */
export function slowRegions(arrangement: Arrangement): RegionTable {
  const m = arrangement.hyperplanes.length;
  const wordsPerRow = wordsFor(m);
  const signs = slowSigns(arrangement);
  const half = new WordTable(wordsPerRow, signs.length);
  half.rows = signs.length;
  signs.forEach((row, i) => {
    row.forEach((s, h) => {
      if (s > 0) setBit(half.words.subarray(i * wordsPerRow), 0, h);
    });
  });
  return { hyperplanes: m, half };
}
