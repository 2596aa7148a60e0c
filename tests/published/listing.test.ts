// Regions and faces, listed one by one, against published counts.
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { countFaces } from '../../src/face/faces.js';
import { genericNormals } from '../../src/input/families/generic.js';
import { completeGraph, cycleGraph, gridGraph } from '../../src/input/families/graph.js';
import { polarZonohedron } from '../../src/input/families/polar.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { allSubsets, thresholdNormals } from '../../src/input/families/subsets.js';
import { listRegions, regionCount } from '../../src/region/regions.js';
import { listOf } from '../support/lists.js';

/** Faces of the zonotope by dimension, as the tables give them: cones by codimension. */
const zonotopeFaces = (arrangement: Arrangement): string =>
  countFaces(arrangement).reverse().join(' ');

const regionsOf = (arrangement: Arrangement): number => regionCount(listRegions(arrangement));

describe('reflection arrangements', () => {
  // Regions: product of (1 + exponent) (P. Orlik, L. Solomon, 1980, Combinatorics and topology of
  // complements of hyperplanes; exponents: J. Humphreys, 1990, Reflection Groups and Coxeter Groups,
  // section 3.20). Faces of type A_n in all: ordered Bell numbers, OEIS A000670; of type B: A080253.
  // f-vectors: computed by two separate slow programs.
  it.each([
    ['A3', '24 36 14 1'],
    ['A4', '120 240 150 30 1'],
    ['A5', '720 1800 1560 540 62 1'],
    ['A6', '5040 15120 16800 8400 1806 126 1'],
    ['B3', '48 72 26 1'],
    ['B4', '384 768 464 80 1'],
    ['B5', '3840 9600 8160 2640 242 1'],
    ['C4', '384 768 464 80 1'],
    ['D4', '192 384 240 48 1'],
    ['D5', '1920 4800 4160 1440 162 1'],
    ['G2', '12 12 1'],
    ['H3', '120 180 62 1'],
    ['F4', '1152 2304 1392 240 1'],
    ['H4', '14400 28800 17040 2640 1'],
    ['E6', '51840 155520 172800 86400 18558 1278 1'],
  ])('%s', (type, faces) => {
    const arrangement = buildArrangement(reflectionArrangement(type));
    expect(zonotopeFaces(arrangement)).toBe(faces);
    expect(regionsOf(arrangement)).toBe(Number(faces.split(' ')[0]));
  });

  it('A1 to A6 have 3, 13, 75, 541, 4683, 47293 faces (OEIS A000670)', () => {
    const totals = [1, 2, 3, 4, 5, 6].map((n) =>
      countFaces(buildArrangement(reflectionArrangement(`A${n}`))).reduce((sum, x) => sum + x, 0),
    );
    expect(totals).toEqual([3, 13, 75, 541, 4683, 47293]);
  });

  it('B1 to B5 have 3, 17, 147, 1697, 24483 faces (OEIS A080253)', () => {
    const totals = [1, 2, 3, 4, 5].map((n) =>
      countFaces(buildArrangement(reflectionArrangement(`B${n}`))).reduce((sum, x) => sum + x, 0),
    );
    expect(totals).toEqual([3, 17, 147, 1697, 24483]);
  });

  it('I2(m) has 2m regions, over three quadratic fields too', () => {
    for (const m of [3, 4, 5, 6, 8, 10, 12]) {
      expect(regionsOf(buildArrangement(reflectionArrangement(`I2(${m})`)))).toBe(2 * m);
    }
  });

  it('E7 has 2903040 regions', () => {
    expect(regionsOf(buildArrangement(reflectionArrangement('E7')))).toBe(2903040);
  });
});

describe('0/1 vectors and thresholds', () => {
  it('all nonzero 0/1 vectors in R^d (OEIS A034997)', () => {
    const counts = [1, 2, 3, 4, 5, 6].map((d) => regionsOf(buildArrangement(allSubsets(d))));
    expect(counts).toEqual([2, 6, 32, 370, 11292, 1066044]);
  });

  it('their faces (computed by two separate slow programs)', () => {
    expect(zonotopeFaces(buildArrangement(allSubsets(3)))).toBe('32 48 18 1');
    expect(zonotopeFaces(buildArrangement(allSubsets(4)))).toBe('370 760 480 90 1');
    expect(zonotopeFaces(buildArrangement(allSubsets(5)))).toBe('11292 30540 28680 10680 1250 1');
  });

  it('threshold functions (S. Muroga, 1971, Threshold Logic and its Applications, table 2.3.2)', () => {
    const counts = [0, 1, 2, 3, 4, 5].map((n) => regionsOf(buildArrangement(thresholdNormals(n))));
    expect(counts).toEqual([2, 4, 14, 104, 1882, 94572]);
    expect(zonotopeFaces(buildArrangement(thresholdNormals(3)))).toBe('104 256 192 40 1');
  });
});

describe('graphs', () => {
  it('regions are acyclic orientations (R. Stanley, 1973, Acyclic orientations of graphs)', () => {
    expect(regionsOf(buildArrangement(cycleGraph(4)))).toBe(14);
    expect(regionsOf(buildArrangement(cycleGraph(5)))).toBe(30);
    expect(regionsOf(buildArrangement(completeGraph(4)))).toBe(24);
    expect(regionsOf(buildArrangement(completeGraph(5)))).toBe(120);
    // A 2 x 2 grid is the cycle of four; a 1 x 6 grid a path: 2^5 orientations, all acyclic.
    expect(regionsOf(buildArrangement(gridGraph(2, 2)))).toBe(14);
    expect(regionsOf(buildArrangement(gridGraph(1, 6)))).toBe(32);
  });

  it('K4 less an edge has 18 and the cube graph 1862 acyclic orientations (chromatic polynomials)', () => {
    const edges = (pairs: number[][], n: number) =>
      listOf(
        pairs.map(([i, j]) =>
          Array.from({ length: n }, (_, k) => Number(k === i) - Number(k === j)),
        ),
      );
    const pairs = [0, 1, 2, 3].flatMap((i) => [1, 2, 3].filter((j) => j > i).map((j) => [i, j]));
    expect(regionsOf(buildArrangement(edges(pairs.slice(1), 4)))).toBe(18);
    const cube = Array.from({ length: 8 }, (_, v) => v).flatMap((v) =>
      [1, 2, 4].filter((bit) => (v & bit) === 0).map((bit) => [v, v | bit]),
    );
    expect(regionsOf(buildArrangement(edges(cube, 8)))).toBe(1862);
  });
});

describe('generic normals', () => {
  const choose = (n: number, k: number): number =>
    k < 0 || k > n ? 0 : k === 0 ? 1 : (choose(n - 1, k - 1) * n) / k;
  it.each([
    [2, 9],
    [3, 12],
    [4, 11],
    [5, 10],
    [6, 9],
  ])('rank %i, %i normals: T. Cover, 1965, theorem 1; T. Zaslavsky, 1975', (r, n) => {
    const arrangement = buildArrangement(genericNormals(r, n));
    const faces = countFaces(arrangement).reverse();
    for (let k = 0; k < r; k++) {
      let sum = 0;
      for (let i = 0; i < r - k; i++) sum += choose(n - 1 - k, i);
      expect(faces[k]).toBe(2 * choose(n, k) * sum);
    }
    expect(regionsOf(arrangement)).toBe(faces[0]);
  });
});

describe('zonohedra', () => {
  // Vertices, edges, faces: classical counts (common practice), computed by two slow programs.
  const golden = (rows: [number, number][][]) => buildArrangement(listOf(rows, 5n));
  // Twice the golden ratio is 1 + sqrt(5); doubling a coordinate system changes no count.
  const o: [number, number] = [0, 0];
  const two: [number, number] = [2, 0];
  const tau: [number, number] = [1, 1];
  const minus = ([a, b]: [number, number]): [number, number] => [-a, -b];
  it('rhombic triacontahedron over Q(sqrt(5)): 32 60 30', () => {
    const rows = [two, minus(two)].flatMap((x) => [
      [o, x, tau],
      [x, tau, o],
      [tau, o, x],
    ]);
    expect(zonotopeFaces(golden(rows))).toBe('32 60 30 1');
  });

  it('truncated cuboctahedron: 48 72 26', () => {
    expect(zonotopeFaces(buildArrangement(reflectionArrangement('B3')))).toBe('48 72 26 1');
  });

  it('polar zonohedra: n^2-n+2, 2n(n-1), n(n-1)', () => {
    for (const n of [3, 4, 5, 8, 13]) {
      expect(zonotopeFaces(buildArrangement(polarZonohedron(n)))).toBe(
        `${n * n - n + 2} ${2 * n * (n - 1)} ${n * (n - 1)} 1`,
      );
    }
  });

  it('rhombic dodecahedron 14 24 12, rhombic enneacontahedron 92 180 90', () => {
    const diagonals = [
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
    ];
    expect(zonotopeFaces(buildArrangement(listOf(diagonals)))).toBe('14 24 12 1');
    // The ten three-fold axes of the icosahedron: (1,1,1) with signs, and (0, 1/tau, tau) cyclic.
    const axes: [number, number][][] = [
      [two, two, two],
      [two, two, minus(two)],
      [two, minus(two), two],
      [minus(two), two, two],
    ];
    const inverse: [number, number] = [-1, 1];
    for (const x of [inverse, minus(inverse)]) {
      axes.push([o, x, tau], [x, tau, o], [tau, o, x]);
    }
    expect(zonotopeFaces(golden(axes))).toBe('92 180 90 1');
  });
});

describe('one polynomial, two arrangements', () => {
  it('five planes through a line and two more, against the seven 0/1 vectors', () => {
    const pencil = listOf([
      [1, 0, 0],
      [0, 1, 0],
      [1, 1, 0],
      [1, 2, 0],
      [1, 3, 0],
      [0, 0, 1],
      [1, 7, 1],
    ]);
    // Both have chi = t^3 - 7 t^2 + 15 t - 9 and so 32 regions; the faces differ (computed by two
    // separate slow programs).
    expect(zonotopeFaces(buildArrangement(pencil))).toBe('32 54 24 1');
    expect(zonotopeFaces(buildArrangement(allSubsets(3)))).toBe('32 48 18 1');
  });
});
