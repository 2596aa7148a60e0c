// The tiling of a solid as blocks moved apart from its middle, which keeps convex blocks apart: what
// separates two of them separates them the more, the farther they move.
import { buildSolid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import type { Tile } from '../zonotope/tiling.js';
import { faceTints, ink, page } from './palette.js';
import { type Drawn, round } from './sheet.js';
import { insideSlab, pointsOf, type Slab } from './solid-labels.js';
import {
  type Camera,
  cameraFrom,
  centred,
  chooseEye,
  cross,
  dot,
  type Spot,
} from './solid-view.js';
import { type TilingFigure, tileNumbers } from './tiling.js';
import { depthOrder } from './tiling-depth.js';
import { belongs, placeTiles } from './tiling-place.js';
import { axisNames, axisNotes, normalInk, normalRows } from './zonotope-key.js';
import { drawArrows, planeFit } from './zonotope-plane.js';
import { badgeFont, badgeWidth, drawKeyParts, startZonotopeSheet } from './zonotope-sheet.js';

type Place = readonly [number, number];

/**
 * The faces that belong to their blocks are those turned against the first coordinate (the rule of the
 * tiling moves the zonotope along it): from there they are seen.
 */
const closedSide: Spot = [-0.84, -0.4, 0.37];
/** How far the middle of a block moves, as a share of its way from the middle of all. */
const spread = 0.7;
/** Blocks above which they are not numbered. */
const numberedBlocks = 120;
const apartNote =
  'Blocks are moved apart from the middle; segments, parallelograms and the point that complete the tiling lie on the surface and are not drawn.';

/** The picture as SVG. */
export function drawBlocks(figure: TilingFigure): string {
  const { projection } = figure;
  const tiles = figure.tiles.filter((tile) => tile.generators.length === 3);
  const solid = buildSolid(projection.arrangement, { kind: 'own' });
  const corners = blockCorners(centred(placeTiles(projection, tiles)));
  const eye =
    figure.view ??
    chooseEye(
      centred(placeVertices(projection, solid.vertices)),
      solid.faces.map((face) => face.vertices),
      null,
      closedSide,
    );
  const camera = cameraFrom(eye);
  const numbered = tiles.length <= numberedBlocks;
  const seenFrom = camera.eye.map((x) => Number(x.toFixed(2)) + 0).join(', ');
  const others = figure.tiles.length - tiles.length;
  const size = `${tiles.length} blocks and ${others} smaller tiles`;
  const sheet = startZonotopeSheet(
    {
      title: figure.title,
      subtitle: `${projection.from.rank > 3 ? `Projection of a zonotope of rank ${projection.from.rank}` : 'Solid'}: ${size}, a tile for every independent set of ${projection.arrangement.generators.normals.length} normals`,
      notes: [
        `Parallel projection, seen from (${seenFrom}). ${apartNote}`,
        `Every point of the zonotope lies in exactly one tile: a tinted face and a solid edge belong to their block, a white face and a dashed edge do not.${
          numbered ? '' : ' Numbers are left out: there are too many blocks to read them.'
        }`,
        ...axisNotes(projection),
      ],
      description: `A convex solid with central symmetry, the zonotope, cut into ${size}, each without some of its faces, so that every point lies in exactly one. The blocks are drawn apart.`,
      idPrefix: figure.idPrefix,
    },
    figure.orientation,
  );
  const { svg } = sheet;
  const flat = corners.map((block) =>
    block.map((corner): Place => [dot(corner, camera.right), dot(corner, camera.up)]),
  );
  const at = planeFit(Float64Array.from(flat.flat(2)), sheet.figure, 14);
  drawArrows(
    svg,
    sheet.figure,
    axisNames(projection),
    [0, 1, 2].map((i) => [camera.right[i], -camera.up[i]] as const),
  );
  const group = svg.append('g').attr('class', 'blocks').attr('stroke-linejoin', 'round');
  const order = depthOrder(corners, camera);
  const places = flat.map((block) => block.map(([x, y]) => at(x, y)));
  const fronts = tiles.map((tile, b) => frontsOf(tile, corners[b], places[b], camera));
  order.forEach((b, i) => {
    const own = drawBlock(group, figure, tiles[b], fronts[b], places[b], numbered ? 1 : 0.6);
    if (!numbered) return;
    const covering = order.slice(i + 1).flatMap((later) => fronts[later].map(({ slab }) => slab));
    drawNumbers(own, tileNumbers(projection, tiles[b]), fronts[b], covering);
  });
  drawKeyParts(svg, sheet.key, [
    {
      heading: 'Faces',
      rows: [
        { swatch: { kind: 'fill', tint: faceTints.wall }, text: 'belongs to the block' },
        { swatch: { kind: 'fill', tint: { fill: page, stroke: ink } }, text: 'does not' },
      ],
    },
    {
      heading: 'Edges',
      rows: [
        { swatch: { kind: 'line', colour: ink, number: null }, text: 'belongs to the block' },
        { swatch: { kind: 'dashes', colour: ink }, text: 'does not' },
      ],
    },
    normalRows(projection, 'Edges along the normals'),
  ]);
  return sheet.text();
}

/** The eight corners of every block, moved apart. */
function blockCorners(spots: readonly Spot[]): Spot[][] {
  return Array.from({ length: spots.length / 8 }, (_, b) => {
    const own = spots.slice(8 * b, 8 * b + 8);
    const move = [0, 1, 2].map((i) => (spread * (own[0][i] + own[7][i])) / 2);
    return own.map(([x, y, z]): Spot => [x + move[0], y + move[1], z + move[2]]);
  });
}

/** A face in front: the corner numbers in order, and the generators it runs along. */
interface Front {
  readonly corners: readonly number[];
  readonly along: readonly [number, number];
  readonly closed: boolean;
  readonly slab: Slab;
}

/** The faces turned to the eye, the largest to the eye first. */
function frontsOf(
  tile: Tile,
  corners: readonly Spot[],
  places: readonly Place[],
  camera: Camera,
): Front[] {
  const side = (bit: number): Spot => [
    corners[bit][0] - corners[0][0],
    corners[bit][1] - corners[0][1],
    corners[bit][2] - corners[0][2],
  ];
  const fronts: (Front & { readonly sight: number })[] = [];
  for (let s = 0; s < 3; s++) {
    const [p, q] = [0, 1, 2].filter((other) => other !== s);
    const normal = cross(side(1 << p), side(1 << q));
    const sight = Math.sign(dot(normal, side(1 << s))) * dot(normal, camera.eye);
    if (Math.abs(sight) < 1e-9) continue;
    // Of the two faces across generator s, the one that is turned to the eye.
    const base = sight > 0 ? 1 << s : 0;
    const list = [base, base | (1 << p), base | (1 << p) | (1 << q), base | (1 << q)];
    const way = (to: number): Place => [
      places[to][0] - places[base][0],
      places[to][1] - places[base][1],
    ];
    fronts.push({
      corners: list,
      along: [p, q],
      closed: belongs(tile, base, (1 << p) | (1 << q)),
      slab: { corner: places[base], sides: [way(list[1]), way(list[3])] },
      sight: Math.abs(sight),
    });
  }
  return fronts.sort((a, b) => b.sight - a.sight);
}

function drawBlock(
  group: Drawn,
  { projection }: TilingFigure,
  tile: Tile,
  fronts: readonly Front[],
  places: readonly Place[],
  width: number,
): Drawn {
  const own = group.append('g');
  own.append('title').text(`normals ${tileNumbers(projection, tile)}`);
  const edges = new Map<string, readonly [number, number, number]>();
  for (const { corners, along, closed } of fronts) {
    own
      .append('path')
      .attr('d', `M${corners.map((k) => places[k].map(round).join(' ')).join('L')}Z`)
      .attr('fill', closed ? faceTints.wall.fill : page);
    const [a, b, c, d] = corners;
    for (const [from, to, free] of [
      [a, b, along[0]],
      [d, c, along[0]],
      [a, d, along[1]],
      [b, c, along[1]],
    ]) {
      edges.set(`${from} ${to}`, [from, to, free]);
    }
  }
  for (const [from, to, free] of edges.values()) {
    own
      .append('line')
      .attr('x1', round(places[from][0]))
      .attr('y1', round(places[from][1]))
      .attr('x2', round(places[to][0]))
      .attr('y2', round(places[to][1]))
      .attr('stroke', normalInk(projection.arrangement.hyperplaneOf[tile.generators[free]]))
      .attr('stroke-width', width)
      .attr('stroke-dasharray', belongs(tile, from, 1 << free) ? null : '2.6 2.2');
  }
  return own;
}

/** Writes the numbers of a block on the first of its faces where they fit and nothing covers them. */
function drawNumbers(
  own: Drawn,
  label: string,
  fronts: readonly Front[],
  covering: readonly Slab[],
): void {
  for (const { slab } of fronts) {
    const [x, y] = [0, 1].map((i) => slab.corner[i] + (slab.sides[0][i] + slab.sides[1][i]) / 2);
    const width = badgeWidth(label) - 1;
    const points = [...pointsOf({ left: x - width / 2, top: y - 4, width, height: 8 })];
    if (!points.every(([a, b]) => insideSlab(slab, a, b, 0.04))) continue;
    if (points.some(([a, b]) => covering.some((other) => insideSlab(other, a, b)))) continue;
    own
      .append('text')
      .attr('x', round(x))
      .attr('y', round(y + 2.3))
      .attr('font-size', badgeFont)
      .attr('text-anchor', 'middle')
      .text(label);
    return;
  }
}
