// A zonotope in space, in parallel projection: faces in front tinted by their number of sides, edges
// by the normals they run along, edges behind dashed.
import { formatNumber } from '../exact/number.js';
import { generatorName } from '../export/mesh-words.js';
import type { Solid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import type { Area } from './bands.js';
import { ink, line, mark, type Tint } from './palette.js';
import { type Drawn, round, signAdvance, signFont } from './sheet.js';
import { boxesAround, LabelRoom } from './solid-labels.js';
import {
  type Camera,
  cameraFrom,
  centred,
  chooseEye,
  dot,
  faceNormals,
  facesEye,
} from './solid-view.js';
import type { ZonotopeFigure } from './zonotope.js';
import {
  axisNames,
  axisNotes,
  classNumbers,
  faceRows,
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
  type KeyPart,
  type SheetWords,
  startZonotopeSheet,
} from './zonotope-sheet.js';

const signSize = 7;
/** Faces above which the picture has neither labels nor edges behind. */
const labelledFaces = 400;
/** Vertices in front above which their signs are left to the tooltips. */
const signedVertices = 60;
const longestSigns = 16;

type Place = readonly [number, number];

/** What of the solid is seen from where. */
interface Scene {
  readonly camera: Camera;
  readonly chosen: boolean;
  readonly front: readonly boolean[];
  /** For each vertex whether it bounds a face in front. */
  readonly seen: readonly boolean[];
  readonly outline: readonly boolean[];
}

function look(solid: Solid, figure: ZonotopeFigure, spots: ReturnType<typeof centred>): Scene {
  const corners = solid.faces.map((face) => face.vertices);
  const eye = figure.view ?? chooseEye(spots, corners, figure.marked);
  const camera = cameraFrom(eye);
  const front = faceNormals(spots, corners).map((normal) => facesEye(normal, camera));
  const seen = spots.map(() => false);
  const outline = spots.map(() => false);
  corners.forEach((list, f) => {
    if (front[f]) for (const v of list) seen[v] = true;
  });
  for (const { from, to, left, right } of solid.edges) {
    if (front[left] !== front[right]) outline[from] = outline[to] = true;
  }
  return { camera, chosen: figure.view === null, front, seen, outline };
}

/** The picture as SVG. */
export function drawSolid(solid: Solid, figure: ZonotopeFigure): string {
  const { projection, faces } = solid;
  const spots = centred(placeVertices(projection, solid.vertices));
  const scene = look(solid, figure, spots);
  const { camera } = scene;
  const labelled = faces.length <= labelledFaces;
  const sheet = startZonotopeSheet(wordsFor(solid, figure, scene, labelled), figure.orientation);
  const { svg } = sheet;
  const flat = Float64Array.from(
    spots.flatMap((spot) => [dot(spot, camera.right), dot(spot, camera.up)]),
  );
  const at = planeFit(flat, sheet.figure, labelled ? 40 : 12);
  const points = spots.map((_, v) => at(flat[2 * v], flat[2 * v + 1]));
  drawArrows(
    svg,
    sheet.figure,
    axisNames(projection),
    [0, 1, 2].map((i) => [camera.right[i], -camera.up[i]] as const),
  );
  drawFaces(svg, solid, scene, points);
  drawEdges(svg, solid, scene, points, labelled);
  drawVertices(svg, solid, figure, scene, points, labelled);
  drawLabels(svg, solid, figure, scene, points, sheet.figure, labelled);
  const markedRow: KeyPart = {
    heading: 'Marked',
    rows:
      figure.marked === null
        ? []
        : [
            {
              swatch: { kind: 'dot', tint: markTint(scene, figure.marked) },
              text: figure.signs[figure.marked],
            },
          ],
  };
  drawKeyParts(svg, sheet.key, [
    markedRow,
    faceRows(faces.map((face) => face.vertices.length)),
    normalRows(projection, 'Edges along the normals'),
    ...(labelled
      ? [
          {
            heading: 'Behind',
            rows: [{ swatch: { kind: 'dashes', colour: line }, text: 'edges behind' }],
          } as KeyPart,
        ]
      : []),
  ]);
  return sheet.text();
}

/** Hollow where the vertex is behind. */
function markTint(scene: Scene, v: number): Tint {
  return scene.seen[v] ? mark : { fill: '#ffffff', stroke: mark.stroke };
}

function wordsFor(
  solid: Solid,
  figure: ZonotopeFigure,
  scene: Scene,
  labelled: boolean,
): SheetWords {
  const { projection, vertices, edges, faces } = solid;
  const { from, arrangement } = projection;
  const size = `${vertices.length} vertices, ${edges.length} edges, ${faces.length} faces, ${arrangement.generators.normals.length} normals`;
  const eye = scene.camera.eye.map((x) => Number(x.toFixed(2)) + 0).join(', ');
  const marked = figure.marked;
  return {
    title: figure.title,
    subtitle: `${from.rank > 3 ? `Projection of a zonotope of rank ${from.rank}` : 'Solid'}: ${size}`,
    notes: [
      `Parallel projection, seen from (${eye})${scene.chosen ? ', chosen so that no face is edge-on' : ''}. Faces are translates of the zonotopes of the normals that their edges run along. Exact geometry, rounded to the sheet.`,
      labelled
        ? 'A number stands once for all edges along its normal. Signs at a vertex are those of its region; they are left out where there is no room, and given in the tooltips.'
        : 'Numbers, signs and edges behind are left out: there are too many faces to read them.',
      ...axisNotes(projection),
    ],
    description:
      `A convex solid with central symmetry, the zonotope${from.rank > 3 ? "'s projection" : ''}, with ${size}. ` +
      `${faceRows(faces.map((face) => face.vertices.length))
        .rows.map(({ text }) => text)
        .join(', ')}. ` +
      `Seen from (${eye}), ${scene.front.filter(Boolean).length} faces are in front.` +
      (marked === null
        ? ''
        : ` The vertex of the region ${figure.signs[marked]} is marked${scene.seen[marked] ? '' : ', behind'}.`),
    idPrefix: figure.idPrefix,
  };
}

function drawFaces(svg: Drawn, solid: Solid, scene: Scene, points: readonly Place[]): void {
  const group = svg.append('g').attr('class', 'faces');
  solid.faces.forEach(({ vertices, facet }, f) => {
    if (!scene.front[f]) return;
    const path = group
      .append('path')
      .attr(
        'd',
        `M${vertices.map((v) => `${round(points[v][0])} ${round(points[v][1])}`).join('L')}Z`,
      )
      .attr('fill', sideTint(vertices.length).fill);
    const names = facet.generators.map((j) => generatorName(solid.projection, j)).join(', ');
    path.append('title').text(`face with ${vertices.length} sides; normals ${names}`);
  });
}

function drawEdges(
  svg: Drawn,
  solid: Solid,
  scene: Scene,
  points: readonly Place[],
  labelled: boolean,
): void {
  const behind = svg
    .append('g')
    .attr('class', 'edges-behind')
    .attr('stroke', line)
    .attr('stroke-width', solid.edges.length > 300 ? 0.45 : 0.75)
    .attr('stroke-dasharray', '3 2.4');
  const before = svg.append('g').attr('class', 'edges').attr('stroke-linecap', 'round');
  const thin = solid.edges.length > 2000 ? 0.35 : solid.edges.length > 300 ? 0.8 : 1.2;
  solid.edges.forEach(({ from, to, along, left, right }) => {
    const seen = scene.front[left] || scene.front[right];
    if (!seen && !labelled) return;
    const [[x1, y1], [x2, y2]] = [points[from], points[to]];
    const outline = scene.front[left] !== scene.front[right];
    const stroke = (seen ? before : behind)
      .append('line')
      .attr('x1', round(x1))
      .attr('y1', round(y1))
      .attr('x2', round(x2))
      .attr('y2', round(y2));
    if (seen) {
      stroke
        .attr('stroke', normalInk(along))
        .attr('stroke-width', round(outline ? 1.5 * thin : thin));
    }
  });
}

function drawVertices(
  svg: Drawn,
  solid: Solid,
  figure: ZonotopeFigure,
  scene: Scene,
  points: readonly Place[],
  labelled: boolean,
): void {
  const { radicand } = solid.projection.arrangement.generators;
  if (labelled) {
    const group = svg.append('g').attr('class', 'vertices').attr('fill', ink);
    points.forEach(([x, y], v) => {
      if (!scene.seen[v]) return;
      const dotted = group
        .append('circle')
        .attr('cx', round(x))
        .attr('cy', round(y))
        .attr('r', 1.4);
      const place = solid.vertices[v].map((c) => formatNumber(c, radicand)).join(', ');
      dotted.append('title').text(`${figure.signs[v]}: vertex (${place})`);
    });
  }
  if (figure.marked === null) return;
  const group = svg.append('g').attr('class', 'mark');
  drawMark(group, ...points[figure.marked], markTint(scene, figure.marked));
}

function drawLabels(
  svg: Drawn,
  solid: Solid,
  figure: ZonotopeFigure,
  scene: Scene,
  points: readonly Place[],
  area: Area,
  labelled: boolean,
): void {
  const room = new LabelRoom(area);
  const shown = solid.edges.filter(({ left, right }) => scene.front[left] || scene.front[right]);
  for (const { from, to } of labelled ? solid.edges : shown) {
    room.takeLine(...points[from], ...points[to]);
  }
  const group = svg
    .append('g')
    .attr('class', 'signs')
    .attr('font-family', signFont)
    .attr('font-size', signSize)
    .attr('text-anchor', 'middle');
  const middle = [area.left + area.width / 2, area.top + area.height / 2];
  const write = (v: number, distances: readonly number[], overLines: boolean): void => {
    const signs = figure.signs[v];
    const width = signs.length * signAdvance * signSize + 2;
    const [x, y] = points[v];
    const outward = [x - middle[0] || 1, y - middle[1]] as const;
    const box = room.place(boxesAround(x, y, width, signSize + 1, outward, distances), overLines);
    if (box === null) return;
    group
      .append('text')
      .attr('x', round(box.left + width / 2))
      .attr('y', round(box.top + signSize - 0.9))
      .attr('font-weight', v === figure.marked ? 700 : null)
      .text(signs);
  };
  const { marked } = figure;
  if (marked !== null) {
    const [x, y] = points[marked];
    room.takeBox({ left: x - 5, top: y - 5, width: 10, height: 10 });
    if (figure.signs[marked].length <= 40) write(marked, [7, 10, 16], false);
  }
  if (!labelled) return;
  drawNumbers(svg, solid, shown, points, room);
  const front = points.map((_, v) => v).filter((v) => scene.seen[v] && v !== marked);
  if (front.length > signedVertices || figure.signs[0].length > longestSigns) return;
  front.sort((a, b) => Number(scene.outline[b]) - Number(scene.outline[a]));
  for (const v of front) write(v, scene.outline[v] ? [3, 6, 10] : [3, 6], false);
}

/** One badge for each normal, on the longest of its edges that has room. */
function drawNumbers(
  svg: Drawn,
  solid: Solid,
  shown: readonly Solid['edges'][number][],
  points: readonly Place[],
  room: LabelRoom,
): void {
  const group = svg.append('g').attr('class', 'numbers');
  const length = (edge: Solid['edges'][number]): number =>
    Math.hypot(
      points[edge.to][0] - points[edge.from][0],
      points[edge.to][1] - points[edge.from][1],
    );
  classNumbers(solid.projection).forEach((text, h) => {
    const width = badgeWidth(text);
    const own = shown.filter(({ along }) => along === h).sort((a, b) => length(b) - length(a));
    for (const edge of own) {
      if (length(edge) < width + 4) break;
      const [x, y] = [0, 1].map((i) => (points[edge.from][i] + points[edge.to][i]) / 2);
      const box = room.place([{ left: x - width / 2, top: y - 5, width, height: 10 }], true);
      if (box === null) continue;
      drawBadge(group, x, y, text, normalInk(h));
      break;
    }
  });
}
