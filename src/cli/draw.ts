// `draw`: pictures as SVG.
import type { Command } from 'commander';
import { InputError } from '../errors.js';
import type { HassePart } from '../picture/selection.js';
import { addDrawZonotope } from './draw-zonotope.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, type CommonOptions, chooseFormat, memoryOf } from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const formats = ['svg'];

interface HasseFlags extends CommonOptions {
  readonly above?: string;
  readonly below?: string;
  readonly regionsAndWalls?: boolean;
  readonly summary?: boolean;
  readonly portrait?: boolean;
  readonly title?: string;
}

const afterDraw = `
Pictures:
  hasse ARRANGEMENT     the face poset by dimension, lower faces below
  zonotope ARRANGEMENT  the zonotope, a polygon or a solid, edges by normal
  tiling ARRANGEMENT    its half-open tiling, blocks moved apart in space

Examples:
  signwright draw hasse normals.txt -o faces.svg
  signwright draw zonotope normals.txt -o solid.svg
  signwright draw tiling --help`;

const afterHasse = `
Signs begin with a sign, so they are given with =, as --above=+0-. Past what can
be read the picture is a summary by type, and says so.

Examples:
  signwright draw hasse normals.txt -o faces.svg
  signwright draw hasse normals.txt --below=+-+ -o region.svg
  signwright draw hasse normals.txt --regions-and-walls -o walls.svg`;

export function addDraw(program: Command): void {
  const draw = program
    .command('draw')
    .description('Draw a picture as SVG.')
    .usage('PICTURE ARRANGEMENT [options]')
    .helpCommand(false)
    .addHelpText('after', afterDraw);
  const hasse = draw
    .command('hasse', { hidden: true })
    .description('Draw the Hasse diagram of the face poset, by dimension.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(hasse, formats)
    .option('--above <signs>', 'only this face and those it bounds')
    .option('--below <signs>', 'only this face and those that bound it')
    .option('--regions-and-walls', 'only the two highest dimensions')
    .option('--summary', 'the summary by type, whatever the size')
    .option('--portrait', 'upright sheet (default: landscape)')
    .option('--title <text>', 'title of the picture (default: that of the file)')
    .addHelpText('after', afterHasse)
    .action(run);
  addDrawZonotope(draw);
}

function partOf(options: HasseFlags): HassePart {
  const { above, below, regionsAndWalls } = options;
  if ([above, below, regionsAndWalls].filter((part) => part !== undefined).length > 1) {
    throw new InputError(
      '--above, --below and --regions-and-walls each choose a part of the picture',
      'give one of them',
    );
  }
  if (above !== undefined) return { kind: 'above', signs: above };
  if (below !== undefined) return { kind: 'below', signs: below };
  return { kind: regionsAndWalls ? 'regions-and-walls' : 'whole' };
}

async function run(name: string, options: HasseFlags): Promise<void> {
  chooseFormat(options, formats);
  const part = partOf(options);
  const arrangement = await loadArrangement(name);
  const progress = await startProgress(options.quiet);
  try {
    const { buildPosetWithin } = await import('../census/face-listing.js');
    const poset = buildPosetWithin(arrangement, memoryOf(options), progress);
    progress.stage('drawing');
    const { drawHasse } = await import('../picture/hasse.js');
    const svg = drawHasse(arrangement, poset, {
      part,
      orientation: options.portrait ? 'portrait' : 'landscape',
      ...(options.summary === undefined ? {} : { summary: options.summary }),
      ...(options.title === undefined ? {} : { title: options.title }),
    });
    progress.end();
    await writeTo(options.out ?? null, (result) => result.write(svg));
  } finally {
    progress.end();
  }
}
