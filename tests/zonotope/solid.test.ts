// The surface of a zonotope held against what a convex polyhedron with central symmetry must be:
// closed, of Euler characteristic 2 (L. Euler, 1758, Elementa doctrinae solidorum), its faces flat and
// outward, and, by the divergence theorem, enclosing the volume that the generators' determinants
// add up to.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { SignText } from '../../src/bits/sign-text.js';
import { regionRows } from '../../src/census/region-rows.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  equalNumbers,
  exactNumber,
  exactZero,
  multiplyNumbers,
  negateNumber,
} from '../../src/exact/number.js';
import { compareNumbers, signOfNumber } from '../../src/exact/number-order.js';
import { polarZonohedron } from '../../src/input/families/polar.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { buildSolid, type Solid, wordsOf } from '../../src/zonotope/solid.js';
import { readProjection } from '../../src/zonotope/solid-projection.js';
import { euclideanVolume, volumeBySubsets } from '../../src/zonotope/volume.js';
import { arrangementOf, generatorsOf, smallRows, typeA } from '../support/arrangements.js';

const own = { kind: 'own' } as const;

type Point = readonly ExactNumber[];

function determinant([u, v, w]: readonly Point[], k: bigint): ExactNumber {
  const times = (a: ExactNumber, b: ExactNumber) => multiplyNumbers(a, b, k);
  const minus = (a: ExactNumber, b: ExactNumber) => addNumbers(a, negateNumber(b));
  const cofactor = (i: number, j: number) => minus(times(v[i], w[j]), times(v[j], w[i]));
  return [cofactor(1, 2), cofactor(2, 0), cofactor(0, 1)].reduce(
    (sum, c, i) => addNumbers(sum, times(u[i], c)),
    exactZero,
  );
}

/** A sixth of the determinants of all triangles of the faces' fans: the flux of the position / 3. */
function enclosedVolume(solid: Solid): ExactNumber {
  const k = solid.projection.arrangement.generators.radicand ?? 0n;
  let six = exactZero;
  for (const { vertices } of solid.faces) {
    for (let i = 1; i + 1 < vertices.length; i++) {
      const corners = [vertices[0], vertices[i], vertices[i + 1]].map((v) => solid.vertices[v]);
      six = addNumbers(six, determinant(corners, k));
    }
  }
  return divideNumbers(six, exactNumber(6n), k);
}

/** Everything a surface must be, whatever the generators. */
function expectSound(solid: Solid): void {
  const { faces, vertices, edges, projection } = solid;
  const image = projection.arrangement;
  const { radicand, normals } = image.generators;
  const k = radicand ?? 0n;
  expect(vertices.length - edges.length + faces.length).toBe(2);
  // Every side of a face is a side of exactly one other, in the opposite direction.
  const directed = new Set<string>();
  let sides = 0;
  for (const { vertices: corners } of faces) {
    expect(new Set(corners).size).toBe(corners.length);
    expect(Math.min(...corners)).toBe(corners[0]);
    corners.forEach((from, i) => {
      directed.add(`${from} ${corners[(i + 1) % corners.length]}`);
      sides++;
    });
  }
  expect(directed.size).toBe(sides);
  expect([...directed].every((side) => directed.has(side.split(' ').reverse().join(' ')))).toBe(
    true,
  );
  expect(2 * edges.length).toBe(sides);
  // The facet inequality holds everywhere, and with equality at the corners of the face alone.
  for (const { facet, vertices: corners } of faces) {
    const ring = image.ring;
    const normal = facet.normal.map((e) =>
      ring.radicand === null
        ? exactNumber(e as bigint)
        : exactNumber((e as { a: bigint }).a, (e as { b: bigint }).b),
    );
    vertices.forEach((point, v) => {
      const value = point.reduce(
        (sum, x, i) => addNumbers(sum, multiplyNumbers(x, normal[i], k)),
        exactZero,
      );
      const order = compareNumbers(value, facet.offset, radicand);
      expect(order).toBe(corners.includes(v) ? 0 : -1);
    });
    // Counterclockwise seen from outside.
    const [p, q, r] = corners.map((v) => vertices[v]);
    const minus = (a: Point, b: Point) => a.map((x, i) => addNumbers(x, negateNumber(b[i])));
    expect(signOfNumber(determinant([minus(q, p), minus(r, q), normal], k), radicand)).toBe(1);
  }
  // An edge is the sum of the segments of its hyperplane's generators, and joins left to right.
  for (const { from, to, along, left, right } of edges) {
    const step = vertices[to].map((x, i) => addNumbers(x, negateNumber(vertices[from][i])));
    const [first] = image.hyperplanes[along].members;
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < i; j++) {
        expect(
          equalNumbers(
            multiplyNumbers(step[i], normals[first][j], k),
            multiplyNumbers(step[j], normals[first][i], k),
          ),
        ).toBe(true);
      }
    }
    const sideOf = (f: number, a: number, b: number) => {
      const corners = faces[f].vertices;
      return corners[(corners.indexOf(a) + 1) % corners.length] === b;
    };
    expect(sideOf(left, from, to) && sideOf(right, to, from)).toBe(true);
  }
  expect(equalNumbers(enclosedVolume(solid), volumeBySubsets(image))).toBe(true);
}

function shape(solid: Solid): string {
  const sides = new Map<number, number>();
  for (const { vertices } of solid.faces) {
    sides.set(vertices.length, (sides.get(vertices.length) ?? 0) + 1);
  }
  return [...sides]
    .sort(([a], [b]) => a - b)
    .map(([n, count]) => `${count}x${n}`)
    .join(' ');
}

// The figures of the zonohedra by their usual names are common knowledge of geometry (H. S. M.
// Coxeter, 1948, Regular Polytopes, section 2.8; from memory).
describe.each([
  [
    'cube',
    arrangementOf([
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]),
    8,
    12,
    '6x4',
  ],
  [
    'hexagonal prism',
    arrangementOf([
      [1, 0, 0],
      [0, 1, 0],
      [1, 1, 0],
      [0, 0, 1],
    ]),
    12,
    18,
    '6x4 2x6',
  ],
  [
    'rhombic dodecahedron',
    arrangementOf([
      [1, 1, 1],
      [1, 1, -1],
      [1, -1, 1],
      [-1, 1, 1],
    ]),
    14,
    24,
    '12x4',
  ],
  ['truncated octahedron', arrangementOf(typeA(3)), 24, 36, '6x4 8x6'],
  [
    'great rhombicuboctahedron',
    buildArrangement(reflectionArrangement('B3')),
    48,
    72,
    '12x4 8x6 6x8',
  ],
  [
    'great rhombicosidodecahedron',
    buildArrangement(reflectionArrangement('H3')),
    120,
    180,
    '30x4 20x6 12x10',
  ],
  ['polar zonohedron of seven', buildArrangement(polarZonohedron(7)), 44, 84, '42x4'],
] as [string, Arrangement, number, number, string][])(
  '%s',
  (_, arrangement, vertices, edges, faces) => {
    const solid = buildSolid(arrangement, own);

    it('has the faces it is known for', () => {
      expect([solid.vertices.length, solid.edges.length, shape(solid)]).toEqual([
        vertices,
        edges,
        faces,
      ]);
    });

    it('is a sound surface and encloses its volume', () => {
      expectSound(solid);
    });
  },
);

describe('any generators', () => {
  it('give a sound surface, with parallel ones, in lower rank and with ranges', () => {
    const end = fc.tuple(fc.integer({ min: -4, max: 3 }), fc.integer({ min: 1, max: 4 }));
    fc.assert(
      fc.property(
        smallRows({ dimension: 3, maximum: 7 }),
        fc.array(end, { minLength: 7, maxLength: 7 }),
        fc.integer({ min: 3, max: 5 }),
        (rows, ends, dimension) => {
          // The rows in three dimensions placed in more by a fixed injective map.
          const placed = rows.map(([a, b, c]) =>
            [a, b, c, a - b + 2 * c, a + b].slice(0, dimension),
          );
          const ranges = placed.map((__, j) => ({
            low: exactNumber(BigInt(ends[j][0]), 0n, 2n),
            high: exactNumber(BigInt(ends[j][0] + ends[j][1]), 0n, 2n),
          }));
          const arrangement = arrangementOf(placed, { ranges });
          if (arrangement.rank < 3) {
            expect(() => buildSolid(arrangement, own)).toThrow(/rank [12]/);
            return;
          }
          expectSound(buildSolid(arrangement, own));
        },
      ),
      { numRuns: 60 },
    );
  });

  it('of a quadratic field too', () => {
    const part = fc.integer({ min: -2, max: 2 });
    const row = fc.array(fc.tuple(part, part), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(fc.array(row, { minLength: 3, maxLength: 6 }), (rows) => {
        const kept = rows.filter((r) => r.some(([a, b]) => a !== 0 || b !== 0));
        if (kept.length === 0) return;
        const arrangement = arrangementOf(kept, { radicand: 5n });
        if (arrangement.rank === 3) expectSound(buildSolid(arrangement, own));
      }),
      { numRuns: 40 },
    );
  });
});

describe('the order of vertices', () => {
  it('is that of the list of regions', () => {
    const arrangement = arrangementOf([
      [1, 0, 0],
      [-2, 0, 0],
      [0, 1, 0],
      [1, 1, 3],
      [0, 0, -1],
    ]);
    const { vertices, regions } = buildSolid(arrangement, own);
    const rows = [...regionRows(arrangement, regions)];
    expect(vertices).toEqual(rows.map(({ vertex }) => vertex));
    const text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
    expect(wordsOf(regions).map((word) => text.write(word, 0))).toEqual(
      rows.map(({ signs }) => signs),
    );
  });
});

describe('a zonotope of rank 3 in more coordinates', () => {
  it('keeps its true measure', () => {
    for (const rows of [
      typeA(3),
      [
        [1, 2, 0, 0],
        [0, 1, 0, 3],
        [2, 0, 1, 1],
        [1, 3, 0, 3],
      ],
    ]) {
      const arrangement = arrangementOf(rows);
      const { axes } = buildSolid(arrangement, own).projection;
      const enclosed = enclosedVolume(buildSolid(arrangement, own));
      const lengths = axes.reduce(
        (l, axis) => multiplyNumbers(l, axis.squaredLength, 0n),
        exactNumber(1n),
      );
      const square = divideNumbers(multiplyNumbers(enclosed, enclosed, 0n), lengths, 0n);
      expect(square).toEqual(euclideanVolume(arrangement, volumeBySubsets(arrangement)).square);
    }
  });
});

describe('projections', () => {
  const generators = {
    ...generatorsOf(typeA(4)),
    coordinates: ['surge', 'sway', 'heave', 'roll', 'yaw'],
  };
  const arrangement = buildArrangement(generators);
  const project = (text: string | undefined) =>
    buildSolid(arrangement, readProjection(text, generators));

  it('are sound surfaces of the images', () => {
    for (const text of ['1,2,3', 'yaw, sway,3', 'principal']) expectSound(project(text));
  });

  it('drop the generators that become points, and say which are kept', () => {
    const { projection } = project('surge,sway,heave');
    expect(projection.kept.map((j) => j + 1)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9]);
    expect(projection.axes.map(({ name }) => name)).toEqual(['surge', 'sway', 'heave']);
  });

  it('onto principal axes see the directions of most spread first', () => {
    const wide = arrangementOf([
      [0, 9, 0, 0],
      [5, 0, 0, 0],
      [0, 0, 0, 3],
      [0, 0, 1, 0],
    ]);
    const { axes } = buildSolid(wide, { kind: 'principal' }).projection;
    expect(axes.map(({ functional }) => functional.findIndex(({ a }) => a !== 0n))).toEqual([
      1, 0, 3,
    ]);
  });

  it('are refused with the remedy where they make no sense', () => {
    expect(() => project(undefined)).toThrow(/rank 4.*--project=1,2,3/);
    expect(() => project('1,2')).toThrow(/rank 2/);
    expect(() => project('1,2,6')).toThrow(/'6' is not one of 5 coordinates/);
    expect(() => project('1,2,drift')).toThrow(/'drift'/);
    expect(() => project('1,2,2')).toThrow(/coordinate 2 is there twice/);
    expect(() => project('1')).toThrow(/1 coordinates/);
    const flat = arrangementOf([
      [1, 0, 0, 0],
      [0, 1, 1, 0],
      [0, 1, 1, 1],
    ]);
    expect(() => buildSolid(flat, { kind: 'coordinates', coordinates: [0, 1, 2] })).toThrow(
      /flat: rank 2/,
    );
  });

  it('are refused past the bound on faces', () => {
    const many = arrangementOf(Array.from({ length: 1100 }, (_, i) => [1, i, i * i]));
    expect(() => buildSolid(many, own)).toThrow(/limit is 250000 faces/);
  });
});
