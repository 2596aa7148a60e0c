// The zonotope as a page for a terminal of 80 columns, readable without colour.
import type { Arrangement } from '../arrangement/arrangement.js';
import { pageColumns } from '../limits.js';
import {
  columnsOf,
  cut,
  grouped,
  hanging,
  padLeft,
  padRight,
  printable,
  table,
  unbroken,
  wrap,
} from './layout.js';
import type { AtLimit, MarginFacet, MarginReport } from './margin-report.js';
import { plural, titleWords } from './wording.js';
import type { EdgeClassReport, ZonotopeReport } from './zonotope-report.js';
import { measureRows, rootText } from './zonotope-wording.js';

const termColumns = 16;
/** Lines of edge classes; when there are more, those of one length and number share a line. */
const classesShown = 20;
const nameColumns = 44;

/** The page, with a line feed at the end of each line; no line is longer than 80 columns. */
export function formatZonotopePage(
  arrangement: Arrangement,
  report: ZonotopeReport,
  moved: boolean,
): string {
  const sections = [
    given(arrangement, report, moved),
    faces(arrangement, report),
    edges(report),
    measure(arrangement, report),
    report.margins === null ? [] : margins(arrangement, report.margins),
    checks(report),
    report.notRun.length === 0
      ? []
      : [
          'Not run',
          ...report.notRun.flatMap(({ route, why }) =>
            hanging('  ', `${route}: ${why}`, pageColumns),
          ),
        ],
    report.caution === null ? [] : wrap(report.caution, pageColumns),
  ];
  return sections
    .filter((lines) => lines.length > 0)
    .map((lines) => `${lines.map((line) => line.trimEnd()).join('\n')}\n`)
    .join('\n');
}

function term(name: string, text: string): string[] {
  return hanging(`  ${padRight(name, termColumns)}`, text, pageColumns);
}

function given(arrangement: Arrangement, { centre }: ZonotopeReport, moved: boolean): string[] {
  const { generators, dimension, rank } = arrangement;
  const { title, source, radicand, coordinates } = generators;
  const heading = `Zonotope of ${printable(titleWords(title, source.name))}`;
  const lines = wrap(heading, pageColumns).slice(0, 3);
  if (title !== null) lines.push(...term('from', printable(source.name)));
  const field = radicand === null ? 'rational' : `in Q(sqrt(${radicand}))`;
  const named = coordinates?.map((name) => cut(printable(name), 24)).join(', ');
  const space = `R^${dimension}${named ? ` (${named})` : ''}`;
  const count = plural(generators.normals.length, 'generator');
  lines.push(...term('given', `${count} in ${space}, ${field}`));
  const ranges = generators.ranges === null ? 'each from 0 to 1' : 'each from low to high as given';
  lines.push(...term('ranges', moved ? 'moved, so that the centre is the origin' : ranges));
  const span = rank === dimension ? 'the whole space' : `a subspace of R^${dimension}`;
  lines.push(...term('dimension', `${rank}, ${span}`));
  lines.push(...term('centre', `(${centre.join(', ')})`));
  return lines;
}

function faces({ rank }: Arrangement, report: ZonotopeReport): string[] {
  const lines = ['Faces'];
  if (report.faces === null) {
    if (report.vertices !== null) lines.push(...term('vertices', grouped(report.vertices)));
    return lines.length > 1 ? lines : [];
  }
  const names = ['vertices', 'edges', '2-faces'];
  const name = (k: number): string =>
    k === rank ? 'itself' : k === rank - 1 && k > 1 ? 'facets' : (names[k] ?? `${k}-faces`);
  const counts = report.faces.map((count) => grouped(count));
  const width = Math.max(...counts.map(columnsOf));
  const polygons = kinds(
    report.polygons?.map(({ sides, count }) => ({ count, what: sideName(sides, count) })) ?? [],
  );
  const facets = kinds(
    report.facetsByVertices?.map(({ vertices, count }) => ({
      count,
      what: `with ${grouped(vertices)} vertices`,
    })) ?? [],
  );
  report.faces.forEach((_, k) => {
    const note = k === 2 && polygons !== '' ? polygons : k === rank - 1 && rank > 3 ? facets : '';
    const first = `  ${padRight(name(k), termColumns)}${padLeft(counts[k], width)}`;
    lines.push(...(note === '' ? [first] : hanging(`${first}  `, note, pageColumns)));
  });
  return lines;
}

function kinds(list: readonly { count: string; what: string }[]): string {
  const shown = list.slice(0, 12).map(({ count, what }) => `${grouped(count)} ${what}`);
  return shown.join(', ') + (list.length > 12 ? `, and ${list.length - 12} kinds more` : '');
}

function sideName(sides: number, count: string): string {
  const names: Record<number, string> = { 4: 'parallelogram', 6: 'hexagon', 8: 'octagon' };
  const name = names[sides] ?? `${sides}-gon`;
  return count === '1' ? name : `${name}s`;
}

function edges({ edgeClasses }: ZonotopeReport): string[] {
  const grouping = edgeClasses.length > classesShown;
  const counted = edgeClasses.some((edge) => edge.edges !== null);
  const rows = grouping
    ? alike(edgeClasses).map(([first, ...rest]) => [
        cut(spans([first, ...rest].flatMap(({ generators }) => generators)), nameColumns),
        first.length,
        ...(counted ? [grouped(first.edges ?? '-')] : []),
      ])
    : edgeClasses.map((edge) => [
        generatorNames(edge),
        edge.length,
        ...(counted ? [grouped(edge.edges ?? '-')] : []),
      ]);
  const headings = [
    'generators',
    'length',
    ...(counted ? [grouping ? 'edges of each' : 'edges'] : []),
  ];
  // Names stand left, numbers right.
  const width = Math.max(...[headings, ...rows].map(([name]) => columnsOf(name)));
  const body = rows
    .slice(0, classesShown)
    .map(([name, ...rest]) => [padRight(name, width), ...rest]);
  const lines = ['Edges by generator'];
  lines.push(...table([padRight(headings[0], width), ...headings.slice(1)], body, pageColumns));
  if (rows.length > classesShown) {
    lines.push(`  and ${rows.length - classesShown} lines more; --json has every class`);
  }
  return lines;
}

/** Classes of one length and number, the shortest first. */
function alike(classes: readonly EdgeClassReport[]): EdgeClassReport[][] {
  const groups = new Map<string, EdgeClassReport[]>();
  for (const edge of classes) {
    const key = `${edge.squaredLength} ${edge.edges}`;
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [edge]);
    else group.push(edge);
  }
  return [...groups.values()].sort(([a], [b]) => Number(a.length) - Number(b.length));
}

/** Numbers with runs drawn together: `1-7, 9, 12-14`. */
function spans(numbers: readonly number[]): string {
  const sorted = [...numbers].sort((a, b) => a - b);
  const parts: string[] = [];
  for (let i = 0; i < sorted.length; ) {
    let end = i;
    while (sorted[end + 1] === sorted[end] + 1) end++;
    parts.push(end === i ? String(sorted[i]) : `${sorted[i]}-${sorted[end]}`);
    i = end + 1;
  }
  return parts.join(', ');
}

function generatorNames({ generators, labels }: EdgeClassReport): string {
  const names = generators.map((number, i) => {
    const label = labels?.[i];
    return label ? `${number} ${printable(label)}` : String(number);
  });
  return cut(names.join(', '), nameColumns);
}

function measure({ rank, dimension }: Arrangement, report: ZonotopeReport): string[] {
  const lines = ['Measure'];
  for (const [name, text] of measureRows(report.measures, rank, dimension)) {
    lines.push(...term(name, unbroken(text)));
  }
  if (report.dilate !== null) {
    const { factor, latticePoints, interiorPoints, boundaryPoints } = report.dilate;
    lines.push(
      ...term(
        `dilate ${cut(factor, 8)}`,
        `${grouped(latticePoints)} lattice points: ${grouped(interiorPoints)} inside, ` +
          `${grouped(boundaryPoints)} on the boundary`,
      ),
    );
  }
  // That of a scale is said among the rows.
  const notes = report.notes.filter((note) => !note.startsWith('the generators are not all'));
  for (const note of notes) lines.push(...hanging('  ', note, pageColumns));
  return lines.length > 1 ? lines : [];
}

function margins({ rank, dimension }: Arrangement, report: MarginReport): string[] {
  const { place, nearest, distance, box, forced } = report;
  const lines = ['Margins'];
  lines.push(...term('point', `(${report.point.join(', ')})`));
  const where = {
    inside: 'inside',
    boundary: 'on the boundary: no margin is left',
    outside: 'OUTSIDE: no choice of the generators reaches it',
    'off-span': 'OUTSIDE: not even in the span of the generators',
  };
  lines.push(...term('place', where[place]));
  if (nearest !== null && distance !== null) {
    const exact = `${rootText(distance)}${rank < dimension ? ', within the span' : ''}`;
    const beyond = place === 'outside' ? 'beyond by' : 'largest ball';
    lines.push(...term(beyond, place === 'outside' ? `at least ${exact}` : `radius ${exact}`));
    const leaving = place === 'outside' ? 'beyond facet' : 'nearest facet';
    lines.push(...term(leaving, facetText(nearest)));
    lines.push(...term('at a limit', limitsText(nearest.atLimit)));
  }
  if (box !== null) {
    const decimal = box.half === box.decimal ? '' : `, about ${box.decimal}`;
    lines.push(...term('largest box', `half a side ${box.half}${decimal}`));
    if (box.facet.number !== nearest?.number) {
      lines.push(...term('stopped by', facetText(box.facet)));
      lines.push(...term('at a limit', limitsText(box.facet.atLimit)));
    }
  }
  if (rank < dimension && (place === 'inside' || place === 'boundary')) {
    lines.push(...term('largest box', 'none: the generators do not span the space'));
  }
  if (place === 'boundary') lines.push(...term('forced here', limitsText(forced)));
  return lines;
}

function facetText({ number, normal, offset }: MarginFacet): string {
  return `${grouped(String(number))} of the list: (${normal.join(', ')}) . z <= ${offset}`;
}

function limitsText(limits: readonly AtLimit[]): string {
  if (limits.length === 0) return 'none';
  const shown = limits.slice(0, 20).map(({ generator, label, end }) => {
    const name = label === null ? String(generator) : `${generator} ${cut(printable(label), 24)}`;
    return `${name} ${end}`;
  });
  return shown.join(', ') + (limits.length > 20 ? `, and ${limits.length - 20} more` : '');
}

function checks({ checks: all }: ZonotopeReport): string[] {
  if (all.length === 0) return [];
  const wrong = all.filter((check) => !check.agrees).length;
  const lines = [
    wrong === 0 ? `Checks: all ${all.length} agree` : `Checks: ${wrong} of ${all.length} DISAGREE`,
  ];
  for (const { claim, routes, agrees } of all) {
    if (agrees) {
      lines.push(
        ...hanging(`  ${claim}: `, routes.map(({ route }) => route).join('; '), pageColumns),
      );
      continue;
    }
    lines.push(`  ${padRight(claim, pageColumns - 12)}DISAGREE`);
    const width = Math.max(...routes.map(({ route }) => columnsOf(route)));
    for (const { route, value } of routes) {
      lines.push(
        ...hanging(`    ${padRight(route, width)}  `, unbroken(grouped(value)), pageColumns),
      );
    }
  }
  return lines;
}
