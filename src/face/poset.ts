// The face poset with its covers, in typed arrays. A face F of a flat X is covered, inside each flat Y
// one dimension up that contains X, by exactly two faces: X is cut out of Y by one class of
// hyperplanes, and the two lie on its two sides. Their sign words are F's with either mask joined.
import type { Arrangement } from '../arrangement/arrangement.js';
import { wordsFor } from '../bits/signs.js';
import { LimitError } from '../errors.js';
import { type FlatFaces, streamFaces } from './faces.js';

/** Faces and flats are numbered by ascending dimension; W = wordsPerRow. */
export interface FacePoset {
  readonly rank: number;
  readonly hyperplanes: number;
  readonly wordsPerRow: number;
  readonly faceCount: number;
  readonly flatCount: number;
  /** rank + 2 entries: faces of dimension k are [dimensionOffsets[k], dimensionOffsets[k + 1]). */
  readonly dimensionOffsets: Int32Array;
  /** For each face the flat that it spans. */
  readonly flatOf: Int32Array;
  readonly flatDimension: Uint8Array;
  /** W words a flat: the hyperplanes that contain it. */
  readonly flatZero: Int32Array;
  /** W words a face: 1 where positive, 0 where negative or zero. */
  readonly positive: Int32Array;
  /** faceCount + 1 entries: face f is covered by coverTargets[coverOffsets[f] .. coverOffsets[f + 1]). */
  readonly coverOffsets: Int32Array;
  /** Faces one dimension up, ascending for each face. */
  readonly coverTargets: Int32Array;
}

interface FlatRecord {
  readonly dimension: number;
  readonly zero: Int32Array;
  readonly words: Int32Array;
  readonly rows: number;
  readonly mirrored: boolean;
  readonly classes: number;
  readonly along: Int32Array;
  readonly against: Int32Array;
}

/**
 * Builds the whole poset. Memory: about 4 (2 W + 4) bytes a face and 4 bytes a cover. Throws LimitError
 * when more than `maximumFaces` faces appear.
 */
export function buildFacePoset(arrangement: Arrangement, maximumFaces = 8_000_000): FacePoset {
  const { rank } = arrangement;
  const n = arrangement.hyperplanes.length;
  const W = wordsFor(n);
  const flats = collectFlats(arrangement, W, maximumFaces);
  const faceOffsets = new Int32Array(flats.length + 1);
  const dimensionOffsets = new Int32Array(rank + 2);
  flats.forEach((flat, x) => {
    faceOffsets[x + 1] = faceOffsets[x] + facesOf(flat);
    dimensionOffsets[flat.dimension + 1] = faceOffsets[x + 1];
  });
  const faceCount = faceOffsets[flats.length];
  const positive = new Int32Array(faceCount * W);
  const flatOf = new Int32Array(faceCount);
  const flatZero = new Int32Array(flats.length * W);
  flats.forEach((flat, x) => {
    flatOf.fill(x, faceOffsets[x], faceOffsets[x + 1]);
    flatZero.set(flat.zero, x * W);
    const start = faceOffsets[x] * W;
    positive.set(flat.words, start);
    if (!flat.mirrored) return;
    const cutting = new Int32Array(W);
    for (let i = 0; i < flat.classes * W; i++) cutting[i % W] |= flat.along[i] | flat.against[i];
    const mirror = start + flat.rows * W;
    for (let i = 0; i < flat.rows * W; i++) positive[mirror + i] = ~flat.words[i] & cutting[i % W];
  });
  const index = new FaceIndex(positive, flatOf, W);
  const covers = findCovers(flats, faceOffsets, positive, index, W);
  return {
    rank,
    hyperplanes: n,
    wordsPerRow: W,
    faceCount,
    flatCount: flats.length,
    dimensionOffsets,
    flatOf,
    flatDimension: Uint8Array.from(flats, (flat) => flat.dimension),
    flatZero,
    positive,
    ...covers,
  };
}

function facesOf(flat: { readonly rows: number; readonly mirrored: boolean }): number {
  return flat.mirrored ? 2 * flat.rows : flat.rows;
}

function collectFlats(arrangement: Arrangement, W: number, maximumFaces: number): FlatRecord[] {
  const byDimension: FlatRecord[][] = Array.from({ length: arrangement.rank + 1 }, () => []);
  let faces = 0;
  streamFaces(arrangement, (flat: FlatFaces) => {
    faces += facesOf(flat);
    if (faces > maximumFaces) {
      throw new LimitError(
        'the face poset',
        `more than ${maximumFaces} faces`,
        `${maximumFaces} faces`,
        'ask for one dimension, one interval or a list instead',
      );
    }
    byDimension[flat.dimension].push({
      dimension: flat.dimension,
      zero: flat.zero.slice(),
      words: flat.words.slice(0, flat.rows * W),
      rows: flat.rows,
      mirrored: flat.mirrored,
      classes: flat.classes,
      along: flat.along.slice(0, flat.classes * W),
      against: flat.against.slice(0, flat.classes * W),
    });
  });
  return byDimension.flat();
}

/** Finds a face by its flat and sign word: open addressing, -1 marks a free slot. */
class FaceIndex {
  readonly #slots: Int32Array;
  readonly #positive: Int32Array;
  readonly #flatOf: Int32Array;
  readonly #wordsPerRow: number;

  constructor(positive: Int32Array, flatOf: Int32Array, wordsPerRow: number) {
    this.#positive = positive;
    this.#flatOf = flatOf;
    this.#wordsPerRow = wordsPerRow;
    this.#slots = new Int32Array(1 << (33 - Math.clz32(flatOf.length))).fill(-1);
    for (let f = 0; f < flatOf.length; f++) {
      const slot = this.#slotOf(flatOf[f], positive, f * wordsPerRow);
      this.#slots[slot] = f;
    }
  }

  /** The face of flat x whose sign word stands in `words`; it must exist. */
  find(x: number, words: Int32Array): number {
    const face = this.#slots[this.#slotOf(x, words, 0)];
    if (face < 0) throw new Error('face poset: a side of a face is missing from its flat');
    return face;
  }

  #slotOf(x: number, words: Int32Array, offset: number): number {
    const W = this.#wordsPerRow;
    let h = Math.imul(x + 1, 0x9e3779b1);
    for (let w = 0; w < W; w++) {
      h = Math.imul(h ^ words[offset + w], 0x85ebca6b);
      h ^= h >>> 13;
    }
    const mask = this.#slots.length - 1;
    let slot = (Math.imul(h, 0xc2b2ae35) >>> 3) & mask;
    for (;;) {
      const face = this.#slots[slot];
      if (face < 0) return slot;
      if (this.#flatOf[face] === x) {
        let w = 0;
        while (w < W && this.#positive[face * W + w] === words[offset + w]) w++;
        if (w === W) return slot;
      }
      slot = (slot + 1) & mask;
    }
  }
}

function findCovers(
  flats: readonly FlatRecord[],
  faceOffsets: Int32Array,
  positive: Int32Array,
  index: FaceIndex,
  W: number,
): { coverOffsets: Int32Array; coverTargets: Int32Array } {
  const keyOf = (words: Int32Array): string => words.join(' ');
  const flatWith = new Map(flats.map((flat, x) => [keyOf(flat.zero), x]));
  // For each flat X, the flats Y over it and the class of Y that cuts it out.
  const over: { flat: number; cut: number }[][] = flats.map(() => []);
  const joined = new Int32Array(W);
  flats.forEach((flat, y) => {
    for (let c = 0; c < flat.classes; c++) {
      for (let w = 0; w < W; w++) {
        joined[w] = flat.zero[w] | flat.along[c * W + w] | flat.against[c * W + w];
      }
      const x = flatWith.get(keyOf(joined));
      if (x === undefined) throw new Error('face poset: a flat inside another was not visited');
      over[x].push({ flat: y, cut: c });
    }
  });
  const coverOffsets = new Int32Array(faceOffsets[flats.length] + 1);
  flats.forEach((_, x) => {
    for (let f = faceOffsets[x]; f < faceOffsets[x + 1]; f++) {
      coverOffsets[f + 1] = coverOffsets[f] + 2 * over[x].length;
    }
  });
  const coverTargets = new Int32Array(coverOffsets[faceOffsets[flats.length]]);
  const side = new Int32Array(W);
  flats.forEach((_, x) => {
    for (let f = faceOffsets[x]; f < faceOffsets[x + 1]; f++) {
      let at = coverOffsets[f];
      for (const { flat, cut } of over[x]) {
        for (const mask of [flats[flat].along, flats[flat].against]) {
          for (let w = 0; w < W; w++) side[w] = positive[f * W + w] | mask[cut * W + w];
          coverTargets[at++] = index.find(flat, side);
        }
      }
      coverTargets.subarray(coverOffsets[f], at).sort();
    }
  });
  return { coverOffsets, coverTargets };
}
