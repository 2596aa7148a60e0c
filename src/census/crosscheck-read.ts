// Somebody else's list, read: zonotope vertices as columns of numbers, sign vectors as strings of +
// and -, or both in one table. Any order of rows, header optional, commas, semicolons, tabs or blanks.
import type { Arrangement } from '../arrangement/arrangement.js';
import { setBit, WordTable, wordsFor } from '../bits/signs.js';
import { InputError } from '../errors.js';
import type { ExactNumber } from '../exact/number.js';
import { count } from '../input/list-builder.js';
import { isNumber } from '../input/number-text.js';
import { quoted, SourceText, shownName } from '../input/source.js';
import { PointSet } from './crosscheck-points.js';
import { type Row, TableText } from './crosscheck-table.js';

/** Sign vectors, packed over hyperplanes. */
export interface SignList {
  /** A row a sign vector, of the hyperplanes' first normals. */
  readonly table: WordTable;
  /** Line of each row in the file. */
  readonly lines: readonly number[];
  /** Rows whose signs on two parallel normals contradict each other: the two normals, 0-based. */
  readonly contradictions: ReadonlyMap<number, readonly [number, number]>;
  /** Those rows as they were written, which the packed row cannot tell. */
  readonly texts: ReadonlyMap<number, string>;
}

/** What a file holds; at least one of the two. */
export interface TheirList {
  readonly name: string;
  readonly vertices: PointSet | null;
  readonly signs: SignList | null;
}

const signsPattern = /^[+\-\u22120]*[+\-\u2212][+\-\u22120]*$/;

function isSigns(cell: string): boolean {
  return signsPattern.test(cell) && !isNumber(cell);
}

/** Reads a list to be held against the arrangement. InputError names the line that is wrong. */
export async function readTheirList(
  bytes: Uint8Array,
  name: string,
  arrangement: Arrangement,
): Promise<TheirList> {
  const file = shownName(name);
  if (!bytes.some((byte) => byte > 32)) {
    throw new InputError('the list is empty', 'give a vertex or a sign vector a line', { file });
  }
  const source = new SourceText(bytes, name);
  if (/^\s*(\{|\[\s*[[{])/.test(source.text)) {
    throw new InputError('this is JSON', 'give the list as CSV', { file });
  }
  const reader = new ListReader(new TableText(source), arrangement);
  await reader.read();
  return { name: file, vertices: reader.vertices, signs: reader.signs };
}

class ListReader {
  vertices: PointSet | null = null;
  signs: SignList | null = null;
  private readonly source: TableText;
  private readonly arrangement: Arrangement;
  private width = 0;
  private signsColumn = -1;
  private vertexColumns: readonly number[] = [];
  private radicand: bigint | null;
  private readonly table: WordTable;
  private readonly lines: number[] = [];
  private readonly contradictions = new Map<number, readonly [number, number]>();
  private readonly texts = new Map<number, string>();

  constructor(source: TableText, arrangement: Arrangement) {
    this.source = source;
    this.arrangement = arrangement;
    this.radicand = arrangement.generators.radicand;
    this.table = new WordTable(wordsFor(arrangement.hyperplanes.length));
  }

  async read(): Promise<void> {
    let header: Row | null = null;
    let started = false;
    const take = (row: Row): void => {
      if (!started && header === null) {
        const isHeader = row.cells.every((cell) => !isNumber(cell) && !isSigns(cell));
        if (isHeader) {
          header = row;
          return;
        }
      }
      if (!started) this.chooseColumns(header, row);
      started = true;
      this.takeRow(row);
    };
    await this.source.eachRow(take);
    if (!started)
      throw this.source.fault(1, 0, 'no row follows the header', 'give a vertex or signs a line');
    if (this.signsColumn >= 0) {
      const { table, lines, contradictions, texts } = this;
      this.signs = { table, lines, contradictions, texts };
    }
  }

  /** Settles which columns are signs and which are coordinates, by names and by the first row. */
  private chooseColumns(header: Row | null, first: Row): void {
    const { dimension, generators } = this.arrangement;
    const names = header?.cells ?? null;
    this.width = first.cells.length;
    if (header !== null && header.cells.length !== this.width)
      throw this.source.raggedFault(first, header.cells.length);
    this.signsColumn = names?.indexOf('signs') ?? first.cells.findIndex((cell) => isSigns(cell));
    if (this.signsColumn < 0) this.signsColumn = first.cells.findIndex((cell) => isSigns(cell));
    const where = (test: (name: string, column: number) => boolean): number[] =>
      first.cells.flatMap((_, column) =>
        column !== this.signsColumn && test(names?.[column] ?? '', column) ? [column] : [],
      );
    const ours = where((name) => name.startsWith('vertex_'));
    const named = (generators.coordinates ?? []).map((name) => names?.indexOf(name) ?? -1);
    const numeric = where(
      (name, column) => isNumber(first.cells[column]) && !/^(walls|point_.*)$/.test(name),
    );
    if (ours.length > 0) this.vertexColumns = ours;
    else if (named.length > 0 && !named.includes(-1)) this.vertexColumns = named;
    else if (this.signsColumn < 0 || numeric.length === dimension) this.vertexColumns = numeric;
    const columns = this.vertexColumns.length;
    if (columns !== dimension && (columns > 0 || this.signsColumn < 0)) {
      throw this.source.fault(
        first.line,
        0,
        `${count(columns, 'number')} a row, the arrangement has ${count(dimension, 'coordinate')}`,
        `name the ${dimension} columns of the vertex vertex_1, vertex_2, ... in a header`,
      );
    }
    if (columns > 0) this.vertices = new PointSet(dimension);
  }

  private takeRow(row: Row): void {
    if (row.cells.length !== this.width) throw this.source.raggedFault(row, this.width);
    if (this.signsColumn >= 0) this.takeSigns(row);
    if (this.vertices === null) return;
    const point = this.vertexColumns.map((column) => this.numberIn(row, column));
    this.vertices.add(point, row.line, this.radicand);
  }

  private numberIn(row: Row, column: number): ExactNumber {
    const { value, radicand } = this.source.numberIn(row, column, this.radicand);
    this.radicand = radicand;
    return value;
  }

  private takeSigns(row: Row): void {
    const { hyperplaneOf, orientationOf, hyperplanes } = this.arrangement;
    const text = row.cells[this.signsColumn];
    const n = hyperplaneOf.length;
    const wrong = /[^+\-\u2212]/u.exec(text)?.[0];
    if (wrong !== undefined) {
      const what = `${quoted(wrong)} in the signs ${quoted(text)}`;
      throw this.source.fault(
        row.line,
        this.signsColumn,
        what,
        'a region has + or - for every normal',
      );
    }
    if (text.length !== n) {
      const what = `${text.length} signs, the arrangement has ${n} normals`;
      const remedy = 'give a sign for every normal in the order of its file, parallel ones too';
      throw this.source.fault(row.line, this.signsColumn, what, remedy);
    }
    const { table } = this;
    table.reserve(table.rows + 1);
    const offset = table.rows * table.wordsPerRow;
    const isPositive = (i: number): boolean => (text.charAt(i) === '+') === orientationOf[i] > 0;
    for (let i = 0; i < n; i++) {
      const first = hyperplanes[hyperplaneOf[i]].members[0];
      if (i === first) {
        if (isPositive(i)) setBit(table.words, offset, hyperplaneOf[i]);
      } else if (isPositive(i) !== isPositive(first) && !this.contradictions.has(table.rows)) {
        this.contradictions.set(table.rows, [first, i]);
        this.texts.set(table.rows, text.replaceAll('\u2212', '-'));
      }
    }
    table.rows++;
    this.lines.push(row.line);
  }
}
