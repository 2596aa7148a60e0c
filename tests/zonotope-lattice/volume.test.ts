// Volumes over Q and over quadratic fields, against published ones and by two routes.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { type ExactNumber, exactNumber, formatNumber } from '../../src/exact/number.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { ehrhartByContraction } from '../../src/zonotope/ehrhart-by-contraction.js';
import { latticeObstacle } from '../../src/zonotope/lattice-generators.js';
import {
  estimateVolumeByAngles,
  estimateVolumeBySubsets,
  euclideanVolume,
  squaredCovolume,
  volumeByAngles,
  volumeBySubsets,
} from '../../src/zonotope/volume.js';
import { allSubsets, arrangementOf, smallRows, typeA } from '../support/arrangements.js';
import { choices, determinant } from '../support/minors.js';
import { generatorsFor } from './routes.js';

const routes: [string, (arrangement: Arrangement) => ExactNumber][] = [
  ['subsets', volumeBySubsets],
  ['angles', volumeByAngles],
];

const golden: [number, number] = [1, 1];
const minusGolden: [number, number] = [-1, -1];

describe.each(routes)('the volume by %s', (_, volume) => {
  it('is the sum of all determinants, relative to the lattice of the span', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 7, bound: 4 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const { vectors, rank } = generatorsFor(arrangement);
        const sum = choices(vectors.length, rank).reduce((total, chosen) => {
          const d = determinant(chosen.map((i) => vectors[i]));
          return total + (d < 0n ? -d : d);
        }, 0n);
        expect(volume(arrangement)).toEqual(exactNumber(sum));
      }),
    );
  });

  it('is that of the Ehrhart polynomial for the 0/1 vectors in R^5', () => {
    const arrangement = arrangementOf(allSubsets(5));
    const [{ coefficients }] = ehrhartByContraction(generatorsFor(arrangement));
    expect(volume(arrangement)).toEqual(exactNumber(coefficients[5]));
  });

  it('is that of fractions where the ranges are', () => {
    const half = { low: exactNumber(-1n, 0n, 4n), high: exactNumber(1n, 0n, 4n) };
    const arrangement = arrangementOf(allSubsets(3), { ranges: allSubsets(3).map(() => half) });
    // 30 for unit ranges (computed by two slow separate programs), in half the size.
    expect(volume(arrangement)).toEqual(exactNumber(30n, 0n, 8n));
  });

  it('is exact over the golden field: the rhombic triacontahedron and type H3', () => {
    // Ten rhombohedra of each of two shapes, with edges of squared length 10 + 2 sqrt(5):
    // 4 sqrt(5 + 2 sqrt(5)) times the cube of the edge in all (H. Coxeter, 1973, Regular Polytopes;
    // from memory). Its square: 16 (5 + 2 sqrt(5)) (10 + 2 sqrt(5))^3 = (320 + 160 sqrt(5))^2.
    const arrangement = arrangementOf([
      [0, 2, golden],
      [golden, 0, 2],
      [2, golden, 0],
      [0, 2, minusGolden],
      [minusGolden, 0, 2],
      [2, minusGolden, 0],
    ]);
    expect(formatNumber(volume(arrangement), 5n)).toBe('320+160*sqrt(5)');
    const edge = Math.sqrt(10 + 2 * Math.sqrt(5));
    const expected = 4 * Math.sqrt(5 + 2 * Math.sqrt(5)) * edge ** 3;
    expect(Number(euclideanVolume(arrangement, volume(arrangement)).decimal)).toBeCloseTo(
      expected,
      9,
    );
    expect(latticeObstacle(arrangement)).toMatch(/sqrt\(5\)/);
  });

  it('is exact past doubles', () => {
    const factor = 10n ** 20n + 39n;
    const rows = allSubsets(3).map((row) => row.map((x) => BigInt(x) * factor));
    expect(volume(arrangementOf(rows))).toEqual(exactNumber(30n * factor ** 3n));
  });
});

describe('the Euclidean volume', () => {
  it('of permutohedra is n^(n-2) sqrt(n)', () => {
    // R. Stanley, 1991, A zonotope associated with graphical degree sequences: the relative volume is
    // the number of trees n^(n-2) (A. Cayley, 1889); the lattice of the span has covolume sqrt(n).
    for (const n of [3, 4, 5, 6]) {
      const arrangement = arrangementOf(typeA(n - 1));
      const trees = BigInt(n) ** BigInt(n - 2);
      expect(volumeByAngles(arrangement)).toEqual(exactNumber(trees));
      expect(squaredCovolume(arrangement)).toEqual(exactNumber(BigInt(n)));
      const { square, decimal } = euclideanVolume(arrangement, volumeByAngles(arrangement));
      expect(square).toEqual(exactNumber(trees * trees * BigInt(n)));
      expect(Number(decimal)).toBeCloseTo(Number(trees) * Math.sqrt(n), 6);
    }
  });

  it('does not depend on the coordinates of a plane over a quadratic field', () => {
    // A square of side sqrt(2) (1, 1, 0) and (0, 0, sqrt(2)): area 2.
    const arrangement = arrangementOf(
      [
        [1, 1, 0],
        [0, 0, [0, 1]],
      ],
      { radicand: 2n },
    );
    expect(euclideanVolume(arrangement, volumeBySubsets(arrangement)).square).toEqual(
      exactNumber(4n),
    );
  });

  it('has finite estimates that grow with the number of generators', () => {
    const small = buildArrangement(reflectionArrangement('E6'));
    const large = buildArrangement(reflectionArrangement('E7'));
    for (const estimate of [estimateVolumeByAngles, estimateVolumeBySubsets]) {
      expect(estimate(small)).toBeGreaterThan(0);
      expect(estimate(large)).toBeGreaterThan(estimate(small));
    }
  });
});
