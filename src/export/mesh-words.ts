// What mesh files say besides numbers: where the figure is from, the order of vertices and faces, what
// was rounded; and the colours of its faces, which pictures share.
import { version } from '../census/version.js';
import { formatNumber } from '../exact/number.js';
import type { Solid } from '../zonotope/solid.js';
import type { Projection } from '../zonotope/solid-projection.js';
import { titleOf } from './heading.js';
import { cleanText } from './xml.js';

/** Tints of faces with 4, 6, 8, 10 and more sides: part of the palette, and tested with it. */
export const sideTints = ['#fbedb6', '#c3dcef', '#f3d3cb', '#cbb4ee', '#dfe2e5'] as const;

/** The tint's number for a face. */
export function sideClass(sides: number): number {
  return Math.min(sides / 2 - 2, sideTints.length - 1);
}

/** `quadrilaterals`: faces by their number of sides. */
export function sideClassName(index: number): string {
  return ['quadrilaterals', 'hexagons', 'octagons', 'decagons', 'faces of 12 or more sides'][index];
}

/** Text of any origin on one line: no control characters, no line ends, no broken characters. */
export function oneLine(text: string): string {
  return cleanText(text)
    .replace(/[\p{Cc}\p{Zl}\p{Zp}\s]+/gu, ' ')
    .trim();
}

/** The heading of the figure, on one line. */
export function solidTitle(solid: Solid): string {
  return oneLine(`${titleOf(solid.projection.arrangement)}: zonotope`);
}

/** `3 drive port`: generators of the projected arrangement as the file numbers and names them. */
export function generatorName({ kept, arrangement }: Projection, generator: number): string {
  const label = arrangement.generators.labels?.[generator] ?? null;
  return oneLine(`${kept[generator] + 1} ${label ?? ''}`);
}

/** The same for all generators of each hyperplane: `1 a + 4 b`. */
export function classNames(projection: Projection): string[] {
  return projection.arrangement.hyperplanes.map(({ members }) =>
    members.map((j) => generatorName(projection, j)).join(' + '),
  );
}

/** A word for each hyperplane that any format takes: `n1_a+n4_b`; no two are alike. */
export function classWords(projection: Projection): string[] {
  const word = (j: number): string => {
    const name = generatorName(projection, j);
    return `n${name.replace(/[^\p{L}\p{N}.-]+/gu, '_').replace(/_$/, '')}`;
  };
  return projection.arrangement.hyperplanes.map(({ members }) => members.map(word).join('+'));
}

/** Lines that explain the file, for its comments. */
export function meshNotes(solid: Solid): string[] {
  const { projection, vertices, edges, faces } = solid;
  const { axes, from, kept } = projection;
  const projected = from.rank > 3 ? ' of the projected normals' : '';
  const { radicand, normals, ranges } = from.generators;
  const names = axes.map(({ name, measure }) =>
    oneLine(measure === null ? name : `${name} ${measure}`),
  );
  return [
    solidTitle(solid),
    `signwright ${version}: ${vertices.length} vertices, ${edges.length} edges, ${faces.length} faces`,
    `Coordinates: ${names.join(', ')}`,
    ...(from.rank > 3
      ? [`A projection of a zonotope of rank ${from.rank} in ${from.dimension} coordinates`]
      : []),
    `Vertex order: that of the list of regions${projected}, a vertex a region`,
    'Faces go counterclockwise seen from outside, two and two opposite',
    'Numbers are the exact ones rounded to the nearest double, in the fewest digits that tell it',
    'Geometry of the model given, not a rating',
    ...kept.map((of, j) => {
      const normal = normals[of].map((x) => formatNumber(x, radicand)).join(' ');
      const ends = ranges === null ? [] : [ranges[of].low, ranges[of].high];
      const range = ends.map((x) => formatNumber(x, radicand)).join(' to ');
      return `Normal ${generatorName(projection, j)}: ${normal}${range === '' ? '' : `, from ${range}`}`;
    }),
  ];
}
