// Looking regions up by their signs, and from that their walls: in a complete list a hyperplane is a
// wall of a region exactly when the word with that one bit flipped is listed too. The hash is a
// XOR of one random key a hyperplane (A. Zobrist, 1970, A new hashing method with application for
// game playing), so that flipping a bit costs one XOR.
import { wordsFor } from '../bits/signs.js';
import type { RegionTable } from './regions.js';

/** Fixed pseudo-random 32-bit keys, by the finaliser of MurmurHash3 (A. Appleby, public domain). */
function hyperplaneKeys(count: number): Int32Array {
  const keys = new Int32Array(count);
  for (let h = 0; h < count; h++) {
    let x = Math.imul(h + 1, 0x9e3779b9);
    x = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
    x = Math.imul(x ^ (x >>> 13), 0xc2b2ae35);
    keys[h] = x ^ (x >>> 16);
  }
  return keys;
}

/**
 * Finds sign words in a half table (every row has hyperplane 0 positive, rows distinct). The table's
 * rows are read where they lie: they must not change while the index is used.
 */
export class RegionIndex {
  protected readonly hyperplanes: number;
  protected readonly wordsPerRow: number;
  protected readonly rows: number;
  /** The table's own words. */
  protected readonly words: Int32Array;
  /** One key a hyperplane; a row's hash is the XOR of the keys of its ones. */
  protected readonly keys: Int32Array;
  /** XOR of the keys of eight hyperplanes at a time: entry (b << 8 | byte) for byte number b of a row. */
  private readonly byteKeys: Int32Array;
  /** Open addressing, linear probing, at most half full: row + 1, or 0 where free. */
  private readonly slots: Int32Array;
  private readonly slotShift: number;
  /** A bit for each top-of-hash; small enough to stay in cache, it turns away most absent words. */
  private readonly filter: Int32Array;
  private readonly filterShift: number;

  constructor(table: RegionTable) {
    const { hyperplanes, half } = table;
    this.hyperplanes = hyperplanes;
    this.wordsPerRow = wordsFor(hyperplanes);
    this.rows = half.rows;
    this.words = half.words;
    this.keys = hyperplaneKeys(hyperplanes);
    this.byteKeys = new Int32Array(this.wordsPerRow << 10);
    for (let b = 0; b < this.wordsPerRow << 2; b++) {
      for (let bit = 0; bit < 8 && b * 8 + bit < hyperplanes; bit++) {
        const key = this.keys[b * 8 + bit];
        for (let low = 0; low < 1 << bit; low++) {
          this.byteKeys[(b << 8) | (1 << bit) | low] = this.byteKeys[(b << 8) | low] ^ key;
        }
      }
    }
    // 2^slotBits is at least twice the rows; sixteen filter bits a row or more leave few false hits.
    const slotBits = Math.max(4, 33 - Math.clz32(Math.max(1, this.rows)));
    const filterBits = Math.min(32, slotBits + 3);
    this.slots = new Int32Array(2 ** slotBits);
    this.slotShift = 32 - slotBits;
    this.filter = new Int32Array(2 ** (filterBits - 5));
    this.filterShift = 32 - filterBits;
    for (let row = 0; row < this.rows; row++) this.insert(row);
  }

  private insert(row: number): void {
    const hash = this.hashOf(this.words, row * this.wordsPerRow);
    const mask = this.slots.length - 1;
    let slot = hash >>> this.slotShift;
    while (this.slots[slot] !== 0) slot = (slot + 1) & mask;
    this.slots[slot] = row + 1;
    const bit = hash >>> this.filterShift;
    this.filter[bit >>> 5] |= 1 << (bit & 31);
  }

  /** XOR of the keys of the ones in the row at `offset`. */
  protected hashOf(words: Int32Array, offset: number): number {
    const { byteKeys, wordsPerRow } = this;
    let hash = 0;
    for (let w = 0; w < wordsPerRow; w++) {
      const x = words[offset + w];
      const base = w << 10;
      hash ^=
        byteKeys[base | (x & 255)] ^
        byteKeys[(base + 256) | ((x >>> 8) & 255)] ^
        byteKeys[(base + 512) | ((x >>> 16) & 255)] ^
        byteKeys[(base + 768) | (x >>> 24)];
    }
    return hash;
  }

  /** False when no row has this hash; true when one may have. */
  protected mayHold(hash: number): boolean {
    const bit = hash >>> this.filterShift;
    return ((this.filter[bit >>> 5] >>> (bit & 31)) & 1) !== 0;
  }

  /** The row whose words are those at `offset`, all of them with this hash; -1 when there is none. */
  protected probe(hash: number, words: Int32Array, offset: number): number {
    const { slots, wordsPerRow } = this;
    const mask = slots.length - 1;
    for (let slot = hash >>> this.slotShift; ; slot = (slot + 1) & mask) {
      const row = slots[slot] - 1;
      if (row < 0) return -1;
      const at = row * wordsPerRow;
      let w = 0;
      while (w < wordsPerRow && this.words[at + w] === words[offset + w]) w++;
      if (w === wordsPerRow) return row;
    }
  }

  /** Row of the half table that holds the word (its bit of hyperplane 0 is 1); -1 when none does. */
  rowOf(words: Int32Array, offset: number): number {
    const hash = this.hashOf(words, offset);
    return this.mayHold(hash) ? this.probe(hash, words, offset) : -1;
  }

  /**
   * Region number of any sign word: row i of the half table is region i, its negation is region
   * rows + i; -1 when no region has these signs. Spare bits of the last word must be clear.
   */
  regionOf(words: Int32Array, offset: number): number {
    if ((words[offset] & 1) !== 0) return this.rowOf(words, offset);
    const negated = negatedWord(words, offset, this.hyperplanes);
    const row = this.rowOf(negated, 0);
    return row < 0 ? -1 : this.rows + row;
  }
}

/** The word of the opposite region, in an array of its own. */
export function negatedWord(words: Int32Array, offset: number, hyperplanes: number): Int32Array {
  const count = wordsFor(hyperplanes);
  const negated = new Int32Array(count);
  for (let w = 0; w < count; w++) negated[w] = ~words[offset + w];
  if ((hyperplanes & 31) !== 0) negated[count - 1] &= (1 << (hyperplanes & 31)) - 1;
  return negated;
}

/** Calls `visit` with the sign word of every region: the half table, then the negations. */
export function eachRegion(
  table: RegionTable,
  visit: (words: Int32Array, offset: number, region: number) => void,
): void {
  const { words, rows, wordsPerRow } = table.half;
  for (let row = 0; row < rows; row++) visit(words, row * wordsPerRow, row);
  for (let row = 0; row < rows; row++) {
    visit(negatedWord(words, row * wordsPerRow, table.hyperplanes), 0, rows + row);
  }
}

/** Walls of the regions of a complete half table. */
export class WallFinder extends RegionIndex {
  /** The row asked about, one bit flipped at a time. */
  private readonly flipped: Int32Array;
  private readonly found: Int32Array;
  private readonly allKeys: number;

  constructor(table: RegionTable) {
    super(table);
    this.flipped = new Int32Array(this.wordsPerRow);
    this.found = new Int32Array(this.hyperplanes);
    let all = 0;
    for (const key of this.keys) all ^= key;
    this.allKeys = all;
  }

  /** Walls of the region of `row` (0 <= row < half.rows) and of its negation: hyperplanes, ascending. */
  wallsOf(row: number): number[] {
    const walls = new Array<number>(this.find(row));
    for (let i = 0; i < walls.length; i++) walls[i] = this.found[i];
    return walls;
  }

  /** Number of walls of the region of `row`; the arrangement is simplicial when all equal its rank. */
  wallCount(row: number): number {
    return this.find(row);
  }

  private find(row: number): number {
    const { words, wordsPerRow, flipped, found, keys, hyperplanes } = this;
    const offset = row * wordsPerRow;
    const hash = this.hashOf(words, offset);
    let count = 0;
    // Across hyperplane 0 lies a region whose negation is the one listed.
    const across = hash ^ this.allKeys ^ keys[0];
    if (this.mayHold(across)) {
      flipped.set(negatedWord(words, offset, hyperplanes));
      flipped[0] |= 1;
      if (this.isListed(across)) found[count++] = 0;
    }
    for (let w = 0; w < wordsPerRow; w++) flipped[w] = words[offset + w];
    for (let h = 1; h < hyperplanes; h++) {
      const there = hash ^ keys[h];
      if (!this.mayHold(there)) continue;
      flipped[h >> 5] ^= 1 << (h & 31);
      if (this.isListed(there)) found[count++] = h;
      flipped[h >> 5] ^= 1 << (h & 31);
    }
    return count;
  }

  private isListed(hash: number): boolean {
    return this.probe(hash, this.flipped, 0) >= 0;
  }
}
