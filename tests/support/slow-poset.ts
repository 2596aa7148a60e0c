// Face poset and lattice of flats by slow obvious code, sharing nothing with the kernels but the
// ring. Rays are the null vectors of rank - 1 independent normals; every covector is a composition
// of those of rays (A. Bjoerner, M. Las Vergnas, B. Sturmfels, N. White, G. Ziegler, 1999, Oriented
// Matroids, proposition 3.7.2; from memory). For some hundred faces.
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { setBit, wordsFor } from '../../src/bits/signs.js';
import type { Ring } from '../../src/exact/ring.js';
import type { FacePoset } from '../../src/face/poset.js';
import type { FlatLattice } from '../../src/flat/lattice.js';

function determinant<E>(ring: Ring<E>, matrix: readonly (readonly E[])[]): E {
  if (matrix.length === 0) return ring.one;
  return matrix[0].reduce((sum, entry, j) => {
    const rest = matrix.slice(1).map((row) => row.filter((_, column) => column !== j));
    const term = ring.multiply(entry, determinant(ring, rest));
    return j % 2 === 0 ? ring.add(sum, term) : ring.subtract(sum, term);
  }, ring.zero);
}

function subsets(n: number, size: number, from = 0): number[][] {
  if (size === 0) return [[]];
  const found: number[][] = [];
  for (let i = from; i < n; i++) {
    for (const rest of subsets(n, size - 1, i + 1)) found.push([i, ...rest]);
  }
  return found;
}

/** All covectors over the hyperplanes, as arrays of -1, 0 and 1. */
export function slowCovectors<E>(arrangement: Arrangement<E>): number[][] {
  const { ring, rank } = arrangement;
  const normals = arrangement.hyperplanes.map((h) => h.essential);
  const rays: number[][] = [];
  for (const chosen of subsets(normals.length, rank - 1)) {
    const rows = chosen.map((h) => normals[h]);
    const ray = Array.from({ length: rank }, (_, j) => {
      const minor = determinant(
        ring,
        rows.map((row) => row.filter((_, column) => column !== j)),
      );
      return j % 2 === 0 ? minor : ring.negate(minor);
    });
    if (ray.every((x) => ring.sign(x) === 0)) continue;
    const signs = normals.map((normal) =>
      ring.sign(normal.reduce((sum, x, j) => ring.add(sum, ring.multiply(x, ray[j])), ring.zero)),
    );
    rays.push(
      signs,
      signs.map((s) => 0 - s),
    );
  }
  const all = new Map<string, number[]>();
  let fresh = [normals.map(() => 0)];
  all.set(fresh[0].join(), fresh[0]);
  while (fresh.length > 0) {
    const next: number[][] = [];
    for (const face of fresh) {
      for (const ray of rays) {
        const composed = face.map((s, h) => (s === 0 ? ray[h] : s));
        if (all.has(composed.join())) continue;
        all.set(composed.join(), composed);
        next.push(composed);
      }
    }
    fresh = next;
  }
  return [...all.values()];
}

/** Rank of some normals: the largest size of a non-zero minor. */
function rankOf<E>(arrangement: Arrangement<E>, chosen: readonly number[]): number {
  const { ring } = arrangement;
  const independent: (readonly E[])[] = [];
  for (const h of chosen) {
    const rows = [...independent, arrangement.hyperplanes[h].essential];
    if (rows.length > arrangement.rank) break;
    const some = subsets(arrangement.rank, rows.length).some(
      (columns) =>
        ring.sign(
          determinant(
            ring,
            rows.map((row) => columns.map((c) => row[c])),
          ),
        ) !== 0,
    );
    if (some) independent.push(arrangement.hyperplanes[h].essential);
  }
  return independent.length;
}

function offsetsOf(levels: readonly number[], top: number): Int32Array {
  return Int32Array.from({ length: top + 2 }, (_, k) => levels.filter((x) => x < k).length);
}

function coversOf(covers: readonly (readonly number[])[]): [Int32Array, Int32Array] {
  const offsets = new Int32Array(covers.length + 1);
  covers.forEach((list, i) => {
    offsets[i + 1] = offsets[i] + list.length;
  });
  return [offsets, Int32Array.from(covers.flat())];
}

/** The face poset by comparing every face with every other. */
export function slowPoset<E>(arrangement: Arrangement<E>): FacePoset {
  const { rank } = arrangement;
  const hyperplanes = arrangement.hyperplanes.length;
  const wordsPerRow = wordsFor(hyperplanes);
  const ranks = new Map<string, number>();
  const zerosOf = (signs: readonly number[]) => signs.flatMap((s, h) => (s === 0 ? [h] : []));
  const dimensionOf = (signs: readonly number[]): number => {
    const zeros = zerosOf(signs);
    const known = ranks.get(zeros.join()) ?? rankOf(arrangement, zeros);
    ranks.set(zeros.join(), known);
    return rank - known;
  };
  const faces = slowCovectors(arrangement)
    .map((signs) => ({ signs, dimension: dimensionOf(signs), flat: zerosOf(signs).join() }))
    .sort((a, b) => a.dimension - b.dimension);
  const flats = [...new Map(faces.map((face) => [face.flat, face])).values()];
  const flatNumber = new Map(flats.map((face, i) => [face.flat, i]));
  const positive = new Int32Array(faces.length * wordsPerRow);
  faces.forEach((face, f) => {
    face.signs.forEach((s, h) => {
      if (s > 0) setBit(positive, f * wordsPerRow, h);
    });
  });
  const flatZero = new Int32Array(flats.length * wordsPerRow);
  flats.forEach((face, x) => {
    for (const h of zerosOf(face.signs)) setBit(flatZero, x * wordsPerRow, h);
  });
  const covers = faces.map((low) =>
    faces.flatMap((high, g) =>
      high.dimension === low.dimension + 1 &&
      low.signs.every((s, h) => s === 0 || s === high.signs[h])
        ? [g]
        : [],
    ),
  );
  const [coverOffsets, coverTargets] = coversOf(covers);
  return {
    rank,
    hyperplanes,
    wordsPerRow,
    faceCount: faces.length,
    flatCount: flats.length,
    dimensionOffsets: offsetsOf(
      faces.map((face) => face.dimension),
      rank,
    ),
    flatOf: Int32Array.from(faces.map((face) => flatNumber.get(face.flat)!)),
    flatDimension: Uint8Array.from(flats.map((face) => face.dimension)),
    flatZero,
    positive,
    coverOffsets,
    coverTargets,
  };
}

/** The lattice of flats from the zero sets of the covectors; Moebius values by their definition. */
export function slowLattice<E>(arrangement: Arrangement<E>): FlatLattice {
  const { rank } = arrangement;
  const hyperplanes = arrangement.hyperplanes.length;
  const wordsPerRow = wordsFor(hyperplanes);
  const zeroSets = new Map<string, number[]>();
  for (const signs of slowCovectors(arrangement)) {
    const zeros = signs.flatMap((s, h) => (s === 0 ? [h] : []));
    zeroSets.set(zeros.join(), zeros);
  }
  const flats = [...zeroSets.values()]
    .map((zeros) => ({ zeros, rank: rankOf(arrangement, zeros) }))
    .sort((a, b) => a.rank - b.rank);
  const below = (x: (typeof flats)[number], y: (typeof flats)[number]) =>
    x.rank < y.rank && x.zeros.every((h) => y.zeros.includes(h));
  const moebius: bigint[] = [];
  flats.forEach((y, i) => {
    const sum = flats.reduce((total, x, j) => (below(x, y) ? total + moebius[j] : total), 0n);
    moebius[i] = i === 0 ? 1n : -sum;
  });
  const zero = new Int32Array(flats.length * wordsPerRow);
  flats.forEach((flat, x) => {
    for (const h of flat.zeros) setBit(zero, x * wordsPerRow, h);
  });
  const [coverOffsets, coverTargets] = coversOf(
    flats.map((x) => flats.flatMap((y, j) => (y.rank === x.rank + 1 && below(x, y) ? [j] : []))),
  );
  return {
    rank,
    hyperplanes,
    wordsPerRow,
    flatCount: flats.length,
    rankOffsets: offsetsOf(
      flats.map((flat) => flat.rank),
      rank,
    ),
    zero,
    moebius,
    coverOffsets,
    coverTargets,
  };
}
