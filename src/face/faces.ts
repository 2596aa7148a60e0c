// Every face of an arrangement, flat by flat. The faces that span a flat are the regions of the
// restriction to it, so each flat is found once and the region enumerator run on it.
//
// A flat X is the intersection of a chain of hyperplanes: the least that contains X, then the least
// that contains X but not what is already cut out, and so on. Going down from a flat only through
// classes above the last one taken follows these chains and no others: no table of flats is needed.
import type { Arrangement } from '../arrangement/arrangement.js';
import { firstBit, fullMask, wordsFor } from '../bits/signs.js';
import { chartOf, insideFirst, separateClasses } from '../region/chart.js';
import { ALL, RegionEnumerator } from '../region/enumerator.js';

/** The faces that span one flat. Arrays are reused: read them during the visit only. */
export interface FlatFaces {
  /** Of the flat, above the lineality space: 0 to rank. */
  readonly dimension: number;
  /** W words: the hyperplanes that contain the flat. */
  readonly zero: Int32Array;
  /** Sign words of `rows` faces, W words each, from the start. */
  readonly words: Int32Array;
  readonly rows: number;
  /** Classes of hyperplanes that cut the flat, and W words a class for each orientation. */
  readonly classes: number;
  readonly along: Int32Array;
  readonly against: Int32Array;
  /** True when the negations are faces too (all flats but the smallest): bits flip outside `zero`. */
  readonly mirrored: boolean;
}

/** Visits every flat once, in an order fixed by the order of the hyperplanes. Nothing is kept. */
export function streamFaces(arrangement: Arrangement, visit: (faces: FlatFaces) => void): void {
  for (const faces of facesByFlat(arrangement)) visit(faces);
}

/** The same at the pace of whoever takes them, so that writing a long list can be interrupted. */
export function* facesByFlat(arrangement: Arrangement): Generator<FlatFaces> {
  const { ring, rank } = arrangement;
  const n = arrangement.hyperplanes.length;
  const W = wordsFor(n);
  const enumerator = new RegionEnumerator(ring, n, rank, W);
  const zeros = Array.from({ length: rank + 1 }, () => new Int32Array(W));
  function* descend(e: number, last: number): Generator<FlatFaces> {
    const table = enumerator.tables[e + 1];
    const zero = zeros[e];
    table.rows = 0;
    enumerator.regions(e, ALL, false);
    const { along, against, least, classes } = enumerator.levels[e];
    const { words, rows } = table;
    yield { dimension: e, zero, words, rows, classes, along, against, mirrored: true };
    if (e === 1) return;
    if (e === 2) {
      yield* raysOf(zero, words, rows, last);
      return;
    }
    const below = zeros[e - 1];
    for (let c = 1; c < classes; c++) {
      if (least[c] < last) continue;
      for (let w = 0; w < W; w++) below[w] = zero[w] | along[c * W + w] | against[c * W + w];
      enumerator.restrict(e, c);
      yield* descend(e - 1, least[c]);
    }
  }
  // The cells of a plane come in the order in which a walk meets them: two neighbours differ in the
  // class between them, and the ray on it has the signs of either where they agree.
  const all = fullMask(n);
  const [ray, cut, positive, negative] = [0, 1, 2, 3].map(() => new Int32Array(W));
  function* raysOf(zero: Int32Array, words: Int32Array, rows: number, last: number) {
    for (let i = 1; i < rows; i++) {
      for (let w = 0; w < W; w++) ray[w] = words[i * W + w] ^ words[(i - 1) * W + w];
      if (firstBit(ray, 0, W) < last) continue;
      for (let w = 0; w < W; w++) {
        cut[w] = zero[w] | ray[w];
        positive[w] = words[i * W + w] & ~ray[w];
        negative[w] = all[w] & ~cut[w] & ~positive[w];
      }
      yield {
        dimension: 1,
        zero: cut,
        words: positive,
        rows: 1,
        classes: 1,
        along: positive,
        against: negative,
        mirrored: true,
      };
    }
  }
  let classes = separateClasses(arrangement.hyperplanes.map((h) => h.essential));
  const inside = new Int32Array(W);
  for (let e = rank; e >= 1; e--) {
    // The flats inside all of the hyperplanes taken first so far, but not inside the next.
    const chart = chartOf(ring, classes);
    enumerator.load(chart);
    zeros[e].set(inside);
    yield* descend(e, -1);
    for (let w = 0; w < W; w++) inside[w] |= chart.along[w] | chart.against[w];
    classes = insideFirst(ring, chart);
  }
  const none = new Int32Array(W);
  yield {
    dimension: 0,
    zero: inside,
    words: none,
    rows: 1,
    classes: 0,
    along: none,
    against: none,
    mirrored: false,
  };
}

/** Faces by dimension above the lineality space, 0 to rank, by listing every one. */
export function countFaces(arrangement: Arrangement): number[] {
  const counts = new Array<number>(arrangement.rank + 1).fill(0);
  streamFaces(arrangement, ({ dimension, rows, mirrored }) => {
    counts[dimension] += mirrored ? 2 * rows : rows;
  });
  return counts;
}
