// Order within the layers of a layered drawing, with few crossings: barycentre sweeps from several
// starts (K. Sugiyama, S. Tagawa, M. Toda, 1981, Methods for visual understanding of hierarchical
// system structures, IEEE Trans. SMC 11), then swaps of neighbours; crossings are counted exactly by
// inversions (W. Barth, P. Mutzel, M. Juenger, 2004, Simple and efficient bilayer cross counting,
// J. Graph Algorithms Appl. 8). Everything is deterministic.

/** Nodes numbered layer by layer, lowest layer first; edges join neighbouring layers only. */
export interface LayeredGraph {
  /** One entry more than layers: nodes of layer k are [offsets[k], offsets[k + 1]). */
  readonly layerOffsets: Int32Array;
  /** For each node the nodes of the next layer it is joined to, in compressed rows. */
  readonly upOffsets: Int32Array;
  readonly upTargets: Int32Array;
}

/** For each layer its nodes from left to right, and the crossings of the whole. */
export interface LayerOrder {
  readonly layers: readonly Int32Array[];
  readonly crossings: number;
}

const sweeps = 12;
const swapPasses = 8;
const shuffledStarts = 2;

/** Compressed rows of the downward edges. */
function downwards(graph: LayeredGraph): { offsets: Int32Array; targets: Int32Array } {
  const { upOffsets, upTargets } = graph;
  const nodes = upOffsets.length - 1;
  const offsets = new Int32Array(nodes + 1);
  for (const target of upTargets) offsets[target + 1]++;
  for (let v = 0; v < nodes; v++) offsets[v + 1] += offsets[v];
  const fill = offsets.slice();
  const targets = new Int32Array(upTargets.length);
  for (let v = 0; v < nodes; v++) {
    for (let e = upOffsets[v]; e < upOffsets[v + 1]; e++) targets[fill[upTargets[e]]++] = v;
  }
  return { offsets, targets };
}

/** The state of one trial: positions of nodes in their layers. */
class Ordering {
  readonly graph: LayeredGraph;
  readonly down: { offsets: Int32Array; targets: Int32Array };
  readonly layers: Int32Array[];
  readonly position: Int32Array;

  constructor(graph: LayeredGraph, down: Ordering['down'], layers: Int32Array[]) {
    this.graph = graph;
    this.down = down;
    this.layers = layers;
    this.position = new Int32Array(graph.upOffsets.length - 1);
    for (const layer of layers) this.place(layer);
  }

  place(layer: Int32Array): void {
    for (let i = 0; i < layer.length; i++) this.position[layer[i]] = i;
  }

  /** Positions of the neighbours of v in the layer above or below, ascending. */
  neighbours(v: number, up: boolean): Int32Array {
    const offsets = up ? this.graph.upOffsets : this.down.offsets;
    const targets = up ? this.graph.upTargets : this.down.targets;
    const found = targets.slice(offsets[v], offsets[v + 1]);
    for (let i = 0; i < found.length; i++) found[i] = this.position[found[i]];
    return found.sort();
  }

  /** Crossings between layer k and the next: inversions of the upper ends, in order of the lower. */
  crossingsAbove(k: number): number {
    const width = this.layers[k + 1].length;
    const tree = new Int32Array(width + 1);
    let edges = 0;
    let crossings = 0;
    for (const v of this.layers[k]) {
      const ends = this.neighbours(v, true);
      for (const end of ends) {
        let notRight = 0;
        for (let i = end + 1; i > 0; i -= i & -i) notRight += tree[i];
        crossings += edges - notRight;
      }
      for (const end of ends) {
        for (let i = end + 1; i <= width; i += i & -i) tree[i]++;
      }
      edges += ends.length;
    }
    return crossings;
  }

  crossings(): number {
    let sum = 0;
    for (let k = 0; k + 1 < this.layers.length; k++) sum += this.crossingsAbove(k);
    return sum;
  }

  /** Sorts layer k by the mean position of the neighbours above or below; ties keep their order. */
  sortByBarycentre(k: number, up: boolean): void {
    const layer = this.layers[k];
    const stretch = this.layers[up ? k + 1 : k - 1].length / layer.length;
    const centre = new Float64Array(this.position.length);
    for (const v of layer) {
      const ends = this.neighbours(v, up);
      let sum = 0;
      for (const end of ends) sum += end;
      centre[v] = ends.length === 0 ? this.position[v] * stretch : sum / ends.length;
    }
    const sorted = Array.from(layer).sort(
      (v, w) => centre[v] - centre[w] || this.position[v] - this.position[w],
    );
    layer.set(sorted);
    this.place(layer);
  }

  /** Swaps neighbours in layer k wherever that saves a crossing; whether it did. */
  swapNeighbours(k: number): boolean {
    const layer = this.layers[k];
    const ends = Array.from(layer, (v) => [this.neighbours(v, false), this.neighbours(v, true)]);
    let saved = false;
    for (let i = 0; i + 1 < layer.length; i++) {
      const [left, right] = [ends[i], ends[i + 1]];
      const before = inversions(left[0], right[0]) + inversions(left[1], right[1]);
      const after = inversions(right[0], left[0]) + inversions(right[1], left[1]);
      if (after >= before) continue;
      [layer[i], layer[i + 1]] = [layer[i + 1], layer[i]];
      [ends[i], ends[i + 1]] = [right, left];
      saved = true;
    }
    this.place(layer);
    return saved;
  }

  copyOfLayers(): Int32Array[] {
    return this.layers.map((layer) => layer.slice());
  }
}

/** Pairs (a of left, b of right) with a > b; both ascending. */
function inversions(left: Int32Array, right: Int32Array): number {
  let count = 0;
  let j = 0;
  for (const a of left) {
    while (j < right.length && right[j] < a) j++;
    count += j;
  }
  return count;
}

/** Crossings of straight lines when the layers are drawn in the order given. */
export function countCrossings(graph: LayeredGraph, layers: readonly Int32Array[]): number {
  return new Ordering(graph, downwards(graph), layers as Int32Array[]).crossings();
}

/** An order with few crossings; never more than the input order has. */
export function orderLayers(graph: LayeredGraph): LayerOrder {
  const down = downwards(graph);
  const last = graph.layerOffsets.length - 2;
  let best: LayerOrder | null = null;
  const keep = (ordering: Ordering): boolean => {
    const crossings = ordering.crossings();
    if (best !== null && crossings >= best.crossings) return false;
    best = { layers: ordering.copyOfLayers(), crossings };
    return true;
  };
  for (const start of starts(graph, down)) {
    const ordering = new Ordering(graph, down, start);
    keep(ordering);
    let own = Number.POSITIVE_INFINITY;
    for (let sweep = 0; sweep < sweeps; sweep++) {
      if (sweep % 2 === 0) for (let k = 1; k <= last; k++) ordering.sortByBarycentre(k, false);
      else for (let k = last - 1; k >= 0; k--) ordering.sortByBarycentre(k, true);
      const crossings = ordering.crossings();
      if (crossings >= own && sweep > 3) break;
      own = Math.min(own, crossings);
      keep(ordering);
    }
    for (let pass = 0; pass < swapPasses; pass++) {
      let saved = false;
      for (let k = 0; k <= last; k++) saved = ordering.swapNeighbours(k) || saved;
      if (!saved) break;
    }
    keep(ordering);
  }
  return best ?? { layers: [], crossings: 0 };
}

/**
 * The input order; first visits of depth-first walks from below and from above; the order along the
 * slowest mode of a random walk on the graph; fixed shuffles.
 */
function* starts(graph: LayeredGraph, down: Ordering['down']): Generator<Int32Array[]> {
  const { layerOffsets, upOffsets, upTargets } = graph;
  const input: Int32Array[] = [];
  for (let k = 0; k + 1 < layerOffsets.length; k++) {
    const from = layerOffsets[k];
    input.push(Int32Array.from({ length: layerOffsets[k + 1] - from }, (_, i) => from + i));
  }
  yield input.map((layer) => layer.slice());
  yield byFirstVisit(input, upOffsets, upTargets);
  yield byFirstVisit([...input].reverse(), down.offsets, down.targets).reverse();
  yield alongSlowestMode(input, graph, down);
  // A fixed linear congruence (D. Knuth, 1981, The Art of Computer Programming 2, section 3.3.4).
  let state = 1;
  for (let shuffle = 0; shuffle < shuffledStarts; shuffle++) {
    const layers = input.map((layer) => layer.slice());
    for (const layer of layers) {
      for (let i = layer.length - 1; i > 0; i--) {
        state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
        const j = Math.floor((state / 2 ** 32) * (i + 1));
        [layer[i], layer[j]] = [layer[j], layer[i]];
      }
    }
    yield layers;
  }
}

function byFirstVisit(
  layers: readonly Int32Array[],
  offsets: Int32Array,
  targets: Int32Array,
): Int32Array[] {
  const seen = new Uint8Array(offsets.length - 1);
  const visited: number[][] = layers.map(() => []);
  const walk = (v: number, depth: number): void => {
    if (seen[v] === 1) return;
    seen[v] = 1;
    visited[depth].push(v);
    for (let e = offsets[v]; e < offsets[v + 1]; e++) walk(targets[e], depth + 1);
  };
  layers.forEach((layer, depth) => {
    for (const v of layer) walk(v, depth);
  });
  return visited.map((layer) => Int32Array.from(layer));
}

/** Steps of the walk, fewer where each has more edges to follow. */
const mostWalkSteps = 20_000;
const walkedEdges = 20_000_000;

/**
 * Sorts every layer by the second eigenvector of the lazy random walk, found by iteration: nodes
 * few steps apart get values close together, which unrolls cycles and spheres from end to end
 * (Y. Koren, 2005, Drawing graphs by eigenvectors, Comput. Math. Appl. 49).
 */
function alongSlowestMode(
  layers: readonly Int32Array[],
  graph: LayeredGraph,
  down: Ordering['down'],
): Int32Array[] {
  const { upOffsets, upTargets } = graph;
  const nodes = upOffsets.length - 1;
  const degree = Float64Array.from(
    { length: nodes },
    (_, v) => upOffsets[v + 1] - upOffsets[v] + down.offsets[v + 1] - down.offsets[v],
  );
  const ends = 2 * upTargets.length;
  // Any start serves that is no eigenvector; squares of the number are spread well enough.
  let value = Float64Array.from({ length: nodes }, (_, v) => ((v * v + v) % 97) / 97 - 0.5);
  const steps = ends === 0 ? 0 : Math.min(mostWalkSteps, Math.ceil(walkedEdges / (nodes + ends)));
  for (let step = 0; step < steps; step++) {
    let mean = 0;
    for (let v = 0; v < nodes; v++) mean += degree[v] * value[v];
    mean /= ends;
    let largest = 0;
    for (let v = 0; v < nodes; v++) {
      value[v] -= mean;
      largest = Math.max(largest, Math.abs(value[v]));
    }
    const next = new Float64Array(nodes);
    for (let v = 0; v < nodes; v++) {
      for (let e = upOffsets[v]; e < upOffsets[v + 1]; e++) {
        next[v] += value[upTargets[e]];
        next[upTargets[e]] += value[v];
      }
    }
    for (let v = 0; v < nodes; v++) {
      next[v] = degree[v] === 0 ? 0 : (value[v] + next[v] / degree[v]) / (2 * (largest || 1));
    }
    value = next;
  }
  return layers.map((layer) => layer.slice().sort((v, w) => value[v] - value[w] || v - w));
}
