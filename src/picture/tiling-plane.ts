// The tiling of a polygon. Parallelograms are drawn a little smaller than they are, so that of two that
// meet the reader sees to which the side belongs: solid where it does, dashed where it does not.
import type { Tile } from '../zonotope/tiling.js';
import { faceTints, ink, page } from './palette.js';
import { type Drawn, round } from './sheet.js';
import { insideSlab, pointsOf } from './solid-labels.js';
import { type TilingFigure, tileNumbers } from './tiling.js';
import { belongs, placeTiles } from './tiling-place.js';
import { axisNames, axisNotes, normalInk, normalRows } from './zonotope-key.js';
import { drawArrows, planeFit } from './zonotope-plane.js';
import { badgeFont, badgeWidth, drawKeyParts, startZonotopeSheet } from './zonotope-sheet.js';

type Place = readonly [number, number];

/** Tiles above which corners are not marked and tiles not numbered. */
const markedTiles = 400;
/** How far a parallelogram is drawn inside itself, in points, where it is large enough. */
const inset = (tiles: number): number => (tiles <= 60 ? 2.5 : tiles <= markedTiles ? 1.3 : 0.6);

/** The picture as SVG. */
export function drawPlaneTiling(figure: TilingFigure): string {
  const { projection, tiles } = figure;
  const { arrangement } = projection;
  const full = tiles.filter((tile) => tile.generators.length === 2);
  const segments = tiles.filter((tile) => tile.generators.length === 1);
  const marked = full.length <= markedTiles;
  const size = `${full.length} parallelograms, ${segments.length} segments, 1 point`;
  const sheet = startZonotopeSheet(
    {
      title: figure.title,
      subtitle: `${projection.from.rank > 2 ? 'Projected onto two coordinates' : 'In the plane'}: ${size}, a tile for every independent set of ${arrangement.generators.normals.length} normals`,
      notes: [
        'Every point of the zonotope lies in exactly one tile. A solid side belongs to its tile, a dashed one does not. Parallelograms are drawn a little smaller than they are, segments and the point where they are.',
        marked
          ? 'A filled corner belongs to its tile, a hollow one does not. Numbers are those of the normals that span the tile, left out where there is no room.'
          : 'Corners and numbers are left out: there are too many tiles to read them.',
        ...axisNotes(projection),
      ],
      description: `A centrally symmetric polygon, the zonotope, cut into ${size}, each without some of its sides, so that every point lies in exactly one.`,
      idPrefix: figure.idPrefix,
    },
    figure.orientation,
  );
  const { svg } = sheet;
  const spots = placeTiles(projection, tiles);
  const at = planeFit(spots, sheet.figure, 24);
  drawArrows(svg, sheet.figure, axisNames(projection), [
    [1, 0],
    [0, -1],
  ]);
  const layers = ['insides', 'sides', 'segments', 'corners', 'numbers'].map((name) =>
    svg.append('g').attr('class', name),
  );
  layers[1].attr('fill', 'none').attr('stroke-width', marked ? 1.2 : 0.5);
  layers[2].attr('stroke-width', marked ? 2.2 : 0.9);
  layers[3].attr('stroke', ink).attr('stroke-width', 0.7);
  layers[4].attr('font-size', badgeFont).attr('text-anchor', 'middle');
  const ofHyperplane = (j: number): number => arrangement.hyperplaneOf[j];
  const ends: { corner: Place; filled: boolean; radius: number }[] = [];
  let offset = 0;
  for (const tile of tiles) {
    const count = 2 ** tile.generators.length;
    const corners = Array.from({ length: count }, (_, k) =>
      at(spots[2 * (offset + k)], spots[2 * (offset + k) + 1]),
    );
    offset += count;
    if (count === 4) drawParallelogram(layers, figure, tile, corners, marked, ofHyperplane);
    else if (count === 2) {
      const colour = normalInk(ofHyperplane(tile.generators[0]));
      drawLine(layers[2], corners[0], corners[1], colour, true);
      corners.forEach((corner, k) => {
        ends.push({ corner, filled: belongs(tile, k), radius: 2.6 });
      });
    } else ends.push({ corner: corners[0], filled: true, radius: 3.4 });
  }
  // Ends that meet: the one that belongs to a tile is seen.
  ends.sort((a, b) => Number(a.filled) - Number(b.filled));
  const enough = marked ? 0 : 3;
  for (const { corner, filled, radius } of ends) {
    if (radius > enough) drawCorner(layers[3], corner, filled, radius);
  }
  drawKeyParts(svg, sheet.key, [
    {
      heading: 'Tiles',
      rows: [
        { swatch: { kind: 'fill', tint: faceTints.region }, text: `${full.length} parallelograms` },
        {
          swatch: { kind: 'line', colour: ink, number: null },
          text: `${segments.length} segments, drawn thick`,
        },
        { swatch: { kind: 'dot', tint: { fill: ink, stroke: ink } }, text: '1 point' },
      ],
    },
    {
      heading: 'Sides',
      rows: [
        { swatch: { kind: 'line', colour: ink, number: null }, text: 'belongs to the tile' },
        { swatch: { kind: 'dashes', colour: ink }, text: 'does not' },
      ],
    },
    normalRows(projection, 'Sides along the normals'),
  ]);
  return sheet.text();
}

function drawParallelogram(
  [insides, sides, , marks, numbers]: readonly Drawn[],
  figure: TilingFigure,
  tile: Tile,
  corners: readonly Place[],
  marked: boolean,
  ofHyperplane: (j: number) => number,
): void {
  const [p, pu, pv] = corners;
  const [u, v] = [pu, pv].map(([x, y]) => [x - p[0], y - p[1]] as const);
  const [lengthU, lengthV] = [u, v].map((w) => Math.hypot(...w));
  const area = Math.abs(u[0] * v[1] - u[1] * v[0]);
  const depth = inset(figure.tiles.length);
  // Both coordinates move inwards by the inset over the height across them, at most a fifth.
  const depthU = Math.min(0.2, (depth * lengthV) / area || 0.2);
  const depthV = Math.min(0.2, (depth * lengthU) / area || 0.2);
  const inner = corners.map((_, k): Place => {
    const a = k & 1 ? 1 - depthU : depthU;
    const b = k & 2 ? 1 - depthV : depthV;
    return [p[0] + a * u[0] + b * v[0], p[1] + a * u[1] + b * v[1]];
  });
  const path = insides
    .append('path')
    .attr('d', `M${[0, 1, 3, 2].map((k) => inner[k].map(round).join(' ')).join('L')}Z`)
    .attr('fill', faceTints.region.fill);
  const label = tileNumbers(figure.projection, tile);
  path.append('title').text(`normals ${label}`);
  // Bit s of `free` runs along generator s; the other stands at the end that the corner says.
  for (const [from, to, s] of [
    [0, 1, 0],
    [2, 3, 0],
    [0, 2, 1],
    [1, 3, 1],
  ]) {
    const colour = normalInk(ofHyperplane(tile.generators[s]));
    drawLine(sides, inner[from], inner[to], colour, belongs(tile, from, 1 << s));
  }
  if (!marked) return;
  const height = area / Math.max(lengthU, lengthV);
  if (height >= 6) {
    const radius = height < 16 ? 1 : 1.7;
    inner.forEach((corner, k) => {
      drawCorner(marks, corner, belongs(tile, k), radius);
    });
  }
  const [x, y] = [0, 1].map((i) => (corners[0][i] + corners[3][i]) / 2);
  const width = badgeWidth(label) - 1;
  const box = { left: x - width / 2, top: y - 4, width, height: 8 };
  const slab = { corner: p, sides: [u, v] } as const;
  const room = Math.max(depthU, depthV);
  if (![...pointsOf(box)].every(([a, b]) => insideSlab(slab, a, b, room))) return;
  numbers
    .append('text')
    .attr('x', round(x))
    .attr('y', round(y + 2.3))
    .text(label);
}

function drawLine(group: Drawn, from: Place, to: Place, colour: string, solid: boolean): void {
  group
    .append('line')
    .attr('x1', round(from[0]))
    .attr('y1', round(from[1]))
    .attr('x2', round(to[0]))
    .attr('y2', round(to[1]))
    .attr('stroke', colour)
    .attr('stroke-dasharray', solid ? null : '2.6 2.2');
}

function drawCorner(group: Drawn, [x, y]: Place, filled: boolean, radius: number): void {
  group
    .append('circle')
    .attr('cx', round(x))
    .attr('cy', round(y))
    .attr('r', radius)
    .attr('fill', filled ? ink : page);
}
