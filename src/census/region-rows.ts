// Regions as rows for a list: the table of the kernel joined with walls, interior points and the
// matching vertices of the zonotope, one row at a time and never all at once.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { fullMask } from '../bits/signs.js';
import type { ExactNumber } from '../exact/number.js';
import { InteriorPoints } from '../region/interior.js';
import type { RegionTable } from '../region/regions.js';
import { WallFinder } from '../region/walls.js';
import { ZonotopeVertices } from '../zonotope/vertices.js';

/** A region as it is written out. */
export interface RegionRow {
  /** One of + and - for each normal given. */
  readonly signs: string;
  /** 1-based numbers of normals, ascending: for each wall the first normal of its hyperplane. */
  readonly walls: readonly number[];
  /** d integers, strictly inside. */
  readonly point: readonly bigint[];
  /** d numbers: the vertex of the zonotope that is best in the directions of the region. */
  readonly vertex: readonly ExactNumber[];
}

/**
 * Every region of a complete list, in the list's order, each followed by its negation. Walls and
 * point of the two are found once.
 */
export function* regionRows(arrangement: Arrangement, table: RegionTable): Generator<RegionRow> {
  const { half } = table;
  const { wordsPerRow, words } = half;
  const { hyperplanes } = arrangement;
  const walls = new WallFinder(table);
  const points = new InteriorPoints(arrangement);
  const vertices = new ZonotopeVertices(arrangement);
  const text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const mask = fullMask(table.hyperplanes);
  const negated = new Int32Array(wordsPerRow);
  for (let row = 0; row < half.rows; row++) {
    const offset = row * wordsPerRow;
    const wallsHere = walls.wallsOf(row);
    const numbers = wallsHere.map((h) => hyperplanes[h].members[0] + 1);
    const point = points.pointOf(words, offset, wallsHere);
    yield {
      signs: text.write(words, offset),
      walls: numbers,
      point,
      vertex: vertices.vertexOf(words, offset),
    };
    for (let w = 0; w < wordsPerRow; w++) negated[w] = ~words[offset + w] & mask[w];
    yield {
      signs: text.write(negated, 0),
      walls: numbers,
      point: point.map((x) => -x),
      vertex: vertices.vertexOf(negated, 0),
    };
  }
}
