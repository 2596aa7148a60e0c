// `crosscheck`: somebody else's list, or number, held against ours.
import type { Command } from 'commander';
import type { Arrangement } from '../arrangement/arrangement.js';
import type { CrosscheckReport } from '../census/crosscheck-report.js';
import { Disagreement, InputError } from '../errors.js';
import { jsonText } from './json.js';
import { loadArrangement, readBytes } from './load.js';
import {
  addCommonOptions,
  type CommonOptions,
  chooseFormat,
  memoryOf,
  readInteger,
} from './options.js';
import { writeTo } from './output.js';
import { type Progress, startProgress } from './progress.js';

const formats = ['text', 'json'];

interface CrosscheckFlags extends CommonOptions {
  readonly regions?: bigint;
}

const after = `
FILE is a list of zonotope vertices (CSV, in any order; a translate or a scale,
such as centred or with segments from -1 to 1, is detected and said), or a list
of sign vectors (a column named signs, or one string a line). What is missing,
extra, repeated or not extreme is named, and the exit status is then 4.

Examples:
  signwright crosscheck normals.txt vertices.csv
  signwright crosscheck normals.txt signs.txt --json
  signwright crosscheck normals.txt --regions 2903040`;

export function addCrosscheck(program: Command): void {
  const command = program
    .command('crosscheck')
    .summary("somebody else's list, or number of regions, held against ours")
    .description("Hold somebody else's list, or just a number of regions, against ours.")
    .argument('<arrangement>', 'a file of normals, or - for standard input')
    .argument('[file]', 'a list of zonotope vertices or of sign vectors');
  addCommonOptions(command, formats)
    .option('--regions <n>', 'a number of regions to check', readInteger('--regions'))
    .addHelpText('after', after)
    .action(run);
}

async function run(
  name: string,
  file: string | undefined,
  options: CrosscheckFlags,
): Promise<void> {
  const format = chooseFormat(options, formats);
  if ((file === undefined) === (options.regions === undefined)) {
    throw new InputError(
      file === undefined
        ? 'crosscheck: there is nothing to check'
        : 'crosscheck: a list and a number are given',
      'give a FILE of vertices or signs, or --regions N',
    );
  }
  if (name === '-' && file === '-') {
    throw new InputError('crosscheck: - is given twice', 'standard input can be one of the two');
  }
  const arrangement = await loadArrangement(name);
  const progress = await startProgress(options.quiet);
  let report: CrosscheckReport;
  try {
    report =
      options.regions === undefined
        ? await checkList(arrangement, file!, memoryOf(options), progress)
        : await checkCount(arrangement, options.regions, memoryOf(options), progress);
  } finally {
    progress.end();
  }
  const { crosscheckLines } = await import('../census/crosscheck-report.js');
  const text =
    format === 'json'
      ? jsonText({ schema: 'signwright/crosscheck/1', ...report })
      : `${crosscheckLines(report).join('\n')}\n`;
  await writeTo(options.out ?? null, (result) => result.write(text));
  if (!report.agrees) {
    throw new Disagreement(`${file ?? `${options.regions} regions`}: does not agree with ours`);
  }
}

async function checkList(
  arrangement: Arrangement,
  file: string,
  memoryBytes: number,
  progress: Progress,
): Promise<CrosscheckReport> {
  const bytes = await readBytes(file);
  const [{ readTheirList }, { crosscheckList }, { listChecked }] = await Promise.all([
    import('../census/crosscheck-read.js'),
    import('../census/crosscheck.js'),
    import('../census/listing.js'),
  ]);
  const theirs = await readTheirList(bytes, file, arrangement);
  return crosscheckList(arrangement, listChecked(arrangement, memoryBytes, progress), theirs);
}

async function checkCount(
  arrangement: Arrangement,
  regions: bigint,
  memoryBytes: number,
  progress: Progress,
): Promise<CrosscheckReport> {
  const [{ polynomialBy }, { crosscheckCount }] = await Promise.all([
    import('../census/polynomial.js'),
    import('../census/crosscheck.js'),
  ]);
  const ours = polynomialBy(arrangement, null, memoryBytes, progress).regions;
  return crosscheckCount(ours, regions);
}
