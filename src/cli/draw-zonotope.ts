// `draw zonotope` and `draw tiling`.
import type { Command } from 'commander';
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';
import type { ProjectionChoice } from '../zonotope/solid-projection.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, type CommonOptions, chooseFormat } from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const formats = ['svg'];

interface SolidFlags extends CommonOptions {
  readonly view?: readonly number[];
  readonly project?: string;
  readonly region?: string;
  readonly portrait?: boolean;
  readonly title?: string;
}

const afterZonotope = `
Rank 2 is a polygon; rank 3 a solid, its edges behind dashed; more needs
--project. A region's signs are one of + and - for each normal of the file.

Examples:
  signwright draw zonotope normals.txt -o solid.svg
  signwright draw zonotope normals.txt --view=3,-4,2 --region=++-+ -o solid.svg
  signwright draw zonotope rank5.txt --project principal -o shadow.svg`;

const afterTiling = `
One tile for every independent set of normals, each without some of its sides,
so that every point of the zonotope lies in exactly one: solid sides belong to
their tile, dashed ones do not. Rank 3 is drawn as blocks moved apart.

Examples:
  signwright draw tiling normals.txt -o tiles.svg
  signwright draw tiling normals.txt --view=-3,-2,1 -o blocks.svg`;

/** Adds both pictures to the command `draw`. */
export function addDrawZonotope(draw: Command): void {
  const zonotope = picture(draw, 'zonotope', 'Draw the zonotope, a polygon or a solid.');
  zonotope
    .option('--region <signs>', 'mark the vertex of this region (with = before a sign)')
    .addHelpText('after', afterZonotope)
    .action((name: string, options: SolidFlags) =>
      run(name, options, async (arrangement, chosen) => {
        const { drawZonotope } = await import('../picture/zonotope.js');
        const { region } = options;
        return drawZonotope(arrangement, {
          ...chosen,
          ...(region === undefined ? {} : { region }),
        });
      }),
    );
  picture(draw, 'tiling', 'Draw the half-open tiling of the zonotope.')
    .addHelpText('after', afterTiling)
    .action((name: string, options: SolidFlags) =>
      run(name, options, async (arrangement, chosen) => {
        const { drawTiling } = await import('../picture/tiling.js');
        return drawTiling(arrangement, chosen);
      }),
    );
}

function picture(draw: Command, name: string, description: string): Command {
  const command = draw
    .command(name, { hidden: true })
    .description(description)
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  return addCommonOptions(command, formats)
    .option('--view <x,y,z>', 'direction to look from (default: chosen)', readDirection)
    .option('--project <names>', 'two or three coordinates, as 1,2,4 or names, or principal')
    .option('--portrait', 'upright sheet (default: landscape)')
    .option('--title <text>', 'title of the picture (default: that of the file)');
}

/** Three decimals; whether they are a direction, the picture says. */
function readDirection(text: string): number[] {
  const words = text.split(',').map((word) => word.trim());
  if (words.every((word) => /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(word))) {
    return words.map(Number);
  }
  throw new InputError(
    `--view ${text}: not three numbers`,
    'give the direction to look from, as --view=3,-4,2',
  );
}

interface Chosen {
  readonly projection: ProjectionChoice;
  readonly orientation: 'landscape' | 'portrait';
  readonly view?: readonly number[];
  readonly title?: string;
}

async function run(
  name: string,
  options: SolidFlags,
  draw: (arrangement: Arrangement, chosen: Chosen) => Promise<string>,
): Promise<void> {
  chooseFormat(options, formats);
  const arrangement = await loadArrangement(name);
  const progress = await startProgress(options.quiet);
  try {
    const { readProjection } = await import('../zonotope/solid-projection.js');
    progress.stage('drawing');
    const { view, title } = options;
    const svg = await draw(arrangement, {
      projection: readProjection(options.project, arrangement.generators),
      orientation: options.portrait ? 'portrait' : 'landscape',
      ...(view === undefined ? {} : { view }),
      ...(title === undefined ? {} : { title }),
    });
    progress.end();
    await writeTo(options.out ?? null, (result) => result.write(svg));
  } finally {
    progress.end();
  }
}
