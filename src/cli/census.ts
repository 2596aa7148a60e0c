// `census`: every count, by every route that can be afforded, on one page.
import type { Command } from 'commander';
import type { CensusRecord } from '../census/record.js';
import { Disagreement } from '../errors.js';
import { defaultRouteSeconds } from '../limits.js';
import { jsonText } from './json.js';
import { loadArrangement } from './load.js';
import {
  addCommonOptions,
  type CommonOptions,
  chooseFormat,
  memoryOf,
  readSeconds,
} from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const formats = ['text', 'markdown', 'latex', 'json'];

interface CensusFlags extends CommonOptions {
  readonly budget?: number;
  readonly record?: string;
}

const after = `
What is counted: regions, faces and flats by dimension, the characteristic
polynomial, the faces of the zonotope. Each route is estimated first; one that
would take longer than --budget or more than --memory is left out, and the page
says what it would need. A check that disagrees ends with status 4.

Formats: text is a page of 80 columns, markdown and latex are tables for a
paper, json is the record.

Examples:
  signwright census normals.txt
  signwright census normals.csv --record census.json
  signwright census normals.csv --format latex -o table.tex
  signwright make reflection E7 | signwright census - --budget 120`;

export function addCensus(program: Command): void {
  const command = program
    .command('census')
    .description('Count everything, each count by independent routes, side by side.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, formats)
    .option(
      '--budget <seconds>',
      `time a route may take by estimate (default: ${defaultRouteSeconds})`,
      readSeconds,
    )
    .option('--record <file>', 'save the record (JSON) besides')
    .addHelpText('after', after)
    .action(run);
}

async function run(name: string, options: CensusFlags): Promise<void> {
  const format = chooseFormat(options, formats);
  const progress = await startProgress(options.quiet);
  const arrangement = await loadArrangement(name);
  const { describeDisagreement, disagreements, takeCensus } = await import('../census/census.js');
  let record: CensusRecord;
  try {
    record = takeCensus(arrangement, {
      ...(options.budget === undefined ? {} : { secondsPerRoute: options.budget }),
      memoryBytes: memoryOf(options),
      listener: progress,
    });
  } finally {
    progress.end();
  }
  const json = jsonText(record);
  const text = format === 'json' ? json : await formatted(record, format);
  if (options.record !== undefined) await writeTo(options.record, (file) => file.write(json));
  await writeTo(options.out ?? null, (result) => result.write(text));
  const wrong = disagreements(record);
  if (wrong.length > 0) {
    throw new Disagreement(
      `${wrong.map(describeDisagreement).join('; ')}; do not use these counts, and please report them`,
    );
  }
}

async function formatted(record: CensusRecord, format: string): Promise<string> {
  if (format === 'markdown') return (await import('../census/markdown.js')).formatMarkdown(record);
  if (format === 'latex') return (await import('../census/latex.js')).formatLatex(record);
  return (await import('../census/page.js')).formatPage(record);
}
