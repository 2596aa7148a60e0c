// What every reader and every family returns: the normals as given, with what the file said of them.
import type { ExactNumber } from '../exact/number.js';
import { exactOne, exactZero } from '../exact/number.js';

/** A generator's range: the zonotope is the sum of the segments from low u to high u. */
export interface Range {
  readonly low: ExactNumber;
  readonly high: ExactNumber;
}

/** The range of a generator whose file gives none. */
export const unitRange: Range = { low: exactZero, high: exactOne };

/**
 * n normals in d coordinates (n, d at least 1), each of them non-zero, all numbers in Q or in one
 * field Q(sqrt(radicand)). Lists run parallel to `normals`.
 */
export interface GeneratorList {
  readonly title: string | null;
  /** d names, or null where the source names none. */
  readonly coordinates: readonly string[] | null;
  /** Null for Q; square-free and above 1 otherwise (and then some number has a root part). */
  readonly radicand: bigint | null;
  readonly normals: readonly (readonly ExactNumber[])[];
  /** n labels, distinct where not null; a null entry has none. */
  readonly labels: readonly (string | null)[] | null;
  /** n ranges, low below high; null means 0..1 throughout. */
  readonly ranges: readonly Range[] | null;
  /** Name shown to the user, and the SHA-256 of the bytes read, in hex (null for lists made in memory). */
  readonly source: { readonly name: string; readonly sha256: string | null };
}
