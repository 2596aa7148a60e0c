// The colours of every picture, in one place. Quiet tints on white paper with dark outlines and
// near-black text. Picked by our own trial so that
//   text on a tint, or on the page, has a contrast of at least 7,
//   outlines and lines on the page have one of at least 3
//     (the ratios of WCAG 2.2, W3C Recommendation, 2023, 1.4.6 and 1.4.11),
//   tints stay apart for eyes that lack one kind of cone.
// The tests compute all three. No meaning rests on colour alone: position and words carry it too.

/** A filled shape: its tint and its outline. */
export interface Tint {
  readonly fill: string;
  readonly stroke: string;
}

export const page = '#ffffff';
export const ink = '#1f2328';
/** Words that only explain. */
export const softInk = '#4b535c';
/** Lines that join faces. */
export const line = '#77828d';
/** Rules between parts of a page. */
export const rule = '#c9ced4';

/** What a face is among those of its arrangement; the key of its tint. */
export type FaceRole = 'origin' | 'ray' | 'between' | 'wall' | 'region';

export const faceTints: Readonly<Record<FaceRole, Tint>> = {
  origin: { fill: '#ffffff', stroke: '#4b535c' },
  ray: { fill: '#f3d3cb', stroke: '#9a4634' },
  between: { fill: '#dfe2e5', stroke: '#5f6871' },
  wall: { fill: '#c3dcef', stroke: '#1f5f8f' },
  region: { fill: '#fbedb6', stroke: '#836500' },
};

/** The role of a face of dimension k in an arrangement of rank r. */
export function faceRole(k: number, r: number): FaceRole {
  if (k === r) return 'region';
  if (k === 0) return 'origin';
  if (k === r - 1) return 'wall';
  return k === 1 ? 'ray' : 'between';
}

/** Tints of polygons with 4, 6, 8, 10 and more sides, which mesh files share. */
export { sideTints } from '../export/mesh-words.js';

/** Lines that run along one normal each; the numbers beside them tell more than five apart. */
export const normalInks = ['#1f2328', '#0067b3', '#c04000', '#2d8a4e', '#a0489c'] as const;

/** What the reader asked to see marked. */
export const mark: Tint = { fill: '#c8102e', stroke: '#7a0a1c' };
