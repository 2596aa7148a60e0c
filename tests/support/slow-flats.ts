// Flats, Moebius values and the characteristic polynomial by slow obvious code, straight from the
// definitions: ranks of all subsets of normals. For up to about ten hyperplanes.
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import type { Ring } from '../../src/exact/ring.js';

/** Rank by elimination with cross multiplication, no division. */
export function slowRank<E>(ring: Ring<E>, rows: readonly (readonly E[])[]): number {
  let left = rows.map((row) => row.slice());
  let rank = 0;
  for (;;) {
    const pivotRow = left.find((row) => row.some((x) => ring.sign(x) !== 0));
    if (pivotRow === undefined) return rank;
    rank++;
    const c = pivotRow.findIndex((x) => ring.sign(x) !== 0);
    left = left
      .filter((row) => row !== pivotRow)
      .map((row) =>
        row.map((x, j) =>
          ring.subtract(ring.multiply(x, pivotRow[c]), ring.multiply(row[c], pivotRow[j])),
        ),
      );
  }
}

/** Rank of every subset of the hyperplanes, by bit set, from the normals as they are in R^d. */
export function subsetRanks<E>(arrangement: Arrangement<E>): number[] {
  const { ring, hyperplanes } = arrangement;
  return Array.from({ length: 2 ** hyperplanes.length }, (_, set) =>
    slowRank(
      ring,
      hyperplanes.filter((_h, i) => (set >> i) & 1).map((h) => h.normal),
    ),
  );
}

/** chi(t) = sum over subsets S of (-1)^|S| t^(r - rank S) (H. Whitney, 1932), from t^0 up. */
export function slowPolynomial(arrangement: Arrangement): bigint[] {
  const ranks = subsetRanks(arrangement);
  const r = ranks[ranks.length - 1];
  const coefficients = new Array<bigint>(r + 1).fill(0n);
  ranks.forEach((rank, set) => {
    let sign = 1n;
    for (let s = set; s !== 0; s &= s - 1) sign = -sign;
    coefficients[r - rank] += sign;
  });
  return coefficients;
}

/** A flat as the set of its hyperplanes. */
export interface SlowFlat {
  readonly set: number;
  readonly rank: number;
  /** mu(whole space, this flat), by the definition: the values below and at X add up to zero. */
  readonly moebius: number;
}

/** The closed subsets: those that no hyperplane can join without raising the rank. */
export function slowFlats(arrangement: Arrangement): SlowFlat[] {
  const ranks = subsetRanks(arrangement);
  const m = arrangement.hyperplanes.length;
  const closed = ranks
    .map((rank, set) => ({ rank, set }))
    .filter(({ rank, set }) => {
      for (let h = 0; h < m; h++) {
        if (((set >> h) & 1) === 0 && ranks[set | (1 << h)] === rank) return false;
      }
      return true;
    })
    .sort((a, b) => a.rank - b.rank || a.set - b.set);
  return slowMoebius(closed, 0);
}

/** Gives each flat mu(bottom, flat), 0 where the flat is not above the bottom. */
export function slowMoebius(
  flats: readonly { readonly set: number; readonly rank: number }[],
  bottom: number,
): SlowFlat[] {
  const done: SlowFlat[] = [];
  for (const { set, rank } of flats) {
    let moebius = 0;
    if (set === bottom) moebius = 1;
    else if ((set & bottom) === bottom) {
      for (const below of done) if ((below.set & set) === below.set) moebius -= below.moebius;
    }
    done.push({ set, rank, moebius });
  }
  return done;
}
