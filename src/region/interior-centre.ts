// Where to look for a small interior point, in doubles: nothing here decides anything. A point of
// the region with a required slack on every wall and a least sum of slacks (dual simplex method, C.
// Lemke, 1954), for two requirements: slack 1, which every interior integer point of an integer
// arrangement has, and so much slack that rounding each coordinate cannot leave the region.
import { bitAt } from '../bits/signs.js';

const REQUIREMENTS = 2;

/** Finds central directions of regions in essential coordinates. */
export class CentreFinder {
  /** Two directions of `rank` entries, valid until the next call. */
  readonly directions: Float64Array;
  private readonly rank: number;
  private readonly width: number;
  /** A row a hyperplane: its essential normal scaled to about 1. */
  private readonly rows: Float64Array;
  /** Two required slacks a hyperplane, in the row's scale. */
  private readonly slacks: Float64Array;
  /** A row for each wall, and the objective; `rank` columns and one for each requirement. */
  private tableau: Float64Array;
  /** What a row or column stands for: slack i is i, coordinate j is ~j. */
  private basic: Int32Array;
  private readonly free: Int32Array;

  constructor(rank: number, rows: Float64Array, slacks: Float64Array) {
    this.rank = rank;
    this.width = rank + REQUIREMENTS;
    this.rows = rows;
    this.slacks = slacks;
    this.directions = new Float64Array(REQUIREMENTS * rank);
    this.tableau = new Float64Array(0);
    this.basic = new Int32Array(0);
    this.free = new Int32Array(rank);
  }

  /**
   * Looks in the region of the sign word with the `count` walls given (at least rank independent
   * ones). Returns how many of the directions were found, 0 to 2: rounding may stop the search.
   */
  find(words: Int32Array, offset: number, walls: ArrayLike<number>, count: number): number {
    const { rank, width, rows, slacks, free, directions } = this;
    if (this.basic.length < count) {
      this.basic = new Int32Array(2 * count);
      this.tableau = new Float64Array((2 * count + 1) * width);
    }
    const { tableau, basic } = this;
    for (let i = 0; i < count; i++) {
      const h = walls[i];
      const sign = bitAt(words, offset, h) === 1 ? 1 : -1;
      for (let j = 0; j < rank; j++) tableau[i * width + j] = sign * rows[h * rank + j];
      for (let k = 0; k < REQUIREMENTS; k++) {
        tableau[i * width + rank + k] = -slacks[h * REQUIREMENTS + k];
      }
      basic[i] = i;
    }
    const objective = count * width;
    tableau.fill(0, objective, objective + width);
    for (let q = 0; q < rank; q++) {
      free[q] = ~q;
      let best = -1;
      let size = 1e-13;
      for (let i = 0; i < count; i++) {
        const entry = Math.abs(tableau[i * width + q]);
        if (basic[i] >= 0 && entry > size) {
          size = entry;
          best = i;
        }
      }
      if (best < 0) return 0;
      this.exchange(count, best, q);
    }
    tableau.fill(1, objective, objective + rank);
    for (let k = 0; k < REQUIREMENTS; k++) {
      if (!this.descend(count, rank + k)) return k;
      for (let i = 0; i < count; i++) {
        if (basic[i] < 0) directions[k * rank + ~basic[i]] = tableau[i * width + rank + k];
      }
    }
    return REQUIREMENTS;
  }

  /** Dual simplex steps until the constants in `column` are feasible; false when it gives up. */
  private descend(count: number, column: number): boolean {
    const { rank, width, tableau, basic } = this;
    const objective = count * width;
    for (let step = 0; step <= 20 + 2 * count; step++) {
      let leaving = -1;
      let least = -1e-12;
      for (let i = 0; i < count; i++) {
        const value = tableau[i * width + column];
        if (basic[i] >= 0 && value < least) {
          least = value;
          leaving = i;
        }
      }
      if (leaving < 0) return true;
      let entering = -1;
      let ratio = Number.POSITIVE_INFINITY;
      for (let j = 0; j < rank; j++) {
        const entry = tableau[leaving * width + j];
        if (entry > 1e-13 && tableau[objective + j] / entry < ratio) {
          ratio = tableau[objective + j] / entry;
          entering = j;
        }
      }
      if (entering < 0) return false;
      this.exchange(count, leaving, entering);
    }
    return false;
  }

  private exchange(count: number, p: number, q: number): void {
    const { width, tableau, basic, free } = this;
    const start = p * width;
    const inverse = 1 / tableau[start + q];
    for (let i = 0; i <= count; i++) {
      if (i === p) continue;
      const row = i * width;
      const factor = tableau[row + q] * inverse;
      if (factor === 0) continue;
      for (let j = 0; j < width; j++) tableau[row + j] -= factor * tableau[start + j];
      tableau[row + q] = factor;
    }
    for (let j = 0; j < width; j++) tableau[start + j] *= -inverse;
    tableau[start + q] = inverse;
    const name = basic[p];
    basic[p] = free[q];
    free[q] = name;
  }
}
