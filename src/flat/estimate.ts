// What the two routes to the polynomial would cost, from random descents of the trees they walk
// (D. Knuth, 1975, Estimating the efficiency of backtrack programs): a descent takes one child at
// each node and weighs it by the inverse of its probability, so counts are right on average. The
// probabilities are those that would make every descent count alike in general position.
import type { Arrangement } from '../arrangement/arrangement.js';
import { wordsFor } from '../bits/signs.js';
import type { Ring } from '../exact/ring.js';
import { minorBounds } from './minor-bounds.js';
import { irreducibleParts, type Rows } from './own-basis.js';
import { type ResidueField, residueFieldFor } from './residue-field.js';
import { type ResidueRows, residuesOf, restrictResidues } from './residue-traces.js';

/** The cost of characteristicPolynomialByDeletion. */
export interface DeletionEstimate {
  /** Rank-3 arrangements to close: for an irreducible one at most the size of the coefficient of t^3. */
  readonly bases: number;
  readonly seconds: number;
}

/** The cost of listFlats. */
export interface FlatEstimate {
  readonly flats: number;
  readonly seconds: number;
  /** At the peak, tables only. */
  readonly bytes: number;
}

// Seconds, measured on one core of a 2-core machine with Node 20: orders of magnitude elsewhere.
const perBase = 2.5e-7;
const perNode = 1.5e-7;
const perPair = 1.3e-8;
const perEntry = 5e-9;
const residuesSlower = 3;
const perCover = 3.5e-7;
const perCoverWord = 1.5e-8;
const perIntegerEntry = 2e-6;
const perRootEntry = 1.2e-5;

/** Entries of rows that the descents of one estimate may read: about a fifth of a second. */
const entriesRead = 3_000_000;

/** Random fractions, the same for the same arrangement. */
function fractions(): () => number {
  let state = 0x2545f491;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 2 ** 32;
  };
}

function binomial(n: number, k: number): number {
  let product = 1;
  for (let i = 0; i < k; i++) product *= (n - i) / (i + 1);
  return n < k ? 0 : product;
}

function descentsFor(normals: number, rank: number): number {
  const entries = normals * rank * rank;
  return Math.min(4000, Math.max(40, Math.ceil(entriesRead / entries)));
}

/** About how long deletion-restriction takes; deterministic, a fraction of a second. */
export function estimateDeletion<E>(arrangement: Arrangement<E>): DeletionEstimate {
  const { ring, hyperplanes } = arrangement;
  const normals = hyperplanes.map((h) => h.essential);
  let bases = 0;
  let seconds = hyperplanes.length * 1e-6;
  for (const part of irreducibleParts(ring, normals)) {
    const estimate = estimatePart(ring, part);
    bases += estimate.bases;
    seconds += estimate.seconds;
  }
  return { bases: Math.round(bases), seconds };
}

function estimatePart<E>(ring: Ring<E>, normals: Rows<E>): DeletionEstimate {
  const rank = normals[0].length;
  if (rank < 3) return { bases: 0, seconds: 0 };
  const field = residueFieldFor(ring.radicand, 0);
  const whole = residuesOf(field, ring, normals);
  const descents = rank === 3 ? 1 : descentsFor(normals.length, rank);
  const random = fractions();
  let bases = 0;
  let nodes = 0;
  let pairs = 0;
  let entries = 0;
  for (let d = 0; d < descents; d++) {
    let node = whole;
    let weight = 1 / descents;
    let picks = rank - 3;
    for (; picks > 0; picks--) {
      const n = node.count;
      nodes += weight;
      if (n <= 2) break;
      // The node restricts its first i rows to row i, for every i.
      entries += (weight * n * n * node.width) / 2;
      // Child i has about C(i, 0) + ... + C(i, picks - 1) nodes below it.
      const { pick, probability } = choose(
        Array.from({ length: n }, (_, i) => subsets(i, picks - 1)),
        random,
      );
      weight /= probability;
      node = restrictResidues(field, node, pick, pick);
    }
    if (picks > 0) continue;
    bases += weight;
    pairs += (weight * node.count * node.count) / 2;
  }
  const slow = isPlain(ring, normals, rank - 2) ? 1 : residuesSlower;
  const seconds = slow * (bases * perBase + nodes * perNode + pairs * perPair + entries * perEntry);
  return { bases, seconds };
}

/** Subsets of n things of up to k. */
function subsets(n: number, k: number): number {
  let sum = 0;
  for (let e = 0; e <= k; e++) sum += binomial(n, e);
  return sum;
}

/** One of the shares, each with the probability that is its part of the whole. */
function choose(
  shares: readonly number[],
  random: () => number,
): { pick: number; probability: number } {
  const total = shares.reduce((a, b) => a + b, 0);
  let at = random() * total;
  let pick = 0;
  while (pick < shares.length - 1 && at >= shares[pick]) at -= shares[pick++];
  return { pick, probability: shares[pick] / total };
}

/** About how many flats there are, and what listing them takes; deterministic, a fraction of a second. */
export function estimateFlats<E>(arrangement: Arrangement<E>): FlatEstimate {
  const { ring, rank, hyperplanes } = arrangement;
  const m = hyperplanes.length;
  const normals = hyperplanes.map((h) => h.essential);
  const field = residueFieldFor(ring.radicand, 0);
  const whole = residuesOf(field, ring, normals);
  const descents = rank <= 2 ? 1 : descentsFor(m, rank);
  const random = fractions();
  const sums = { flats: 1 + (rank > 1 ? 1 : 0), covers: 0, entries: 0 };
  let lowest = 0;
  for (let d = 0; d < descents; d++) {
    lowest += descendFlats(field, whole, rank, 1 / descents, random, sums);
  }
  const covers = sums.covers + (rank > 1 ? lowest : 1);
  const flats = sums.flats + (rank > 1 ? 0 : 1);
  const words = wordsFor(m);
  let seconds = 1e-3 + covers * (perCover + perCoverWord * words);
  if (!isPlain(ring, normals, rank - 1)) {
    seconds += sums.entries * (ring.radicand === null ? perIntegerEntry : perRootEntry);
  }
  // Tables grow by 1.6 and are copied then: about twice what they hold is touched at the peak.
  const bytes = flats * ((4 * words + 12) * 2 + 36) + covers * 4 * 2;
  return { flats: Math.round(flats), seconds, bytes: Math.round(bytes) };
}

/**
 * One descent of the tree of flats in which a flat's parent is the span of all but the last of its
 * lexicographically first basis: the child by a class of traces is in the tree exactly when the
 * least hyperplane of the class comes after the basis so far. Returns the flats of rank r - 1.
 */
function descendFlats(
  field: ResidueField,
  whole: ResidueRows,
  rank: number,
  start: number,
  random: () => number,
  sums: { flats: number; covers: number; entries: number },
): number {
  let node = whole;
  let weight = start;
  let last = -1;
  let children = 0;
  for (let k = 0; k + 1 < rank; k++) {
    const n = node.count;
    let first = 0;
    while (first < n && node.least[first] <= last) first++;
    children = n - first;
    sums.covers += weight * n;
    sums.entries += weight * n * node.width;
    sums.flats += weight * children;
    if (children === 0) return 0;
    if (k + 2 === rank) break;
    // A child with c siblings after it has about C(c, 0) + C(c, 1) + ... flats below it.
    const { pick, probability } = choose(
      Array.from({ length: children }, (_, i) => subsets(children - 1 - i, rank - 2 - k)),
      random,
    );
    weight /= probability;
    last = node.least[first + pick];
    node = restrictResidues(field, node, first + pick, n);
  }
  return weight * children;
}

/** Whether minors of k normals are likely to stay within plain doubles. */
function isPlain<E>(ring: Ring<E>, normals: Rows<E>, k: number): boolean {
  if (ring.radicand !== null) return false;
  const bounds = minorBounds(ring, normals);
  // Typical minors stay some bits below Hadamard's bound.
  return (bounds[Math.min(k, bounds.length - 1)] ?? 0) < 38;
}
