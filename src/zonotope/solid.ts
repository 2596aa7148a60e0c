// The boundary of a zonotope in three coordinates as a polygonal surface, exact. A facet comes from a
// ray of the arrangement (facets.ts); its sides run along the generators that are free on it, first
// in the order of their directions in its plane, then back along each (P. McMullen, 1971, On
// zonotopes).
//
// Order. Vertex v belongs to region v in the list of regions: the rows of the half, each followed by
// its negation.
// Faces come as facetsOf gives them, two and two opposite. The vertices of a face go counterclockwise
// seen from outside, the least first.

import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt, fullMask } from '../bits/signs.js';
import { InputError, LimitError } from '../errors.js';
import type { ExactNumber } from '../exact/number.js';
import type { Ring } from '../exact/ring.js';
import { listFlats } from '../flat/lattice.js';
import { surfaceFaces } from '../limits.js';
import { listRegions, type RegionTable, regionCount } from '../region/regions.js';
import { type Facet, facetsOf } from './facets.js';
import { type Projection, type ProjectionChoice, projectArrangement } from './solid-projection.js';
import { ZonotopeVertices } from './vertices.js';

/** A polygon of the surface with an even number of sides. */
export interface SolidFace {
  /** The facet inequality, outward, over the arrangement that was projected to. */
  readonly facet: Facet;
  /** Counterclockwise seen from outside, the least first. */
  readonly vertices: readonly number[];
  /** For each side, from its vertex to the next, the hyperplane whose generators it runs along. */
  readonly along: readonly number[];
}

/** Where two faces meet. `left` has the edge in the direction from -> to, `right` in the other. */
export interface SolidEdge {
  readonly from: number;
  readonly to: number;
  readonly along: number;
  readonly left: number;
  readonly right: number;
}

/** The closed surface, with what its numbers mean. */
export interface Solid {
  readonly projection: Projection;
  /** Of the projected arrangement. */
  readonly regions: RegionTable;
  /** Three exact numbers each, in the coordinates of the projected arrangement. */
  readonly vertices: readonly (readonly ExactNumber[])[];
  readonly faces: readonly SolidFace[];
  /** In the order of their first face, then of its sides. */
  readonly edges: readonly SolidEdge[];
}

/**
 * The surface of the zonotope's image in three coordinates. InputError where the image is not solid;
 * LimitError where it has more faces than `most`.
 */
export function buildSolid(
  arrangement: Arrangement,
  choice: ProjectionChoice,
  most = surfaceFaces,
): Solid {
  const projection = projectArrangement(arrangement, choice);
  const image = projection.arrangement;
  if (image.rank !== 3) {
    throw new InputError(
      `rank ${image.rank}: the zonotope has no surface in space`,
      'give normals of rank 3 or more, and three coordinates to project them to',
    );
  }
  const m = image.hyperplanes.length;
  if (m * (m - 1) > 4 * most) throw tooMany(`up to ${m * (m - 1)} faces`, most);
  const lattice = listFlats(image);
  const faceCount = 2 * (lattice.rankOffsets[3] - lattice.rankOffsets[2]);
  if (faceCount > most) throw tooMany(`${faceCount} faces`, most);
  const regions = listRegions(image);
  const place = new ZonotopeVertices(image);
  const words = wordsOf(regions);
  const vertices = words.map((word) => place.vertexOf(word, 0));
  const faces = facesOf(
    image,
    [...facetsOf(image, lattice)],
    new Map(words.map((w, v) => [keyOf(w), v])),
  );
  return { projection, regions, vertices, faces, edges: edgesOf(faces, vertices.length) };
}

function tooMany(estimate: string, most: number): LimitError {
  return new LimitError(
    'the surface of the zonotope',
    estimate,
    `${most} faces`,
    'leave generators out, or list its facets instead',
  );
}

/** The sign word of every region in the order of the list: each row followed by its negation. */
export function wordsOf(regions: RegionTable): Int32Array[] {
  const { half, hyperplanes } = regions;
  const W = half.wordsPerRow;
  const mask = fullMask(hyperplanes);
  return Array.from({ length: regionCount(regions) }, (_, v) => {
    const row = (v >> 1) * W;
    const word = half.words.slice(row, row + W);
    if (v % 2 === 1) for (let w = 0; w < W; w++) word[w] = ~word[w] & mask[w];
    return word;
  });
}

function keyOf(word: Int32Array): string {
  return word.join(' ');
}

function facesOf<E>(
  arrangement: Arrangement<E>,
  facets: readonly Facet<E>[],
  vertexOf: ReadonlyMap<string, number>,
): SolidFace[] {
  const { ring, hyperplanes, hyperplaneOf } = arrangement;
  const side = new SideOfRay(
    ring,
    hyperplanes.map((h) => h.essential),
  );
  return facets.map((facet) => {
    const free = [...new Set(facet.generators.map((j) => hyperplaneOf[j]))];
    const turns = directionsAround(ring, facet.essential, free, (h) => hyperplanes[h].essential);
    // The corner where every free direction is at its beginning.
    const word = side.wordOf(facet.essential, free);
    const flip = (h: number): void => {
      word[h >> 5] ^= 1 << (h & 31);
    };
    for (const { h, forward } of turns) if (bitAt(word, 0, h) === (forward ? 1 : 0)) flip(h);
    const corners: number[] = [];
    for (const { h } of [...turns, ...turns]) {
      const vertex = vertexOf.get(keyOf(word));
      if (vertex === undefined) throw new Error('solid: a corner of a facet is no vertex');
      corners.push(vertex);
      flip(h);
    }
    const first = corners.indexOf(corners.reduce((least, v) => Math.min(least, v)));
    const rotated = <T>(list: readonly T[]): T[] => [...list.slice(first), ...list.slice(0, first)];
    return {
      facet,
      vertices: rotated(corners),
      along: rotated([...turns, ...turns].map(({ h }) => h)),
    };
  });
}

/**
 * The free hyperplanes of a facet by the angle of their directions about its outward normal, each
 * turned by half a circle where need be (`forward` false) so that all lie within one half-plane.
 */
function directionsAround<E>(
  ring: Ring<E>,
  normal: readonly E[],
  free: readonly number[],
  essential: (h: number) => readonly E[],
): { h: number; forward: boolean }[] {
  const turn = (u: readonly E[], v: readonly E[]): number => {
    const cross = (i: number, j: number): E =>
      ring.subtract(ring.multiply(u[i], v[j]), ring.multiply(u[j], v[i]));
    const terms = [cross(1, 2), cross(2, 0), cross(0, 1)].map((x, c) =>
      ring.multiply(x, normal[c]),
    );
    return ring.sign(terms.reduce((sum, x) => ring.add(sum, x)));
  };
  const first = essential(free[0]);
  const directed = free.map((h, i) => {
    const forward = i === 0 || turn(first, essential(h)) > 0;
    const v = forward ? essential(h) : essential(h).map((x) => ring.negate(x));
    return { h, forward, v };
  });
  return directed.sort((a, b) => (a.h === b.h ? 0 : -turn(a.v, b.v)));
}

/** On which side of every hyperplane a ray lies: by doubles where their error is outweighed, exactly else. */
class SideOfRay<E> {
  private readonly ring: Ring<E>;
  private readonly normals: readonly (readonly E[])[];
  private readonly doubles: Float64Array;

  constructor(ring: Ring<E>, normals: readonly (readonly E[])[]) {
    this.ring = ring;
    this.normals = normals;
    this.doubles = Float64Array.from(normals.flat(), (x) => ring.ratio(x, ring.one));
  }

  /** The sign word, 0 at the hyperplanes that contain the ray. */
  wordOf(ray: readonly E[], zero: readonly number[]): Int32Array {
    const { ring, normals, doubles } = this;
    const word = new Int32Array((normals.length + 31) >> 5);
    const [x, y, z] = ray.map((e) => ring.ratio(e, ring.one));
    for (let h = 0; h < normals.length; h++) {
      const [p, q, r] = [x * doubles[3 * h], y * doubles[3 * h + 1], z * doubles[3 * h + 2]];
      const sum = p + q + r;
      // Each factor is off by 2^-48 of itself at most, so each product by less than 2^-46.5, and the
      // two additions by 2^-52 of the sizes added: 2^-46 of the sizes bounds the whole. What is not
      // a number, or too small for doubles to hold, passes no comparison.
      const error = 2 ** -46 * (Math.abs(p) + Math.abs(q) + Math.abs(r)) + 2 ** -900;
      let sign = 0;
      if (sum > error) sign = 1;
      else if (!(sum < -error)) {
        const exact = normals[h].map((e, c) => ring.multiply(e, ray[c]));
        sign = ring.sign(exact.reduce((total, e) => ring.add(total, e)));
      }
      if (sign > 0) word[h >> 5] |= 1 << (h & 31);
    }
    for (const h of zero) word[h >> 5] &= ~(1 << (h & 31));
    return word;
  }
}

function edgesOf(faces: readonly SolidFace[], vertexCount: number): SolidEdge[] {
  const open = new Map<
    number,
    { from: number; to: number; along: number; left: number; right: number }
  >();
  const edges: SolidEdge[] = [];
  faces.forEach(({ vertices, along }, f) => {
    vertices.forEach((from, k) => {
      const to = vertices[(k + 1) % vertices.length];
      const opposite = open.get(to * vertexCount + from);
      if (opposite !== undefined) {
        opposite.right = f;
        return;
      }
      const edge = { from, to, along: along[k], left: f, right: -1 };
      open.set(from * vertexCount + to, edge);
      edges.push(edge);
    });
  });
  return edges;
}
