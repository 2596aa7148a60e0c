// The census as a page for a terminal of 80 columns, readable without colour.
import { pageColumns } from '../limits.js';
import {
  columnsOf,
  cut,
  grouped,
  hanging,
  padRight,
  printable,
  table,
  unbroken,
  wrap,
} from './layout.js';
import type { CensusRecord } from './record.js';
import {
  caution,
  countRows,
  factored,
  needsCaution,
  plural,
  propertyRows,
  titleOf,
  total,
} from './wording.js';
import { measureRows } from './zonotope-wording.js';

/** Columns of the terms on the left of a line. */
const termColumns = 16;
/** Lines of a title before it is cut. */
const titleLines = 3;
/** Characters of a label before it is cut. */
const labelColumns = 24;
/** Parallel classes named one by one. */
const classesShown = 6;

/** The page, with a line feed at the end of each line; no line is longer than 80 columns. */
export function formatPage(record: CensusRecord): string {
  const sections = [
    given(record),
    counts(record),
    polynomial(record),
    arrangement(record),
    zonotope(record),
    checks(record),
    notRun(record),
    ending(record),
  ];
  return sections
    .filter((lines) => lines.length > 0)
    .map((lines) => `${lines.map((line) => line.trimEnd()).join('\n')}\n`)
    .join('\n');
}

function term(name: string, text: string): string[] {
  return hanging(`  ${padRight(name, termColumns)}`, text, pageColumns);
}

function given(record: CensusRecord): string[] {
  const { input, arrangement: of } = record;
  const title = printable(titleOf(record));
  const lines = wrap(title, pageColumns);
  if (lines.length > titleLines) {
    lines.length = titleLines;
    lines[titleLines - 1] = cut(`${lines[titleLines - 1]} ...`, pageColumns);
  }
  if (title !== input.source) lines.push(...term('from', printable(input.source)));
  const named = input.coordinates?.map((name) => cut(printable(name), labelColumns)).join(', ');
  const field = input.field === 'Q' ? 'rational' : `in ${input.field}`;
  const space = `R^${input.ambientDimension}${named ? ` (${named})` : ''}`;
  lines.push(...term('given', `${plural(input.normalCount, 'normal')} in ${space}, ${field}`));
  if (input.ranges !== null) lines.push(...term('ranges', 'as given, a low and a high a normal'));
  const span =
    of.lineality === 0
      ? 'the normals span the space'
      : `a subspace of dimension ${of.lineality} lies on all of them`;
  lines.push(...term('hyperplanes', `${of.hyperplanes}, of rank ${of.rank}; ${span}`));
  const classes = of.parallelClasses.filter((members) => members.length > 1);
  classes.slice(0, classesShown).forEach((members, i) => {
    lines.push(...term(i === 0 ? 'parallel' : '', parallel(members, input.labels)));
  });
  if (classes.length > classesShown) {
    lines.push(...term('', `and ${plural(classes.length - classesShown, 'class')} more`));
  }
  return lines;
}

function parallel(members: readonly number[], labels: CensusRecord['input']['labels']): string {
  const name = (number: number): string => {
    const label = labels?.[number - 1];
    return label ? `${number} ${cut(printable(label), labelColumns)}` : `${number}`;
  };
  if (members.length <= 8) return `normals ${members.map(name).join(', ')}`;
  const shown = members.slice(0, 6).map(name).join(', ');
  return `normals ${shown}, ... (${members.length} in all)`;
}

function counts(record: CensusRecord): string[] {
  const rows = countRows(record);
  const { rank } = record.arrangement;
  const regions = `${grouped(record.regions)} regions, as many as the zonotope has vertices`;
  const lines = ['Counts', ...wrap(regions, pageColumns - 2).map((line) => `  ${line}`)];
  if (record.faces === null && record.flats === null) return lines;
  const shown = (count: string | null): string => (count === null ? '-' : grouped(count));
  const body = rows.map((row) => [
    String(row.dimension),
    shown(row.flats),
    shown(row.faces),
    shown(row.zonotopeFaces),
  ]);
  const sum = (list: readonly string[] | null): string => shown(list && total(list));
  body.push(['total', sum(record.flats), sum(record.faces), sum(record.zonotope.faces)]);
  lines.push('');
  lines.push(...table(['dimension', 'flats', 'faces', 'faces of the zonotope'], body, pageColumns));
  const match = `A face of dimension k matches a face of the zonotope of dimension ${rank} - k.`;
  const above =
    record.arrangement.lineality === 0 ? '' : ' Dimensions count above the common subspace.';
  lines.push('', ...wrap(match + above, pageColumns - 2).map((line) => `  ${line}`));
  return lines;
}

function polynomial(record: CensusRecord): string[] {
  const { text, integerRoots } = record.characteristicPolynomial;
  const lines = ['Characteristic polynomial'];
  lines.push(...hanging('  ', unbroken(grouped(text)), pageColumns));
  lines.push(...hanging('  = ', unbroken(grouped(factored(record))), pageColumns));
  const roots = integerRoots?.map((root) => grouped(root)).join(', ') ?? 'no, not all';
  lines.push(...term('integer roots', roots));
  return lines;
}

function arrangement(record: CensusRecord): string[] {
  const lines = ['Arrangement'];
  for (const [name, text] of propertyRows(record)) lines.push(...term(name, text));
  const lineCounts = record.properties.linesByMultiplicity;
  if (lineCounts !== null) {
    const kinds = Object.entries(lineCounts).map(
      ([k, count]) => `${grouped(count)} in ${k} planes`,
    );
    lines.push(...term('lines', kinds.join(', ')));
  }
  return lines;
}

function zonotope(record: CensusRecord): string[] {
  const { faces } = record.zonotope;
  const { rank } = record.arrangement;
  const lines = ['Zonotope'];
  lines.push(...term('dimension', String(rank)));
  lines.push(...term('vertices', grouped(faces?.[0] ?? record.regions)));
  if (faces !== null && rank >= 2) lines.push(...term('edges', grouped(faces[1])));
  if (faces !== null && rank >= 3) lines.push(...term('facets', grouped(faces[rank - 1])));
  const { ambientDimension } = record.input;
  for (const [name, text] of measureRows(record.zonotope, rank, ambientDimension)) {
    lines.push(...term(name, unbroken(text)));
  }
  return lines;
}

function checks({ checks: all }: CensusRecord): string[] {
  const agreeing = all.filter((check) => check.agrees).length;
  const lines = [
    agreeing === all.length
      ? `Checks: ${all.length === 1 ? 'the only one agrees' : `all ${all.length} agree`}`
      : `Checks: ${all.length - agreeing} of ${all.length} DISAGREE`,
  ];
  for (const { claim, routes, agrees } of all) {
    const width = Math.max(...routes.map(({ route }) => columnsOf(route)));
    lines.push(`  ${padRight(claim, pageColumns - 12)}${agrees ? 'agree' : 'DISAGREE'}`);
    for (const { route, value } of routes) {
      lines.push(
        ...hanging(`    ${padRight(route, width)}  `, unbroken(grouped(value)), pageColumns),
      );
    }
  }
  return lines;
}

function notRun({ run }: CensusRecord): string[] {
  if (run.notRun.length === 0) return [];
  return [
    'Not run',
    ...run.notRun.flatMap(({ route, why }) => {
      return hanging('  ', `${route}: ${why}`, pageColumns);
    }),
  ];
}

function ending(record: CensusRecord): string[] {
  const { run } = record;
  const lines = needsCaution(record) ? [...wrap(caution, pageColumns), ''] : [];
  lines.push(`${run.seconds} s on ${plural(run.threads, 'thread')}, signwright ${run.version}`);
  return lines;
}
