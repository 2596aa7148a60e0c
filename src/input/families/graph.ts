// Graphic arrangements: a normal e_i - e_j for each edge ij, a coordinate for each vertex.
import { InputError } from '../../errors.js';
import type { GeneratorList } from '../generators.js';
import { cleanName } from '../list-builder.js';
import { quoted, SourceText } from '../source.js';
import { requireRoom, requireWhole, wholeList } from './family.js';

type Edge = readonly [string, string];

/**
 * An edge list: two names of vertices a line, separated by blanks or a comma; `#` starts a comment.
 * Repeated edges are parallel generators. Throws InputError, for loops too.
 */
export function readGraph(bytes: Uint8Array, name: string): GeneratorList {
  const source = new SourceText(bytes, name);
  const edges: Edge[] = [];
  for (const match of source.text.matchAll(/[^\r\n]+/g)) {
    const line = match[0].replace(/#.*/, '');
    const words = [...line.matchAll(/[^\s,]+/g)];
    if (words.length === 0) continue;
    const fault = (word: number, what: string, remedy: string) =>
      source.fault(match.index + words[word]!.index, what, remedy);
    const [from, to] = words.map((word, i) =>
      cleanName(word[0], () => source.place(match.index + words[i]!.index)),
    );
    if (words.length !== 2 || !from || !to) {
      const what = `an edge with ${words.length === 1 ? 'one vertex' : `${words.length} words`}`;
      throw fault(Math.min(2, words.length - 1), what, 'write two names of vertices a line');
    }
    if (from === to) {
      throw fault(1, `a loop at ${quoted(from)}`, 'remove it: it has no hyperplane');
    }
    edges.push([from, to]);
  }
  if (edges.length === 0) {
    const remedy = 'write two names of vertices a line';
    throw new InputError('there is no edge', remedy, { file: source.name });
  }
  const { name: shown, sha256 } = source;
  return { ...graphic(`Graph ${shown}`, edges), source: { name: shown, sha256 } };
}

/** All edges among n >= 2 vertices: also the reflection arrangement A_(n-1). */
export function completeGraph(n: number): GeneratorList {
  requireWhole('the number of vertices', n, 2);
  const title = `Complete graph on ${n} vertices`;
  requireRoom(title, (n * (n - 1)) / 2, n);
  const edges: Edge[] = [];
  for (let i = 1; i <= n; i += 1) {
    for (let j = i + 1; j <= n; j += 1) edges.push([`v${i}`, `v${j}`]);
  }
  return graphic(title, edges);
}

/** The cycle of n >= 3 vertices. */
export function cycleGraph(n: number): GeneratorList {
  requireWhole('the number of vertices', n, 3);
  const title = `Cycle of ${n} vertices`;
  requireRoom(title, n, n);
  const vertex = (i: number) => `v${(i % n) + 1}`;
  return graphic(
    title,
    Array.from({ length: n }, (_, i) => [vertex(i), vertex(i + 1)]),
  );
}

/** The grid of `rows` by `columns` vertices, two or more in all. */
export function gridGraph(rows: number, columns: number): GeneratorList {
  requireWhole('the number of rows', rows, 1);
  requireWhole('the number of columns', columns, rows === 1 ? 2 : 1);
  const title = `Grid of ${rows} by ${columns} vertices`;
  requireRoom(title, 2 * rows * columns - rows - columns, rows * columns);
  const edges: Edge[] = [];
  for (let r = 1; r <= rows; r += 1) {
    for (let c = 1; c <= columns; c += 1) {
      if (c < columns) edges.push([`r${r}c${c}`, `r${r}c${c + 1}`]);
      if (r < rows) edges.push([`r${r}c${c}`, `r${r + 1}c${c}`]);
    }
  }
  return graphic(title, edges);
}

/** Vertices in the order in which the edges name them first. */
function graphic(title: string, edges: readonly Edge[]): GeneratorList {
  const vertices = [...new Set(edges.flat())];
  requireRoom(title, edges.length, vertices.length);
  const indexOf = new Map(vertices.map((vertex, i) => [vertex, i]));
  const used = new Set<string>();
  const labels = edges.map(([from, to]) => {
    let label = `${from}-${to}`;
    for (let copy = 2; used.has(label); copy += 1) label = `${from}-${to} (${copy})`;
    used.add(label);
    return label;
  });
  const rows = edges.map(([from, to]) => {
    const row = new Array<number>(vertices.length).fill(0);
    row[indexOf.get(from)!] = 1;
    row[indexOf.get(to)!] = -1;
    return row;
  });
  return wholeList(title, rows, { coordinates: vertices, labels });
}
