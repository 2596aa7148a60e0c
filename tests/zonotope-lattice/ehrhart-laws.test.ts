// Laws of the Ehrhart polynomial, each route by itself: the definition by slow minors, change of
// coordinates, products, doubled generators, moved corners, and numbers past 32 and 53 bits.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gcd } from '../../src/exact/integers.js';
import { multiplyPolynomials } from '../../src/exact/polynomial.js';
import { listFlats } from '../../src/flat/lattice.js';
import {
  ehrhartByContraction,
  estimateContraction,
} from '../../src/zonotope/ehrhart-by-contraction.js';
import { ehrhartByFlats } from '../../src/zonotope/ehrhart-by-flats.js';
import { ehrhartBySubsets, estimateSubsets } from '../../src/zonotope/ehrhart-by-subsets.js';
import {
  boundaryPointsIn,
  coefficientsAt,
  type EhrhartTerms,
  ehrhartConstituents,
  ehrhartPeriod,
  interiorPointsIn,
  latticePointsIn,
} from '../../src/zonotope/ehrhart-terms.js';
import { generatedLattice, type LatticeGenerators } from '../../src/zonotope/lattice-generators.js';
import { allSubsets, arrangementOf, sequence, smallRows } from '../support/arrangements.js';
import { shuffled, unimodularChange } from '../support/coordinates.js';
import { choices, determinant, minorGcd } from '../support/minors.js';
import { rangedArrangement, rangedRows } from './ranged.js';
import { generatorsFor, lineOf, routes } from './routes.js';

type Rows = readonly (readonly (number | bigint)[])[];

const routeList = Object.entries(routes);

const coefficientsBy = (name: string, rows: Rows): readonly bigint[] =>
  routes[name](arrangementOf(rows))[0].coefficients;

/** The sum over independent k-subsets of the gcd of their k-minors, subset by subset. */
function byDefinition(rows: Rows): bigint[] {
  const integers = rows.map((row) => row.map(BigInt));
  const { rank } = arrangementOf(rows);
  return Array.from({ length: rank + 1 }, (_, k) =>
    k === 0
      ? 1n
      : choices(rows.length, k).reduce(
          (sum, chosen) =>
            sum +
            minorGcd(
              chosen.map((i) => integers[i]),
              k,
            ),
          0n,
        ),
  );
}

/**
 * Terms with a moved corner by their definition: a subset I counts in t Z when t corner lies in the
 * lattice plus the span of I, so when adding it to I as a vector keeps the gcd of minors (over the
 * common denominator); orders are looked for one after another.
 */
function termsByDefinition({
  rank,
  vectors,
  corner,
  denominator,
}: LatticeGenerators): EhrhartTerms {
  const found = new Map<bigint, bigint[]>();
  for (let k = 0; k <= rank; k++) {
    for (const chosen of choices(vectors.length, k)) {
      const set = chosen.map((i) => vectors[i]);
      const index = k === 0 ? 1n : minorGcd(set, k);
      if (index === 0n) continue;
      let order = 1n;
      for (; k < rank; order++) {
        const wedge = minorGcd([...set, corner.map((x) => x * order)], k + 1);
        if (wedge % (denominator * index) === 0n) break;
      }
      const coefficients = found.get(order) ?? new Array<bigint>(rank + 1).fill(0n);
      coefficients[k] += index;
      found.set(order, coefficients);
    }
  }
  return [...found]
    .sort(([p], [q]) => (p < q ? -1 : 1))
    .map(([order, coefficients]) => ({ order, coefficients }));
}

describe.each(routeList)('the Ehrhart polynomial by %s', (name, route) => {
  it('is what its definition says, parallel generators and low rank included', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 7, bound: 4 }), (rows) => {
        expect(coefficientsBy(name, rows)).toEqual(byDefinition(rows));
      }),
    );
    fc.assert(
      fc.property(smallRows({ dimension: 5, maximum: 7, bound: 2 }), (rows) => {
        expect(coefficientsBy(name, rows)).toEqual(byDefinition(rows));
      }),
      { numRuns: 25 },
    );
  });

  it('is what its definition says for a corner that is no lattice point', () => {
    for (const denominator of [2, 3, 4]) {
      fc.assert(
        fc.property(
          rangedRows({ dimension: 3, maximum: 6, bound: 3, denominator }),
          fc.boolean(),
          (input, centred) => {
            const arrangement = rangedArrangement(input);
            expect(route(arrangement, centred)).toEqual(
              termsByDefinition(generatorsFor(arrangement, centred)),
            );
          },
        ),
        { numRuns: 25 },
      );
    }
    fc.assert(
      fc.property(rangedRows({ dimension: 4, maximum: 6, bound: 2, denominator: 12 }), (input) => {
        const arrangement = rangedArrangement(input);
        expect(route(arrangement)).toEqual(termsByDefinition(generatorsFor(arrangement)));
      }),
      { numRuns: 15 },
    );
  });

  it('does not change with unimodular coordinates, order and signs', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 4, maximum: 8, bound: 3 }),
        fc.integer({ min: 1, max: 10 ** 6 }),
        (rows, seed) => {
          const changed = unimodularChange(shuffled(rows, seed), { seed, steps: 12, factor: 3 });
          expect(coefficientsBy(name, changed)).toEqual(coefficientsBy(name, rows));
        },
      ),
      { numRuns: 30 },
    );
  });

  it('does not change with coordinates that take entries past doubles', () => {
    const rows = allSubsets(4);
    const changed = unimodularChange(rows, { seed: 3, steps: 200, factor: 9 });
    expect(changed.flat().some((x) => x > 10n ** 16n || -x > 10n ** 16n)).toBe(true);
    expect(lineOf(route(arrangementOf(changed)))).toBe('1 15 105 440 1050');
  });

  it('multiplies for two arrangements side by side', () => {
    fc.assert(
      fc.property(
        smallRows({ dimension: 2, maximum: 5, bound: 4 }),
        smallRows({ dimension: 3, maximum: 5, bound: 3 }),
        (left, right) => {
          const both = [
            ...left.map((row) => [...row, 0, 0, 0]),
            ...right.map((row) => [0, 0, ...row]),
          ];
          expect(coefficientsBy(name, both)).toEqual(
            multiplyPolynomials(coefficientsBy(name, left), coefficientsBy(name, right)),
          );
        },
      ),
      { numRuns: 30 },
    );
  });

  it('sees a doubled generator as one of twice the length, and as two', () => {
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6, bound: 3 }), ([first, ...rest]) => {
        const twice = coefficientsBy(name, [first.map((x) => 2 * x), ...rest]);
        expect(coefficientsBy(name, [first, first, ...rest])).toEqual(twice);
        expect(coefficientsBy(name, [first, first.map((x) => -x), ...rest])).toEqual(twice);
      }),
      { numRuns: 30 },
    );
  });
});

describe('lengths and corners', () => {
  it('scales generators that are no lattice vectors, and says by how much', () => {
    // (1/2, 0) and (0, 2/3) with the scale 6: a 3 x 4 rectangle.
    const generators = generatorsFor(
      arrangementOf(
        [
          [1, 0],
          [0, 1],
        ],
        {
          ranges: [
            { low: { a: 0n, b: 0n, d: 1n }, high: { a: 1n, b: 0n, d: 2n } },
            { low: { a: -1n, b: 0n, d: 3n }, high: { a: 1n, b: 0n, d: 3n } },
          ],
        },
      ),
    );
    expect(generators.scale).toBe(6n);
    expect(ehrhartBySubsets(generators)[0].coefficients).toEqual([1n, 7n, 12n]);
  });

  it('counts points, interior and boundary points as a rectangle has them', () => {
    const terms = ehrhartBySubsets(
      generatorsFor(
        arrangementOf([
          [2, 0],
          [0, 3],
        ]),
      ),
    );
    expect(ehrhartPeriod(terms)).toBe(1n);
    expect(latticePointsIn(terms, 0n)).toBe(1n);
    expect(latticePointsIn(terms, 1n)).toBe(12n);
    expect(interiorPointsIn(terms, 1n)).toBe(2n);
    expect(boundaryPointsIn(terms, 1n)).toBe(10n);
    expect(latticePointsIn(terms, 10n)).toBe(21n * 31n);
    expect(interiorPointsIn(terms, 10n)).toBe(19n * 29n);
  });

  it('has a constituent for every class of t that differs', () => {
    // A point at 1/2 in the line times a segment from 1/3: orders 2 and 3 apart, 6 together.
    const terms: EhrhartTerms = [
      { order: 1n, coefficients: [0n, 5n] },
      { order: 2n, coefficients: [1n, 0n] },
      { order: 3n, coefficients: [7n, 0n] },
    ];
    expect(ehrhartPeriod(terms)).toBe(6n);
    expect(
      ehrhartConstituents(terms).map(({ divisor, coefficients }) => [divisor, ...coefficients]),
    ).toEqual([
      [1n, 0n, 5n],
      [2n, 1n, 5n],
      [3n, 7n, 5n],
      [6n, 8n, 5n],
    ]);
    expect(coefficientsAt(terms, 4n)).toEqual([1n, 5n]);
  });
});

describe('totals past 32 bits', () => {
  const random = (n: number, seed: number): number[][] => {
    const next = sequence(seed);
    return Array.from({ length: n }, () => Array.from({ length: 6 }, () => next(9) - 4));
  };

  /** The sum of all 6 x 6 determinants' sizes in big integers, by expansion along the last row. */
  function volumeInBigIntegers(rows: readonly (readonly number[])[]): bigint {
    const big = rows.map((row) => row.map(BigInt));
    let total = 0n;
    for (const five of choices(rows.length, 5)) {
      const chosen = five.map((i) => big[i]);
      const cofactors = Array.from({ length: 6 }, (_, c) => {
        const minor = determinant5(chosen.map((row) => row.filter((__, j) => j !== c)));
        return c % 2 === 0 ? minor : -minor;
      });
      for (let i = five[4] + 1; i < rows.length; i++) {
        let sum = 0n;
        for (let c = 0; c < 6; c++) sum += cofactors[c] * big[i][c];
        total += sum < 0n ? -sum : sum;
      }
    }
    return total;
  }

  /** Fraction-free elimination (E. Bareiss, 1968). */
  function determinant5(rows: readonly (readonly bigint[])[]): bigint {
    const m = rows.map((row) => row.slice());
    let previous = 1n;
    let sign = 1n;
    for (let p = 0; p + 1 < m.length; p++) {
      const at = m.findIndex((row, i) => i >= p && row[p] !== 0n);
      if (at < 0) return 0n;
      if (at !== p) {
        [m[p], m[at]] = [m[at], m[p]];
        sign = -sign;
      }
      for (let i = p + 1; i < m.length; i++) {
        for (let j = p + 1; j < m.length; j++) {
          m[i][j] = (m[p][p] * m[i][j] - m[i][p] * m[p][j]) / previous;
        }
      }
      previous = m[p][p];
    }
    return sign * m[m.length - 1][m.length - 1];
  }

  it('are exact for 30 generators of rank 6 with entries to 4, by every route and big sums', () => {
    const arrangement = arrangementOf(random(30, 1));
    const generators = generatorsFor(arrangement);
    const terms = ehrhartBySubsets(generators);
    expect(ehrhartByContraction(generators)).toEqual(terms);
    expect(ehrhartByContraction(generators, { arithmetic: 'big' })).toEqual(terms);
    const volume = terms[0].coefficients[6];
    expect(volume).toBe(volumeInBigIntegers(random(30, 1)));
    expect(volume > 2n ** 31n).toBe(true);
  });

  it('are exact for 40 generators of rank 6 with entries to 4, in doubles and big integers', () => {
    const generators = generatorsFor(arrangementOf(random(40, 2)));
    const terms = ehrhartBySubsets(generators);
    expect(ehrhartByContraction(generators, { arithmetic: 'big' })).toEqual(terms);
    expect(ehrhartByContraction(generators)).toEqual(terms);
    expect(terms[0].coefficients[6] > 2n ** 32n).toBe(true);
  });

  it('are exact past 2^53, by every route', () => {
    const next = sequence(9);
    const rows = Array.from({ length: 11 }, () =>
      Array.from({ length: 4 }, () => next(2_000_001) - 1_000_000),
    );
    const arrangement = arrangementOf(rows);
    const [first, ...others] = routeList.map(([, route]) => route(arrangement));
    for (const other of others) expect(other).toEqual(first);
    const integers = rows.map((row) => row.map(BigInt));
    const volume = choices(11, 4).reduce((sum, chosen) => {
      const d = determinant(chosen.map((i) => integers[i]));
      return sum + (d < 0n ? -d : d);
    }, 0n);
    expect(first[0].coefficients[4]).toBe(volume);
    expect(volume > 2n ** 53n).toBe(true);
  });

  it('are exact for contents of thirty digits', () => {
    const factor = 10n ** 30n + 7n;
    const rows = allSubsets(3).map((row) => row.map((x) => BigInt(x) * factor));
    const expected = [1n, 7n * factor, 21n * factor ** 2n, 30n * factor ** 3n];
    for (const [, route] of routeList) {
      expect(route(arrangementOf(rows))[0].coefficients).toEqual(expected);
    }
  });
});

describe('the routes among one another', () => {
  it('agree where planes, quotients and flats are many', () => {
    const arrangement = arrangementOf(allSubsets(5));
    const generators = generatorsFor(arrangement, true);
    const terms = ehrhartByContraction(generators);
    expect(ehrhartBySubsets(generators)).toEqual(terms);
    expect(ehrhartByFlats(arrangement, generators, listFlats(arrangement))).toEqual(terms);
  });

  it('report progress below what the estimates foretell', () => {
    const arrangement = arrangementOf(allSubsets(6));
    const generators = generatorsFor(arrangement);
    const seen: number[] = [];
    ehrhartByContraction(generators, { onProgress: (leaves) => seen.push(leaves) });
    const { leaves, seconds } = estimateContraction(generators);
    expect(seen.every((x, i) => i === 0 || x > seen[i - 1])).toBe(true);
    expect(Math.max(0, ...seen)).toBeLessThan(1.5 * leaves);
    expect(leaves).toBeLessThan(estimateSubsets(generators).subsets);
    expect(seconds).toBeGreaterThan(0);
  });

  it('have the index of the generated lattice in their elementary divisors', () => {
    // The index is the gcd of all maximal minors, and the product of the divisors.
    fc.assert(
      fc.property(smallRows({ dimension: 3, maximum: 6, bound: 4 }), (rows) => {
        const generators = generatorsFor(arrangementOf(rows));
        const { vectors, rank } = generators;
        const { divisors, index } = generatedLattice(generators);
        expect(divisors).toHaveLength(rank);
        expect(index).toBe(minorGcd(vectors, rank));
        expect(divisors[0]).toBe(vectors.flat().reduce(gcd, 0n));
      }),
    );
  });
});
