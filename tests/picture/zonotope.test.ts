// Pictures of zonotopes and tilings taken apart again: what is drawn is the surface or the tiles, what
// is behind is dashed, labels stand free, no text of an input can break the document. The files in
// references/ were looked at, on screen and in print size, before they were kept.
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { LimitError } from '../../src/errors.js';
import { exactNumber } from '../../src/exact/number.js';
import { polarZonohedron } from '../../src/input/families/polar.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { cameraFrom, cross, dot, type Spot } from '../../src/picture/solid-view.js';
import { drawTiling } from '../../src/picture/tiling.js';
import { depthOrder } from '../../src/picture/tiling-depth.js';
import { placeTiles } from '../../src/picture/tiling-place.js';
import { drawZonotope } from '../../src/picture/zonotope.js';
import { buildSolid } from '../../src/zonotope/solid.js';
import { projectArrangement } from '../../src/zonotope/solid-projection.js';
import { tilesOf } from '../../src/zonotope/tiling.js';
import { volumeBySubsets } from '../../src/zonotope/volume.js';
import { arrangementOf, generatorsOf, sequence, typeA } from '../support/arrangements.js';

// biome-ignore lint/suspicious/noExplicitAny: parsed XML has no type of its own.
type Parsed = any;

function parse(svg: string): Parsed {
  expect(XMLValidator.validate(svg)).toBe(true);
  const parsed = new XMLParser({
    ignoreAttributes: false,
    attributeNamePrefix: '',
    textNodeName: '#text',
    parseTagValue: false,
    htmlEntities: true,
    isArray: (name, _path, _leaf, isAttribute) =>
      !isAttribute && ['g', 'path', 'text', 'rect', 'line', 'circle'].includes(name),
  }).parse(svg);
  return parsed.svg;
}

const group = (svg: Parsed, name: string): Parsed =>
  svg.g.find((g: Parsed) => g.class === name) ?? {};
const words = (element: Parsed): string =>
  typeof element === 'string' ? element : (element?.['#text'] ?? '');
const textsOf = (svg: Parsed, name: string): string[] => (group(svg, name).text ?? []).map(words);
const numbers = (text: string): number[] => (text.match(/-?\d+(\.\d+)?/g) ?? []).map(Number);

/** Corners of a path of straight lines. */
function corners(path: Parsed): [number, number][] {
  const list = numbers(path.d);
  return Array.from({ length: list.length / 2 }, (_, i) => [list[2 * i], list[2 * i + 1]]);
}

function areaOf(points: readonly (readonly number[])[]): number {
  const twice = points.reduce((sum, [x, y], i) => {
    const [x2, y2] = points[(i + 1) % points.length];
    return sum + x * y2 - x2 * y;
  }, 0);
  return Math.abs(twice) / 2;
}

const cube = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
const solids: [string, Arrangement][] = [
  ['cube', arrangementOf(cube)],
  ['B3', buildArrangement(reflectionArrangement('B3'))],
  ['polar zonohedron', buildArrangement(polarZonohedron(12))],
  ['A3 in four coordinates', arrangementOf(typeA(3))],
  ['parallel generators', arrangementOf([...cube, [1, 1, 1], [2, 0, 0]])],
];

describe.each(solids)('the solid: %s', (_, arrangement) => {
  const solid = buildSolid(arrangement, { kind: 'own' });
  const text = drawZonotope(arrangement);
  const svg = parse(text);

  it('shows half of its faces, since each has an opposite, and every edge once', () => {
    expect(group(svg, 'faces').path.length).toBe(solid.faces.length / 2);
    const front = group(svg, 'edges').line.length;
    const behind = group(svg, 'edges-behind').line.length;
    expect(front + behind).toBe(solid.edges.length);
    // Central symmetry: the edges behind are the opposites of those in front that are no outline.
    const outline = front - behind;
    expect(outline).toBeGreaterThanOrEqual(6);
    expect(outline % 2).toBe(0);
    expect(group(svg, 'edges-behind')['stroke-dasharray']).toBeTruthy();
  });

  it('fills its outline: the faces in front lie side by side', () => {
    const faces = group(svg, 'faces').path.map(corners);
    const total = faces.reduce((sum: number, face: [number, number][]) => sum + areaOf(face), 0);
    // The outline is the convex hull of all that is drawn (A. Andrew, 1979, its monotone chain).
    const points: [number, number][] = faces
      .flat()
      .sort((a: number[], b: number[]) => a[0] - b[0] || a[1] - b[1]);
    const half = (list: [number, number][]) => {
      const chain: [number, number][] = [];
      for (const p of list) {
        while (chain.length > 1) {
          const [a, b] = chain.slice(-2);
          if ((b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]) > 0) break;
          chain.pop();
        }
        chain.push(p);
      }
      return chain.slice(0, -1);
    };
    const hull = [...half(points), ...half([...points].reverse())];
    expect(total / areaOf(hull)).toBeCloseTo(1, 2);
  });

  it('numbers each normal at most once, keeps inside the sheet, and is the same again', () => {
    const labels = textsOf(svg, 'numbers');
    expect(new Set(labels).size).toBe(labels.length);
    expect(labels.length).toBeGreaterThan(arrangement.hyperplanes.length / 2);
    const [, , width, height] = numbers(svg.viewBox);
    for (const { x, y } of group(svg, 'signs').text ?? []) {
      expect(
        Number(x) > 20 && Number(x) < width - 20 && Number(y) > 20 && Number(y) < height - 20,
      ).toBe(true);
    }
    expect(drawZonotope(arrangement)).toBe(text);
    const parts: number[] = textsOf(svg, 'key')
      .filter((t) => /^\d+ (quad|hex|oct|dec|faces)/.test(t))
      .map((t) => Number.parseInt(t, 10));
    expect(parts.reduce((sum, x) => sum + x, 0)).toBe(solid.faces.length);
  });
});

describe('views', () => {
  it('straight on show one face of the cube', () => {
    const svg = parse(drawZonotope(arrangementOf(cube), { view: [0, -1, 0] }));
    expect(group(svg, 'faces').path.length).toBe(1);
    expect(group(svg, 'edges').line.length).toBe(4);
    expect(words(svg.desc)).toContain('1 faces are in front');
  });

  it('from opposite sides show complementary faces', () => {
    const arrangement = solids[1][1];
    const shapes = [1, -1].map((s) =>
      group(parse(drawZonotope(arrangement, { view: [3 * s, -5 * s, 2 * s] })), 'faces').path.map(
        (p: Parsed) => words(p.title),
      ),
    );
    expect([...shapes[0]].sort()).toEqual([...shapes[1]].sort());
  });
});

describe('the marked vertex', () => {
  const arrangement = arrangementOf(cube);
  it('is in front in a view that was chosen', () => {
    for (let k = 0; k < 8; k++) {
      const region = [0, 1, 2].map((i) => ((k >> i) & 1 ? '+' : '-')).join('');
      const svg = parse(drawZonotope(arrangement, { region }));
      expect(words(svg.desc)).toContain(`The vertex of the region ${region} is marked.`);
      const [cx, cy] = ['cx', 'cy'].map((c) => Number(group(svg, 'mark').circle[0][c]));
      const dot = group(svg, 'vertices').circle.find(
        (c: Parsed) => Number(c.cx) === cx && Number(c.cy) === cy,
      );
      expect(words(dot.title).startsWith(`${region}: vertex`)).toBe(true);
      expect(textsOf(svg, 'signs')).toContain(region);
    }
  });

  it('is hollow, and said to be behind, in a view that hides it', () => {
    const svg = parse(drawZonotope(arrangement, { region: '---', view: [3, 2, 1] }));
    expect(words(svg.desc)).toContain('is marked, behind');
    expect(group(svg, 'mark').circle.map((c: Parsed) => c.fill)).toEqual(['#ffffff', '#ffffff']);
  });

  it('must be one of the zonotope', () => {
    const four = arrangementOf([...cube, [1, 1, 1]]);
    expect(() => drawZonotope(four, { region: '+++-' })).toThrow(/no region of the arrangement/);
    expect(() => drawZonotope(four, { region: '+++' })).toThrow(/not 4 signs/);
    expect(() => drawZonotope(four, { region: '+0++' })).toThrow(/not 4 signs/);
  });
});

describe('polygons', () => {
  const rows = [
    [2, 0],
    [1, 2],
    [-1, 1],
    [3, 0],
  ];
  const half = (low: number) => ({ low: exactNumber(BigInt(low), 0n, 2n), high: exactNumber(1n) });
  const arrangement = arrangementOf(rows, { ranges: [-3, 0, -1, 1].map(half) });
  const svg = parse(drawZonotope(arrangement));

  it('are to scale: their area over that of a known square is the exact area', () => {
    const sides = group(svg, 'edges').line;
    expect(sides.length).toBe(6);
    const points = sides.map((l: Parsed) => [Number(l.x1), Number(l.y1)]);
    const exact = volumeBySubsets(arrangement);
    // The lowest side runs along x: the parallel normals 1 and 4, 2 times 5/2 and 3 times 1/2.
    const lowest = sides.reduce((a: Parsed, b: Parsed) =>
      Number(a.y1) + Number(a.y2) > Number(b.y1) + Number(b.y2) ? a : b,
    );
    const unit = Math.abs(Number(lowest.x2) - Number(lowest.x1)) / 6.5;
    expect(areaOf(points) / unit ** 2).toBeCloseTo(Number(exact.a) / Number(exact.d), 1);
  });

  it('bear the signs of each vertex, and the numbers of each side', () => {
    const titles = group(svg, 'vertices').circle.map((c: Parsed) => words(c.title).split(':')[0]);
    expect(new Set(textsOf(svg, 'signs'))).toEqual(new Set(titles));
    expect(textsOf(svg, 'numbers').sort()).toEqual(['1+4', '1+4', '2', '2', '3', '3']);
  });

  it('are what a projection onto two coordinates draws', () => {
    const shadow = parse(
      drawZonotope(solids[1][1], { projection: { kind: 'coordinates', coordinates: [0, 2] } }),
    );
    expect(group(shadow, 'edges').line.length).toBe(8);
  });
});

describe('tilings', () => {
  const flat = arrangementOf([
    [3, 0],
    [2, 1],
    [1, 2],
    [0, 3],
    [-1, 2],
    [2, 4],
  ]);
  const tiles = [...tilesOf(flat)];

  it('in the plane draw every tile: open sides dashed, one corner of each filled', () => {
    const svg = parse(drawTiling(flat));
    const count = (k: number) => tiles.filter((tile) => tile.generators.length === k).length;
    expect(group(svg, 'insides').path.length).toBe(count(2));
    const sides = group(svg, 'sides').line;
    expect(sides.length).toBe(4 * count(2));
    expect(sides.filter((l: Parsed) => l['stroke-dasharray']).length).toBe(2 * count(2));
    expect(group(svg, 'segments').line.length).toBe(count(1));
    // One corner of each parallelogram, one end of each segment, and the point.
    const filled = group(svg, 'corners').circle.filter((c: Parsed) => c.fill !== '#ffffff');
    expect(filled.length).toBe(count(2) + count(1) + count(0));
    const labels = tiles
      .filter((t) => t.generators.length === 2)
      .map((t) => t.generators.map((j) => j + 1).join(','));
    for (const text of textsOf(svg, 'numbers')) expect(labels).toContain(text);
  });

  it('in space draw every block with three faces, those dashed around that are open', () => {
    const arrangement = buildArrangement(reflectionArrangement('B3'));
    const blocks = [...tilesOf(arrangement)].filter((tile) => tile.generators.length === 3);
    const svg = parse(drawTiling(arrangement, { view: [-31, -17, 8] }));
    const drawn = group(svg, 'blocks').g;
    expect(drawn.length).toBe(blocks.length);
    for (const { path, line } of drawn) {
      expect(path.length).toBe(3);
      expect(line.length).toBe(9);
      // An edge that belongs bounds only faces that do.
      const open = path.filter((p: Parsed) => p.fill === '#ffffff').length;
      expect(line.filter((l: Parsed) => l['stroke-dasharray']).length).toBeGreaterThanOrEqual(
        [0, 4, 7, 9][open],
      );
    }
    expect(new Set(drawn.map((g: Parsed) => words(g.title))).size).toBe(blocks.length);
  });

  it('in space are painted from the back: no block hides one that is painted later', () => {
    const next = sequence(7);
    const hidden: string[] = [];
    for (let round = 0; round < 12; round++) {
      const rows = Array.from({ length: 5 }, () => [0, 1, 2].map(() => next(9) - 4));
      const arrangement = arrangementOf([
        ...cube,
        ...rows.filter((row) => row.some((x) => x !== 0)),
      ]);
      const blocks = [...tilesOf(arrangement)].filter((tile) => tile.generators.length === 3);
      const placed = placeTiles(projectArrangement(arrangement, { kind: 'own' }), blocks);
      const corners = blocks.map((_, b) =>
        Array.from({ length: 8 }, (__, k): Spot => {
          const at = (i: number, c: number) => placed[3 * (8 * b + c) + i];
          const x = [0, 1, 2].map((i) => at(i, k) + 0.4 * (at(i, 0) + at(i, 7)));
          return [x[0], x[1], x[2]];
        }),
      );
      const camera = cameraFrom([next(99) - 49.5, next(99) - 49.5, next(99) - 49.5]);
      const order = depthOrder(corners, camera);
      expect([...order].sort((a, b) => a - b)).toEqual(blocks.map((_, b) => b));
      order.forEach((b, i) => {
        for (const earlier of order.slice(0, i)) {
          // A line of sight from a point of b to the eye may not meet what was painted before.
          for (let sample = 0; sample < 8; sample++) {
            const share = [0, 1, 2].map(() => (next(98) + 1) / 100);
            const [o, u, v, w] = [0, 1, 2, 4].map((k) => corners[b][k]);
            const point = [0, 1, 2].map(
              (c) =>
                o[c] + [u, v, w].reduce((sum, edge, s) => sum + share[s] * (edge[c] - o[c]), 0),
            );
            if (rayMeets(corners[earlier], point, camera.eye)) hidden.push(`${earlier} over ${b}`);
          }
        }
      });
    }
    expect(hidden).toEqual([]);
  });
});

/** Whether point + t eye, t > 0, passes through the inside of a block: its coordinates, clipped. */
function rayMeets(corners: readonly Spot[], point: readonly number[], eye: Spot): boolean {
  const [o, ...edges] = [0, 1, 2, 4].map((k) => corners[k]);
  const [u, v, w] = edges.map((edge): Spot => [edge[0] - o[0], edge[1] - o[1], edge[2] - o[2]]);
  const volume = dot(u, cross(v, w));
  const from: Spot = [point[0] - o[0], point[1] - o[1], point[2] - o[2]];
  let [enter, leave] = [0, Infinity];
  for (const normal of [cross(v, w), cross(w, u), cross(u, v)]) {
    const [start, step] = [dot(from, normal) / volume, dot(eye, normal) / volume];
    const ends = [(0 - start) / step, (1 - start) / step];
    enter = Math.max(enter, Math.min(...ends));
    leave = Math.min(leave, Math.max(...ends));
  }
  return leave - enter > 1e-9;
}

describe('limits', () => {
  const generic = (n: number, d: number) =>
    arrangementOf(
      Array.from({ length: n }, (_, i) => Array.from({ length: d }, (__, k) => (i + 1) ** k)),
    );

  it('leave words out past what can be read, and say so', () => {
    const svg = parse(drawZonotope(generic(22, 3)));
    expect(group(svg, 'signs').text).toBeUndefined();
    expect(group(svg, 'edges-behind').line).toBeUndefined();
    expect(textsOf(svg, 'legend').join(' ')).toContain('too many faces to read them');
    const wide = parse(drawTiling(generic(40, 2)));
    expect(textsOf(wide, 'legend').join(' ')).toContain('too many tiles to read them');
  });

  it('refuse what ink cannot show', () => {
    expect(() => drawZonotope(generic(110, 3))).toThrow(LimitError);
    expect(() => drawTiling(generic(20, 3))).toThrow(LimitError);
    expect(() => drawTiling(generic(200, 2))).toThrow(LimitError);
  });

  it('name the remedy for ranks that have no picture', () => {
    for (const draw of [drawZonotope, drawTiling]) {
      expect(() => draw(generic(5, 4))).toThrow(/--project/);
      expect(() => draw(arrangementOf([[1, 2]]))).toThrow(/segment/);
    }
  });
});

describe('words', () => {
  const hostile = '</title><script>alert("x")</script> & ]]>\u0000\u0007\ud800 浮標';
  const hostileList = (rows: number[][]) =>
    buildArrangement({
      ...generatorsOf(rows),
      title: hostile,
      coordinates: rows[0].map((_, i) => `<c${i} onload="x">`),
      labels: rows.map((_, j) => `<b onload="${j}">&amp;\u0001`),
    });

  it('of an input stay words', () => {
    for (const rows of [
      [
        [1, 0],
        [0, 1],
        [1, 1],
      ],
      cube,
    ]) {
      for (const draw of [drawZonotope, drawTiling]) {
        const text = draw(hostileList(rows), { idPrefix: '" onload="x' });
        const svg = parse(text);
        expect(text).not.toContain('<script');
        expect(text).not.toContain('<b ');
        expect(svg.onload).toBeUndefined();
        expect([...'\u0000\u0001\u0007'].some((character) => text.includes(character))).toBe(false);
        expect(words(svg.title)).toContain('<script>alert("x")</script>');
        expect(svg['aria-labelledby']).toBe(`${svg.title.id} ${svg.desc.id}`);
        expect(words(svg.desc).length).toBeGreaterThan(60);
      }
    }
  });
});

describe('pictures that were looked at', () => {
  const folder = fileURLToPath(new URL('./references/', import.meta.url));
  // Coordinates to the nearest point: far below what an eye sees on a sheet.
  const normalised = (text: string) =>
    text.replace(/-?\d+\.\d+/g, (number) => `${Math.round(Number(number)) + 0}`);
  const hexagon = [
    [1, 0],
    [0, 1],
    [1, 1],
  ];
  const diagonals = [
    [1, 1, 1],
    [1, 1, -1],
    [1, -1, 1],
    [-1, 1, 1],
  ];

  it.each([
    ['zonotope-hexagon', hexagon, (a) => drawZonotope(a, { region: '+-+' })],
    ['zonotope-a3', typeA(3), (a) => drawZonotope(a)],
    ['zonotope-diagonals', diagonals, (a) => drawZonotope(a, { view: [3, -5, 2] })],
    ['tiling-hexagon', hexagon, (a) => drawTiling(a)],
    ['tiling-diagonals', diagonals, (a) => drawTiling(a)],
  ] as [string, number[][], (a: Arrangement) => string][])(
    '%s is as it was',
    (name, rows, draw) => {
      const arrangement = buildArrangement({ ...generatorsOf(rows), title: name });
      const file = `${folder}${name}.svg`;
      expect(existsSync(file)).toBe(true);
      expect(normalised(draw(arrangement))).toBe(normalised(readFileSync(file, 'utf8')));
    },
  );
});
