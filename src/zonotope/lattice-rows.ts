// The rows of an integer matrix whose columns are images of vectors in a lattice quotient, in doubles
// or in big integers: row operations by the whole row, so that the two are told apart once a row.
import { magnitude, roundedQuotient } from '../exact/integers.js';
import { shortenRows } from './lattice-quotient.js';

/** r rows of n integers, changed by unimodular row operations. */
export interface LatticeRows {
  readonly count: number;
  /** Subtracts from row `target` the multiple of row `source` that leaves least at `column`. */
  reduceEntry(target: number, source: number, column: number): void;
  swap(i: number, j: number): void;
  isZero(row: number, column: number): boolean;
  /** Whether |entry (i, column)| < |entry (j, column)|. */
  isSmaller(i: number, j: number, column: number): boolean;
  /** Shortens rows by one another, keeping the lattice they span. */
  shorten(): void;
  /** The gcd of a column over all rows. */
  contentOf(column: number): bigint;
  /** The column itself. */
  columnOf(column: number): bigint[];
  /** Takes every entry of a column modulo a positive integer, the sign kept. */
  reduceColumn(column: number, modulus: bigint): void;
  /** All rows but the last. */
  withoutLast(): LatticeRows;
}

/** Thrown where a double would pass its bound, the rows left valid: big integers will do. */
export class PastDoubles extends Error {}

const limit = 2 ** 52;
const passes = 2;

export class PlainRows implements LatticeRows {
  private readonly rows: Float64Array[];

  constructor(rows: Float64Array[]) {
    this.rows = rows;
  }

  get count(): number {
    return this.rows.length;
  }

  reduceEntry(target: number, source: number, column: number): void {
    const q = Math.round(this.rows[target][column] / this.rows[source][column]);
    this.subtract(target, q, source);
  }

  private subtract(target: number, q: number, source: number): void {
    const x = this.rows[target];
    const y = this.rows[source];
    for (let j = 0; j < x.length; j++) {
      const product = q * y[j];
      const result = x[j] - product;
      // Both below 2^52 as rounded: then both are exact, and entries stay below 2^52.
      if (Math.abs(product) >= limit || Math.abs(result) >= limit) {
        while (--j >= 0) x[j] += q * y[j];
        throw new PastDoubles();
      }
      x[j] = result;
    }
  }

  swap(i: number, j: number): void {
    const { rows } = this;
    [rows[i], rows[j]] = [rows[j], rows[i]];
  }

  isZero(row: number, column: number): boolean {
    return this.rows[row][column] === 0;
  }

  isSmaller(i: number, j: number, column: number): boolean {
    return Math.abs(this.rows[i][column]) < Math.abs(this.rows[j][column]);
  }

  shorten(): void {
    const { rows } = this;
    for (let pass = 0; pass < passes; pass++) {
      for (let i = 0; i < rows.length; i++) {
        for (let j = 0; j < rows.length; j++) {
          if (i === j) continue;
          let length = 0;
          let inner = 0;
          for (let c = 0; c < rows[j].length; c++) {
            length += rows[j][c] * rows[j][c];
            inner += rows[i][c] * rows[j][c];
          }
          // Any integer will do: the sums may be rounded.
          const q = length === 0 ? 0 : Math.round(inner / length);
          if (q !== 0) this.subtract(i, q, j);
        }
      }
    }
  }

  contentOf(column: number): bigint {
    let g = 0;
    for (const row of this.rows) {
      let x = Math.abs(row[column]);
      while (x !== 0) [g, x] = [x, g % x];
      if (g === 1) return 1n;
    }
    return BigInt(g);
  }

  columnOf(column: number): bigint[] {
    return this.rows.map((row) => BigInt(row[column]));
  }

  reduceColumn(column: number, modulus: bigint): void {
    if (modulus >= BigInt(limit)) return;
    for (const row of this.rows) row[column] %= Number(modulus);
  }

  withoutLast(): LatticeRows {
    return new PlainRows(this.rows.slice(0, -1).map((row) => row.slice()));
  }
}

export class BigRows implements LatticeRows {
  private readonly rows: bigint[][];

  constructor(rows: bigint[][]) {
    this.rows = rows;
  }

  get count(): number {
    return this.rows.length;
  }

  reduceEntry(target: number, source: number, column: number): void {
    const pivot = this.rows[source][column];
    const x = this.rows[target][column];
    this.subtract(target, roundedQuotient(pivot < 0n ? -x : x, magnitude(pivot)), source);
  }

  private subtract(target: number, q: bigint, source: number): void {
    const x = this.rows[target];
    const y = this.rows[source];
    for (let j = 0; j < x.length; j++) x[j] -= q * y[j];
  }

  swap(i: number, j: number): void {
    const { rows } = this;
    [rows[i], rows[j]] = [rows[j], rows[i]];
  }

  isZero(row: number, column: number): boolean {
    return this.rows[row][column] === 0n;
  }

  isSmaller(i: number, j: number, column: number): boolean {
    return magnitude(this.rows[i][column]) < magnitude(this.rows[j][column]);
  }

  shorten(): void {
    shortenRows(this.rows);
  }

  contentOf(column: number): bigint {
    let g = 0n;
    for (const row of this.rows) {
      let x = magnitude(row[column]);
      while (x !== 0n) [g, x] = [x, g % x];
      if (g === 1n) return g;
    }
    return g;
  }

  columnOf(column: number): bigint[] {
    return this.rows.map((row) => row[column]);
  }

  reduceColumn(column: number, modulus: bigint): void {
    for (const row of this.rows) row[column] %= modulus;
  }

  withoutLast(): LatticeRows {
    return new BigRows(this.rows.slice(0, -1).map((row) => row.slice()));
  }
}

/** The images modulo one more vector: row operations until `column` has one entry, and that row out. */
export function withoutColumn(rows: LatticeRows, column: number): LatticeRows {
  const last = rows.count - 1;
  for (;;) {
    let least = -1;
    let others = false;
    for (let i = 0; i <= last; i++) {
      if (rows.isZero(i, column)) continue;
      if (least >= 0) others = true;
      if (least < 0 || rows.isSmaller(i, least, column)) least = i;
    }
    if (least < 0) throw new RangeError('withoutColumn: column: expected a non-zero one');
    rows.swap(least, last);
    if (!others) break;
    for (let i = 0; i < last; i++) {
      if (!rows.isZero(i, column)) rows.reduceEntry(i, last, column);
    }
  }
  const quotient = rows.withoutLast();
  quotient.shorten();
  return quotient;
}
