// Faces as rows for a list: signs, dimension and the matching face of the zonotope, from a face
// poset or flat by flat as the faces stream past, so that millions need no table.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { fullMask } from '../bits/signs.js';
import type { ExactNumber } from '../exact/number.js';
import { addNumbers, isZero, negateNumber } from '../exact/number.js';
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
  /**
   * d numbers: the sum of the generators that are not free, each at its high end where its sign is +
   * and at its low end where it is -. The zonotope face is this plus the free generators' segments.
   */
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

/** What all faces of a flat share. */
interface FlatPart {
  readonly free: readonly number[];
  /**
   * Base less vertex, where the vertex is summed up fast with the flat's hyperplanes, whose bits are
   * 0, taken as negative; null where it is zero, as with ranges from 0 and no opposite normals.
   */
  readonly correction: readonly ExactNumber[] | null;
}

/** Makes rows of faces of one arrangement. */
export class FaceRows {
  readonly #rank: number;
  readonly #text: SignText;
  readonly #vertices: ZonotopeVertices;
  readonly #mask: Int32Array;

  constructor(arrangement: Arrangement) {
    this.#rank = arrangement.rank;
    this.#text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
    this.#vertices = new ZonotopeVertices(arrangement);
    this.#mask = fullMask(arrangement.hyperplanes.length);
  }

  /** The faces of one flat, each followed by its negation where `mirrored`. */
  *ofFlat(block: FaceBlock): Generator<FaceRow> {
    const { dimension, zero, words, rows, mirrored } = block;
    const wordsPerRow = this.#mask.length;
    if (rows === 0) return;
    const flat = this.#flat(words, 0, zero, 0);
    const negated = new Int32Array(wordsPerRow);
    for (let row = 0; row < rows; row++) {
      const offset = row * wordsPerRow;
      yield this.#row(dimension, words, offset, zero, 0, flat);
      if (!mirrored) continue;
      for (let w = 0; w < wordsPerRow; w++) {
        negated[w] = ~words[offset + w] & this.#mask[w] & ~zero[w];
      }
      yield this.#row(dimension, negated, 0, zero, 0, flat);
    }
  }

  /** The faces of a poset in its order: by dimension, the least first. */
  *ofPoset(poset: FacePoset): Generator<FaceRow> {
    const { wordsPerRow, dimensionOffsets, flatOf, flatZero, positive } = poset;
    let lastFlat = -1;
    let flat: FlatPart = { free: [], correction: null };
    for (let dimension = 0; dimension <= poset.rank; dimension++) {
      for (let f = dimensionOffsets[dimension]; f < dimensionOffsets[dimension + 1]; f++) {
        const zeroOffset = flatOf[f] * wordsPerRow;
        const offset = f * wordsPerRow;
        if (flatOf[f] !== lastFlat) {
          lastFlat = flatOf[f];
          flat = this.#flat(positive, offset, flatZero, zeroOffset);
        }
        yield this.#row(dimension, positive, offset, flatZero, zeroOffset, flat);
      }
    }
  }

  #flat(words: Int32Array, offset: number, zero: Int32Array, zeroOffset: number): FlatPart {
    const face = this.#vertices.faceOf(words, offset, zero, zeroOffset);
    const vertex = this.#vertices.vertexOf(words, offset);
    const correction = face.base.map((x, j) => addNumbers(x, negateNumber(vertex[j])));
    return {
      free: face.free.map((generator) => generator + 1),
      correction: correction.every(isZero) ? null : correction,
    };
  }

  #row(
    dimension: number,
    words: Int32Array,
    offset: number,
    zero: Int32Array,
    zeroOffset: number,
    { free, correction }: FlatPart,
  ): FaceRow {
    const vertex = this.#vertices.vertexOf(words, offset);
    return {
      signs: this.#text.write(words, offset, zero, zeroOffset),
      dimension,
      zonotopeDimension: this.#rank - dimension,
      base: correction === null ? vertex : vertex.map((x, j) => addNumbers(x, correction[j])),
      free,
    };
  }
}
