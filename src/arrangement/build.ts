// From a generator list to its arrangement: scale, group into parallel classes, choose coordinates.
import { findPivots } from '../exact/elimination.js';
import { reduceColumns } from '../exact/hermite.js';
import { integerRing } from '../exact/integers.js';
import type { ExactNumber } from '../exact/number.js';
import { commonDenominator, divideNumbers, exactNumber, formatNumber } from '../exact/number.js';
import type { Quadratic } from '../exact/quadratic.js';
import { quadraticRing } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';
import type { GeneratorList } from '../input/generators.js';
import type { Arrangement, Hyperplane } from './arrangement.js';

/** Ring elements from numbers as read, and back. */
interface Field<E> {
  readonly ring: Ring<E>;
  fromParts(a: bigint, b: bigint): E;
  toNumber(e: E): ExactNumber;
}

const rationalField: Field<bigint> = {
  ring: integerRing,
  fromParts: (a) => a,
  toNumber: (e) => exactNumber(e),
};

function quadraticField(k: bigint): Field<Quadratic> {
  return {
    ring: quadraticRing(k),
    fromParts: (a, b) => ({ a, b }),
    toNumber: (e) => exactNumber(e.a, e.b),
  };
}

/** The arrangement of the hyperplanes orthogonal to the normals; any rank from 1 to d. */
export function buildArrangement(generators: GeneratorList): Arrangement {
  return generators.radicand === null
    ? build(generators, rationalField)
    : build(generators, quadraticField(generators.radicand));
}

/** A positive rational multiple of the normal with entries in the ring and content 1. */
function withoutContent<E>(field: Field<E>, normal: readonly ExactNumber[]): E[] {
  const { ring } = field;
  const d = commonDenominator(normal);
  const scaled = normal.map((x) => field.fromParts((x.a * d) / x.d, (x.b * d) / x.d));
  let content = 0n;
  for (const e of scaled) content = gcdOf(content, ring.content(e));
  const divisor = ring.fromInteger(content);
  return scaled.map((e) => ring.divideExactly(e, divisor));
}

function gcdOf(a: bigint, b: bigint): bigint {
  return b === 0n ? a : gcdOf(b, a % b);
}

function build<E>(generators: GeneratorList, field: Field<E>): Arrangement<E> {
  const { ring } = field;
  const { normals } = generators;
  const radicand = generators.radicand ?? 0n;
  const hyperplaneOf = new Int32Array(normals.length);
  const orientationOf = new Int8Array(normals.length);
  const factorOf: ExactNumber[] = [];
  const classes = new Map<string, number>();
  const found: { normal: E[]; pivot: number; members: number[] }[] = [];
  normals.forEach((normal, i) => {
    const pivot = normal.findIndex((x) => x.a !== 0n || x.b !== 0n);
    if (pivot < 0) throw new RangeError(`buildArrangement: normal ${i + 1}: expected non-zero`);
    // Two normals are parallel exactly when they agree once the first non-zero entry is made 1.
    const key = normal
      .map((x) => formatNumber(divideNumbers(x, normal[pivot], radicand), radicand))
      .join(' ');
    let h = classes.get(key);
    if (h === undefined) {
      h = found.length;
      classes.set(key, h);
      found.push({ normal: withoutContent(field, normal), pivot, members: [] });
    }
    const { normal: own, members } = found[h];
    members.push(i);
    const ratio = divideNumbers(normal[pivot], field.toNumber(own[pivot]), radicand);
    const negative = ring.sign(field.fromParts(ratio.a, ratio.b)) < 0;
    hyperplaneOf[i] = h;
    orientationOf[i] = negative ? -1 : 1;
    factorOf.push(negative ? { a: -ratio.a, b: -ratio.b, d: ratio.d } : ratio);
  });
  const coordinates = essentialCoordinates(
    ring,
    found.map((h) => h.normal),
  );
  const hyperplanes: Hyperplane<E>[] = found.map(({ normal, members }) => ({
    normal,
    essential: coordinates.essential(normal),
    members,
  }));
  return {
    generators,
    ring,
    dimension: normals[0].length,
    rank: coordinates.spanBasis.length,
    hyperplanes,
    hyperplaneOf,
    orientationOf,
    factorOf,
    spanBasis: coordinates.spanBasis,
    lift: coordinates.lift,
  };
}

interface Coordinates<E> {
  readonly spanBasis: readonly (readonly E[])[];
  readonly lift: readonly (readonly E[])[];
  essential(normal: readonly E[]): E[];
}

function essentialCoordinates<E>(
  ring: Ring<E>,
  normals: readonly (readonly E[])[],
): Coordinates<E> {
  const d = normals[0].length;
  const pivots = findPivots(ring, normals);
  const r = pivots.rows.length;
  const unitRow = (length: number, one: number): E[] =>
    Array.from({ length }, (_, j) => (j === one ? ring.one : ring.zero));
  if (r === d) {
    const identity = Array.from({ length: d }, (_, i) => unitRow(d, i));
    return { spanBasis: identity, lift: identity, essential: (normal) => normal.slice() };
  }
  const independent = pivots.rows.map((i) => normals[i]);
  if (ring.radicand === null) {
    const { lift, basis } = reduceColumns(independent as unknown as bigint[][]);
    const liftRows = lift.map((row) => row.map((x) => ring.fromInteger(x)));
    return {
      spanBasis: basis.map((row) => row.map((x) => ring.fromInteger(x))),
      lift: liftRows,
      essential: (normal) => multiply(ring, normal, liftRows, r),
    };
  }
  const columns = [...pivots.columns].sort((a, b) => a - b);
  const lift = Array.from({ length: d }, (_, i) => unitRow(r, columns.indexOf(i)));
  return {
    spanBasis: independent,
    lift,
    essential: (normal) => columns.map((c) => normal[c]),
  };
}

function multiply<E>(
  ring: Ring<E>,
  row: readonly E[],
  matrix: readonly (readonly E[])[],
  width: number,
): E[] {
  return Array.from({ length: width }, (_, j) => {
    let sum = ring.zero;
    for (let i = 0; i < row.length; i++) {
      sum = ring.add(sum, ring.multiply(row[i], matrix[i][j]));
    }
    return sum;
  });
}
