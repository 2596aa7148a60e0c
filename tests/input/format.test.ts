// Lists written and read back are the same lists.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { InputError } from '../../src/errors.js';
import { exactNumber, isZero } from '../../src/exact/number.js';
import { formatCsv, formatJson, formatPlain, formatText } from '../../src/input/format.js';
import { type GeneratorList, type Range, unitRange } from '../../src/input/generators.js';
import { listOf } from '../support/lists.js';
import { readAs } from './reading.js';

const integer = fc.oneof(fc.bigInt(-9n, 9n), fc.bigInt(-(10n ** 30n), 10n ** 30n));
const entry = (k: bigint | null) =>
  fc
    .tuple(integer, k === null ? fc.constant(0n) : integer, fc.bigInt(1n, 999n))
    .map(([a, b, d]) => exactNumber(a, b, d));
const name = fc
  .string({ unit: 'grapheme', minLength: 1, maxLength: 12 })
  .map((text) => `~${text.replace(/[\p{Cc}\p{Cs}\u2028\u2029\u202a-\u202e\u2066-\u2069]/gu, '')}~`);
const range = fc.tuple(integer, fc.bigInt(1n, 10n ** 20n), fc.bigInt(1n, 99n)).map(
  ([low, width, d]): Range => ({
    low: exactNumber(low, 0n, d),
    high: exactNumber(low + width, 0n, d),
  }),
);

/** Any list that the readers can give, its name and hash apart. */
const anyList = fc
  .record({
    n: fc.integer({ min: 1, max: 6 }),
    d: fc.integer({ min: 1, max: 4 }),
    k: fc.constantFrom(null, 2n, 5n, 30n),
  })
  .chain(({ n, d, k }) => {
    const row = fc
      .array(entry(k), { minLength: d, maxLength: d })
      .filter((entries) => !entries.every(isZero));
    const each = { minLength: n, maxLength: n };
    return fc.record({
      title: fc.option(name),
      coordinates: fc.option(fc.uniqueArray(name, { minLength: d, maxLength: d })),
      normals: fc.array(row, each),
      names: fc.uniqueArray(name, each),
      labelled: fc.array(fc.boolean(), each),
      ranges: fc.option(fc.array(range, each)),
      k: fc.constant(k),
    });
  })
  .map(({ title, coordinates, normals, names, labelled, ranges, k }): GeneratorList => {
    const rooted = normals.some((row) => row.some((x) => x.b !== 0n));
    const isUnit = ({ low, high }: Range) => isZero(low) && high.a === 1n && high.d === 1n;
    return {
      title,
      coordinates,
      radicand: rooted ? k : null,
      normals,
      labels: labelled.includes(true) ? names.map((text, i) => (labelled[i] ? text : null)) : null,
      ranges: ranges?.every(isUnit) ? null : ranges,
      source: { name: 'test', sha256: null },
    };
  });

const withoutSource = ({ source: _, ...rest }: GeneratorList) => rest;

describe('what is written', () => {
  it('comes back from JSON whole', async () => {
    await fc.assert(
      fc.asyncProperty(anyList, async (list) => {
        const back = await readAs('a.json', formatJson(list));
        expect(withoutSource(back)).toEqual(withoutSource(list));
      }),
    );
  });

  it('comes back from CSV without its title', async () => {
    await fc.assert(
      fc.asyncProperty(anyList, async (list) => {
        const back = await readAs('a.csv', formatCsv(list));
        const coordinates = list.coordinates ?? list.normals[0]!.map((_, i) => `x${i + 1}`);
        expect(withoutSource(back)).toEqual({ ...withoutSource(list), title: null, coordinates });
      }),
    );
  });

  it('comes back from text whole where it has no ranges', async () => {
    await fc.assert(
      fc.asyncProperty(anyList, async (list) => {
        const plain = {
          ...list,
          ranges: null,
          labels: list.labels?.map((label) => label?.replaceAll('#', '+') ?? null) ?? null,
          coordinates: list.coordinates?.map((axis) => axis.replaceAll(',', ';')) ?? null,
        };
        for (const key of ['labels', 'coordinates'] as const) {
          fc.pre(new Set(plain[key] ?? []).size === new Set(list[key] ?? []).size);
        }
        const back = await readAs('a.txt', formatText(plain));
        expect(withoutSource(back)).toEqual(withoutSource(plain));
      }),
    );
  });

  it('is text where nothing else is asked, or JSON where text cannot hold it', async () => {
    const plain = listOf([[1, 2]]);
    expect(formatPlain(plain)).toBe(formatText(plain));
    for (const list of [
      { ...plain, labels: ['a#b'] },
      { ...plain, coordinates: ['x,y', 'z'] },
    ]) {
      expect(withoutSource(await readAs('-', formatPlain(list)))).toEqual(withoutSource(list));
    }
  });

  it('refuses what a form cannot hold', () => {
    const list = listOf([[1, 2]]);
    expect(() => formatText({ ...list, ranges: [unitRange] })).toThrow(InputError);
    expect(() => formatText({ ...list, labels: ['a#b'] })).toThrow('the label "a#b"');
    expect(() => formatText({ ...list, coordinates: ['x,y', 'z'] })).toThrow(
      'the coordinate "x,y"',
    );
    expect(() => formatCsv({ ...list, coordinates: ['x', 'low'] })).toThrow('a coordinate "low"');
    expect(() => formatCsv({ ...list, coordinates: ['1', '2'] })).toThrow('header of numbers');
  });
});
