// The words that the page, the Markdown and the LaTeX table have in common, from the record alone.
import { divideByLinear, formatFactors, formatPolynomial } from '../exact/polynomial.js';
import type { CensusRecord } from './record.js';

/** Said wherever a count could be taken for a statement about equipment or offers. */
export const caution =
  'These numbers are geometry of the model given, not a rating of equipment or offers; ' +
  'local codes and licensed practice decide.';

/** Whether the normals have names or ranges that stand for something real. */
export function needsCaution({ input }: CensusRecord): boolean {
  return input.ranges !== null || input.coordinates !== null;
}

/** The title, or the name of the file without its folders where there is none. */
export function titleOf({ input }: CensusRecord): string {
  return titleWords(input.title, input.source);
}

/** The same from its parts. */
export function titleWords(title: string | null, source: string): string {
  return title ?? source.replace(/^.*[/\\](?=.)/, '');
}

export function plural(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? '' : 's'}`;
}

/** A row of the table of counts, from the least dimension up; null where not counted. */
export interface CountRow {
  readonly dimension: number;
  readonly flats: string | null;
  readonly faces: string | null;
  readonly zonotopeFaces: string | null;
}

/** Flats, faces and faces of the zonotope of each dimension above the lineality space. */
export function countRows({ arrangement, faces, flats, zonotope }: CensusRecord): CountRow[] {
  const { rank } = arrangement;
  return Array.from({ length: rank + 1 }, (_, dimension) => ({
    dimension,
    flats: flats?.[rank - dimension] ?? null,
    faces: faces?.[dimension] ?? null,
    zonotopeFaces: zonotope.faces?.[dimension] ?? null,
  }));
}

/** Sum of decimal strings. */
export function total(counts: readonly string[]): string {
  return counts.reduce((sum, count) => sum + BigInt(count), 0n).toString();
}

/** The polynomial as a product: its integer roots, and what is left of it where they are not all. */
export function factored(
  { characteristicPolynomial, arrangement }: CensusRecord,
  formatRoots: typeof formatFactors = formatFactors,
  formatRest: typeof formatPolynomial = formatPolynomial,
): string {
  let rest = characteristicPolynomial.coefficients.map(BigInt);
  const roots: { root: bigint; multiplicity: number }[] = [];
  // If all are integers they add up to the number of hyperplanes; a larger one would stay in the rest.
  for (let root = 0n; root <= arrangement.hyperplanes && rest.length > 1; root++) {
    let multiplicity = 0;
    for (;;) {
      const { quotient, remainder } = divideByLinear(rest, root);
      if (remainder !== 0n || rest.length === 1) break;
      rest = quotient;
      multiplicity++;
    }
    if (multiplicity > 0) roots.push({ root, multiplicity });
  }
  if (roots.length === 0) return `(${formatRest(rest)})`;
  return rest.length === 1 ? formatRoots(roots) : `${formatRoots(roots)} (${formatRest(rest)})`;
}

/** Each property with its answer: yes, no, or not decided. */
export function propertyRows({ properties, arrangement }: CensusRecord): [string, string][] {
  const answer = (value: boolean | null, yes: string, no: string): string =>
    value === null ? 'not decided' : value ? `yes: ${yes}` : `no: ${no}`;
  const { rank } = arrangement;
  const rows: [string, string][] = [
    [
      'simplicial',
      answer(
        properties.simplicial,
        `every region has ${plural(rank, 'wall')}`,
        `some region has more than ${plural(rank, 'wall')}`,
      ),
    ],
    [
      'generic',
      answer(
        properties.generic,
        rank === 1 ? 'one hyperplane' : `every ${rank} hyperplanes are independent`,
        `some ${rank} hyperplanes are dependent`,
      ),
    ],
    [
      'irreducible',
      answer(properties.irreducible, 'not a product of smaller ones', 'a product of smaller ones'),
    ],
    [
      'supersolvable',
      answer(properties.supersolvable, 'a chain of modular flats', 'no chain of modular flats'),
    ],
  ];
  return rows;
}
