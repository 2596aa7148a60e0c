// The characteristic polynomial by deletion and restriction (T. Zaslavsky, 1975, Facing up to
// Arrangements): chi(A) = t^r - sum over i of chi of H_1..H_(i-1) restricted to H_i, depth first,
// with closed forms in ranks 1 to 3; a product of arrangements part by part. The rank-3 arrangements
// closed are at most as many as the size of the coefficient of t^3. Lists no flat, face or region.
// The order of the hyperplanes is kept: reversed, shuffled, by weight or by coordinates took 0.8 to
// 1.3 times as long, and none was best throughout.
import type { Arrangement } from '../arrangement/arrangement.js';
import { magnitude } from '../exact/integers.js';
import { multiplyPolynomials } from '../exact/polynomial.js';
import type { Ring } from '../exact/ring.js';
import { PlainDeletion } from './deletion-plain.js';
import { ResidueDeletion, UnluckyPrime } from './deletion-residue.js';
import { DeletionTally } from './deletion-tally.js';
import { irreducibleParts, type Rows } from './own-basis.js';
import { residueFieldFor } from './residue-field.js';

/** How a run reports itself, and which arithmetic it may use. */
export interface DeletionOptions {
  /** Called now and then with the rank-3 arrangements closed; estimateDeletion foretells their number. */
  readonly onProgress?: (bases: number) => void;
  /** `residues` skips plain doubles; for tests and measurements. Default `any`. */
  readonly arithmetic?: 'any' | 'residues';
}

/** Coefficients from t^0 up, degree = rank: exact for every input. */
export function characteristicPolynomialByDeletion<E>(
  arrangement: Arrangement<E>,
  options: DeletionOptions = {},
): bigint[] {
  const { ring, hyperplanes } = arrangement;
  const normals = hyperplanes.map((h) => h.essential);
  let product = [1n];
  let closed = 0;
  for (const part of irreducibleParts(ring, normals)) {
    const report = (bases: number): void => options.onProgress?.(closed + bases);
    const { polynomial, bases } = polynomialOfPart(ring, part, options, report);
    product = multiplyPolynomials(product, polynomial);
    closed += bases;
  }
  return product;
}

function polynomialOfPart<E>(
  ring: Ring<E>,
  normals: Rows<E>,
  options: DeletionOptions,
  report: (bases: number) => void,
): { polynomial: bigint[]; bases: number } {
  const rank = normals[0].length;
  const n = BigInt(normals.length);
  if (rank === 1) return { polynomial: [-1n, 1n], bases: 0 };
  if (rank === 2) return { polynomial: [n - 1n, -n, 1n], bases: 0 };
  const plain =
    options.arithmetic === 'residues' || ring.radicand !== null
      ? null
      : smallNumbers(normals as unknown as Rows<bigint>);
  for (let index = 0; ; index++) {
    const tally = new DeletionTally(rank, report);
    const field = residueFieldFor(ring.radicand, index);
    const all = Int32Array.from(normals.keys());
    let sure: ResidueDeletion<E> | null = null;
    const handOver = (path: Int32Array, depth: number, rows: Int32Array, count: number): void => {
      sure ??= new ResidueDeletion(ring, normals, rank, field, tally);
      sure.start(path, depth, rows, count);
    };
    try {
      if (plain === null) handOver(new Int32Array(rank), 0, all, normals.length);
      else new PlainDeletion(plain, normals.length, rank, tally, handOver).visit(0, normals.length);
      return { polynomial: tally.polynomial(), bases: tally.bases };
    } catch (error) {
      if (!(error instanceof UnluckyPrime)) throw error;
    }
  }
}

/** The rows as doubles when every entry is below 2^53. */
function smallNumbers(rows: Rows<bigint>): Float64Array | null {
  const flat = rows.flat();
  return flat.every((x) => magnitude(x) < 1n << 53n) ? Float64Array.from(flat, Number) : null;
}
