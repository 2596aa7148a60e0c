// The Hasse diagram of a face poset as an SVG page: every face while they can be read, otherwise a
// summary by type of face that says so.

import type { Arrangement } from '../arrangement/arrangement.js';
import { formatCount } from '../census/quantities.js';
import { titleOf } from '../export/heading.js';
import type { FacePoset } from '../face/poset.js';
import { drawFaces, layerCounts, layOutFaces } from './hasse-faces.js';
import type { FrameWords } from './hasse-frame.js';
import { counted, nameFaces } from './hasse-frame.js';
import { drawSummary } from './hasse-summary.js';
import type { FaceSelection, HassePart } from './selection.js';
import { selectFaces } from './selection.js';
import type { Orientation } from './sheet.js';

/** How to draw. */
export interface HasseOptions {
  /** Default: the whole poset. */
  readonly part?: HassePart;
  /** Default: landscape. */
  readonly orientation?: Orientation;
  /** Default: the title of the file, or its name. */
  readonly title?: string;
  /** Draw the summary by type whatever the size. */
  readonly summary?: boolean;
  /** Begins every id in the SVG; set it apart when several stand in one page. */
  readonly idPrefix?: string;
}

/** Faces and covers above which the picture becomes a summary. */
const readableFaces = 700;
const readableCovers = 6000;
/** Signs of a face that a heading shows. */
const shownSigns = 24;

/**
 * The picture as SVG text, sheet-sized in millimetres, the same for the same input. InputError when
 * the part names a face that is not there.
 */
export function drawHasse(
  arrangement: Arrangement,
  poset: FacePoset,
  options: HasseOptions = {},
): string {
  const part = options.part ?? { kind: 'whole' };
  const orientation = options.orientation ?? 'landscape';
  const selection = selectFaces(arrangement, poset, part);
  const normals = arrangement.generators.normals.length;
  const title = `${options.title ?? titleOf(arrangement)}: faces`;
  const idPrefix = (options.idPrefix ?? 'hasse').replace(/[^A-Za-z0-9_-]/g, '-');
  const size = [
    counted(selection.faces.length, 'face', 'faces'),
    counted(selection.upTargets.length, 'cover', 'covers'),
    `rank ${poset.rank}`,
    counted(poset.hyperplanes, 'hyperplane', 'hyperplanes'),
  ].join(', ');
  const base = { title, subtitle: `Hasse diagram of ${partWords(part)}: ${size}` };
  const description = describe(poset, selection, part);
  const readable =
    options.summary !== true &&
    selection.faces.length <= readableFaces &&
    selection.upTargets.length <= readableCovers;
  const words = (numbered: boolean, keyed: boolean): FrameWords => ({
    ...base,
    notes: [readingNote, labelNote(numbered, keyed)],
  });
  const layout = readable ? layOutFaces(selection, normals, orientation, words) : null;
  if (layout === null) {
    return drawSummary(poset, selection, orientation, { ...base, description, idPrefix });
  }
  const { numbered, key } = layout;
  return drawFaces(arrangement, poset, selection, layout, {
    ...words(numbered, key !== null),
    description,
    idPrefix,
  });
}

const readingNote =
  'A line joins a face to a face one dimension higher that it bounds. Dimensions are counted above the ' +
  'lineality space. Read downwards, it is the face order of the zonotope.';

function labelNote(numbered: boolean, keyed: boolean): string {
  if (!numbered) {
    return 'Labels: one sign for each normal in the order of the file; + and - for its two sides, 0 on its hyperplane; turned labels read upwards.';
  }
  const where = keyed
    ? 'in the key above'
    : 'in the tooltips, and in the table of nodes that the faces export writes';
  return `Labels are numbers, since the signs are too long to print here; the signs of each face are ${where}.`;
}

function partWords(part: HassePart): string {
  const shortened = (signs: string) =>
    signs.length > shownSigns ? `${signs.slice(0, shownSigns)}…` : signs;
  if (part.kind === 'above') return `the faces that ${shortened(part.signs)} bounds`;
  if (part.kind === 'below') return `the faces that bound ${shortened(part.signs)}`;
  return part.kind === 'whole' ? 'the face poset' : 'regions and walls';
}

function describe(poset: FacePoset, selection: FaceSelection, part: HassePart): string {
  const layers = layerCounts(selection).map((count, i) => {
    const k = selection.lowest + i;
    return `dimension ${k}, ${nameFaces(count, k, poset.rank)}`;
  });
  const lines = selection.upTargets.length;
  const joined =
    lines === 1
      ? ' 1 line joins a face to one a dimension higher that it bounds.'
      : ` ${formatCount(lines)} lines join each face to those one dimension higher that it bounds.`;
  return (
    `Hasse diagram of ${partWords(part)} of a central hyperplane arrangement of rank ${poset.rank} ` +
    `with ${counted(poset.hyperplanes, 'hyperplane', 'hyperplanes')}. ` +
    `Layers from the bottom up: ${layers.join('; ')}.${lines === 0 ? '' : joined}`
  );
}
