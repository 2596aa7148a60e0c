// The flats of an arrangement, rank by rank from the whole space down to the centre, with the
// covers between them. A flat is known by the set of hyperplanes that contain it.
//
// Every flat of rank k is met first from one flat of rank k - 1, its parent, and the flats of one
// parent have consecutive numbers; so a walk through one rank in order is a depth-first walk of the
// tree of parents, and the traces on each flat come from those on its parent by one elimination.
import type { Arrangement } from '../arrangement/arrangement.js';
import { fullMask, WordTable, wordsFor } from '../bits/signs.js';
import { LimitError } from '../errors.js';
import { magnitude } from '../exact/integers.js';
import { moebiusValues } from './moebius.js';
import { PlainTraces, RingTraces } from './traces.js';

/** All flats; numbered by ascending rank, 0 the whole space, the last the centre. */
export interface FlatLattice {
  /** Rank r of the arrangement: the last flat's. */
  readonly rank: number;
  readonly hyperplanes: number;
  readonly wordsPerRow: number;
  readonly flatCount: number;
  /** r + 2 entries: flats of rank (codimension) k are [rankOffsets[k], rankOffsets[k + 1]). */
  readonly rankOffsets: Int32Array;
  /** flatCount * wordsPerRow: for each flat the bits of the hyperplanes that contain it. */
  readonly zero: Int32Array;
  /** mu(whole space, X) for each flat X. */
  readonly moebius: readonly bigint[];
  /** flatCount + 1 entries into `coverTargets`. */
  readonly coverOffsets: Int32Array;
  /** For flat f, from coverOffsets[f] on, the flats one rank higher that lie in it. */
  readonly coverTargets: Int32Array;
}

/** How far a listing is. */
export interface FlatProgress {
  /** Rank of the flats now being expanded, how many of them are done, and how many there are. */
  readonly rank: number;
  readonly done: number;
  readonly of: number;
  /** Flats known so far. */
  readonly flats: number;
}

export interface FlatOptions {
  readonly onProgress?: (progress: FlatProgress) => void;
}

/** Most covers that can be numbered. */
const COVER_BOUND = 2 ** 31 - 1;

/** Lists all flats; exact for every input. LimitError past 2^31 covers. */
export function listFlats<E>(arrangement: Arrangement<E>, options: FlatOptions = {}): FlatLattice {
  const builder = new LatticeBuilder(arrangement);
  for (let k = 0; k + 1 < arrangement.rank; k++) builder.expand(k, options.onProgress ?? null);
  return builder.finish();
}

class LatticeBuilder<E> {
  private readonly r: number;
  private readonly m: number;
  private readonly wordsPerRow: number;
  private readonly rankOffsets: Int32Array;
  private readonly flats: WordTable;
  /** By flat: its parent, and the class of the parent's traces that cuts it out. */
  private readonly parents: WordTable;
  /** One row a flat: where its covers start; and the covers. */
  private readonly starts: WordTable;
  private readonly targets: WordTable;
  /** Doubles, where the normals fit, and the ring; each with the rank its rows along the chain reach. */
  private readonly plain: PlainTraces | null;
  private readonly exact: RingTraces<E>;
  private plainReach = 0;
  private exactReach = 0;
  /** The chain whose traces are at hand: by rank the flat, its classes and their hyperplanes. */
  private readonly chain: Int32Array;
  private readonly classes: Int32Array;
  private readonly masks: Int32Array[];
  private readonly groupOf: Int32Array;

  constructor(arrangement: Arrangement<E>) {
    const { ring, rank, hyperplanes } = arrangement;
    const m = hyperplanes.length;
    const normals = hyperplanes.map((h) => h.essential);
    this.r = rank;
    this.m = m;
    this.wordsPerRow = wordsFor(m);
    this.rankOffsets = new Int32Array(rank + 2);
    this.rankOffsets[1] = 1;
    this.flats = new WordTable(this.wordsPerRow);
    this.parents = new WordTable(2);
    this.starts = new WordTable(1);
    this.targets = new WordTable(1);
    this.flats.rows = this.parents.rows = 1;
    const plain =
      ring.radicand === null ? plainRows(normals as unknown as readonly bigint[][]) : null;
    this.plain = plain === null ? null : new PlainTraces(plain, rank);
    this.exact = new RingTraces(ring, normals);
    this.chain = new Int32Array(rank + 1).fill(-1);
    this.chain[0] = 0;
    this.classes = new Int32Array(rank + 1);
    this.classes[0] = m;
    this.masks = Array.from({ length: rank }, () => new Int32Array(m * this.wordsPerRow));
    for (let h = 0; h < m; h++) this.masks[0][h * this.wordsPerRow + (h >> 5)] = 1 << (h & 31);
    this.groupOf = new Int32Array(m);
  }

  /** Finds the covers of all flats of rank k, which are the flats of rank k + 1; k + 1 < r. */
  expand(k: number, onProgress: ((progress: FlatProgress) => void) | null): void {
    const { flats, parents, starts, targets, wordsPerRow: W, rankOffsets } = this;
    const first = rankOffsets[k];
    const end = rankOffsets[k + 1];
    const index = new FlatIndex(flats, end);
    for (let flat = first; flat < end; flat++) {
      if (((flat - first) & 0xfff) === 0xfff) {
        onProgress?.({ rank: k, done: flat - first, of: end - first, flats: flats.rows });
      }
      this.moveTo(k, flat);
      const count = this.classes[k];
      const masks = this.masks[k];
      starts.reserve(flat + 1);
      starts.words[flat] = targets.rows;
      starts.rows = flat + 1;
      if (targets.rows + count > COVER_BOUND) {
        throw new LimitError(
          `listing the flats (rank ${k} of ${this.r})`,
          `more than ${COVER_BOUND} covers between them`,
          `${COVER_BOUND}`,
          'take the polynomial by deletion-restriction, which lists no flats',
        );
      }
      targets.reserve(targets.rows + count);
      for (let c = 0; c < count; c++) {
        const row = flats.rows;
        flats.reserve(row + 1);
        const words = flats.words;
        for (let w = 0; w < W; w++) {
          words[row * W + w] = words[flat * W + w] | masks[c * W + w];
        }
        const target = index.place(row);
        if (target === row) {
          flats.rows++;
          parents.reserve(row + 1);
          parents.words[2 * row] = flat;
          parents.words[2 * row + 1] = c;
          parents.rows++;
        }
        targets.words[targets.rows++] = target;
      }
    }
    rankOffsets[k + 2] = flats.rows;
  }

  /** Brings the traces on `flat`, of rank k, to hand. */
  private moveTo(k: number, flat: number): void {
    const { chain, parents } = this;
    let rank = k;
    let wanted = flat;
    while (chain[rank] !== wanted) {
      chain[rank] = wanted;
      wanted = parents.words[2 * wanted];
      rank--;
    }
    this.plainReach = Math.min(this.plainReach, rank);
    this.exactReach = Math.min(this.exactReach, rank);
    for (; rank < k; rank++) this.descend(rank);
  }

  /** From the flat at `rank` of the chain to the next. */
  private descend(rank: number): void {
    const { wordsPerRow: W, groupOf, classes } = this;
    const count = this.descendPlain(rank) ?? this.descendExact(rank);
    classes[rank + 1] = count;
    const masks = this.masks[rank];
    const next = this.masks[rank + 1];
    next.fill(0, 0, count * W);
    for (let i = 0; i < classes[rank]; i++) {
      const group = groupOf[i];
      if (group < 0) continue;
      for (let w = 0; w < W; w++) next[group * W + w] |= masks[i * W + w];
    }
  }

  /** The class that cuts the chain's flat of rank + 1 out of its flat of `rank`. */
  private cutting(rank: number): number {
    return this.parents.words[2 * this.chain[rank + 1] + 1];
  }

  private descendPlain(rank: number): number | null {
    if (this.plain === null || this.plainReach < rank) return null;
    const count = this.plain.descend(rank, this.classes[rank], this.cutting(rank), this.groupOf);
    if (count !== null) this.plainReach = rank + 1;
    return count;
  }

  /** Catches up with the chain where doubles went ahead; both number classes alike. */
  private descendExact(rank: number): number {
    let count = 0;
    for (; this.exactReach <= rank; this.exactReach++) {
      count = this.exact.descend(this.exactReach, this.cutting(this.exactReach), this.groupOf);
    }
    return count;
  }

  finish(): FlatLattice {
    const { flats, starts, targets, r, m, wordsPerRow, rankOffsets } = this;
    const centre = flats.rows;
    flats.reserve(centre + 1);
    flats.words.set(fullMask(m), centre * wordsPerRow);
    flats.rows++;
    rankOffsets[r] = centre;
    rankOffsets[r + 1] = centre + 1;
    starts.reserve(centre + 2);
    targets.reserve(targets.rows + centre - rankOffsets[r - 1]);
    for (let flat = rankOffsets[r - 1]; flat < centre; flat++) {
      starts.words[flat] = targets.rows;
      targets.words[targets.rows++] = centre;
    }
    starts.words[centre] = starts.words[centre + 1] = targets.rows;
    const covers = {
      rank: r,
      hyperplanes: m,
      wordsPerRow,
      flatCount: flats.rows,
      rankOffsets,
      zero: flats.words.subarray(0, flats.rows * wordsPerRow),
      coverOffsets: starts.words.subarray(0, flats.rows + 1),
      coverTargets: targets.words.subarray(0, targets.rows),
    };
    return { ...covers, moebius: moebiusValues(covers) };
  }
}

/** The rows from `start` on by their content: open addressing, a full comparison on every hit. */
class FlatIndex {
  private readonly flats: WordTable;
  private readonly start: number;
  private slots = new Int32Array(64);
  private used = 0;

  constructor(flats: WordTable, start: number) {
    this.flats = flats;
    this.start = start;
  }

  /** The row that equals `row`, which is `row` itself when it is new. */
  place(row: number): number {
    const W = this.flats.wordsPerRow;
    const { words } = this.flats;
    const mask = this.slots.length - 1;
    let slot = hashRow(words, row * W, W) & mask;
    for (;;) {
      const entry = this.slots[slot];
      if (entry === 0) break;
      const other = this.start + entry - 1;
      let w = 0;
      while (w < W && words[other * W + w] === words[row * W + w]) w++;
      if (w === W) return other;
      slot = (slot + 1) & mask;
    }
    this.slots[slot] = row - this.start + 1;
    if (2 * ++this.used > mask) this.grow();
    return row;
  }

  private grow(): void {
    const W = this.flats.wordsPerRow;
    const { words } = this.flats;
    const slots = new Int32Array(2 * this.slots.length);
    const mask = slots.length - 1;
    for (let i = 0; i < this.used; i++) {
      let slot = hashRow(words, (this.start + i) * W, W) & mask;
      while (slots[slot] !== 0) slot = (slot + 1) & mask;
      slots[slot] = i + 1;
    }
    this.slots = slots;
  }
}

function hashRow(words: Int32Array, offset: number, length: number): number {
  let h = 0;
  for (let w = offset; w < offset + length; w++) {
    h = Math.imul(h ^ words[w], 0x9e3779b1);
    h ^= h >>> 15;
  }
  h = Math.imul(h, 0x85ebca6b);
  return h ^ (h >>> 13);
}

/** The rows as doubles when every entry is below 2^53. */
function plainRows(rows: readonly (readonly bigint[])[]): Float64Array | null {
  const entries = rows.flat();
  if (entries.some((x) => magnitude(x) >= 1n << 53n)) return null;
  return Float64Array.from(entries, Number);
}
