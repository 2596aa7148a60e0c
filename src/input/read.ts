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
  const chosen = given ?? formatOfText(source.text);
  if (chosen === 'json') return (await import('./read-json.js')).readJson(source);
  if (chosen === 'csv') return (await import('./read-csv.js')).readCsv(source);
  return readText(source);
}

function formatOfName(name: string): InputFormat | null {
  const ending = /\.([a-z]+)$/i.exec(name)?.[1]?.toLowerCase();
  if (ending === 'csv' || ending === 'json' || ending === 'npy') return ending;
  return ending === 'txt' ? 'text' : null;
}

/** JSON begins with a bracket; CSV with a line in which nothing between commas or blanks is a number. */
function formatOfText(text: string): InputFormat {
  if (/^\s*[{[]/.test(text)) return 'json';
  const first = /^\s*([^\r\n]*)/.exec(text)![1]!;
  if (first.startsWith('#')) return 'text';
  const parts = first.includes(',') ? first.split(',') : first.split(/[\s:]+/);
  return parts.some(isNumber) ? 'text' : 'csv';
}
