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
  // In order of weight: what the coarser groupings drop comes last.
  const features = [
    (v: number) => through[flatOf[faces[v]]],
    (v: number) => down[v],
    (v: number) => upOffsets[v + 1] - upOffsets[v],
  ];
  const typeOf = new Int32Array(faces.length);
  const types: FaceType[] = [];
  for (let layer = 0; layer + 1 < layerOffsets.length; layer++) {
    const [from, to] = [layerOffsets[layer], layerOffsets[layer + 1]];
    let groups: Group[] | null = null;
    for (let kept = features.length; groups === null; kept--) {
      groups = groupFaces(from, to, features, kept, kept === 0 ? 1 : most, typeOf);
    }
    // Groups come in the order of their first faces; in the picture the least comes first.
    const sorted = groups.map((group, i) => ({ group, i }));
    sorted.sort((x, y) => compare(x.group, y.group) || x.i - y.i);
    const number = new Int32Array(groups.length);
    for (const { group, i } of sorted) {
      number[i] = types.length;
      const [hyperplanes, covers, coveredBy] = group.spans;
      types.push({ layer, count: group.count, hyperplanes, covers, coveredBy });
    }
    for (let v = from; v < to; v++) typeOf[v] = number[typeOf[v]];
  }
  return { types, joins: joinsOf(selection, typeOf, types.length) };
}

interface Group {
  count: number;
  /** For each feature its least and largest value. */
  readonly spans: [number, number][];
}

/**
 * Groups faces [from, to) that share the first `kept` features, and writes each face's group into
 * `groupOf`; null when there are more than `most` groups.
 */
function groupFaces(
  from: number,
  to: number,
  features: readonly ((v: number) => number)[],
  kept: number,
  most: number,
  groupOf: Int32Array,
): Group[] | null {
  const groups: Group[] = [];
  // Nested maps, a level a feature: exact keys without making strings of millions of faces.
  type Level = Map<number, Level | number>;
  const root: Level = new Map();
  for (let v = from; v < to; v++) {
    let level = root;
    for (let i = 0; i + 1 < kept; i++) {
      const value = features[i](v);
      let next = level.get(value) as Level | undefined;
      if (next === undefined) {
        next = new Map();
        level.set(value, next);
      }
      level = next;
    }
    const last = kept === 0 ? 0 : features[kept - 1](v);
    let group = level.get(last) as number | undefined;
    if (group === undefined) {
      group = groups.length;
      if (group === most) return null;
      level.set(last, group);
      groups.push({ count: 0, spans: features.map((feature) => [feature(v), feature(v)]) });
    }
    groupOf[v] = group;
    const own = groups[group];
    own.count++;
    for (let i = 0; i < features.length; i++) {
      const value = features[i](v);
      if (value < own.spans[i][0]) own.spans[i][0] = value;
      if (value > own.spans[i][1]) own.spans[i][1] = value;
    }
  }
  return groups;
}

function compare(a: Group, b: Group): number {
  const i = a.spans.findIndex(([least], k) => least !== b.spans[k][0]);
  return i < 0 ? 0 : a.spans[i][0] - b.spans[i][0];
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
