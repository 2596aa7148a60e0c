// Small arrangements for tests: from rows of integers or numbers, and random ones.
import fc from 'fast-check';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import type { ExactNumber } from '../../src/exact/number.js';
import { exactNumber } from '../../src/exact/number.js';
import type { GeneratorList, Range } from '../../src/input/generators.js';

/** An entry: an integer, or [a, b] for a + b sqrt(k). */
export type Entry = number | bigint | readonly [number | bigint, number | bigint];

function numberOf(entry: Entry): ExactNumber {
  return typeof entry === 'object'
    ? exactNumber(BigInt(entry[0]), BigInt(entry[1]))
    : exactNumber(BigInt(entry));
}

export function generatorsOf(
  rows: readonly (readonly Entry[])[],
  options: { radicand?: bigint; ranges?: readonly Range[] } = {},
): GeneratorList {
  const normals = rows.map((row) => row.map(numberOf));
  const irrational = normals.some((row) => row.some((x) => x.b !== 0n));
  return {
    title: null,
    coordinates: null,
    radicand: irrational ? (options.radicand ?? 5n) : null,
    normals,
    labels: null,
    ranges: options.ranges ?? null,
    source: { name: 'test', sha256: null },
  };
}

export function arrangementOf(
  rows: readonly (readonly Entry[])[],
  options: { radicand?: bigint; ranges?: readonly Range[] } = {},
): Arrangement {
  return buildArrangement(generatorsOf(rows, options));
}

/** All nonzero 0/1 vectors of length d. */
export function allSubsets(d: number): number[][] {
  return Array.from({ length: 2 ** d - 1 }, (_, i) =>
    Array.from({ length: d }, (_, j) => ((i + 1) >> j) & 1),
  );
}

/** e_i - e_j in n + 1 coordinates. */
export function typeA(n: number): number[][] {
  const rows: number[][] = [];
  for (let i = 0; i <= n; i++) {
    for (let j = i + 1; j <= n; j++) {
      rows.push(Array.from({ length: n + 1 }, (_, k) => (k === i ? 1 : k === j ? -1 : 0)));
    }
  }
  return rows;
}

/** Random rows of integers up to `bound`, none zero; parallel rows and low rank happen often. */
export function smallRows(options: {
  dimension: number;
  maximum: number;
  bound?: number;
}): fc.Arbitrary<number[][]> {
  const bound = options.bound ?? 3;
  const row = fc
    .array(fc.integer({ min: -bound, max: bound }), {
      minLength: options.dimension,
      maxLength: options.dimension,
    })
    .filter((entries) => entries.some((x) => x !== 0));
  return fc.array(row, { minLength: 1, maxLength: options.maximum });
}

/** A positive pseudo-random sequence below `bound`, the same on every machine. */
export function sequence(seed: number): (bound: number) => number {
  let state = seed >>> 0;
  return (bound) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * bound);
  };
}
