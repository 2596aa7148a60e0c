// The NPY form, versions 1 to 3: a matrix of integers or floating-point numbers, one normal a row.
// A double is the binary fraction it is. Layout: the format description in NumPy's documentation,
// numpy.lib.format (magic, version, length, a dictionary literal, then the entries).
import { InputError } from '../errors.js';
import { type ExactNumber, exactNumber } from '../exact/number.js';
import type { GeneratorList } from './generators.js';
import { ListBuilder } from './list-builder.js';
import { quoted, sha256, shownName } from './source.js';

interface Layout {
  readonly kind: string;
  readonly size: number;
  readonly littleEndian: boolean;
  readonly byColumns: boolean;
  readonly rows: number;
  readonly columns: number;
  readonly dataOffset: number;
}

/** True where the bytes begin as an NPY file does. */
export function isNpy(bytes: Uint8Array): boolean {
  return String.fromCharCode(...bytes.subarray(0, 6)) === '\u0093NUMPY';
}

/** Reads a list from an NPY file; throws InputError, naming row and column where a number is at fault. */
export function readNpy(bytes: Uint8Array, name: string): GeneratorList {
  const file = shownName(name);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const layout = readLayout(bytes, view, file);
  const { rows, columns, byColumns, size, dataOffset } = layout;
  const builder = new ListBuilder();
  for (let row = 0; row < rows; row += 1) {
    const entries: ExactNumber[] = [];
    for (let column = 0; column < columns; column += 1) {
      const index = byColumns ? column * rows + row : row * columns + column;
      const entry = readEntry(view, dataOffset + index * size, layout);
      if (entry === null) {
        const what = `row ${row + 1}, column ${column + 1} is not a finite number`;
        throw new InputError(what, 'replace NaN and infinities before saving', { file });
      }
      entries.push(entry);
    }
    builder.add({ entries, label: null, range: null, place: () => ({ file, line: row + 1 }) });
  }
  return builder.finish(null, null, { name: file, sha256: sha256(bytes) });
}

function readLayout(bytes: Uint8Array, view: DataView, file: string): Layout {
  const fault = (what: string, remedy: string) => new InputError(what, remedy, { file });
  const again = 'save the matrix again with numpy.save';
  if (!isNpy(bytes) || bytes.length < 12) throw fault('this is not a whole NPY file', again);
  const version = bytes[6]!;
  if (version < 1 || version > 3) throw fault(`NPY version ${version} is not known`, again);
  const start = version === 1 ? 10 : 12;
  const length = version === 1 ? view.getUint16(8, true) : view.getUint32(8, true);
  if (start + length > bytes.length) throw fault('the NPY header is cut short', again);
  const header = new TextDecoder().decode(bytes.subarray(start, start + length));
  const descr = /['"]descr['"]\s*:\s*['"]([^'"]*)['"]/.exec(header)?.[1];
  const order = /['"]fortran_order['"]\s*:\s*(True|False)/.exec(header)?.[1];
  const shapeText = /['"]shape['"]\s*:\s*\(([^)]*)\)/.exec(header)?.[1];
  if (order === undefined || shapeText === undefined) {
    throw fault('the NPY header lacks its order or shape', again);
  }
  const type = /^([<>|=])([iuf])(\d)$/.exec(descr ?? '');
  const size = Number(type?.[3]);
  const kind = type?.[2] ?? '';
  const known = kind === 'f' ? size === 4 || size === 8 : [1, 2, 4, 8].includes(size);
  if (type === null || !known) {
    const what =
      descr === undefined ? 'a table of named columns' : `entries of type ${quoted(descr)}`;
    throw fault(what, "save integers or doubles: matrix.astype('<i8') or '<f8'");
  }
  const shape = shapeText
    .split(',')
    .map((part) => part.trim())
    .filter((part) => part !== '');
  if (shape.length !== 2 || !shape.every((part) => /^\d{1,15}$/.test(part))) {
    throw fault(`an array of shape (${shapeText.trim()})`, 'save a matrix, one normal a row');
  }
  const [rows, columns] = shape.map(Number) as [number, number];
  if (rows === 0 || columns === 0) {
    throw fault(
      `a matrix of ${rows} rows and ${columns} columns`,
      'save a matrix, one normal a row',
    );
  }
  const dataOffset = start + length;
  if (bytes.length - dataOffset !== rows * columns * size) {
    const what = `${bytes.length - dataOffset} bytes of entries where ${rows * columns * size} are needed`;
    throw fault(what, again);
  }
  const byColumns = order === 'True';
  return { kind, size, littleEndian: type[1] !== '>', byColumns, rows, columns, dataOffset };
}

/** Null for NaN and the infinities. */
function readEntry(view: DataView, at: number, layout: Layout): ExactNumber | null {
  const { kind, size, littleEndian } = layout;
  if (kind === 'f') {
    const value =
      size === 4 ? view.getFloat32(at, littleEndian) : view.getFloat64(at, littleEndian);
    return Number.isFinite(value) ? exactDouble(value) : null;
  }
  const signed = kind === 'i';
  if (size === 8) {
    return exactNumber(
      signed ? view.getBigInt64(at, littleEndian) : view.getBigUint64(at, littleEndian),
    );
  }
  if (size === 4) {
    return exactNumber(
      BigInt(signed ? view.getInt32(at, littleEndian) : view.getUint32(at, littleEndian)),
    );
  }
  if (size === 2) {
    return exactNumber(
      BigInt(signed ? view.getInt16(at, littleEndian) : view.getUint16(at, littleEndian)),
    );
  }
  return exactNumber(BigInt(signed ? view.getInt8(at) : view.getUint8(at)));
}

/** A finite double as the fraction it is: doubling is exact and ends, below 2^1075 steps. */
function exactDouble(value: number): ExactNumber {
  let numerator = value;
  let shift = 0n;
  while (!Number.isInteger(numerator)) {
    numerator *= 2;
    shift += 1n;
  }
  return exactNumber(BigInt(numerator), 0n, 1n << shift);
}
