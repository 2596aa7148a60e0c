// Deletion-restriction modulo a prime, for normals of any size and over any ring: the sure side.
//
// Rows are kept modulo p, each with first non-zero entry 1, so parallel rows are equal rows. Rows
// that differ modulo p differ in truth, for the reduction is a ring homomorphism. Rows that agree
// are taken as parallel only with a proof: the minors that have to vanish are smaller than p by
// Hadamard's bound (over Z[sqrt(k)] their norms are), or the ring says so.
import type { Ring } from '../exact/ring.js';
import type { DeletionTally } from './deletion-tally.js';
import { ExactSpan } from './exact-span.js';
import { minorBounds } from './minor-bounds.js';
import type { ResidueField } from './residue-field.js';

/** The prime makes two different traces equal where that cannot be mended: take the next one. */
export class UnluckyPrime extends Error {
  override readonly name = 'UnluckyPrime';
}

/** One run over the essential normals `normals` of rank r >= 3, no two parallel. */
export class ResidueDeletion<E> {
  private readonly rank: number;
  private readonly field: ResidueField;
  private readonly tally: DeletionTally;
  private readonly span: ExactSpan<E>;
  /** For k = 0..r whether k normals that are dependent modulo p are proved dependent. */
  private readonly proved: boolean[];
  /** m rows of r residues. */
  private readonly images: Float64Array;
  private readonly rows: Float64Array[] = [];
  private readonly origin: Int32Array[] = [];
  private readonly path: Int32Array;
  private readonly negated: Float64Array;
  private readonly leads: Float64Array;
  private readonly products: Float64Array;
  private readonly keys: Float64Array;
  private readonly slots: Int32Array;
  private readonly stamps: Int32Array;
  private stamp = 0;

  constructor(
    ring: Ring<E>,
    normals: readonly (readonly E[])[],
    rank: number,
    field: ResidueField,
    tally: DeletionTally,
  ) {
    const m = normals.length;
    this.rank = rank;
    this.field = field;
    this.tally = tally;
    this.span = new ExactSpan(ring, normals);
    this.proved = minorBounds(ring, normals).map((bits) => bits < Math.log2(field.p));
    this.images = Float64Array.from(
      normals.flatMap((row) => row.map((x) => field.imageOf(ring, x))),
    );
    for (let s = rank; s >= 3; s--) {
      this.rows.push(new Float64Array(m * s));
      this.origin.push(new Int32Array(m));
    }
    this.path = new Int32Array(rank);
    this.negated = new Float64Array(rank);
    this.leads = new Float64Array(m);
    this.products = new Float64Array(m + 1);
    this.keys = new Float64Array(m);
    const size = 1 << Math.max(4, 34 - Math.clz32(m));
    this.slots = new Int32Array(size);
    this.stamps = new Int32Array(size);
  }

  /** Counts the node of the first `depth` hyperplanes of `path` whose rows are `members[0..n)`. */
  start(path: Int32Array, depth: number, members: Int32Array, n: number): void {
    const { rank, images } = this;
    const { p } = this.field;
    // Eliminate the path among full-length copies, then keep the columns without a pivot.
    const copies = new Float64Array((depth + n) * rank);
    for (let i = 0; i < depth + n; i++) {
      const h = i < depth ? path[i] : members[i - depth];
      copies.set(images.subarray(h * rank, (h + 1) * rank), i * rank);
    }
    const columns = Array.from({ length: rank }, (_, c) => c);
    for (let d = 0; d < depth; d++) {
      this.path[d] = path[d];
      const pivotRow = d * rank;
      const at = columns.findIndex((c) => copies[pivotRow + c] !== 0);
      if (at < 0) throw new UnluckyPrime();
      const [column] = columns.splice(at, 1);
      const inverse = this.field.inverse(copies[pivotRow + column]);
      for (let i = d + 1; i < depth + n; i++) {
        const factor = p - this.field.multiply(copies[i * rank + column], inverse);
        for (let c = 0; c < rank; c++) {
          const product = this.field.multiply(factor, copies[pivotRow + c]);
          copies[i * rank + c] = (copies[i * rank + c] + product) % p;
        }
      }
    }
    const s = rank - depth;
    const rows = this.rows[depth];
    for (let i = 0; i < n; i++) {
      for (let x = 0; x < s; x++) rows[i * s + x] = copies[(depth + i) * rank + columns[x]];
    }
    this.visit(depth, this.merge(depth, n, members));
  }

  private visit(depth: number, n: number): void {
    if (this.rank - depth === 3) {
      this.close(depth, n);
      return;
    }
    if (n <= 2) {
      this.tally.closeSmall(depth, n);
      return;
    }
    this.tally.open(depth);
    for (let i = 0; i < n; i++) {
      this.path[depth] = this.origin[depth][i];
      this.restrict(depth, i);
      this.visit(depth + 1, this.merge(depth + 1, i, this.origin[depth]));
    }
  }

  private nextStamp(): number {
    if (this.stamp === 0x7fffffff) {
      this.stamps.fill(0);
      this.stamp = 0;
    }
    return ++this.stamp;
  }

  /** Writes rows 0..i-1 modulo row i one depth down. */
  private restrict(depth: number, i: number): void {
    const s = this.rank - depth;
    const rows = this.rows[depth];
    const out = this.rows[depth + 1];
    const { negated } = this;
    const { p, inverseOfP } = this.field;
    const pivotRow = i * s;
    let column = 0;
    while (rows[pivotRow + column] === 0) column++;
    for (let x = 0; x < s; x++) negated[x] = rows[pivotRow + x] === 0 ? 0 : p - rows[pivotRow + x];
    let write = 0;
    for (let row = 0; row < pivotRow; row += s) {
      const factor = rows[row + column];
      for (let x = 0; x < s; x++) {
        if (x === column) continue;
        // At most p - 1 + (p - 1)^2 < 2^50.
        const y = rows[row + x] + factor * negated[x];
        out[write++] = y - Math.floor((y + 0.5) * inverseOfP) * p;
      }
    }
  }

  /** Inverts leads[0..n), none of them zero, in place. */
  private invertLeads(n: number): void {
    const { leads, products, field } = this;
    if (n === 0) return;
    products[0] = 1;
    for (let i = 0; i < n; i++) products[i + 1] = field.multiply(products[i], leads[i]);
    let inverse = field.inverse(products[n]);
    for (let i = n - 1; i >= 0; i--) {
      const lead = leads[i];
      leads[i] = field.multiply(inverse, products[i]);
      inverse = field.multiply(inverse, lead);
    }
  }

  /** Makes the n rows at `depth` start with 1 and drops the repeated; `members` names them. */
  private merge(depth: number, n: number, members: Int32Array): number {
    const s = this.rank - depth;
    const rows = this.rows[depth];
    const to = this.origin[depth];
    const { leads, slots, stamps } = this;
    const { p, inverseOfP } = this.field;
    const mask = slots.length - 1;
    for (let i = 0; i < n; i++) {
      let c = 0;
      while (c < s && rows[i * s + c] === 0) c++;
      if (c === s) throw new UnluckyPrime();
      leads[i] = rows[i * s + c];
    }
    this.invertLeads(n);
    const stamp = this.nextStamp();
    let left = 0;
    for (let i = 0; i < n; i++) {
      const row = left * s;
      let hash = 0;
      for (let x = 0; x < s; x++) {
        const y = rows[i * s + x] * leads[i];
        const z = y - Math.floor((y + 0.5) * inverseOfP) * p;
        rows[row + x] = z;
        hash = Math.imul(hash ^ z, 0x9e3779b1);
        hash ^= hash >>> 15;
      }
      let slot = hash & mask;
      let fresh = true;
      while (stamps[slot] === stamp) {
        const other = slots[slot];
        let x = 0;
        while (x < s && rows[other * s + x] === rows[row + x]) x++;
        if (x === s) {
          if (!this.parallel(depth, to[other], members[i])) throw new UnluckyPrime();
          fresh = false;
          break;
        }
        slot = (slot + 1) & mask;
      }
      if (fresh) {
        stamps[slot] = stamp;
        slots[slot] = left;
        to[left++] = members[i];
      }
    }
    return left;
  }

  private parallel(depth: number, i: number, j: number): boolean {
    return this.proved[depth + 2] === true || this.span.parallel(this.path, depth, i, j);
  }

  /** A node of rank 3: for each plane the distinct lines in which earlier planes meet it. */
  private close(depth: number, n: number): void {
    const rows = this.rows[depth];
    const origin = this.origin[depth];
    const { leads, keys, slots, stamps, path } = this;
    const { p, inverseOfP } = this.field;
    const mask = slots.length - 1;
    let w2 = 0;
    for (let centre = 1; centre < n; centre++) {
      const c = 3 * centre;
      path[depth] = origin[centre];
      // The key of a line through the centre: a slope modulo p, or p for the one without.
      if (rows[c] === 0) {
        const affine = rows[c + 1] !== 0;
        const minus = affine && rows[c + 2] !== 0 ? p - rows[c + 2] : 0;
        for (let i = 0; i < centre; i++) {
          const q = 3 * i;
          if (affine) {
            const y = rows[q + 2] + minus * rows[q + 1];
            keys[i] = rows[q] === 0 ? p : y - Math.floor((y + 0.5) * inverseOfP) * p;
          } else {
            keys[i] = rows[q] === 0 ? p : rows[q + 1];
          }
        }
      } else {
        for (let i = 0; i < centre; i++) {
          const difference = rows[3 * i + 1] - rows[c + 1];
          leads[i] =
            rows[3 * i] === 0 || difference === 0
              ? 1
              : difference < 0
                ? difference + p
                : difference;
        }
        this.invertLeads(centre);
        for (let i = 0; i < centre; i++) {
          const q = 3 * i;
          if (rows[q] === 0) keys[i] = rows[q + 1] === 0 ? p : rows[q + 2];
          else if (rows[q + 1] === rows[c + 1]) keys[i] = p;
          else {
            const rise = rows[q + 2] - rows[c + 2];
            const y = (rise < 0 ? rise + p : rise) * leads[i];
            keys[i] = y - Math.floor((y + 0.5) * inverseOfP) * p;
          }
        }
      }
      const stamp = this.nextStamp();
      for (let i = 0; i < centre; i++) {
        const key = keys[i];
        let slot = Math.imul(key, 0x9e3779b1);
        slot = (slot ^ (slot >>> 15)) & mask;
        let fresh = true;
        while (stamps[slot] === stamp) {
          const other = slots[slot];
          // Lines that only look equal modulo p stay two.
          if (keys[other] === key && this.parallel(depth + 1, origin[other], origin[i])) {
            fresh = false;
            break;
          }
          slot = (slot + 1) & mask;
        }
        if (fresh) {
          stamps[slot] = stamp;
          slots[slot] = i;
          w2++;
        }
      }
    }
    this.tally.close(n, w2);
  }
}
