// Whether two hyperplanes have the same trace on a flat, decided in the ring: the court of last
// resort of deletion-restriction.
import type { Ring } from '../exact/ring.js';

/** Reduces normals modulo the span of a path of independent ones, by fraction-free elimination. */
export class ExactSpan<E> {
  private readonly ring: Ring<E>;
  private readonly normals: readonly (readonly E[])[];
  private readonly path: number[] = [];
  private readonly rows: E[][] = [];
  private readonly columns: number[] = [];

  constructor(ring: Ring<E>, normals: readonly (readonly E[])[]) {
    this.ring = ring;
    this.normals = normals;
  }

  /** Whether normals i and j are parallel modulo the span of the first `depth` of `path`, and neither in it. */
  parallel(path: Int32Array, depth: number, i: number, j: number): boolean {
    const { ring } = this;
    this.follow(path, depth);
    const a = this.reduce(this.normals[i]);
    const b = this.reduce(this.normals[j]);
    const lead = a.findIndex((x) => ring.sign(x) !== 0);
    if (lead < 0 || ring.sign(b[lead]) === 0) return false;
    return a.every(
      (x, c) =>
        ring.sign(ring.subtract(ring.multiply(x, b[lead]), ring.multiply(b[c], a[lead]))) === 0,
    );
  }

  /** Keeps the common start of the last path and eliminates the rest. */
  private follow(path: Int32Array, depth: number): void {
    let same = 0;
    while (same < depth && same < this.path.length && this.path[same] === path[same]) same++;
    this.path.length = this.rows.length = this.columns.length = same;
    for (let d = same; d < depth; d++) {
      const row = this.reduce(this.normals[path[d]]);
      const column = row.findIndex((x) => this.ring.sign(x) !== 0);
      if (column < 0) throw new Error('ExactSpan: the path is dependent');
      this.path.push(path[d]);
      this.rows.push(row);
      this.columns.push(column);
    }
  }

  private reduce(normal: readonly E[]): E[] {
    const { ring, rows, columns } = this;
    let v = normal.slice();
    let divisor = ring.one;
    for (let d = 0; d < rows.length; d++) {
      const row = rows[d];
      const pivot = row[columns[d]];
      const factor = v[columns[d]];
      v = v.map((x, c) =>
        ring.divideExactly(
          ring.subtract(ring.multiply(pivot, x), ring.multiply(factor, row[c])),
          divisor,
        ),
      );
      divisor = pivot;
    }
    return v;
  }
}
