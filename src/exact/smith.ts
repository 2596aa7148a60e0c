// Smith normal form of an integer matrix (H. J. S. Smith, 1861, On systems of linear indeterminate
// equations and congruences): U A V = D with unimodular U and V and each diagonal entry dividing the
// next. The least entry is the pivot and quotients are rounded, so that entries stay small.
import { magnitude, roundedQuotient } from './integers.js';

/** U A V = D; A is m x n of rank r. Rows outermost. */
export interface SmithForm {
  /** r positive integers, each dividing the next: the diagonal of D. */
  readonly divisors: readonly bigint[];
  /** U, m x m, determinant 1 or -1. */
  readonly left: readonly (readonly bigint[])[];
  /** V, n x n, determinant 1 or -1. */
  readonly right: readonly (readonly bigint[])[];
}

type Matrix = bigint[][];

/** The form with its transforms, which are m x m and n x n: for matrices of moderate size. */
export function smithForm(matrix: readonly (readonly bigint[])[]): SmithForm {
  const work = new Diagonalisation(matrix, true);
  const divisors = work.run();
  const rank = divisors.length;
  const right = transpose(work.columns!);
  // Rows of U past the rank annihilate A, and columns of V past it are annihilated: they may be
  // added to the others freely.
  shortenBy(work.rows!, rank);
  const columns = transpose(right);
  shortenBy(columns, rank);
  return { divisors, left: work.rows!, right: transpose(columns) };
}

/** The diagonal alone: no transforms are kept, so the matrix may have very many rows. */
export function elementaryDivisors(matrix: readonly (readonly bigint[])[]): bigint[] {
  return new Diagonalisation(matrix, false).run();
}

function identity(n: number): Matrix {
  return Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, j) => (i === j ? 1n : 0n)),
  );
}

function transpose(matrix: readonly (readonly bigint[])[]): Matrix {
  return matrix.length === 0 ? [] : matrix[0].map((_, j) => matrix.map((row) => row[j]));
}

function subtractMultiple(target: bigint[], q: bigint, source: readonly bigint[]): void {
  for (let j = 0; j < target.length; j++) target[j] -= q * source[j];
}

function nearestQuotient(a: bigint, b: bigint): bigint {
  return b < 0n ? roundedQuotient(-a, -b) : roundedQuotient(a, b);
}

/** The matrix on its way to the diagonal; U as its rows, V as its columns. */
class Diagonalisation {
  private readonly matrix: Matrix;
  private readonly width: number;
  readonly rows: Matrix | null;
  readonly columns: Matrix | null;

  constructor(matrix: readonly (readonly bigint[])[], keepTransforms: boolean) {
    this.matrix = matrix.map((row) => row.slice());
    this.width = matrix.length === 0 ? 0 : matrix[0].length;
    this.rows = keepTransforms ? identity(matrix.length) : null;
    this.columns = keepTransforms ? identity(this.width) : null;
  }

  run(): bigint[] {
    const { matrix } = this;
    const divisors: bigint[] = [];
    for (let k = 0; k < Math.min(matrix.length, this.width); k++) {
      if (!this.settle(k)) break;
      if (matrix[k][k] < 0n) {
        matrix[k] = matrix[k].map((x) => -x);
        if (this.rows !== null) this.rows[k] = this.rows[k].map((x) => -x);
      }
      divisors.push(matrix[k][k]);
    }
    return divisors;
  }

  /** Makes entry (k, k) divide all that is right of and below it, and clears its row and column. */
  private settle(k: number): boolean {
    const { matrix, width } = this;
    for (;;) {
      const at = this.least(k);
      if (at === null) return false;
      this.swapRows(k, at.row);
      this.swapColumns(k, at.column);
      const pivot = matrix[k][k];
      let clear = true;
      for (let i = k + 1; i < matrix.length; i++) {
        if (matrix[i][k] === 0n) continue;
        this.subtractRow(i, nearestQuotient(matrix[i][k], pivot), k);
        if (matrix[i][k] !== 0n) clear = false;
      }
      for (let j = k + 1; j < width; j++) {
        if (matrix[k][j] === 0n) continue;
        this.subtractColumn(j, nearestQuotient(matrix[k][j], pivot), k);
        if (matrix[k][j] !== 0n) clear = false;
      }
      if (!clear) continue;
      const stubborn = this.indivisible(k, pivot);
      if (stubborn < 0) return true;
      this.subtractRow(k, -1n, stubborn);
      for (let j = k + 1; j < width; j++) {
        if (matrix[k][j] !== 0n) this.subtractColumn(j, nearestQuotient(matrix[k][j], pivot), k);
      }
    }
  }

  private least(k: number): { row: number; column: number } | null {
    let size = 0n;
    let found: { row: number; column: number } | null = null;
    for (let i = k; i < this.matrix.length; i++) {
      const row = this.matrix[i];
      for (let j = k; j < this.width; j++) {
        if (row[j] === 0n) continue;
        const x = magnitude(row[j]);
        if (found !== null && x >= size) continue;
        size = x;
        found = { row: i, column: j };
        if (x === 1n) return found;
      }
    }
    return found;
  }

  /** A row below k with an entry that the pivot does not divide; -1 where there is none. */
  private indivisible(k: number, pivot: bigint): number {
    if (magnitude(pivot) === 1n) return -1;
    for (let i = k + 1; i < this.matrix.length; i++) {
      for (let j = k + 1; j < this.width; j++) if (this.matrix[i][j] % pivot !== 0n) return i;
    }
    return -1;
  }

  private swapRows(i: number, j: number): void {
    if (i === j) return;
    for (const m of [this.matrix, this.rows]) if (m !== null) [m[i], m[j]] = [m[j], m[i]];
  }

  private swapColumns(i: number, j: number): void {
    if (i === j) return;
    for (const row of this.matrix) [row[i], row[j]] = [row[j], row[i]];
    const m = this.columns;
    if (m !== null) [m[i], m[j]] = [m[j], m[i]];
  }

  private subtractRow(target: number, q: bigint, source: number): void {
    if (q === 0n) return;
    subtractMultiple(this.matrix[target], q, this.matrix[source]);
    if (this.rows !== null) subtractMultiple(this.rows[target], q, this.rows[source]);
  }

  private subtractColumn(target: number, q: bigint, source: number): void {
    if (q === 0n) return;
    for (const row of this.matrix) if (row[source] !== 0n) row[target] -= q * row[source];
    if (this.columns !== null) subtractMultiple(this.columns[target], q, this.columns[source]);
  }
}

/** Shortens vectors 0..rank-1 by those from `rank` on, one pass, each step by the nearest multiple. */
function shortenBy(vectors: Matrix, rank: number): void {
  const dot = (u: readonly bigint[], v: readonly bigint[]): bigint =>
    u.reduce((sum, x, i) => sum + x * v[i], 0n);
  for (let j = rank; j < vectors.length; j++) {
    const length = dot(vectors[j], vectors[j]);
    for (let i = 0; i < rank; i++) {
      const q = roundedQuotient(dot(vectors[i], vectors[j]), length);
      if (q !== 0n) subtractMultiple(vectors[i], q, vectors[j]);
    }
  }
}
