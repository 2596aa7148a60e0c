// The Ehrhart polynomial by deletion and contraction in the lattice: an independent set with last
// member p, primitive and of weight w, counts w times what the others count in the quotient of the
// lattice by p (the gcd of minors is multiplicative along such a chain). Parallel vectors merge with
// the sum of their contents, planes have a closed form. Depth first; lists no flats and no subsets.
import { magnitude } from '../exact/integers.js';
import { addContraction, contractAll, mergeParallel, type TermMap } from './contraction-big.js';
import { cornerLimit, type HandOver, PlainContraction } from './contraction-plain.js';
import { type EhrhartTerms, termsOf } from './ehrhart-terms.js';
import type { LatticeGenerators } from './lattice-generators.js';

export interface ContractionOptions {
  /** Called now and then with the plane quotients closed; estimateContraction foretells their number. */
  readonly onProgress?: (leaves: number) => void;
  /** `big` skips plain doubles; for tests and measurements. Default `any`. */
  readonly arithmetic?: 'any' | 'big';
}

/** Exact for every input. */
export function ehrhartByContraction(
  generators: LatticeGenerators,
  options: ContractionOptions = {},
): EhrhartTerms {
  const { rank, corner, denominator } = generators;
  const merged = mergeParallel(
    generators.vectors,
    generators.vectors.map(() => 1n),
  );
  const numerators = corner.map((x) => x % denominator);
  const input = { rank, ...merged, corner: numerators, denominator };
  const fits = (x: bigint, bits: bigint): boolean => magnitude(x) < 1n << bits;
  const plain =
    rank >= 3 &&
    options.arithmetic !== 'big' &&
    denominator < BigInt(cornerLimit) &&
    merged.weights.every((w) => fits(w, 53n)) &&
    merged.vectors.every((v) => v.every((x) => fits(x, 31n)));
  if (!plain) return termsOf(contractAll(input));
  const handOver: HandOver = (level, i) => {
    const terms: TermMap = new Map();
    const column = (j: number): bigint[] =>
      Array.from({ length: level.rank }, (_, c) => BigInt(level.rows[c][j]));
    addContraction(
      terms,
      {
        rank: level.rank,
        vectors: Array.from({ length: i + 1 }, (_, j) => column(j)),
        weights: Array.from(level.weights.subarray(0, i + 1), BigInt),
        corner: Array.from(level.corner.subarray(0, level.rank), BigInt),
        denominator,
      },
      i,
    );
    return terms;
  };
  const count = merged.vectors.length;
  const kernel = new PlainContraction(
    rank,
    count,
    Number(denominator),
    handOver,
    options.onProgress ?? null,
  );
  const { rows, weights } = kernel.top;
  merged.vectors.forEach((v, j) => {
    v.forEach((x, c) => {
      rows[c][j] = Number(x);
    });
    weights[j] = Number(merged.weights[j]);
  });
  numerators.forEach((x, c) => {
    kernel.top.corner[c] = Number(x);
  });
  return termsOf(kernel.visit(count));
}
