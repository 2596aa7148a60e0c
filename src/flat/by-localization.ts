// Regions of localizations: those of the hyperplanes through a flat X alone are the sum of |mu(Y)|
// over the flats Y that contain X (T. Zaslavsky, 1975, Facing up to Arrangements). The zonotope has a
// face for each cone that spans X, and that is how many vertices it has.
import type { FlatLattice } from './lattice.js';

/** For each flat of rank k, in order, the regions of the arrangement of the hyperplanes through it. */
export function regionsThroughFlats(lattice: FlatLattice, k: number): bigint[] {
  const { rankOffsets, moebius } = lattice;
  const { offsets, sources } = coveredBy(lattice);
  const seen = new Int32Array(lattice.flatCount).fill(-1);
  const queue = new Int32Array(lattice.flatCount);
  return Array.from({ length: rankOffsets[k + 1] - rankOffsets[k] }, (_, i) => {
    const flat = rankOffsets[k] + i;
    let regions = 0n;
    let end = 0;
    queue[end++] = flat;
    seen[flat] = flat;
    for (let at = 0; at < end; at++) {
      const y = queue[at];
      regions += moebius[y] < 0n ? -moebius[y] : moebius[y];
      for (let c = offsets[y]; c < offsets[y + 1]; c++) {
        const z = sources[c];
        if (seen[z] === flat) continue;
        seen[z] = flat;
        queue[end++] = z;
      }
    }
    return regions;
  });
}

/** The covers turned round: for flat f, from offsets[f] on, the flats one rank lower that contain it. */
function coveredBy({ flatCount, coverOffsets, coverTargets }: FlatLattice): {
  offsets: Int32Array;
  sources: Int32Array;
} {
  const offsets = new Int32Array(flatCount + 1);
  const covers = coverOffsets[flatCount];
  for (let c = 0; c < covers; c++) offsets[coverTargets[c] + 1]++;
  for (let f = 0; f < flatCount; f++) offsets[f + 1] += offsets[f];
  const next = offsets.slice();
  const sources = new Int32Array(covers);
  for (let f = 0; f < flatCount; f++) {
    for (let c = coverOffsets[f]; c < coverOffsets[f + 1]; c++)
      sources[next[coverTargets[c]]++] = f;
  }
  return { offsets, sources };
}
