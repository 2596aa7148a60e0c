// Facets of the zonotope as rows for a list, one at a time, with the vertices on each where asked.

import type { Arrangement } from '../arrangement/arrangement.js';
import { buildArrangement } from '../arrangement/build.js';
import { bitAt, setBit, wordsFor } from '../bits/signs.js';
import { type ExactNumber, exactNumber } from '../exact/number.js';
import type { Quadratic } from '../exact/quadratic.js';
import { regionsThroughFlats } from '../flat/by-localization.js';
import type { FlatLattice } from '../flat/lattice.js';
import { listRegions, type RegionTable } from '../region/regions.js';
import { eachRegion } from '../region/walls.js';
import { type Facet, facetsOf } from '../zonotope/facets.js';

/** A facet as it is written out: normal . z <= offset on the zonotope. */
export interface FacetRow {
  /** Of the ray that the normal is, on each generator: + where it stands at its high end on the facet,
   * - at its low end, 0 where it is free. */
  readonly signs: string;
  /** d numbers: primitive integers over Q. */
  readonly normal: readonly ExactNumber[];
  readonly offset: ExactNumber;
  /** 1-based generators that are free, ascending. */
  readonly generators: readonly number[];
}

/** A facet with its vertices. */
export interface FacetVertexRow extends FacetRow {
  readonly vertices: bigint;
  /** Rows of the list of vertices, from 1, ascending; null unless asked for. */
  readonly vertexRows: readonly number[] | null;
}

export function facetRow<E>(arrangement: Arrangement<E>, facet: Facet<E>): FacetRow {
  const { ring, hyperplanes, hyperplaneOf, orientationOf, generators } = arrangement;
  const side = hyperplanes.map(({ essential }) =>
    ring.sign(
      essential.reduce(
        (sum, x, i) => ring.add(sum, ring.multiply(x, facet.essential[i])),
        ring.zero,
      ),
    ),
  );
  const number = (e: E): ExactNumber =>
    generators.radicand === null
      ? exactNumber(e as bigint)
      : exactNumber((e as Quadratic).a, (e as Quadratic).b);
  return {
    signs: Array.from(hyperplaneOf, (h, j) => '-0+'[1 + side[h] * orientationOf[j]]).join(''),
    normal: facet.normal.map(number),
    offset: facet.offset,
    generators: facet.generators.map((j) => j + 1),
  };
}

/** Every facet, two and two opposite; with the table of regions also which vertices are on it. */
export function* facetRows(
  arrangement: Arrangement,
  lattice: FlatLattice,
  table: RegionTable | null,
): Generator<FacetVertexRow> {
  const counts = regionsThroughFlats(lattice, lattice.rank - 1);
  const search = table && new VertexSearch(arrangement, table);
  let i = 0;
  for (const facet of facetsOf(arrangement, lattice)) {
    const row = facetRow(arrangement, facet);
    const vertices = counts[i++ >> 1];
    yield { ...row, vertices, vertexRows: search?.verticesOn(row) ?? null };
  }
}

/** Finds the vertices of a facet: the regions around its ray, looked up in the list of regions. */
class VertexSearch {
  private readonly arrangement: Arrangement;
  private readonly rows = new Map<string, number>();

  constructor(arrangement: Arrangement, table: RegionTable) {
    this.arrangement = arrangement;
    const { wordsPerRow } = table.half;
    const listed = table.half.rows;
    // In the list each region is followed by its opposite.
    eachRegion(table, (words, offset, region) => {
      const number = region < listed ? 2 * region + 1 : 2 * (region - listed) + 2;
      this.rows.set(words.subarray(offset, offset + wordsPerRow).join(), number);
    });
  }

  verticesOn({ signs, generators }: FacetRow): number[] {
    const { hyperplanes, hyperplaneOf, orientationOf } = this.arrangement;
    const length = wordsFor(hyperplanes.length);
    const ray = new Int32Array(length);
    hyperplanes.forEach(({ members }, h) => {
      const sign = signs[members[0]];
      if ((sign === '+') === orientationOf[members[0]] > 0 && sign !== '0') setBit(ray, 0, h);
    });
    const inside = [...new Set(generators.map((j) => hyperplaneOf[j - 1]))].sort((a, b) => a - b);
    if (inside.length === 0) return [this.rows.get(ray.join())!];
    const around = listRegions(this.through(inside));
    const found: number[] = [];
    const { words, rows, wordsPerRow } = around.half;
    for (let row = 0; row < rows; row++) {
      for (const flip of [false, true]) {
        const word = ray.slice();
        for (let i = 0; i < inside.length; i++) {
          if ((bitAt(words, row * wordsPerRow, i) === 1) !== flip) setBit(word, 0, inside[i]);
        }
        found.push(this.rows.get(word.join())!);
      }
    }
    return found.sort((a, b) => a - b);
  }

  /** The arrangement of some of the hyperplanes, each by the first of its normals. */
  private through(inside: readonly number[]): Arrangement {
    const { hyperplanes, generators } = this.arrangement;
    const normals = inside.map((h) => generators.normals[hyperplanes[h].members[0]]);
    const rooted = normals.some((normal) => normal.some((x) => x.b !== 0n));
    return buildArrangement({
      ...generators,
      radicand: rooted ? generators.radicand : null,
      normals,
      labels: null,
      ranges: null,
    });
  }
}
