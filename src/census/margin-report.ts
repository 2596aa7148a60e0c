// Where a point is in the zonotope, as plain data: the facet it is nearest to leaving by, the room
// around it, and which generators have nothing left there. Geometry of the model, never a rating.
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';
import { type ExactNumber, formatNumber } from '../exact/number.js';
import type { FlatLattice } from '../flat/lattice.js';
import { facetsOf } from '../zonotope/facets.js';
import { type Margin, marginAt } from '../zonotope/margins.js';
import { facetRow } from './facet-rows.js';
import { listFlatsWithin } from './polynomial.js';

/** A generator at one end of its range. */
export interface AtLimit {
  /** 1-based. */
  readonly generator: number;
  readonly label: string | null;
  readonly end: 'low' | 'high';
}

/** A facet as a margin names it: normal . z <= offset. */
export interface MarginFacet {
  /** Its number in the list of facets, from 1. */
  readonly number: number;
  readonly normal: readonly string[];
  readonly offset: string;
  /** Generators that stand at an end all over it. */
  readonly atLimit: readonly AtLimit[];
}

export interface MarginReport {
  readonly point: readonly string[];
  readonly place: Margin['place'];
  /** The facet nearest to the point, or the one it is farthest beyond; null off the span. */
  readonly nearest: MarginFacet | null;
  /** To that facet: the radius of the largest ball where the point is inside. */
  readonly distance: { readonly square: string; readonly decimal: string } | null;
  /** The largest axis-parallel box with equal sides: half a side, and the facet that stops it. */
  readonly box: {
    readonly half: string;
    readonly decimal: string;
    readonly facet: MarginFacet;
  } | null;
  /** Generators whose end is forced at a point of the boundary; empty elsewhere. */
  readonly forced: readonly AtLimit[];
}

/** Lists the flats itself where they were not listed; LimitError where they do not fit. */
export function marginReport(
  arrangement: Arrangement,
  lattice: FlatLattice | null,
  point: readonly ExactNumber[],
  { memoryBytes }: { readonly memoryBytes: number },
): MarginReport {
  const { radicand, normals, labels } = arrangement.generators;
  if (point.length !== normals[0].length) {
    throw new InputError(
      `a point of ${point.length} numbers, the arrangement has ${normals[0].length} coordinates`,
      'give one number for each',
    );
  }
  const flats = lattice ?? listFlatsWithin(arrangement, memoryBytes);
  const margin = marginAt(arrangement, facetsOf(arrangement, flats), point);
  const text = (x: ExactNumber): string => formatNumber(x, radicand);
  const named = (generator: number, end: 'low' | 'high'): AtLimit => ({
    generator: generator + 1,
    label: labels?.[generator] ?? null,
    end,
  });
  const facets = new Map<number, MarginFacet>();
  const wanted = new Set([margin.nearest, margin.cube?.facet ?? null]);
  let number = 0;
  for (const facet of facetsOf(arrangement, flats)) {
    if (wanted.has(number)) {
      const { signs, normal, offset } = facetRow(arrangement, facet);
      facets.set(number, {
        number: number + 1,
        normal: normal.map(text),
        offset: text(offset),
        atLimit: [...signs].flatMap((sign, j) =>
          sign === '0' ? [] : [named(j, sign === '+' ? 'high' : 'low')],
        ),
      });
    }
    number++;
  }
  return {
    point: point.map(text),
    place: margin.place,
    nearest: margin.nearest === null ? null : facets.get(margin.nearest)!,
    distance: margin.distance && {
      square: text(margin.distance.square),
      decimal: margin.distance.decimal,
    },
    box: margin.cube && {
      half: text(margin.cube.half),
      decimal: margin.cube.decimal,
      facet: facets.get(margin.cube.facet)!,
    },
    forced: margin.limits.map(({ generator, end }) => named(generator, end)),
  };
}
