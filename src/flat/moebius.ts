// Moebius values by Weisner's theorem (L. Weisner, 1935, Abstract theory of inversion of finite
// series) over covers only: for an atom a below X, mu(X) = - sum of mu(Y) over the Y covered by X
// that a is not below. The atom taken is the least hyperplane that contains X.
import { firstBit } from '../bits/signs.js';
import type { FlatLattice } from './lattice.js';

/** mu(whole space, X) for every flat X, exact for any size. */
export function moebiusValues(covers: Omit<FlatLattice, 'moebius'>): bigint[] {
  const { flatCount, wordsPerRow: W, zero, coverOffsets, coverTargets } = covers;
  const least = new Int32Array(flatCount);
  for (let f = 0; f < flatCount; f++) least[f] = firstBit(zero, f * W, W);
  const forEachTerm = (take: (above: number, below: number) => void): void => {
    for (let f = 0; f < flatCount; f++) {
      for (let i = coverOffsets[f]; i < coverOffsets[f + 1]; i++) {
        const target = coverTargets[i];
        const h = least[target];
        if (((zero[f * W + (h >> 5)] >>> (h & 31)) & 1) === 0) take(target, f);
      }
    }
  };
  // The terms of one flat have one sign, the rank's: sums only grow, and one that stays below 2^53
  // was exact throughout.
  const plain = new Float64Array(flatCount);
  plain[0] = 1;
  let largest = 0;
  forEachTerm((target, f) => {
    plain[target] -= plain[f];
    largest = Math.max(largest, Math.abs(plain[target]));
  });
  if (largest < 2 ** 53) {
    // Most values occur many times: one BigInt for each keeps millions of flats small.
    const known = new Map<number, bigint>();
    const values = new Array<bigint>(flatCount);
    for (let f = 0; f < flatCount; f++) {
      let value = known.get(plain[f]);
      if (value === undefined) {
        value = BigInt(plain[f]);
        known.set(plain[f], value);
      }
      values[f] = value;
    }
    return values;
  }
  const values = new Array<bigint>(flatCount).fill(0n);
  values[0] = 1n;
  forEachTerm((target, f) => {
    values[target] -= values[f];
  });
  return values;
}
