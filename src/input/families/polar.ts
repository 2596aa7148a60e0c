// Polar zonohedra: n normals (x, y, 1) with (x, y) rational points of the unit circle. The points of
// a circle are in convex position and no three lie on a line, so every three normals are independent.
import { exactNumber, exactOne } from '../../exact/number.js';
import type { GeneratorList } from '../generators.js';
import { requireRoom, requireWhole } from './family.js';

/** n >= 3 normals on a cone, each within a fortieth of the step from its even place. */
export function polarZonohedron(n: number): GeneratorList {
  requireWhole('the number of normals', n, 3);
  const title = `Polar zonohedron with ${n} zones`;
  requireRoom(title, n, 3);
  const normals = Array.from({ length: n }, (_, k) => {
    const [x, y, z] = pointAt(k, n);
    return [exactNumber(x, 0n, z), exactNumber(y, 0n, z), exactOne];
  });
  return {
    title,
    coordinates: null,
    radicand: null,
    normals,
    labels: null,
    ranges: null,
    source: { name: title, sha256: null },
  };
}

/** (x, y, z) with x^2 + y^2 = z^2, near the angle 2 pi k / n: only octants are approximated. */
function pointAt(k: number, n: number): readonly [bigint, bigint, bigint] {
  const octant = Math.floor((8 * k) / n);
  const beyond = (8 * k) % n;
  const inner = octant % 2 === 0 ? beyond : n - beyond;
  const [c, s, z] = pointInOctant((Math.PI / 4) * (inner / n), n);
  // cos and sin by reflection at the octants' borders, exactly.
  const [x, y] = ((octant + 1) >> 1) % 2 === 0 ? [c, s] : [s, c];
  const right = octant < 2 || octant > 5;
  return [right ? x : -x, octant < 4 ? y : -y, z];
}

/**
 * The simplest point of an angle in [0, pi/4] within pi / (20 n): (q^2-p^2, 2pq) / (q^2+p^2) with
 * p/q near tan(angle/2). Doubles only choose the fraction; whichever it is, the point is exact.
 */
function pointInOctant(angle: number, n: number): readonly [bigint, bigint, bigint] {
  for (let q = 1; ; q += 1) {
    const p = Math.round(q * Math.tan(angle / 2));
    if (Math.abs(2 * Math.atan2(p, q) - angle) > Math.PI / (20 * n)) continue;
    const [P, Q] = [BigInt(p), BigInt(q)];
    return [Q * Q - P * P, 2n * P * Q, Q * Q + P * P];
  }
}
