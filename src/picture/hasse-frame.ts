// What every Hasse diagram has around its lines: title, names and counts of the layers at the side,
// legend and notes below. Returns the area that is left for the diagram itself.
import { formatCount } from '../census/quantities.js';
import type { Area, Band } from './bands.js';
import type { FaceRole } from './palette.js';
import { faceRole, faceTints, rule, softInk } from './palette.js';
import type { Drawn, Paper } from './sheet.js';
import { fitText, textWidth, wrapText } from './sheet.js';

/** The words around a diagram. */
export interface FrameWords {
  readonly title: string;
  readonly subtitle: string;
  /** What a reader needs to know to read the picture. */
  readonly notes: readonly string[];
}

const roleNames: Readonly<Record<FaceRole, string>> = {
  origin: 'least face',
  ray: 'rays',
  between: 'faces between',
  wall: 'walls',
  region: 'regions',
};

const margin = 30;
const sideWidth = 108;

/** `1 face`, `1,530 faces`. */
export function counted(count: number, one: string, many: string): string {
  return `${formatCount(count)} ${count === 1 ? one : many}`;
}

/** `36 walls`: faces of dimension k in an arrangement of rank r by their usual name. */
export function nameFaces(count: number, k: number, r: number): string {
  if (k === r) return counted(count, 'region', 'regions');
  if (k === 0) return counted(count, 'least face', 'least faces');
  if (k === r - 1) return counted(count, 'wall', 'walls');
  if (k === 1) return counted(count, 'ray', 'rays');
  return counted(count, `${k}-face`, `${k}-faces`);
}

/** `36 edges`: faces of dimension k of a zonotope of dimension r. */
export function nameZonotopeFaces(count: number, k: number, r: number): string {
  if (k === r) return 'whole zonotope';
  if (k === 0) return counted(count, 'vertex', 'vertices');
  if (k === 1) return counted(count, 'edge', 'edges');
  if (k === r - 1) return counted(count, 'facet', 'facets');
  return counted(count, `${k}-face`, `${k}-faces`);
}

/** Heights of the blocks above and below, and the area between them. */
export function areaWithin(paper: Paper, words: FrameWords, keyHeight = 0): Area {
  const { scale } = paper;
  const notes = noteLines(paper, words).length;
  const top = margin + 44 * scale;
  const below = margin + (22 + notes * 10.5) * scale + keyHeight;
  const left = margin + sideWidth * scale;
  return {
    left,
    top,
    width: paper.width - margin - left,
    height: paper.height - below - 12 * scale - top,
  };
}

function noteLines(paper: Paper, words: FrameWords): string[] {
  const width = paper.width - 2 * margin;
  return words.notes.flatMap((note) => wrapText(note, width, 7.5 * paper.scale));
}

/** Draws title, legend and notes. `roles` are those that occur. */
export function drawFrame(
  svg: Drawn,
  paper: Paper,
  words: FrameWords,
  roles: ReadonlySet<FaceRole>,
): void {
  const { scale } = paper;
  const width = paper.width - 2 * margin;
  svg
    .append('text')
    .attr('x', margin)
    .attr('y', margin + 13 * scale)
    .attr('font-size', 15 * scale)
    .attr('font-weight', 600)
    .text(fitText(words.title, width, 16 * scale));
  svg
    .append('text')
    .attr('x', margin)
    .attr('y', margin + 28 * scale)
    .attr('font-size', 9 * scale)
    .attr('fill', softInk)
    .text(fitText(words.subtitle, width, 9 * scale));
  const lines = noteLines(paper, words);
  const legend = svg
    .append('g')
    .attr('class', 'legend')
    .attr('font-size', 7.5 * scale);
  let y = paper.height - margin - (lines.length * 10.5 + 5) * scale;
  let x = margin;
  for (const role of ['region', 'wall', 'between', 'ray', 'origin'] as const) {
    if (!roles.has(role)) continue;
    legend
      .append('rect')
      .attr('x', x)
      .attr('y', y - 7 * scale)
      .attr('width', 14 * scale)
      .attr('height', 9 * scale)
      .attr('rx', 2 * scale)
      .attr('fill', faceTints[role].fill)
      .attr('stroke', faceTints[role].stroke)
      .attr('stroke-width', 0.7 * scale);
    legend
      .append('text')
      .attr('x', x + 18 * scale)
      .attr('y', y)
      .text(roleNames[role]);
    x += (18 + textWidth(roleNames[role]) * 7.5 + 14) * scale;
  }
  y += 4 * scale;
  for (const line of lines) {
    y += 10.5 * scale;
    legend.append('text').attr('x', margin).attr('y', y).attr('fill', softInk).text(line);
  }
}

/** Draws the layers' backgrounds with names and counts at the side; the lowest layer comes first. */
export function drawLayerNames(
  svg: Drawn,
  paper: Paper,
  bands: readonly Pick<Band, 'top' | 'bottom'>[],
  layers: { readonly counts: readonly number[]; readonly lowest: number; readonly rank: number },
): void {
  const { scale } = paper;
  const group = svg
    .append('g')
    .attr('class', 'layers')
    .attr('font-size', 8 * scale);
  bands.forEach((band, i) => {
    const k = layers.lowest + i;
    const count = layers.counts[i];
    const middle = (band.top + band.bottom) / 2;
    group
      .append('line')
      .attr('x1', margin + (sideWidth - 14) * scale)
      .attr('x2', margin + (sideWidth - 14) * scale)
      .attr('y1', band.top)
      .attr('y2', band.bottom)
      .attr('stroke', faceTints[faceRole(k, layers.rank)].stroke)
      .attr('stroke-width', 1.6 * scale);
    const words = [
      `dimension ${k}`,
      nameFaces(count, k, layers.rank),
      `zonotope: ${nameZonotopeFaces(count, layers.rank - k, layers.rank)}`,
    ];
    words.forEach((text, row) => {
      group
        .append('text')
        .attr('x', margin)
        .attr('y', middle + (row - 0.7) * 10.5 * scale)
        .attr('font-weight', row === 0 ? 600 : 400)
        .attr('font-size', (row === 2 ? 6.8 : 8) * scale)
        .attr('fill', row === 2 ? softInk : null)
        .text(text);
    });
  });
}

/** A thin rule across the sheet. */
export function drawRule(svg: Drawn, paper: Paper, y: number): void {
  svg
    .append('line')
    .attr('x1', margin)
    .attr('x2', paper.width - margin)
    .attr('y1', y)
    .attr('y2', y)
    .attr('stroke', rule)
    .attr('stroke-width', 0.5 * paper.scale);
}

export { margin as sheetMargin };
