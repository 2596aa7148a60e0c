// From essential to ambient directions where the normals do not span: the shortest lift, in doubles,
// so that points written in ambient coordinates stay small.
import type { Arrangement } from '../arrangement/arrangement.js';

/**
 * The arrangement's lift followed by the orthogonal projection to the span of its normals, d rows of
 * `rank` entries. `unitNormals` has d entries a hyperplane. A heuristic: rounding errors are not
 * bounded, and what is made from it has to be certified.
 */
export function projectedLift(arrangement: Arrangement, unitNormals: Float64Array): Float64Array {
  const { dimension: d, rank, ring, lift, hyperplanes } = arrangement;
  const rest = unitNormals.slice();
  const product = new Float64Array(d * rank);
  for (let step = 0; step < rank; step++) {
    // Gram-Schmidt, the longest remainder first.
    let longest = 0;
    let at = 0;
    for (let h = 0; h < hyperplanes.length; h++) {
      const length = Math.hypot(...rest.subarray(h * d, h * d + d));
      if (length > longest) {
        longest = length;
        at = h;
      }
    }
    const unit = rest.slice(at * d, at * d + d).map((x) => x / longest);
    for (let h = 0; h < hyperplanes.length; h++) {
      let inner = 0;
      for (let j = 0; j < d; j++) inner += unit[j] * rest[h * d + j];
      for (let j = 0; j < d; j++) rest[h * d + j] -= inner * unit[j];
    }
    for (let i = 0; i < rank; i++) {
      let inner = 0;
      for (let j = 0; j < d; j++) inner += unit[j] * ring.ratio(lift[j][i], ring.one);
      for (let j = 0; j < d; j++) product[j * rank + i] += inner * unit[j];
    }
  }
  return product;
}
