// `flats`: the intersection lattice, as a list or a graph.
import type { Command } from 'commander';
import type { ListFormat } from '../export/regions.js';
import { addGraphOptions, chooseGraph, type GraphFlags, writeGraph } from './graph.js';
import { loadArrangement } from './load.js';
import { addCommonOptions, memoryOf } from './options.js';
import { writeTo } from './output.js';
import { startProgress } from './progress.js';

const listFormats = ['csv', 'ndjson', 'json'];

const after = `
A flat is an intersection of hyperplanes: its rank (codimension), its dimension
above the common subspace, the normals that vanish on it, its Moebius value.
An edge of the graph runs from a flat to one a rank higher, inside it.

Examples:
  signwright flats normals.txt
  signwright flats normals.txt --graph -o flats.graphml
  signwright flats normals.txt --graph -o nodes.csv --edges edges.csv`;

export function addFlats(program: Command): void {
  const command = program
    .command('flats')
    .description('List the flats with rank and Moebius value, or write their lattice as a graph.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, [...listFormats, 'graphml', 'gexf']);
  addGraphOptions(command, 'the lattice').addHelpText('after', after).action(run);
}

async function run(name: string, options: GraphFlags): Promise<void> {
  const { graph, format } = chooseGraph(options, listFormats);
  const arrangement = await loadArrangement(name);
  const { listFlatsWithin } = await import('../census/polynomial.js');
  const progress = await startProgress(options.quiet);
  try {
    const lattice = listFlatsWithin(arrangement, memoryOf(options), progress);
    progress.end();
    if (graph) {
      const { flatGraph } = await import('../export/graph.js');
      await writeGraph(arrangement, flatGraph(arrangement, lattice), format, options);
      return;
    }
    const { writeFlats } = await import('../export/flats.js');
    await writeTo(options.out ?? null, (result) =>
      result.writeAll(writeFlats(arrangement, lattice, format as ListFormat)),
    );
  } finally {
    progress.end();
  }
}
