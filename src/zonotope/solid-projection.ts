// A zonotope brought into two or three coordinates: the images of its generators under a few exact
// functionals generate the image, which is a zonotope again, with an arrangement of its own.
import type { Arrangement } from '../arrangement/arrangement.js';
import { buildArrangement } from '../arrangement/build.js';
import { InputError } from '../errors.js';
import { findPivots } from '../exact/elimination.js';
import { gcd } from '../exact/integers.js';
import {
  addNumbers,
  commonDenominator,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactOne,
  exactZero,
  formatNumber,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import type { GeneratorList } from '../input/generators.js';
import { principalAxes } from './solid-axes.js';

/** Which coordinates: those of the zonotope's own span, some of the file's (0-based), or its principal axes. */
export type ProjectionChoice =
  | { readonly kind: 'own' }
  | { readonly kind: 'coordinates'; readonly coordinates: readonly number[] }
  | { readonly kind: 'principal' };

/** One coordinate of the image: a functional, and the length that true measure divides it by. */
export interface Axis {
  /** The coordinate's own name; `axis 1` and so on where the functional is none. */
  readonly name: string;
  /** `(1, -1, 0)/sqrt(2)`: the coordinate in true measure, by a vector that a point is multiplied with. */
  readonly measure: string | null;
  /** d numbers. */
  readonly functional: readonly ExactNumber[];
  /** 1 where the functional is a coordinate of the file. */
  readonly squaredLength: ExactNumber;
}

/** The image of a zonotope, in as many coordinates as it has axes, and of that rank. */
export interface Projection {
  readonly axes: readonly Axis[];
  /** Of the images of the generators; the same arrangement where nothing is to be changed. */
  readonly arrangement: Arrangement;
  /** For each generator of `arrangement` the 0-based generator it is the image of. */
  readonly kept: readonly number[];
  /** The arrangement that was projected. */
  readonly from: Arrangement;
}

/**
 * The choice a user writes: `1,2,4`, names of coordinates `surge,heave,yaw`, or `principal`; nothing
 * for the own span. InputError names the word that is none of these.
 */
export function readProjection(
  text: string | undefined,
  generators: GeneratorList,
): ProjectionChoice {
  if (text === undefined) return { kind: 'own' };
  const names = generators.coordinates;
  const d = generators.normals[0].length;
  const trimmed = text.trim();
  if (trimmed === 'principal' && !names?.includes(trimmed)) return { kind: 'principal' };
  const offered = `give two or three of the ${d} coordinates${
    names === null ? ' by number' : `, by number or name`
  }, as 1,2,3, or principal`;
  const coordinates = trimmed.split(',').map((word) => {
    const name = word.trim();
    const named = names?.indexOf(name) ?? -1;
    if (named >= 0) return named;
    const number = /^\d+$/.test(name) ? Number(name) : 0;
    if (number < 1 || number > d) {
      throw new InputError(
        `projection '${text}': '${name}' is not one of ${d} coordinates`,
        offered,
      );
    }
    return number - 1;
  });
  if (coordinates.length < 2 || coordinates.length > 3) {
    throw new InputError(`projection '${text}': ${coordinates.length} coordinates`, offered);
  }
  const twice = coordinates.find((c, i) => coordinates.indexOf(c) !== i);
  if (twice !== undefined) {
    throw new InputError(`projection '${text}': coordinate ${twice + 1} is there twice`, offered);
  }
  return { kind: 'coordinates', coordinates };
}

/**
 * Projects, exactly. The own span of a zonotope of full rank is the space it is in; of lower rank, its
 * coordinates are along an orthogonal basis (E. Schmidt, 1907). InputError where the image is of
 * lower rank than it has coordinates, or the own span is neither a plane nor a space.
 */
export function projectArrangement(arrangement: Arrangement, choice: ProjectionChoice): Projection {
  const { rank, dimension, generators } = arrangement;
  const from = arrangement;
  if (choice.kind === 'own') {
    if (rank === 1) {
      throw new InputError('rank 1: the zonotope is a segment', 'give normals of rank 2 or more');
    }
    if (rank > 3) {
      throw new InputError(
        `rank ${rank}: the zonotope has no picture or mesh of its own`,
        'project it: three coordinates, as --project=1,2,3, or --project=principal',
      );
    }
    if (rank === dimension) {
      const axes = coordinateAxes(
        generators,
        generators.normals[0].map((_, i) => i),
      );
      return { axes, arrangement, kept: generators.normals.map((_, j) => j), from };
    }
  }
  if (choice.kind === 'principal' && rank < 3) {
    throw new InputError(
      `rank ${rank}: fewer than three principal axes`,
      'leave the projection out',
    );
  }
  const axes =
    choice.kind === 'own'
      ? spanAxes(arrangement)
      : choice.kind === 'coordinates'
        ? coordinateAxes(generators, choice.coordinates)
        : principalAxes(generators).map((axis, i) => axisAlong(axis, i, generators.radicand));
  return { axes, ...imageOf(generators, axes), from };
}

function coordinateAxes(generators: GeneratorList, coordinates: readonly number[]): Axis[] {
  const d = generators.normals[0].length;
  const letters = d <= 3 ? ['x', 'y', 'z'] : null;
  return coordinates.map((c) => ({
    name: generators.coordinates?.[c] ?? letters?.[c] ?? `x${c + 1}`,
    measure: null,
    functional: Array.from({ length: d }, (_, i) => (i === c ? exactOne : exactZero)),
    squaredLength: exactOne,
  }));
}

function dot(u: readonly ExactNumber[], v: readonly ExactNumber[], k: bigint): ExactNumber {
  return u.reduce((sum, x, i) => addNumbers(sum, multiplyNumbers(x, v[i], k)), exactZero);
}

function axisAlong(
  functional: readonly ExactNumber[],
  index: number,
  radicand: bigint | null,
): Axis {
  const squaredLength = dot(functional, functional, radicand ?? 0n);
  const length = formatNumber(squaredLength, radicand);
  return {
    name: `axis ${index + 1}`,
    measure: `(${functional.map((x) => formatNumber(x, radicand)).join(', ')})${
      length === '1' ? '' : `/sqrt(${length})`
    }`,
    functional,
    squaredLength,
  };
}

function spanAxes(arrangement: Arrangement): Axis[] {
  const { ring, hyperplanes, generators } = arrangement;
  const k = generators.radicand ?? 0n;
  const pivots = findPivots(
    ring,
    hyperplanes.map((h) => h.normal),
  );
  const basis: ExactNumber[][] = [];
  for (const h of pivots.rows) {
    let vector = generators.normals[hyperplanes[h].members[0]].slice();
    for (const earlier of basis) {
      const share = divideNumbers(dot(vector, earlier, k), dot(earlier, earlier, k), k);
      vector = vector.map((x, i) =>
        addNumbers(x, negateNumber(multiplyNumbers(share, earlier[i], k))),
      );
    }
    basis.push(withoutContent(vector));
  }
  return basis.map((vector, i) => axisAlong(vector, i, generators.radicand));
}

/** A positive rational multiple with integer parts and content 1. */
function withoutContent(vector: readonly ExactNumber[]): ExactNumber[] {
  const d = commonDenominator(vector);
  const scaled = vector.map((x) => ({ a: (x.a * d) / x.d, b: (x.b * d) / x.d }));
  const content = scaled.reduce((g, { a, b }) => gcd(gcd(g, a), b), 0n);
  return scaled.map(({ a, b }) => exactNumber(a / content, b / content));
}

function imageOf(
  generators: GeneratorList,
  axes: readonly Axis[],
): Pick<Projection, 'arrangement' | 'kept'> {
  const { normals, labels, ranges, radicand } = generators;
  const images = normals.map((normal) =>
    axes.map(({ functional }) => dot(functional, normal, radicand ?? 0n)),
  );
  // A generator that is projected to a point adds nothing: its ends are all at the origin.
  const kept = images.flatMap((image, j) => (image.every(isZero) ? [] : [j]));
  const names = axes.map(({ name }) => name).join(', ');
  if (kept.length === 0) throw tooFlat(0, names);
  const ownRanges = ranges === null ? null : kept.map((j) => ranges[j]);
  const parts = [
    ...kept.flatMap((j) => images[j]),
    ...(ownRanges ?? []).flatMap(({ low, high }) => [low, high]),
  ];
  const arrangement = buildArrangement({
    title: generators.title,
    coordinates: axes.map(({ name }) => name),
    radicand: parts.some(({ b }) => b !== 0n) ? radicand : null,
    normals: kept.map((j) => images[j]),
    labels: labels === null ? null : kept.map((j) => labels[j]),
    ranges: ownRanges,
    source: generators.source,
  });
  if (arrangement.rank < axes.length) throw tooFlat(arrangement.rank, names);
  return { arrangement, kept };

  function tooFlat(rank: number, along: string): InputError {
    return new InputError(
      `projected to ${along} the zonotope is flat: rank ${rank} in ${axes.length} coordinates`,
      'choose coordinates that are independent on the normals, or principal',
    );
  }
}
