// Vertices and edges of the zonotope as rows for a list, made one at a time.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { fullMask } from '../bits/signs.js';
import { addNumbers, type ExactNumber, multiplyNumbers } from '../exact/number.js';
import { unitRange } from '../input/generators.js';
import type { RegionTable } from '../region/regions.js';
import { ZonotopeVertices } from '../zonotope/vertices.js';
import type { FaceRow } from './face-rows.js';

export interface VertexRow {
  /** One of + and - for each generator: high end or low. */
  readonly signs: string;
  readonly vertex: readonly ExactNumber[];
}

/** Every vertex, in the order of the list of regions: each followed by its opposite. */
export function* vertexRows(arrangement: Arrangement, table: RegionTable): Generator<VertexRow> {
  const text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const vertices = new ZonotopeVertices(arrangement);
  const { words, rows, wordsPerRow } = table.half;
  const mask = fullMask(table.hyperplanes);
  const opposite = new Int32Array(wordsPerRow);
  for (let row = 0; row < rows; row++) {
    const offset = row * wordsPerRow;
    yield { signs: text.write(words, offset), vertex: vertices.vertexOf(words, offset) };
    for (let w = 0; w < wordsPerRow; w++) opposite[w] = ~words[offset + w] & mask[w];
    yield { signs: text.write(opposite, 0), vertex: vertices.vertexOf(opposite, 0) };
  }
}

export interface EdgeRow {
  /** 0 for the generators that the edge is the sum of; + and - as for vertices. */
  readonly signs: string;
  /** 1-based. */
  readonly generators: readonly number[];
  /** The end where the first of its generators is low, and the other. */
  readonly from: readonly ExactNumber[];
  readonly to: readonly ExactNumber[];
}

/** Edges from the faces of dimension rank - 1. */
export function* edgeRows(arrangement: Arrangement, faces: Iterable<FaceRow>): Generator<EdgeRow> {
  const { generators, orientationOf } = arrangement;
  const { normals, ranges, radicand } = generators;
  const k = radicand ?? 0n;
  for (const { signs, free, base } of faces) {
    const along = orientationOf[free[0] - 1];
    const end = (high: boolean): ExactNumber[] =>
      free.reduce<ExactNumber[]>(
        (sum, number) => {
          const range = ranges?.[number - 1] ?? unitRange;
          const t = (orientationOf[number - 1] === along) === high ? range.high : range.low;
          return sum.map((x, i) => addNumbers(x, multiplyNumbers(t, normals[number - 1][i], k)));
        },
        [...base],
      );
    yield { signs, generators: free, from: end(false), to: end(true) };
  }
}
