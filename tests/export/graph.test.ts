// Graphs written and read back, by an XML parser, by graphology and by a CSV parser.
import { parse as parseCsv } from 'csv-parse/sync';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { DirectedGraph } from 'graphology';
import gexf from 'graphology-gexf';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { LimitError } from '../../src/errors.js';
import { writeGexf } from '../../src/export/gexf.js';
import type { GraphTable } from '../../src/export/graph.js';
import { faceGraph, flatGraph } from '../../src/export/graph.js';
import { writeGraphJson, writeGraphml, writeGraphTables } from '../../src/export/graph-text.js';
import { cleanText } from '../../src/export/xml.js';
import { arrangementOf, generatorsOf, typeA } from '../support/arrangements.js';
import { slowCovectors, slowLattice, slowPoset } from '../support/slow-poset.js';

/** A graph as plain data, to compare whatever it was read from. */
interface Plain {
  readonly nodes: readonly (readonly [string, Record<string, string>])[];
  readonly edges: readonly string[];
}

const hostile = [
  '</data><script>alert(1)</script>',
  '"quoted" & \'single\'',
  ']]>&amp;&#0;',
  'tab\tline\nreturn\rend',
  '=HYPERLINK("x"),2',
  'nul\u0000bell\u0007lone\ud800\uffff',
  'ζ 浮標 🛟',
];

const named: Arrangement = buildArrangement({
  ...generatorsOf([
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
    [1, 1, 1],
    [-2, -2, -2],
    [1, -1, 0],
    [0, 1, 2],
  ]),
  title: 'a <title> & "more"\u0001',
  labels: hostile,
});

function expected(table: GraphTable, clean: (text: string) => string): Plain {
  const nodes = [...table.nodes()].map((values, i): [string, Record<string, string>] => [
    `${table.prefix}${i + 1}`,
    Object.fromEntries(values.map((value, c) => [table.columns[c].name, clean(`${value}`)])),
  ]);
  const edges: string[] = [];
  for (let i = 0; i < table.nodeCount; i++) {
    for (let c = table.coverOffsets[i]; c < table.coverOffsets[i + 1]; c++) {
      edges.push(`${nodes[i][0]} ${nodes[table.coverTargets[c]][0]}`);
    }
  }
  return { nodes, edges };
}

function plainOf(graph: DirectedGraph): Plain {
  return {
    nodes: graph.mapNodes((key, attributes) => [
      key,
      Object.fromEntries(Object.entries(attributes).map(([name, value]) => [name, `${value}`])),
    ]),
    edges: graph.mapEdges((_, __, source, target) => `${source} ${target}`),
  };
}

// biome-ignore lint/suspicious/noExplicitAny: parsed XML has no type of its own.
type Parsed = any;

function readXml(text: string): Parsed {
  expect(XMLValidator.validate(text)).toBe(true);
  return new XMLParser({
    ignoreAttributes: false,
    attributeNamePrefix: '',
    textNodeName: 'text',
    parseTagValue: false,
    parseAttributeValue: false,
    trimValues: false,
    htmlEntities: true,
    isArray: (name, _path, _leaf, isAttribute) =>
      !isAttribute && ['node', 'edge', 'data', 'key', 'attvalue'].includes(name),
  }).parse(text);
}

function readGraphml(text: string): Plain {
  const { key, graph } = readXml(text).graphml;
  const names = new Map(key.map((k: Parsed) => [k.id, k['attr.name']]));
  return {
    nodes: graph.node.map((node: Parsed) => [
      node.id,
      Object.fromEntries(node.data.map((d: Parsed) => [names.get(d.key), d.text ?? ''])),
    ]),
    edges: graph.edge.map((edge: Parsed) => `${edge.source} ${edge.target}`),
  };
}

function readGexf(text: string): Plain {
  const { graph } = readXml(text).gexf;
  return {
    nodes: graph.nodes.node.map((node: Parsed) => [
      node.id,
      {
        label: node.label,
        ...Object.fromEntries(
          (node.attvalues?.attvalue ?? []).map((value: Parsed) => [value.for, value.value]),
        ),
      },
    ]),
    edges: graph.edges.edge.map((edge: Parsed) => `${edge.source} ${edge.target}`),
  };
}

const arrangements: [string, Arrangement][] = [
  ['the hexagon', arrangementOf(typeA(2))],
  ['hostile labels', named],
  ['one normal', arrangementOf([[3, 0]])],
];

const tables: [string, Arrangement, GraphTable][] = arrangements.flatMap(([name, arrangement]) => [
  [`faces of ${name}`, arrangement, faceGraph(arrangement, slowPoset(arrangement))],
  [`flats of ${name}`, arrangement, flatGraph(arrangement, slowLattice(arrangement))],
]);

describe.each(tables)('%s', (_, arrangement, table) => {
  it('survive GraphML', () => {
    const text = [...writeGraphml(table)].join('');
    expect(readGraphml(text)).toEqual(expected(table, cleanText));
    const { graph } = readXml(text).graphml;
    expect(graph.edgedefault).toBe('directed');
    expect(graph['parse.nodes']).toBe(`${graph.node.length}`);
    expect(graph['parse.edges']).toBe(`${graph.edge.length}`);
    expect(graph.data[0].text).toBe(cleanText(table.title));
  });

  it('survive GEXF, by an XML parser and by graphology', async () => {
    const text = await writeGexf(table);
    const want = expected(table, cleanText);
    // GEXF has no empty values: the flat of no normals lacks that attribute.
    const filled = {
      ...want,
      nodes: want.nodes.map(([id, values]) => [
        id,
        Object.fromEntries(Object.entries(values).filter(([, value]) => value !== '')),
      ]),
    };
    expect(readGexf(text)).toEqual(filled);
    expect(plainOf(gexf.parse(DirectedGraph, text) as DirectedGraph)).toEqual(filled);
    expect(await writeGexf(table)).toBe(text);
  });

  it('survive JSON, by graphology', () => {
    const serialized = JSON.parse([...writeGraphJson(arrangement, table)].join(''));
    const graph = new DirectedGraph();
    graph.import(serialized);
    expect(plainOf(graph)).toEqual(expected(table, (text) => text));
    expect(graph.getAttribute('title')).toBe(table.title);
    expect(graph.getAttribute('input').labels).toEqual(arrangement.generators.labels);
  });

  it('survive CSV tables', () => {
    const { nodes, edges } = writeGraphTables(table);
    const [header, ...rows] = parseCsv([...nodes].join('')) as string[][];
    const guard = (text: string) => (/^[=+\-@]/.test(text) ? `'${text}` : text);
    expect(header).toEqual(['id', ...table.columns.map(({ name }) => name)]);
    // A lone surrogate has no UTF-8.
    const want = expected(table, (text) => Buffer.from(text).toString());
    expect(rows).toEqual(
      want.nodes.map(([id, values]) => [
        id,
        ...table.columns.map(({ name, free }) => (free ? guard(values[name]) : values[name])),
      ]),
    );
    const [edgeHeader, ...pairs] = parseCsv([...edges].join('')) as string[][];
    expect(edgeHeader).toEqual(['source', 'target']);
    expect(pairs.map((pair) => pair.join(' '))).toEqual(want.edges);
  });
});

describe('the face graph', () => {
  it('holds exactly the covers of the order on covectors, lower face first', () => {
    const arrangement = named;
    const table = faceGraph(arrangement, slowPoset(arrangement));
    const signs = [...table.nodes()].map((values) => `${values[1]}`);
    expect(new Set(signs).size).toBe(slowCovectors(arrangement).length);
    const below = (a: string, b: string) =>
      a !== b && [...a].every((s, i) => s === '0' || s === b[i]);
    const want: string[] = [];
    signs.forEach((a, i) => {
      const above = signs.filter((b) => below(a, b));
      for (const b of above) {
        if (!above.some((c) => below(c, b))) want.push(`f${i + 1} f${signs.indexOf(b) + 1}`);
      }
    });
    expect([...readGraphml([...writeGraphml(table)].join('')).edges].sort()).toEqual(want.sort());
  });

  // The zonotope of A3 is the truncated octahedron: 24 vertices, 36 edges, 14 faces (common
  // knowledge since Archimedes; OEIS A000670 gives 75 in all).
  it('of A3 has the faces of the truncated octahedron', () => {
    const arrangement = arrangementOf(typeA(3));
    const nodes = [...faceGraph(arrangement, slowPoset(arrangement)).nodes()];
    const count = (k: number) => nodes.filter((values) => values[3] === k).length;
    expect([0, 1, 2, 3].map(count)).toEqual([24, 36, 14, 1]);
  });
});

describe('a graph too large for GEXF', () => {
  const table: GraphTable = {
    ...faceGraph(named, slowPoset(named)),
    nodeCount: 2_000_000,
    coverOffsets: new Int32Array(2_000_001),
    nodes: () => {
      throw new Error('must refuse before it starts');
    },
  };

  it('is refused with the formats that can take it', async () => {
    await expect(writeGexf(table)).rejects.toThrow(LimitError);
    await expect(writeGexf(table)).rejects.toThrow(/2000000 nodes and edges.*GraphML, JSON or CSV/);
  });

  it('streams in GraphML, chunk by chunk', () => {
    let made = 0;
    const lazy: GraphTable = {
      ...table,
      nodes: function* () {
        for (let i = 0; i < table.nodeCount; i++) {
          made++;
          yield ['+', '+', 0, 1];
        }
      },
    };
    const chunks = writeGraphml(lazy);
    const first = chunks.next().value as string;
    expect(first.length).toBeGreaterThan(60_000);
    expect(first.length).toBeLessThan(70_000);
    expect(made).toBeLessThan(2_000);
    chunks.return(undefined);
  });
});
