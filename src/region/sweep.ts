// Cells of the arrangements of dimension 3 and 2, in the chart where coordinate 0 is 1: no tree, a
// rule that names each cell once.
//
// Dimension 3 is a set of lines in a plane. A cell other than the lowest has a lower boundary, and
// the leftmost edge of that belongs to exactly one line: walking a line from the left, the cell
// above it is new at the start, and after a crossing exactly when some line of greater slope passes
// through it (otherwise the lower boundary comes from further left). A vertical line counts as the
// steepest, tilted a little to the right: above it is to its left.
import type { WordTable } from '../bits/signs.js';
import type { Crossings } from './crossings.js';
import type { FlatLevel } from './level.js';

/** Sweeps for n hyperplanes in W words a row; scratch reused between calls. */
export class Sweep {
  readonly #crossings: Crossings;
  readonly #wordsPerRow: number;
  /** Per class of a plane: 1 where above the line is its positive side. */
  readonly #abovePositive: Uint8Array;
  /** Row per class: all hyperplanes that change sign where the class is crossed. */
  readonly #changes: Int32Array;
  /** Per class: its only hyperplane, or -1 where several change at once. */
  readonly #single: Int32Array;
  readonly #current: Int32Array;

  constructor(crossings: Crossings, hyperplanes: number, wordsPerRow: number) {
    this.#crossings = crossings;
    this.#wordsPerRow = wordsPerRow;
    this.#abovePositive = new Uint8Array(hyperplanes);
    this.#changes = new Int32Array(hyperplanes * wordsPerRow);
    this.#single = new Int32Array(hyperplanes);
    this.#current = new Int32Array(wordsPerRow);
  }

  /**
   * Appends one sign word for each region, on the positive side of class 0, of the classes of a
   * level 3 whose least hyperplane is below `bound`. Bits of the others are those of some point of
   * the region.
   */
  planeCells(level: FlatLevel, bound: number, out: WordTable): void {
    const { classes, least } = level;
    let active = 1;
    while (active < classes && least[active] < bound) active++;
    const lines = active - 1;
    out.reserve(out.rows + 2 + lines + (lines * (lines - 1)) / 2);
    this.#orientLines(level);
    this.#lowestCell(level, out);
    if (this.#wordsPerRow === 2) {
      for (let c = 1; c < active; c++) this.#walkTwoWords(level, c, active, out);
    } else {
      this.#findChanges(level);
      for (let c = 1; c < active; c++) this.#walk(level, c, active, out);
    }
  }

  /** The same for a level 2: the cells of a line, cut by points. */
  lineCells(level: FlatLevel, bound: number, out: WordTable): void {
    const W = this.#wordsPerRow;
    const { classes, least } = level;
    let active = 1;
    while (active < classes && least[active] < bound) active++;
    const crossings = this.#crossings;
    crossings.alongItself(level, active);
    out.reserve(out.rows + active);
    this.#findChanges(level);
    const current = this.#current;
    for (let w = 0; w < W; w++) current[w] = level.along[w];
    this.#applyStart(level);
    this.#append(out);
    for (let i = 0; i < crossings.count; i++) {
      this.#cross(i);
      this.#append(out);
    }
  }

  #orientLines(level: FlatLevel): void {
    const above = this.#abovePositive;
    if (!level.plain) {
      const ring = this.#crossings.ring;
      level.elements.forEach((row, c) => {
        const side = ring.sign(row[2]) || -ring.sign(row[1]);
        above[c] = side > 0 ? 1 : 0;
      });
      return;
    }
    const { entries, classes } = level;
    for (let c = 1; c < classes; c++) {
      const rise = entries[3 * c + 2];
      above[c] = rise > 0 || (rise === 0 && entries[3 * c + 1] < 0) ? 1 : 0;
    }
  }

  #findChanges(level: FlatLevel): void {
    const W = this.#wordsPerRow;
    const { along, against, classes } = level;
    const changes = this.#changes;
    for (let c = 0; c < classes; c++) {
      let single = -1;
      for (let w = 0; w < W; w++) {
        const x = along[c * W + w] | against[c * W + w];
        changes[c * W + w] = x;
        if (x === 0) continue;
        single = single === -1 && (x & (x - 1)) === 0 ? (w << 5) + 31 - Math.clz32(x) : -2;
      }
      this.#single[c] = single < 0 ? -1 : single;
    }
  }

  #lowestCell(level: FlatLevel, out: WordTable): void {
    const W = this.#wordsPerRow;
    const { along, against, classes } = level;
    const above = this.#abovePositive;
    const at = out.rows * W;
    const words = out.words;
    for (let w = 0; w < W; w++) words[at + w] = along[w];
    for (let c = 1; c < classes; c++) {
      const mask = above[c] === 1 ? against : along;
      for (let w = 0; w < W; w++) words[at + w] |= mask[c * W + w];
    }
    out.rows++;
  }

  #walkTwoWords(level: FlatLevel, c: number, active: number, out: WordTable): void {
    const crossings = this.#crossings;
    crossings.alongLine(level, c, active);
    const { along, against, classes } = level;
    const above = this.#abovePositive;
    const { startsPositive, position, order, count, firstWaiting, nextWaiting } = crossings;
    startsPositive[c] = above[c];
    let word0 = along[0];
    let word1 = along[1];
    // Sides come in no order that a processor could foresee: masks and a late step instead of branches.
    for (let k = 1; k < classes; k++) {
      const positive = -startsPositive[k];
      word0 |= (along[2 * k] & positive) | (against[2 * k] & ~positive);
      word1 |= (along[2 * k + 1] & positive) | (against[2 * k + 1] & ~positive);
    }
    const words = out.words;
    let at = 2 * out.rows;
    words[at++] = word0;
    words[at++] = word1;
    for (let i = 0; i < count; ) {
      const here = position[i];
      let closed = 1;
      do {
        const k = order[i];
        word0 ^= along[2 * k] | against[2 * k];
        word1 ^= along[2 * k + 1] | against[2 * k + 1];
        for (let l = firstWaiting[i]; l >= 0; l = nextWaiting[l]) {
          word0 ^= along[2 * l] | against[2 * l];
          word1 ^= along[2 * l + 1] | against[2 * l + 1];
        }
        // The line starts above k exactly where k has the greater slope.
        closed &= startsPositive[k] ^ above[k];
        i++;
      } while (i < count && position[i] === here);
      words[at] = word0;
      words[at + 1] = word1;
      at += 2 - 2 * closed;
    }
    // Not a shift: past 2^30 rows that would wrap.
    out.rows = at / 2;
  }

  #walk(level: FlatLevel, c: number, active: number, out: WordTable): void {
    const crossings = this.#crossings;
    crossings.alongLine(level, c, active);
    const W = this.#wordsPerRow;
    const above = this.#abovePositive;
    const current = this.#current;
    const { startsPositive, position, order, count } = crossings;
    startsPositive[c] = above[c];
    for (let w = 0; w < W; w++) current[w] = level.along[w];
    this.#applyStart(level);
    this.#append(out);
    for (let i = 0; i < count; ) {
      const here = position[i];
      let opens = false;
      do {
        this.#cross(i);
        const k = order[i];
        if (startsPositive[k] === above[k]) opens = true;
        i++;
      } while (i < count && position[i] === here);
      if (opens) this.#append(out);
    }
  }

  /** Joins to the current word the sides on which the line starts. */
  #applyStart(level: FlatLevel): void {
    const W = this.#wordsPerRow;
    const { along, against, classes } = level;
    const current = this.#current;
    const { startsPositive } = this.#crossings;
    for (let k = 1; k < classes; k++) {
      const mask = startsPositive[k] === 1 ? along : against;
      const single = this.#single[k];
      if (single >= 0) current[single >> 5] |= mask[k * W + (single >> 5)];
      else for (let w = 0; w < W; w++) current[w] |= mask[k * W + w];
    }
  }

  /** Crosses the class of crossing i and those that wait for it. */
  #cross(i: number): void {
    const { order, firstWaiting, nextWaiting } = this.#crossings;
    this.#change(order[i]);
    for (let k = firstWaiting[i]; k >= 0; k = nextWaiting[k]) this.#change(k);
  }

  #change(k: number): void {
    const W = this.#wordsPerRow;
    const current = this.#current;
    const single = this.#single[k];
    if (single >= 0) current[single >> 5] ^= 1 << (single & 31);
    else for (let w = 0; w < W; w++) current[w] ^= this.#changes[k * W + w];
  }

  #append(out: WordTable): void {
    const W = this.#wordsPerRow;
    const words = out.words;
    const current = this.#current;
    const at = out.rows * W;
    for (let w = 0; w < W; w++) words[at + w] = current[w];
    out.rows++;
  }
}
