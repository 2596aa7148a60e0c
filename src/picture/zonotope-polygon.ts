// A zonotope in the plane: the polygon with its sides by the normals they run along.
import { formatNumber } from '../exact/number.js';
import { placeVertices } from '../zonotope/solid-place.js';
import type { Polygon } from '../zonotope/solid-polygon.js';
import { ink, mark } from './palette.js';
import { round, signAdvance, signFont } from './sheet.js';
import { boxesAround, LabelRoom } from './solid-labels.js';
import type { ZonotopeFigure } from './zonotope.js';
import {
  axisNames,
  axisNotes,
  classNumbers,
  normalInk,
  normalRows,
  sideTint,
} from './zonotope-key.js';
import { drawArrows, planeFit } from './zonotope-plane.js';
import {
  badgeWidth,
  drawBadge,
  drawKeyParts,
  drawMark,
  startZonotopeSheet,
} from './zonotope-sheet.js';

const signSize = 7.5;
/** Sides above which neither signs nor numbers are written. */
const labelledSides = 400;
const longestSigns = 16;

/** The picture as SVG. */
export function drawPolygon(polygon: Polygon, figure: ZonotopeFigure): string {
  const { projection, vertices, along } = polygon;
  const { arrangement } = projection;
  const sides = vertices.length;
  const { radicand } = arrangement.generators;
  const spots = placeVertices(projection, vertices);
  const labelled = sides <= labelledSides;
  const about = `${sides} vertices, ${sides} sides, ${arrangement.generators.normals.length} normals`;
  const words = {
    title: figure.title,
    subtitle: `${projection.from.rank > 2 ? 'Projected onto two coordinates' : 'In the plane'}: ${about}`,
    notes: [
      'Every side is the sum of the segments of the normals whose number it bears; opposite sides bear the same. Exact geometry, rounded to the sheet.',
      labelled
        ? 'Signs at a vertex are those of its region: + where a normal stands at its high end, - at its low; they are left out where there is no room, and given in the tooltips.'
        : 'Signs and numbers are left out: there are too many sides to read them.',
      ...axisNotes(projection),
    ],
    description: `A centrally symmetric polygon, the zonotope, with ${about}.${
      figure.marked === null
        ? ''
        : ` The vertex of the region ${figure.signs[figure.marked]} is marked.`
    }`,
    idPrefix: figure.idPrefix,
  };
  const sheet = startZonotopeSheet(words, figure.orientation);
  const { svg } = sheet;
  const signed = labelled && figure.signs[0].length <= longestSigns;
  const margin = signed ? 20 + figure.signs[0].length * signAdvance * signSize : 34;
  const at = planeFit(spots, sheet.figure, margin);
  const points = Array.from({ length: sides }, (_, v) => at(spots[2 * v], spots[2 * v + 1]));
  const middle = at.middle;
  svg
    .append('path')
    .attr('class', 'inside')
    .attr('d', `M${points.map(([x, y]) => `${round(x)} ${round(y)}`).join('L')}Z`)
    .attr('fill', sideTint(sides).fill);
  drawArrows(svg, sheet.figure, axisNames(projection), [
    [1, 0],
    [0, -1],
  ]);
  const room = new LabelRoom(sheet.figure);
  const lines = svg
    .append('g')
    .attr('class', 'edges')
    .attr('stroke-width', labelled ? 1.6 : 0.7)
    .attr('stroke-linecap', 'round');
  points.forEach(([x, y], v) => {
    const [x2, y2] = points[(v + 1) % sides];
    room.takeLine(x, y, x2, y2);
    lines
      .append('line')
      .attr('x1', round(x))
      .attr('y1', round(y))
      .attr('x2', round(x2))
      .attr('y2', round(y2))
      .attr('stroke', normalInk(along[v]));
  });
  const outward = ([x, y]: readonly [number, number]) => [x - middle[0], y - middle[1]] as const;
  const badges = svg.append('g').attr('class', 'numbers');
  const numbers = classNumbers(projection);
  const crowded = sides > 40;
  if (labelled) {
    points.forEach(([x, y], v) => {
      const [x2, y2] = points[(v + 1) % sides];
      const text = numbers[along[v]];
      const width = badgeWidth(text);
      const at = [(x + x2) / 2, (y + y2) / 2] as const;
      const onSide = { left: at[0] - width / 2, top: at[1] - 5, width, height: 10 };
      // Beside the side where it is too short to bear its number.
      const box =
        Math.hypot(x2 - x, y2 - y) > width + 5
          ? room.place([onSide], true)
          : room.place(boxesAround(...at, width, 10, outward(at), [2, 4, 7]));
      if (box !== null) {
        drawBadge(badges, box.left + width / 2, box.top + 5, text, normalInk(along[v]));
      }
    });
  }
  const dots = svg.append('g').attr('class', 'vertices').attr('fill', ink);
  points.forEach(([x, y], v) => {
    const dot = dots
      .append('circle')
      .attr('cx', round(x))
      .attr('cy', round(y))
      .attr('r', !labelled ? 0.6 : crowded ? 1.2 : 2);
    const place = vertices[v].map((c) => formatNumber(c, radicand)).join(', ');
    dot.append('title').text(`${figure.signs[v]}: vertex (${place})`);
  });
  if (figure.marked !== null)
    drawMark(svg.append('g').attr('class', 'mark'), ...points[figure.marked], mark);
  const labels = svg
    .append('g')
    .attr('class', 'signs')
    .attr('font-family', signFont)
    .attr('font-size', signSize)
    .attr('text-anchor', 'middle');
  const order = points
    .map((_, v) => v)
    .sort((a, b) => Number(b === figure.marked) - Number(a === figure.marked));
  for (const v of signed ? order : order.filter((o) => o === figure.marked)) {
    const [x, y] = points[v];
    const width = figure.signs[v].length * signAdvance * signSize + 2;
    const box = room.place(
      boxesAround(
        x,
        y,
        width,
        signSize + 1.5,
        outward([x, y]),
        v === figure.marked ? [7, 10] : [5, 8, 12],
      ),
    );
    if (box === null) continue;
    labels
      .append('text')
      .attr('x', round(box.left + box.width / 2))
      .attr('y', round(box.top + box.height - 2.2))
      .attr('font-weight', v === figure.marked ? 700 : null)
      .text(figure.signs[v]);
  }
  drawKeyParts(svg, sheet.key, [
    ...(figure.marked === null
      ? []
      : [
          {
            heading: 'Marked',
            rows: [
              { swatch: { kind: 'dot', tint: mark } as const, text: figure.signs[figure.marked] },
            ],
          },
        ]),
    normalRows(projection, 'Sides along the normals'),
  ]);
  return sheet.text();
}
