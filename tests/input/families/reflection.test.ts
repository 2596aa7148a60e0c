// Roots against J. Humphreys, 1990, Reflection Groups and Coxeter Groups: numbers of reflections by
// table 1 of section 2.10 and section 2.13, exponents by section 3.20.
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../../src/arrangement/build.js';
import { InputError, LimitError } from '../../../src/errors.js';
import { reflectionArrangement } from '../../../src/input/families/reflection.js';
import { shown } from '../reading.js';

const exponents: Readonly<Record<string, readonly number[]>> = {
  G2: [1, 5],
  F4: [1, 5, 7, 11],
  E6: [1, 4, 5, 7, 8, 11],
  E7: [1, 5, 7, 9, 11, 13, 17],
  E8: [1, 7, 11, 13, 17, 19, 23, 29],
};

describe('reflection arrangements', () => {
  it.each([
    ['A1', 1, 1],
    ['A4', 10, 4],
    ['a7', 28, 7],
    ['B1', 1, 1],
    ['B5', 25, 5],
    ['C5', 25, 5],
    ['D2', 2, 2],
    ['D6', 30, 6],
    ['E6', 36, 6],
    ['e7', 63, 7],
    ['E8', 120, 8],
    ['F4', 24, 4],
    ['G2', 6, 2],
    ['H3', 15, 3],
    ['H4', 60, 4],
    ['I2(3)', 3, 2],
    ['I2(4)', 4, 2],
    ['i2-5', 5, 2],
    ['I2-6', 6, 2],
    ['I2(8)', 8, 2],
    ['I2(10)', 10, 2],
    ['I_2(12)', 12, 2],
  ])('%s has %i reflections and rank %i', (type, reflections, rank) => {
    const list = reflectionArrangement(type);
    const arrangement = buildArrangement(list);
    expect(list.normals).toHaveLength(reflections);
    expect(arrangement.hyperplanes).toHaveLength(reflections);
    expect(arrangement.rank).toBe(rank);
    expect(list.radicand === null).toBe(list.normals.flat().every((x) => x.b === 0n));
  });

  // The exponents are the partition dual to the numbers of roots by height (section 3.20).
  it.each(Object.keys(exponents))(
    '%s has as many roots of each height as its exponents say',
    (type) => {
      const { normals } = reflectionArrangement(type);
      const heights = normals.map((root) => Number(root.reduce((sum, x) => sum + x.a, 0n)));
      const counts = exponents[type]!;
      for (let height = 1; height <= 30; height += 1) {
        expect(heights.filter((h) => h === height)).toHaveLength(
          counts.filter((exponent) => exponent >= height).length,
        );
      }
    },
  );

  it.each([3, 4, 5, 6, 8, 10, 12])('I2(%i) has its lines at equal angles', (m) => {
    // Simple roots at the angle pi - pi/m, as long as each other for odd m, 1 : 2 cos(pi/m) for even.
    const { normals, radicand } = reflectionArrangement(`I2(${m})`);
    const length = m % 2 === 1 ? 1 : 2 * Math.cos(Math.PI / m);
    const second = [-length * Math.cos(Math.PI / m), length * Math.sin(Math.PI / m)] as const;
    const steps = normals.map((root) => {
      const [x, y] = root.map(
        (z) => (Number(z.a) + Number(z.b) * Math.sqrt(Number(radicand ?? 0n))) / Number(z.d),
      ) as [number, number];
      return (m * Math.atan2(y * second[1], x + y * second[0])) / Math.PI;
    });
    for (const step of steps) expect(Math.abs(step - Math.round(step))).toBeLessThan(1e-9);
    expect(new Set(steps.map(Math.round)).size).toBe(m);
  });

  it('gives H3 and H4 roots of one length only', () => {
    for (const type of ['H3', 'H4']) {
      const tau = (1 + Math.sqrt(5)) / 2;
      for (const root of reflectionArrangement(type).normals) {
        const v = root.map((x) => (Number(x.a) + Number(x.b) * Math.sqrt(5)) / Number(x.d));
        let norm = v.reduce((sum, x) => sum + x * x, 0);
        v.slice(1).forEach((x, i) => {
          norm -= x * v[i]! * (i === 0 ? tau : 1);
        });
        expect(norm).toBeCloseTo(1, 9);
        expect(Math.min(...v)).toBeGreaterThanOrEqual(0);
      }
    }
  });

  it('writes the classical types in their usual coordinates', () => {
    expect(shown(reflectionArrangement('A2'))).toEqual([
      ['1', '-1', '0'],
      ['1', '0', '-1'],
      ['0', '1', '-1'],
    ]);
    expect(reflectionArrangement('B2').labels).toEqual(['e1', 'e1-e2', 'e1+e2', 'e2']);
    expect(shown(reflectionArrangement('C2'))).toEqual([
      ['2', '0'],
      ['1', '-1'],
      ['1', '1'],
      ['0', '2'],
    ]);
  });

  it.each(['E9', 'E5', 'F3', 'H2', 'I2(7)', 'I2', 'A0', 'D1', 'A', 'X3', '', 'A-3', 'A1x'])(
    'does not know %j',
    (type) => {
      expect(() => reflectionArrangement(type)).toThrow(InputError);
    },
  );

  it('refuses what is too large before making it', () => {
    expect(() => reflectionArrangement('A200')).toThrow(LimitError);
    expect(() => reflectionArrangement('B999999999')).toThrow(LimitError);
  });
});
