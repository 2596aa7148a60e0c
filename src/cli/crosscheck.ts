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
  either,
  memoryOf,
  readInteger,
} from './options.js';
import { writeTo } from './output.js';
import { type Progress, startProgress } from './progress.js';

const formats = ['text', 'json'];
const kinds = ['vertices', 'signs', 'facets'];

interface CrosscheckFlags extends CommonOptions {
  readonly regions?: bigint;
  readonly faces?: bigint[];
  readonly as?: string;
}

const after = `
FILE is a list of zonotope vertices (CSV, in any order; a translate or a scale,
such as centred or with segments from -1 to 1, is detected and said), or a list
of sign vectors (a column named signs, or one string a line). What is missing,
extra, repeated or not extreme is named, and the exit status is then 4.

--as facets: a row has the coefficients a of a facet's normal and its offset b,
last or named offset, at any positive scale. Rows are taken as a . z <= b; lists
that mean a . z >= b, a . z + b >= 0 or a . z + b <= 0 are detected and said.

--faces: faces of the zonotope by dimension, vertices first.

Examples:
  signwright crosscheck normals.txt vertices.csv
  signwright crosscheck normals.txt signs.txt --json
  signwright crosscheck normals.txt facets.csv --as facets
  signwright crosscheck normals.txt --regions 2903040
  signwright crosscheck normals.txt --faces "14 24 12"`;

export function addCrosscheck(program: Command): void {
  const command = program
    .command('crosscheck')
    .description("Hold somebody else's list, or just a number of regions, against ours.")
    .argument('<arrangement>', 'a file of normals, or - for standard input')
    .argument('[file]', 'a list of zonotope vertices or of sign vectors');
  addCommonOptions(command, formats)
    .option('--as <kind>', 'facets, where FILE lists those; or vertices, or signs')
    .option('--regions <n>', 'a number of regions to check', readInteger('--regions'))
    .option('--faces <list>', 'numbers of faces of the zonotope, as "14 24 12"', readCounts)
    .addHelpText('after', after)
    .action(run);
}

async function run(
  name: string,
  file: string | undefined,
  options: CrosscheckFlags,
): Promise<void> {
  const format = chooseFormat(options, formats);
  const given = [file, options.regions, options.faces].filter((x) => x !== undefined);
  if (given.length !== 1) {
    throw new InputError(
      given.length === 0
        ? 'crosscheck: there is nothing to check'
        : 'crosscheck: a list and a number are given',
      'give a FILE of vertices, signs or facets, or --regions N, or --faces LIST',
    );
  }
  if (options.as !== undefined && file === undefined) {
    throw new InputError('--as goes with a FILE', 'leave it out');
  }
  if (options.as !== undefined && !kinds.includes(options.as)) {
    throw new InputError(`--as ${options.as}: no such list`, `take ${either(kinds)}`);
  }
  if (name === '-' && file === '-') {
    throw new InputError('crosscheck: - is given twice', 'standard input can be one of the two');
  }
  const arrangement = await loadArrangement(name);
  const progress = await startProgress(options.quiet);
  let report: CrosscheckReport;
  try {
    report = await checked(arrangement, file, options, progress);
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
    const what = options.faces?.join(' ') ?? `${options.regions} regions`;
    throw new Disagreement(`${file ?? what}: does not agree with ours`);
  }
}

function checked(
  arrangement: Arrangement,
  file: string | undefined,
  options: CrosscheckFlags,
  progress: Progress,
): Promise<CrosscheckReport> {
  const memory = memoryOf(options);
  if (options.faces !== undefined) return checkFaces(arrangement, options.faces, memory, progress);
  if (options.regions !== undefined)
    return checkCount(arrangement, options.regions, memory, progress);
  return options.as === 'facets'
    ? checkFacets(arrangement, file!, memory, progress)
    : checkList(arrangement, file!, options.as, memory, progress);
}

/** `14 24 12`, with blanks or commas between. */
function readCounts(text: string): bigint[] {
  const words = text.split(/[\s,]+/).filter((word) => word !== '');
  if (words.length > 0 && words.every((word) => /^\d+$/.test(word))) return words.map(BigInt);
  throw new InputError(`--faces ${text}: not a list of counts`, 'give them as "14 24 12"');
}

async function checkFacets(
  arrangement: Arrangement,
  file: string,
  memoryBytes: number,
  progress: Progress,
): Promise<CrosscheckReport> {
  const bytes = await readBytes(file);
  const [{ readTheirFacets }, { crosscheckFacetList }, { listFlatsWithin }] = await Promise.all([
    import('../census/crosscheck-facets.js'),
    import('../census/crosscheck.js'),
    import('../census/polynomial.js'),
  ]);
  const theirs = await readTheirFacets(bytes, file, arrangement);
  return crosscheckFacetList(
    arrangement,
    listFlatsWithin(arrangement, memoryBytes, progress),
    theirs,
  );
}

async function checkFaces(
  arrangement: Arrangement,
  faces: readonly bigint[],
  memoryBytes: number,
  progress: Progress,
): Promise<CrosscheckReport> {
  if (faces.length !== arrangement.rank && faces.length !== arrangement.rank + 1) {
    throw new InputError(
      `--faces: ${faces.length} counts, the zonotope has faces of dimension 0 to ${arrangement.rank}`,
      `give ${arrangement.rank} of them, vertices first, or ${arrangement.rank + 1}`,
    );
  }
  const [
    { crosscheckFaces },
    { listFlatsWithin },
    { faceCountsByMoebius },
    { zonotopeFaceCounts },
  ] = await Promise.all([
    import('../census/crosscheck.js'),
    import('../census/polynomial.js'),
    import('../flat/by-moebius.js'),
    import('../zonotope/vertices.js'),
  ]);
  const lattice = listFlatsWithin(arrangement, memoryBytes, progress);
  return crosscheckFaces(zonotopeFaceCounts(faceCountsByMoebius(lattice)), faces);
}

async function checkList(
  arrangement: Arrangement,
  file: string,
  kind: string | undefined,
  memoryBytes: number,
  progress: Progress,
): Promise<CrosscheckReport> {
  const bytes = await readBytes(file);
  const [{ readTheirList }, { crosscheckList }, { listChecked }] = await Promise.all([
    import('../census/crosscheck-read.js'),
    import('../census/crosscheck.js'),
    import('../census/listing.js'),
  ]);
  const found = await readTheirList(bytes, file, arrangement);
  const theirs = {
    ...found,
    vertices: kind === 'signs' ? null : found.vertices,
    signs: kind === 'vertices' ? null : found.signs,
  };
  if (theirs.vertices === null && theirs.signs === null) {
    throw new InputError(`${found.name}: lists no ${kind}`, 'leave --as out to see what it lists');
  }
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
