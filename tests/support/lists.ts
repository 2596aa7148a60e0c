// Generator lists for tests, made from plain integer rows or from pairs a + b sqrt(k).
import { type ExactNumber, exactNumber } from '../../src/exact/number.js';
import type { GeneratorList } from '../../src/input/generators.js';

type Entry = number | bigint | readonly [number, number];

function toNumber(x: Entry): ExactNumber {
  return typeof x === 'object' ? exactNumber(BigInt(x[0]), BigInt(x[1])) : exactNumber(BigInt(x));
}

/** A list without labels or ranges. An entry [a, b] is a + b sqrt(radicand). */
export function listOf(
  rows: readonly (readonly Entry[])[],
  radicand: bigint | null = null,
): GeneratorList {
  return {
    title: null,
    coordinates: null,
    radicand,
    normals: rows.map((row) => row.map(toNumber)),
    labels: null,
    ranges: null,
    source: { name: 'test', sha256: null },
  };
}

/** A seeded generator of whole numbers in [low, high]; the same on every machine. */
export function seededIntegers(seed: number): (low: number, high: number) => number {
  let state = seed >>> 0 || 1;
  return (low, high) => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return low + ((state >>> 0) % (high - low + 1));
  };
}
