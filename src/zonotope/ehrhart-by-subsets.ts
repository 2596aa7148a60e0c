// The Ehrhart polynomial from its definition: coefficient k is the sum over all independent
// k-subsets of the generators as given of the gcd of their k-minors (R. Stanley, 1991, A zonotope
// associated with graphical degree sequences, theorem 2.2). Subsets depth first; all k-minors of the
// chosen ones are at hand, and those with one generator more are their expansions along it. No
// lattice is divided, no parallel generators merged.
import { gcd, magnitude } from '../exact/integers.js';
import { type EhrhartTerms, termsOf } from './ehrhart-terms.js';
import { ExactSums } from './exact-sums.js';
import { binomial, type ExteriorStep, exteriorSteps } from './exterior-steps.js';
import { inShortCoordinates, type LatticeGenerators, orderOf } from './lattice-generators.js';

/** The cost of ehrhartBySubsets. */
export interface SubsetEstimate {
  /** Subsets of at most `rank` generators: as many are looked at, fewer where some are dependent. */
  readonly subsets: number;
  readonly seconds: number;
}

export interface SubsetOptions {
  /** Called now and then with the subsets done; estimateSubsets bounds their number. */
  readonly onProgress?: (subsets: number) => void;
}

// Seconds, measured on one core of a 2-core machine with Node 20: orders of magnitude elsewhere.
const perSubset = 4e-8;
const perProduct = 3e-9;
const bigSlower = 60;

/** About how long the route takes at most; immediate. */
export function estimateSubsets(generators: LatticeGenerators): SubsetEstimate {
  const { rank: r, vectors } = generators;
  const n = vectors.length;
  let subsets = 0;
  let seconds = 0;
  for (let k = 1; k <= r; k++) {
    const count = binomial(n, k);
    subsets += count;
    const overhead = k === r ? 0 : perSubset;
    seconds += count * (overhead + perProduct * k * binomial(r, k));
  }
  const plain = minorsArePlain(generators) || minorsArePlain(inShortCoordinates(generators));
  return { subsets, seconds: plain ? seconds : bigSlower * seconds };
}

/** Exact for every input; every independent subset is visited. */
export function ehrhartBySubsets(
  generators: LatticeGenerators,
  options: SubsetOptions = {},
): EhrhartTerms {
  const onProgress = options.onProgress ?? null;
  const short = minorsArePlain(generators) ? generators : inShortCoordinates(generators);
  return minorsArePlain(short)
    ? new PlainSubsets(short, onProgress).terms()
    : new BigSubsets(short, onProgress).terms();
}

/**
 * Whether all minors, and the partial sums of their expansions, stay below 2^53: a k-minor is at
 * most the product of the k greatest lengths (J. Hadamard, 1893), and an expansion adds k products
 * of a (k-1)-minor with an entry. The corner's numerators enter one expansion as another vector.
 */
function minorsArePlain({ rank, vectors, denominator }: LatticeGenerators): boolean {
  const squares = vectors.map((v) => v.reduce((sum, x) => sum + x * x, 0n));
  squares.sort((a, b) => (a > b ? -1 : a < b ? 1 : 0));
  let entry = denominator;
  for (const v of vectors) for (const x of v) if (magnitude(x) > entry) entry = magnitude(x);
  let squaredMinor = 1n;
  let most = 1n;
  for (let k = 1; k <= rank; k++) {
    // The bound for k - 1 chosen ones, squared; products of lengths below 1 do not occur.
    most = squaredMinor;
    squaredMinor *= squares[k - 1];
  }
  const expansion = BigInt(rank) * entry;
  const limit = 1n << 106n;
  return most * expansion * expansion < limit && squaredMinor * expansion * expansion < limit;
}

class PlainSubsets {
  private readonly r: number;
  private readonly n: number;
  private readonly vectors: Float64Array;
  private readonly corner: Float64Array | null;
  private readonly denominator: number;
  /** minors[k]: all k-minors of the k chosen ones. */
  private readonly minors: Float64Array[];
  private readonly steps: readonly ExteriorStep[];
  private readonly sums = new Map<number, ExactSums>();
  private readonly whole: ExactSums;
  private readonly onProgress: ((subsets: number) => void) | null;
  private visited = 0;
  private reported = 0;

  constructor(
    { rank, vectors, corner, denominator }: LatticeGenerators,
    onProgress: ((subsets: number) => void) | null,
  ) {
    this.r = rank;
    this.n = vectors.length;
    this.vectors = Float64Array.from(vectors.flat(), Number);
    this.denominator = Number(denominator);
    this.corner =
      denominator === 1n ? null : Float64Array.from(corner, (x) => Number(x % denominator));
    this.steps = exteriorSteps(rank);
    this.minors = Array.from({ length: rank + 1 }, (_, k) => new Float64Array(binomial(rank, k)));
    this.minors[0][0] = 1;
    this.whole = this.sumsOf(1);
    this.onProgress = onProgress;
  }

  terms(): EhrhartTerms {
    this.sumsOf(this.order(0, 1)).add(0, 1);
    this.visit(0, 0);
    const { r } = this;
    const entries = [...this.sums].map(
      ([order, sums]) =>
        [BigInt(order), Array.from({ length: r + 1 }, (_, k) => sums.valueOf(k))] as const,
    );
    return termsOf(new Map(entries));
  }

  private sumsOf(order: number): ExactSums {
    let sums = this.sums.get(order);
    if (sums === undefined) {
      sums = new ExactSums(this.r + 1);
      this.sums.set(order, sums);
    }
    return sums;
  }

  /** Adds up all subsets that extend the k chosen ones by generators from `start` on. */
  private visit(k: number, start: number): void {
    const { n, r } = this;
    if (k + 1 === r) {
      this.close(start);
      return;
    }
    const minors = this.minors[k + 1];
    for (let i = start; i < n; i++) {
      this.steps[k].expand(this.minors[k], this.vectors, i * r, minors);
      const g = contentOf(minors);
      if (g === 0) continue;
      const sums = this.corner === null ? this.whole : this.sumsOf(this.order(k + 1, g));
      sums.add(k + 1, g);
      this.visit(k + 1, i + 1);
    }
    this.visited += n - start;
    if (this.onProgress !== null && this.visited - this.reported > 5e6) {
      this.reported = this.visited;
      this.onProgress(this.visited);
    }
  }

  /** The last generator: one determinant each. A full set's tile always meets the lattice. */
  private close(start: number): void {
    const { n, r, vectors } = this;
    const cofactors = this.minors[r - 1];
    const step = this.steps[r - 1];
    const { from, coordinate, sign } = step;
    for (let i = start; i < n; i++) {
      let sum = 0;
      for (let s = 0; s < r; s++) {
        sum += sign[s] * cofactors[from[s]] * vectors[i * r + coordinate[s]];
      }
      if (sum !== 0) this.whole.add(r, Math.abs(sum));
    }
    this.visited += n - start;
  }

  /**
   * The order of the chosen ones, g the gcd of their k-minors: the primitive vector of minors wedged
   * with the corner is a lattice vector for just those multiples of the corner that their span joins
   * to the lattice.
   */
  private order(k: number, g: number): number {
    if (this.corner === null || k === this.r) return 1;
    const product = new Float64Array(binomial(this.r, k + 1));
    this.steps[k].expand(this.minors[k], this.corner, 0, product);
    let common = this.denominator;
    for (const x of product) common = plainGcd(common, Math.abs(x) / g);
    return this.denominator / common;
  }
}

function plainGcd(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}

/** Their gcd; 0 when all are 0. */
function contentOf(minors: Float64Array): number {
  let g = 0;
  for (let t = 0; t < minors.length; t++) {
    let x = Math.abs(minors[t]);
    if (x === 0) continue;
    while (x !== 0) {
      const rest = g % x;
      g = x;
      x = rest;
    }
    if (g === 1) return 1;
  }
  return g;
}

/** The same for numbers of any size. */
class BigSubsets {
  private readonly generators: LatticeGenerators;
  private readonly steps: readonly ExteriorStep[];
  private readonly sums = new Map<bigint, bigint[]>();
  private readonly onProgress: ((subsets: number) => void) | null;
  private visited = 0;

  constructor(generators: LatticeGenerators, onProgress: ((subsets: number) => void) | null) {
    this.generators = generators;
    this.steps = exteriorSteps(generators.rank);
    this.onProgress = onProgress;
  }

  terms(): EhrhartTerms {
    this.sums.set(1n, new Array<bigint>(this.generators.rank + 1).fill(0n));
    this.add(0, [1n], 1n);
    this.visit(0, 0, [1n]);
    return termsOf(this.sums);
  }

  private visit(k: number, start: number, minors: readonly bigint[]): void {
    const { rank, vectors } = this.generators;
    for (let i = start; i < vectors.length; i++) {
      const next = this.steps[k].expandBig(minors, vectors[i]);
      const g = next.reduce(gcd, 0n);
      if (g === 0n) continue;
      this.add(k + 1, next, g);
      if (k + 1 < rank) this.visit(k + 1, i + 1, next);
    }
    this.visited += vectors.length - start;
    if (k + 3 === rank) this.onProgress?.(this.visited);
  }

  private add(k: number, minors: readonly bigint[], g: bigint): void {
    const { rank, corner, denominator } = this.generators;
    const order =
      denominator === 1n || k === rank
        ? 1n
        : orderOf(
            this.steps[k].expandBig(minors, corner).map((x) => x / g),
            denominator,
          );
    let sums = this.sums.get(order);
    if (sums === undefined) {
      sums = new Array<bigint>(rank + 1).fill(0n);
      this.sums.set(order, sums);
    }
    sums[k] += g;
  }
}
