// The half-open tiling of a zonotope as an SVG page: parallelograms in the plane, blocks moved apart
// in space. Every point of the zonotope lies in exactly one tile, and the lines say in which.
import type { Arrangement } from '../arrangement/arrangement.js';
import { LimitError } from '../errors.js';
import { titleOf } from '../export/heading.js';
import { oneLine } from '../export/mesh-words.js';
import { drawnBlocks, drawnFaces } from '../limits.js';
import {
  type Projection,
  type ProjectionChoice,
  projectArrangement,
} from '../zonotope/solid-projection.js';
import { type Tile, tilesOf } from '../zonotope/tiling.js';
import type { Orientation } from './sheet.js';
import { readView, type Spot } from './solid-view.js';
import { drawBlocks } from './tiling-blocks.js';
import { drawPlaneTiling } from './tiling-plane.js';

/** How to draw. */
export interface TilingPictureOptions {
  /** Which coordinates; default: the zonotope's own span, of rank 2 or 3. */
  readonly projection?: ProjectionChoice;
  /** Of blocks: the direction to look from; default: chosen. */
  readonly view?: readonly number[];
  /** Default: the title of the file, or its name. */
  readonly title?: string;
  /** Default: landscape. */
  readonly orientation?: Orientation;
  /** Begins every id in the SVG. */
  readonly idPrefix?: string;
}

/** What both kinds of figure need. */
export interface TilingFigure {
  readonly title: string;
  readonly idPrefix: string;
  readonly orientation: Orientation;
  readonly projection: Projection;
  readonly tiles: readonly Tile[];
  readonly view: Spot | null;
}

/**
 * The picture as SVG text, the same for the same input. InputError for a rank that cannot be drawn;
 * LimitError past the bound on tiles.
 */
export function drawTiling(arrangement: Arrangement, options: TilingPictureOptions = {}): string {
  const projection = projectArrangement(arrangement, options.projection ?? { kind: 'own' });
  const { rank } = projection.arrangement;
  const bound = rank === 2 ? drawnFaces : drawnBlocks;
  const figure: TilingFigure = {
    title: oneLine(`${options.title ?? titleOf(arrangement)}: half-open tiling`),
    idPrefix: (options.idPrefix ?? 'tiling').replace(/[^A-Za-z0-9_-]/g, '-'),
    orientation: options.orientation ?? 'landscape',
    projection,
    tiles: takeTiles(projection.arrangement, rank, bound),
    view: options.view === undefined ? null : readView(options.view),
  };
  return rank === 2 ? drawPlaneTiling(figure) : drawBlocks(figure);
}

/** Every tile; LimitError when more than `bound` of them are of full dimension. */
function takeTiles(arrangement: Arrangement, rank: number, bound: number): Tile[] {
  const tiles: Tile[] = [];
  let full = 0;
  for (const tile of tilesOf(arrangement)) {
    tiles.push(tile);
    if (tile.generators.length === rank && ++full > bound) {
      throw new LimitError(
        'a picture of the tiling',
        `more than ${bound} tiles`,
        `${bound} tiles`,
        'list the tiles instead, or leave generators out',
      );
    }
  }
  return tiles;
}

/** `1 fore, 3 lift`: generators of a tile for a tooltip. */
export function tileNumbers(projection: Projection, tile: Tile): string {
  return tile.generators.map((j) => projection.kept[j] + 1).join(',');
}
