// The JSON form: an object with `normals` and, where wanted, title, coordinates, labels and ranges.
// Numbers are taken as the digits written, never through floating point.
import { InputError } from '../errors.js';
import type { GeneratorList } from './generators.js';
import type { JsonForm, Numeral } from './json-form.js';
import { type JsonPath, offsetOfJson } from './json-place.js';
import { cleanName, count, ListBuilder } from './list-builder.js';
import { quoted, type SourceText } from './source.js';

/** Reads a list in the JSON form; throws InputError. */
export async function readJson(source: SourceText): Promise<GeneratorList> {
  const form = await validated(source);
  const placeOf =
    (path: JsonPath) =>
    (offset = 0) => {
      const at = offsetOfJson(source.text, path);
      return source.place(at + offset + (source.text.charAt(at) === '"' ? 1 : 0));
    };
  const startOf = (path: JsonPath) => () => source.place(offsetOfJson(source.text, path));
  const builder = new ListBuilder();
  const read = (value: Numeral | string, path: JsonPath) => {
    if (typeof value === 'string') return builder.number(value, placeOf(path));
    if (!/^-?(0|[1-9]\d*)(\.\d+)?(e[+-]?\d+)?$/i.test(value.text)) {
      const remedy = 'write digits before and after the point, such as 0.5';
      throw new InputError(`JSON has no number ${quoted(value.text)}`, remedy, startOf(path)());
    }
    return builder.number(value.text, placeOf(path));
  };
  const { normals, labels = null, ranges = null, coordinates = null } = form;
  requireLength('labels', labels, normals.length, 'normal', startOf);
  requireLength('ranges', ranges, normals.length, 'normal', startOf);
  requireLength('coordinates', coordinates, normals[0]!.length, 'entry of a normal', startOf);
  const names = coordinates?.map((name, i) => cleanName(name, startOf(['coordinates', i]))) ?? null;
  normals.forEach((normal, i) => {
    const label = labels?.[i] ?? null;
    const range = ranges?.[i] ?? null;
    const labelPlace = startOf(['labels', i]);
    builder.add({
      entries: normal.map((entry, j) => read(entry, ['normals', i, j])),
      label: label === null ? null : cleanName(label, labelPlace),
      range: range && {
        low: read(range[0], ['ranges', i, 0]),
        high: read(range[1], ['ranges', i, 1]),
      },
      place: startOf(['normals', i]),
      labelPlace,
      rangePlace: startOf(['ranges', i]),
    });
  });
  const title = form.title ? cleanName(form.title, startOf(['title'])) : null;
  return builder.finish(title, names && distinct(names, startOf), source);
}

type StartOf = (path: JsonPath) => () => ReturnType<SourceText['place']>;

async function validated(source: SourceText): Promise<JsonForm> {
  const [{ parse }, { jsonForm, Numeral }] = await Promise.all([
    import('lossless-json'),
    import('./json-form.js'),
  ]);
  let document: unknown;
  try {
    document = parse(source.text, null, (text) => new Numeral(text));
  } catch (error) {
    throw syntaxFault(error, source);
  }
  const known = Object.keys(jsonForm.shape).filter((key) => key !== '$schema');
  const unknownKey = (path: JsonPath, key: string) => {
    const at = offsetOfJson(source.text, path, key);
    return source.fault(
      at,
      `the key ${quoted(key)} is not known`,
      `the keys are ${known.join(', ')}`,
    );
  };
  // JavaScript gives this one key another meaning, so no schema would see it.
  if (Object.getPrototypeOf(document ?? {}) !== Object.prototype && !Array.isArray(document)) {
    if (document instanceof Object && !(document instanceof Numeral))
      throw unknownKey([], '__proto__');
  }
  const result = jsonForm.safeParse(document instanceof Numeral ? null : document);
  if (result.success) return result.data;
  const { issues } = result.error;
  // A key that is not known comes first: it may be a known one misspelt.
  const issue = issues.find(({ code }) => code === 'unrecognized_keys') ?? issues[0]!;
  const path = issue.path as JsonPath;
  if (issue.code === 'unrecognized_keys') throw unknownKey(path, issue.keys[0]!);
  const at = offsetOfJson(source.text, path);
  if (path[0] === 'normals' && !Object.hasOwn(document as object, 'normals')) {
    throw source.fault(at, 'the key "normals" is missing', 'write {"normals": [[1, 0], [0, 1]]}');
  }
  throw source.fault(at, `${nameOf(path)} is not what is expected here`, expectation(path));
}

function syntaxFault(error: unknown, source: SourceText): InputError {
  if (error instanceof RangeError) {
    const remedy = 'write {"normals": [[1, 0], [0, 1]]}';
    return new InputError('the JSON is nested too deeply', remedy, { file: source.name });
  }
  if (!(error instanceof SyntaxError)) throw error;
  const match = /^(.*?)(?: encountered)? at position (\d+)$/s.exec(error.message);
  const what = match?.[1] ?? error.message;
  const offset = Number(match?.[2] ?? 0);
  const shown = what.length > 100 ? `${what.slice(0, 97)}...` : what;
  const lowered = /^[A-Z][a-z ]/.test(shown)
    ? shown.charAt(0).toLowerCase() + shown.slice(1)
    : shown;
  const message = `not sound JSON: ${lowered}`;
  return source.fault(offset, message.replace(/\p{Cc}/gu, ' '), 'mend the JSON here');
}

function nameOf(path: JsonPath): string {
  const [key, i, j] = path;
  if (key === undefined) return 'the document';
  if (typeof i !== 'number') return quoted(String(key));
  const item = `${String(key).replace(/s$/, '')} ${i + 1}`;
  return typeof j === 'number' ? `entry ${j + 1} of ${item}` : item;
}

function expectation(path: JsonPath): string {
  const [key, i, j] = path;
  const entry = 'write a number, or a string such as "-3/4" or "2+3*sqrt(5)"';
  if (key === undefined) return 'write an object: {"normals": [[1, 0], [0, 1]]}';
  if (key === 'normals') {
    if (typeof j === 'number') return entry;
    return typeof i === 'number'
      ? 'write an array of numbers, at least one'
      : 'write an array of arrays of numbers, at least one';
  }
  if (key === 'ranges') {
    if (typeof j === 'number') return entry;
    return typeof i === 'number' ? 'write [low, high]' : 'write an array of [low, high]';
  }
  if (key === 'title' || key === '$schema' || typeof i === 'number') return 'write a string';
  return 'write an array of strings';
}

function requireLength(
  key: string,
  list: readonly unknown[] | null,
  length: number,
  of: string,
  startOf: StartOf,
): void {
  if (list === null || list.length === length) return;
  const what = `"${key}" has ${count(list.length, 'item')} where ${length} are needed`;
  throw new InputError(what, `give one for each ${of}`, startOf([key])());
}

function distinct(names: readonly (string | null)[], startOf: StartOf): readonly string[] {
  return names.map((name, i) => {
    const place = startOf(['coordinates', i]);
    if (name === null) throw new InputError('a coordinate has no name', 'name it', place());
    if (names.indexOf(name) < i) {
      const what = `the coordinate ${quoted(name)} is named twice`;
      throw new InputError(what, 'give each coordinate its own name', place());
    }
    return name;
  });
}
