// The zonotope in two coordinates: a polygon with two sides for each hyperplane, exact. Its sides
// follow each other by angle, first one way along every direction, then the other.
import type { Arrangement } from '../arrangement/arrangement.js';
import { wordsFor } from '../bits/signs.js';
import { InputError } from '../errors.js';
import type { ExactNumber } from '../exact/number.js';
import type { Ring } from '../exact/ring.js';
import { type Projection, type ProjectionChoice, projectArrangement } from './solid-projection.js';
import { ZonotopeVertices } from './vertices.js';

/** Vertices counterclockwise; side i goes from vertex i to the next. */
export interface Polygon {
  readonly projection: Projection;
  /** Two exact numbers each. */
  readonly vertices: readonly (readonly ExactNumber[])[];
  /** The sign word of the region of each vertex, in the projected arrangement. */
  readonly words: readonly Int32Array[];
  /** For each side the hyperplane whose generators it runs along. */
  readonly along: readonly number[];
}

/** The image of the zonotope in two coordinates; InputError where it is of another rank. */
export function buildPolygon(arrangement: Arrangement, choice: ProjectionChoice): Polygon {
  const projection = projectArrangement(arrangement, choice);
  const { rank } = projection.arrangement;
  if (rank !== 2) {
    throw new InputError(`rank ${rank}: the zonotope is no polygon`, 'name two coordinates');
  }
  return { projection, ...around(projection.arrangement) };
}

function around<E>(arrangement: Arrangement<E>): Omit<Polygon, 'projection'> {
  const { ring, hyperplanes } = arrangement;
  const turns = directionsInPlane(
    ring,
    hyperplanes.map((h) => h.essential),
  );
  const word = new Int32Array(wordsFor(hyperplanes.length));
  const flip = (h: number): void => {
    word[h >> 5] ^= 1 << (h & 31);
  };
  for (const { h, forward } of turns) if (!forward) flip(h);
  const words: Int32Array[] = [];
  const along = [...turns, ...turns].map(({ h }) => h);
  for (const h of along) {
    words.push(word.slice());
    flip(h);
  }
  const place = new ZonotopeVertices(arrangement);
  return { vertices: words.map((w) => place.vertexOf(w, 0)), words, along };
}

/** By angle from the first, each turned by half a circle where need be to lie in its half-plane. */
function directionsInPlane<E>(
  ring: Ring<E>,
  vectors: readonly (readonly E[])[],
): { h: number; forward: boolean }[] {
  const turn = ([a, b]: readonly E[], [c, d]: readonly E[]): number =>
    ring.sign(ring.subtract(ring.multiply(a, d), ring.multiply(b, c)));
  return vectors
    .map((vector, h) => {
      const forward = h === 0 || turn(vectors[0], vector) > 0;
      return { h, forward, v: forward ? vector : vector.map((x) => ring.negate(x)) };
    })
    .sort((a, b) => (a.h === b.h ? 0 : -turn(a.v, b.v)));
}
