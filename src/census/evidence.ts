// Looking at every listed region on its own: the words differ, each has an exact integer point whose
// signs on all normals as given are the word's, and each zonotope vertex is the only greatest in the
// direction of its region's point. With as many words as the polynomial counts, that proves the list
// complete (T. Zaslavsky, 1975). Plain arithmetic on the input, and none of the kernels'.
import type { Arrangement } from '../arrangement/arrangement.js';
import { bitAt, fullMask } from '../bits/signs.js';
import type { ExactNumber } from '../exact/number.js';
import { commonDenominator } from '../exact/number.js';
import { quadraticRing } from '../exact/quadratic.js';
import { extremeCheckSteps, regionCheckEntries } from '../limits.js';
import { InteriorPoints } from '../region/interior.js';
import type { RegionTable } from '../region/regions.js';
import { regionCount } from '../region/regions.js';
import { WallFinder } from '../region/walls.js';
import { findRival } from '../zonotope/extremes.js';
import { ZonotopeVertices } from '../zonotope/vertices.js';

/** What looking at every region found; counts, or a word on the first that fails. */
export interface RegionEvidence {
  /** Regions, all different, with a point inside. */
  readonly points: string;
  /** Vertices that are distinct and extreme; null where there are too many to compare. */
  readonly extremes: string | null;
}

/** Examines a list of regions; null where there are too many for an answer within a second or two. */
export function examineRegions(
  arrangement: Arrangement,
  table: RegionTable,
): RegionEvidence | null {
  const { dimension, generators } = arrangement;
  const regions = regionCount(table);
  if (regions * generators.normals.length * dimension > regionCheckEntries) return null;
  const { words, wordsPerRow, rows } = table.half;
  const mask = fullMask(table.hyperplanes);
  const walls = new WallFinder(table);
  const interior = new InteriorPoints(arrangement);
  const zonotope = new ZonotopeVertices(arrangement);
  const signs = new SignReader(arrangement);
  const seen = new Set<string>();
  const points: bigint[][] = [];
  const vertices: ExactNumber[][] = [];
  for (let row = 0; row < rows; row++) {
    const word = words.slice(row * wordsPerRow, (row + 1) * wordsPerRow);
    const negated = word.map((x, w) => ~x & mask[w]);
    seen.add(word.join()).add(negated.join());
    if (seen.size !== 2 * row + 2) return failing(`region ${row + 1} is listed twice`);
    const point = pointIn(interior, word, walls.wallsOf(row));
    if (point === null || !signs.agree(point, word)) {
      return failing(`region ${row + 1} has no point inside`);
    }
    points.push(
      point,
      point.map((x) => -x),
    );
    vertices.push(zonotope.vertexOf(word, 0), zonotope.vertexOf(negated, 0));
  }
  let extremes: string | null = null;
  if (regions * regions * dimension <= extremeCheckSteps) {
    const rival = findRival(vertices, points, generators.radicand);
    extremes = rival === null ? String(regions) : `vertex ${rival.vertex + 1} is not extreme`;
  }
  return { points: String(seen.size), extremes };
}

function failing(why: string): RegionEvidence {
  return { points: why, extremes: null };
}

/** Null when no point has these signs. */
function pointIn(
  interior: InteriorPoints,
  word: Int32Array,
  walls: readonly number[],
): bigint[] | null {
  try {
    return interior.pointOf(word, 0, walls);
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** Signs of points on the normals as given, by plain sums of products. */
class SignReader {
  readonly #arrangement: Arrangement;
  /** Each normal with its denominators cleared: integer parts and parts of the root. */
  readonly #rows: readonly { readonly a: readonly bigint[]; readonly b: readonly bigint[] }[];

  constructor(arrangement: Arrangement) {
    this.#arrangement = arrangement;
    this.#rows = arrangement.generators.normals.map((normal) => {
      const d = commonDenominator(normal);
      return {
        a: normal.map((x) => (x.a * d) / x.d),
        b: normal.map((x) => (x.b * d) / x.d),
      };
    });
  }

  agree(point: readonly bigint[], word: Int32Array): boolean {
    const { generators, hyperplaneOf, orientationOf } = this.#arrangement;
    const { radicand } = generators;
    const ring = radicand === null ? null : quadraticRing(radicand);
    return this.#rows.every((row, i) => {
      const a = dot(row.a, point);
      const sign = ring === null ? signOf(a) : ring.sign({ a, b: dot(row.b, point) });
      const side = bitAt(word, 0, hyperplaneOf[i]) === 1 ? 1 : -1;
      return sign === side * orientationOf[i];
    });
  }
}

function dot(row: readonly bigint[], point: readonly bigint[]): bigint {
  return row.reduce((sum, x, j) => sum + x * point[j], 0n);
}

function signOf(value: bigint): number {
  return value > 0n ? 1 : value < 0n ? -1 : 0;
}
