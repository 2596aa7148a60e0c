// The Ehrhart polynomial by flats: the independent sets are the bases of the flats, so coefficient k
// is the sum over flats X of rank k of the volume c(X) of the zonotope of the generators inside X,
// relative to the lattice of their span. Taking one generator away from a basis of X leaves a basis of
// a flat Y that X covers, so k c(X) = sum over such Y of c(Y) h(X, Y), where h adds up the heights over
// Y of the generators in X outside Y. Each division must come out exactly: a check for nothing.
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt } from '../bits/signs.js';
import { Disagreement } from '../errors.js';
import { magnitude } from '../exact/integers.js';
import type { FlatLattice } from '../flat/lattice.js';
import { type EhrhartTerms, termsOf } from './ehrhart-terms.js';
import { type LatticeGenerators, orderOf } from './lattice-generators.js';
import { shortenRows } from './lattice-quotient.js';
import {
  BigRows,
  type LatticeRows,
  PastDoubles,
  PlainRows,
  withoutColumn,
} from './lattice-rows.js';
import { largestOf } from './plain-ring.js';

export interface EhrhartFlatOptions {
  /** Called now and then with the flats done, of lattice.flatCount. */
  readonly onProgress?: (flats: number) => void;
}

// Seconds, measured on one core of a 2-core machine with Node 20: orders of magnitude elsewhere.
const perFlat = 4e-6;
const perFlatEntry = 9e-9;

/** About how long the route takes on a lattice with that many flats, the listing of them apart. */
export function estimateEhrhartByFlats(arrangement: Arrangement, flats: number): number {
  const { rank, hyperplanes } = arrangement;
  return flats * (perFlat + perFlatEntry * hyperplanes.length * rank * rank);
}

/**
 * Exact for every input over Q. The lattice is that of the same arrangement (listFlats), the
 * generators are its own (latticeGenerators, centred or not).
 */
export function ehrhartByFlats(
  arrangement: Arrangement,
  generators: LatticeGenerators,
  lattice: FlatLattice,
  options: EhrhartFlatOptions = {},
): EhrhartTerms {
  const { hyperplanes } = arrangement as Arrangement<bigint>;
  const weights = hyperplanes.map(({ essential, members }) => {
    // The essential normal is primitive: each of its generators is a multiple of it.
    const at = essential.findIndex((x) => x !== 0n);
    return members.reduce(
      (sum, j) => sum + magnitude(generators.vectors[j][at] / essential[at]),
      0n,
    );
  });
  const directions = hyperplanes.map((h) => h.essential);
  return new FlatVolumes(directions, weights, generators, lattice, options).terms();
}

class FlatVolumes {
  private readonly weights: readonly bigint[];
  private readonly denominator: bigint;
  private readonly lattice: FlatLattice;
  private readonly onProgress: ((flats: number) => void) | null;
  /** For each flat the first that it covers, and a hyperplane of it outside that one. */
  private readonly parents: Int32Array;
  private readonly steps: Int32Array;
  /** By rank the flat whose images are at hand, and the images of all directions, the corner last. */
  private readonly chain: Int32Array;
  private readonly images: LatticeRows[] = [];
  private readonly terms_ = new Map<bigint, bigint[]>();

  constructor(
    directions: readonly (readonly bigint[])[],
    weights: readonly bigint[],
    generators: LatticeGenerators,
    lattice: FlatLattice,
    options: EhrhartFlatOptions,
  ) {
    this.weights = weights;
    this.denominator = generators.denominator;
    this.lattice = lattice;
    this.onProgress = options.onProgress ?? null;
    this.parents = new Int32Array(lattice.flatCount).fill(-1);
    this.steps = new Int32Array(lattice.flatCount);
    this.findParents();
    this.chain = new Int32Array(lattice.rank + 1).fill(-1);
    this.chain[0] = 0;
    const columns = [...directions, generators.corner.map((x) => x % generators.denominator)];
    const rows = directions[0].map((_, c) => columns.map((v) => v[c]));
    if (!fitsPlain(rows)) shortenRows(rows);
    this.images[0] = fitsPlain(rows)
      ? new PlainRows(rows.map((row) => Float64Array.from(row, Number)))
      : new BigRows(rows);
  }

  private findParents(): void {
    const { flatCount, coverOffsets, coverTargets, zero, wordsPerRow: W } = this.lattice;
    for (let Y = 0; Y < flatCount; Y++) {
      for (let at = coverOffsets[Y]; at < coverOffsets[Y + 1]; at++) {
        const X = coverTargets[at];
        if (this.parents[X] >= 0) continue;
        this.parents[X] = Y;
        let w = 0;
        while (zero[X * W + w] === zero[Y * W + w]) w++;
        const fresh = zero[X * W + w] & ~zero[Y * W + w];
        this.steps[X] = (w << 5) + 31 - Math.clz32(fresh & -fresh);
      }
    }
  }

  terms(): EhrhartTerms {
    const { rank, rankOffsets, coverOffsets, coverTargets, zero, wordsPerRow: W } = this.lattice;
    const m = this.weights.length;
    let volumes: bigint[] = [1n];
    const heights: bigint[] = new Array(m).fill(0n);
    for (let k = 0; k <= rank; k++) {
      const first = rankOffsets[k];
      const above = k === rank ? 0 : rankOffsets[k + 2] - rankOffsets[k + 1];
      const next = new Array<bigint>(above).fill(0n);
      for (let Y = first; Y < rankOffsets[k + 1]; Y++) {
        const volume = volumes[Y - first];
        const images = k === rank ? null : this.imagesAt(k, Y);
        this.add(images, k, volume);
        if (images === null) continue;
        for (let h = 0; h < m; h++) {
          if (bitAt(zero, Y * W, h) === 0) heights[h] = this.weights[h] * images.contentOf(h);
        }
        for (let at = coverOffsets[Y]; at < coverOffsets[Y + 1]; at++) {
          const X = coverTargets[at];
          let height = 0n;
          for (let w = 0; w < W; w++) {
            for (let bits = zero[X * W + w] & ~zero[Y * W + w]; bits !== 0; bits &= bits - 1) {
              height += heights[(w << 5) + 31 - Math.clz32(bits & -bits)];
            }
          }
          next[X - rankOffsets[k + 1]] += volume * height;
        }
        if ((Y & 0x3ff) === 0) this.onProgress?.(Y);
      }
      volumes = next.map((sum) => dividedExactly(sum, BigInt(k + 1)));
    }
    return termsOf(this.terms_);
  }

  /** The bases of a flat of rank k count for the multiples that take the corner into its span. */
  private add(images: LatticeRows | null, k: number, volume: bigint): void {
    const order =
      images === null || this.denominator === 1n
        ? 1n
        : orderOf(images.columnOf(this.weights.length), this.denominator);
    let coefficients = this.terms_.get(order);
    if (coefficients === undefined) {
      coefficients = new Array<bigint>(this.lattice.rank + 1).fill(0n);
      this.terms_.set(order, coefficients);
    }
    coefficients[k] += volume;
  }

  /** The images of all directions in the quotient by a flat of rank k, from those by its parents. */
  private imagesAt(k: number, flat: number): LatticeRows {
    const { chain, images, parents, steps } = this;
    let rank = k;
    let wanted = flat;
    while (chain[rank] !== wanted) {
      chain[rank] = wanted;
      wanted = parents[wanted];
      rank--;
    }
    for (; rank < k; rank++) {
      images[rank + 1] = this.quotient(images[rank], steps[chain[rank + 1]]);
    }
    return images[k];
  }

  private quotient(rows: LatticeRows, column: number): LatticeRows {
    const corner = this.weights.length;
    let quotient: LatticeRows;
    // Row operations on the parent's images keep them images, so they are done in place.
    try {
      quotient = withoutColumn(rows, column);
    } catch (error) {
      if (!(error instanceof PastDoubles)) throw error;
      quotient = withoutColumn(this.inBigIntegers(rows), column);
    }
    quotient.reduceColumn(corner, this.denominator);
    return quotient;
  }

  private inBigIntegers(rows: LatticeRows): LatticeRows {
    const columns = Array.from({ length: this.weights.length + 1 }, (_, c) => rows.columnOf(c));
    return new BigRows(columns[0].map((_, i) => columns.map((column) => column[i])));
  }
}

function fitsPlain(rows: readonly (readonly bigint[])[]): boolean {
  return largestOf(rows) < 1n << 52n;
}

function dividedExactly(sum: bigint, divisor: bigint): bigint {
  if (sum % divisor !== 0n) {
    throw new Disagreement(
      `Ehrhart polynomial by flats: a flat's sum ${sum} is not divisible by its rank ${divisor}`,
    );
  }
  return sum / divisor;
}
