// The Ehrhart polynomial by deletion and contraction in the lattice: an independent set with last
// member p, primitive and of weight w, counts w times what the others count in the quotient of the
// lattice by p (the gcd of minors is multiplicative along such a chain). Parallel vectors merge with
// the sum of their contents, planes have a closed form. Depth first; lists no flats and no subsets.
import {
  addContraction,
  contractAll,
  type LatticeVectors,
  mergeParallel,
  type TermMap,
} from './contraction-big.js';
import { cornerLimit, entryLimit, type HandOver, PlainContraction } from './contraction-plain.js';
import { type EhrhartTerms, termsOf } from './ehrhart-terms.js';
import { binomial } from './exterior-steps.js';
import { inShortCoordinates, type LatticeGenerators } from './lattice-generators.js';
import { largestOf as largestOfRows } from './plain-ring.js';

export interface ContractionOptions {
  /** Called now and then with the plane quotients closed; estimateContraction foretells their number. */
  readonly onProgress?: (leaves: number) => void;
  /** `big` skips plain doubles; for tests and measurements. Default `any`. */
  readonly arithmetic?: 'any' | 'big';
}

/** The cost of ehrhartByContraction. */
export interface ContractionEstimate {
  /** Plane quotients to close. */
  readonly leaves: number;
  readonly seconds: number;
}

// Seconds, measured on one core of a 2-core machine with Node 20: orders of magnitude elsewhere.
const perLeaf = 5e-7;
const perLeafVector = 1.2e-8;
const perLeafPair = 1.5e-9;
const perContraction = 4e-7;
const perContractedEntry = 6e-9;
const perBigVector = 4e-6;

/** Entries that the descents of one estimate may read: about a tenth of a second. */
const entriesRead = 1_000_000;

/**
 * About how long the route takes, from random descents of the tree it walks (D. Knuth, 1975, Estimating
 * the efficiency of backtrack programs); deterministic, a fraction of a second.
 */
export function estimateContraction(generators: LatticeGenerators): ContractionEstimate {
  const input = mergedInput(generators);
  const { rank } = input;
  const m = input.vectors.length;
  if (rank < 3) return { leaves: 1, seconds: 1e-6 * m * Math.log2(m + 1) };
  const bound = binomial(m, rank - 2);
  const big = { leaves: bound, seconds: bound * (m / (rank - 1)) * rank * perBigVector };
  if (!fitsPlain(input)) return big;
  const kernel = plainKernel(input, null);
  const random = fractions();
  const descents = rank === 3 ? 1 : Math.min(2000, Math.ceil(entriesRead / (m * rank * rank)));
  const total = { leaves: 0, seconds: 0 };
  for (let d = 0; d < descents; d++) {
    let weight = 1 / descents;
    let count = m;
    for (let r = rank; ; r--) {
      const picks = r - 2;
      if (count < picks) break;
      if (r === 3) {
        total.leaves += weight * count;
        const vectors = (count * count) / 2;
        const pairs = (count * vectors) / 3;
        total.seconds += weight * (count * perLeaf + vectors * perLeafVector + pairs * perLeafPair);
        break;
      }
      total.seconds +=
        weight * (count * perContraction + (count * count * r * r * perContractedEntry) / 2);
      // Contracting vector i leads to about C(i, picks - 1) leaves: the largest of `picks` random
      // vectors has that distribution.
      const i = largestOf(picks, count, random);
      weight *= binomial(count, picks) / binomial(i, picks - 1);
      count = kernel.contract(kernel.levelOf(r), i);
      if (count < 0) return big;
    }
  }
  return { leaves: Math.round(total.leaves), seconds: total.seconds };
}

/** The largest of k different random numbers below n (R. Floyd, 1987, A sample of brilliance). */
function largestOf(k: number, n: number, random: () => number): number {
  const chosen = new Set<number>();
  for (let j = n - k; j < n; j++) {
    const x = Math.floor(random() * (j + 1));
    chosen.add(chosen.has(x) ? j : x);
  }
  return Math.max(...chosen);
}

/** Random fractions, the same for the same input. */
function fractions(): () => number {
  let state = 0x2545f491;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 2 ** 32;
  };
}

/** Exact for every input. */
export function ehrhartByContraction(
  generators: LatticeGenerators,
  options: ContractionOptions = {},
): EhrhartTerms {
  const input = mergedInput(generators);
  if (options.arithmetic === 'big' || !fitsPlain(input)) return termsOf(contractAll(input));
  return termsOf(plainKernel(input, options.onProgress ?? null).visit(input.vectors.length));
}

function mergedInput(generators: LatticeGenerators): LatticeVectors {
  const small = largestOfRows(generators.vectors) < BigInt(entryLimit);
  const { rank, vectors, corner, denominator } = small
    ? generators
    : inShortCoordinates(generators);
  const merged = mergeParallel(
    vectors,
    vectors.map(() => 1n),
  );
  return { rank, ...merged, corner: corner.map((x) => x % denominator), denominator };
}

function fitsPlain({ rank, vectors, weights, denominator }: LatticeVectors): boolean {
  return (
    rank >= 3 &&
    denominator < BigInt(cornerLimit) &&
    largestOfRows([weights]) < 1n << 53n &&
    largestOfRows(vectors) < BigInt(entryLimit)
  );
}

function plainKernel(
  { rank, vectors, weights, corner, denominator }: LatticeVectors,
  onProgress: ((leaves: number) => void) | null,
): PlainContraction {
  const handOver: HandOver = (level, i) => {
    const terms: TermMap = new Map();
    const column = (j: number): bigint[] =>
      Array.from({ length: level.rank }, (_, c) => BigInt(level.rows[c][j]));
    const whole = {
      rank: level.rank,
      vectors: Array.from({ length: i + 1 }, (_, j) => column(j)),
      weights: Array.from(level.weights.subarray(0, i + 1), BigInt),
      corner: Array.from(level.corner.subarray(0, level.rank), BigInt),
      denominator,
    };
    addContraction(terms, whole, i);
    return terms;
  };
  const count = vectors.length;
  const kernel = new PlainContraction(rank, count, Number(denominator), handOver, onProgress);
  const { top } = kernel;
  vectors.forEach((v, j) => {
    v.forEach((x, c) => {
      top.rows[c][j] = Number(x);
    });
    top.weights[j] = Number(weights[j]);
  });
  corner.forEach((x, c) => {
    top.corner[c] = Number(x);
  });
  return kernel;
}
