// Families of 0/1 vectors, in numeric order read as binary numbers, the first coordinate leading.
import type { GeneratorList } from '../generators.js';
import { requireRoom, requireWhole, wholeList } from './family.js';

function bits(value: number, length: number): number[] {
  return Array.from({ length }, (_, i) => (value >>> (length - 1 - i)) & 1);
}

/** The 2^d - 1 nonzero 0/1 vectors in R^d, d at least 1. */
export function allSubsets(d: number): GeneratorList {
  requireWhole('the dimension', d, 1);
  const title = `All nonzero 0/1 vectors in R^${d}`;
  requireRoom(title, 2 ** d - 1, d);
  return wholeList(
    title,
    Array.from({ length: 2 ** d - 1 }, (_, i) => bits(i + 1, d)),
  );
}

/** The 2^n vectors (1, x) in R^(n+1), x all 0/1 vectors: the threshold arrangement of n inputs. */
export function thresholdNormals(n: number): GeneratorList {
  requireWhole('the number of inputs', n, 0);
  const title = `Threshold arrangement of ${n} ${n === 1 ? 'input' : 'inputs'}`;
  requireRoom(title, 2 ** n, n + 1);
  return wholeList(
    title,
    Array.from({ length: 2 ** n }, (_, i) => [1, ...bits(i, n)]),
  );
}
