// The face poset and the lattice of flats as graphs: one table of nodes and one of covers, which
// every graph format is written from. An edge runs from the lower element to one that covers it.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import type { FacePoset } from '../face/poset.js';
import type { FlatLattice } from '../flat/lattice.js';
import { flatRows } from './flats.js';
import { titleOf } from './heading.js';

/** A column of the node table; `integer` ones are below 2^31, larger integers are strings. */
export interface GraphColumn {
  readonly name: string;
  readonly type: 'string' | 'integer';
  /** Whether it may hold free text of the user's file. */
  readonly free?: boolean;
}

/** A graph without its format. Node i (0-based) goes by `prefix` and i + 1, in every format. */
export interface GraphTable {
  readonly title: string;
  readonly description: string;
  readonly prefix: string;
  readonly nodeCount: number;
  readonly columns: readonly GraphColumn[];
  /** The nodes in order, values in the order of the columns; may be iterated again. */
  readonly nodes: () => Iterable<readonly (string | number)[]>;
  /** nodeCount + 1 offsets into `coverTargets`. */
  readonly coverOffsets: Int32Array;
  /** For each node the nodes that cover it. */
  readonly coverTargets: Int32Array;
}

/** The id of node i in every graph format. */
export function nodeId(table: GraphTable, i: number): string {
  return `${table.prefix}${i + 1}`;
}

/** The face poset: nodes f1, f2, ... with `label` and `signs`, dimension and zonotope dimension. */
export function faceGraph(arrangement: Arrangement, poset: FacePoset): GraphTable {
  return {
    title: `${titleOf(arrangement)}: faces`,
    description:
      'Face poset of a central hyperplane arrangement; an edge runs from a face to one that covers ' +
      'it, a dimension higher. Dimensions are counted above the lineality space.',
    prefix: 'f',
    nodeCount: poset.faceCount,
    columns: [
      { name: 'label', type: 'string' },
      { name: 'signs', type: 'string' },
      { name: 'dimension', type: 'integer' },
      { name: 'zonotope_dimension', type: 'integer' },
    ],
    nodes: () => faceNodes(arrangement, poset),
    coverOffsets: poset.coverOffsets,
    coverTargets: poset.coverTargets,
  };
}

function* faceNodes(arrangement: Arrangement, poset: FacePoset): Generator<(string | number)[]> {
  const { dimensionOffsets, flatOf, flatZero, positive, rank, wordsPerRow } = poset;
  const text = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  for (let dimension = 0; dimension <= rank; dimension++) {
    for (let f = dimensionOffsets[dimension]; f < dimensionOffsets[dimension + 1]; f++) {
      const signs = text.write(positive, f * wordsPerRow, flatZero, flatOf[f] * wordsPerRow);
      yield [signs, signs, dimension, rank - dimension];
    }
  }
}

/**
 * The lattice of flats: nodes X1, X2, ... (X1 the whole space) with rank, dimension, the 1-based
 * normals in the flat, its Moebius value as a decimal string, and for `label` the names of the
 * normals where the file gives them.
 */
export function flatGraph(arrangement: Arrangement, lattice: FlatLattice): GraphTable {
  return {
    title: `${titleOf(arrangement)}: flats`,
    description:
      'Lattice of flats of a central hyperplane arrangement; an edge runs from a flat to one that ' +
      'covers it, a rank higher: the smaller subspace. Dimensions are counted above the lineality space.',
    prefix: 'X',
    nodeCount: lattice.flatCount,
    columns: [
      { name: 'label', type: 'string', free: true },
      { name: 'rank', type: 'integer' },
      { name: 'dimension', type: 'integer' },
      { name: 'normals', type: 'string' },
      { name: 'moebius', type: 'string' },
    ],
    nodes: () => flatNodes(arrangement, lattice),
    coverOffsets: lattice.coverOffsets,
    coverTargets: lattice.coverTargets,
  };
}

function* flatNodes(
  arrangement: Arrangement,
  lattice: FlatLattice,
): Generator<(string | number)[]> {
  const { labels } = arrangement.generators;
  for (const { rank, dimension, normals, moebius } of flatRows(arrangement, lattice)) {
    const names = normals.map((number) => labels?.[number - 1] ?? `${number}`);
    const label = rank === 0 ? 'whole space' : names.join(', ');
    yield [label, rank, dimension, normals.join(' '), moebius.toString()];
  }
}
