// What counting the faces by Moebius values will cost, once the flats are listed: it walks the upper
// interval of every flat, so a few evenly spaced flats of each rank tell.
import type { FlatLattice } from '../flat/lattice.js';
import { distantFlats, secondsPerDistantStep, secondsPerIntervalStep } from '../limits.js';

/** Flats of each rank that are tried. */
const tried = 5;

/** Seconds by estimate; deterministic, and a small part of the listing itself. */
export function estimateMoebiusSeconds(lattice: FlatLattice): number {
  const { rank, rankOffsets } = lattice;
  const walk = new CoverCount(lattice);
  let steps = 0;
  for (let k = 0; k <= rank; k++) {
    const flats = rankOffsets[k + 1] - rankOffsets[k];
    const samples = Math.min(tried, flats);
    for (let s = 0; s < samples; s++) {
      const flat = rankOffsets[k] + Math.floor(((s + 0.5) * flats) / samples);
      steps += (walk.coversAbove(flat) * flats) / samples;
    }
  }
  return (
    steps * (lattice.flatCount < distantFlats ? secondsPerIntervalStep : secondsPerDistantStep)
  );
}

/** Counts the covers in upper intervals. */
class CoverCount {
  readonly #lattice: FlatLattice;
  readonly #seen: Int32Array;
  readonly #queue: Int32Array;

  constructor(lattice: FlatLattice) {
    this.#lattice = lattice;
    this.#seen = new Int32Array(lattice.flatCount).fill(-1);
    this.#queue = new Int32Array(lattice.flatCount);
  }

  coversAbove(flat: number): number {
    const { coverOffsets, coverTargets } = this.#lattice;
    const seen = this.#seen;
    const queue = this.#queue;
    let covers = 0;
    let end = 0;
    queue[end++] = flat;
    for (let at = 0; at < end; at++) {
      const z = queue[at];
      covers += coverOffsets[z + 1] - coverOffsets[z];
      for (let i = coverOffsets[z]; i < coverOffsets[z + 1]; i++) {
        const y = coverTargets[i];
        if (seen[y] === flat) continue;
        seen[y] = flat;
        queue[end++] = y;
      }
    }
    return covers;
  }
}
