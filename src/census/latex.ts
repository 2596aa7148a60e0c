// The census as LaTeX tables for a paper: plain tabular and mathematics, no package needed.
import { formatFactorsLatex, formatPolynomialLatex } from '../exact/polynomial.js';
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

const special: Record<string, string> = {
  '\\': '\\textbackslash{}',
  '~': '\\textasciitilde{}',
  '^': '\\textasciicircum{}',
  '<': '\\textless{}',
  '>': '\\textgreater{}',
  '|': '\\textbar{}',
  '"': '\\symbol{34}',
};

/** Text of the input with everything TeX could read as a command escaped. */
export function escapeLatex(text: string): string {
  return printable(text).replace(/[\\~^<>|"{}$&#_%]/g, (c) => special[c] ?? `\\${c}`);
}

/** A count with groups that TeX does not take for a list: 39{,}296{,}883. */
function number(count: string | null): string {
  return count === null ? '--' : grouped(count, '{,}');
}

function tabular(columns: string, rows: readonly (readonly string[])[]): string[] {
  const [head, ...body] = rows.map((row) => `  ${row.join(' & ')} \\\\`);
  return [`\\begin{tabular}{${columns}}`, head, '  \\hline', ...body, '\\end{tabular}'];
}

/** Two tables, the counts and the checks, each in a `table` environment with its caption. */
export function formatLatex(record: CensusRecord): string {
  const { input, arrangement, run } = record;
  const chi = formatPolynomialLatex(record.characteristicPolynomial.coefficients.map(BigInt));
  const factors = factored(record, formatFactorsLatex, formatPolynomialLatex);
  const sum = (list: readonly string[] | null): string => number(list && total(list));
  const title = escapeLatex(titleOf(record));
  const { linesByMultiplicity } = record.properties;
  const answers = propertyRows(record).map(([name, text]) => {
    if (text.startsWith('yes')) return name;
    return text.startsWith('no:') ? `not ${name}` : `${name}: not decided`;
  });
  const multiplicity =
    linesByMultiplicity === null
      ? ''
      : ` Lines by multiplicity: ${Object.entries(linesByMultiplicity)
          .map(([k, lines]) => `$t_{${k}} = ${number(lines)}$`)
          .join(', ')}.`;
  const lines = [
    `% signwright ${run.version}`,
    '\\begin{table}',
    '\\centering',
    ...tabular('rrrr', [
      ['dimension', 'flats', 'faces', 'faces of the zonotope'],
      ...countRows(record).map((row) => [
        String(row.dimension),
        number(row.flats),
        number(row.faces),
        number(row.zonotopeFaces),
      ]),
      ['total', sum(record.flats), sum(record.faces), sum(record.zonotope.faces)],
    ]),
    `\\caption{${title}: ${plural(input.normalCount, 'normal')} in dimension ${input.ambientDimension}, ` +
      `${plural(arrangement.hyperplanes, 'hyperplane')} of rank ${arrangement.rank}, ` +
      `${number(record.regions)} regions. ` +
      `$\\chi(t) = ${grouped(chi, '{,}')} = ${grouped(factors, '{,}')}$. ` +
      `The arrangement is ${answers.join(', ')}.${multiplicity}${measured(record)}}`,
    '\\end{table}',
    '',
    '\\begin{table}',
    '\\centering',
    ...tabular('llp{0.4\\linewidth}l', [
      ['check', 'route', 'value', 'agree'],
      ...record.checks.flatMap(({ claim, routes, agrees }) =>
        routes.map(({ route, value }, i) => [
          i === 0 ? escapeLatex(claim) : '',
          escapeLatex(route),
          checkValue(value),
          i === 0 ? (agrees ? 'yes' : '\\textbf{no}') : '',
        ]),
      ),
    ]),
    `\\caption{${title}: each count by independent routes.}`,
    '\\end{table}',
    ...run.notRun.map(({ route, why }) => `% not run: ${printable(`${route}: ${why}`)}`),
    ...(needsCaution(record) ? ['', escapeLatex(caution)] : []),
  ];
  return `${lines.join('\n')}\n`;
}

/** A sentence on the zonotope's measure; empty where it was not had. */
function measured({ zonotope }: CensusRecord): string {
  const { volume, ehrhart, latticePoints, interiorPoints, scale } = zonotope;
  const parts: string[] = [];
  if (volume !== null)
    parts.push(`volume $${grouped(volume, '{,}').replace(/\*?sqrt\((\d+)\)/g, '\\sqrt{$1}')}$`);
  if (ehrhart !== null) {
    const polynomial = grouped(formatPolynomialLatex(ehrhart.map(BigInt)), '{,}');
    parts.push(`Ehrhart polynomial $${polynomial}$`);
  }
  if (latticePoints !== null) {
    parts.push(`${number(latticePoints)} lattice points, ${number(interiorPoints)} of them inside`);
  }
  if (parts.length === 0) return '';
  const scaled =
    scale === null || scale === '1' ? '' : ` (the last of the zonotope scaled by ${scale})`;
  return ` Zonotope: ${parts.join('; ')}${scaled}.`;
}

/** Polynomials are set as mathematics; lists of counts as they are. */
function checkValue(value: string): string {
  const text = grouped(value, '{,}');
  return /^-?(\d+ )?t\b/.test(value) ? `$${text.replace(/\^(\d+)/g, '^{$1}')}$` : text;
}
