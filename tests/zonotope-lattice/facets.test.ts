// Facets against the definition (every sum of chosen ends satisfies them, enough of them with
// equality), against a convex hull by the quickhull3d package, and against published counts; and the
// count of lattice points that rests on them alone against the Ehrhart polynomial.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { findPivots } from '../../src/exact/elimination.js';
import { integerRing } from '../../src/exact/integers.js';
import { addNumbers, exactNumber, formatNumber, multiplyNumbers } from '../../src/exact/number.js';
import { signOfNumber } from '../../src/exact/number-order.js';
import type { Quadratic } from '../../src/exact/quadratic.js';
import { listFlats } from '../../src/flat/lattice.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { ehrhartByContraction } from '../../src/zonotope/ehrhart-by-contraction.js';
import { interiorPointsIn, latticePointsIn } from '../../src/zonotope/ehrhart-terms.js';
import { type Facet, facetsOf } from '../../src/zonotope/facets.js';
import { DirectPoints } from '../../src/zonotope/points-direct.js';
import { allSubsets, arrangementOf, type Entry, smallRows } from '../support/arrangements.js';
import { hullPlanes } from '../support/hull-planes.js';
import { rangedArrangement, rangedRows, sumsOfEnds } from './ranged.js';
import { generatorsFor } from './routes.js';

const minus = ([a, b]: [number, number]): [number, number] => [-a, -b];

const facetList = <E>(arrangement: Arrangement<E>): Facet<E>[] => [
  ...facetsOf(arrangement, listFlats(arrangement)),
];

const rational = (rows: readonly (readonly (number | bigint)[])[]): Arrangement<bigint> =>
  arrangementOf(rows) as Arrangement<bigint>;

describe('facets', () => {
  it('hold on every sum of ends, with equality on enough of them to span a facet', () => {
    fc.assert(
      fc.property(rangedRows({ dimension: 3, maximum: 6, bound: 3, denominator: 2 }), (input) => {
        const arrangement = rangedArrangement(input);
        const sums = sumsOfEnds(arrangement);
        for (const { normal, offset, generators } of facetList(arrangement)) {
          const on = sums.filter((sum) => {
            const value = sum.reduce(
              (total, x, i) => addNumbers(total, multiplyNumbers(x, exactNumber(normal[i]), 0n)),
              multiplyNumbers(offset, exactNumber(-1n), 0n),
            );
            expect(signOfNumber(value, null)).toBeLessThanOrEqual(0);
            return signOfNumber(value, null) === 0;
          });
          const doubled = on.map((sum) =>
            sum.map((x, i) => {
              const step = addNumbers(x, multiplyNumbers(on[0][i], exactNumber(-1n), 0n));
              expect(step.d === 1n || step.d === 2n).toBe(true);
              return (2n * step.a) / step.d;
            }),
          );
          expect(on.length).toBe(2 ** generators.length);
          expect(findPivots(integerRing, doubled).rows.length).toBe(arrangement.rank - 1);
        }
      }),
    );
  });

  it('are the planes of the hull of all sums, with its volume, in space', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 3, maximum: 7, bound: 3 }).filter(
          (rows) => rational(rows).rank === 3,
        ),
        (rows) => {
          const arrangement = rational(rows);
          const points = new Map(
            sumsOfEnds(arrangement).map((sum) => [sum.map((x) => x.a).join(), sum]),
          );
          const hull = hullPlanes([...points.values()].map((sum) => sum.map((x) => Number(x.a))));
          const planes = facetList(arrangement).map(
            ({ normal, offset }) => `${normal.join(' ')} | ${formatNumber(offset, null)}`,
          );
          expect(planes.sort()).toEqual(hull.planes);
          const terms = ehrhartByContraction(generatorsFor(arrangement));
          expect(6 * Number(terms[0].coefficients[3])).toBe(hull.sixfoldVolume);
        },
      ),
      { numRuns: 40 },
    );
  });

  it('are as many as the lines of the arrangement have directions', () => {
    // Rhombic triacontahedron: 30 rhombs (J. Kepler, 1619, Harmonices mundi; from memory). B3 26, F4
    // 240, 0/1 vectors in R^4 90: computed by two slow separate programs.
    const triacontahedron = arrangementOf([
      [0, 2, [1, 1]],
      [[1, 1], 0, 2],
      [2, [1, 1], 0],
      [0, 2, [-1, -1]],
      [[-1, -1], 0, 2],
      [2, [-1, -1], 0],
    ]);
    expect(facetList(triacontahedron)).toHaveLength(30);
    expect(facetList(buildArrangement(reflectionArrangement('B3')))).toHaveLength(26);
    expect(facetList(buildArrangement(reflectionArrangement('F4')))).toHaveLength(240);
    expect(facetList(rational(allSubsets(4)))).toHaveLength(90);
  });

  it('hold on every sum of ends over the golden field, and in a plane of it', () => {
    const golden: [number, number] = [1, 1];
    const lists: Entry[][][] = [
      [
        [0, 2, golden],
        [golden, 0, 2],
        [2, golden, 0],
        [1, 1, 1],
        [1, 0, [0, 1]],
      ],
      [
        [0, 2, golden],
        [golden, 2, golden],
        [1, [0, 2], [5, 1]],
        [[1, -1], -2, minus(golden)],
      ],
    ];
    for (const rows of lists) {
      const arrangement = arrangementOf(rows) as Arrangement<Quadratic>;
      const sums = sumsOfEnds(arrangement);
      for (const { normal, offset, generators } of facetList(arrangement)) {
        const signs = sums.map((sum) => {
          const value = sum.reduce(
            (total, x, i) =>
              addNumbers(total, multiplyNumbers(x, exactNumber(normal[i].a, normal[i].b), 5n)),
            multiplyNumbers(offset, exactNumber(-1n), 5n),
          );
          return signOfNumber(value, 5n);
        });
        expect(Math.max(...signs)).toBe(0);
        expect(signs.filter((sign) => sign === 0)).toHaveLength(2 ** generators.length);
      }
    }
  });

  it('are two end points in rank 1', () => {
    const facets = facetList(
      rational([
        [2, -4],
        [-1, 2],
      ]),
    );
    expect(facets).toHaveLength(2);
    // Z runs from -(1,-2) to 2 (1,-2): three steps of the primitive direction.
    const [first, second] = facets;
    expect(first.essential.map((x) => -x)).toEqual(second.essential);
    expect(addNumbers(first.offset, second.offset)).toEqual(exactNumber(3n));
  });

  it('are the same, carried over, in numbers of 25 digits', () => {
    const big = 10n ** 25n + 1n;
    const rows = allSubsets(3);
    const small = facetList(rational(rows));
    const large = facetList(
      rational(rows.map(([x, y, z]) => [BigInt(x) + big * BigInt(y), BigInt(y), BigInt(z)])),
    );
    // x -> x + big y on generators takes a normal (a, b, c) to (a, b - big a, c).
    const carried = small.map(
      ({ normal: [a, b, c], offset }) => `${a},${b - big * a},${c} ${offset.a}`,
    );
    expect(large.map(({ normal, offset }) => `${normal.join()} ${offset.a}`).sort()).toEqual(
      carried.sort(),
    );
  });
});

describe('lattice points counted from the facets', () => {
  it.each([
    ['lattice zonotopes', 1],
    ['half-integral ones', 2],
    ['ones with corners in thirds', 3],
  ])('are the values of the Ehrhart polynomial, for %s', (_, denominator) => {
    fc.assert(
      fc.property(
        rangedRows({ dimension: 3, maximum: 5, bound: 2, denominator }),
        fc.boolean(),
        (input, centred) => {
          const arrangement = rangedArrangement(input);
          const terms = ehrhartByContraction(generatorsFor(arrangement, centred));
          const direct = new DirectPoints(arrangement, facetList(arrangement), { centred });
          for (const t of [1, 2, 3]) {
            expect(direct.count(t)).toEqual({
              points: latticePointsIn(terms, BigInt(t)),
              interior: interiorPointsIn(terms, BigInt(t)),
            });
          }
        },
      ),
      { numRuns: 40 },
    );
  });

  it('are so in rank 4, and in a plane of space', () => {
    for (const rows of [
      allSubsets(4),
      [
        [1, 1, 0, 0],
        [0, 2, 1, 0],
        [0, 0, 1, 3],
        [1, 0, 0, -1],
        [2, 1, 0, 1],
      ],
      [
        [2, -1, -1],
        [0, 3, -3],
        [1, 1, -2],
      ],
    ]) {
      const arrangement = rational(rows);
      const terms = ehrhartByContraction(generatorsFor(arrangement));
      const direct = new DirectPoints(arrangement, facetList(arrangement));
      for (const t of [1, 2]) {
        expect(direct.count(t).points).toBe(latticePointsIn(terms, BigInt(t)));
      }
    }
  });

  it('are refused in numbers past doubles', () => {
    const arrangement = rational([
      [1n, 10n ** 20n],
      [0n, 1n],
      [1n, 3n],
    ]);
    const direct = new DirectPoints(arrangement, facetList(arrangement));
    expect(direct.estimateSeconds(1)).toBe(Number.POSITIVE_INFINITY);
    expect(() => direct.count(1)).toThrow(/2\^52/);
  });

  it('of a segment scaled to fractions are those of the segment', () => {
    // [0, 3/2] and [-1/3, 2/3] hold 2 integers and 1.
    const segment = (low: [bigint, bigint], high: [bigint, bigint]): bigint => {
      const ranges = [
        { low: exactNumber(low[0], 0n, low[1]), high: exactNumber(high[0], 0n, high[1]) },
      ];
      const arrangement = arrangementOf([[1]], { ranges }) as Arrangement<bigint>;
      return new DirectPoints(arrangement, facetList(arrangement)).count(1).points;
    };
    expect(segment([0n, 1n], [3n, 2n])).toBe(2n);
    expect(segment([-1n, 3n], [2n, 3n])).toBe(1n);
  });
});
