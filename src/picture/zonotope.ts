// The zonotope as an SVG page: a polygon in the plane, a solid in parallel projection.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { InputError, LimitError } from '../errors.js';
import { titleOf } from '../export/heading.js';
import { oneLine } from '../export/mesh-words.js';
import { drawnFaces } from '../limits.js';
import { buildSolid, wordsOf } from '../zonotope/solid.js';
import { buildPolygon } from '../zonotope/solid-polygon.js';
import type { Projection, ProjectionChoice } from '../zonotope/solid-projection.js';
import type { Orientation } from './sheet.js';
import { readView, type Spot } from './solid-view.js';
import { drawPolygon } from './zonotope-polygon.js';
import { drawSolid } from './zonotope-solid.js';

/** How to draw. */
export interface ZonotopePictureOptions {
  /** Which coordinates; default: the zonotope's own span, of rank 2 or 3. */
  readonly projection?: ProjectionChoice;
  /** Of a solid: the direction to look from, three numbers not all 0; default: chosen. */
  readonly view?: readonly number[];
  /** Signs of a region, one for each normal of the file: its vertex is marked. */
  readonly region?: string;
  /** Default: the title of the file, or its name. */
  readonly title?: string;
  /** Default: landscape. */
  readonly orientation?: Orientation;
  /** Begins every id in the SVG; set it apart when several stand in one page. */
  readonly idPrefix?: string;
}

/** What both kinds of figure need. */
export interface ZonotopeFigure {
  readonly title: string;
  readonly idPrefix: string;
  readonly orientation: Orientation;
  /** Signs of every vertex, over the normals of the projected arrangement. */
  readonly signs: readonly string[];
  /** The vertex to mark. */
  readonly marked: number | null;
  readonly view: Spot | null;
}

/**
 * The picture as SVG text, the same for the same input. InputError for a rank that cannot be drawn, a
 * view without direction and signs of no region; LimitError past the bound on faces.
 */
export function drawZonotope(
  arrangement: Arrangement,
  options: ZonotopePictureOptions = {},
): string {
  const choice = options.projection ?? { kind: 'own' };
  const view = options.view === undefined ? null : readView(options.view);
  const flat =
    choice.kind === 'own'
      ? arrangement.rank === 2
      : choice.kind === 'coordinates' && choice.coordinates.length === 2;
  const figure = (projection: Projection, words: readonly Int32Array[]): ZonotopeFigure => {
    const { hyperplaneOf, orientationOf } = projection.arrangement;
    const text = new SignText(hyperplaneOf, orientationOf);
    const signs = words.map((word) => text.write(word, 0));
    return {
      title: oneLine(`${options.title ?? titleOf(arrangement)}: zonotope`),
      idPrefix: (options.idPrefix ?? 'zonotope').replace(/[^A-Za-z0-9_-]/g, '-'),
      orientation: options.orientation ?? 'landscape',
      signs,
      marked:
        options.region === undefined
          ? null
          : findVertex(arrangement, projection, signs, options.region),
      view,
    };
  };
  if (flat) {
    if (view !== null) {
      throw new InputError('a polygon lies flat on the sheet', 'leave the view out');
    }
    const sides = 2 * arrangement.hyperplanes.length;
    if (sides > drawnFaces) {
      throw new LimitError(
        'a picture of the zonotope',
        `${sides} sides`,
        `${drawnFaces} sides`,
        'leave generators out, or list its vertices instead',
      );
    }
    const polygon = buildPolygon(arrangement, choice);
    return drawPolygon(polygon, figure(polygon.projection, polygon.words));
  }
  const solid = buildSolid(arrangement, choice, drawnFaces);
  return drawSolid(solid, figure(solid.projection, wordsOf(solid.regions)));
}

function findVertex(
  arrangement: Arrangement,
  projection: Projection,
  signs: readonly string[],
  region: string,
): number {
  const n = arrangement.generators.normals.length;
  const shown = oneLine(region.length > 60 ? `${region.slice(0, 60)}…` : region);
  if (!/^[+-]+$/.test(region) || region.length !== n) {
    throw new InputError(
      `region '${shown}': not ${n} signs + or -`,
      'write one sign for each normal of the file, as in the list of regions',
    );
  }
  const vertex = signs.indexOf(projection.kept.map((j) => region[j]).join(''));
  if (vertex >= 0) return vertex;
  throw projection.from.rank === projection.axes.length
    ? new InputError(
        `region '${shown}': no region of the arrangement has these signs`,
        "take signs from the list that 'regions' writes",
      )
    : new InputError(
        `region '${shown}': its vertex is none of the projection`,
        'take signs of a region that is one of the projected normals too',
      );
}
