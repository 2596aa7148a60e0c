// The census as Markdown (CommonMark with tables), for notes and repositories.
import { grouped, printable } from './layout.js';
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

/** Text of the input with everything Markdown or HTML could read as markup escaped. */
export function escapeMarkdown(text: string): string {
  return printable(text)
    .replace(/[\\`*_{}[\]()#+\-.!|~^$:@]/g, '\\$&')
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;');
}

function line(cells: readonly string[]): string {
  return `| ${cells.join(' | ')} |`;
}

function tableOf(headings: readonly string[], rows: readonly (readonly string[])[]): string[] {
  const numeric = headings.map((_, c) => rows.every((row) => /^[-\d,]*$/.test(row[c])));
  return [line(headings), line(numeric.map((n) => (n ? '---:' : '---'))), ...rows.map(line)];
}

/** The whole census as a section of level 1. */
export function formatMarkdown(record: CensusRecord): string {
  const { input, arrangement, run, characteristicPolynomial: chi } = record;
  const shown = (count: string | null): string => (count === null ? '' : grouped(count));
  const sum = (list: readonly string[] | null): string => shown(list && total(list));
  const counted = countRows(record).map((row) => [
    String(row.dimension),
    shown(row.flats),
    shown(row.faces),
    shown(row.zonotopeFaces),
  ]);
  const { linesByMultiplicity } = record.properties;
  const measures = measureRows(record.zonotope, arrangement.rank, input.ambientDimension);
  const blocks: string[][] = [
    [`# ${escapeMarkdown(titleOf(record))}`],
    [
      `${plural(input.normalCount, 'normal')} in dimension ${input.ambientDimension} over ` +
        `\`${input.field}\`; ${plural(arrangement.hyperplanes, 'hyperplane')} of rank ` +
        `${arrangement.rank}; **${grouped(record.regions)} regions**.`,
    ],
    tableOf(
      ['dimension', 'flats', 'faces', 'faces of the zonotope'],
      [...counted, ['total', sum(record.flats), sum(record.faces), sum(record.zonotope.faces)]],
    ),
    [`Characteristic polynomial: \`${chi.text}\` = \`${factored(record)}\``],
    tableOf(
      ['property', 'answer'],
      propertyRows(record).map(([name, text]) => [name, text]),
    ),
    measures.length === 0 ? [] : tableOf(['zonotope', 'value'], measures),
    linesByMultiplicity === null
      ? []
      : tableOf(
          ['planes through a line', 'lines'],
          Object.entries(linesByMultiplicity).map(([k, lines]) => [k, grouped(lines)]),
        ),
    record.checks.length === 0
      ? []
      : tableOf(
          ['check', 'route', 'value', 'agrees'],
          record.checks.flatMap(({ claim, routes, agrees }) =>
            routes.map(({ route, value }, i) => [
              i === 0 ? claim : '',
              route.replaceAll('|', '\\|'),
              grouped(value),
              i === 0 ? (agrees ? 'yes' : '**NO**') : '',
            ]),
          ),
        ),
    run.notRun.map(({ route, why }) => `- Not run: ${route}: ${why}`),
    needsCaution(record) ? [caution] : [],
    [`signwright ${run.version}, ${run.seconds} s.`],
  ];
  return `${blocks
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}
