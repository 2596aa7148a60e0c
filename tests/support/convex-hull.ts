// Corners of the convex hull of integer points in space, by the quickhull3d package. Its entry file
// needs a bundler, so the bundle it ships is loaded instead.
type Quickhull = (points: number[][]) => number[][];
const bundle: string = 'quickhull3d/dist/quickhull3d.js';
const { default: quickhull } = (await import(bundle)) as { default: Quickhull };

type Point = readonly number[];

function cross(u: Point, v: Point): number[] {
  return [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
}

function dot(u: Point, v: Point): number {
  return u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
}

/**
 * Numbers of the points that are corners; the points distinct, integers below 10^4 in size, and not
 * in one plane. The package may keep points inside an edge or face of the hull: corners are those
 * where the (exact) normals of the faces around span space.
 */
export function hullCorners(points: readonly Point[]): number[] {
  const normals = new Map<number, number[][]>();
  for (const face of quickhull(points.map(([x, y, z]) => [x, y, z]))) {
    const [p, q, r] = face.map((i) => points[i]);
    const normal = cross(
      q.map((x, j) => x - p[j]),
      r.map((x, j) => x - p[j]),
    );
    for (const i of face) normals.set(i, [...(normals.get(i) ?? []), normal]);
  }
  return [...normals].filter(([, list]) => spanSpace(list)).map(([i]) => i);
}

/** Number of facets: distinct outward directions of the package's faces; points as above. */
export function hullFacets(points: readonly Point[]): number {
  const directions = new Set<string>();
  for (const face of quickhull(points.map(([x, y, z]) => [x, y, z]))) {
    const [p, q, r] = face.map((i) => points[i]);
    const normal = cross(
      q.map((x, j) => x - p[j]),
      r.map((x, j) => x - p[j]),
    );
    const divisor = normal.reduce(gcd, 0);
    directions.add(normal.map((x) => x / divisor).join(' '));
  }
  return directions.size;
}

function gcd(a: number, b: number): number {
  return b === 0 ? Math.abs(a) : gcd(b, a % b);
}

function spanSpace(vectors: readonly Point[]): boolean {
  return vectors.some((u) => vectors.some((v) => vectors.some((w) => dot(u, cross(v, w)) !== 0)));
}
