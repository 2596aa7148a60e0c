// What the key beside a zonotope says: the normals by the lines that run along them, the faces by
// their sides, the axes.
import { formatNumber } from '../exact/number.js';
import { classNames, oneLine, sideClass, sideClassName } from '../export/mesh-words.js';
import type { Projection } from '../zonotope/solid-projection.js';
import { ink, normalInks, sideTints, type Tint } from './palette.js';
import type { KeyPart } from './zonotope-sheet.js';

/** The colour of lines along a hyperplane's normals. */
export function normalInk(h: number): string {
  return normalInks[h % normalInks.length];
}

/** The tint of a face by its number of sides. */
export function sideTint(sides: number): Tint {
  return { fill: sideTints[sideClass(sides)], stroke: ink };
}

/** `3`, or `1+4` for parallel normals: numbers in the file, short enough for a badge. */
export function classNumbers(projection: Projection): string[] {
  return projection.arrangement.hyperplanes.map(({ members }) => {
    const numbers = members.map((j) => projection.kept[j] + 1).join('+');
    return numbers.length <= 7 ? numbers : `${projection.kept[members[0]] + 1}+…`;
  });
}

/** `fore (1, 0, -2)`, or `1 fore + 4 aft along (1, 0, -2)`: a row for each hyperplane. */
export function normalRows(projection: Projection, heading: string): KeyPart {
  const { arrangement, from, kept } = projection;
  const { normals, radicand } = from.generators;
  const numbers = classNumbers(projection);
  const names = classNames(projection);
  return {
    heading,
    rows: arrangement.hyperplanes.map(({ members }, h) => {
      const vector = normals[kept[members[0]]].map((x) => formatNumber(x, radicand)).join(', ');
      // A single number stands on the swatch already.
      const text =
        members.length === 1
          ? `${names[h].replace(/^\d+ ?/, '')} (${vector})`.trim()
          : `${names[h]} along (${vector})`;
      return { swatch: { kind: 'line', colour: normalInk(h), number: numbers[h] }, text };
    }),
  };
}

/** A row for each number of sides that occurs. */
export function faceRows(sides: readonly number[]): KeyPart {
  const counts = new Map<number, number>();
  for (const n of sides) counts.set(sideClass(n), (counts.get(sideClass(n)) ?? 0) + 1);
  return {
    heading: 'Faces by number of sides',
    rows: [...counts]
      .sort(([a], [b]) => a - b)
      .map(([index, count]) => ({
        swatch: { kind: 'fill', tint: sideTint(2 * index + 4) },
        text: `${count} ${sideClassName(index)}`,
      })),
  };
}

/** A note on how the axes lie in the coordinates of the file; none where they are these. */
export function axisNotes(projection: Projection): string[] {
  const measured = projection.axes.filter(({ measure }) => measure !== null);
  if (measured.length === 0) return [];
  const products = measured.map(({ name, measure }) => `${name} = ${measure} · point`);
  return [`In the coordinates of the file ${products.join('; ')}.`];
}

/** Names of the axes on one line each, for their arrows. */
export function axisNames(projection: Projection): string[] {
  return projection.axes.map(({ name }) => oneLine(name));
}
