// Any arrangement file to a GeneratorList: the form by the ending of the name, or by a look at the
// contents where the name does not tell (standard input above all).
import { InputError } from '../errors.js';
import type { GeneratorList } from './generators.js';
import { isNumber } from './number-text.js';
import { isNpy, readNpy } from './read-npy.js';
import { readText } from './read-text.js';
import { SourceText } from './source.js';

/** The forms an arrangement file can have. */
export type InputFormat = 'text' | 'csv' | 'json' | 'npy';

/**
 * Reads normals with labels and ranges. `name` is shown in messages (`-` as `standard input`), and
 * its ending tells the form where `format` is not given. Throws InputError.
 */
export async function readGenerators(
  bytes: Uint8Array,
  name: string,
  format?: InputFormat,
): Promise<GeneratorList> {
  const given = format ?? formatOfName(name);
  if (given === 'npy' || (given === null && isNpy(bytes))) return readNpy(bytes, name);
  if (isNpy(bytes)) {
    throw new InputError('these are the bytes of an NPY file', 'end its name in .npy', {
      file: name,
    });
  }
  const source = new SourceText(bytes, name);
  const chosen = given ?? formatOfText(source.text, /\.txt$/i.test(name));
  if (chosen === 'json') return (await import('./read-json.js')).readJson(source);
  if (chosen === 'csv') return (await import('./read-csv.js')).readCsv(source);
  return readText(source);
}

function formatOfName(name: string): InputFormat | null {
  const ending = /\.([a-z]+)$/i.exec(name)?.[1]?.toLowerCase();
  return ending === 'csv' || ending === 'json' || ending === 'npy' ? ending : null;
}

/**
 * By the first line: JSON begins with a bracket; text has nothing but numbers after its label, or a
 * number somewhere; CSV has none between its commas. A file named as text is CSV only with a comma.
 */
function formatOfText(text: string, namedText: boolean): InputFormat {
  const first = /^\s*([^\r\n]*)/.exec(text)![1]!;
  if (/^(\{\s*("|\}|$)|\[\s*[[{"\]])/.test(first)) return 'json';
  if (first.startsWith('#')) return 'text';
  const words = first
    .slice(first.lastIndexOf(':') + 1)
    .split(/[\s,]+/)
    .filter((word) => word !== '');
  if (words.length > 0 && words.every(isNumber)) return 'text';
  if (!namedText && /^[{[]/.test(first)) return 'json';
  const parts = first.includes(',') ? first.split(',') : words;
  return parts.some(isNumber) || (namedText && !first.includes(',')) ? 'text' : 'csv';
}
