// `faces`: every face with its dimension and the zonotope face it matches, or the face poset.
import type { Command } from 'commander';
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';
import type { ListFormat } from '../export/regions.js';
import { addGraphOptions, chooseGraph, type GraphFlags, writeGraph } from './graph.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, memoryOf, readWhole } from './options.js';
import { type Destination, writeTo } from './output.js';
import { type Progress, startProgress } from './progress.js';

const listFormats = ['csv', 'ndjson', 'json'];

interface FacesFlags extends GraphFlags {
  readonly dimension?: number;
}

const after = `
A face has a sign for each normal in the order of the file (0 where it lies on
the hyperplane), its dimension above the common subspace, and the face of the
zonotope that it matches: a vertex of it (base) and the generators that span it
(free). The list streams, flat by flat, and holds no table of faces; a graph is
the whole face poset with its covers, lower face first.

Examples:
  signwright faces normals.txt
  signwright faces normals.txt --dimension 1     the rays
  signwright faces normals.txt --graph -o faces.graphml
  signwright faces normals.txt --graph -o nodes.csv --edges edges.csv`;

export function addFaces(program: Command): void {
  const command = program
    .command('faces')
    .description('List every face of the arrangement, or write the face poset as a graph.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, [...listFormats, 'graphml', 'gexf']).option(
    '--dimension <k>',
    'only faces of this dimension above the common subspace',
    readWhole('--dimension', 0),
  );
  addGraphOptions(command, 'the face poset').addHelpText('after', after).action(run);
}

async function run(name: string, options: FacesFlags): Promise<void> {
  const { graph, format } = chooseGraph(options, listFormats);
  const { dimension } = options;
  if (graph && dimension !== undefined) {
    throw new InputError('--dimension does not go with a graph', 'leave one of them out');
  }
  const arrangement = await loadArrangement(name);
  if (dimension !== undefined && dimension > arrangement.rank) {
    throw new InputError(
      `--dimension ${dimension}: the faces have dimensions 0 to ${arrangement.rank}`,
      'give one of them',
    );
  }
  const progress = await startProgress(options.quiet);
  try {
    if (!graph) return await writeList(arrangement, format as ListFormat, options, progress);
    const { buildPosetWithin } = await import('../census/face-listing.js');
    const poset = buildPosetWithin(arrangement, memoryOf(options), progress);
    progress.end();
    const { faceGraph } = await import('../export/graph.js');
    await writeGraph(arrangement, faceGraph(arrangement, poset), format, options);
  } finally {
    progress.end();
  }
}

async function writeList(
  arrangement: Arrangement,
  format: ListFormat,
  options: FacesFlags,
  progress: Progress,
): Promise<void> {
  const [{ faceRows }, { writeFaces }] = await Promise.all([
    import('../census/face-listing.js'),
    import('../export/faces.js'),
  ]);
  const rows = faceRows(arrangement, options.dimension ?? null, memoryOf(options), progress);
  await writeTo(options.out ?? null, (result: Destination) =>
    result.writeAll(writeFaces(arrangement, rows, format)),
  );
}
