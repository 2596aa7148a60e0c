// A table of somebody else's numbers or signs as rows of cells: commas, semicolons, tabs or blanks,
// comments after #, quotes as RFC 4180 has them, and the place of every cell for messages.
import { InputError, type Position } from '../errors.js';
import type { ExactNumber } from '../exact/number.js';
import { differentRoots, NumberFault, parseNumber } from '../input/number-text.js';
import type { SourceText } from '../input/source.js';

/** A row of cells and the line it ends on, 1-based. */
export interface Row {
  readonly cells: readonly string[];
  readonly line: number;
}

export class TableText {
  private readonly source: SourceText;
  private delimiter = ',';

  constructor(source: SourceText) {
    this.source = source;
  }

  /** Calls `take` for each row that is not blank or a comment. */
  async eachRow(take: (row: Row) => void): Promise<void> {
    const { text } = this.source;
    const first = /^\s*(?:#[^\r\n]*\s+)*([^\r\n]*)/.exec(text)![1];
    // A quoted cell may hold line breaks: then the first line alone does not tell.
    const seen = text.includes('"') ? text : first;
    const found = [',', ';', '\t'].find((mark) => seen.includes(mark));
    this.delimiter = found ?? ' ';
    if (found === undefined && !text.includes('"')) {
      let line = 0;
      for (const match of text.matchAll(/([^\r\n]*)(?:\r\n|\r|\n|$)/g)) {
        line++;
        const content = match[1].replace(/#.*/, '').trim();
        if (content !== '') take({ cells: content.split(/\s+/), line });
      }
      return;
    }
    const { parse, CsvError } = await import('csv-parse/sync');
    try {
      parse(text, {
        delimiter: this.delimiter,
        comment: '#',
        comment_no_infix: true,
        relax_column_count: true,
        skip_empty_lines: true,
        trim: true,
        record_delimiter: ['\r\n', '\n', '\r'],
        on_record: (cells: string[], { lines }: { lines: number }) => {
          take({ cells, line: lines });
          return null;
        },
      });
    } catch (error) {
      if (!(error instanceof CsvError)) throw error;
      const line = Number((error as { lines?: number }).lines ?? 1);
      throw this.fault(
        line,
        0,
        'a quote is not closed, or text stands beside a cell in quotes',
        'put the whole cell in quotes, or none of it',
      );
    }
  }

  /** The number in a cell, and the field of the table with it: that given, or its own where null. */
  numberIn(
    row: Row,
    column: number,
    field: bigint | null,
  ): { value: ExactNumber; radicand: bigint | null } {
    try {
      const { value, radicand, rootOffset } = parseNumber(row.cells[column]);
      if (radicand !== null && field !== null && radicand !== field) {
        throw differentRoots(radicand, field, '', rootOffset);
      }
      return { value, radicand: field ?? radicand };
    } catch (fault) {
      if (!(fault instanceof NumberFault)) throw fault;
      throw this.fault(row.line, column, fault.what, fault.remedy);
    }
  }

  raggedFault(row: Row, width: number): InputError {
    const { length } = row.cells;
    const what = `${length} ${length === 1 ? 'cell' : 'cells'}, the first row has ${width}`;
    return this.fault(row.line, 0, what, 'give every row as many');
  }

  /** At a cell of a line; columns are found where no quotes are in the way. */
  fault(line: number, cell: number, what: string, remedy: string): InputError {
    const content = this.source.text.split(/\r\n|\r|\n/, line)[line - 1] ?? '';
    const { name: file } = this.source;
    if (content.includes('"')) return new InputError(what, remedy, { file, line });
    const pattern = this.delimiter === ' ' ? /\s*\S+/g : /[^,;\t]*[,;\t]?/g;
    let column = 0;
    for (let i = 0; i < cell; i++) column += pattern.exec(content)?.[0].length ?? 0;
    column += /^\s*/.exec(content.slice(column))![0].length;
    const position: Position = { file, line, column: column + 1 };
    return new InputError(what, remedy, position);
  }
}
