// Face posets and flats as graphs: the options they share, and the writing of each format.
import type { Command } from 'commander';
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';
import type { GraphTable } from '../export/graph.js';
import { type CommonOptions, chooseFormat } from './options.js';
import { writeTo } from './output.js';

export interface GraphFlags extends CommonOptions {
  readonly graph?: boolean;
  readonly edges?: string;
}

const graphFormats = ['json', 'csv', 'graphml', 'gexf'];
const graphOnly = ['graphml', 'gexf'];

/** Adds --graph and --edges. */
export function addGraphOptions(command: Command, what: string): Command {
  return command
    .option('--graph', `${what} as a graph: ${graphFormats.join(', ')}`)
    .option('--edges <file>', 'the edges of a graph in CSV; the nodes go to --out');
}

/** Whether a graph is asked for (GraphML and GEXF say so by themselves), and in which format. */
export function chooseGraph(
  options: GraphFlags,
  listFormats: readonly string[],
): { readonly graph: boolean; readonly format: string } {
  const graphAsked = options.graph === true || options.edges !== undefined;
  const bothKinds = [...listFormats, ...graphOnly];
  // --edges alone speaks of CSV.
  const preferred = options.edges === undefined ? graphFormats : ['csv', 'json', 'graphml', 'gexf'];
  const format = chooseFormat(options, graphAsked ? preferred : bothKinds);
  const graph = graphAsked || graphOnly.includes(format);
  if (graph && format === 'csv' && options.edges === undefined) {
    throw new InputError(
      'a graph in CSV is two tables',
      'name the file of the second with --edges FILE; the nodes go to --out or standard output',
    );
  }
  if (options.edges !== undefined && format !== 'csv') {
    throw new InputError(`--edges is for graphs in CSV, not ${format}`, 'leave it out');
  }
  return { graph, format };
}

/** Writes the graph, streamed but for GEXF. */
export async function writeGraph(
  arrangement: Arrangement,
  table: GraphTable,
  format: string,
  options: GraphFlags,
): Promise<void> {
  const out = options.out ?? null;
  if (format === 'gexf') {
    const { writeGexf } = await import('../export/gexf.js');
    const text = await writeGexf(table);
    return writeTo(out, (result) => result.write(text));
  }
  const { writeGraphJson, writeGraphml, writeGraphTables } = await import(
    '../export/graph-text.js'
  );
  if (format === 'graphml') return writeTo(out, (result) => result.writeAll(writeGraphml(table)));
  if (format === 'json') {
    return writeTo(out, (result) => result.writeAll(writeGraphJson(arrangement, table)));
  }
  const { nodes, edges } = writeGraphTables(table);
  await writeTo(options.edges!, (result) => result.writeAll(edges));
  await writeTo(out, (result) => result.writeAll(nodes));
}
