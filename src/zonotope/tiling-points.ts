// Lattice points of dilates by the half-open tiles, one tile after another: a check of the Ehrhart
// polynomial from the tiling and the Smith form alone. In t Z the tile of I holds t^|I| index(I) lattice
// points when its affine span meets the lattice, for it is a cell of the lattice that I generates;
// otherwise none.
import type { Arrangement } from '../arrangement/arrangement.js';
import { commonDenominator, exactNumber, multiplyNumbers } from '../exact/number.js';
import { smithForm } from '../exact/smith.js';
import { latticeGenerators } from './lattice-generators.js';
import type { Tile } from './tiling.js';

/**
 * For each t >= 0 of `dilates` the lattice points of the t-th dilate of scale Z (latticeGenerators),
 * over Q. The tiles are all of tilesOf for the same arrangement; about 0.1 ms each.
 */
export function latticePointsByTiles(
  arrangement: Arrangement,
  tiles: Iterable<Tile>,
  dilates: readonly bigint[],
): bigint[] {
  const { rank, scale, vectors } = latticeGenerators(arrangement);
  const lift = arrangement.lift as readonly (readonly bigint[])[];
  const totals = dilates.map(() => 0n);
  for (const { generators, shift } of tiles) {
    const scaled = shift.map((x) => multiplyNumbers(x, exactNumber(scale), 0n));
    const d = commonDenominator(scaled);
    const place = Array.from({ length: rank }, (_, c) =>
      scaled.reduce((sum, x, i) => sum + ((x.a * d) / x.d) * lift[i][c], 0n),
    );
    const { index, across } = cellOf(
      generators.map((j) => vectors[j]),
      rank,
    );
    // The images of the shift in the lattice modulo the span, over d.
    const images = across.map((column) => column.reduce((sum, x, i) => sum + x * place[i], 0n));
    dilates.forEach((t, at) => {
      if (images.every((x) => (t * x) % d === 0n)) {
        totals[at] += t ** BigInt(generators.length) * index;
      }
    });
  }
  return totals;
}

/** The index of independent vectors in the lattice of their span, and the functionals, r numbers
 * each, that map the lattice onto its quotient by that span. */
function cellOf(
  vectors: readonly (readonly bigint[])[],
  rank: number,
): { index: bigint; across: readonly (readonly bigint[])[] } {
  if (vectors.length === 0) {
    const across = Array.from({ length: rank }, (_, c) =>
      Array.from({ length: rank }, (__, i) => (i === c ? 1n : 0n)),
    );
    return { index: 1n, across };
  }
  const { divisors, right } = smithForm(vectors);
  // The vectors times V vanish past column k, so those columns of V are functionals zero on the span.
  const across = Array.from({ length: rank - vectors.length }, (_, c) =>
    right.map((row) => row[vectors.length + c]),
  );
  return { index: divisors.reduce((product, x) => product * x, 1n), across };
}
