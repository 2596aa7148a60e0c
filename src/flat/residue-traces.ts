// The traces of an arrangement on one flat, modulo a prime, by the naive elimination: enough for
// estimates, where a rare false tie does no harm. Nothing here is proved.
import type { Ring } from '../exact/ring.js';
import type { ResidueField } from './residue-field.js';

/** n rows of `width` residues, each with first non-zero entry 1, no two equal, and where they come from. */
export interface ResidueRows {
  readonly width: number;
  readonly count: number;
  readonly rows: Float64Array;
  /** For each row the least hyperplane of its class; ascending. */
  readonly least: Int32Array;
}

/** The traces on the whole space: the normals themselves. */
export function residuesOf<E>(
  field: ResidueField,
  ring: Ring<E>,
  normals: readonly (readonly E[])[],
): ResidueRows {
  const rows = Float64Array.from(normals.flatMap((row) => row.map((x) => field.imageOf(ring, x))));
  return distinct(field, rows, normals[0].length, Int32Array.from(normals.keys()));
}

/** The traces of the first n rows on the flat that row i cuts out; i itself leaves none. */
export function restrictResidues(
  field: ResidueField,
  from: ResidueRows,
  i: number,
  n: number,
): ResidueRows {
  const { width, rows } = from;
  const narrow = width - 1;
  const { p, inverseOfP } = field;
  const out = new Float64Array(n * narrow);
  const least = new Int32Array(n);
  let column = 0;
  while (rows[i * width + column] === 0) column++;
  let count = 0;
  for (let j = 0; j < n; j++) {
    if (j === i) continue;
    const factor = rows[j * width + column];
    let w = count * narrow;
    for (let x = 0; x < width; x++) {
      if (x === column) continue;
      const y = rows[j * width + x] + factor * (p - rows[i * width + x]);
      out[w++] = y - Math.floor((y + 0.5) * inverseOfP) * p;
    }
    least[count++] = from.least[j];
  }
  return distinct(field, out.subarray(0, count * narrow), narrow, least.subarray(0, count));
}

function distinct(
  field: ResidueField,
  rows: Float64Array,
  width: number,
  least: Int32Array,
): ResidueRows {
  const n = least.length;
  const { p, inverseOfP } = field;
  // All first entries are inverted at the price of one inverse.
  const leads = new Float64Array(n);
  const products = new Float64Array(n + 1);
  products[0] = 1;
  for (let i = 0; i < n; i++) {
    let x = 0;
    while (x < width - 1 && rows[i * width + x] === 0) x++;
    leads[i] = rows[i * width + x] || 1;
    products[i + 1] = field.multiply(products[i], leads[i]);
  }
  let inverse = field.inverse(products[n]);
  let size = 16;
  while (size < 2 * n) size *= 2;
  const table = new Int32Array(size);
  for (let i = n - 1; i >= 0; i--) {
    const scale = field.multiply(inverse, products[i]);
    inverse = field.multiply(inverse, leads[i]);
    leads[i] = scale;
  }
  let count = 0;
  for (let i = 0; i < n; i++) {
    let hash = 0;
    for (let x = 0; x < width; x++) {
      const y = rows[i * width + x] * leads[i];
      const z = y - Math.floor((y + 0.5) * inverseOfP) * p;
      rows[count * width + x] = z;
      hash = Math.imul(hash ^ z, 0x9e3779b1);
      hash ^= hash >>> 15;
    }
    let slot = hash & (size - 1);
    let fresh = true;
    for (; table[slot] !== 0; slot = (slot + 1) & (size - 1)) {
      const other = (table[slot] - 1) * width;
      let x = 0;
      while (x < width && rows[other + x] === rows[count * width + x]) x++;
      if (x === width) {
        fresh = false;
        break;
      }
    }
    if (fresh) {
      least[count] = least[i];
      table[slot] = ++count;
    }
  }
  return { width, count, rows, least };
}
