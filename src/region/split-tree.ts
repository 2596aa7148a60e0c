// The regions of a flat while its classes are inserted one at a time: a binary tree whose nodes are
// the splits made so far and whose leaves are the regions. A split is a region of the restriction to
// the class inserted; its sign word, read at the classes of the nodes, leads from the root to the
// leaf it splits. Along any path the classes ascend.
import { grownRows, type WordTable } from '../bits/signs.js';
import type { FlatLevel } from './level.js';

const STRIDE = 4;

/** Node v is row v of the splits' word table; its two children, its hyperplane, its class. */
export class SplitTree {
  #nodes = new Int32Array(STRIDE * 256);
  #root = -1;
  readonly #pathNode: Int32Array;
  readonly #pathHyperplane: Int32Array;
  readonly #wordsPerRow: number;

  constructor(hyperplanes: number, wordsPerRow: number) {
    this.#pathNode = new Int32Array(hyperplanes + 1);
    this.#pathHyperplane = new Int32Array(hyperplanes + 1);
    this.#wordsPerRow = wordsPerRow;
  }

  clear(): void {
    this.#root = -1;
  }

  /**
   * Adds rows [from, to) of `splits`, all of class c with least hyperplane h. Rows that come sorted
   * share their path with the row before up to the first hyperplane where they differ: the walk
   * starts there, not at the root.
   */
  insert(splits: WordTable, from: number, to: number, c: number, h: number): void {
    const W = this.#wordsPerRow;
    const words = splits.words;
    if (to * STRIDE > this.#nodes.length) this.#grow(from, to);
    const nodes = this.#nodes;
    const pathNode = this.#pathNode;
    const pathHyperplane = this.#pathHyperplane;
    let depth = 0;
    let v = from;
    if (this.#root < 0) {
      nodes[v * STRIDE] = -1;
      nodes[v * STRIDE + 1] = -1;
      nodes[v * STRIDE + 2] = h;
      nodes[v * STRIDE + 3] = c;
      this.#root = v++;
    }
    for (; v < to; v++) {
      const row = v * W;
      const own = v * STRIDE;
      nodes[own] = -1;
      nodes[own + 1] = -1;
      nodes[own + 2] = h;
      nodes[own + 3] = c;
      let node = this.#root;
      if (depth > 0) {
        const first = W === 2 ? firstDifferenceOfTwo(words, row) : firstDifference(words, row, W);
        while (depth > 1 && pathHyperplane[depth - 1] > first) depth--;
        node = pathNode[--depth];
      }
      let slot: number;
      do {
        const at = node * STRIDE;
        const hyperplane = nodes[at + 2];
        pathNode[depth] = node;
        pathHyperplane[depth++] = hyperplane;
        slot = at + ((words[row + (hyperplane >> 5)] >>> hyperplane) & 1);
        node = nodes[slot];
      } while (node >= 0);
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
    if (sorted) this.#sortedLeaves(splits, level, out);
    else {
      for (let v = 0; v < count; v++) {
        if (this.#nodes[v * STRIDE] < 0) this.#appendLeaf(v, 0, splits, level, out);
        if (this.#nodes[v * STRIDE + 1] < 0) this.#appendLeaf(v, 1, splits, level, out);
      }
    }
  }

  #sortedLeaves(splits: WordTable, level: FlatLevel, out: WordTable): void {
    const nodes = this.#nodes;
    const stack = this.#pathNode;
    let depth = 0;
    let node = this.#root;
    for (;;) {
      for (;;) {
        stack[depth++] = node;
        const left = nodes[node * STRIDE];
        if (left < 0) break;
        node = left;
      }
      this.#appendLeaf(node, 0, splits, level, out);
      let right = -1;
      while (depth > 0 && right < 0) {
        node = stack[--depth];
        right = nodes[node * STRIDE + 1];
        if (right < 0) this.#appendLeaf(node, 1, splits, level, out);
      }
      if (right < 0) return;
      node = right;
    }
  }

  /** The region on the given side of split v: the split's word and the mask of its class on that side. */
  #appendLeaf(v: number, side: number, splits: WordTable, level: FlatLevel, out: WordTable): void {
    const W = this.#wordsPerRow;
    const nodes = this.#nodes;
    const { along, against } = level;
    const from = splits.words;
    const into = out.words;
    const h = nodes[v * STRIDE + 2];
    const c = nodes[v * STRIDE + 3] * W;
    const mask = ((along[c + (h >> 5)] >>> h) & 1) === side ? along : against;
    const row = v * W;
    const at = out.rows++ * W;
    if (W === 2) {
      into[at] = from[row] | mask[c];
      into[at + 1] = from[row + 1] | mask[c + 1];
      return;
    }
    for (let w = 0; w < W; w++) into[at + w] = from[row + w] | mask[c + w];
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
