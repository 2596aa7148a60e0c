// Room for labels: boxes that touch neither each other nor lines that are to stay clear.

/** A rectangle on the sheet, in points. */
export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Keeps what is taken, and finds the first place that is free. */
export class LabelRoom {
  private readonly area: Box;
  private readonly boxes: Box[] = [];
  private readonly lines: (readonly [number, number, number, number])[] = [];

  constructor(area: Box) {
    this.area = area;
  }

  takeBox(box: Box): void {
    this.boxes.push(box);
  }

  takeLine(x1: number, y1: number, x2: number, y2: number): void {
    this.lines.push([x1, y1, x2, y2]);
  }

  /** The first of the boxes that is free and inside the area, taken at once; null where none is. */
  place(candidates: Iterable<Box>, overLines = false): Box | null {
    for (const box of candidates) {
      if (!inside(box, this.area) || this.boxes.some((other) => touch(box, other))) continue;
      if (!overLines && this.lines.some((line) => meets(box, line))) continue;
      this.boxes.push(box);
      return box;
    }
    return null;
  }
}

/** Boxes about a point, at growing distances, beginning in the direction (dx, dy). */
export function* boxesAround(
  x: number,
  y: number,
  width: number,
  height: number,
  [dx, dy]: readonly [number, number],
  distances: readonly number[],
): Generator<Box> {
  const start = Math.atan2(dy, dx);
  for (const distance of distances) {
    for (const turn of [0, 0.5, -0.5, 1, -1, 1.6, -1.6, 2.3, -2.3, Math.PI]) {
      const [c, s] = [Math.cos(start + turn), Math.sin(start + turn)];
      // The centre so far out that the box begins at `distance` from the point.
      const reach =
        distance + Math.min(width / 2 / Math.abs(c || 1e-9), height / 2 / Math.abs(s || 1e-9));
      yield { left: x + reach * c - width / 2, top: y + reach * s - height / 2, width, height };
    }
  }
}

/** A parallelogram: a corner and the two sides from it. */
export interface Slab {
  readonly corner: readonly [number, number];
  readonly sides: readonly [readonly [number, number], readonly [number, number]];
}

/** Whether a point lies inside a parallelogram, at least `margin` of it from each side. */
export function insideSlab(
  { corner, sides: [u, v] }: Slab,
  x: number,
  y: number,
  margin = 0,
): boolean {
  const area = u[0] * v[1] - u[1] * v[0];
  const [dx, dy] = [x - corner[0], y - corner[1]];
  const [a, b] = [(dx * v[1] - dy * v[0]) / area, (u[0] * dy - u[1] * dx) / area];
  return a > margin && a < 1 - margin && b > margin && b < 1 - margin;
}

/** Points that stand for a box: where none of them is covered, the box is taken to be free. */
export function* pointsOf({ left, top, width, height }: Box): Generator<[number, number]> {
  for (const a of [0, 0.25, 0.5, 0.75, 1]) {
    for (const b of [0, 0.5, 1]) yield [left + a * width, top + b * height];
  }
}

function inside(box: Box, area: Box): boolean {
  return (
    box.left >= area.left &&
    box.top >= area.top &&
    box.left + box.width <= area.left + area.width &&
    box.top + box.height <= area.top + area.height
  );
}

function touch(a: Box, b: Box): boolean {
  return (
    a.left < b.left + b.width &&
    b.left < a.left + a.width &&
    a.top < b.top + b.height &&
    b.top < a.top + a.height
  );
}

/** Whether a segment meets a box: clipped to it, something is left (Y. Liang, B. Barsky, 1984). */
function meets(box: Box, [x1, y1, x2, y2]: readonly [number, number, number, number]): boolean {
  let [from, to] = [0, 1];
  for (const [at, step, low, size] of [
    [x1, x2 - x1, box.left, box.width],
    [y1, y2 - y1, box.top, box.height],
  ]) {
    if (step === 0) {
      if (at < low || at > low + size) return false;
      continue;
    }
    const [a, b] = [(low - at) / step, (low + size - at) / step];
    from = Math.max(from, Math.min(a, b));
    to = Math.min(to, Math.max(a, b));
  }
  return from <= to;
}
