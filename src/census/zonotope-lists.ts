// Lists of the zonotope as commands want them: estimated first, refused where they would not fit,
// then row by row.
import type { Arrangement } from '../arrangement/arrangement.js';
import { LimitError } from '../errors.js';
import { listedTiles } from '../limits.js';
import { boundTiles, type Tile, tilesOf } from '../zonotope/tiling.js';
import { faceRows } from './face-listing.js';
import { type FacetVertexRow, facetRows } from './facet-rows.js';
import { listChecked } from './listing.js';
import { type CensusListener, listFlatsWithin, silentListener } from './polynomial.js';
import { formatBytes, formatCount } from './quantities.js';
import { type EdgeRow, edgeRows, type VertexRow, vertexRows } from './zonotope-rows.js';

/** Bytes that finding vertices by their signs takes for each of them. */
const bytesPerNamedVertex = 120;

/** LimitError where the list of regions would pass `memoryBytes`. */
export function listVertices(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
): Iterable<VertexRow> {
  const table = listChecked(arrangement, memoryBytes, listener);
  listener.stage('writing vertices');
  return vertexRows(arrangement, table);
}

/** LimitError where the tables of the listing of faces would pass `memoryBytes`. */
export function listEdges(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
): Iterable<EdgeRow> {
  const faces = faceRows(arrangement, arrangement.rank - 1, memoryBytes, listener);
  return edgeRows(arrangement, faces);
}

/** `named`: with the vertices on each. LimitError where the flats, or then the vertices, do not fit. */
export function listFacets(
  arrangement: Arrangement,
  named: boolean,
  memoryBytes: number,
  listener: CensusListener = silentListener,
): Iterable<FacetVertexRow> {
  const lattice = listFlatsWithin(arrangement, memoryBytes, listener);
  const table = named ? listChecked(arrangement, memoryBytes, listener) : null;
  const bytes = table === null ? 0 : 2 * table.half.rows * bytesPerNamedVertex;
  if (bytes > memoryBytes) {
    throw new LimitError(
      'the vertices of each facet',
      formatBytes(bytes),
      formatBytes(memoryBytes),
      'raise it with --memory SIZE, or leave out --facet-vertices',
    );
  }
  listener.stage('writing facets');
  return facetRows(arrangement, lattice, table);
}

/** LimitError where there could be more than `listedTiles`. */
export function listTiles(
  arrangement: Arrangement,
  listener: CensusListener = silentListener,
): Iterable<Tile> {
  const tiles = boundTiles(arrangement);
  if (tiles > listedTiles) {
    throw new LimitError(
      'a list of tiles',
      `${formatCount(tiles)} of them`,
      formatCount(listedTiles),
      'take fewer generators; the Ehrhart polynomial counts the tiles without listing one',
    );
  }
  listener.stage(`writing at most ${formatCount(tiles)} tiles`);
  return tilesOf(arrangement);
}
