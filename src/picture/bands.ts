// Where the layers of a Hasse diagram go on a sheet: the largest font at which every label of every
// layer fits without touching another, upright before turned, in one row before two.
import { signAdvance } from './sheet.js';

/** What a layer asks for. */
export interface LayerSize {
  readonly count: number;
  /** Characters of its longest label. */
  readonly characters: number;
}

/** A layer placed: labels in `rows` rows, turned a quarter where `turned`. */
export interface Band {
  readonly top: number;
  readonly bottom: number;
  readonly rows: 1 | 2;
  readonly turned: boolean;
  /** Size of a label's box as drawn, after turning. */
  readonly boxWidth: number;
  readonly boxHeight: number;
}

/** Bands by layer, the lowest layer first and at the bottom. */
export interface BandLayout {
  readonly fontSize: number;
  readonly bands: readonly Band[];
}

/** A rectangle to draw in, in points. */
export interface Area {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

const largestFont = 11;
const fontStep = 0.25;
/** Above this an upright label is preferred to a larger turned one. */
const uprightFont = 7;
/** Share of the height that must stay free for the lines between layers. */
const shareForLines = 0.42;
const padding = 5;

/** The best layout with labels of at least `smallestFont` points, or null when there is none. */
export function layOutBands(
  layers: readonly LayerSize[],
  area: Area,
  smallestFont: number,
): BandLayout | null {
  for (const [least, mayTurn] of [
    [Math.max(uprightFont, smallestFont), false],
    [smallestFont, true],
  ] as const) {
    for (let font = largestFont; font >= least; font -= fontStep) {
      const shapes = layers.map((layer) => shapeOf(layer, area.width, font, mayTurn));
      if (shapes.some((shape) => shape === null)) continue;
      const fitted = shapes as Shape[];
      const total = fitted.reduce((sum, shape) => sum + shape.height, 0);
      const lines = layers.length < 2 ? 0 : shareForLines;
      if (total > area.height * (1 - lines)) continue;
      return { fontSize: font, bands: stack(fitted, area, total) };
    }
  }
  return null;
}

interface Shape {
  readonly rows: 1 | 2;
  readonly turned: boolean;
  readonly boxWidth: number;
  readonly boxHeight: number;
  readonly height: number;
}

function shapeOf(layer: LayerSize, width: number, font: number, mayTurn: boolean): Shape | null {
  const long = layer.characters * signAdvance * font + 0.9 * font;
  const thick = 1.5 * font;
  for (const turned of mayTurn ? [false, true] : [false]) {
    const [boxWidth, boxHeight] = turned ? [thick, long] : [long, thick];
    for (const rows of [1, 2] as const) {
      // With two rows the line to a box in one row passes between two boxes of the other.
      const gap = Math.max(1.4, 0.2 * font);
      if (boxWidth + gap > rows * stepOf(rows, boxWidth, width, layer.count)) continue;
      const height = rows * boxHeight + (rows - 1) * 0.7 * font + 2 * padding;
      return { rows, turned, boxWidth, boxHeight, height };
    }
  }
  return null;
}

function stack(shapes: readonly Shape[], area: Area, total: number): Band[] {
  const gap = shapes.length < 2 ? 0 : (area.height - total) / (shapes.length - 1);
  let bottom = area.top + area.height;
  return shapes.map(({ rows, turned, boxWidth, boxHeight, height }) => {
    const band = { top: bottom - height, bottom, rows, turned, boxWidth, boxHeight };
    bottom -= height + gap;
    return band;
  });
}

/**
 * Distance between neighbouring labels: one row spreads them evenly, two rows, whose boxes reach
 * further, begin and end at the edges of the area.
 */
function stepOf(rows: 1 | 2, boxWidth: number, width: number, count: number): number {
  return rows === 1 || count === 1 ? width / count : (width - boxWidth) / (count - 1);
}

/** Centre of the i-th of `count` labels of a band; odd ones stand in the upper of two rows. */
export function labelCentre(band: Band, area: Area, i: number, count: number): [number, number] {
  const step = stepOf(band.rows, band.boxWidth, area.width, count);
  const x = area.left + area.width / 2 + (i - (count - 1) / 2) * step;
  const middle = (band.top + band.bottom) / 2;
  if (band.rows === 1) return [x, middle];
  const shift = (band.bottom - band.top - 2 * padding - band.boxHeight) / 2;
  return [x, i % 2 === 1 ? middle - shift : middle + shift];
}
