// What every JSON file of ours says first: which arrangement it speaks of, in full, so that the
// file can be read and checked alone.
import type { Arrangement } from '../arrangement/arrangement.js';
import { jsonNumber } from './fields.js';

/**
 * Title, source and exact normals of the input, and the size of its arrangement. The names are
 * those of the census record; `normals` can be read back as an arrangement file.
 */
export function heading(arrangement: Arrangement): Record<string, unknown> {
  const { generators, dimension, rank, hyperplanes } = arrangement;
  const { radicand, coordinates, labels, ranges } = generators;
  const number = (x: Parameters<typeof jsonNumber>[0]) => jsonNumber(x, radicand);
  return {
    input: {
      title: generators.title,
      source: generators.source.name,
      sha256: generators.source.sha256,
      normalCount: generators.normals.length,
      ambientDimension: dimension,
      field: radicand === null ? 'Q' : `Q(sqrt(${radicand}))`,
      coordinates,
      labels,
      ranges: ranges?.map(({ low, high }) => [number(low), number(high)]) ?? null,
      normals: generators.normals.map((normal) => normal.map(number)),
    },
    arrangement: { hyperplanes: hyperplanes.length, rank, lineality: dimension - rank },
  };
}

/** The opening of a JSON object that goes on with a list under `key`; closed by `jsonListEnd`. */
export function jsonListStart(schema: string, arrangement: Arrangement, key: string): string {
  const members = Object.entries({ schema, ...heading(arrangement) });
  const lines = members.map(([name, value]) => `  "${name}": ${JSON.stringify(value)},\n`);
  return `{\n${lines.join('')}  "${key}": [\n`;
}

export const jsonListEnd = '\n  ]\n}\n';

/** One row of such a list, on a line of its own. */
export function jsonListRow(value: unknown, index: number): string {
  return `${index === 0 ? '' : ',\n'}    ${JSON.stringify(value)}`;
}

/** What to call an arrangement in a heading: its title, or the file without its folders. */
export function titleOf(arrangement: Arrangement): string {
  const { title, source } = arrangement.generators;
  return title ?? source.name.replace(/^.*[\\/](?=.)/, '');
}
