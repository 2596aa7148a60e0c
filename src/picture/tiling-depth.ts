// Which of many disjoint blocks to draw before which. Two blocks whose images meet are told apart by a
// plane between them: one of their faces', or along an edge of each (S. Gottschalk, M. Lin, D. Manocha,
// 1996, OBBTree, separating axes); the one on the eye's side of it comes later.
import { type Camera, cross, dot, type Spot } from './solid-view.js';

interface Block {
  readonly centre: Spot;
  /** Half the edge vectors. */
  readonly halves: readonly Spot[];
  readonly image: readonly [number, number, number, number];
}

/** Numbers of the blocks, the farthest first; corner k has edge s at its end where bit s of k is 1. */
export function depthOrder(corners: readonly (readonly Spot[])[], camera: Camera): number[] {
  const blocks = corners.map((own): Block => {
    const half = (k: number): Spot => [
      (own[k][0] - own[0][0]) / 2,
      (own[k][1] - own[0][1]) / 2,
      (own[k][2] - own[0][2]) / 2,
    ];
    const across = half(7);
    const flat = own.map((p) => [dot(p, camera.right), dot(p, camera.up)]);
    const [xs, ys] = [flat.map(([x]) => x), flat.map(([, y]) => y)];
    return {
      centre: [own[0][0] + across[0], own[0][1] + across[1], own[0][2] + across[2]],
      halves: [half(1), half(2), half(4)],
      image: [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)],
    };
  });
  // behind[b]: blocks to draw before b.
  const behind: number[][] = blocks.map(() => []);
  for (let a = 0; a < blocks.length; a++) {
    for (let b = a + 1; b < blocks.length; b++) {
      const nearer = compareDepth(blocks[a], blocks[b], camera);
      if (nearer > 0) behind[b].push(a);
      else if (nearer < 0) behind[a].push(b);
    }
  }
  const depth = blocks.map(({ centre }) => dot(centre, camera.eye));
  const byDepth = blocks.map((_, b) => b).sort((a, b) => depth[a] - depth[b] || a - b);
  const order: number[] = [];
  const begun = new Uint8Array(blocks.length);
  const visit = (b: number): void => {
    if (begun[b] === 1) return;
    begun[b] = 1;
    for (const a of behind[b]) visit(a);
    order.push(b);
  };
  byDepth.forEach(visit);
  return order;
}

/** 1 where b hides a, -1 where a hides b, 0 where neither can. */
function compareDepth(a: Block, b: Block, camera: Camera): number {
  const [l, r, d, u] = a.image;
  const [l2, r2, d2, u2] = b.image;
  if (r <= l2 || r2 <= l || u <= d2 || u2 <= d) return 0;
  const way: Spot = [
    b.centre[0] - a.centre[0],
    b.centre[1] - a.centre[1],
    b.centre[2] - a.centre[2],
  ];
  const reach = (block: Block, axis: Spot): number =>
    block.halves.reduce((sum, half) => sum + Math.abs(dot(half, axis)), 0);
  const gap = (axis: Spot): number => Math.abs(dot(way, axis)) - reach(a, axis) - reach(b, axis);
  // Images that lie apart: a line along a side of one of them runs between the two.
  if ([...a.halves, ...b.halves].some((half) => gap(cross(half, camera.eye)) >= 0)) return 0;
  let widest = -Infinity;
  let side = 0;
  const pairs = [
    [0, 1],
    [0, 2],
    [1, 2],
  ];
  const axes = [
    ...pairs.map(([i, j]) => cross(a.halves[i], a.halves[j])),
    ...pairs.map(([i, j]) => cross(b.halves[i], b.halves[j])),
    ...a.halves.flatMap((p) => b.halves.map((q) => cross(p, q))),
  ];
  for (const axis of axes) {
    const length = Math.hypot(...axis);
    if (length < 1e-12) continue;
    const width = gap(axis) / length;
    if (width <= widest) continue;
    widest = width;
    side = Math.sign(dot(way, axis) * dot(axis, camera.eye));
  }
  return side;
}
