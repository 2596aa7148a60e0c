// Ehrhart polynomials against published values, each route by itself. Coefficients from t^0 up.
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { ehrhartByContraction } from '../../src/zonotope/ehrhart-by-contraction.js';
import { ehrhartConstituents } from '../../src/zonotope/ehrhart-terms.js';
import { latticeGenerators } from '../../src/zonotope/lattice-generators.js';
import { allSubsets, arrangementOf } from '../support/arrangements.js';
import { lineOf, routes } from './routes.js';

const reflection = (type: string): Arrangement => buildArrangement(reflectionArrangement(type));

/** e_i - e_j for each edge, vertices from 0. */
function graph(vertices: number, edges: readonly (readonly [number, number])[]): Arrangement {
  return arrangementOf(
    edges.map(([i, j]) =>
      Array.from({ length: vertices }, (_, k) => (k === i ? 1 : k === j ? -1 : 0)),
    ),
  );
}

function complete(n: number): Arrangement {
  const edges: [number, number][] = [];
  for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) edges.push([i, j]);
  return graph(n, edges);
}

const cycle = (n: number): Arrangement =>
  graph(
    n,
    Array.from({ length: n }, (_, i) => [i, (i + 1) % n] as const),
  );

const cube = graph(
  8,
  Array.from({ length: 8 }, (_, i) => i).flatMap((i) =>
    [1, 2, 4].filter((bit) => (i & bit) === 0).map((bit) => [i, i | bit] as const),
  ),
);

const published: [source: string, name: string, arrangement: Arrangement, line: string][] = [
  ['OEIS A343805 (type B)', 'B2', reflection('B2'), '1 4 7'],
  ['OEIS A343805 (type B)', 'B3', reflection('B3'), '1 9 39 87'],
  ['OEIS A343805 (type B)', 'B4', reflection('B4'), '1 16 126 608 1553'],
  ['OEIS A343805 (type B)', 'B5', reflection('B5'), '1 25 310 2470 12985 36145'],
  ['OEIS A343806 (type C)', 'C2', reflection('C2'), '1 6 14'],
  ['OEIS A343806 (type C)', 'C3', reflection('C3'), '1 12 66 172'],
  ['OEIS A343806 (type C)', 'C4', reflection('C4'), '1 20 192 1080 3036'],
  // Forests by number of edges (R. Stanley, 1991, A zonotope associated with graphical degree
  // sequences): the table for complete graphs is OEIS A138464.
  ['OEIS A138464 (forests)', 'K4', complete(4), '1 6 15 16'],
  ['OEIS A138464 (forests)', 'K5', complete(5), '1 10 45 110 125'],
  ['forests, counted by hand', 'C4', cycle(4), '1 4 6 4'],
  ['forests, counted by hand', 'C5', cycle(5), '1 5 10 10 5'],
  ['two slow separate programs', 'cube graph', cube, '1 12 66 220 489 744 740 384'],
  ['two slow separate programs', '0/1 vectors, d=3', arrangementOf(allSubsets(3)), '1 7 21 30'],
  [
    'two slow separate programs',
    '0/1 vectors, d=4',
    arrangementOf(allSubsets(4)),
    '1 15 105 440 1050',
  ],
  [
    'two slow separate programs',
    '0/1 vectors, d=5',
    arrangementOf(allSubsets(5)),
    '1 31 465 4470 30090 131760',
  ],
  [
    'definition, by hand',
    'index 2 in the plane',
    arrangementOf([
      [1, 0],
      [1, 2],
    ]),
    '1 2 2',
  ],
  [
    'definition, by hand',
    'a 2 x 3 rectangle',
    arrangementOf([
      [2, 0],
      [0, 3],
    ]),
    '1 5 6',
  ],
  [
    'definition, by hand',
    'a repeated generator',
    arrangementOf([
      [1, 0],
      [1, 0],
      [0, 1],
    ]),
    '1 3 2',
  ],
  [
    'two slow separate programs',
    'rhombic dodecahedron',
    arrangementOf([
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
    ]),
    '1 4 12 16',
  ],
];

describe.each(Object.entries(routes))('the Ehrhart polynomial by %s', (_, route) => {
  it.each(published)('%s: %s', (_source, _name, arrangement, line) => {
    expect(lineOf(route(arrangement))).toBe(line);
  });

  it('has two constituents for type B2 centred at the origin', () => {
    // F. Ardila, M. Beck, J. McWhirter, 2020, The arithmetic of Coxeter permutahedra, Rev. Acad.
    // Colomb. Cienc. 44, figure 1: 2t + 7t^2 for odd t, 1 + 4t + 7t^2 for even t.
    expect(ehrhartConstituents(route(reflection('B2'), true))).toEqual([
      { divisor: 1n, coefficients: [0n, 2n, 7n] },
      { divisor: 2n, coefficients: [1n, 4n, 7n] },
    ]);
  });
});

describe('two bases of index 2 that a rational map of determinant 1 joins', () => {
  // The lattices differ: (1,0,0) and (-1,2,0) span a plane lattice of index 2, no pair of the second
  // does; checked by the definition, pair by pair.
  const first = [
    [1, 0, 0],
    [-1, 2, 0],
    [0, 0, 1],
  ];
  const second = [
    [1, 0, 0],
    [0, 1, 0],
    [-1, -1, 2],
  ];
  const both = [
    ...first.map((row) => [...row, 0, 0, 0]),
    ...second.map((row) => [0, 0, 0, ...row]),
  ];

  it.each(Object.entries(routes))('are told apart by %s', (_, route) => {
    expect(lineOf(route(arrangementOf(first)))).toBe('1 3 4 2');
    expect(lineOf(route(arrangementOf(second)))).toBe('1 3 3 2');
    // Side by side the polynomials multiply: (1 + 3t + 4t^2 + 2t^3) (1 + 3t + 3t^2 + 2t^3).
    expect(lineOf(route(arrangementOf(both)))).toBe('1 6 16 25 24 14 4');
  });
});

describe('the exceptional types in coordinates of the simple roots', () => {
  it('E6 is the same by every route', () => {
    const lines = Object.values(routes).map((route) => lineOf(route(reflection('E6'))));
    expect(lines).toEqual(lines.map(() => lines[0]));
  });

  it('E7 has the volume of two slow separate programs', () => {
    const terms = ehrhartByContraction(latticeGenerators(reflection('E7')));
    expect(terms[0].coefficients.at(-1)).toBe(248454360n);
  });
});
