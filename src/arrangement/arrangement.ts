// The central arrangement of a generator list: parallel classes as hyperplanes, primitive normals,
// and coordinates of full rank to compute in.
//
// Essential coordinates. Over Q, one unimodular column reduction N U = [L | 0] of the primitive
// normals N gives both sides at once: the rows of L are the normals in a basis of the lattice
// span(N) cut with Z^d (the first r rows of the inverse of U), and the first r columns of U lift a
// point y of the essential space back to x = U y with N x = L y. When the normals span R^d no
// change is made. Over Q(sqrt(k)) a set of pivot columns serves instead.

import type { ExactNumber } from '../exact/number.js';
import type { Ring } from '../exact/ring.js';
import type { GeneratorList } from '../input/generators.js';

/** One hyperplane: a class of parallel and opposite normals. */
export interface Hyperplane<E> {
  /** d entries, along the first of its normals: primitive over Q, content-free over Z[sqrt(k)]. */
  readonly normal: readonly E[];
  /** The same functional in essential coordinates, r entries. */
  readonly essential: readonly E[];
  /** 0-based indices of the normals that are parallel or opposite to it, ascending. */
  readonly members: readonly number[];
}

/** n generators, m hyperplanes, rank r in d coordinates. */
export interface Arrangement<E = unknown> {
  readonly generators: GeneratorList;
  readonly ring: Ring<E>;
  readonly dimension: number;
  readonly rank: number;
  /** In the order of their first normals. */
  readonly hyperplanes: readonly Hyperplane<E>[];
  /** For each generator its hyperplane. */
  readonly hyperplaneOf: Int32Array;
  /** For each generator +1 where it points along its hyperplane's normal, -1 where against. */
  readonly orientationOf: Int8Array;
  /** For each generator the positive factor: generator = orientation * factor * hyperplane normal. */
  readonly factorOf: readonly ExactNumber[];
  /** r rows of d entries: a basis of the lattice span cut with Z^d (over Q), of the span otherwise. */
  readonly spanBasis: readonly (readonly E[])[];
  /** d rows of r entries: lifts an essential point y to an ambient x with the same signs. */
  readonly lift: readonly (readonly E[])[];
}
