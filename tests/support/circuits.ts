// Slow and obvious: sign vectors of a central arrangement from its circuits. A sign vector X is that
// of some point exactly when it is orthogonal to every circuit C (a minimal dependence of the
// normals): the products C_i X_i are all zero or take both signs (P. Gordan, 1873, and T. Motzkin,
// 1936, transposition theorems).
import type { Ring } from '../../src/exact/ring.js';

function determinant<E>(ring: Ring<E>, m: readonly (readonly E[])[]): E {
  if (m.length === 0) return ring.one;
  let sum = ring.zero;
  m[0].forEach((x, j) => {
    if (ring.sign(x) === 0) return;
    const minor = m.slice(1).map((row) => row.filter((_, c) => c !== j));
    const term = ring.multiply(x, determinant(ring, minor));
    sum = j % 2 === 0 ? ring.add(sum, term) : ring.subtract(sum, term);
  });
  return sum;
}

/** Rank by cofactors of every square submatrix: for a handful of small rows. */
export function slowRank<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): number {
  const width = rows.length === 0 ? 0 : rows[0].length;
  const some = (size: number): boolean =>
    subsets(rows.length, size).some((r) =>
      subsets(width, size).some(
        (c) =>
          ring.sign(
            determinant(
              ring,
              r.map((i) => c.map((j) => rows[i][j])),
            ),
          ) !== 0,
      ),
    );
  let rank = 0;
  while (rank < Math.min(rows.length, width) && some(rank + 1)) rank++;
  return rank;
}

/** All subsets of {0, .., n-1} with `size` members, ascending. */
export function subsets(n: number, size: number): number[][] {
  if (size === 0) return [[]];
  const out: number[][] = [];
  const extend = (from: number, chosen: number[]): void => {
    if (chosen.length === size) {
      out.push(chosen);
      return;
    }
    for (let i = from; i < n; i++) extend(i + 1, [...chosen, i]);
  };
  extend(0, []);
  return out;
}

/** Signs of the circuits, one of each opposite pair: n entries -1, 0, 1. */
export function circuits<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): number[][] {
  const found: number[][] = [];
  const width = rows[0].length;
  for (let size = 1; size <= width + 1; size++) {
    for (const support of subsets(rows.length, size)) {
      const chosen = support.map((i) => rows[i]);
      if (slowRank(ring, chosen) !== size - 1) continue;
      if (
        support.some(
          (_, i) =>
            slowRank(
              ring,
              chosen.filter((__, j) => j !== i),
            ) !==
            size - 1,
        )
      ) {
        continue;
      }
      // Coefficient i is, up to a common factor, a signed minor with row i left out.
      const columns = subsets(width, size - 1).find(
        (c) =>
          ring.sign(
            determinant(
              ring,
              chosen.slice(1).map((row) => c.map((j) => row[j])),
            ),
          ) !== 0,
      )!;
      const signs = new Array<number>(rows.length).fill(0);
      support.forEach((h, i) => {
        const rest = chosen.filter((_, j) => j !== i).map((row) => columns.map((j) => row[j]));
        signs[h] = ring.sign(determinant(ring, rest)) * (i % 2 === 0 ? 1 : -1);
      });
      found.push(signs);
    }
  }
  return found;
}

/** Every covector, or every one without zeros, as text over `+-0`, sorted. */
export function slowCovectors<E>(
  ring: Ring<E>,
  rows: readonly (readonly E[])[],
  alphabet: '+-' | '+-0',
): string[] {
  const dependences = circuits(ring, rows);
  const value: Record<string, number> = { '+': 1, '-': -1, '0': 0 };
  let words = [''];
  for (let i = 0; i < rows.length; i++) {
    words = words.flatMap((word) => [...alphabet].map((sign) => word + sign));
  }
  return words
    .filter((word) =>
      dependences.every((circuit) => {
        const products = circuit.map((c, i) => c * value[word[i]]);
        const plus = products.some((x) => x > 0);
        const minus = products.some((x) => x < 0);
        return plus === minus;
      }),
    )
    .sort();
}
