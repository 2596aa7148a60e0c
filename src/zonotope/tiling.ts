// The half-open tiling: one tile for every independent set I of generators, a half-open translate of
// the sum of their segments, so that the tiles partition the zonotope (the decomposition in R. Stanley,
// 1991, A zonotope associated with graphical degree sequences, theorem 2.2; an exact rule of our own).
//
// The rule. Add the r coordinate vectors h_1..h_r as generators and let cost_1 << ... << cost_n <<
// cost_h1 << ... << cost_hr. A basis B of all n + r, generators outside it at the ends that make the
// total cost least, is a tile of the larger zonotope, and these tiles fill it (linear programming:
// they are the optimal bases). Move Z by an infinitesimal -delta = e_1 h_1 + e_2 h_2 + ..., e_1 >> e_2
// >> ... > 0: every point of it then lies inside one tile. Those tiles are the B = I + J with J the
// h's that are independent of I and of the h's before them: modulo I, -delta is in the cone of J and
// each other h has positive reduced cost. So each independent I is met once, its tile cuts Z in a
// translate of the sum of its segments, and a segment's low end belongs to it exactly when -delta has
// a positive coordinate along it.
import type { Arrangement } from '../arrangement/arrangement.js';
import {
  addNumbers,
  commonDenominator,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { compareNumbers, signOfNumber } from '../exact/number-order.js';
import type { Ring } from '../exact/ring.js';
import { unitRange } from '../input/generators.js';
import { binomial } from './exterior-steps.js';
import { plainIntegerRing, squaredMinorBound } from './plain-ring.js';

/** shift + the sum over its generators of the segments, each without one of its ends. */
export interface Tile {
  /** 0-based independent generators, ascending; none for the tile that is one point. */
  readonly generators: readonly number[];
  /** d numbers: where each of them stands at its low end, and all others at theirs. */
  readonly shift: readonly ExactNumber[];
  /** For each of `generators` the end that does not belong to the tile. */
  readonly open: readonly ('low' | 'high')[];
  /** 0-based generators outside that stand at their high end, ascending; the rest stand at the low. */
  readonly raised: readonly number[];
}

/** As many tiles as independent sets; at most these. */
export function boundTiles(arrangement: Arrangement): number {
  const n = arrangement.generators.normals.length;
  let tiles = 0;
  for (let k = 0; k <= arrangement.rank; k++) tiles += binomial(n, k);
  return tiles;
}

/** Every tile, sets depth first in the order of the generators. Exact, over Q and quadratic fields. */
export function* tilesOf<E>(arrangement: Arrangement<E>): Generator<Tile> {
  const { ring, rank, hyperplanes, hyperplaneOf, orientationOf } = arrangement;
  // Only directions matter to the rule: a generator's length moves no sign.
  const vectors = Array.from(hyperplaneOf, (h, j) => {
    const { essential } = hyperplanes[h];
    return orientationOf[j] > 0 ? essential : essential.map((x) => ring.negate(x));
  });
  const place = new TilePlace(arrangement);
  const cells =
    ring.radicand === null && fitsPlain(vectors as unknown as bigint[][], rank)
      ? cellsOf(
          plainIntegerRing,
          (vectors as unknown as bigint[][]).map((v) => v.map(Number)),
          rank,
        )
      : cellsOf(ring, vectors, rank);
  for (const { generators, open, raised } of cells) {
    yield { generators, shift: place.shiftOf(raised), open, raised };
  }
}

/** Twice the square of a minor below 2^53: all that a step of fraction-free elimination meets. */
function fitsPlain(vectors: readonly (readonly bigint[])[], rank: number): boolean {
  return squaredMinorBound(vectors, rank) < 1n << 52n;
}

/** Adds up the ends of generators, over one denominator; a vector's root parts follow its integers. */
class TilePlace {
  private readonly dimension: number;
  private readonly denominator: bigint;
  private readonly low: readonly bigint[];
  private readonly steps: readonly (readonly bigint[])[];

  constructor(arrangement: Arrangement) {
    const { normals, ranges, radicand } = arrangement.generators;
    const times = (t: ExactNumber, normal: readonly ExactNumber[]): ExactNumber[] =>
      normal.map((x) => multiplyNumbers(t, x, radicand ?? 0n));
    const lows = normals.map((normal, j) => times((ranges?.[j] ?? unitRange).low, normal));
    const steps = normals.map((normal, j) => {
      const { low, high } = ranges?.[j] ?? unitRange;
      return times(addNumbers(high, negateNumber(low)), normal);
    });
    const denominator = commonDenominator([...lows, ...steps].flat());
    const numerators = (v: readonly ExactNumber[]): bigint[] => [
      ...v.map((x) => (x.a * denominator) / x.d),
      ...(radicand === null ? [] : v.map((x) => (x.b * denominator) / x.d)),
    ];
    this.dimension = arrangement.dimension;
    this.denominator = denominator;
    this.low = lows.map(numerators).reduce((sum, v) => sum.map((x, i) => x + v[i]));
    this.steps = steps.map(numerators);
  }

  shiftOf(raised: readonly number[]): ExactNumber[] {
    const sum = this.low.slice();
    for (const j of raised) {
      const step = this.steps[j];
      for (let i = 0; i < sum.length; i++) sum[i] += step[i];
    }
    const d = this.dimension;
    const roots = sum.length > d;
    return sum.slice(0, d).map((a, i) => exactNumber(a, roots ? sum[d + i] : 0n, this.denominator));
  }
}

interface Cell {
  readonly generators: readonly number[];
  readonly open: readonly ('low' | 'high')[];
  readonly raised: readonly number[];
}

/**
 * The tableau of a basis I + J: row i holds, times the pivot, the coordinate of every one of the n + r
 * vectors along the basis vector of that row. Columns n + c are the h's.
 */
interface Tableau<E> {
  readonly rows: readonly (readonly E[])[];
  readonly basis: readonly number[];
  readonly pivot: E;
}

function* cellsOf<E>(
  ring: Ring<E>,
  vectors: readonly (readonly E[])[],
  rank: number,
): Generator<Cell> {
  const n = vectors.length;
  const start: Tableau<E> = {
    rows: Array.from({ length: rank }, (_, c) => [
      ...vectors.map((v) => v[c]),
      ...Array.from({ length: rank }, (__, other) => (other === c ? ring.one : ring.zero)),
    ]),
    basis: Array.from({ length: rank }, (_, c) => n + c),
    pivot: ring.one,
  };
  function* descend(tableau: Tableau<E>, from: number): Generator<Cell> {
    yield cellAt(ring, tableau, n);
    for (let j = from; j < n; j++) {
      // The h to leave is the last that j involves: those before it stay independent of I + j.
      let leaving = -1;
      tableau.basis.forEach((b, i) => {
        if (b < n || ring.sign(tableau.rows[i][j]) === 0) return;
        if (leaving < 0 || b > tableau.basis[leaving]) leaving = i;
      });
      if (leaving >= 0) yield* descend(exchanged(ring, tableau, leaving, j), j + 1);
    }
  }
  yield* descend(start, 0);
}

function exchanged<E>(ring: Ring<E>, tableau: Tableau<E>, row: number, j: number): Tableau<E> {
  const { rows, basis, pivot } = tableau;
  // Edmonds' integer pivoting; the common pivot is kept positive, so that signs can be read off.
  const negative = ring.sign(rows[row][j]) < 0;
  const pivotRow = negative ? rows[row].map((x) => ring.negate(x)) : rows[row];
  const next = pivotRow[j];
  return {
    rows: rows.map((other, i) => {
      if (i === row) return pivotRow;
      const factor = other[j];
      return other.map((x, c) =>
        ring.divideExactly(
          ring.subtract(ring.multiply(next, x), ring.multiply(factor, pivotRow[c])),
          pivot,
        ),
      );
    }),
    basis: basis.map((b, i) => (i === row ? j : b)),
    pivot: next,
  };
}

function cellAt<E>(ring: Ring<E>, { rows, basis }: Tableau<E>, n: number): Cell {
  const rank = rows.length;
  // Basis rows from the dearest down: the first that a vector involves decides its reduced cost.
  const dearest = Array.from(basis.keys()).sort((a, b) => basis[b] - basis[a]);
  const raised: number[] = [];
  for (let j = 0; j < n; j++) {
    if (basis.includes(j)) continue;
    const row = dearest.find((i) => ring.sign(rows[i][j]) !== 0);
    if (row !== undefined && basis[row] > j && ring.sign(rows[row][j]) > 0) raised.push(j);
  }
  const inside = Array.from(basis.keys())
    .filter((i) => basis[i] < n)
    .sort((a, b) => basis[a] - basis[b]);
  const open = inside.map((i) => {
    // The coordinate of -delta: the first h outside the basis that involves the generator decides.
    for (let c = 0; c < rank; c++) {
      if (basis.includes(n + c)) continue;
      const sign = ring.sign(rows[i][n + c]);
      if (sign !== 0) return sign > 0 ? 'high' : 'low';
    }
    throw new Error('tiling: the coordinate vectors do not span');
  });
  return { generators: inside.map((i) => basis[i]), open, raised };
}

/** Says for points whether they lie in a tile; made once for an arrangement. */
export class TileSearch<E = unknown> {
  private readonly arrangement: Arrangement<E>;

  constructor(arrangement: Arrangement<E>) {
    this.arrangement = arrangement;
  }

  /** Whether the point, d numbers, is in the tile: exact. */
  contains(tile: Tile, point: readonly ExactNumber[]): boolean {
    const { normals, ranges, radicand } = this.arrangement.generators;
    const rest = point.map((x, i) => addNumbers(x, negateNumber(tile.shift[i])));
    const columns = tile.generators.map((j) => normals[j]);
    const coordinates = solve(columns, rest, radicand ?? 0n);
    if (coordinates === null) return false;
    return coordinates.every((x, s) => {
      const { low, high } = ranges?.[tile.generators[s]] ?? unitRange;
      const length = addNumbers(high, negateNumber(low));
      const fromLow = signOfNumber(x, radicand);
      const toHigh = compareNumbers(length, x, radicand);
      return tile.open[s] === 'low' ? fromLow > 0 && toHigh >= 0 : fromLow >= 0 && toHigh > 0;
    });
  }

  /** The tiles of the list that contain the point: one if it is in Z and the list complete. */
  containing(tiles: Iterable<Tile>, point: readonly ExactNumber[]): Tile[] {
    return [...tiles].filter((tile) => this.contains(tile, point));
  }
}

/** x with the sum of x_s columns_s = target, the columns independent; null where there is none. */
function solve(
  columns: readonly (readonly ExactNumber[])[],
  target: readonly ExactNumber[],
  k: bigint,
): ExactNumber[] | null {
  const rows = target.map((t, i) => [...columns.map((column) => column[i]), t]);
  const width = columns.length;
  for (let s = 0; s < width; s++) {
    const at = rows.findIndex((row, i) => i >= s && !isZero(row[s]));
    if (at < 0) throw new RangeError('tiling: tile: expected independent generators');
    [rows[s], rows[at]] = [rows[at], rows[s]];
    const pivot = rows[s][s];
    rows[s] = rows[s].map((x) => divideNumbers(x, pivot, k));
    rows.forEach((row, i) => {
      const factor = row[s];
      if (i === s || isZero(factor)) return;
      rows[i] = row.map((x, c) =>
        addNumbers(x, negateNumber(multiplyNumbers(factor, rows[s][c], k))),
      );
    });
  }
  return rows.slice(width).every((row) => isZero(row[width]))
    ? rows.slice(0, width).map((row) => row[width])
    : null;
}
