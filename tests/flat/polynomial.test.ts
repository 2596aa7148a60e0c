import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { integerRoots, multiplyPolynomials } from '../../src/exact/polynomial.js';
import { characteristicPolynomialByDeletion } from '../../src/flat/by-deletion.js';
import { characteristicPolynomialByFlats } from '../../src/flat/by-flats.js';
import { listFlats } from '../../src/flat/lattice.js';
import { residueFieldFor } from '../../src/flat/residue-field.js';
import {
  allSubsets,
  arrangementOf,
  type Entry,
  smallRows,
  typeA,
} from '../support/arrangements.js';
import { shuffled, unimodularChange } from '../support/coordinates.js';
import { slowPolynomial } from '../support/slow-flats.js';

/** The polynomial by each route and each arithmetic. */
function byEveryRoute(arrangement: Arrangement): Record<string, bigint[]> {
  return {
    flats: characteristicPolynomialByFlats(listFlats(arrangement)),
    deletion: characteristicPolynomialByDeletion(arrangement),
    residues: characteristicPolynomialByDeletion(arrangement, { arithmetic: 'residues' }),
  };
}

function expectPolynomial(arrangement: Arrangement, expected: bigint[]): void {
  expect(byEveryRoute(arrangement)).toEqual({
    flats: expected,
    deletion: expected,
    residues: expected,
  });
}

describe('the characteristic polynomial', () => {
  it('is the sum over all subsets (H. Whitney, 1932, A logical expansion in mathematics)', () => {
    const check = (rows: Entry[][]): void => {
      const arrangement = arrangementOf(rows);
      expectPolynomial(arrangement, slowPolynomial(arrangement));
    };
    expectPolynomial(arrangementOf([[7]]), [-1n, 1n]);
    fc.assert(fc.property(smallRows({ dimension: 2, maximum: 6 }), check), { numRuns: 20 });
    fc.assert(fc.property(smallRows({ dimension: 3, maximum: 9 }), check));
    fc.assert(fc.property(smallRows({ dimension: 4, maximum: 9 }), check), { numRuns: 40 });
    fc.assert(fc.property(smallRows({ dimension: 5, maximum: 9, bound: 1 }), check), {
      numRuns: 40,
    });
    fc.assert(fc.property(smallRows({ dimension: 6, maximum: 9, bound: 1 }), check), {
      numRuns: 20,
    });
  });

  it('is exact over a + b sqrt(k)', () => {
    const entry = fc.tuple(fc.integer({ min: -3, max: 3 }), fc.integer({ min: -1, max: 1 }));
    const rows = fc.array(
      fc.array(entry, { minLength: 4, maxLength: 4 }).filter((row) => row.some(([a, b]) => a || b)),
      { minLength: 1, maxLength: 8 },
    );
    fc.assert(
      fc.property(rows, fc.constantFrom(2n, 3n, 5n, 123_456_791n), (list, radicand) => {
        const arrangement = arrangementOf(list as Entry[][], { radicand });
        expectPolynomial(arrangement, slowPolynomial(arrangement));
      }),
      { numRuns: 40 },
    );
  });

  it('does not change with coordinates, order or signs, whatever the size of the entries', () => {
    // Sizes on both sides of every gate: exact products, rounded quotients, beyond doubles.
    const changes = [
      { steps: 0, factor: 0 },
      { steps: 6, factor: 9 },
      { steps: 8, factor: 60 },
      { steps: 8, factor: 500 },
      { steps: 9, factor: 4000 },
      { steps: 14, factor: 99_999 },
    ];
    for (const rows of [typeA(5).map((row) => row.slice(0, 5)), allSubsets(4)]) {
      const expected = characteristicPolynomialByFlats(listFlats(arrangementOf(rows)));
      changes.forEach((change, i) => {
        const changed = unimodularChange(shuffled(rows, 17 + i), { seed: 40 + i, ...change });
        expectPolynomial(arrangementOf(changed), expected);
      });
    }
    fc.assert(
      fc.property(
        smallRows({ dimension: 4, maximum: 12, bound: 9 }),
        fc.nat(),
        fc.constantFrom(...changes),
        (rows, seed, change) => {
          const expected = characteristicPolynomialByDeletion(arrangementOf(rows));
          const changed = unimodularChange(shuffled(rows, seed), { seed, ...change });
          expectPolynomial(arrangementOf(changed), expected);
        },
      ),
      { numRuns: 40 },
    );
  });

  it('is right for planted dependencies among normals of every size', () => {
    // No choice of coordinates makes these numbers small, so each gate has to do its work.
    const size = fc.constantFrom(9n, 99n, 3000n, 10n ** 5n, 10n ** 7n, 10n ** 12n, 10n ** 25n);
    const planted = size.chain((bound) =>
      fc.integer({ min: 3, max: 4 }).chain((r) =>
        fc.record({
          free: fc.array(
            fc.array(fc.bigInt({ min: -bound, max: bound }), { minLength: r, maxLength: r }),
            { minLength: r + 1, maxLength: r + 2 },
          ),
          sums: fc.array(
            fc.tuple(fc.nat(7), fc.integer({ min: -3, max: 3 }), fc.nat(7), fc.constantFrom(1, 2)),
            { minLength: 2, maxLength: 3 },
          ),
        }),
      ),
    );
    fc.assert(
      fc.property(planted, ({ free, sums }) => {
        const rows = [...free];
        for (const [i, a, j, b] of sums) {
          const x = rows[i % rows.length];
          const y = rows[j % rows.length];
          rows.push(x.map((e, k) => BigInt(a) * e + BigInt(b) * y[k]));
        }
        const nonzero = rows.filter((row) => row.some((x) => x !== 0n));
        if (nonzero.length === 0) return;
        const arrangement = arrangementOf(nonzero);
        expectPolynomial(arrangement, slowPolynomial(arrangement));
      }),
      { numRuns: 60 },
    );
  });

  it('tells normals apart whose ratios are one double', () => {
    // Modulo the last row, (2,3,7) or (2,3,2,7), two rows become (u, t) and (u + 7, t + 7) with
    // t = u - 1, or these with a third entry like the first: different, but one double each.
    let tried = 0;
    for (let X = 7 * (2 ** 26 - 40) + 5; tried < 4; X += 7) {
      const u = [X, X + 7];
      if ((X - 1) / X !== (X + 6) / (X + 7)) continue;
      tried++;
      // 7 a - 2 d = u and 7 b - 3 d = u - 1 with d = 1.
      const lifted = u.map((x) => [(x + 2) / 7, (x - 1 + 3) / 7]);
      expect(lifted.flat().every((x) => Number.isInteger(x) && x < 2 ** 26)).toBe(true);
      const [p, q] = lifted;
      const three = arrangementOf([
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
        [p[0], p[1], 1],
        [q[0], q[1], 1],
        [p[0] + 2, p[1] + 3, 8],
        [2, 3, 7],
      ]);
      expectPolynomial(three, slowPolynomial(three));
      const four = arrangementOf([
        [1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        [p[0], p[1], p[0], 1],
        [q[0], q[1], q[0], 1],
        [p[0] + 2, p[1] + 3, p[0] + 2, 8],
        [2, 3, 2, 7],
      ]);
      expectPolynomial(four, slowPolynomial(four));
    }
    for (const x of [2n ** 27n, 2n ** 30n, 2n ** 40n, 2n ** 52n - 3n, 10n ** 24n]) {
      const near = arrangementOf([
        [1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        [1, 2, x, x - 1n],
        [2, 1, x + 1n, x],
        [3, 1, x, x - 1n],
        [1, 1, 1, 1],
      ]);
      expectPolynomial(near, slowPolynomial(near));
    }
  });

  it('is not misled by a prime that makes different traces equal', () => {
    const p = residueFieldFor(null, 0).p;
    const q = residueFieldFor(null, 1).p;
    // The unit vectors come first, so that the numbers are used as they stand.
    const unit = (d: number): Entry[][] =>
      Array.from({ length: d }, (_, i) => Array.from({ length: d }, (_, j) => (i === j ? 1 : 0)));
    const lists: Entry[][][] = [
      // Equal normals modulo p; lines of equal slope modulo p; the same through points at infinity.
      [...unit(3), [1, 1, 2], [1, 1, 2 + p]],
      [...unit(3), [1, 1, 2], [1, 2, 4 + p], [1, 0, 0]],
      [...unit(3), [0, 1, p], [0, 1, 1], [1, 1, 1]],
      [...unit(3), [p, 0, 1], [0, p, 1], [p, p, 1]],
      [...unit(3), [1, 2, 3], [2, 3, 3 + p], [1, 1, 0]],
      // Equal traces on a hyperplane modulo p, and modulo two primes at once.
      [...unit(4), [1, 1, 2, 3], [2, 1, 2, 3 + p], [1, 0, 0, 1]],
      [...unit(4), [1, 1, 2, 3], [2, 1, 2, BigInt(p) * BigInt(q) + 3n], [1, 0, 0, 1]],
    ];
    for (const list of lists) {
      const arrangement = arrangementOf(list);
      expectPolynomial(arrangement, slowPolynomial(arrangement));
    }
  });

  it('of a product is the product of the polynomials', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 3, maximum: 6 }),
        smallRows({ dimension: 2, maximum: 4 }),
        smallRows({ dimension: 4, maximum: 7 }),
        fc.nat(),
        (a, b, c, seed) => {
          const rows = [
            ...a.map((row) => [...row, 0, 0, 0, 0, 0, 0]),
            ...b.map((row) => [0, 0, 0, ...row, 0, 0, 0, 0]),
            ...c.map((row) => [0, 0, 0, 0, 0, ...row]),
          ];
          const mixed = unimodularChange(shuffled(rows, seed), { seed, steps: 12, factor: 3 });
          const expected = [a, b, c]
            .map((part) => slowPolynomial(arrangementOf(part)))
            .reduce(multiplyPolynomials);
          expectPolynomial(arrangementOf(mixed), expected);
        },
      ),
      { numRuns: 15 },
    );
    // Twenty-five coordinate hyperplanes: (t - 1)^25 without 2^25 steps.
    const boolean = Array.from({ length: 25 }, (_, i) =>
      Array.from({ length: 25 }, (_, j) => (i === j ? 1 : 0)),
    );
    const chi = characteristicPolynomialByDeletion(arrangementOf(boolean));
    expect(integerRoots(chi)).toEqual([{ root: 1n, multiplicity: 25 }]);
  });

  it('vanishes at 1, is monic, and starts with the number of hyperplanes', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 5, maximum: 20, bound: 4 }), (rows) => {
        const arrangement = arrangementOf(rows);
        const chi = characteristicPolynomialByDeletion(arrangement);
        expect(chi.reduce((sum, c) => sum + c, 0n)).toBe(0n);
        expect(chi[arrangement.rank]).toBe(1n);
        expect(chi[arrangement.rank - 1]).toBe(BigInt(-arrangement.hyperplanes.length));
        expect(characteristicPolynomialByFlats(listFlats(arrangement))).toEqual(chi);
      }),
      { numRuns: 25 },
    );
  });

  it('reports its progress', () => {
    const seen: number[] = [];
    const many = Array.from({ length: 62 }, (_, i) => [1, i, i * i, i ** 3, i ** 4, i ** 5]);
    const chi = characteristicPolynomialByDeletion(arrangementOf(many), {
      onProgress: (bases) => seen.push(bases),
    });
    expect(seen).toEqual([16384, 32768]);
    expect(chi[3]).toBe(-37820n); // C(62, 3): the moment curve is in general position
  });
});

describe('residue fields', () => {
  it('have prime size, a root where one is wanted, and inverses', () => {
    for (const radicand of [null, 2n, 5n, 10n ** 30n + 57n]) {
      for (let index = 0; index < 3; index++) {
        const field = residueFieldFor(radicand, index);
        const { p } = field;
        expect(p).toBeLessThan(2 ** 25);
        let divisor = 2;
        while (divisor * divisor <= p && p % divisor !== 0) divisor++;
        expect(divisor * divisor).toBeGreaterThan(p);
        for (const a of [1, 2, 3, 65537, p - 1, (p - 1) / 2]) {
          expect(Number((BigInt(a) * BigInt(field.inverse(a))) % BigInt(p))).toBe(1);
        }
      }
    }
  });

  it('multiply exactly at the edges', () => {
    const field = residueFieldFor(null, 0);
    const edge = fc.oneof(
      fc.integer({ min: 0, max: field.p - 1 }),
      fc.constantFrom(0, 1, field.p - 1, field.p - 2),
    );
    fc.assert(
      fc.property(edge, edge, (a, b) => {
        expect(field.multiply(a, b)).toBe(Number((BigInt(a) * BigInt(b)) % BigInt(field.p)));
      }),
      { numRuns: 2000 },
    );
    // Products that are multiples of p or one less, where a wrong quotient would show.
    const small = Array.from({ length: 2000 }, (_, i) => i + 2);
    const products = small.map((a) => field.multiply(a, field.inverse(a)));
    const opposite = small.map((a) => field.multiply(a, field.p - field.inverse(a)));
    expect(new Set(products)).toEqual(new Set([1]));
    expect(new Set(opposite)).toEqual(new Set([field.p - 1]));
  });
});
