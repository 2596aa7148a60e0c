// Face planes and volume of the convex hull of integer points in space, by the quickhull3d package
// (its shipped bundle, as for corners).
type Quickhull = (points: number[][]) => number[][];
const bundle: string = 'quickhull3d/dist/quickhull3d.js';
const { default: quickhull } = (await import(bundle)) as { default: Quickhull };

type Point = readonly number[];

const cross = (u: Point, v: Point): number[] => [
  u[1] * v[2] - u[2] * v[1],
  u[2] * v[0] - u[0] * v[2],
  u[0] * v[1] - u[1] * v[0],
];
const minus = (u: Point, v: Point): number[] => u.map((x, i) => x - v[i]);
const dot = (u: Point, v: Point): number => u.reduce((sum, x, i) => sum + x * v[i], 0);

function gcd(a: number, b: number): number {
  return b === 0 ? Math.abs(a) : gcd(b, a % b);
}

/**
 * The distinct face planes as `a b c | offset`, outward primitive normals, sorted, and six times the
 * volume. Points distinct, integers below 10^4 in size, not in one plane.
 */
export function hullPlanes(points: readonly Point[]): { planes: string[]; sixfoldVolume: number } {
  const planes = new Set<string>();
  let sixfoldVolume = 0;
  for (const face of quickhull(points.map(([x, y, z]) => [x, y, z]))) {
    const [p, q, r] = face.map((i) => points[i]);
    const area = cross(minus(q, p), minus(r, p));
    const content = area.reduce(gcd, 0);
    sixfoldVolume += dot(area, p);
    if (content === 0) continue;
    const normal = area.map((x) => x / content + 0);
    planes.add(`${normal.join(' ')} | ${dot(normal, p)}`);
  }
  return { planes: [...planes].sort(), sixfoldVolume };
}
