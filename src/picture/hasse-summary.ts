// The Hasse diagram of a poset too large to read: a box for every type of face, with how many faces
// it stands for, and on every line how many covers.
import { formatCount } from '../census/quantities.js';
import type { FacePoset } from '../face/poset.js';
import type { Area, Band } from './bands.js';
import type { FaceType, FaceTypes, Span } from './face-types.js';
import { findFaceTypes } from './face-types.js';
import { layerCounts } from './hasse-faces.js';
import type { FrameWords } from './hasse-frame.js';
import { areaWithin, counted, drawFrame, drawLayerNames, nameFaces } from './hasse-frame.js';
import type { LayeredGraph } from './layers.js';
import { orderLayers } from './layers.js';
import type { FaceRole } from './palette.js';
import { faceRole, faceTints, line, page } from './palette.js';
import type { FaceSelection } from './selection.js';
import type { Drawn, Orientation, Paper } from './sheet.js';
import { papers, round, startSheet, textWidth } from './sheet.js';

/** Types drawn side by side at most. */
const typesAcross = 9;
const fontSizes = [11, 10, 9, 8, 7, 6];
/** Height of a line of text, and size of the numbers on lines, in font sizes. */
const lineHeight = 1.3;
const numberSize = 0.85;

interface Box {
  readonly lines: readonly string[];
  readonly width: number;
  readonly height: number;
}

interface Rectangle {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Draws the summary. */
export function drawSummary(
  poset: FacePoset,
  selection: FaceSelection,
  orientation: Orientation,
  words: Pick<FrameWords, 'title' | 'subtitle'> & {
    readonly description: string;
    readonly idPrefix: string;
  },
): string {
  const { rank } = poset;
  const { lowest } = selection;
  const found = findFaceTypes(poset, selection, typesAcross);
  const full: FrameWords = {
    title: words.title,
    subtitle: `Summary by type. ${words.subtitle}`,
    notes: [
      `The ${formatCount(selection.faces.length)} faces are summed up, not drawn one by one: a box stands for all faces of its dimension that lie in as many hyperplanes, are bounded by as many faces one dimension lower and bound as many one higher; 3–5 means from 3 to 5.`,
      'The number on a line says how many covers join faces of its two boxes; a thicker line has more.',
    ],
  };
  const counts = layerCounts(selection);
  const { paper, area, fontSize, boxes } = sheetFor(orientation, full, found, (type, size) =>
    boxOf(type, lowest + type.layer, rank, size),
  );
  const sheet = startSheet(paper, {
    title: full.title,
    description: `${words.description} Drawn as a summary: ${found.types.length} types of faces. ${found.types
      .map(
        (type, t) =>
          `${nameFaces(type.count, lowest + type.layer, rank)}: ${boxes[t].lines.slice(1).join(', ')}`,
      )
      .join('; ')}.`,
    idPrefix: words.idPrefix,
  });
  const roles = new Set<FaceRole>(counts.map((_, i) => faceRole(lowest + i, rank)));
  drawFrame(sheet.svg, paper, full, roles);
  const bands = bandsOf(boxes, found, area, counts.length);
  drawLayerNames(sheet.svg, paper, bands, { counts, lowest, rank });
  const centres = centresOf(found, bands, area);
  const rectangles = boxes.map(({ width, height }, t) => around(centres[t], width, height));
  drawJoins(sheet.svg, found, centres, rectangles, numberSize * fontSize);
  drawBoxes(sheet.svg, boxes, centres, fontSize, (t) =>
    faceRole(lowest + found.types[t].layer, rank),
  );
  return sheet.text();
}

function spanText([least, most]: Span): string {
  return least === most ? formatCount(least) : `${formatCount(least)}–${formatCount(most)}`;
}

function boxOf(type: FaceType, k: number, rank: number, fontSize: number): Box {
  const lines = [nameFaces(type.count, k, rank)];
  if (type.hyperplanes[1] > 0) {
    const one = type.hyperplanes[1] === 1;
    lines.push(`in ${spanText(type.hyperplanes)} hyperplane${one ? '' : 's'}`);
  }
  if (type.covers[1] > 0) lines.push(`bounded by ${spanText(type.covers)}`);
  if (type.coveredBy[1] > 0) lines.push(`bounds ${spanText(type.coveredBy)}`);
  const width = Math.max(
    ...lines.map((text, i) => textWidth(text) * fontSize * (i === 0 ? 1.06 : 1)),
  );
  return { lines, width: width + fontSize, height: (lines.length * lineHeight + 0.8) * fontSize };
}

interface SummarySheet {
  readonly paper: Paper;
  readonly area: Area;
  readonly fontSize: number;
  readonly boxes: readonly Box[];
}

/** The smallest sheet that takes all boxes, with the largest font that it takes them in. */
function sheetFor(
  orientation: Orientation,
  words: FrameWords,
  found: FaceTypes,
  boxFor: (type: FaceType, fontSize: number) => Box,
): SummarySheet {
  let smallest: SummarySheet | null = null;
  for (const paper of papers(orientation)) {
    const area = areaWithin(paper, words);
    for (const fontSize of fontSizes) {
      const boxes = found.types.map((type) => boxFor(type, fontSize));
      smallest = { paper, area, fontSize, boxes };
      if (fits(found, boxes, area)) return smallest;
    }
  }
  // Not reached: nine boxes always fit the width of the largest sheet, and thirty layers its height,
  // while a poset of rank thirty has at least 3^30 faces.
  return smallest!;
}

function fits(found: FaceTypes, boxes: readonly Box[], area: Area): boolean {
  let height = 0;
  for (let k = 0; k <= found.types[found.types.length - 1].layer; k++) {
    const own = boxes.filter((_, t) => found.types[t].layer === k);
    const widest = Math.max(...own.map((box) => box.width));
    if (widest * 1.12 * own.length > area.width) return false;
    height += Math.max(...own.map((box) => box.height)) * 1.7;
  }
  return height < area.height;
}

function bandsOf(
  boxes: readonly Box[],
  found: FaceTypes,
  area: Area,
  layers: number,
): Pick<Band, 'top' | 'bottom'>[] {
  const heights = Array.from({ length: layers }, (_, k) =>
    Math.max(...boxes.map((box, t) => (found.types[t].layer === k ? box.height : 0))),
  );
  const free = area.height - heights.reduce((sum, height) => sum + height, 0);
  const gap = layers < 2 ? 0 : free / (layers - 1);
  let bottom = area.top + area.height;
  return heights.map((height) => {
    const band = { top: bottom - height, bottom };
    bottom -= height + gap;
    return band;
  });
}

function graphOf(found: FaceTypes, layers: number): LayeredGraph {
  const { types, joins } = found;
  const layerOffsets = new Int32Array(layers + 1);
  for (const { layer } of types) layerOffsets[layer + 1]++;
  for (let k = 0; k < layers; k++) layerOffsets[k + 1] += layerOffsets[k];
  const upOffsets = new Int32Array(types.length + 1);
  for (const { low } of joins) upOffsets[low + 1]++;
  for (let t = 0; t < types.length; t++) upOffsets[t + 1] += upOffsets[t];
  // Joins come sorted by their lower type, so they are the rows already.
  return { layerOffsets, upOffsets, upTargets: Int32Array.from(joins, ({ high }) => high) };
}

function centresOf(
  found: FaceTypes,
  bands: readonly Pick<Band, 'top' | 'bottom'>[],
  area: Area,
): [number, number][] {
  const centres: [number, number][] = [];
  orderLayers(graphOf(found, bands.length)).layers.forEach((layer, k) => {
    layer.forEach((t, i) => {
      centres[t] = [
        area.left + ((i + 0.5) * area.width) / layer.length,
        (bands[k].top + bands[k].bottom) / 2,
      ];
    });
  });
  return centres;
}

function around([x, y]: readonly [number, number], width: number, height: number): Rectangle {
  return { left: x - width / 2, right: x + width / 2, top: y - height / 2, bottom: y + height / 2 };
}

function overlap(a: Rectangle, b: Rectangle): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

function drawJoins(
  svg: Drawn,
  found: FaceTypes,
  centres: readonly [number, number][],
  rectangles: readonly Rectangle[],
  numberFont: number,
): void {
  const most = Math.max(1, ...found.joins.map(({ count }) => count));
  const group = svg.append('g').attr('class', 'covers').attr('stroke', line);
  const numbers = svg
    .append('g')
    .attr('class', 'cover-counts')
    .attr('font-size', round(numberFont))
    .attr('text-anchor', 'middle');
  const lines = found.joins.map(({ low, high }) => ({
    from: [centres[low][0], rectangles[low].top] as const,
    to: [centres[high][0], rectangles[high].bottom] as const,
  }));
  const taken = [...rectangles];
  found.joins.forEach(({ count }, i) => {
    const { from, to } = lines[i];
    group
      .append('line')
      .attr('x1', round(from[0]))
      .attr('y1', round(from[1]))
      .attr('x2', round(to[0]))
      .attr('y2', round(to[1]))
      .attr('stroke-width', round(0.5 + 2.2 * Math.sqrt(count / most)))
      .append('title')
      .text(counted(count, 'cover', 'covers'));
    const number = formatCount(count);
    const [width, height] = [(textWidth(number) + 0.4) * numberFont, 1.2 * numberFont];
    const others = lines.filter((_, j) => j !== i);
    const place = freePlace(lines[i], others, taken, width, height);
    if (place === null) return;
    taken.push(place);
    numbers
      .append('rect')
      .attr('x', round(place.left))
      .attr('y', round(place.top))
      .attr('width', round(width))
      .attr('height', round(height))
      .attr('fill', page);
    numbers
      .append('text')
      .attr('x', round((place.left + place.right) / 2))
      .attr('y', round((place.top + place.bottom) / 2 + 0.36 * numberFont))
      .text(number);
  });
}

interface Line {
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
}

/** Places for a number along a line, the middle first. */
const placesAlong = Array.from(
  { length: 17 },
  (_, i) => 0.5 + (i % 2 ? 0.05 : -0.05) * ((i + 1) >> 1),
);

/**
 * Where on a line a number stands that covers no box and no other number, and as few other lines as
 * can be; null where all places are taken.
 */
function freePlace(
  { from, to }: Line,
  others: readonly Line[],
  taken: readonly Rectangle[],
  width: number,
  height: number,
): Rectangle | null {
  let best: Rectangle | null = null;
  let fewest = Number.POSITIVE_INFINITY;
  for (const t of placesAlong) {
    const centre = [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])] as const;
    const place = around(centre, width, height);
    if (taken.some((other) => overlap(other, place))) continue;
    const covered = others.filter((other) => meets(other, place)).length;
    if (covered < fewest) [best, fewest] = [place, covered];
  }
  return best;
}

/** Whether a line that rises from `from` to `to` passes through a rectangle. */
function meets({ from, to }: Line, { left, right, top, bottom }: Rectangle): boolean {
  const [low, high] = [Math.min(bottom, from[1]), Math.max(top, to[1])];
  if (high > low) return false;
  const at = (y: number) => from[0] + ((y - from[1]) / (to[1] - from[1])) * (to[0] - from[0]);
  return Math.max(at(low), at(high)) > left && Math.min(at(low), at(high)) < right;
}

function drawBoxes(
  svg: Drawn,
  boxes: readonly Box[],
  centres: readonly [number, number][],
  fontSize: number,
  roleOf: (type: number) => FaceRole,
): void {
  const group = svg
    .append('g')
    .attr('class', 'types')
    .attr('font-size', fontSize)
    .attr('text-anchor', 'middle');
  boxes.forEach(({ lines, width, height }, t) => {
    const [x, y] = centres[t];
    const tint = faceTints[roleOf(t)];
    const box = group.append('g').attr('transform', `translate(${round(x)} ${round(y)})`);
    box
      .append('rect')
      .attr('x', round(-width / 2))
      .attr('y', round(-height / 2))
      .attr('width', round(width))
      .attr('height', round(height))
      .attr('rx', 3)
      .attr('fill', tint.fill)
      .attr('stroke', tint.stroke)
      .attr('stroke-width', 0.7);
    lines.forEach((text, i) => {
      const shift = (i - (lines.length - 1) / 2) * lineHeight + 0.36;
      box
        .append('text')
        .attr('y', round(shift * fontSize))
        .attr('font-weight', i === 0 ? 600 : 400)
        .text(text);
    });
  });
}
