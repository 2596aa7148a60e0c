// Closed forms against published counts and slow obvious sums.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  binomial,
  genericFaces,
  genericRegions,
  regionsByMultiplicities,
  simplicialByMultiplicities,
} from '../../src/census/closed-forms.js';

describe('binomial coefficients', () => {
  it("obey Pascal's rule", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.integer({ min: -1, max: 61 }), (n, k) => {
        expect(binomial(n, k)).toBe(
          n === 0 ? (k === 0 ? 1n : 0n) : binomial(n - 1, k - 1) + binomial(n - 1, k),
        );
      }),
    );
    expect(binomial(0, 0)).toBe(1n);
  });
});

describe('generic normals', () => {
  it('give n^2 - n + 2 regions in rank 3, as a polar zonohedron has vertices', () => {
    // Common practice: a polar zonohedron with n zones has n(n-1) faces and n(n-1) + 2 vertices.
    for (let n = 3; n < 20; n++) {
      expect(genericRegions(n, 3)).toBe(BigInt(n * n - n + 2));
      expect(genericFaces(n, 3)).toEqual([
        1n,
        BigInt(n * (n - 1)),
        BigInt(2 * n * (n - 1)),
        BigInt(n * n - n + 2),
      ]);
    }
  });

  it('give the cube when there are as many as the rank: 2^k C(r, k) faces', () => {
    for (let r = 1; r < 9; r++) {
      expect(genericFaces(r, r)).toEqual(
        Array.from({ length: r + 1 }, (_, k) => 2n ** BigInt(k) * binomial(r, k)),
      );
    }
  });

  it('obey the Euler relation', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 9 }), fc.integer({ min: 0, max: 20 }), (r, more) => {
        const faces = genericFaces(r + more, r);
        const sum = faces.reduce((s, f, k) => (k % 2 === 0 ? s + f : s - f), 0n);
        expect(sum).toBe(r % 2 === 0 ? 1n : -1n);
      }),
    );
  });
});

describe('multiplicities of rank 3', () => {
  // B. Grünbaum, 2009, A catalogue of simplicial arrangements in the real projective plane, Ars
  // Math. Contemp. 2: t-vectors of A(6,1), A(7,1), A(8,1), A(9,1), A(12,1), A(15,1). A3, B3 and H3
  // are A(6,1), A(9,1) and A(15,1), with 24, 48 and 120 regions (J. Humphreys, 1990).
  const catalogue: [number, Record<number, number>][] = [
    [6, { 2: 3, 3: 4 }],
    [7, { 2: 3, 3: 6 }],
    [8, { 2: 4, 3: 6, 4: 1 }],
    [9, { 2: 6, 3: 4, 4: 3 }],
    [12, { 2: 6, 3: 15, 6: 1 }],
    [15, { 2: 15, 3: 10, 5: 6 }],
  ];
  const asMap = (t: Record<number, number>) =>
    new Map(Object.entries(t).map(([k, lines]) => [Number(k), lines]));

  it('are simplicial by Melchior for the catalogue, and not otherwise', () => {
    for (const [, t] of catalogue) expect(simplicialByMultiplicities(asMap(t))).toBe(true);
    expect(simplicialByMultiplicities(asMap({ 2: 6 }))).toBe(false);
    expect(simplicialByMultiplicities(asMap({ 2: 11, 5: 1 }))).toBe(false);
  });

  it('count the regions', () => {
    const regions = catalogue.map(([, t]) => regionsByMultiplicities(asMap(t)));
    expect(regions[0]).toBe(24n);
    expect(regions[3]).toBe(48n);
    expect(regions[5]).toBe(120n);
    for (let n = 3; n < 12; n++) {
      expect(regionsByMultiplicities(asMap({ 2: (n * (n - 1)) / 2 }))).toBe(genericRegions(n, 3));
    }
  });
});
