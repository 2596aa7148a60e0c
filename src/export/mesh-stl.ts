// STL, the ASCII kind: every polygon as a fan of triangles from its first vertex, with the unit normal.
// The format knows neither comments nor labels; its readers keep 32-bit floats.
import type { Solid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import { solidTitle } from './mesh-words.js';

/** Digits of a normal: readers keep 7, and most compute it again. */
const normalDigits = 9;

/** Lines of the file. */
export function* stlLines(solid: Solid): Generator<string> {
  const { faces, vertices, projection } = solid;
  // That the vertices stay apart as 32-bit floats is asked here; the numbers keep all their digits.
  placeVertices(projection, vertices, true);
  const placed = placeVertices(projection, vertices);
  const at = (v: number): number[] => [placed[3 * v], placed[3 * v + 1], placed[3 * v + 2]];
  const title = solidTitle(solid).replace(/[^ -~]/g, '?');
  yield `solid ${title}\n`;
  for (const { vertices: corners } of faces) {
    const normal = unitNormal(corners.map(at));
    for (let i = 1; i + 1 < corners.length; i++) {
      yield `facet normal ${normal}\n outer loop\n`;
      for (const v of [corners[0], corners[i], corners[i + 1]])
        yield `  vertex ${at(v).join(' ')}\n`;
      yield ' endloop\nendfacet\n';
    }
  }
  yield `endsolid ${title}\n`;
}

/** By the diagonals between opposite corners, which are long where sides may be short. */
function unitNormal(corners: readonly (readonly number[])[]): string {
  const half = corners.length / 2;
  const quarter = Math.floor(half / 2);
  const diagonal = (k: number): number[] => {
    const [from, to] = [corners[k], corners[k + half]];
    const reach = to.map((x, i) => x - from[i]);
    const size = Math.max(...reach.map(Math.abs));
    return reach.map((x) => x / size);
  };
  const [u, v] = [diagonal(0), diagonal(quarter)];
  const cross = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
  const length = Math.hypot(...cross);
  return cross.map((x) => Number((x / length).toFixed(normalDigits)) + 0).join(' ');
}
