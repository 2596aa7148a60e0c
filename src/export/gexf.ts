// GEXF, through graphology, which holds the whole graph as objects: hence a bound.
import { LimitError } from '../errors.js';
import { gexfElements } from '../limits.js';
import type { GraphTable } from './graph.js';
import { nodeId } from './graph.js';
import { cleanText } from './xml.js';

/** The graph as one GEXF 1.2 document; LimitError above `gexfElements`. */
export async function writeGexf(table: GraphTable): Promise<string> {
  const { nodeCount, columns, coverOffsets, coverTargets } = table;
  const elements = nodeCount + coverOffsets[nodeCount];
  if (elements > gexfElements) {
    throw new LimitError(
      'GEXF is written from memory',
      `${elements} nodes and edges`,
      `${gexfElements} nodes and edges`,
      'use GraphML, JSON or CSV, which are written in a stream at any size',
    );
  }
  const [{ DirectedGraph }, gexf] = await Promise.all([
    import('graphology'),
    import('graphology-gexf'),
  ]);
  const graph = new DirectedGraph({ allowSelfLoops: false });
  graph.replaceAttributes({
    title: cleanText(table.title),
    description: cleanText(table.description),
  });
  let i = 0;
  for (const values of table.nodes()) {
    const attributes = values.map((value, c) => [
      columns[c].name,
      typeof value === 'number' ? value : cleanText(value),
    ]);
    graph.addNode(nodeId(table, i++), Object.fromEntries(attributes));
  }
  for (let source = 0; source < nodeCount; source++) {
    for (let c = coverOffsets[source]; c < coverOffsets[source + 1]; c++) {
      // Named edges: graphology's own names differ from run to run.
      graph.addEdgeWithKey(`c${c + 1}`, nodeId(table, source), nodeId(table, coverTargets[c]));
    }
  }
  return `${gexf.write(graph)}\n`;
}
