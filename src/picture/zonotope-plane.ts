// From coordinates to the sheet: one scale for both, upwards up; and the arrows that name the axes.
import type { Area } from './bands.js';
import { softInk } from './palette.js';
import type { Drawn } from './sheet.js';
import { fitText, round, textWidth } from './sheet.js';

/** Coordinates to points of the sheet. */
export interface PlaneFit {
  (x: number, y: number): readonly [number, number];
  /** Where the middle of all is. */
  readonly middle: readonly [number, number];
}

/** The largest figure in the middle of an area; coordinates come in pairs, not all the same. */
export function planeFit(spots: Float64Array, area: Area, margin: number): PlaneFit {
  const least = [Infinity, Infinity];
  const most = [-Infinity, -Infinity];
  spots.forEach((c, i) => {
    least[i % 2] = Math.min(least[i % 2], c);
    most[i % 2] = Math.max(most[i % 2], c);
  });
  // Halves, so that no sum of two large coordinates passes the range of doubles.
  const half = most.map((c, i) => c / 2 - least[i] / 2);
  const centre = most.map((c, i) => c / 2 + least[i] / 2);
  const scale = Math.min(
    (area.width / 2 - margin) / (half[0] || 1e-300),
    (area.height / 2 - margin) / (half[1] || 1e-300),
  );
  const middle = [area.left + area.width / 2, area.top + area.height / 2] as const;
  const fit = (x: number, y: number): readonly [number, number] => [
    middle[0] + (x - centre[0]) * scale,
    middle[1] - (y - centre[1]) * scale,
  ];
  return Object.assign(fit, { middle });
}

const arrowLength = 26;

/** Arrows of the axes in the lower left corner, `directions` on the sheet with length 1 at most. */
export function drawArrows(
  svg: Drawn,
  area: Area,
  names: readonly string[],
  directions: readonly (readonly [number, number])[],
): void {
  // Room for the arrows that point left, with their names.
  const left = Math.max(
    0,
    ...directions.map(([x, y], i) =>
      x / Math.hypot(x, y) < -0.3 ? -x * arrowLength + 7 * textWidth(fitText(names[i], 80, 7)) : 0,
    ),
  );
  const down = Math.max(0, ...directions.map(([, y]) => y)) * arrowLength;
  const [x0, y0] = [area.left + left + 14, area.top + area.height - down - 8];
  const group = svg
    .append('g')
    .attr('class', 'axes')
    .attr('stroke', softInk)
    .attr('stroke-width', 0.9)
    .attr('fill', softInk)
    .attr('font-size', 7);
  directions.forEach(([dx, dy], i) => {
    const length = Math.hypot(dx, dy);
    if (length < 0.05) return;
    const [x, y] = [x0 + arrowLength * dx, y0 + arrowLength * dy];
    group
      .append('line')
      .attr('x1', round(x0))
      .attr('y1', round(y0))
      .attr('x2', round(x))
      .attr('y2', round(y));
    const [ux, uy] = [(3.5 * dx) / length, (3.5 * dy) / length];
    group
      .append('path')
      .attr('stroke', 'none')
      .attr(
        'd',
        `M${round(x + ux)} ${round(y + uy)}L${round(x - uy / 2)} ${round(y + ux / 2)}L${round(x + uy / 2)} ${round(y - ux / 2)}Z`,
      );
    group
      .append('text')
      .attr('stroke', 'none')
      .attr('x', round(x + 2.4 * ux))
      .attr('y', round(y + 2.4 * uy + 2.4))
      .attr('text-anchor', dx / length < -0.3 ? 'end' : dx / length > 0.3 ? 'start' : 'middle')
      .text(fitText(names[i], 80, 7));
  });
}
