// How far inside a point is: simple shapes by hand, and the definition on random ones.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { addNumbers, exactNumber, multiplyNumbers } from '../../src/exact/number.js';
import { compareNumbers } from '../../src/exact/number-order.js';
import { listFlats } from '../../src/flat/lattice.js';
import { facetsOf } from '../../src/zonotope/facets.js';
import { type Margin, marginAt } from '../../src/zonotope/margins.js';
import { ZonotopeMembership } from '../../src/zonotope/membership.js';
import { arrangementOf } from '../support/arrangements.js';
import { rangedArrangement, rangedRows } from './ranged.js';

const integer = (x: number) => exactNumber(BigInt(x));
const half = (x: number) => exactNumber(BigInt(x), 0n, 2n);

function at(arrangement: Arrangement, point: readonly ReturnType<typeof integer>[]): Margin {
  return marginAt(arrangement, facetsOf(arrangement, listFlats(arrangement)), point);
}

const rectangle = arrangementOf([
  [4, 0],
  [0, 3],
]);

describe('margins', () => {
  it('of a 4 x 3 rectangle are what a ruler says', () => {
    const facets = [...facetsOf(rectangle, listFlats(rectangle))];
    const inside = at(rectangle, [integer(3), integer(1)]);
    expect(inside.place).toBe('inside');
    expect(inside.distance).toEqual({ square: integer(1), decimal: '1' });
    expect(inside.cube).toMatchObject({ half: integer(1), decimal: '1' });
    expect(inside.limits).toEqual([]);
    const right = at(rectangle, [half(7), integer(1)]);
    expect(right.distance?.square).toEqual(exactNumber(1n, 0n, 4n));
    expect(facets[right.nearest!].normal).toEqual([1n, 0n]);
    const outside = at(rectangle, [integer(7), integer(4)]);
    expect(outside).toMatchObject({ place: 'outside', cube: null, limits: [] });
    expect(outside.distance?.square).toEqual(integer(9));
    expect(facets[outside.nearest!].normal).toEqual([1n, 0n]);
  });

  it('name the generators that are at a limit on the boundary', () => {
    expect(at(rectangle, [integer(4), integer(1)])).toMatchObject({
      place: 'boundary',
      distance: { square: integer(0), decimal: '0' },
      limits: [{ generator: 0, end: 'high' }],
    });
    expect(at(rectangle, [integer(4), integer(0)]).limits).toEqual([
      { generator: 0, end: 'high' },
      { generator: 1, end: 'low' },
    ]);
  });

  it('of a square on its corner tell ball from cube', () => {
    // |x| + |y| <= 2: the ball about 0 has squared radius 2, the cube half-edge 1.
    const range = { low: integer(-1), high: integer(1) };
    const diamond = arrangementOf(
      [
        [1, 1],
        [1, -1],
      ],
      { ranges: [range, range] },
    );
    const margin = at(diamond, [integer(0), integer(0)]);
    expect(margin.distance).toEqual({ square: integer(2), decimal: '1.41421356237309' });
    expect(margin.cube?.half).toEqual(integer(1));
  });

  it('are taken within the span where the generators do not fill space', () => {
    // A segment from 0 to (3, 3, 0): its middle is at squared distance 18/4 from either end.
    const segment = arrangementOf([[3, 3, 0]]);
    const margin = at(segment, [half(3), half(3), integer(0)]);
    expect(margin).toMatchObject({ place: 'inside', cube: null });
    expect(margin.distance?.square).toEqual(exactNumber(9n, 0n, 2n));
    expect(at(segment, [integer(1), integer(1), integer(1)])).toEqual({
      place: 'off-span',
      nearest: null,
      distance: null,
      cube: null,
      limits: [],
    });
  });

  it('are exact over a quadratic field', () => {
    // A square with sides sqrt(2): from (1, 1/2) the right side is sqrt(2) - 1 away.
    const square = arrangementOf(
      [
        [[0, 1], 0],
        [0, [0, 1]],
      ],
      { radicand: 2n },
    );
    const margin = at(square, [integer(1), half(1)]);
    expect(margin.distance?.square).toEqual(exactNumber(3n, -2n));
    expect(margin.distance?.decimal).toBe('0.414213562373095');
    expect(margin.cube?.decimal).toBe('0.414213562373095');
  });

  it('are exact in a plane over a quadratic field', () => {
    // A rectangle with sides 3 sqrt(2) along (1, 1, 0) and 2 sqrt(2) along the third axis: its centre
    // is sqrt(2) from the long sides.
    const plane = arrangementOf(
      [
        [3, 3, 0],
        [0, 0, [0, 2]],
      ],
      { radicand: 2n },
    );
    const centre = [half(3), half(3), exactNumber(0n, 1n)];
    expect(at(plane, centre)).toMatchObject({ place: 'inside', cube: null });
    expect(at(plane, centre).distance?.square).toEqual(integer(2));
    expect(at(plane, [half(3), integer(1), exactNumber(0n, 1n)]).place).toBe('off-span');
  });

  it('keep cubes inside and let no larger one be, by a simplex method for membership', () => {
    fc.assert(
      fc.property(
        rangedRows({ dimension: 2, maximum: 5, bound: 3, denominator: 2 }),
        fc.tuple(fc.integer({ min: -4, max: 4 }), fc.integer({ min: -4, max: 4 })),
        (input, [x, y]) => {
          const arrangement = rangedArrangement(input);
          const membership = new ZonotopeMembership(arrangement);
          const point = [half(x), half(y)];
          const margin = at(arrangement, point);
          const within = membership.beyond(point) === null;
          expect(margin.place === 'inside' || margin.place === 'boundary').toBe(within);
          if (margin.cube === null) return;
          const corners = (factor: ReturnType<typeof integer>) =>
            [-1, 1].flatMap((sx) =>
              [-1, 1].map((sy) => {
                const edge = multiplyNumbers(margin.cube!.half, factor, 0n);
                return [sx, sy].map((s, i) =>
                  addNumbers(point[i], multiplyNumbers(integer(s), edge, 0n)),
                );
              }),
            );
          const inside = (corner: ReturnType<typeof integer>[]) =>
            membership.beyond(corner) === null;
          expect(corners(integer(1)).every(inside)).toBe(true);
          if (margin.place !== 'inside') return;
          expect(corners(exactNumber(1001n, 0n, 1000n)).every(inside)).toBe(false);
          // A cube holds the ball of its half-edge, and is held by that of sqrt(2) times it.
          const square = multiplyNumbers(margin.cube.half, margin.cube.half, 0n);
          expect(compareNumbers(margin.distance!.square, square, null)).toBeGreaterThanOrEqual(0);
          const twice = multiplyNumbers(square, integer(2), 0n);
          expect(compareNumbers(margin.distance!.square, twice, null)).toBeLessThanOrEqual(0);
        },
      ),
    );
  });
});
