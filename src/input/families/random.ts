// Random whole normals, the same from the same seed on every machine. Generator: SplitMix64
// (G. Steele, D. Lea, C. Flood, 2014, Fast splittable pseudorandom number generators), in integers.
import { InputError } from '../../errors.js';
import { bitLength } from '../../exact/integers.js';
import type { GeneratorList } from '../generators.js';
import { requireRoom, requireWhole, wholeList } from './family.js';

/** What to draw: `count` normals in R^rank with entries from -bound to bound. */
export interface RandomNormals {
  readonly rank: number;
  readonly count: number;
  readonly bound: bigint;
  readonly seed: bigint;
}

/** Non-zero rows that span R^rank, drawn again as a whole until they do; `count` at least `rank`. */
export function randomNormals({ rank, count, bound, seed }: RandomNormals): GeneratorList {
  requireWhole('the rank', rank, 1);
  requireWhole('the number of normals', count, 1);
  if (bound < 1n) throw new InputError(`the bound is ${bound}`, 'give a whole number, 1 or more');
  if (count < rank) {
    throw new InputError(`${count} normals cannot have rank ${rank}`, `make ${rank} or more`);
  }
  const title = `${count} random normals in R^${rank}, entries to ${bound}, seed ${seed}`;
  requireRoom(title, count, rank);
  const draw = evenDraws(bound, seed);
  const row = (): bigint[] => {
    for (;;) {
      const entries = Array.from({ length: rank }, draw);
      if (entries.some((entry) => entry !== 0n)) return entries;
    }
  };
  for (;;) {
    const rows = Array.from({ length: count }, row);
    if (spans(rows, rank)) return wholeList(title, rows);
  }
}

const mask64 = (1n << 64n) - 1n;

function splitMix(seed: bigint): () => bigint {
  let state = seed & mask64;
  return () => {
    state = (state + 0x9e3779b97f4a7c15n) & mask64;
    let z = state;
    z = ((z ^ (z >> 30n)) * 0xbf58476d1ce4e5b9n) & mask64;
    z = ((z ^ (z >> 27n)) * 0x94d049bb133111ebn) & mask64;
    return z ^ (z >> 31n);
  };
}

/** Whole numbers from -bound to bound, each as likely: leading bits of whole words, too large drawn again. */
function evenDraws(bound: bigint, seed: bigint): () => bigint {
  const word = splitMix(seed);
  const choices = 2n * bound + 1n;
  const bits = bitLength(choices);
  const words = Math.ceil(bits / 64);
  const spare = BigInt(64 * words - bits);
  return () => {
    for (;;) {
      let value = 0n;
      for (let i = 0; i < words; i += 1) value = (value << 64n) | word();
      value >>= spare;
      if (value < choices) return value - bound;
    }
  };
}

/** True only where the rows have full rank: shown modulo a prime, which never raises the rank. */
function spans(rows: readonly (readonly bigint[])[], rank: number): boolean {
  // Products of two residues stay below 2^52.
  const prime = 67_108_859;
  const basis: number[][] = [];
  const pivots: number[] = [];
  for (const row of rows) {
    const residues = row.map((entry) =>
      Number(((entry % BigInt(prime)) + BigInt(prime)) % BigInt(prime)),
    );
    basis.forEach((other, i) => {
      const factor = residues[pivots[i]!]!;
      if (factor === 0) return;
      other.forEach((value, j) => {
        residues[j] = (residues[j]! + (prime - factor) * value) % prime;
      });
    });
    const pivot = residues.findIndex((value) => value !== 0);
    if (pivot < 0) continue;
    const inverse = power(residues[pivot]!, prime - 2, prime);
    basis.push(residues.map((value) => (value * inverse) % prime));
    pivots.push(pivot);
    if (basis.length === rank) return true;
  }
  return false;
}

function power(base: number, exponent: number, prime: number): number {
  let result = 1;
  let square = base;
  for (let e = exponent; e > 0; e = Math.floor(e / 2)) {
    if (e % 2 === 1) result = (result * square) % prime;
    square = (square * square) % prime;
  }
  return result;
}
