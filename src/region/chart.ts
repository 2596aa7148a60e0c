// The arrangement as the enumerators take it: coordinates in which the first hyperplane is x0 = 0.
import { setBit, wordsFor } from '../bits/signs.js';
import type { Ring } from '../exact/ring.js';
import type { FlatSource } from './enumerator.js';

/**
 * n normals of rank r, pairwise not parallel, as a flat of dimension r. With a the first normal and p
 * its last non-zero entry, x0 = a . x replaces the coordinate p; every normal is scaled by |a_p|.
 */
export function chartOf(ring: Ring<unknown>, normals: readonly (readonly unknown[])[]): FlatSource {
  const n = normals.length;
  const W = wordsFor(n);
  const a = normals[0];
  let p = a.length - 1;
  while (ring.sign(a[p]) === 0) p--;
  const flipped = ring.sign(a[p]) < 0;
  const pivot = flipped ? ring.negate(a[p]) : a[p];
  const along = new Int32Array(n * W);
  const against = new Int32Array(n * W);
  const least = Int32Array.from({ length: n }, (_, k) => k);
  const rows = normals.map((normal, k) => {
    const factor = flipped ? ring.negate(normal[p]) : normal[p];
    const row: unknown[] = [factor];
    for (let q = 0; q < normal.length; q++) {
      if (q === p) continue;
      row.push(ring.subtract(ring.multiply(pivot, normal[q]), ring.multiply(factor, a[q])));
    }
    const lead = row.find((x) => ring.sign(x) !== 0);
    const negative = ring.sign(lead) < 0;
    setBit(negative ? against : along, k * W, k);
    return negative ? row.map((x) => ring.negate(x)) : row;
  });
  return { dimension: a.length, normals: rows, pivot, along, against, least };
}
