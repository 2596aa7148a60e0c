// Rows of regions and faces against the normals themselves: each sign, wall, point and zonotope
// vertex is computed again from the input by its definition.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import type { FaceRow } from '../../src/census/face-rows.js';
import { FaceRows } from '../../src/census/face-rows.js';
import { regionRows } from '../../src/census/region-rows.js';
import type { ExactNumber } from '../../src/exact/number.js';
import { addNumbers, exactNumber, exactZero, multiplyNumbers } from '../../src/exact/number.js';
import { streamFaces } from '../../src/face/faces.js';
import type { Range } from '../../src/input/generators.js';
import { unitRange } from '../../src/input/generators.js';
import { listRegions } from '../../src/region/regions.js';
import { arrangementOf, smallRows } from '../support/arrangements.js';
import { slowCovectors, slowPoset } from '../support/slow-poset.js';

/** The sign of every normal given on every covector of the hyperplanes. */
function slowSigns(arrangement: Arrangement): string[] {
  const { hyperplaneOf, orientationOf } = arrangement;
  return slowCovectors(arrangement).map((signs) =>
    Array.from(hyperplaneOf, (h, i) => '-0+'[signs[h] * orientationOf[i] + 1]).join(''),
  );
}

/** The sum of high ends where +, low ends where -; nothing where 0. */
function slowBase(arrangement: Arrangement, signs: string): ExactNumber[] {
  const { normals, ranges, radicand } = arrangement.generators;
  let sum = normals[0].map(() => exactZero);
  normals.forEach((normal, i) => {
    if (signs[i] === '0') return;
    const range = ranges?.[i] ?? unitRange;
    const end = signs[i] === '+' ? range.high : range.low;
    sum = sum.map((x, j) => addNumbers(x, multiplyNumbers(end, normal[j], radicand ?? 0n)));
  });
  return sum;
}

const half: Range = { low: exactNumber(-1n, 0n, 2n), high: exactNumber(3n) };
const inputs = fc
  .tuple(fc.integer({ min: 1, max: 3 }), fc.boolean())
  .chain(([dimension, ranged]) =>
    smallRows({ dimension, maximum: 6, bound: 2 }).map((rows) =>
      arrangementOf(rows, ranged ? { ranges: rows.map((_, i) => (i % 2 ? half : unitRange)) } : {}),
    ),
  );

describe('rows of regions', () => {
  it('hold what their normals say', () => {
    fc.assert(
      fc.property(inputs, (arrangement) => {
        const { normals } = arrangement.generators;
        const rows = [...regionRows(arrangement, listRegions(arrangement))];
        const listed = new Set(rows.map(({ signs }) => signs));
        expect([...listed].sort()).toEqual(
          slowSigns(arrangement)
            .filter((signs) => !signs.includes('0'))
            .sort(),
        );
        expect(rows.length).toBe(listed.size);
        for (const { signs, walls, point, vertex } of rows) {
          const values = normals.map((u) => u.reduce((sum, x, j) => sum + x.a * point[j], 0n));
          expect(values.map((value) => (value > 0n ? '+' : value < 0n ? '-' : '0')).join('')).toBe(
            signs,
          );
          expect(vertex).toEqual(slowBase(arrangement, signs));
          // A hyperplane is a wall exactly when its signs can be flipped alone.
          const flipped = arrangement.hyperplanes.flatMap(({ members }) => {
            const other = [...signs];
            for (const i of members) other[i] = signs[i] === '+' ? '-' : '+';
            return listed.has(other.join('')) ? [members[0] + 1] : [];
          });
          expect(walls).toEqual(flipped);
        }
      }),
    );
  });
});

describe('rows of faces', () => {
  const check = (arrangement: Arrangement, rows: readonly FaceRow[]) => {
    expect(rows.map(({ signs }) => signs).sort()).toEqual(slowSigns(arrangement).sort());
    for (const { signs, dimension, zonotopeDimension, base, free } of rows) {
      expect(free).toEqual([...signs].flatMap((s, i) => (s === '0' ? [i + 1] : [])));
      expect(base).toEqual(slowBase(arrangement, signs));
      expect(dimension + zonotopeDimension).toBe(arrangement.rank);
      if (!signs.includes('0')) expect(dimension).toBe(arrangement.rank);
    }
  };

  it('of a poset hold what their normals say, lowest first', () => {
    fc.assert(
      fc.property(inputs, (arrangement) => {
        const rows = [...new FaceRows(arrangement).ofPoset(slowPoset(arrangement))];
        check(arrangement, rows);
        const dimensions = rows.map(({ dimension }) => dimension);
        expect(dimensions).toEqual([...dimensions].sort((a, b) => a - b));
      }),
    );
  });

  it('that stream past are the same', () => {
    fc.assert(
      fc.property(inputs, (arrangement) => {
        const maker = new FaceRows(arrangement);
        const rows: FaceRow[] = [];
        streamFaces(arrangement, (block) => {
          rows.push(...maker.ofFlat(block));
        });
        check(arrangement, rows);
        const line = ({ signs, dimension }: FaceRow) => `${signs} ${dimension}`;
        expect(rows.map(line).sort()).toEqual(
          [...maker.ofPoset(slowPoset(arrangement))].map(line).sort(),
        );
      }),
    );
  });
});
