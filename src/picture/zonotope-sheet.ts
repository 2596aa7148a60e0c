// The sheet around a picture of a zonotope: title above, notes below, a key in a column at the right;
// what is left is for the figure.
import type { Area } from './bands.js';
import type { FrameWords } from './hasse-frame.js';
import { areaWithin, drawFrame, sheetMargin } from './hasse-frame.js';
import { ink, page, softInk, type Tint } from './palette.js';
import type { Drawn, Orientation, Paper } from './sheet.js';
import { fitText, papers, round, startSheet } from './sheet.js';

/** How a row of the key looks in the figure. */
export type Swatch =
  | { readonly kind: 'fill'; readonly tint: Tint }
  | { readonly kind: 'line'; readonly colour: string; readonly number: string | null }
  | { readonly kind: 'dashes'; readonly colour: string }
  | { readonly kind: 'dot'; readonly tint: Tint };

/** A part of the key with a heading; what does not fit is counted. */
export interface KeyPart {
  readonly heading: string;
  readonly rows: readonly { readonly swatch: Swatch; readonly text: string }[];
}

export const keyWidth = 186;
const rowHeight = 12.5;

/** The words of a picture, with what a screen reader says and the beginning of every id. */
export interface SheetWords extends FrameWords {
  readonly description: string;
  readonly idPrefix: string;
}

/** An A4 sheet begun: the document, and where the figure and the key go. */
export interface ZonotopeSheet {
  readonly svg: Drawn;
  readonly paper: Paper;
  readonly figure: Area;
  readonly key: Area;
  text(): string;
}

export function startZonotopeSheet(words: SheetWords, orientation: Orientation): ZonotopeSheet {
  const paper = papers(orientation)[0];
  const sheet = startSheet(paper, words);
  drawFrame(sheet.svg, paper, words, new Set());
  const { top, height } = areaWithin(paper, words);
  const whole = paper.width - 2 * sheetMargin;
  return {
    svg: sheet.svg,
    paper,
    figure: { left: sheetMargin, top, width: whole - keyWidth - 12, height },
    key: { left: sheetMargin + whole - keyWidth, top, width: keyWidth, height },
    text: sheet.text,
  };
}

/** Draws the parts below each other; the longest gives way where the height does not suffice. */
export function drawKeyParts(svg: Drawn, area: Area, parts: readonly KeyPart[]): void {
  const shown = parts.filter((part) => part.rows.length > 0);
  const capacity = Math.floor(area.height / rowHeight) - 2 * shown.length;
  const counts = shown.map((part) => part.rows.length);
  while (counts.reduce((sum, x) => sum + x, 0) > capacity && Math.max(...counts) > 1) {
    counts[counts.indexOf(Math.max(...counts))]--;
  }
  const group = svg.append('g').attr('class', 'key').attr('font-size', 8);
  let y = area.top + 8;
  shown.forEach(({ heading, rows }, i) => {
    group
      .append('text')
      .attr('x', area.left)
      .attr('y', y)
      .attr('font-weight', 600)
      .text(fitText(heading, area.width, 8.5));
    const kept = counts[i] < rows.length ? Math.max(0, counts[i] - 1) : rows.length;
    for (const { swatch, text } of rows.slice(0, kept)) {
      y += rowHeight;
      drawSwatch(group, swatch, area.left, y - 2.8);
      group
        .append('text')
        .attr('x', area.left + 40)
        .attr('y', y)
        .text(fitText(text, area.width - 40, 8));
    }
    if (kept < rows.length) {
      y += rowHeight;
      group
        .append('text')
        .attr('x', area.left + 40)
        .attr('y', y)
        .attr('fill', softInk)
        .text(`and ${rows.length - kept} more`);
    }
    y += 1.9 * rowHeight;
  });
}

function drawSwatch(group: Drawn, swatch: Swatch, x: number, y: number): void {
  if (swatch.kind === 'fill') {
    group
      .append('rect')
      .attr('x', x)
      .attr('y', round(y - 4.5))
      .attr('width', 32)
      .attr('height', 9)
      .attr('fill', swatch.tint.fill)
      .attr('stroke', swatch.tint.stroke)
      .attr('stroke-width', 0.7);
    return;
  }
  if (swatch.kind === 'dot') {
    drawMark(group, x + 16, y, swatch.tint);
    return;
  }
  group
    .append('line')
    .attr('x1', x)
    .attr('x2', x + 32)
    .attr('y1', round(y))
    .attr('y2', round(y))
    .attr('stroke', swatch.colour)
    .attr('stroke-width', swatch.kind === 'dashes' ? 0.8 : 1.5)
    .attr('stroke-dasharray', swatch.kind === 'dashes' ? '3 2.4' : null);
  if (swatch.kind === 'line' && swatch.number !== null) {
    drawBadge(group, x + 16, y, swatch.number, swatch.colour);
  }
}

/** Font size of a number on a line. */
export const badgeFont = 6.5;

/** Width of such a number with its rim. */
export function badgeWidth(text: string): number {
  return Math.max(9.5, text.length * 0.66 * badgeFont + 5);
}

/** A number on a line. */
export function drawBadge(group: Drawn, x: number, y: number, text: string, colour: string): void {
  const width = badgeWidth(text);
  group
    .append('rect')
    .attr('x', round(x - width / 2))
    .attr('y', round(y - 4.75))
    .attr('width', round(width))
    .attr('height', 9.5)
    .attr('rx', 4.75)
    .attr('fill', page)
    .attr('stroke', colour)
    .attr('stroke-width', 0.8);
  group
    .append('text')
    .attr('x', round(x))
    .attr('y', round(y + 2.3))
    .attr('font-size', badgeFont)
    .attr('text-anchor', 'middle')
    .attr('fill', ink)
    .text(text);
}

/** The mark of a vertex that the reader asked for: a dot in a ring. */
export function drawMark(group: Drawn, x: number, y: number, tint: Tint): void {
  for (const [radius, fill] of [
    [5, page],
    [2.8, tint.fill],
  ] as const) {
    group
      .append('circle')
      .attr('cx', round(x))
      .attr('cy', round(y))
      .attr('r', radius)
      .attr('fill', fill)
      .attr('stroke', tint.stroke)
      .attr('stroke-width', 0.9);
  }
}
