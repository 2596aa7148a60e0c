// The regions of a flat while its classes are inserted one at a time: a binary tree whose nodes are
// the splits made so far and whose leaves are the regions. A split is a region of the restriction to
// the class inserted; its sign word, read at the classes of the nodes, leads from the root to the
// leaf it splits. Along any path the classes ascend.
import { bitAt, grownRows, type WordTable } from '../bits/signs.js';
import { LimitError } from '../errors.js';
import type { FlatLevel } from './level.js';

const STRIDE = 4;
/** Most splits: twice their number, which names the leaves, fits 32 bits. */
const MOST_SPLITS = 2 ** 30;

/**
 * Node v is row v of the splits' word table: its two children, its hyperplane, and 2 c + 1 or 2 c for
 * its class c, whose normal has that hyperplane on its positive or its negative side.
 */
export class SplitTree {
  #nodes = new Int32Array(STRIDE * 256);
  #root = -1;
  /** Scratch: 2 v + side for the leaf on a side of split v. */
  #leaves = new Int32Array(256);
  /** Scratch: the walk's nodes and their hyperplanes in pairs. One array, to spare registers. */
  readonly #path: Int32Array;
  readonly #wordsPerRow: number;

  constructor(hyperplanes: number, wordsPerRow: number) {
    this.#path = new Int32Array(2 * hyperplanes + 2);
    this.#wordsPerRow = wordsPerRow;
  }

  clear(): void {
    this.#root = -1;
  }

  /**
   * Adds rows [from, to) of `splits`, all of class c of the level. Rows that come sorted
   * share their path with the row before up to the first hyperplane where they differ: the walk
   * starts there, not at the root.
   */
  insert(splits: WordTable, from: number, to: number, level: FlatLevel, c: number): void {
    const W = this.#wordsPerRow;
    const h = level.least[c];
    const oriented = 2 * c + bitAt(level.along, c * W, h);
    const words = splits.words;
    if (to > MOST_SPLITS) {
      throw new LimitError(
        'the list of regions',
        `more than ${2 * MOST_SPLITS} regions`,
        `${2 * MOST_SPLITS} regions`,
        'take their number from the characteristic polynomial, which lists no regions',
      );
    }
    if (to * STRIDE > this.#nodes.length) this.#grow(from, to);
    const nodes = this.#nodes;
    const path = this.#path;
    let depth = 0;
    let v = from;
    if (this.#root < 0) {
      nodes[v * STRIDE] = -1;
      nodes[v * STRIDE + 1] = -1;
      nodes[v * STRIDE + 2] = h;
      nodes[v * STRIDE + 3] = oriented;
      this.#root = v++;
    }
    for (; v < to; v++) {
      const row = v * W;
      const own = v * STRIDE;
      nodes[own] = -1;
      nodes[own + 1] = -1;
      nodes[own + 2] = h;
      nodes[own + 3] = oriented;
      let node = this.#root;
      if (depth > 0) {
        const first = W === 2 ? firstDifferenceOfTwo(words, row) : firstDifference(words, row, W);
        while (depth > 2 && path[depth - 1] > first) depth -= 2;
        depth -= 2;
        node = path[depth];
      }
      // Hyperplanes ascend along the path, so the words of the row are used up one by one.
      let slot = 0;
      for (let w = 0; node >= 0; w++) {
        const word = words[row + w];
        const end = (w + 1) << 5;
        do {
          const at = node * STRIDE;
          const hyperplane = nodes[at + 2];
          if (hyperplane >= end) break;
          path[depth] = node;
          path[depth + 1] = hyperplane;
          depth += 2;
          slot = at + ((word >>> hyperplane) & 1);
          node = nodes[slot];
        } while (node >= 0);
      }
      nodes[slot] = v;
    }
  }

  #grow(used: number, needed: number): void {
    const grown = new Int32Array(grownRows(needed) * STRIDE);
    grown.set(this.#nodes.subarray(0, used * STRIDE));
    this.#nodes = grown;
  }

  /** Appends the leaves to `out`, depth first and so sorted when `sorted`; else split by split, faster. */
  leaves(splits: WordTable, level: FlatLevel, sorted: boolean, out: WordTable): void {
    const count = splits.rows;
    out.reserve(out.rows + count + 1);
    if (count === 0) {
      this.#onlyLeaf(level, out);
      return;
    }
    if (this.#leaves.length <= count) this.#leaves = new Int32Array(grownRows(count + 1));
    if (sorted) this.#orderDepthFirst();
    else this.#orderBySplits(count);
    const leaves = this.#leaves;
    const W = this.#wordsPerRow;
    const nodes = this.#nodes;
    const from = splits.words;
    const into = out.words;
    const { along, against } = level;
    let at = out.rows * W;
    for (let i = 0; i <= count; i++) {
      const v = leaves[i] >> 1;
      const side = leaves[i] & 1;
      const oriented = nodes[v * STRIDE + 3];
      const c = (oriented >> 1) * W;
      // All ones where the side is that of the class's normal, a mask instead of a branch.
      const straight = -(1 ^ side ^ (oriented & 1));
      const row = v * W;
      if (W === 2) {
        into[at] = from[row] | (along[c] & straight) | (against[c] & ~straight);
        into[at + 1] = from[row + 1] | (along[c + 1] & straight) | (against[c + 1] & ~straight);
        at += 2;
      } else {
        const mask = straight ? along : against;
        for (let w = 0; w < W; w++) into[at++] = from[row + w] | mask[c + w];
      }
    }
    out.rows += count + 1;
  }

  #orderBySplits(count: number): void {
    const nodes = this.#nodes;
    const leaves = this.#leaves;
    let at = 0;
    for (let v = 0; v < count; v++) {
      if (nodes[v * STRIDE] < 0) leaves[at++] = 2 * v;
      if (nodes[v * STRIDE + 1] < 0) leaves[at++] = 2 * v + 1;
    }
  }

  #orderDepthFirst(): void {
    const nodes = this.#nodes;
    const leaves = this.#leaves;
    const stack = this.#path;
    let at = 0;
    let depth = 0;
    let node = this.#root;
    for (;;) {
      for (;;) {
        stack[depth++] = node;
        const left = nodes[node * STRIDE];
        if (left < 0) break;
        node = left;
      }
      leaves[at++] = 2 * node;
      let right = -1;
      while (depth > 0 && right < 0) {
        node = stack[--depth];
        right = nodes[node * STRIDE + 1];
        if (right < 0) leaves[at++] = 2 * node + 1;
      }
      if (right < 0) return;
      node = right;
    }
  }

  /** No split: the positive side of class 0 is one region, and every class lies on one side of it. */
  #onlyLeaf(level: FlatLevel, out: WordTable): void {
    const W = this.#wordsPerRow;
    const at = out.rows * W;
    for (let w = 0; w < W; w++) {
      let word = 0;
      for (let c = 0; c < level.classes; c++) word |= level.along[c * W + w];
      out.words[at + w] = word;
    }
    out.rows++;
  }
}

function firstDifference(words: Int32Array, row: number, W: number): number {
  for (let w = 0; w < W; w++) {
    const x = words[row + w] ^ words[row - W + w];
    if (x !== 0) return (w << 5) + 31 - Math.clz32(x & -x);
  }
  return -1;
}

function firstDifferenceOfTwo(words: Int32Array, row: number): number {
  const x = words[row] ^ words[row - 2];
  if (x !== 0) return 31 - Math.clz32(x & -x);
  const y = words[row + 1] ^ words[row - 1];
  return 63 - Math.clz32(y & -y);
}
