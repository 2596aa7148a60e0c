// Scored options: for each pair the difference of their scores, the normal of the hyperplane of
// weightings under which the two tie. A region is a ranking that some weighting gives.
import { InputError } from '../../errors.js';
import { addNumbers, type ExactNumber, isZero, negateNumber } from '../../exact/number.js';
import { readTable } from '../csv-table.js';
import type { GeneratorList } from '../generators.js';
import { cleanName, ListBuilder } from '../list-builder.js';
import { quoted, SourceText } from '../source.js';
import { requireRoom } from './family.js';

/**
 * Reads a CSV whose first column, `option` or `label`, names the options and whose others score them
 * by a criterion each; n options give n (n-1) / 2 normals labelled `A over B`. Throws InputError.
 */
export async function compareOptions(bytes: Uint8Array, name: string): Promise<GeneratorList> {
  const source = new SourceText(bytes, name);
  const { header, rows, place } = await readTable(source);
  if (header[0] !== 'option' && header[0] !== 'label') {
    const what = `the first column is named ${quoted(header[0]!)}`;
    throw new InputError(
      what,
      'name it option, and put the names of the options in it',
      place(-1, 0),
    );
  }
  if (header.length < 2) {
    throw new InputError('there is no criterion', 'add a column of scores for each', place(-1, 0));
  }
  if (rows.length < 2) {
    const remedy = 'give two options or more';
    throw new InputError('there is nothing to compare', remedy, { file: source.name });
  }
  requireRoom('the comparisons', (rows.length * (rows.length - 1)) / 2, header.length - 1);
  const builder = new ListBuilder();
  const seen = new Map<string, number>();
  const names = rows.map(([cell = ''], row) => {
    const option = cleanName(cell, () => place(row, 0));
    if (option === null) throw new InputError('an option has no name', 'name it', place(row, 0));
    const earlier = seen.get(option);
    if (earlier !== undefined) {
      const what = `the option ${quoted(option)} is named twice, first on line ${place(earlier, 0).line}`;
      throw new InputError(what, 'give each option its own name', place(row, 0));
    }
    seen.set(option, row);
    return option;
  });
  const scores = rows.map((cells, row) =>
    cells.slice(1).map((cell, i) => builder.number(cell, (at = 0) => place(row, i + 1, at))),
  );
  names.forEach((first, i) => {
    for (let j = i + 1; j < names.length; j += 1) {
      const entries = difference(scores[i]!, scores[j]!);
      if (entries.every(isZero)) {
        const what = `${quoted(first)} and ${quoted(names[j]!)} have the same scores throughout`;
        throw new InputError(what, 'no weighting can part them: remove one', place(j, 0));
      }
      const label = `${first} over ${names[j]}`;
      builder.add({ entries, label, range: null, place: () => place(j, 0) });
    }
  });
  return builder.finish(`Comparisons of ${names.length} options`, header.slice(1), source);
}

function difference(x: readonly ExactNumber[], y: readonly ExactNumber[]): ExactNumber[] {
  return x.map((value, i) => addNumbers(value, negateNumber(y[i]!)));
}
