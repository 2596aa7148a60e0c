// Faces as rows for a list: signs, dimension and the matching face of the zonotope, from a face
// poset or flat by flat as the faces stream past, so that millions need no table.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { bitAt, fullMask } from '../bits/signs.js';
import type { ExactNumber } from '../exact/number.js';
import type { FacePoset } from '../face/poset.js';
import { ZonotopeVertices } from '../zonotope/vertices.js';

/** A face as it is written out, with the zonotope face it matches. */
export interface FaceRow {
  /** One of +, - and 0 for each normal given. */
  readonly signs: string;
  /** Above the lineality space: 0 for the least face, the rank for a region. */
  readonly dimension: number;
  /** Of the matching face of the zonotope: the rank less `dimension`. */
  readonly zonotopeDimension: number;
  /** d numbers: the sum of the generators that are fixed, with the free ones at their low end. */
  readonly base: readonly ExactNumber[];
  /** 1-based numbers of the generators that span the zonotope face: those with sign 0. */
  readonly free: readonly number[];
}

/** The faces whose span is one flat, as the face kernel hands them out; W words a row. */
export interface FaceBlock {
  readonly dimension: number;
  /** W words: the hyperplanes that contain the flat. */
  readonly zero: Int32Array;
  readonly words: Int32Array;
  readonly rows: number;
  /** Whether the negations of the rows are faces besides. */
  readonly mirrored: boolean;
}

/** Makes rows of faces of one arrangement. */
export class FaceRows {
  readonly #rank: number;
  readonly #hyperplaneOf: Int32Array;
  readonly #text: SignText;
  readonly #vertices: ZonotopeVertices;
  readonly #mask: Int32Array;

  constructor(arrangement: Arrangement) {
    this.#rank = arrangement.rank;
    this.#hyperplaneOf = arrangement.hyperplaneOf;
    this.#text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
    this.#vertices = new ZonotopeVertices(arrangement);
    this.#mask = fullMask(arrangement.hyperplanes.length);
  }

  /** Hands each face of a block to `take`, each followed by its negation where `mirrored`. */
  forEachOf(block: FaceBlock, take: (row: FaceRow) => void): void {
    const { dimension, zero, words, rows, mirrored } = block;
    const wordsPerRow = this.#mask.length;
    const free = this.#free(zero, 0);
    const negated = new Int32Array(wordsPerRow);
    for (let row = 0; row < rows; row++) {
      const offset = row * wordsPerRow;
      take(this.#row(dimension, words, offset, zero, 0, free));
      if (!mirrored) continue;
      for (let w = 0; w < wordsPerRow; w++) {
        negated[w] = ~words[offset + w] & this.#mask[w] & ~zero[w];
      }
      take(this.#row(dimension, negated, 0, zero, 0, free));
    }
  }

  /** The faces of a poset in its order: by dimension, the least first. */
  *ofPoset(poset: FacePoset): Generator<FaceRow> {
    const { wordsPerRow, dimensionOffsets, flatOf, flatZero, positive } = poset;
    for (let dimension = 0; dimension <= poset.rank; dimension++) {
      for (let f = dimensionOffsets[dimension]; f < dimensionOffsets[dimension + 1]; f++) {
        const zeroOffset = flatOf[f] * wordsPerRow;
        const free = this.#free(flatZero, zeroOffset);
        yield this.#row(dimension, positive, f * wordsPerRow, flatZero, zeroOffset, free);
      }
    }
  }

  #free(zero: Int32Array, zeroOffset: number): number[] {
    const free: number[] = [];
    this.#hyperplaneOf.forEach((h, i) => {
      if (bitAt(zero, zeroOffset, h) === 1) free.push(i + 1);
    });
    return free;
  }

  #row(
    dimension: number,
    words: Int32Array,
    offset: number,
    zero: Int32Array,
    zeroOffset: number,
    free: readonly number[],
  ): FaceRow {
    return {
      signs: this.#text.write(words, offset, zero, zeroOffset),
      dimension,
      zonotopeDimension: this.#rank - dimension,
      base: this.#vertices.faceOf(words, offset, zero, zeroOffset).base,
      free,
    };
  }
}
