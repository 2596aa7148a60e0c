// Faces grouped by type: in each dimension by how many hyperplanes contain the face, how many faces
// it covers and how many cover it; by fewer of these where the types would be too many to draw.
import { countBits } from '../bits/signs.js';
import type { FacePoset } from '../face/poset.js';
import type { FaceSelection } from './selection.js';

/** From least to most, over the faces of a type. */
export type Span = readonly [number, number];

/** Faces of one dimension that are alike. */
export interface FaceType {
  readonly layer: number;
  readonly count: number;
  readonly hyperplanes: Span;
  readonly covers: Span;
  readonly coveredBy: Span;
}

/** Types with the number of covers between each two that have any. */
export interface FaceTypes {
  /** Lowest layer first. */
  readonly types: readonly FaceType[];
  readonly joins: readonly {
    readonly low: number;
    readonly high: number;
    readonly count: number;
  }[];
}

/** Finds the types of a selection, at most `most` in a layer. */
export function findFaceTypes(poset: FacePoset, selection: FaceSelection, most: number): FaceTypes {
  const { flatOf, flatZero, wordsPerRow } = poset;
  const { faces, layerOffsets, upOffsets, upTargets } = selection;
  const down = new Int32Array(faces.length);
  for (const target of upTargets) down[target]++;
  const through = Array.from({ length: poset.flatCount }, (_, x) =>
    countBits(flatZero, x * wordsPerRow, wordsPerRow),
  );
  const features = (v: number): [number, number, number] => [
    through[flatOf[faces[v]]],
    down[v],
    upOffsets[v + 1] - upOffsets[v],
  ];
  const typeOf = new Int32Array(faces.length);
  const types: FaceType[] = [];
  for (let layer = 0; layer + 1 < layerOffsets.length; layer++) {
    const [from, to] = [layerOffsets[layer], layerOffsets[layer + 1]];
    // Features kept: all, then without covers from above, then hyperplanes only, then none.
    for (const kept of [3, 2, 1, 0]) {
      const groups = new Map<string, number[]>();
      for (let v = from; v < to && groups.size <= most; v++) {
        const key = features(v).slice(0, kept).join();
        const group = groups.get(key);
        if (group === undefined) groups.set(key, [v]);
        else group.push(v);
      }
      if (groups.size > most) continue;
      const sorted = [...groups.values()].sort((a, b) => compare(features(a[0]), features(b[0])));
      for (const group of sorted) {
        for (const v of group) typeOf[v] = types.length;
        const span = (feature: number): Span => {
          let [least, largest] = [Number.POSITIVE_INFINITY, 0];
          for (const v of group) {
            const value = features(v)[feature];
            least = Math.min(least, value);
            largest = Math.max(largest, value);
          }
          return [least, largest];
        };
        types.push({
          layer,
          count: group.length,
          hyperplanes: span(0),
          covers: span(1),
          coveredBy: span(2),
        });
      }
      break;
    }
  }
  return { types, joins: joinsOf(selection, typeOf, types.length) };
}

function compare(a: readonly number[], b: readonly number[]): number {
  const i = a.findIndex((x, k) => x !== b[k]);
  return i < 0 ? 0 : a[i] - b[i];
}

function joinsOf(selection: FaceSelection, typeOf: Int32Array, types: number): FaceTypes['joins'] {
  const { faces, upOffsets, upTargets } = selection;
  const counts = new Float64Array(types * types);
  for (let v = 0; v < faces.length; v++) {
    for (let e = upOffsets[v]; e < upOffsets[v + 1]; e++) {
      counts[typeOf[v] * types + typeOf[upTargets[e]]]++;
    }
  }
  const joins: FaceTypes['joins'][number][] = [];
  counts.forEach((count, i) => {
    if (count > 0) joins.push({ low: Math.floor(i / types), high: i % types, count });
  });
  return joins;
}
