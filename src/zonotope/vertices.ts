// The zonotope, face by face: Z is the sum of the segments from low_j u_j to high_j u_j over all
// generators as given, parallel and opposite ones too. A linear functional x is greatest on the face
// where each generator with x . u_j > 0 stands at its high end, each with x . u_j < 0 at its low
// end, and those with 0 are free (P. McMullen, 1971, On zonotopes).
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt } from '../bits/signs.js';
import {
  commonDenominator,
  type ExactNumber,
  exactNumber,
  exactOne,
  exactZero,
  multiplyNumbers,
} from '../exact/number.js';

/** The face of the zonotope that a face of the arrangement stands for: base + the free segments. */
export interface ZonotopeFace {
  /** d numbers: the sum of the chosen ends of all generators that are not free. */
  readonly base: ExactNumber[];
  /** 0-based generators, ascending, each free between its low and its high. */
  readonly free: number[];
}

/** Where a zonotope is put: each point x becomes scale x + shift, scale positive. */
export interface Placement {
  readonly scale: ExactNumber;
  /** d numbers. */
  readonly shift: readonly ExactNumber[];
  /** The field of scale and shift, the arrangement's own or, where that is Q, any. */
  readonly radicand: bigint | null;
}

/** Adds generators up by the signs of their hyperplanes, exactly. */
export class ZonotopeVertices {
  private readonly arrangement: Arrangement;
  private readonly dimension: number;
  /** Numerators are over this; a vector has `width` of them: d, or over a+b sqrt(k) the d of b too. */
  private readonly denominator: bigint;
  private readonly width: number;
  /** The vertex where every hyperplane is negative. */
  private readonly start: readonly bigint[];
  /** For each hyperplane what its generators add up to on the negative side. */
  private readonly negative: readonly (readonly bigint[])[];
  /** For each hyperplane what crossing it to the positive side adds. */
  private readonly step: readonly (readonly bigint[])[];
  /** `start` and `step` in plain numbers, where no sum of them can reach 2^53; null otherwise. */
  private readonly plain: { start: Float64Array; step: Float64Array } | null;
  private readonly sum: Float64Array;

  /** The vertices and faces of the zonotope itself, or of the zonotope scaled and shifted. */
  constructor(arrangement: Arrangement, placement: Placement | null = null) {
    const { generators, dimension, hyperplanes, hyperplaneOf, orientationOf } = arrangement;
    const { normals, ranges } = generators;
    const radicand = generators.radicand ?? placement?.radicand ?? null;
    const scale = placement?.scale ?? exactOne;
    const shift = placement?.shift ?? normals[0].map(() => exactZero);
    this.arrangement = arrangement;
    this.dimension = dimension;
    this.width = radicand === null ? dimension : 2 * dimension;
    const ends = normals.map((normal, i) => {
      const at = (t: ExactNumber): ExactNumber[] => {
        const factor = multiplyNumbers(t, scale, radicand ?? 0n);
        return normal.map((x) => multiplyNumbers(factor, x, radicand ?? 0n));
      };
      const range = ranges === null ? null : ranges[i];
      const low = at(range?.low ?? exactZero);
      const high = at(range?.high ?? exactOne);
      return orientationOf[i] > 0 ? { minus: low, plus: high } : { minus: high, plus: low };
    });
    const all = ends.flatMap(({ minus, plus }) => [...minus, ...plus]);
    this.denominator = commonDenominator([...all, ...shift]);
    const zeroVector = (): bigint[] => new Array<bigint>(this.width).fill(0n);
    const start = this.numerators(shift);
    const negative = hyperplanes.map(zeroVector);
    const step = hyperplanes.map(zeroVector);
    ends.forEach(({ minus, plus }, i) => {
      const h = hyperplaneOf[i];
      const low = this.numerators(minus);
      const high = this.numerators(plus);
      for (let j = 0; j < this.width; j++) {
        start[j] += low[j];
        negative[h][j] += low[j];
        step[h][j] += high[j] - low[j];
      }
    });
    this.start = start;
    this.negative = negative;
    this.step = step;
    this.sum = new Float64Array(this.width);
    this.plain = this.inPlainNumbers();
  }

  private numerators(vector: readonly ExactNumber[]): bigint[] {
    const over = (part: 'a' | 'b'): bigint[] =>
      vector.map((x) => (x[part] * this.denominator) / x.d);
    return this.width === this.dimension ? over('a') : [...over('a'), ...over('b')];
  }

  private inPlainNumbers(): { start: Float64Array; step: Float64Array } | null {
    const size = (x: bigint): bigint => (x < 0n ? -x : x);
    for (let j = 0; j < this.width; j++) {
      let bound = size(this.start[j]);
      for (const step of this.step) bound += size(step[j]);
      if (bound > BigInt(Number.MAX_SAFE_INTEGER)) return null;
    }
    return {
      start: Float64Array.from(this.start, Number),
      step: Float64Array.from(this.step.flat(), Number),
    };
  }

  /**
   * The vertex of the region with the sign word at `offset`: d numbers, the only maximum over the
   * zonotope of every functional inside the region.
   */
  vertexOf(words: Int32Array, offset: number): ExactNumber[] {
    return this.numbers(
      this.plain === null ? this.bigSum(words, offset) : this.plainSum(words, offset),
    );
  }

  private plainSum(words: Int32Array, offset: number): Float64Array {
    const { sum, width } = this;
    const { start, step } = this.plain!;
    sum.set(start);
    const count = this.step.length;
    for (let first = 0; first < count; first += 32) {
      for (let bits = words[offset + (first >> 5)]; bits !== 0; bits &= bits - 1) {
        const at = (first + 31 - Math.clz32(bits & -bits)) * width;
        for (let j = 0; j < width; j++) sum[j] += step[at + j];
      }
    }
    return sum;
  }

  private bigSum(words: Int32Array, offset: number): bigint[] {
    const sum = this.start.slice();
    this.step.forEach((step, h) => {
      if (bitAt(words, offset, h) === 1) for (let j = 0; j < sum.length; j++) sum[j] += step[j];
    });
    return sum;
  }

  private numbers(numerators: ArrayLike<bigint | number>): ExactNumber[] {
    const { dimension, denominator, width } = this;
    const vector = new Array<ExactNumber>(dimension);
    for (let j = 0; j < dimension; j++) {
      const a = BigInt(numerators[j]);
      const b = width === dimension ? 0n : BigInt(numerators[dimension + j]);
      vector[j] = denominator === 1n ? { a, b, d: 1n } : exactNumber(a, b, denominator);
    }
    return vector;
  }

  /**
   * The face of the zonotope for the face of the arrangement with sign word at `offset` and zero mask
   * at `zeroOffset`. Bits of `words` at zero hyperplanes are ignored. Its dimension is the rank of
   * the free generators: the order of faces is reversed.
   */
  faceOf(words: Int32Array, offset: number, zero: Int32Array, zeroOffset: number): ZonotopeFace {
    const sum = this.start.slice();
    const free: number[] = [];
    this.arrangement.hyperplanes.forEach(({ members }, h) => {
      if (bitAt(zero, zeroOffset, h) === 1) {
        for (let j = 0; j < sum.length; j++) sum[j] -= this.negative[h][j];
        free.push(...members);
      } else if (bitAt(words, offset, h) === 1) {
        for (let j = 0; j < sum.length; j++) sum[j] += this.step[h][j];
      }
    });
    return { base: this.numbers(sum), free: free.sort((a, b) => a - b) };
  }
}

/**
 * Faces of the zonotope by dimension 0..rank from the faces of the arrangement by dimension 0..rank
 * above its lineality space: a cone of codimension k stands for a face of dimension k.
 */
export function zonotopeFaceCounts<T>(faces: readonly T[]): T[] {
  return faces.slice().reverse();
}
