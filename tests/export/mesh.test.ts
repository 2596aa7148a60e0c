// Mesh files read back: glTF by an independent reader, the line formats by small readers here. What
// comes back must be the exact surface with its coordinates rounded: closed, outward, of the volume
// that the generators' determinants add up to.
import { type Document, NodeIO } from '@gltf-transform/core';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { exactNumber } from '../../src/exact/number.js';
import { type MeshFormat, meshFormatOf, meshText } from '../../src/export/mesh.js';
import { polarZonohedron } from '../../src/input/families/polar.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { buildSolid, type Solid } from '../../src/zonotope/solid.js';
import { euclideanVolume, volumeBySubsets } from '../../src/zonotope/volume.js';
import { arrangementOf, generatorsOf, typeA } from '../support/arrangements.js';

interface Mesh {
  readonly points: number[][];
  /** 0-based corners. */
  readonly faces: number[][];
}

const own = { kind: 'own' } as const;
const write = (format: MeshFormat, solid: Solid) => [...meshText(format, solid)].join('');

function readObj(text: string): Mesh & { groups: string[][] } {
  const [points, faces, groups]: [number[][], number[][], string[][]] = [[], [], []];
  let group: string[] = [];
  for (const line of text.split('\n')) {
    const [word, ...rest] = line.split(' ');
    if (word === 'v') points.push(rest.map(Number));
    else if (word === 'g') group = rest;
    else if (word === 'f') {
      faces.push(rest.map((v) => Number(v) - 1));
      groups.push(group);
    } else expect(['', '#', 'o']).toContain(word);
  }
  return { points, faces, groups };
}

function readPly(text: string): Mesh & { edges: number[][]; comments: string[] } {
  const [head, body] = text.split('end_header\n');
  const header = head.trimEnd().split('\n');
  expect(header.slice(0, 2)).toEqual(['ply', 'format ascii 1.0']);
  const count = (name: string) =>
    Number(header.find((line) => line.startsWith(`element ${name} `))!.split(' ')[2]);
  const rows = body
    .trimEnd()
    .split('\n')
    .map((line) => line.split(' ').map(Number));
  const [v, f] = [count('vertex'), count('face')];
  expect(rows.length).toBe(v + f + count('edge'));
  for (const line of header.slice(2)) expect(line).toMatch(/^(comment|element|property) \S/);
  return {
    points: rows.slice(0, v),
    faces: rows.slice(v, v + f).map(([sides, ...rest]) => {
      expect(rest.length).toBe(sides + 3);
      return rest.slice(0, sides);
    }),
    edges: rows.slice(v + f),
    comments: header.flatMap((line) => (line.startsWith('comment ') ? [line.slice(8)] : [])),
  };
}

function readStl(text: string): { triangles: number[][][]; normals: number[][]; name: string } {
  const numbers = (line: string) => line.trim().split(' ').slice(-3).map(Number);
  const lines = text.trimEnd().split('\n');
  const name = lines[0].replace(/^solid /, '');
  expect(lines[lines.length - 1]).toBe(`endsolid ${name}`);
  const [triangles, normals]: [number[][][], number[][]] = [[], []];
  for (let i = 1; i + 1 < lines.length; i += 7) {
    expect(lines[i]).toMatch(/^facet normal( \S+){3}$/);
    expect([1, 5, 6].map((k) => lines[i + k].trim())).toEqual([
      'outer loop',
      'endloop',
      'endfacet',
    ]);
    normals.push(numbers(lines[i]));
    triangles.push([2, 3, 4].map((k) => numbers(lines[i + k])));
  }
  return { triangles, normals, name };
}

async function readGltf(
  text: string,
): Promise<{ document: Document; mesh: Mesh; lines: number[][] }> {
  const document = await new NodeIO().readJSON({ json: JSON.parse(text), resources: {} });
  const points: number[][] = [];
  const [faces, lines]: [number[][], number[][]] = [[], []];
  for (const primitive of document
    .getRoot()
    .listMeshes()
    .flatMap((m) => m.listPrimitives())) {
    const positions = primitive.getAttribute('POSITION')!;
    points.length = 0;
    for (let v = 0; v < positions.getCount(); v++) points.push(positions.getElement(v, []));
    const step = primitive.getMode() === 4 ? 3 : 2;
    const indices = [...primitive.getIndices()!.getArray()!];
    for (let i = 0; i < indices.length; i += step) {
      (step === 3 ? faces : lines).push(indices.slice(i, i + step));
    }
  }
  return { document, mesh: { points, faces }, lines };
}

const det = ([u, v, w]: readonly number[][]): number =>
  u[0] * (v[1] * w[2] - v[2] * w[1]) -
  u[1] * (v[0] * w[2] - v[2] * w[0]) +
  u[2] * (v[0] * w[1] - v[1] * w[0]);

/** The flux of the position through the triangles, over 3. */
function volumeOf(triangles: readonly number[][][]): number {
  return triangles.reduce((sum, corners) => sum + det(corners), 0) / 6;
}

function fans({ points, faces }: Mesh): number[][][] {
  return faces.flatMap((face) =>
    face.slice(2).map((_, i) => [face[0], face[i + 1], face[i + 2]].map((v) => points[v])),
  );
}

function expectClosed(faces: readonly number[][], vertices: number): void {
  const sides = faces.flatMap((face) => face.map((v, i) => `${v} ${face[(i + 1) % face.length]}`));
  const set = new Set(sides);
  expect(set.size).toBe(sides.length);
  expect(sides.every((side) => set.has(side.split(' ').reverse().join(' ')))).toBe(true);
  expect(vertices - sides.length / 2 + faces.length).toBe(2);
}

const half = (twice: number) => exactNumber(BigInt(twice), 0n, 2n);
const figures: [string, Arrangement][] = [
  [
    'rhombic dodecahedron',
    arrangementOf([
      [1, 1, 1],
      [1, 1, -1],
      [1, -1, 1],
      [-1, 1, 1],
    ]),
  ],
  ['great rhombicuboctahedron', buildArrangement(reflectionArrangement('B3'))],
  ['great rhombicosidodecahedron', buildArrangement(reflectionArrangement('H3'))],
  ['polar zonohedron', buildArrangement(polarZonohedron(9))],
  ['truncated octahedron in four coordinates', arrangementOf(typeA(3))],
  [
    'parallel generators with ranges',
    arrangementOf(
      [
        [3, 0, 1],
        [-6, 0, -2],
        [0, 5, 0],
        [1, 1, 3],
        [2, -1, 0],
      ],
      {
        ranges: [-3, 0, 1, -1, -7].map((low) => ({ low: half(low), high: half(low + 3) })),
      },
    ),
  ],
];

describe.each(figures)('%s', (_, arrangement) => {
  const solid = buildSolid(arrangement, own);
  const exact = Number(euclideanVolume(arrangement, volumeBySubsets(arrangement)).decimal);
  const corners = solid.faces.map((face) => [...face.vertices]);

  it('comes back from OBJ', () => {
    const mesh = readObj(write('obj', solid));
    expect(mesh.faces).toEqual(corners);
    expectClosed(mesh.faces, mesh.points.length);
    expect(volumeOf(fans(mesh)) / exact).toBeCloseTo(1, 9);
  });

  it('comes back from PLY, edges along their normals', () => {
    const mesh = readPly(write('ply', solid));
    expect(mesh.faces).toEqual(corners);
    expect(mesh.points).toEqual(readObj(write('obj', solid)).points);
    expect(mesh.edges.length).toBe(solid.edges.length);
    const parallel = (u: number[], v: number[]) =>
      Math.hypot(
        ...[0, 1, 2].map((i) => u[(i + 1) % 3] * v[(i + 2) % 3] - u[(i + 2) % 3] * v[(i + 1) % 3]),
      );
    const step = (edge: number[]) =>
      mesh.points[edge[1]].map((x, i) => x - mesh.points[edge[0]][i]);
    const first = new Map<number, number[]>();
    for (const edge of mesh.edges) {
      const known = first.get(edge[2]) ?? step(edge);
      first.set(edge[2], known);
      expect(parallel(step(edge), known)).toBeLessThan(1e-9);
    }
    expect(first.size).toBe(arrangement.hyperplanes.length);
  });

  it('comes back from STL, normals outward', () => {
    const { triangles, normals } = readStl(write('stl', solid));
    expect(volumeOf(triangles) / exact).toBeCloseTo(1, 9);
    triangles.forEach(([p, q, r], i) => {
      const minus = (a: number[], b: number[]) => a.map((x, c) => x - b[c]);
      const [u, v] = [minus(q, p), minus(r, p)];
      const cross = [0, 1, 2].map(
        (c) => u[(c + 1) % 3] * v[(c + 2) % 3] - u[(c + 2) % 3] * v[(c + 1) % 3],
      );
      normals[i].forEach((x, c) => {
        expect(x).toBeCloseTo(cross[c] / Math.hypot(...cross), 6);
      });
    });
  });

  it('comes back from glTF through an independent reader', async () => {
    const { mesh, lines } = await readGltf(write('gltf', solid));
    expect(mesh.points.length).toBe(solid.vertices.length);
    expectClosed(mesh.faces, mesh.points.length);
    expect(volumeOf(fans(mesh)) / exact).toBeCloseTo(1, 5);
    expect(lines.length).toBe(solid.edges.length);
    const points = readObj(write('obj', solid)).points;
    expect(mesh.points).toEqual(points.map((point) => point.map(Math.fround)));
  });
});

describe('numbers', () => {
  it('are the shortest decimals of the doubles nearest to the exact ones', () => {
    const generators = generatorsOf(
      [
        [1, 0, 0],
        [0, [0, 1], 0],
        [0, 0, 1],
      ],
      { radicand: 2n },
    );
    const third = {
      ...generators,
      normals: [
        [exactNumber(1n, 0n, 3n), ...generators.normals[0].slice(1)],
        ...generators.normals.slice(1),
      ],
    };
    const { points } = readObj(write('obj', buildSolid(buildArrangement(third), own)));
    const text = write('obj', buildSolid(buildArrangement(third), own));
    expect(new Set(points.flat())).toEqual(new Set([0, 1 / 3, Math.SQRT2, 1]));
    expect(text).toContain(`v ${1 / 3} ${Math.SQRT2} 1\n`);
  });

  it('that would fall together are refused with a format that holds them', () => {
    const near = (digits: number) => {
      const thin = exactNumber(1n, 0n, 10n ** BigInt(digits));
      const { normals, ...rest } = generatorsOf([
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
        [1, 0, 0],
      ]);
      const apart = normals.map((v, j) => (j === 3 ? [thin, thin, thin] : v));
      const ranges = apart.map(() => ({ low: exactNumber(1n), high: exactNumber(2n) }));
      return buildSolid(buildArrangement({ ...rest, normals: apart, ranges }), own);
    };
    expect(() => write('stl', near(9))).toThrow(/32-bit floats.*OBJ or PLY/);
    expect(() => write('gltf', near(9))).toThrow(/32-bit floats.*OBJ or PLY/);
    expect(readObj(write('obj', near(9))).points.length).toBe(14);
    expect(() => write('obj', near(30))).toThrow(/differ by less than the doubles/);
    const huge = arrangementOf([
      [10n ** 400n, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]);
    expect(() => write('ply', buildSolid(huge, own))).toThrow(/range of doubles/);
    const large = arrangementOf([
      [10n ** 40n, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]);
    expect(() => write('stl', buildSolid(large, own))).toThrow(/3.4e38/);
  });
});

describe('words', () => {
  const hostile = ['a b', 'a_b', 'x\ny\\', '"#\u0000}', '浮標 \u2028 é'];
  const arrangement = buildArrangement({
    ...generatorsOf([
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
      [1, 1, 1],
      [2, 0, 0],
    ]),
    title: 'solid\nendsolid "x" \\',
    labels: hostile,
  });
  const solid = buildSolid(arrangement, own);

  it('of an input stay on their lines', async () => {
    const obj = readObj(write('obj', solid));
    expect(write('obj', solid)).not.toMatch(/\\\n/);
    const names = new Set(obj.groups.flat());
    expect([...names].sort()).toEqual(['n1_a_b+n5_浮標_é', 'n2_a_b', 'n3_x_y', 'n4'].sort());
    expect(obj.groups.every((group) => group.length === 2)).toBe(true);
    expect(readPly(write('ply', solid)).comments.join('\n')).toContain('Normal 3 x y\\: 0 0 1');
    const { name } = readStl(write('stl', solid));
    expect(name).toBe('solid endsolid "x" \\: zonotope');
    const { document } = await readGltf(write('gltf', solid));
    const nodes = document
      .getRoot()
      .listNodes()
      .map((node) => node.getName());
    expect(nodes).toContain('edges along 1 a b + 5 浮標 é');
    expect(nodes[0]).toBe(name);
    const all = ['obj', 'ply', 'stl', 'gltf'].map((format) => write(format as MeshFormat, solid));
    expect(all.every((text) => !text.includes('\u0000') && !text.includes('\u2028'))).toBe(true);
  });

  it('say the order of vertices and what was rounded', () => {
    const notes = readPly(write('ply', solid)).comments.join('\n');
    expect(notes).toMatch(/Vertex order: that of the list of regions, a vertex a region/);
    expect(notes).toMatch(/rounded to the nearest double/);
    const ranged = write('obj', buildSolid(figures[5][1], own));
    expect(ranged).toContain('# Normal 2: -6 0 -2, from 0 to 3/2\n');
    const projected = buildSolid(arrangementOf(typeA(4)), { kind: 'principal' });
    expect(write('obj', projected)).toMatch(
      /# A projection of a zonotope of rank 4 in 5 coordinates/,
    );
    expect(write('obj', projected)).toMatch(/# Coordinates: axis 1 \(/);
  });
});

describe('formats', () => {
  it('are told by the ending', () => {
    expect(['a.obj', 'b.PLY', 'c/d.stl', 'e.gltf'].map(meshFormatOf)).toEqual([
      'obj',
      'ply',
      'stl',
      'gltf',
    ]);
    for (const name of ['a.glb', 'obj', 'a.obj.txt', 'a.constructor']) {
      expect(() => meshFormatOf(name)).toThrow(/end the name in/);
    }
  });
});
