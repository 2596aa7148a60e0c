// `regions`: the list of regions, or their number by listing.
import type { Command } from 'commander';
import type { ListFormat } from '../export/regions.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, type CommonOptions, chooseFormat, memoryOf } from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const formats = ['csv', 'ndjson', 'json'];
const countFormats = ['text', 'json'];

interface RegionsFlags extends CommonOptions {
  readonly count?: boolean;
}

const after = `
A region has its signs on all normals in the order of the file, its walls as
1-based numbers of normals, an exact integer point inside, and the zonotope
vertex that is best in its directions.

Examples:
  signwright regions normals.txt                 CSV on standard output
  signwright regions normals.csv -o regions.ndjson
  signwright regions normals.txt --count`;

export function addRegions(program: Command): void {
  const command = program
    .command('regions')
    .description('List every region: signs, walls, an interior point, the zonotope vertex.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, formats)
    .option('--count', 'only count them, by listing (text or json)')
    .addHelpText('after', after)
    .action(run);
}

async function run(name: string, options: RegionsFlags): Promise<void> {
  const format = chooseFormat(options, options.count ? countFormats : formats);
  const arrangement = await loadArrangement(name);
  const { listChecked } = await import('../census/listing.js');
  const progress = await startProgress(options.quiet);
  try {
    const table = listChecked(arrangement, memoryOf(options), progress);
    const total = 2 * table.half.rows;
    if (options.count) {
      progress.end();
      const value = { schema: 'signwright/count/1', regions: String(total), route: 'listing' };
      const text = format === 'json' ? JSON.stringify(value) : String(total);
      await writeTo(options.out ?? null, (result) => result.write(`${text}\n`));
      return;
    }
    const [{ regionRows }, { writeRegions }, { formatCount }] = await Promise.all([
      import('../census/region-rows.js'),
      import('../export/regions.js'),
      import('../census/quantities.js'),
    ]);
    progress.stage(`writing ${formatCount(total)} regions`);
    const rows = progress.counted(regionRows(arrangement, table), total);
    await writeTo(options.out ?? null, (result) =>
      result.writeAll(writeRegions(arrangement, rows, format as ListFormat)),
    );
  } finally {
    progress.end();
  }
}
