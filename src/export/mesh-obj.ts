// Wavefront OBJ: polygons as they are; a face belongs to one group for each direction it runs along.
import type { Solid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import { classWords, meshNotes } from './mesh-words.js';

/** Lines of the file; vertices count from 1. */
export function* objLines(solid: Solid): Generator<string> {
  const placed = placeVertices(solid.projection, solid.vertices);
  // A backslash at the end of a line would join the next line to it.
  for (const note of meshNotes(solid)) yield `# ${note.replaceAll('\\', '/')}\n`;
  yield '# Groups are the normals that a face runs along\n';
  yield 'o zonotope\n';
  for (let i = 0; i < placed.length; i += 3) {
    yield `v ${placed[i]} ${placed[i + 1]} ${placed[i + 2]}\n`;
  }
  const words = classWords(solid.projection);
  let group = '';
  for (const { vertices, along } of solid.faces) {
    const own = [...new Set(along)].sort((a, b) => a - b).map((h) => words[h]);
    if (own.join(' ') !== group) {
      group = own.join(' ');
      yield `g ${group}\n`;
    }
    yield `f ${vertices.map((v) => v + 1).join(' ')}\n`;
  }
}
