// Tiles as corners on doubles: a tile's corner k has generator s at its high end where bit s of k is 1.
import { addNumbers, type ExactNumber, multiplyNumbers, negateNumber } from '../exact/number.js';
import { unitRange } from '../input/generators.js';
import { placePoints } from '../zonotope/solid-place.js';
import type { Projection } from '../zonotope/solid-projection.js';
import type { Tile } from '../zonotope/tiling.js';

/** All corners of all tiles, tile after tile, coordinate after coordinate. */
export function placeTiles(projection: Projection, tiles: readonly Tile[]): Float64Array {
  const { normals, ranges, radicand } = projection.arrangement.generators;
  const segments = normals.map((normal, j) => {
    const { low, high } = ranges?.[j] ?? unitRange;
    const length = addNumbers(high, negateNumber(low));
    return normal.map((x) => multiplyNumbers(length, x, radicand ?? 0n));
  });
  const corners: ExactNumber[][] = [];
  for (const { generators, shift } of tiles) {
    for (let k = 0; k < 2 ** generators.length; k++) {
      let corner = shift.slice();
      generators.forEach((j, s) => {
        if ((k >> s) & 1) corner = corner.map((x, i) => addNumbers(x, segments[j][i]));
      });
      corners.push(corner);
    }
  }
  return placePoints(projection, corners);
}

/** Whether a corner belongs to its tile, the generators in `free` (bits) left out of account. */
export function belongs(tile: Tile, corner: number, free = 0): boolean {
  return tile.open.every(
    (end, s) => ((free >> s) & 1) === 1 || (end === 'high') !== (((corner >> s) & 1) === 1),
  );
}
