// Holding somebody else's result against ours: zonotope vertices, sign vectors, or just a number.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { RegionTable } from '../region/regions.js';
import type { TheirList } from './crosscheck-read.js';
import type { CrosscheckReport } from './crosscheck-report.js';
import { crosscheckSigns } from './crosscheck-signs.js';
import { crosscheckVertices } from './crosscheck-vertices.js';

/**
 * Holds a list read by `readTheirList` against the complete list of regions. Every list in the report
 * is cut at `listed` entries; counts are in full. Disagreement when theirs shows ours incomplete.
 */
export function crosscheckList(
  arrangement: Arrangement,
  table: RegionTable,
  theirs: TheirList,
  listed = 100,
): CrosscheckReport {
  const { vertices, signs } = theirs;
  const parts = [
    ...(vertices === null ? [] : [crosscheckVertices(arrangement, table, vertices, listed)]),
    ...(signs === null ? [] : [crosscheckSigns(arrangement, table, signs, listed)]),
  ];
  return { parts, agrees: parts.every((part) => part.agrees) };
}

/** Holds a number of regions against ours. */
export function crosscheckCount(ours: bigint, theirs: bigint): CrosscheckReport {
  const agrees = ours === theirs;
  const part = { kind: 'count', ours: ours.toString(), theirs: theirs.toString(), agrees } as const;
  return { parts: [part], agrees };
}
