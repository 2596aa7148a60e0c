// Flats, polynomials and f-vectors against published values.
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import {
  evaluatePolynomial,
  integerRoots,
  multiplyPolynomials,
} from '../../src/exact/polynomial.js';
import { characteristicPolynomialByDeletion } from '../../src/flat/by-deletion.js';
import { characteristicPolynomialByFlats } from '../../src/flat/by-flats.js';
import { faceCountsByMoebius } from '../../src/flat/by-moebius.js';
import { listFlats } from '../../src/flat/lattice.js';
import { completeGraph, cycleGraph } from '../../src/input/families/graph.js';
import { polarZonohedron } from '../../src/input/families/polar.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { thresholdNormals } from '../../src/input/families/subsets.js';
import type { GeneratorList } from '../../src/input/generators.js';
import { allSubsets, arrangementOf, type Entry, sequence } from '../support/arrangements.js';

const numbers = (text: string): number[] => text.split(' ').map(Number);

/** What a table says of an arrangement; polynomials from the highest power, faces by codimension. */
interface Published {
  readonly chi?: string;
  readonly exponents?: readonly number[];
  readonly flats?: string;
  readonly faces?: string;
}

function expectPublished(arrangement: Arrangement, published: Published): void {
  const lattice = listFlats(arrangement);
  const chi = characteristicPolynomialByFlats(lattice);
  expect(characteristicPolynomialByDeletion(arrangement)).toEqual(chi);
  const faces = faceCountsByMoebius(lattice);
  // T. Zaslavsky, 1975, Facing up to Arrangements, theorem A: the regions are |chi(-1)|.
  const regions = evaluatePolynomial(chi, -1n);
  expect(faces[arrangement.rank]).toBe(regions < 0n ? -regions : regions);
  if (published.chi !== undefined) {
    expect([...chi].reverse()).toEqual(numbers(published.chi).map(BigInt));
  }
  if (published.exponents !== undefined) {
    const product = published.exponents.reduce<bigint[]>(
      (p, e) => multiplyPolynomials(p, [BigInt(-e), 1n]),
      [1n],
    );
    expect(chi).toEqual(product);
    const roots = integerRoots(chi)!.flatMap((x) => new Array(x.multiplicity).fill(Number(x.root)));
    expect(roots).toEqual([...published.exponents].sort((a, b) => a - b));
  }
  if (published.flats !== undefined) {
    const { rankOffsets } = lattice;
    const byRank = Array.from(rankOffsets.subarray(1), (end, k) => end - rankOffsets[k]);
    expect(byRank).toEqual(numbers(published.flats));
  }
  if (published.faces !== undefined) {
    expect(faces.reverse()).toEqual(numbers(published.faces).map(BigInt));
  }
}

const built = (list: GeneratorList): Arrangement => buildArrangement(list);

describe('reflection arrangements', () => {
  // Exponents: J. Humphreys, 1990, Reflection Groups and Coxeter Groups, section 3.20, and chi their
  // product: P. Orlik, L. Solomon, 1980, Combinatorics and topology of complements of hyperplanes.
  // Flats and faces: computed by two slow independent programs.
  it.each<[string, number[], string, string]>([
    ['A3', [1, 2, 3], '1 6 7 1', '24 36 14 1'],
    ['A4', [1, 2, 3, 4], '1 10 25 15 1', '120 240 150 30 1'],
    ['A5', [1, 2, 3, 4, 5], '1 15 65 90 31 1', '720 1800 1560 540 62 1'],
    ['A6', [1, 2, 3, 4, 5, 6], '1 21 140 350 301 63 1', '5040 15120 16800 8400 1806 126 1'],
    ['B3', [1, 3, 5], '1 9 13 1', '48 72 26 1'],
    ['C3', [1, 3, 5], '1 9 13 1', '48 72 26 1'],
    ['B4', [1, 3, 5, 7], '1 16 58 40 1', '384 768 464 80 1'],
    ['B5', [1, 3, 5, 7, 9], '1 25 170 330 121 1', '3840 9600 8160 2640 242 1'],
    ['D4', [1, 3, 3, 5], '1 12 34 24 1', '192 384 240 48 1'],
    ['D5', [1, 3, 4, 5, 7], '1 20 110 190 81 1', '1920 4800 4160 1440 162 1'],
    ['G2', [1, 5], '1 6 1', '12 12 1'],
    ['H3', [1, 5, 9], '1 15 31 1', '120 180 62 1'],
    ['F4', [1, 5, 7, 11], '1 24 122 120 1', '1152 2304 1392 240 1'],
    ['H4', [1, 11, 19, 29], '1 60 722 1320 1', '14400 28800 17040 2640 1'],
    [
      'E6',
      [1, 4, 5, 7, 8, 11],
      '1 36 390 1530 2001 639 1',
      '51840 155520 172800 86400 18558 1278 1',
    ],
    [
      'E7',
      [1, 5, 7, 9, 11, 13, 17],
      '1 63 1281 10395 33411 36435 8821 1',
      '2903040 10160640 13789440 9072000 2938320 415800 17642 1',
    ],
  ])('%s', (type, exponents, flats, faces) => {
    expectPublished(built(reflectionArrangement(type)), { exponents, flats, faces });
  });

  it('of type A and B have the flats of set partitions, plain and signed', () => {
    // OEIS A000110 (Bell numbers) and A007405 (Dowling numbers): flats in total.
    const total = (type: string) => listFlats(built(reflectionArrangement(type))).flatCount;
    expect(['A1', 'A2', 'A3', 'A4', 'A5', 'A6'].map(total)).toEqual([2, 5, 15, 52, 203, 877]);
    expect(['B1', 'B2', 'B3', 'B4', 'B5'].map(total)).toEqual([2, 6, 24, 116, 648]);
  });

  it('of type A and B have the faces of ordered partitions, plain and signed', () => {
    // OEIS A000670 (ordered Bell numbers) and A080253: faces in total, the origin's too.
    const total = (type: string) =>
      faceCountsByMoebius(listFlats(built(reflectionArrangement(type)))).reduce((a, b) => a + b);
    expect(['A1', 'A2', 'A3', 'A4', 'A5', 'A6'].map(total)).toEqual(
      numbers('3 13 75 541 4683 47293').map(BigInt),
    );
    expect(['B1', 'B2', 'B3', 'B4', 'B5'].map(total)).toEqual(
      numbers('3 17 147 1697 24483').map(BigInt),
    );
  });
});

describe('all nonzero 0/1 vectors', () => {
  // Regions: OEIS A034997. The rest computed by two slow independent programs.
  it.each([
    [3, '1 -7 15 -9', '1 7 9 1', '32 48 18 1'],
    [4, '1 -15 80 -170 104', '1 15 55 45 1', '370 760 480 90 1'],
    [5, '1 -31 375 -2130 5270 -3485', '1 31 285 845 625 1', '11292 30540 28680 10680 1250 1'],
    [
      6,
      '1 -63 1652 -22435 159460 -510524 371909',
      '1 63 1351 11445 35525 28875 1',
      '1066044 3662064 4695600 2742180 700350 57750 1',
    ],
  ])('in R^%i', (d, chi, flats, faces) => {
    expectPublished(arrangementOf(allSubsets(d)), { chi, flats, faces });
  });

  it('have second coefficient 2 S(d+1, 3) + 3 S(d+1, 4)', () => {
    // L. Kuehne, 2023, The universality of the resonance arrangement and its Betti numbers,
    // Combinatorica 43 (formula from memory); S are Stirling numbers of the second kind.
    const stirling = (n: number, k: number): number =>
      k === 0 || n === 0 ? (n === k ? 1 : 0) : k * stirling(n - 1, k) + stirling(n - 1, k - 1);
    for (let d = 3; d <= 6; d++) {
      const chi = characteristicPolynomialByDeletion(arrangementOf(allSubsets(d)));
      expect(chi[d - 2]).toBe(BigInt(2 * stirling(d + 1, 3) + 3 * stirling(d + 1, 4)));
    }
  });
});

describe('threshold arrangements', () => {
  it('n = 3', () => {
    // Computed by two slow independent programs.
    expectPublished(built(thresholdNormals(3)), {
      chi: '1 -8 28 -44 23',
      faces: '104 256 192 40 1',
    });
  });

  it('have as many regions as there are threshold functions', () => {
    // OEIS A000609; S. Muroga, 1971, Threshold Logic and its Applications, table 2.3.2.
    const regions = [1, 2, 3, 4, 5].map((n) => {
      const chi = characteristicPolynomialByDeletion(built(thresholdNormals(n)));
      const value = evaluatePolynomial(chi, -1n);
      return value < 0n ? -value : value;
    });
    expect(regions).toEqual(numbers('4 14 104 1882 94572').map(BigInt));
  });
});

describe('graphs', () => {
  /** Colourings with q colours, counted one by one. */
  const colourings = (
    vertices: number,
    edges: readonly (readonly [number, number])[],
    q: number,
  ) => {
    let count = 0;
    for (let code = 0; code < q ** vertices; code++) {
      const colour = Array.from({ length: vertices }, (_, v) => Math.floor(code / q ** v) % q);
      if (edges.every(([a, b]) => colour[a] !== colour[b])) count++;
    }
    return BigInt(count);
  };
  const rowsOf = (vertices: number, edges: readonly (readonly [number, number])[]) =>
    edges.map(([a, b]) =>
      Array.from({ length: vertices }, (_, v) => (v === a ? 1 : v === b ? -1 : 0)),
    );

  it('have the chromatic polynomial, less a factor t for each part', () => {
    // R. Stanley, 1973, Acyclic orientations of graphs, Discrete Math. 5; coefficients computed by
    // two slow independent programs.
    const k4 = [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
    ] as const;
    const cube = Array.from({ length: 8 }, (_, v) => [1, 2, 4].map((bit) => [v, v ^ bit] as const))
      .flat()
      .filter(([a, b]) => a < b);
    expectPublished(built(cycleGraph(4)), { chi: '1 -4 6 -3' });
    expectPublished(built(cycleGraph(5)), { chi: '1 -5 10 -10 4' });
    expectPublished(built(completeGraph(4)), { chi: '1 -6 11 -6' });
    expectPublished(built(completeGraph(5)), { chi: '1 -10 35 -50 24' });
    expectPublished(arrangementOf(rowsOf(4, k4.slice(1))), { chi: '1 -5 8 -4' });
    expectPublished(arrangementOf(rowsOf(8, cube)), {
      chi: '1 -12 66 -214 441 -572 423 -133',
    });
  });

  it('have t^(d - r) chi(t) colourings with t colours', () => {
    const random = sequence(5);
    for (let trial = 0; trial < 12; trial++) {
      const edges: [number, number][] = [];
      for (let a = 0; a < 5; a++) {
        for (let b = a + 1; b < 5; b++) if (random(3) > 0) edges.push([a, b]);
      }
      if (edges.length === 0) continue;
      const arrangement = arrangementOf(rowsOf(5, edges));
      const chi = characteristicPolynomialByDeletion(arrangement);
      for (let q = 1; q <= 5; q++) {
        const factor = BigInt(q) ** BigInt(5 - arrangement.rank);
        expect(factor * evaluatePolynomial(chi, BigInt(q))).toBe(colourings(5, edges, q));
      }
    }
  });
});

describe('general position', () => {
  const binomial = (n: number, k: number): bigint => {
    let value = 1n;
    for (let i = 0; i < k; i++) value = (value * BigInt(n - i)) / BigInt(i + 1);
    return k < 0 || n < k ? 0n : value;
  };

  it.each([
    [7, 2],
    [9, 3],
    [10, 4],
    [12, 5],
    [9, 6],
  ])('%i normals in R^%i', (n, d) => {
    // Regions: T. Cover, 1965, Geometrical and statistical properties of systems of linear
    // inequalities, theorem 1. Faces: T. Zaslavsky, 1975, Facing up to Arrangements.
    const sum = (top: number, last: number): bigint =>
      Array.from({ length: last }, (_, i) => binomial(top, i)).reduce((a, b) => a + b, 0n);
    const faces = Array.from({ length: d }, (_, k) => 2n * binomial(n, k) * sum(n - 1 - k, d - k));
    const rows = Array.from({ length: n }, (_, i) => Array.from({ length: d }, (_, k) => i ** k));
    expectPublished(arrangementOf(rows), { faces: [...faces, 1n].join(' ') });
  });
});

describe('zonohedra', () => {
  // Computed by two slow independent programs; vertices, edges and faces are classical.
  it('rhombic triacontahedron and truncated icosidodecahedron, over Q(sqrt 5)', () => {
    // (0, 1, tau) and its like, doubled so that 2 tau = 1 + sqrt(5) is whole.
    const one: Entry = 2;
    const tau: Entry = [1, 1];
    const minus: Entry = [-1, -1];
    const rows: Entry[][] = [
      [0, one, tau],
      [0, one, minus],
      [one, tau, 0],
      [one, minus, 0],
      [tau, 0, one],
      [minus, 0, one],
    ];
    expectPublished(arrangementOf(rows), { faces: '32 60 30 1', chi: '1 -6 15 -10' });
    expectPublished(built(reflectionArrangement('H3')), { faces: '120 180 62 1' });
  });

  it('rhombic dodecahedron and polar zonohedra', () => {
    const four = [
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
    ];
    expectPublished(arrangementOf(four), { faces: '14 24 12 1' });
    // Polar zonohedra with n zones, the rhombic icosahedron among them.
    for (const n of [3, 5, 8, 13]) {
      const faces = `${n * n - n + 2} ${2 * n * (n - 1)} ${n * (n - 1)} 1`;
      expectPublished(built(polarZonohedron(n)), { faces });
    }
  });
});

it('one polynomial, two arrangements: five planes through a line with two generic ones, and the 0/1 vectors', () => {
  // Computed by two slow independent programs.
  const pencil = [
    [1, 0, 0],
    [0, 1, 0],
    [1, 1, 0],
    [1, 2, 0],
    [1, 3, 0],
  ];
  const chi = '1 -7 15 -9';
  expectPublished(arrangementOf([...pencil, [1, 7, 1], [2, -3, 1]]), { chi, faces: '32 54 24 1' });
  expectPublished(arrangementOf(allSubsets(3)), { chi, faces: '32 48 18 1' });
});

it('cones over affine arrangements of type A2: Shi, Catalan, Linial', () => {
  // Regions of the cone are twice those of the affine arrangement, 16, 30 and 7: R. Stanley, 1996,
  // Hyperplane arrangements, interval orders, and trees, Proc. Nat. Acad. Sci. 93 (from memory).
  const differences = [
    [1, -1, 0],
    [0, 1, -1],
    [1, 0, -1],
  ];
  const cone = (levels: number[]) => [
    [0, 0, 0, 1],
    ...differences.flatMap((row) => levels.map((level) => [...row, -level])),
  ];
  const regions = (levels: number[]): bigint => {
    const chi = characteristicPolynomialByDeletion(arrangementOf(cone(levels)));
    return -evaluatePolynomial(chi, -1n) / 2n;
  };
  expect([regions([0, 1]), regions([-1, 0, 1]), regions([1])]).toEqual([16n, 30n, 7n]);
});
