// Crossings against counting pair by pair, and orders against all orders of tiny graphs.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LayeredGraph } from '../../src/picture/layers.js';
import { countCrossings, orderLayers } from '../../src/picture/layers.js';

/** A graph from the sizes of its layers and edges as (lower, upper) positions in layers k, k + 1. */
function graphOf(
  sizes: readonly number[],
  edges: readonly (readonly [number, number])[][],
): LayeredGraph {
  const layerOffsets = [0];
  for (const size of sizes) layerOffsets.push(layerOffsets.at(-1)! + size);
  const up: number[][] = Array.from({ length: layerOffsets.at(-1)! }, () => []);
  edges.forEach((list, k) => {
    for (const [low, high] of list) up[layerOffsets[k] + low].push(layerOffsets[k + 1] + high);
  });
  const upOffsets = new Int32Array(up.length + 1);
  up.forEach((list, v) => {
    upOffsets[v + 1] = upOffsets[v] + list.length;
  });
  return {
    layerOffsets: Int32Array.from(layerOffsets),
    upOffsets,
    upTargets: Int32Array.from(up.flat()),
  };
}

function slowCrossings(
  graph: LayeredGraph,
  layers: readonly (readonly number[] | Int32Array)[],
): number {
  const position = new Map<number, number>();
  const layerOf = new Map<number, number>();
  layers.forEach((layer, k) => {
    layer.forEach((v, i) => {
      position.set(v, i);
      layerOf.set(v, k);
    });
  });
  const edges: [number, number, number][] = [];
  for (const v of layers.flatMap((layer) => [...layer])) {
    for (let e = graph.upOffsets[v]; e < graph.upOffsets[v + 1]; e++) {
      edges.push([layerOf.get(v)!, position.get(v)!, position.get(graph.upTargets[e])!]);
    }
  }
  let crossings = 0;
  edges.forEach(([k, a, b], i) => {
    for (const [l, c, d] of edges.slice(0, i)) if (k === l && (a - c) * (b - d) < 0) crossings++;
  });
  return crossings;
}

function permutations(list: readonly number[]): number[][] {
  if (list.length < 2) return [[...list]];
  return list.flatMap((x, i) =>
    permutations([...list.slice(0, i), ...list.slice(i + 1)]).map((rest) => [x, ...rest]),
  );
}

const graphs = fc
  .array(fc.integer({ min: 1, max: 7 }), { minLength: 1, maxLength: 4 })
  .chain((sizes) =>
    fc
      .tuple(
        ...sizes.slice(1).map((size, k) =>
          fc.uniqueArray(fc.tuple(fc.nat({ max: sizes[k] - 1 }), fc.nat({ max: size - 1 })), {
            selector: ([a, b]) => a * 10 + b,
            maxLength: 14,
          }),
        ),
      )
      .map((edges) => graphOf(sizes, edges as [number, number][][])),
  );

function layersOf(graph: LayeredGraph): number[][] {
  return Array.from(graph.layerOffsets.slice(1), (end, k) =>
    Array.from({ length: end - graph.layerOffsets[k] }, (_, i) => graph.layerOffsets[k] + i),
  );
}

describe('crossings', () => {
  it('are those of all pairs of edges', () => {
    fc.assert(
      fc.property(graphs, (graph) => {
        const layers = layersOf(graph);
        const packed = layers.map((layer) => Int32Array.from(layer));
        expect(countCrossings(graph, packed)).toBe(slowCrossings(graph, layers));
      }),
    );
  });
});

describe('the order found', () => {
  it('holds every node once, counts its crossings right and is no worse than the input', () => {
    fc.assert(
      fc.property(graphs, (graph) => {
        const { layers, crossings } = orderLayers(graph);
        expect(layers.map((layer) => [...layer].sort((a, b) => a - b))).toEqual(layersOf(graph));
        expect(crossings).toBe(slowCrossings(graph, layers));
        expect(crossings).toBeLessThanOrEqual(slowCrossings(graph, layersOf(graph)));
        expect(orderLayers(graph)).toEqual({ layers, crossings });
      }),
    );
  });

  // A cycle of 2n nodes in two layers crosses itself n - 1 times at least, by trying all orders.
  it('unrolls a cycle in the best way there is', () => {
    const cycle = (n: number) =>
      graphOf(
        [n, n],
        [
          Array.from({ length: n }, (_, i) => [i, (i * 3 + 1) % n] as [number, number]).flatMap(
            ([i, j]) =>
              [
                [i, j],
                [i, (j + 3) % n],
              ] as [number, number][],
          ),
        ],
      );
    const four = cycle(4);
    const [low, high] = layersOf(four);
    const least = Math.min(
      ...permutations(low).flatMap((a) =>
        permutations(high).map((b) => slowCrossings(four, [a, b])),
      ),
    );
    expect(least).toBe(3);
    expect(orderLayers(four).crossings).toBe(least);
    expect(orderLayers(cycle(50)).crossings).toBe(49);
  });
});
