// From all k-minors of k vectors in r coordinates to all (k+1)-minors with one vector more, by
// expansion along it. Minors are numbered by their sets of coordinates in lexicographic order.

/** n over k as a double; exact while below 2^53. */
export function binomial(n: number, k: number): number {
  if (k < 0 || k > n) return 0;
  let product = 1;
  for (let i = 0; i < Math.min(k, n - k); i++) product = (product * (n - i)) / (i + 1);
  return Math.round(product);
}

/** One step; minor t is the sum over s < size of sign * minors[from] * vector[coordinate]. */
export class ExteriorStep {
  /** Terms of one expansion: k + 1. */
  readonly size: number;
  /** All at t * size + s. */
  readonly from: Int32Array;
  readonly coordinate: Int32Array;
  readonly sign: Int8Array;

  constructor(r: number, k: number) {
    this.size = k + 1;
    const numbers = new Map(coordinateSets(r, k).map((set, i) => [set.join(), i]));
    const sets = coordinateSets(r, k + 1);
    const length = sets.length * this.size;
    this.from = new Int32Array(length);
    this.coordinate = new Int32Array(length);
    this.sign = new Int8Array(length);
    sets.forEach((set, t) => {
      set.forEach((c, s) => {
        const at = t * this.size + s;
        this.from[at] = numbers.get(set.filter((other) => other !== c).join())!;
        this.coordinate[at] = c;
        this.sign[at] = (k + s) % 2 === 0 ? 1 : -1;
      });
    });
  }

  /** Plain numbers; the vector starts at `offset`. The caller has bounded every partial sum. */
  expand(minors: Float64Array, vectors: Float64Array, offset: number, result: Float64Array): void {
    const { size, from, coordinate, sign } = this;
    for (let t = 0, at = 0; t < result.length; t++) {
      let sum = 0;
      for (let s = 0; s < size; s++, at++) {
        sum += sign[at] * minors[from[at]] * vectors[offset + coordinate[at]];
      }
      result[t] = sum;
    }
  }

  expandBig(minors: readonly bigint[], vector: readonly bigint[]): bigint[] {
    const { size, from, coordinate, sign } = this;
    const result: bigint[] = [];
    for (let at = 0; at < from.length; ) {
      let sum = 0n;
      for (let s = 0; s < size; s++, at++) {
        const product = minors[from[at]] * vector[coordinate[at]];
        sum += sign[at] > 0 ? product : -product;
      }
      result.push(sum);
    }
    return result;
  }
}

/** Steps from 0 to 1, ..., r - 1 to r vectors. */
export function exteriorSteps(r: number): ExteriorStep[] {
  return Array.from({ length: r }, (_, k) => new ExteriorStep(r, k));
}

function coordinateSets(r: number, k: number, first = 0): number[][] {
  if (k === 0) return [[]];
  const sets: number[][] = [];
  for (let c = first; c + k <= r; c++) {
    for (const rest of coordinateSets(r, k - 1, c + 1)) sets.push([c, ...rest]);
  }
  return sets;
}
