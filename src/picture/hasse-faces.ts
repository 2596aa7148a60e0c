// The Hasse diagram with a box for every face.
import type { Arrangement } from '../arrangement/arrangement.js';
import { cleanText } from '../export/xml.js';
import type { FacePoset } from '../face/poset.js';
import type { Area, Band, BandLayout } from './bands.js';
import { labelCentre, layOutBands } from './bands.js';
import type { FrameWords } from './hasse-frame.js';
import {
  areaWithin,
  drawFrame,
  drawLayerNames,
  drawRule,
  nameFaces,
  nameZonotopeFaces,
  sheetMargin,
} from './hasse-frame.js';
import { orderLayers } from './layers.js';
import type { FaceRole } from './palette.js';
import { faceRole, faceTints, line } from './palette.js';
import type { FaceSelection } from './selection.js';
import { faceSigns } from './selection.js';
import type { Drawn, Orientation, Paper } from './sheet.js';
import { papers, round, signAdvance, signFont, startSheet } from './sheet.js';

const smallestFont = 5.5;
const smallestKeyFont = 5;
/** Normals whose place in the zonotope face is spelled out in a face's tooltip. */
const spelledNormals = 24;

/** How the labels of a selection fit on a sheet. */
export interface FaceLayout {
  readonly paper: Paper;
  readonly area: Area;
  readonly bands: BandLayout;
  /** Whether labels are numbers, explained in the key or the tooltips. */
  readonly numbered: boolean;
  /** Font size and columns of the key; null when there is none. */
  readonly key: {
    readonly fontSize: number;
    readonly columns: number;
    readonly rows: number;
  } | null;
}

/** Numbers of the layers of a selection. */
export function layerCounts(selection: FaceSelection): number[] {
  return Array.from(selection.layerOffsets.slice(1), (end, k) => end - selection.layerOffsets[k]);
}

/**
 * The smallest sheet on which all labels can be read: with signs, else numbered with a key, else
 * numbered without; null when none will do.
 */
export function layOutFaces(
  selection: FaceSelection,
  normals: number,
  orientation: Orientation,
  wordsFor: (numbered: boolean, keyed: boolean) => FrameWords,
): FaceLayout | null {
  const counts = layerCounts(selection);
  const sheets = papers(orientation);
  for (const paper of sheets) {
    const area = areaWithin(paper, wordsFor(false, false));
    const signs = counts.map((count) => ({ count, characters: normals }));
    const bands = layOutBands(signs, area, smallestFont);
    if (bands !== null) return { paper, area, bands, numbered: false, key: null };
  }
  const most = Math.max(...selection.faces) + 1;
  const numbers = counts.map((count) => ({ count, characters: `f${most}`.length }));
  for (const keyed of [true, false]) {
    for (const paper of sheets) {
      const fontSize = smallestKeyFont * Math.sqrt(paper.scale);
      const column = (normals + `f${most}`.length + 4) * signAdvance * fontSize;
      const columns = Math.floor((paper.width - 2 * sheetMargin) / column);
      const rows = Math.ceil(selection.faces.length / Math.max(1, columns));
      const keyHeight = keyed ? (rows + 2) * 1.3 * fontSize + 10 * paper.scale : 0;
      if (keyed && (columns < 1 || keyHeight > 0.45 * paper.height)) continue;
      const area = areaWithin(paper, wordsFor(true, keyed), keyHeight);
      const bands = layOutBands(numbers, area, smallestFont);
      const key = keyed ? { fontSize, columns, rows } : null;
      if (bands !== null) return { paper, area, bands, numbered: true, key };
    }
  }
  return null;
}

/** Draws the picture for a layout found before. */
export function drawFaces(
  arrangement: Arrangement,
  poset: FacePoset,
  selection: FaceSelection,
  layout: FaceLayout,
  words: FrameWords & { readonly description: string; readonly idPrefix: string },
): string {
  const { paper, area, bands, numbered } = layout;
  const { faces, lowest, layerOffsets } = selection;
  const { rank } = poset;
  const counts = layerCounts(selection);
  const order = orderLayers(selection);
  const signsOf = faceSigns(arrangement, poset);
  const crossed =
    selection.upTargets.length < 2 ? '' : ` The lines cross ${order.crossings} times.`;
  const sheet = startSheet(paper, {
    ...words,
    description: words.description + crossed,
  });
  const roles = new Set<FaceRole>(counts.map((_, i) => faceRole(lowest + i, rank)));
  drawFrame(sheet.svg, paper, words, roles);
  drawLayerNames(sheet.svg, paper, bands.bands, { counts, lowest, rank });

  const layerOf = (v: number): number => {
    let k = 0;
    while (v >= layerOffsets[k + 1]) k++;
    return k;
  };
  const centres: [number, number][] = [];
  order.layers.forEach((layer, k) => {
    layer.forEach((v, i) => {
      centres[v] = labelCentre(bands.bands[k], area, i, layer.length);
    });
  });
  const nodes = Array.from(faces, (face, v) => {
    const k = layerOf(v);
    const signs = signsOf(face);
    const id = `f${face + 1}`;
    return {
      v,
      k,
      signs,
      id,
      band: bands.bands[k],
      centre: centres[v],
      label: numbered ? id : signs,
    };
  });
  const lines = sheet.svg
    .append('g')
    .attr('class', 'covers')
    .attr('fill', 'none')
    .attr('stroke', line)
    .attr('stroke-width', lineWidth(selection, paper));
  lines
    .selectAll('path')
    .data(nodes)
    .enter()
    .append('path')
    .attr('data-face', (node) => node.id)
    .attr('d', (node) =>
      coverPath(node.v, selection, centres, node.band, bands.bands[node.k + 1], node.k === 0),
    );
  const boxes = sheet.svg
    .append('g')
    .attr('class', 'faces')
    .attr('font-family', signFont)
    .attr('font-size', bands.fontSize)
    .attr('text-anchor', 'middle')
    .selectAll('g')
    .data(nodes)
    .enter()
    .append('g')
    .attr('id', (node) => `${words.idPrefix}-${node.id}`)
    .attr('transform', ({ centre: [x, y] }) => `translate(${round(x)} ${round(y)})`);
  boxes
    .append('title')
    .text((node) => cleanText(tooltip(arrangement, node.id, node.signs, lowest + node.k, rank)));
  boxes
    .append('rect')
    .attr('x', ({ band }) => round(-band.boxWidth / 2))
    .attr('y', ({ band }) => round(-band.boxHeight / 2))
    .attr('width', ({ band }) => round(band.boxWidth))
    .attr('height', ({ band }) => round(band.boxHeight))
    .attr('rx', round(0.3 * bands.fontSize))
    .attr('fill', (node) => faceTints[faceRole(lowest + node.k, rank)].fill)
    .attr('stroke', (node) => faceTints[faceRole(lowest + node.k, rank)].stroke)
    .attr('stroke-width', round(0.07 * bands.fontSize));
  boxes
    .append('text')
    .attr('transform', (node) => (node.band.turned ? 'rotate(-90)' : null))
    .attr('y', round(0.34 * bands.fontSize))
    .text((node) => node.label);
  if (layout.key !== null) drawKey(sheet.svg, layout, nodes);
  return sheet.text();
}

function lineWidth(selection: FaceSelection, paper: Paper): number {
  const edges = selection.upTargets.length;
  return round((edges < 100 ? 0.8 : edges < 500 ? 0.6 : 0.4) * Math.sqrt(paper.scale));
}

/** Stems from the box to the edges of its band, and lines from there to the bands of its covers. */
function coverPath(
  v: number,
  selection: FaceSelection,
  centres: readonly [number, number][],
  own: Band,
  next: Band | undefined,
  lowest: boolean,
): string {
  const { upOffsets, upTargets } = selection;
  const [x, y] = centres[v];
  const point = (a: number, b: number) => `${round(a)} ${round(b)}`;
  const pieces: string[] = [];
  if (next !== undefined && upOffsets[v + 1] > upOffsets[v]) {
    pieces.push(`M${point(x, y)}V${round(own.top)}`);
    for (let e = upOffsets[v]; e < upOffsets[v + 1]; e++) {
      const [xAbove] = centres[upTargets[e]];
      pieces.push(`M${point(x, own.top)}L${point(xAbove, next.bottom)}`);
    }
  }
  if (!lowest) pieces.push(`M${point(x, y)}V${round(own.bottom)}`);
  return pieces.join('');
}

function tooltip(
  arrangement: Arrangement,
  id: string,
  signs: string,
  k: number,
  rank: number,
): string {
  const kind = nameFaces(1, k, rank).slice(2);
  const matches = nameZonotopeFaces(1, rank - k, rank).replace(/^1 /, '');
  const head = `${signs} (${id}): ${kind}, dimension ${k}. Zonotope: ${matches}`;
  if (signs.length > spelledNormals) return head;
  const { labels } = arrangement.generators;
  const having = (sign: string) =>
    [...signs].flatMap((s, i) => (s === sign ? [labels?.[i] ?? `${i + 1}`] : [])).join(', ');
  const parts = [
    ['generators high', having('+')],
    ['low', having('-')],
    ['free', having('0')],
  ].flatMap(([word, names]) => (names === '' ? [] : [`${word}: ${names}`]));
  return `${head}; ${parts.join('; ')}`;
}

function drawKey(
  svg: Drawn,
  layout: FaceLayout,
  nodes: readonly { readonly id: string; readonly signs: string }[],
): void {
  const { paper, area, key } = layout;
  if (key === null) return;
  const { fontSize, rows, columns } = key;
  const top = area.top + area.height + 18 * paper.scale;
  drawRule(svg, paper, top);
  const longest = Math.max(...nodes.map(({ id }) => id.length));
  const width = (paper.width - 2 * sheetMargin) / columns;
  svg
    .append('g')
    .attr('class', 'key')
    .attr('font-family', signFont)
    .attr('font-size', round(fontSize))
    .attr('xml:space', 'preserve')
    .selectAll('text')
    .data(nodes)
    .enter()
    .append('text')
    .attr('x', (_, i) => round(sheetMargin + Math.floor(i / rows) * width))
    .attr('y', (_, i) => round(top + ((i % rows) + 1.3) * 1.3 * fontSize))
    .text(({ id, signs }) => `${id.padEnd(longest)} ${signs}`);
}
