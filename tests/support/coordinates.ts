// Changes of an arrangement that keep its counts: a unimodular change of coordinates, another order,
// other signs.
import { sequence } from './arrangements.js';

/**
 * The rows times one random integer matrix of determinant 1 or -1, made of `steps` additions of one
 * column's multiple (up to `factor`) to another.
 */
export function unimodularChange(
  rows: readonly (readonly (number | bigint)[])[],
  options: { seed: number; steps: number; factor: number },
): bigint[][] {
  const random = sequence(options.seed);
  const changed = rows.map((row) => row.map(BigInt));
  const d = changed[0].length;
  if (d === 1) return changed;
  for (let step = 0; step < options.steps; step++) {
    const from = random(d);
    const to = (from + 1 + random(d - 1)) % d;
    const times = BigInt(random(2 * options.factor + 1) - options.factor);
    for (const row of changed) row[to] += times * row[from];
  }
  return changed;
}

/** The rows in a random order, about half of them negated. */
export function shuffled(
  rows: readonly (readonly (number | bigint)[])[],
  seed: number,
): bigint[][] {
  const random = sequence(seed);
  const left = rows.map((row) => row.map(BigInt));
  const result: bigint[][] = [];
  while (left.length > 0) {
    const [row] = left.splice(random(left.length), 1);
    result.push(random(2) === 0 ? row : row.map((x) => -x));
  }
  return result;
}
