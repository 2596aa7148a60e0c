// Regions by deletion and restriction with sign words. Hyperplanes are inserted one at a time; the
// regions that hyperplane i splits are the regions of the hyperplanes before it restricted to it, and
// those are found in the same way one dimension lower, down to dimension 3, where a sweep lists them.
// Splitting a region is joining a mask to a sign word: only dimensions 3 and 2 compute.
import { WordTable } from '../bits/signs.js';
import type { Ring } from '../exact/ring.js';
import type { Chart } from './chart.js';
import { Crossings } from './crossings.js';
import { FlatLevel } from './level.js';
import { Restriction } from './restriction.js';
import { SplitTree } from './split-tree.js';
import { Sweep } from './sweep.js';

/** Every class counts. */
export const ALL = 2 ** 30;

/** Work space for n hyperplanes of rank at most r; levels, tables and trees are reused throughout. */
export class RegionEnumerator {
  readonly wordsPerRow: number;
  readonly levels: FlatLevel[] = [];
  /** Table e + 1 receives the regions of the flat at level e. */
  readonly tables: WordTable[] = [];
  readonly #trees: SplitTree[] = [];
  readonly #ring: Ring<unknown>;
  readonly #restriction: Restriction;
  readonly #sweep: Sweep;

  constructor(ring: Ring<unknown>, hyperplanes: number, rank: number, wordsPerRow: number) {
    this.#ring = ring;
    this.wordsPerRow = wordsPerRow;
    this.#restriction = new Restriction(ring, hyperplanes, rank, wordsPerRow);
    this.#sweep = new Sweep(new Crossings(ring, hyperplanes), hyperplanes, wordsPerRow);
    for (let e = 0; e <= rank + 1; e++) {
      this.levels.push(new FlatLevel(e, e > rank ? 0 : hyperplanes, wordsPerRow));
      this.tables.push(new WordTable(wordsPerRow, e >= 3 ? 1024 : 1));
      this.#trees.push(new SplitTree(e >= 4 ? hyperplanes : 0, wordsPerRow));
    }
  }

  /** Puts the flat of a chart at the level of its dimension. */
  load(chart: Chart): void {
    const level = this.levels[chart.normals[0].length];
    level.adopt(
      this.#ring,
      chart.normals.map((row) => row.slice()),
      chart.pivot,
    );
    level.along.set(chart.along);
    level.against.set(chart.against);
    level.least.set(chart.least);
  }

  /** Restricts the flat at level e to its class c >= 1, into level e - 1. */
  restrict(e: number, c: number): void {
    this.#restriction.restrict(this.levels[e], c, this.levels[e - 1]);
  }

  /**
   * Appends to table e + 1 the regions, on the positive side of class 0, of those classes of the flat
   * at level e whose least hyperplane is below `bound`. Levels and tables below e + 1 are overwritten.
   */
  regions(e: number, bound: number, sorted = true): void {
    const level = this.levels[e];
    const out = this.tables[e + 1];
    if (e === 3) {
      this.#sweep.planeCells(level, bound, out);
      return;
    }
    if (e === 2) {
      this.#sweep.lineCells(level, bound, out);
      return;
    }
    if (e === 1) {
      const W = this.wordsPerRow;
      out.reserve(out.rows + 1);
      for (let w = 0; w < W; w++) out.words[out.rows * W + w] = level.along[w];
      out.rows++;
      return;
    }
    const splits = this.tables[e];
    const tree = this.#trees[e];
    splits.rows = 0;
    tree.clear();
    for (let c = 1; c < level.classes && level.least[c] < bound; c++) {
      const from = splits.rows;
      this.restrict(e, c);
      this.regions(e - 1, level.least[c]);
      tree.insert(splits, from, splits.rows, level, c);
    }
    tree.leaves(splits, level, sorted, out);
  }
}
