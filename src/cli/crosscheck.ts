// `crosscheck`: somebody else's list, or number, held against ours.
import type { Command } from 'commander';
import { Disagreement, InputError } from '../errors.js';
import { loadArrangement, readBytes } from './load.js';
import {
  addCommonOptions,
  type CommonOptions,
  chooseFormat,
  memoryOf,
  readInteger,
} from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

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
  const bytes = file === undefined ? null : await readBytes(file);
  void [arrangement, bytes, format, memoryOf, writeTo, startProgress, Disagreement];
}
