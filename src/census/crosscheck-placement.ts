// Points under a scale and a shift: taking them back, and saying in words where a zonotope lies.
import type { Arrangement } from '../arrangement/arrangement.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  equalNumbers,
  exactNumber,
  exactOne,
  exactZero,
  formatNumber,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import type { Placement } from '../zonotope/vertices.js';

export type Vector = readonly ExactNumber[];

/** Difference of two numbers. */
export function minusNumber(x: ExactNumber, y: ExactNumber): ExactNumber {
  return addNumbers(x, negateNumber(y));
}

/** Difference of two vectors. */
export function minus(v: Vector, w: Vector): ExactNumber[] {
  return v.map((x, j) => minusNumber(x, w[j]));
}

/** Sum of two vectors. */
export function plus(v: Vector, w: Vector): ExactNumber[] {
  return v.map((x, j) => addNumbers(x, w[j]));
}

/** The point of theirs taken back to our coordinates. */
export function takenBack(point: Vector, { scale, shift, radicand }: Placement): ExactNumber[] {
  return minus(point, shift).map((x) => divideNumbers(x, scale, radicand ?? 0n));
}

/** The placement in words, with its usual name where it has one. */
export function describePlacement(arrangement: Arrangement, placement: Placement): string {
  const { scale, shift, radicand } = placement;
  const { normals, ranges } = arrangement.generators;
  const k = radicand ?? 0n;
  if (equalNumbers(scale, exactOne) && shift.every(isZero)) return 'same place and scale as ours';
  // Twice the centre: the sum of (low + high) u over the generators.
  let ends = shift.map(() => exactZero);
  normals.forEach((normal, i) => {
    const sum = addNumbers(ranges?.[i].low ?? exactZero, ranges?.[i].high ?? exactOne);
    ends = ends.map((x, j) => addNumbers(x, multiplyNumbers(sum, normal[j], k)));
  });
  const centred = shift.every((t, j) =>
    isZero(addNumbers(addNumbers(t, t), multiplyNumbers(scale, ends[j], k))),
  );
  const sized = equalNumbers(scale, exactOne)
    ? 'v'
    : `${factorText(formatNumber(scale, radicand))} v`;
  const moved = shift.every(isZero)
    ? ''
    : ` + (${shift.map((x) => formatNumber(x, radicand)).join(', ')})`;
  const doubled = equalNumbers(scale, exactNumber(2n)) && ranges === null;
  const name = !centred
    ? ''
    : doubled
      ? ' (centred, segments from -1 to 1)'
      : ranges === null && equalNumbers(scale, exactOne)
        ? ' (centred, segments from -1/2 to 1/2)'
        : ' (centred)';
  return `theirs = ${sized}${moved} for each vertex v of ours${name}`;
}

function factorText(text: string): string {
  return /^[0-9/]+$/.test(text) ? text : `(${text})`;
}
