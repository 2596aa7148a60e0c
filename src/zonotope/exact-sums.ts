// Sums of products of non-negative integers, exact at any size, mostly in plain numbers. All terms
// are non-negative, so rounding never lowers a total below 2^53 that is not below it: a double under
// 2^53 proves that everything that led to it was exact.

/** Every integer below is a double, and so is every sum or product that stays below. */
export const exactLimit = 2 ** 53;

/** A growable row of totals, zero at the start. */
export class ExactSums {
  private plain: Float64Array;
  private big: bigint[] = [];
  /** Totals in use. */
  length: number;

  constructor(length: number) {
    this.length = length;
    this.plain = new Float64Array(length);
  }

  clear(length: number): void {
    if (length > this.plain.length) this.plain = new Float64Array(2 * length);
    else this.plain.fill(0, 0, length);
    this.length = length;
    if (this.big.length > 0) this.big = [];
  }

  /** Keeps what there is; totals past the old length are zero. */
  extend(length: number): void {
    if (length <= this.length) return;
    if (length > this.plain.length) {
      const grown = new Float64Array(2 * length);
      grown.set(this.plain.subarray(0, this.length));
      this.plain = grown;
    } else this.plain.fill(0, this.length, length);
    this.length = length;
  }

  /** Adds x, an integer in [0, 2^53). */
  add(i: number, x: number): void {
    const sum = this.plain[i] + x;
    if (sum < exactLimit) this.plain[i] = sum;
    else this.addBig(i, BigInt(x));
  }

  /** Adds w x, both integers in [0, 2^53). */
  addProduct(i: number, w: number, x: number): void {
    const sum = this.plain[i] + w * x;
    if (sum < exactLimit) this.plain[i] = sum;
    else this.addBig(i, BigInt(w) * BigInt(x));
  }

  addBig(i: number, x: bigint): void {
    this.big[i] = (this.big[i] ?? 0n) + x;
  }

  /**
   * Adds w times all totals of `other`, each `shift` places up, w an integer in [0, 2^53). The last
   * `shift` totals of `other` are zero.
   */
  addMultiple(w: number, other: ExactSums, shift: number): void {
    this.extend(other.length);
    for (let i = 0; i + shift < other.length; i++) this.addProduct(i + shift, w, other.plain[i]);
    other.big.forEach((x, i) => {
      this.addBig(i + shift, BigInt(w) * x);
    });
  }

  valueOf(i: number): bigint {
    return i < this.length ? BigInt(this.plain[i]) + (this.big[i] ?? 0n) : 0n;
  }
}
