// How far inside the zonotope a point is: the facet it is nearest to leaving by, the largest ball and
// the largest cube about it that stay inside, and the generators that have no choice there. Geometry
// of the model given, never a rating of equipment.
import type { Arrangement } from '../arrangement/arrangement.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactZero,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { compareNumbers, signOfNumber } from '../exact/number-order.js';
import type { Quadratic } from '../exact/quadratic.js';
import { decimalOf, squareRootDecimal } from '../exact/root-decimal.js';
import type { Facet } from './facets.js';

/** A distance through its square, and as a decimal of 15 digits, the rest cut off. */
export interface Radius {
  readonly square: ExactNumber;
  readonly decimal: string;
}

export interface Margin {
  /** `off-span`: not in the span of the generators at all; the rest below is then null or empty. */
  readonly place: 'inside' | 'boundary' | 'outside' | 'off-span';
  /** Number, in the order given, of the facet nearest to the point; outside, of the one it is farthest
   * beyond. The first of several. */
  readonly nearest: number | null;
  /** Distance to that facet's hyperplane within the span: the ball's radius where inside. */
  readonly distance: Radius | null;
  /** Half the edge of the largest axis-parallel cube about the point, and the first facet that stops
   * it; null outside, and where the generators do not span all coordinates: no cube has room there. */
  readonly cube: {
    readonly half: ExactNumber;
    readonly decimal: string;
    readonly facet: number;
  } | null;
  /** Generators (0-based, ascending) whose end is forced at a boundary point. */
  readonly limits: readonly { readonly generator: number; readonly end: 'low' | 'high' }[];
}

/** Where a point of d numbers is. The facets are those of facetsOf; exact. */
export function marginAt<E>(
  arrangement: Arrangement<E>,
  facets: Iterable<Facet<E>>,
  point: readonly ExactNumber[],
): Margin {
  const { generators, rank, dimension } = arrangement;
  const k = generators.radicand;
  const field = new NumberField(arrangement);
  const nothing = { nearest: null, distance: null, cube: null, limits: [] };
  const metric = new SpanMetric(arrangement, field);
  if (!metric.holds(point)) return { place: 'off-span', ...nothing };
  let nearest = -1;
  let distance: { slack: ExactNumber; square: ExactNumber } | null = null;
  let cube: { half: ExactNumber; facet: number } | null = null;
  const forced = new Map<number, 'low' | 'high'>();
  let number = 0;
  for (const facet of facets) {
    const normal = facet.normal.map((e) => field.numberOf(e));
    const slack = addNumbers(facet.offset, negateNumber(field.dot(normal, point)));
    // Signed squares compare as the distances do.
    const square = divideNumbers(
      field.product(slack, slack),
      metric.squaredLength(normal),
      k ?? 0n,
    );
    const signed = signOfNumber(slack, k) < 0 ? negateNumber(square) : square;
    const best = distance === null ? null : signedSquare(distance, k);
    if (best === null || compareNumbers(signed, best, k) < 0) {
      nearest = number;
      distance = { slack, square };
    }
    if (isZero(slack)) force(forced, arrangement, facet);
    if (rank === dimension) {
      const span = normal.reduce((sum, x) => addNumbers(sum, field.absolute(x)), exactZero);
      const half = divideNumbers(slack, span, k ?? 0n);
      if (cube === null || compareNumbers(half, cube.half, k) < 0) cube = { half, facet: number };
    }
    number++;
  }
  if (distance === null) throw new RangeError('marginAt: facets: expected some');
  const sign = signOfNumber(distance.slack, k);
  return {
    place: sign > 0 ? 'inside' : sign === 0 ? 'boundary' : 'outside',
    nearest,
    distance: { square: distance.square, decimal: squareRootDecimal(distance.square, k) },
    cube: sign < 0 || cube === null ? null : { ...cube, decimal: decimalOf(cube.half, k) },
    limits:
      sign !== 0
        ? []
        : [...forced].sort(([i], [j]) => i - j).map(([generator, end]) => ({ generator, end })),
  };
}

function signedSquare(
  { slack, square }: { slack: ExactNumber; square: ExactNumber },
  k: bigint | null,
): ExactNumber {
  return signOfNumber(slack, k) < 0 ? negateNumber(square) : square;
}

/** On a facet every generator that is not free stands at the end that the normal favours. */
function force<E>(
  forced: Map<number, 'low' | 'high'>,
  arrangement: Arrangement<E>,
  facet: Facet<E>,
): void {
  const { ring, hyperplanes, hyperplaneOf, orientationOf } = arrangement;
  const signs = hyperplanes.map(({ essential }) =>
    ring.sign(
      essential.reduce(
        (sum, x, i) => ring.add(sum, ring.multiply(x, facet.essential[i])),
        ring.zero,
      ),
    ),
  );
  hyperplaneOf.forEach((h, j) => {
    const sign = signs[h] * orientationOf[j];
    if (sign !== 0) forced.set(j, sign > 0 ? 'high' : 'low');
  });
}

/** Arithmetic of the field the generators are in. */
class NumberField<E> {
  private readonly k: bigint | null;

  constructor(arrangement: Arrangement<E>) {
    this.k = arrangement.generators.radicand;
  }

  numberOf(e: E): ExactNumber {
    return this.k === null
      ? exactNumber(e as bigint)
      : exactNumber((e as Quadratic).a, (e as Quadratic).b);
  }

  product(x: ExactNumber, y: ExactNumber): ExactNumber {
    return multiplyNumbers(x, y, this.k ?? 0n);
  }

  dot(u: readonly ExactNumber[], v: readonly ExactNumber[]): ExactNumber {
    return u.reduce((sum, x, i) => addNumbers(sum, this.product(x, v[i])), exactZero);
  }

  absolute(x: ExactNumber): ExactNumber {
    return signOfNumber(x, this.k) < 0 ? negateNumber(x) : x;
  }
}

/**
 * Lengths of functionals on the span: one with values y on spanBasis has squared length y . G^-1 y, G
 * the Gram matrix of that basis.
 */
class SpanMetric<E> {
  private readonly field: NumberField<E>;
  private readonly basis: readonly (readonly ExactNumber[])[];
  /** Null where the span is everything and G is the identity. */
  private readonly inverse: readonly (readonly ExactNumber[])[] | null;

  constructor(arrangement: Arrangement<E>, field: NumberField<E>) {
    const { spanBasis, rank, dimension, generators } = arrangement;
    this.field = field;
    this.basis = spanBasis.map((row) => row.map((e) => field.numberOf(e)));
    const gram = this.basis.map((u) => this.basis.map((v) => field.dot(u, v)));
    this.inverse = rank === dimension ? null : inverseOf(gram, generators.radicand ?? 0n);
  }

  /** Of the part of the normal that lies in the span. */
  squaredLength(normal: readonly ExactNumber[]): ExactNumber {
    const { basis, field, inverse } = this;
    if (inverse === null) return field.dot(normal, normal);
    const y = basis.map((u) => field.dot(u, normal));
    return field.dot(
      y,
      inverse.map((row) => field.dot(row, y)),
    );
  }

  /** Whether the point is in the span: it is its own orthogonal projection. */
  holds(point: readonly ExactNumber[]): boolean {
    const { basis, field, inverse } = this;
    if (inverse === null) return true;
    const products = basis.map((u) => field.dot(u, point));
    const coordinates = inverse.map((row) => field.dot(row, products));
    return point.every((x, i) => {
      const image = field.dot(
        coordinates,
        basis.map((u) => u[i]),
      );
      return isZero(addNumbers(x, negateNumber(image)));
    });
  }
}

function inverseOf(matrix: readonly (readonly ExactNumber[])[], k: bigint): ExactNumber[][] {
  const n = matrix.length;
  const rows = matrix.map((row, i) => [
    ...row,
    ...row.map((_, j) => exactNumber(i === j ? 1n : 0n)),
  ]);
  // A Gram matrix of a basis is positive definite: its diagonal serves as pivots.
  for (let p = 0; p < n; p++) {
    const pivot = rows[p][p];
    rows[p] = rows[p].map((x) => divideNumbers(x, pivot, k));
    rows.forEach((row, i) => {
      if (i === p || isZero(row[p])) return;
      rows[i] = row.map((x, c) =>
        addNumbers(x, negateNumber(multiplyNumbers(row[p], rows[p][c], k))),
      );
    });
  }
  return rows.map((row) => row.slice(n));
}
