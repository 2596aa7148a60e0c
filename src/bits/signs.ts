// Sign vectors over hyperplanes, packed. THE SIGN CONVENTION, stated here and nowhere else:
//   a sign word has one bit a hyperplane, bit (h & 31) of Int32 word (h >> 5); the bit is 1 where
//   the point lies on the positive side (normal . point > 0) and 0 where it lies on the negative
//   side or on the hyperplane; a face carries besides a zero mask with 1 where it lies on it.
//   In text the three are '+', '-' and '0'.

/** Int32 words that n hyperplanes need. */
export function wordsFor(hyperplanes: number): number {
  return (hyperplanes + 31) >> 5;
}

/** Bit of hyperplane h in the row that starts at `offset`. */
export function bitAt(words: Int32Array, offset: number, h: number): number {
  return (words[offset + (h >> 5)] >>> (h & 31)) & 1;
}

/** Sets the bit of hyperplane h. */
export function setBit(words: Int32Array, offset: number, h: number): void {
  words[offset + (h >> 5)] |= 1 << (h & 31);
}

/** Number of ones in a row. */
export function countBits(words: Int32Array, offset: number, length: number): number {
  let count = 0;
  for (let w = 0; w < length; w++) {
    let x = words[offset + w];
    x -= (x >>> 1) & 0x55555555;
    x = (x & 0x33333333) + ((x >>> 2) & 0x33333333);
    count += Math.imul((x + (x >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
  }
  return count;
}

/** Least hyperplane in a row; -1 when the row is empty. */
export function firstBit(words: Int32Array, offset: number, length: number): number {
  for (let w = 0; w < length; w++) {
    const x = words[offset + w];
    if (x !== 0) return (w << 5) + 31 - Math.clz32(x & -x);
  }
  return -1;
}

/** All n bits set, the spare bits of the last word clear. */
export function fullMask(hyperplanes: number): Int32Array {
  const mask = new Int32Array(wordsFor(hyperplanes)).fill(-1);
  if ((hyperplanes & 31) !== 0) mask[mask.length - 1] = (1 << (hyperplanes & 31)) - 1;
  return mask;
}

/** Rows to allocate when `rows` are needed; what is allocated and not used is cleared for nothing. */
export function grownRows(rows: number): number {
  return Math.ceil(1.6 * rows);
}

/** A growable table of rows of `wordsPerRow` Int32 words; `words` is replaced when it grows. */
export class WordTable {
  words: Int32Array;
  rows = 0;
  readonly wordsPerRow: number;

  constructor(wordsPerRow: number, capacity = 1024) {
    this.wordsPerRow = wordsPerRow;
    this.words = new Int32Array(Math.max(1, capacity) * wordsPerRow);
  }

  /** Makes room for `rows` rows in all. */
  reserve(rows: number): void {
    if (rows * this.wordsPerRow <= this.words.length) return;
    const grown = new Int32Array(grownRows(rows) * this.wordsPerRow);
    grown.set(this.words.subarray(0, this.rows * this.wordsPerRow));
    this.words = grown;
  }
}
