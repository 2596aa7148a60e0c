// A set of points read from a file, held as one short text a point so that millions fit, with what
// finding its place needs: the box around it and its centre of mass.
import { integerRing } from '../exact/integers.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactZero,
  negateNumber,
} from '../exact/number.js';
import { quadraticRing } from '../exact/quadratic.js';

/** Denominators above it are of decimals that a computer has rounded, or as good as. */
const manyDecimals = 10n ** 12n;

/** One text for each number: equal exactly when the numbers (in lowest terms) are. */
function numberKey({ a, b, d }: ExactNumber): string {
  return b === 0n ? (d === 1n ? a.toString() : `${a}/${d}`) : `${a},${b}/${d}`;
}

/** One text for each point: equal exactly when the points are. */
export function pointKey(point: readonly ExactNumber[]): string {
  let key = numberKey(point[0]);
  for (let j = 1; j < point.length; j++) key += ` ${numberKey(point[j])}`;
  return key;
}

/** The point of a key. */
export function pointOfKey(key: string): ExactNumber[] {
  return key.split(' ').map((text) => {
    const [numerators, d] = text.split('/');
    const [a, b] = numerators.split(',');
    return {
      a: BigInt(a),
      b: b === undefined ? 0n : BigInt(b),
      d: d === undefined ? 1n : BigInt(d),
    };
  });
}

/** Sign of a number of Q(sqrt(k)), k null for Q. */
export function signOfNumber(x: ExactNumber, k: bigint | null): number {
  return k === null ? integerRing.sign(x.a) : quadraticRing(k).sign({ a: x.a, b: x.b });
}

/** Points of d coordinates with the lines they were read from. */
export class PointSet {
  readonly dimension: number;
  /** Field of the coordinates; null for Q. */
  radicand: bigint | null = null;
  /** Rows read, repeated ones too. */
  rows = 0;
  /** A coordinate has more decimals than people write, as rounded numbers do. */
  seemsRounded = false;
  /** Each distinct point's key and the line it was first on. */
  readonly first = new Map<string, number>();
  /** Each point that came again: its key and all further lines. */
  readonly again = new Map<string, number[]>();
  /** Least and greatest of each coordinate. */
  readonly low: ExactNumber[] = [];
  readonly high: ExactNumber[] = [];
  private sum: ExactNumber[];

  constructor(dimension: number) {
    this.dimension = dimension;
    this.sum = new Array<ExactNumber>(dimension).fill(exactZero);
  }

  add(point: readonly ExactNumber[], line: number, radicand: bigint | null): void {
    this.radicand = radicand;
    this.rows++;
    const key = pointKey(point);
    if (this.first.has(key)) {
      const lines = this.again.get(key);
      if (lines === undefined) this.again.set(key, [line]);
      else lines.push(line);
      return;
    }
    this.first.set(key, line);
    point.forEach((x, j) => {
      if (x.d > manyDecimals) this.seemsRounded = true;
      if (this.first.size === 1 || this.isLess(x, this.low[j])) this.low[j] = x;
      if (this.first.size === 1 || this.isLess(this.high[j], x)) this.high[j] = x;
      const sum = this.sum[j];
      const isWhole = sum.d === 1n && x.d === 1n && sum.b === 0n && x.b === 0n;
      this.sum[j] = isWhole ? { a: sum.a + x.a, b: 0n, d: 1n } : addNumbers(sum, x);
    });
  }

  private isLess(x: ExactNumber, y: ExactNumber): boolean {
    if (x.b === 0n && y.b === 0n) return x.a * y.d < y.a * x.d;
    return signOfNumber(addNumbers(x, negateNumber(y)), this.radicand) < 0;
  }

  /** Mean of the distinct points. */
  centre(): ExactNumber[] {
    const count = exactNumber(BigInt(this.first.size));
    return this.sum.map((x) => divideNumbers(x, count, 0n));
  }
}
