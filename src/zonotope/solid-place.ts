// Exact points of a projection as doubles, in true measure: the only rounding between a zonotope and
// its mesh or picture.
import { InputError } from '../errors.js';
import { divideNumbers, type ExactNumber, multiplyNumbers } from '../exact/number.js';
import { signOfNumber } from '../exact/number-order.js';
import { decimalOf, squareRootDecimal } from '../exact/root-decimal.js';
import type { Axis, Projection } from './solid-projection.js';

/** Digits cut off before a decimal is rounded to a double, which has 17. */
const digits = 40;

/** Coordinate after coordinate of every point, each the double nearest to the exact value. */
export function placePoints(
  projection: Pick<Projection, 'axes' | 'arrangement'>,
  points: readonly (readonly ExactNumber[])[],
): Float64Array {
  const { axes, arrangement } = projection;
  const { radicand } = arrangement.generators;
  const placed = new Float64Array(points.length * axes.length);
  points.forEach((point, v) => {
    axes.forEach((axis, i) => {
      placed[v * axes.length + i] = toDouble(point[i], axis, radicand);
    });
  });
  if (!placed.every(Number.isFinite)) {
    throw new InputError('coordinates pass the range of doubles (1.8e308)', 'scale the normals');
  }
  return placed;
}

/**
 * The same, of the vertices of a surface; InputError where two different vertices fall on one double
 * (or, with `single`, on one 32-bit float).
 */
export function placeVertices(
  projection: Pick<Projection, 'axes' | 'arrangement'>,
  vertices: readonly (readonly ExactNumber[])[],
  single = false,
): Float64Array {
  const exact = placePoints(projection, vertices);
  const placed = single ? exact.map(Math.fround) : exact;
  if (!placed.every(Number.isFinite)) {
    throw new InputError(
      'coordinates pass the range of the 32-bit floats of this format (3.4e38)',
      'take OBJ or PLY, or scale the normals',
    );
  }
  const width = projection.axes.length;
  const seen = new Map<string, number>();
  for (let v = 0; v < vertices.length; v++) {
    const key = placed.subarray(v * width, (v + 1) * width).join(' ');
    const other = seen.get(key);
    if (other !== undefined) {
      throw new InputError(
        `vertices ${other + 1} and ${v + 1} differ by less than the ${
          single ? '32-bit floats of this format' : 'doubles that coordinates are written from'
        } can tell`,
        single
          ? 'take OBJ or PLY, or bring the lengths of the normals nearer each other'
          : 'bring the lengths of the normals nearer each other',
      );
    }
    seen.set(key, v);
  }
  return placed;
}

/** An exact length along an axis, in true measure. */
function toDouble(x: ExactNumber, axis: Axis, radicand: bigint | null): number {
  const { squaredLength } = axis;
  const plain = squaredLength.a === 1n && squaredLength.b === 0n && squaredLength.d === 1n;
  if (plain) {
    return x.b === 0n && x.d === 1n ? Number(x.a) : Number(decimalOf(x, radicand, digits));
  }
  const k = radicand ?? 0n;
  const square = divideNumbers(multiplyNumbers(x, x, k), squaredLength, k);
  const size = Number(squareRootDecimal(square, radicand, digits));
  return signOfNumber(x, radicand) < 0 ? -size : size;
}
