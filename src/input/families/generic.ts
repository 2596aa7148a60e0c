// Normals in general position (every `rank` of them independent) with small entries: points of the
// rational normal curve (s^(r-1), s^(r-2) t, ..., t^(r-1)), one for each ratio s : t. Any r of them
// have the determinant prod (s_i t_j - s_j t_i), Vandermonde's made homogeneous, which is not zero.
import { InputError } from '../../errors.js';
import { gcd } from '../../exact/integers.js';
import type { GeneratorList } from '../generators.js';
import { requireRoom, requireWhole, wholeList } from './family.js';

/** `count` normals in R^rank, every `rank` of them independent; `count` at least `rank`. */
export function genericNormals(rank: number, count: number): GeneratorList {
  requireWhole('the rank', rank, 1);
  requireWhole('the number of normals', count, 1);
  if (count < rank) {
    throw new InputError(`${count} normals cannot have rank ${rank}`, `make ${rank} or more`);
  }
  const title = `${count} generic normals in R^${rank}`;
  requireRoom(title, count, rank);
  if (rank === 1)
    return wholeList(
      title,
      Array.from({ length: count }, () => [1]),
    );
  const rows: bigint[][] = [];
  for (const [s, t] of ratios()) {
    if (rows.length === count) break;
    rows.push(Array.from({ length: rank }, (_, i) => s ** BigInt(rank - 1 - i) * t ** BigInt(i)));
  }
  return wholeList(title, rows);
}

/** Every ratio s : t once, coprime, by max(|s|, |t|): 1:0, 0:1, 1:1, 1:-1, 2:1, ... */
function* ratios(): Generator<readonly [bigint, bigint]> {
  yield [1n, 0n];
  yield [0n, 1n];
  yield [1n, 1n];
  yield [1n, -1n];
  for (let m = 2n; ; m += 1n) {
    for (let i = 1n; i < m; i += 1n) {
      if (gcd(i, m) !== 1n) continue;
      yield [m, i];
      yield [m, -i];
      yield [i, m];
      yield [i, -m];
    }
  }
}
