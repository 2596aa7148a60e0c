// Whether the lattice of flats has a maximal chain of modular flats (R. Stanley, 1972, Supersolvable
// lattices). A coatom X is modular exactly when every flat of rank 2 meets it in a hyperplane at
// least (A. Björner, P. Edelman, G. Ziegler, 1990, Hyperplane arrangements with a lattice of
// regions, theorem 4.3), and then any modular coatom will do for the next step: the meets of X with
// a modular chain are modular again, so nothing is ever taken back.
import { countBits } from '../bits/signs.js';
import type { FlatLattice } from '../flat/lattice.js';

/**
 * `roots` are the roots of the characteristic polynomial if all are integers. That is necessary
 * (Stanley, 1972), and the hyperplanes outside a modular coatom number one of them, which leaves
 * few coatoms to try.
 */
export function isSupersolvable(lattice: FlatLattice, roots: readonly bigint[] | null): boolean {
  if (roots === null) return false;
  const { rank, rankOffsets, wordsPerRow, zero } = lattice;
  const left = roots.map(Number);
  let top = zero.subarray(rankOffsets[rank] * wordsPerRow, (rankOffsets[rank] + 1) * wordsPerRow);
  const within = (flat: number, X: Int32Array): boolean => {
    for (let w = 0; w < wordsPerRow; w++) {
      if ((zero[flat * wordsPerRow + w] & ~X[w]) !== 0) return false;
    }
    return true;
  };
  const meets = (flat: number, X: Int32Array): boolean => {
    for (let w = 0; w < wordsPerRow; w++) {
      if ((zero[flat * wordsPerRow + w] & X[w]) !== 0) return true;
    }
    return false;
  };
  let lines = range(rankOffsets[2] ?? 0, rankOffsets[3] ?? 0);
  for (let k = rank; k > 2; k--) {
    let found: Int32Array | null = null;
    for (let flat = rankOffsets[k - 1]; flat < rankOffsets[k] && found === null; flat++) {
      if (!within(flat, top)) continue;
      const X = zero.subarray(flat * wordsPerRow, (flat + 1) * wordsPerRow);
      const outside = onesOf(top) - onesOf(X);
      if (left.includes(outside) && lines.every((line) => meets(line, X))) found = X;
    }
    if (found === null) return false;
    left.splice(left.indexOf(onesOf(top) - onesOf(found)), 1);
    top = found;
    const inside = found;
    lines = lines.filter((line) => within(line, inside));
  }
  return true;
}

function range(from: number, to: number): number[] {
  return Array.from({ length: to - from }, (_, i) => from + i);
}

function onesOf(words: Int32Array): number {
  return countBits(words, 0, words.length);
}
