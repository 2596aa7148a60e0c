// Faces counted without listing one (T. Zaslavsky, 1975, Facing up to Arrangements): those of
// dimension k are, for each flat X of dimension k, the regions of the restriction to X, which are
// the sum of |mu(X, Y)| over the flats Y in X. Each upper interval is walked once, by covers, with
// Weisner's theorem: mu(X, Y) = - sum of mu(X, Z) over the Z covered by Y, Z in X, that a does not
// contain, where a is an atom of the interval: here X cut with the least hyperplane that contains
// Y and not X.
import type { FlatLattice } from './lattice.js';

/** Faces by dimension 0..rank, above the lineality space; exact for any size. */
export function faceCountsByMoebius(lattice: FlatLattice): bigint[] {
  const { rank, rankOffsets } = lattice;
  const walk = new IntervalWalk(lattice);
  const counts = new Array<bigint>(rank + 1).fill(0n);
  for (let k = 0; k <= rank; k++) {
    let regions = 0;
    for (let f = rankOffsets[k]; f < rankOffsets[k + 1]; f++) {
      const plain = walk.regionsAbove(f);
      if (plain === null) counts[rank - k] += walk.exactRegionsAbove(f);
      else regions += plain;
      if (regions >= 2 ** 52) {
        counts[rank - k] += BigInt(regions);
        regions = 0;
      }
    }
    counts[rank - k] += BigInt(regions);
  }
  return counts;
}

/** For each flat of rank k, in order, the regions of the restriction to it: the faces that span it. */
export function faceCountsOfRank(lattice: FlatLattice, k: number): bigint[] {
  const { rankOffsets } = lattice;
  const walk = new IntervalWalk(lattice);
  return Array.from({ length: rankOffsets[k + 1] - rankOffsets[k] }, (_, i) => {
    const flat = rankOffsets[k] + i;
    const plain = walk.regionsAbove(flat);
    return plain === null ? walk.exactRegionsAbove(flat) : BigInt(plain);
  });
}

/** Walks upper intervals; the marks of one walk are told from those of another by their stamp. */
class IntervalWalk {
  private readonly lattice: FlatLattice;
  private readonly stamps: Int32Array;
  private readonly values: Float64Array;
  /** By flat in the interval, the atom's hyperplane. */
  private readonly atoms: Int32Array;
  private readonly queue: Int32Array;
  private stamp = 0;

  constructor(lattice: FlatLattice) {
    this.lattice = lattice;
    this.stamps = new Int32Array(lattice.flatCount);
    this.values = new Float64Array(lattice.flatCount);
    this.atoms = new Int32Array(lattice.flatCount);
    this.queue = new Int32Array(lattice.flatCount);
  }

  /** Sum of |mu(X, Y)|, below 2^52; null when that is not sure. */
  regionsAbove(x: number): number | null {
    const { wordsPerRow: W, zero, coverOffsets, coverTargets } = this.lattice;
    const { stamps, values, atoms, queue } = this;
    const stamp = ++this.stamp;
    let end = 0;
    queue[end++] = x;
    values[x] = 1;
    stamps[x] = stamp;
    let sum = 0;
    // Numbers ascend with the rank, and the queue takes whole ranks in turn, so a value is
    // complete when it is its flat's turn. The terms of one value have one sign: |values| only
    // grow, and below 2^52 nothing was rounded.
    for (let at = 0; at < end; at++) {
      const z = queue[at];
      const value = values[z];
      sum += value < 0 ? -value : value;
      for (let i = coverOffsets[z]; i < coverOffsets[z + 1]; i++) {
        const y = coverTargets[i];
        if (stamps[y] !== stamp) {
          stamps[y] = stamp;
          values[y] = 0;
          queue[end++] = y;
          let w = 0;
          let outside = 0;
          for (; w < W; w++) {
            outside = zero[y * W + w] & ~zero[x * W + w];
            if (outside !== 0) break;
          }
          atoms[y] = (w << 5) + 31 - Math.clz32(outside & -outside);
        }
        const h = atoms[y];
        if (((zero[z * W + (h >> 5)] >>> (h & 31)) & 1) === 0) values[y] -= value;
      }
    }
    return sum < 2 ** 52 ? sum : null;
  }

  /** The same in BigInt, after regionsAbove(x) has left its queue and atoms. */
  exactRegionsAbove(x: number): bigint {
    const { wordsPerRow: W, zero, coverOffsets, coverTargets } = this.lattice;
    const values = new Map<number, bigint>([[x, 1n]]);
    let sum = 0n;
    for (let at = 0; ; at++) {
      const z = this.queue[at];
      const value = values.get(z)!;
      sum += value < 0n ? -value : value;
      if (coverOffsets[z] === coverOffsets[z + 1]) return sum;
      for (let i = coverOffsets[z]; i < coverOffsets[z + 1]; i++) {
        const y = coverTargets[i];
        const h = this.atoms[y];
        const known = values.get(y) ?? 0n;
        const apart = ((zero[z * W + (h >> 5)] >>> (h & 31)) & 1) === 0;
        values.set(y, apart ? known - value : known);
      }
    }
  }
}
