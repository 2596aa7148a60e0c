// What all families share: checked parameters, the bound on their size, and lists of whole numbers.
import { InputError, LimitError } from '../../errors.js';
import { familyEntries } from '../../limits.js';
import type { GeneratorList } from '../generators.js';

/** Names that a family may give beside its normals. */
export interface FamilyNames {
  readonly coordinates?: readonly string[];
  readonly labels?: readonly string[];
}

/** Throws InputError unless `value` is a whole number, at least `least`. */
export function requireWhole(name: string, value: number, least: number): void {
  if (Number.isSafeInteger(value) && value >= least) return;
  throw new InputError(`${name} is ${value}`, `give a whole number, ${least} or more`);
}

/** Throws LimitError where a family would have too many entries. */
export function requireRoom(title: string, normals: number, coordinates: number): void {
  const entries = normals * coordinates;
  if (entries <= familyEntries) return;
  const estimate = Number.isSafeInteger(entries) ? entries.toLocaleString('en') : '10^15 or more';
  throw new LimitError(
    title,
    `${estimate} entries`,
    `${familyEntries.toLocaleString('en')} entries`,
    'make a smaller one',
  );
}

/** A list of normals with whole entries. */
export function wholeList(
  title: string,
  rows: readonly (readonly (number | bigint)[])[],
  { coordinates, labels }: FamilyNames = {},
): GeneratorList {
  return {
    title,
    coordinates: coordinates ?? null,
    radicand: null,
    normals: rows.map((row) => row.map((entry) => ({ a: BigInt(entry), b: 0n, d: 1n }))),
    labels: labels ?? null,
    ranges: null,
    source: { name: title, sha256: null },
  };
}
