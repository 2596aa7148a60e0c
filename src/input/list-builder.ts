// Rows of any format to one GeneratorList: one field for all numbers, one length for all normals,
// no zero normal, no label twice, low below high.
import { InputError } from '../errors.js';
import { addNumbers, type ExactNumber, exactOne, isZero, negateNumber } from '../exact/number.js';
import { quadraticRing } from '../exact/quadratic.js';
import { type GeneratorList, type Range, unitRange } from './generators.js';
import { differentRoots, NumberFault, type ParsedNumber, parseNumber } from './number-text.js';
import type { Place } from './source.js';
import { quoted } from './source.js';

/** One normal as a reader found it. */
export interface NormalRow {
  readonly entries: readonly ExactNumber[];
  readonly label: string | null;
  readonly range: Range | null;
  /** Where the row, its label and its range stand. */
  readonly place: Place;
  readonly labelPlace?: Place;
  readonly rangePlace?: Place;
}

/** Collects normals in order; each method throws InputError at the place of the fault. */
export class ListBuilder {
  readonly #normals: (readonly ExactNumber[])[] = [];
  readonly #labels: (string | null)[] = [];
  readonly #ranges: Range[] = [];
  readonly #labelPlaces = new Map<string, Place>();
  #radicand: bigint | null = null;
  #rootPlace: (() => ReturnType<Place>) | null = null;

  /** Reads a number and brings it into the field of the list. */
  number(text: string, place: Place): ExactNumber {
    let parsed: ParsedNumber;
    try {
      parsed = parseNumber(text);
      this.#join(parsed, place);
    } catch (fault) {
      if (!(fault instanceof NumberFault)) throw fault;
      throw new InputError(fault.what, fault.remedy, place(fault.offset));
    }
    return parsed.value;
  }

  add(row: NormalRow): void {
    const { entries, label, range } = row;
    const first = this.#normals[0];
    if (first !== undefined && entries.length !== first.length) {
      const what = `this normal has ${count(entries.length, 'coordinate')}, the first has ${first.length}`;
      throw new InputError(what, 'give every normal the same number', row.place());
    }
    if (entries.every(isZero)) {
      throw new InputError('the normal is zero', 'remove it: it has no hyperplane', row.place());
    }
    if (label !== null) {
      const earlier = this.#labelPlaces.get(label);
      if (earlier !== undefined) {
        const { line } = earlier();
        const where = line === undefined ? '' : ` on line ${line}`;
        const what = `the label ${quoted(label)} is used twice, first${where}`;
        throw new InputError(
          what,
          'give each normal its own label',
          (row.labelPlace ?? row.place)(),
        );
      }
      this.#labelPlaces.set(label, row.labelPlace ?? row.place);
    }
    if (range !== null && !this.#isBelow(range.low, range.high)) {
      throw new InputError(
        'low is not below high',
        'a range goes from the smaller to the larger number',
        (row.rangePlace ?? row.place)(),
      );
    }
    this.#normals.push(entries);
    this.#labels.push(label);
    this.#ranges.push(range ?? unitRange);
  }

  /** The list; labels and ranges that say nothing become null. `file` is the name shown. */
  finish(
    title: string | null,
    coordinates: readonly string[] | null,
    source: { readonly name: string; readonly sha256: string | null },
  ): GeneratorList {
    if (this.#normals.length === 0) {
      throw new InputError('there is no normal', 'give at least one', { file: source.name });
    }
    return {
      title,
      coordinates,
      radicand: this.#hasRoot() ? this.#radicand : null,
      normals: this.#normals,
      labels: this.#labels.some((label) => label !== null) ? this.#labels : null,
      ranges: this.#ranges.some((range) => !isUnit(range)) ? this.#ranges : null,
      source: { name: source.name, sha256: source.sha256 },
    };
  }

  /** Roots can cancel, where rows are computed from what was read. */
  #hasRoot(): boolean {
    const has = (x: ExactNumber) => x.b !== 0n;
    return (
      this.#normals.some((entries) => entries.some(has)) ||
      this.#ranges.some(({ low, high }) => has(low) || has(high))
    );
  }

  #join(parsed: ParsedNumber, place: Place): void {
    const { radicand, rootOffset } = parsed;
    if (radicand === null) return;
    if (this.#radicand === null) {
      this.#radicand = radicand;
      this.#rootPlace = () => place(rootOffset);
    } else if (this.#radicand !== radicand) {
      const line = this.#rootPlace?.().line;
      const where = line === undefined ? '' : ` on line ${line}`;
      throw differentRoots(radicand, this.#radicand, where, rootOffset);
    }
  }

  #isBelow(low: ExactNumber, high: ExactNumber): boolean {
    const { a, b } = addNumbers(high, negateNumber(low));
    return this.#radicand === null ? a > 0n : quadraticRing(this.#radicand).sign({ a, b }) > 0;
  }
}

// Control characters would reach terminals and files, marks that override the direction of text would
// turn what stands beside the name; a lone surrogate cannot be written as UTF-8.
const unfitForNames = /[\p{Cc}\p{Cs}\u2028\u2029\u202a-\u202e\u2066-\u2069]/u;

/** True where a trimmed text can be a label, a title or the name of a coordinate. */
export function isName(text: string): boolean {
  return text !== '' && !unfitForNames.test(text);
}

/** A label, title or name of a coordinate without outer blanks; null when nothing is left. */
export function cleanName(text: string, place: Place): string | null {
  const name = text.trim();
  if (unfitForNames.test(name)) {
    const what = `the name ${quoted(name)} has a line break or control character in it`;
    throw new InputError(what, 'use letters, digits, blanks and signs', place());
  }
  return name === '' ? null : name;
}

/** `1 coordinate`, `3 coordinates`. */
export function count(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? '' : 's'}`;
}

function isUnit({ low, high }: Range): boolean {
  return isZero(low) && isZero(addNumbers(high, negateNumber(exactOne)));
}
