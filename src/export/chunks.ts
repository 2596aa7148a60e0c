// Text in chunks: rows are joined into pieces of about 64 kB, so that a list of any length can be
// written with few system calls and never stands in memory as a whole.

/** Characters a chunk holds before it is handed on. */
const chunkLength = 65536;

/** How rows of one kind become text of one format. `row` gets the 0-based position of the row. */
export interface RowWriter<Row> {
  readonly head: string;
  row(row: Row, index: number): string;
  readonly tail: string;
}

/** Joins pieces into chunks of at least 64 kB (the last may be shorter). */
export function* batched(pieces: Iterable<string>): Generator<string> {
  let pending: string[] = [];
  let length = 0;
  for (const piece of pieces) {
    pending.push(piece);
    length += piece.length;
    if (length < chunkLength) continue;
    yield pending.join('');
    pending = [];
    length = 0;
  }
  if (length > 0) yield pending.join('');
}

/** Head, rows and tail as chunks, made only as fast as they are taken. */
export function writeRows<Row>(writer: RowWriter<Row>, rows: Iterable<Row>): Generator<string> {
  return batched(pieces(writer, rows));
}

function* pieces<Row>(writer: RowWriter<Row>, rows: Iterable<Row>): Generator<string> {
  yield writer.head;
  let index = 0;
  for (const row of rows) yield writer.row(row, index++);
  yield writer.tail;
}
