// Vertices, edges, facets and tiles of the zonotope as CSV, NDJSON and JSON; rows stream past.
import type { Arrangement } from '../arrangement/arrangement.js';
import type { FacetVertexRow } from '../census/facet-rows.js';
import type { EdgeRow, VertexRow } from '../census/zonotope-rows.js';
import type { ExactNumber } from '../exact/number.js';
import type { Tile } from '../zonotope/tiling.js';
import { type RowWriter, writeRows } from './chunks.js';
import { coordinateColumns, csvLine, csvNumber, jsonInteger, jsonNumber } from './fields.js';
import { jsonListEnd, jsonListRow, jsonListStart } from './heading.js';
import type { ListFormat } from './regions.js';

/** A column group of a list: its names in CSV, its fields there, and its value in JSON. */
interface Part<Row> {
  readonly key: string;
  readonly columns: readonly string[];
  csv(row: Row): string;
  json(row: Row): unknown;
}

class Parts<Row> {
  private readonly arrangement: Arrangement;
  private readonly radicand: bigint | null;
  readonly parts: Part<Row>[] = [];

  constructor(arrangement: Arrangement) {
    this.arrangement = arrangement;
    this.radicand = arrangement.generators.radicand;
  }

  word(key: string, of: (row: Row) => string): this {
    this.parts.push({ key, columns: [key], csv: of, json: of });
    return this;
  }

  /** Whole numbers or words, separated by blanks in CSV. */
  list(key: string, of: (row: Row) => readonly (number | string)[]): this {
    this.parts.push({ key, columns: [key], csv: (row) => of(row).join(' '), json: of });
    return this;
  }

  integer(key: string, of: (row: Row) => bigint): this {
    this.parts.push({
      key,
      columns: [key],
      csv: (row) => String(of(row)),
      json: (row) => jsonInteger(of(row)),
    });
    return this;
  }

  number(key: string, of: (row: Row) => ExactNumber): this {
    this.parts.push({
      key,
      columns: [key],
      csv: (row) => csvNumber(of(row), this.radicand),
      json: (row) => jsonNumber(of(row), this.radicand),
    });
    return this;
  }

  vector(key: string, of: (row: Row) => readonly ExactNumber[]): this {
    const { dimension, generators } = this.arrangement;
    this.parts.push({
      key,
      columns: coordinateColumns(key, dimension, generators.coordinates),
      csv: (row) =>
        of(row)
          .map((x) => csvNumber(x, this.radicand))
          .join(','),
      json: (row) => of(row).map((x) => jsonNumber(x, this.radicand)),
    });
    return this;
  }

  writer(format: ListFormat, kind: string): RowWriter<Row> {
    const { parts } = this;
    if (format === 'csv') {
      return {
        head: csvLine(parts.flatMap(({ columns }) => columns)),
        row: (row) => `${parts.map((part) => part.csv(row)).join(',')}\n`,
        tail: '',
      };
    }
    const record = (row: Row) =>
      Object.fromEntries(parts.map((part) => [part.key, part.json(row)]));
    if (format === 'ndjson') {
      return { head: '', row: (row) => `${JSON.stringify(record(row))}\n`, tail: '' };
    }
    return {
      head: jsonListStart(`signwright/${kind}/1`, this.arrangement, kind),
      row: (row, index) => jsonListRow(record(row), index),
      tail: jsonListEnd,
    };
  }
}

/** CSV columns `signs,vertex_*`. */
export function writeVertices(
  arrangement: Arrangement,
  rows: Iterable<VertexRow>,
  format: ListFormat,
): Generator<string> {
  const parts = new Parts<VertexRow>(arrangement)
    .word('signs', ({ signs }) => signs)
    .vector('vertex', ({ vertex }) => vertex);
  return writeRows(parts.writer(format, 'vertices'), rows);
}

/** CSV columns `signs,generators,from_*,to_*`. */
export function writeEdges(
  arrangement: Arrangement,
  rows: Iterable<EdgeRow>,
  format: ListFormat,
): Generator<string> {
  const parts = new Parts<EdgeRow>(arrangement)
    .word('signs', ({ signs }) => signs)
    .list('generators', ({ generators }) => generators)
    .vector('from', ({ from }) => from)
    .vector('to', ({ to }) => to);
  return writeRows(parts.writer(format, 'edges'), rows);
}

/** CSV columns `signs,normal_*,offset,generators,vertices`, and `vertex_rows` where asked. */
export function writeFacets(
  arrangement: Arrangement,
  rows: Iterable<FacetVertexRow>,
  format: ListFormat,
  withVertices: boolean,
): Generator<string> {
  const parts = new Parts<FacetVertexRow>(arrangement)
    .word('signs', ({ signs }) => signs)
    .vector('normal', ({ normal }) => normal)
    .number('offset', ({ offset }) => offset)
    .list('generators', ({ generators }) => generators)
    .integer('vertices', ({ vertices }) => vertices);
  if (withVertices) parts.list('vertex_rows', ({ vertexRows }) => vertexRows!);
  return writeRows(parts.writer(format, 'facets'), rows);
}

/** CSV columns `generators,open,raised,shift_*`. */
export function writeTiles(
  arrangement: Arrangement,
  rows: Iterable<Tile>,
  format: ListFormat,
): Generator<string> {
  const numbers = (indices: readonly number[]): number[] => indices.map((j) => j + 1);
  const parts = new Parts<Tile>(arrangement)
    .list('generators', ({ generators }) => numbers(generators))
    .list('open', ({ open }) => open)
    .list('raised', ({ raised }) => numbers(raised))
    .vector('shift', ({ shift }) => shift);
  return writeRows(parts.writer(format, 'tiles'), rows);
}
