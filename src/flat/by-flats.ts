// The characteristic polynomial read off the flats: chi(t) = sum of mu(X) t^(r - rank X) over all
// flats X (G.-C. Rota, 1964, On the foundations of combinatorial theory I).
import type { FlatLattice } from './lattice.js';

/** Coefficients from t^0 up, degree = rank. */
export function characteristicPolynomialByFlats(lattice: FlatLattice): bigint[] {
  const { rank, rankOffsets, moebius } = lattice;
  const coefficients = new Array<bigint>(rank + 1).fill(0n);
  for (let k = 0; k <= rank; k++) {
    let sum = 0n;
    for (let f = rankOffsets[k]; f < rankOffsets[k + 1]; f++) sum += moebius[f];
    coefficients[rank - k] = sum;
  }
  return coefficients;
}
