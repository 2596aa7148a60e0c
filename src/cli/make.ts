// `make`: the normals of a standard family, as an arrangement file.
import type { Command } from 'commander';
import { InputError } from '../errors.js';
import type { GeneratorList } from '../input/generators.js';
import { readBytes } from './load.js';
import {
  acceptedOption,
  chooseFormat,
  either,
  readInteger,
  readMemory,
  readThreads,
  readWhole,
} from './options.js';
import { writeTo } from './output.js';

const formats = ['text', 'csv', 'json'];

interface MakeFlags {
  readonly out?: string;
  readonly format?: string;
  readonly json?: boolean;
}

const after = `
Families:
  reflection TYPE                     reflection arrangement; see TYPE below
  all-subsets D                       the nonzero 0/1 vectors in R^D
  threshold N                         the vectors (1, x), x in {0,1}^N
  graph FILE                          e_i-e_j for each edge; FILE lists two
                                      names a line
  graph --complete N | --cycle N | --grid AxB
  generic --rank R --normals N        every R normals independent
  random --rank R --normals N --bound B --seed S
                                      integers from -B to B
  polar-zonohedron N                  N rational points of a circle, on a cone
  comparisons FILE                    a CSV of scored options; a normal for each
                                      pair, where the two tie

TYPE, and the coordinates its normals are written in:
  A1, A2, ...      e_i-e_j, in n+1 coordinates
  B1, B2, ...      e_i and e_i+-e_j, in n coordinates
  C1, C2, ...      2e_i and e_i+-e_j, in n coordinates
  D2, D3, ...      e_i+-e_j, in n coordinates
  E6, E7, E8, F4, G2, H3, H4, and I2(m) for m = 3, 4, 5, 6, 8, 10, 12
                   coordinates of the simple roots (H3, H4 over Q(sqrt(5)), some
                   I2(m) over Q(sqrt(2)) or Q(sqrt(3)) or Q(sqrt(5)))

Examples:
  signwright make reflection E6 -o e6.txt
  signwright make graph --grid 3x4 | signwright polynomial -
  signwright make random --rank 4 --normals 20 --bound 9 --seed 1 --json`;

export function addMake(program: Command): void {
  const make = program
    .command('make')
    .description('Write the normals of a standard family.')
    .usage('FAMILY [parameters] [options]')
    .helpCommand(false)
    .addHelpText('after', after);
  const seed = '--seed <n>';
  const family = (usage: string, summary: string): Command => {
    const command = make
      .command(usage, { hidden: true })
      .description(summary)
      .option('-o, --out <file>', 'write to a file; its ending picks the format')
      .option('--format <name>', `${either(formats)} (default: text)`)
      .option('--json', 'the same as --format json')
      .addOption(acceptedOption('--threads <n>').argParser(readThreads))
      .addOption(acceptedOption('--memory <size>').argParser(readMemory))
      .addOption(acceptedOption('-q, --quiet'));
    if (usage === 'random')
      return command.option(seed, 'an integer (default: 1)', readInteger('--seed'));
    return command.addOption(acceptedOption(seed).argParser(readInteger('--seed')));
  };

  family('reflection <type>', 'Reflection arrangement of a type, as A4, B3, E7, H4 or I2(8).')
    .addHelpText('after', after.slice(after.indexOf('\nTYPE'), after.indexOf('\n\nExamples')))
    .action(async (type: string, flags: MakeFlags) => {
      const { reflectionArrangement } = await import('../input/families/reflection.js');
      await write(reflectionArrangement(type), flags);
    });
  family('all-subsets <dimension>', 'The nonzero 0/1 vectors in R^dimension.').action(
    async (dimension: string, flags: MakeFlags) => {
      const { allSubsets } = await import('../input/families/subsets.js');
      await write(allSubsets(readWhole('dimension', 1)(dimension)), flags);
    },
  );
  family(
    'threshold <inputs>',
    'The vectors (1, x) for all 0/1 vectors x of that many inputs.',
  ).action(async (inputs: string, flags: MakeFlags) => {
    const { thresholdNormals } = await import('../input/families/subsets.js');
    await write(thresholdNormals(readWhole('inputs', 0)(inputs)), flags);
  });
  family('graph [file]', 'A normal e_i-e_j for each edge of a graph; FILE lists two names a line.')
    .option('--complete <n>', 'all edges among n vertices', readWhole('--complete', 2))
    .option('--cycle <n>', 'a cycle of n vertices', readWhole('--cycle', 3))
    .option('--grid <AxB>', 'a grid of A by B vertices')
    .action(makeGraph);
  family('generic', 'Normals of which every RANK are independent.')
    .requiredOption('--rank <r>', 'rank, and number of coordinates', readWhole('--rank', 1))
    .requiredOption('--normals <n>', 'how many', readWhole('--normals', 1))
    .action(async (flags: MakeFlags & { rank: number; normals: number }) => {
      const { genericNormals } = await import('../input/families/generic.js');
      await write(genericNormals(flags.rank, flags.normals), flags);
    });
  family('random', 'Random integer normals; the same for the same seed.')
    .requiredOption('--rank <r>', 'rank, and number of coordinates', readWhole('--rank', 1))
    .requiredOption('--normals <n>', 'how many', readWhole('--normals', 1))
    .requiredOption('--bound <b>', 'entries run from -b to b', readInteger('--bound'))
    .action(makeRandom);
  family('polar-zonohedron <zones>', 'Rational points of a circle, on a cone.').action(
    async (zones: string, flags: MakeFlags) => {
      const { polarZonohedron } = await import('../input/families/polar.js');
      await write(polarZonohedron(readWhole('zones', 3)(zones)), flags);
    },
  );
  family(
    'comparisons <file>',
    'A CSV of scored options; a normal for each pair, where the two tie.',
  )
    .addHelpText(
      'after',
      '\nThe first column, named option, names the options; each other column is a\n' +
        'criterion. Regions are the rankings that some weighting can produce; that is\n' +
        'geometry of the scores given, not a rating of the offers.',
    )
    .action(async (file: string, flags: MakeFlags) => {
      const bytes = await readBytes(file);
      const { compareOptions } = await import('../input/families/comparisons.js');
      await write(await compareOptions(bytes, file), flags);
    });
}

interface GraphFlags extends MakeFlags {
  readonly complete?: number;
  readonly cycle?: number;
  readonly grid?: string;
}

async function makeGraph(file: string | undefined, flags: GraphFlags): Promise<void> {
  const { complete, cycle, grid } = flags;
  const ways = [file, complete, cycle, grid].filter((way) => way !== undefined);
  if (ways.length !== 1) {
    const what = ways.length === 0 ? 'no graph is given' : 'more than one graph is given';
    throw new InputError(
      `make graph: ${what}`,
      'give a FILE, --complete N, --cycle N or --grid AxB',
    );
  }
  const graphs = await import('../input/families/graph.js');
  if (complete !== undefined) return write(graphs.completeGraph(complete), flags);
  if (cycle !== undefined) return write(graphs.cycleGraph(cycle), flags);
  if (grid !== undefined) {
    const sides = /^(\d+)x(\d+)$/i.exec(grid);
    if (sides === null) throw new InputError(`--grid ${grid}: not two numbers`, 'write it as 3x4');
    return write(graphs.gridGraph(Number(sides[1]), Number(sides[2])), flags);
  }
  return write(graphs.readGraph(await readBytes(file!), file!), flags);
}

interface RandomFlags extends MakeFlags {
  readonly rank: number;
  readonly normals: number;
  readonly bound: bigint;
  readonly seed?: bigint;
}

async function makeRandom(flags: RandomFlags): Promise<void> {
  const { randomNormals } = await import('../input/families/random.js');
  const { rank, normals: count, bound, seed = 1n } = flags;
  await write(randomNormals({ rank, count, bound, seed }), flags);
}

async function write(list: GeneratorList, flags: MakeFlags): Promise<void> {
  const format = chooseFormat(flags, formats);
  const { formatCsv, formatJson, formatPlain, formatText } = await import('../input/format.js');
  // Without a word on the form, what is written can always be read on the other side of the pipe.
  const unasked = flags.format === undefined && (flags.out === undefined || flags.out === '-');
  const written = { text: unasked ? formatPlain : formatText, csv: formatCsv, json: formatJson };
  const text = written[format as keyof typeof written](list);
  await writeTo(flags.out ?? null, (result) => result.write(text));
}
