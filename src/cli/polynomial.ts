// `polynomial`: the characteristic polynomial alone, without listing regions.
import type { Command } from 'commander';
import { InputError } from '../errors.js';
import { jsonText } from './json.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, type CommonOptions, chooseFormat, either, memoryOf } from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const formats = ['text', 'latex', 'json'];
const routes = ['deletion-restriction', 'flats'] as const;
const laterRoutes = ['class-sums', 'finite-field'];

interface PolynomialFlags extends CommonOptions {
  readonly route?: string;
}

const after = `
Routes:
  deletion-restriction   no list of anything; needs little memory
  flats                  lists all flats, with their Moebius values
Without --route the one that is estimated to be quicker is taken.

Examples:
  signwright polynomial normals.txt
  signwright polynomial normals.txt --route flats --json`;

export function addPolynomial(program: Command): void {
  const command = program
    .command('polynomial')
    .description('The characteristic polynomial alone, never by listing regions.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, formats)
    .option('--route <name>', routes.join(' or '))
    .addHelpText('after', after)
    .action(run);
}

function checkRoute(route: string | undefined): (typeof routes)[number] | undefined {
  if (route === undefined) return undefined;
  const known = routes.find((name) => name === route);
  if (known !== undefined) return known;
  const what = laterRoutes.includes(route) ? 'not in this version' : 'no such route';
  throw new InputError(`--route ${route}: ${what}`, `take ${either(routes)}`);
}

async function run(name: string, options: PolynomialFlags): Promise<void> {
  const format = chooseFormat(options, formats);
  const asked = checkRoute(options.route);
  const arrangement = await loadArrangement(name);
  const [{ polynomialBy }, polynomials] = await Promise.all([
    import('../census/polynomial.js'),
    import('../exact/polynomial.js'),
  ]);
  const progress = await startProgress(options.quiet);
  let found: ReturnType<typeof polynomialBy>;
  try {
    found = polynomialBy(arrangement, asked ?? null, memoryOf(options), progress);
  } finally {
    progress.end();
  }
  const { route, coefficients, integerRoots } = found;
  const { formatPolynomial, formatPolynomialLatex } = polynomials;
  let text = `${formatPolynomial(coefficients)}\n`;
  if (format === 'latex') text = `${formatPolynomialLatex(coefficients)}\n`;
  if (format === 'json') {
    const value = {
      schema: 'signwright/polynomial/1',
      route,
      coefficients: coefficients.map(String),
      text: formatPolynomial(coefficients),
      integerRoots: integerRoots?.map(String) ?? null,
      regions: String(found.regions),
    };
    text = jsonText(value);
  }
  await writeTo(options.out ?? null, (result) => result.write(text));
}
