// Holding somebody else's result against ours: zonotope vertices, sign vectors, or just a number.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { FlatLattice } from '../flat/lattice.js';
import type { RegionTable } from '../region/regions.js';
import { crosscheckFacets, type TheirFacets } from './crosscheck-facets.js';
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

/** Holds facet inequalities against ours. */
export function crosscheckFacetList(
  arrangement: Arrangement,
  lattice: FlatLattice,
  theirs: TheirFacets,
  listed = 100,
): CrosscheckReport {
  const part = crosscheckFacets(arrangement, lattice, theirs, listed);
  return { parts: [part], agrees: part.agrees };
}

/** Holds numbers of faces of the zonotope, from the vertices up, against ours; theirs may leave out the
 * zonotope itself. */
export function crosscheckFaces(
  ours: readonly bigint[],
  theirs: readonly bigint[],
): CrosscheckReport {
  const proper = theirs.length === ours.length || theirs.length === ours.length - 1;
  const agrees = proper && theirs.every((count, k) => count === ours[k]);
  const part = {
    kind: 'faces',
    ours: ours.map(String),
    theirs: theirs.map(String),
    agrees,
  } as const;
  return { parts: [part], agrees };
}
