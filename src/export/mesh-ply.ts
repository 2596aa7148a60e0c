// PLY, the ASCII kind (G. Turk, 1994): vertices, polygons tinted by their number of sides, and edges
// that know the normal they run along.
import type { Solid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import { meshNotes, sideClass, sideTints } from './mesh-words.js';

/** Lines of the file; vertices count from 0, normals from 1. */
export function* plyLines(solid: Solid): Generator<string> {
  const { vertices, faces, edges, projection } = solid;
  const placed = placeVertices(projection, vertices);
  const most = faces.reduce((count, face) => Math.max(count, face.vertices.length), 0);
  yield 'ply\nformat ascii 1.0\n';
  for (const note of meshNotes(solid)) yield `comment ${note}\n`;
  yield 'comment The normal of an edge is the first that it runs along, parallel ones included\n';
  yield `element vertex ${vertices.length}\n`;
  for (const name of ['x', 'y', 'z']) yield `property double ${name}\n`;
  yield `element face ${faces.length}\n`;
  yield `property list ${most < 256 ? 'uchar' : 'ushort'} int vertex_indices\n`;
  for (const name of ['red', 'green', 'blue']) yield `property uchar ${name}\n`;
  yield `element edge ${edges.length}\n`;
  for (const name of ['vertex1', 'vertex2', 'normal']) yield `property int ${name}\n`;
  yield 'end_header\n';
  for (let i = 0; i < placed.length; i += 3) {
    yield `${placed[i]} ${placed[i + 1]} ${placed[i + 2]}\n`;
  }
  const colours = sideTints.map((tint) =>
    [1, 3, 5].map((i) => Number.parseInt(tint.slice(i, i + 2), 16)).join(' '),
  );
  for (const face of faces) {
    const sides = face.vertices.length;
    yield `${sides} ${face.vertices.join(' ')} ${colours[sideClass(sides)]}\n`;
  }
  const { hyperplanes } = projection.arrangement;
  for (const { from, to, along } of edges) {
    yield `${from} ${to} ${projection.kept[hyperplanes[along].members[0]] + 1}\n`;
  }
}
