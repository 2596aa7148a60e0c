// The part of a face poset that a picture shows, and faces found by their signs.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { InputError } from '../errors.js';
import type { FacePoset } from '../face/poset.js';
import type { LayeredGraph } from './layers.js';

/** What to show: all, a face with all above or below it, or the two top dimensions. */
export type HassePart =
  | { readonly kind: 'whole' }
  | { readonly kind: 'above'; readonly signs: string }
  | { readonly kind: 'below'; readonly signs: string }
  | { readonly kind: 'regions-and-walls' };

/** Some faces of a poset as a layered graph of their own: node v stands for face `faces[v]`. */
export interface FaceSelection extends LayeredGraph {
  readonly faces: Int32Array;
  /** Dimension of the lowest layer. */
  readonly lowest: number;
}

/** Writes the signs of any face of a poset, over the normals given. */
export function faceSigns(arrangement: Arrangement, poset: FacePoset): (face: number) => string {
  const text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const { positive, flatZero, flatOf, wordsPerRow } = poset;
  return (face) => text.write(positive, face * wordsPerRow, flatZero, flatOf[face] * wordsPerRow);
}

/** The face with these signs; InputError when there is none. */
export function findFace(arrangement: Arrangement, poset: FacePoset, signs: string): number {
  const n = arrangement.generators.normals.length;
  const wrong = /[^+\-0]/u.exec(signs);
  if (wrong !== null) {
    throw new InputError(
      `signs '${signs}': '${wrong[0]}' is not a sign`,
      'write one of +, - and 0 for each normal, as in the list of faces',
    );
  }
  if (signs.length !== n) {
    throw new InputError(
      `signs '${signs}': ${signs.length} signs for ${n} normals`,
      'write one sign for each normal of the file, parallel ones included',
    );
  }
  const signsOf = faceSigns(arrangement, poset);
  for (let face = 0; face < poset.faceCount; face++) if (signsOf(face) === signs) return face;
  throw new InputError(
    `signs '${signs}': no face of the arrangement has them`,
    "take signs from the list that 'faces' writes",
  );
}

/** Picks the faces to show. */
export function selectFaces(
  arrangement: Arrangement,
  poset: FacePoset,
  part: HassePart,
): FaceSelection {
  const { rank, faceCount, dimensionOffsets, coverOffsets, coverTargets } = poset;
  const chosen = new Uint8Array(faceCount);
  if (part.kind === 'whole') chosen.fill(1);
  else if (part.kind === 'regions-and-walls')
    chosen.fill(1, dimensionOffsets[Math.max(0, rank - 1)]);
  else {
    chosen[findFace(arrangement, poset, part.signs)] = 1;
    // Faces are numbered by dimension, so one pass up or down reaches the whole interval.
    if (part.kind === 'above') {
      for (let f = 0; f < faceCount; f++) {
        if (chosen[f] === 0) continue;
        for (let c = coverOffsets[f]; c < coverOffsets[f + 1]; c++) chosen[coverTargets[c]] = 1;
      }
    } else {
      for (let f = faceCount - 1; f >= 0; f--) {
        for (let c = coverOffsets[f]; c < coverOffsets[f + 1]; c++) {
          if (chosen[coverTargets[c]] === 1) chosen[f] = 1;
        }
      }
    }
  }
  return restrictTo(poset, chosen);
}

function restrictTo(poset: FacePoset, chosen: Uint8Array): FaceSelection {
  const { rank, faceCount, dimensionOffsets, coverOffsets, coverTargets } = poset;
  const nodeOf = new Int32Array(faceCount).fill(-1);
  let nodes = 0;
  let edges = 0;
  for (let f = 0; f < faceCount; f++) if (chosen[f] === 1) nodeOf[f] = nodes++;
  const faces = new Int32Array(nodes);
  const upOffsets = new Int32Array(nodes + 1);
  for (let f = 0; f < faceCount; f++) {
    const v = nodeOf[f];
    if (v < 0) continue;
    faces[v] = f;
    for (let c = coverOffsets[f]; c < coverOffsets[f + 1]; c++) {
      if (nodeOf[coverTargets[c]] >= 0) edges++;
    }
    upOffsets[v + 1] = edges;
  }
  const upTargets = new Int32Array(edges);
  edges = 0;
  for (const f of faces) {
    for (let c = coverOffsets[f]; c < coverOffsets[f + 1]; c++) {
      if (nodeOf[coverTargets[c]] >= 0) upTargets[edges++] = nodeOf[coverTargets[c]];
    }
  }
  const offsets = [0];
  let lowest = -1;
  for (let k = 0, v = 0; k <= rank; k++) {
    const from = v;
    while (v < nodes && faces[v] < dimensionOffsets[k + 1]) v++;
    if (v === from) continue;
    if (lowest < 0) lowest = k;
    offsets.push(v);
  }
  return { faces, lowest, layerOffsets: Int32Array.from(offsets), upOffsets, upTargets };
}
