// The list of regions of an arrangement, half of it: every region has a negation.
import type { Arrangement } from '../arrangement/arrangement.js';
import { type WordTable, wordsFor } from '../bits/signs.js';
import { chartOf, separateClasses } from './chart.js';
import { ALL, RegionEnumerator } from './enumerator.js';

/** All regions of m hyperplanes: the rows of `half`, and their complements. */
export interface RegionTable {
  readonly hyperplanes: number;
  /** Sign words of the regions on the positive side of hyperplane 0. */
  readonly half: WordTable;
}

/**
 * Lists every region, exactly, by deletion and restriction. Memory: about 4 (W + 4) bytes and as much
 * again while it grows for each region of the half, W words a row; estimate before calling.
 */
export function listRegions(arrangement: Arrangement): RegionTable {
  const { ring, rank, hyperplanes } = arrangement;
  const n = hyperplanes.length;
  const enumerator = new RegionEnumerator(ring, n, rank, wordsFor(n));
  enumerator.load(chartOf(ring, separateClasses(hyperplanes.map((h) => h.essential))));
  enumerator.regions(rank, ALL, false);
  return { hyperplanes: n, half: enumerator.tables[rank + 1] };
}

/** Regions in all. */
export function regionCount(table: RegionTable): number {
  return 2 * table.half.rows;
}
