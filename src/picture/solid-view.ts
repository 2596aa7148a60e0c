// From where a solid is looked at, in parallel projection: a direction given, or one found among many
// so that no face is edge-on and no two vertices in front fall together. Drawing only: plain doubles.
import { InputError } from '../errors.js';

/** A point or direction in space. */
export type Spot = readonly [number, number, number];

/** Unit vectors: towards the eye, to the right of the sheet, and up it. */
export interface Camera {
  readonly eye: Spot;
  readonly right: Spot;
  readonly up: Spot;
}

/** Cosine to the line of sight below which a face counts as edge-on. */
const edgeOn = 1e-7;

/** From the right, in front and a little above, as technical drawings do. */
const usualEye: Spot = [0.55, -0.74, 0.39];

export function dot(u: Spot, v: Spot): number {
  return u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
}

export function cross(u: Spot, v: Spot): Spot {
  return [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
}

export function unit(v: Spot): Spot {
  const size = Math.max(Math.abs(v[0]), Math.abs(v[1]), Math.abs(v[2]));
  const [x, y, z] = [v[0] / size, v[1] / size, v[2] / size];
  const length = Math.hypot(x, y, z);
  return [x / length, y / length, z / length];
}

/** The camera that looks from a direction, the third axis upright. */
export function cameraFrom(direction: Spot): Camera {
  const eye = unit(direction);
  const upright: Spot = Math.hypot(eye[0], eye[1]) < 1e-9 ? [0, 1, 0] : [0, 0, 1];
  const right = unit(cross(upright, eye));
  return { eye, right, up: cross(eye, right) };
}

/** The direction a user gives, three numbers not all zero; InputError otherwise. */
export function readView(numbers: readonly number[]): Spot {
  const [x, y, z] = numbers;
  if (numbers.length !== 3 || !numbers.every(Number.isFinite) || (x === 0 && y === 0 && z === 0)) {
    throw new InputError(
      `view ${numbers.join(',')}: not a direction`,
      'give three numbers, not all 0: the direction to look from, as 3,-4,2',
    );
  }
  return [x, y, z];
}

/** Points moved to their middle and scaled to a box of size 2. */
export function centred(placed: Float64Array): Spot[] {
  const least = [Infinity, Infinity, Infinity];
  const most = [-Infinity, -Infinity, -Infinity];
  placed.forEach((x, i) => {
    least[i % 3] = Math.min(least[i % 3], x);
    most[i % 3] = Math.max(most[i % 3], x);
  });
  const size = Math.max(...most.map((x, i) => x / 2 - least[i] / 2));
  const at = (i: number): number => (placed[i] - (least[i % 3] / 2 + most[i % 3] / 2)) / size;
  return Array.from({ length: placed.length / 3 }, (_, v) => [
    at(3 * v),
    at(3 * v + 1),
    at(3 * v + 2),
  ]);
}

/** Outward unit normals of centrally symmetric polygons, by the diagonals of opposite corners. */
export function faceNormals(
  points: readonly Spot[],
  faces: readonly (readonly number[])[],
): Spot[] {
  return faces.map((corners) => {
    const half = corners.length / 2;
    const diagonal = (k: number): Spot => {
      const [p, q] = [points[corners[k]], points[corners[k + half]]];
      return unit([q[0] - p[0], q[1] - p[1], q[2] - p[2]]);
    };
    return unit(cross(diagonal(0), diagonal(Math.floor(half / 2))));
  });
}

/** Whether the front of a face is seen: not from behind, and not edge-on. */
export function facesEye(normal: Spot, camera: Camera): boolean {
  return dot(normal, camera.eye) > edgeOn;
}

/**
 * A direction from which the solid is seen well: of several hundred about the usual one, that with
 * the best of the worst slant of a face, nearness of two vertices in front and distance from the
 * usual one. `wanted` is a vertex that must be in front. The same for the same solid.
 */
export function chooseEye(
  points: readonly Spot[],
  faces: readonly (readonly number[])[],
  wanted: number | null,
  usual: Spot = usualEye,
): Spot {
  const normals = faceNormals(points, faces);
  // Much is looked at only where it can be told apart.
  const detailed = points.length <= 200;
  let best = usual;
  let bestScore = -Infinity;
  for (const eye of directions(usual, wanted !== null)) {
    const camera = cameraFrom(eye);
    const slant = normals.reduce((least, n) => Math.min(least, Math.abs(dot(n, camera.eye))), 1);
    const front = faces.filter(
      (_, f) => (detailed || wanted !== null) && facesEye(normals[f], camera),
    );
    const seen = new Set(front.flat());
    const hides = wanted !== null && !seen.has(wanted) ? 10 : 0;
    const apart = detailed ? nearest(points, [...seen], camera) : 0.1;
    const score =
      Math.min(1, slant / 0.2) +
      Math.min(1, apart / 0.15) +
      1.2 * dot(unit(usual), camera.eye) -
      hides -
      (slant > edgeOn ? 0 : 5);
    if (score > bestScore + 1e-9) [best, bestScore] = [eye, score];
  }
  return best;
}

function* directions(usual: Spot, everywhere: boolean): Generator<Spot> {
  yield usual;
  const about = (Math.atan2(usual[1], usual[0]) * 180) / Math.PI;
  // Without a vertex to show, only the usual side is worth looking from.
  const [lowest, widest] = everywhere ? [-60, 180] : [10, 50];
  for (let height = lowest; height <= 60; height += 5) {
    for (let turn = -widest; turn < widest; turn += 7) {
      const h = ((height + 0.37) * Math.PI) / 180;
      const t = ((about + turn + 0.41) * Math.PI) / 180;
      yield [Math.cos(h) * Math.cos(t), Math.cos(h) * Math.sin(t), Math.sin(h)];
    }
  }
}

function nearest(points: readonly Spot[], seen: readonly number[], camera: Camera): number {
  const flat = seen
    .map((v) => [dot(points[v], camera.right), dot(points[v], camera.up)])
    .sort((a, b) => a[0] - b[0]);
  let least = Infinity;
  for (let i = 0; i < flat.length; i++) {
    for (let j = i + 1; j < flat.length && flat[j][0] - flat[i][0] < least; j++) {
      least = Math.min(least, Math.hypot(flat[j][0] - flat[i][0], flat[j][1] - flat[i][1]));
    }
  }
  return least;
}
