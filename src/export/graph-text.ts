// Graph formats that stream: GraphML, JSON and CSV tables, for graphs of any size.
//   GraphML: U. Brandes, M. Eiglsperger, I. Herman, M. Himsolt, M. S. Marshall, 2002, GraphML
//     Progress Report, Graph Drawing 2001, LNCS 2265.
//   JSON: the serialisation graphology imports.
import type { Arrangement } from '../arrangement/arrangement.js';
import { batched } from './chunks.js';
import { csvField, csvLabel, csvLine } from './fields.js';
import type { GraphTable } from './graph.js';
import { nodeId } from './graph.js';
import { heading } from './heading.js';
import { escapeXml } from './xml.js';

/** The graph as GraphML, in chunks. */
export function writeGraphml(table: GraphTable): Generator<string> {
  return batched(graphml(table));
}

function* graphml(table: GraphTable): Generator<string> {
  const { columns, nodeCount, coverOffsets } = table;
  yield '<?xml version="1.0" encoding="UTF-8"?>\n';
  yield '<graphml xmlns="http://graphml.graphdrawing.org/xmlns" ' +
    'xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" ' +
    'xsi:schemaLocation="http://graphml.graphdrawing.org/xmlns ' +
    'http://graphml.graphdrawing.org/xmlns/1.0/graphml.xsd">\n';
  yield '  <key id="title" for="graph" attr.name="title" attr.type="string"/>\n';
  for (const { name, type } of columns) {
    const xmlType = type === 'integer' ? 'int' : 'string';
    yield `  <key id="${name}" for="node" attr.name="${name}" attr.type="${xmlType}"/>\n`;
  }
  yield `  <graph id="G" edgedefault="directed" parse.nodeids="free" parse.edgeids="free" parse.order="nodesfirst" parse.nodes="${nodeCount}" parse.edges="${coverOffsets[nodeCount]}">\n`;
  yield `    <desc>${escapeXml(table.description)}</desc>\n`;
  yield `    <data key="title">${escapeXml(table.title)}</data>\n`;
  let i = 0;
  for (const values of table.nodes()) {
    const data = values.map((value, c) => {
      const text = typeof value === 'number' ? `${value}` : escapeXml(value);
      return `<data key="${columns[c].name}">${text}</data>`;
    });
    yield `    <node id="${nodeId(table, i++)}">${data.join('')}</node>\n`;
  }
  for (const [number, source, target] of covers(table)) {
    yield `    <edge id="c${number}" source="${source}" target="${target}"/>\n`;
  }
  yield '  </graph>\n</graphml>\n';
}

/** The graph as JSON that graphology imports, in chunks; the arrangement is a graph attribute. */
export function writeGraphJson(arrangement: Arrangement, table: GraphTable): Generator<string> {
  return batched(graphJson(arrangement, table));
}

function* graphJson(arrangement: Arrangement, table: GraphTable): Generator<string> {
  const { title, description, columns } = table;
  const attributes = { title, description, ...heading(arrangement) };
  yield `{\n  "options": {"type":"directed","multi":false,"allowSelfLoops":false},\n`;
  yield `  "attributes": ${JSON.stringify(attributes)},\n  "nodes": [`;
  let i = 0;
  for (const values of table.nodes()) {
    const separator = i === 0 ? '\n' : ',\n';
    const own = Object.fromEntries(values.map((value, c) => [columns[c].name, value]));
    yield `${separator}    ${JSON.stringify({ key: nodeId(table, i++), attributes: own })}`;
  }
  yield '\n  ],\n  "edges": [';
  for (const [number, source, target] of covers(table)) {
    yield `${number === 1 ? '\n' : ',\n'}    {"key":"c${number}","source":"${source}","target":"${target}"}`;
  }
  yield '\n  ]\n}\n';
}

/** The graph as two CSV tables in chunks: `id` and the columns of the nodes; `source,target`. */
export function writeGraphTables(table: GraphTable): {
  readonly nodes: Generator<string>;
  readonly edges: Generator<string>;
} {
  return { nodes: batched(nodeLines(table)), edges: batched(edgeLines(table)) };
}

function* nodeLines(table: GraphTable): Generator<string> {
  const { columns } = table;
  yield csvLine(['id', ...columns.map((column) => column.name)]);
  let i = 0;
  for (const values of table.nodes()) {
    const fields = values.map((value, c) =>
      columns[c].free === true ? csvLabel(`${value}`) : csvField(`${value}`),
    );
    yield csvLine([nodeId(table, i++), ...fields]);
  }
}

function* edgeLines(table: GraphTable): Generator<string> {
  yield csvLine(['source', 'target']);
  for (const [, source, target] of covers(table)) yield csvLine([source, target]);
}

/** Each cover with its 1-based number: the lower node, then the one that covers it. */
function* covers(table: GraphTable): Generator<[number, string, string]> {
  const { nodeCount, coverOffsets, coverTargets } = table;
  for (let i = 0; i < nodeCount; i++) {
    const source = nodeId(table, i);
    for (let c = coverOffsets[i]; c < coverOffsets[i + 1]; c++) {
      yield [c + 1, source, nodeId(table, coverTargets[c])];
    }
  }
}
