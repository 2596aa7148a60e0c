// The JSON form: digits as written, the published schema, and every fault at its line and column.
import { readFileSync } from 'node:fs';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { arrangementSchema } from '../../src/input/json-form.js';
import { faultIn, readAs, shown } from './reading.js';

const published = JSON.parse(
  readFileSync(new URL('../../src/input/arrangement.schema.json', import.meta.url), 'utf8'),
) as Record<string, unknown>;

describe('JSON', () => {
  it('reads numbers digit by digit, fractions and roots as strings', async () => {
    const list = await readAs(
      'a.json',
      `{ "title": " Fleet ", "coordinates": ["x", "y"],
         "normals": [[1, "-3/4"], [123456789012345678901234567891, 1e-3], [0.1, " 1 + sqrt(8) "]],
         "labels": ["a", null, ""], "ranges": [[0, 1], ["-1/2", 0.25], [0, "sqrt(2)"]] }`,
    );
    expect(shown(list)).toEqual([
      ['1', '-3/4'],
      ['123456789012345678901234567891', '1/1000'],
      ['1/10', '1+2*sqrt(2)'],
    ]);
    expect(list.title).toBe('Fleet');
    expect(list.coordinates).toEqual(['x', 'y']);
    expect(list.labels).toEqual(['a', null, null]);
    expect(list.ranges?.[1]).toEqual({
      low: { a: -1n, b: 0n, d: 2n },
      high: { a: 1n, b: 0n, d: 4n },
    });
    expect(list.radicand).toBe(2n);
  });

  it.each([
    ['{"normals":\n [[1, 0],\n  [1]]}', '3:3 this normal has 1 coordinate, the first has 2'],
    ['{"normals": [[1, 0], [1, true]]}', '1:26 entry 2 of normal 2 is not what is expected here'],
    ['{"normals": [[1, 0], {}]}', '1:22 normal 2 is not what is expected here'],
    ['{"normals": [[]]}', '1:14 normal 1 is not what is expected here'],
    ['{"normals": []}', '1:13 "normals" is not what is expected here'],
    ['{"normals": 3}', '1:13 "normals" is not what is expected here'],
    ['{"labels": ["a"]}', '1:1 the key "normals" is missing'],
    ['{"title": "normal",\n "normal": [[1]]}', '2:2 the key "normal" is not known'],
    ['{"normals": [[1]], "__proto__": {"x": 1}}', '1:20 the key "__proto__" is not known'],
    ['[[1, 0]]', '1:1 the document is not what is expected here'],
    ['7', '1:1 the document is not what is expected here'],
    ['{"normals": [[1, 0],\n [0, "1 z"]]}', '2:9 cannot read "1 z" as a number'],
    ['{"normals": [[1, 1e999999999]]}', '1:18 the exponent 999999999 is out of range'],
    ['{"normals": [[.5]]}', '1:15 JSON has no number ".5"'],
    ['{"normals": [[1, 0], [0, -0.0]]}', '1:22 the normal is zero'],
    [
      '{"normals": [["sqrt(2)"],\n [ "1+sqrt(3)"]]}',
      '2:7 sqrt(3) beside sqrt(2) on line 1: two different square roots',
    ],
    ['{"normals": [[1], [2]], "labels": ["a"]}', '1:35 "labels" has 1 item where 2 are needed'],
    [
      '{"labels": ["a",\n "b", "a"], "normals": [[1], [2], [3]]}',
      '2:7 the label "a" is used twice, first on line 1',
    ],
    ['{"normals": [[1]], "labels": [3]}', '1:31 label 1 is not what is expected here'],
    [
      '{"normals": [[1]], "labels": ["a\\nb"]}',
      '1:31 the name "a\\nb" has a line break or control character in it',
    ],
    [
      '{"normals": [[1]], "labels": ["\\ud800"]}',
      '1:31 the name "\\ud800" has a line break or control character in it',
    ],
    ['{"normals": [[1]], "ranges": [[1, 1]]}', '1:31 low is not below high'],
    ['{"normals": [[1]], "ranges": [[1]]}', '1:31 range 1 is not what is expected here'],
    [
      '{"normals": [[1, 2]], "coordinates": ["x"]}',
      '1:38 "coordinates" has 1 item where 2 are needed',
    ],
    ['{"normals": [[1, 2]], "coordinates": ["x", "x"]}', '1:44 the coordinate "x" is named twice'],
    ['{"normals": [[1, 2]], "coordinates": ["x", " "]}', '1:44 a coordinate has no name'],
    ['# x', "1:1 not sound JSON: JSON value expected but got '#'"],
    ['{"normals": [[1],}', "1:18 not sound JSON: array item expected but got '}'"],
    [
      '{"normals": [[1]]',
      "1:18 not sound JSON: quoted object key or end of object '}' expected but reached end of input",
    ],
    ['{"normals": [[1]],\n "normals": [[2]]}', "2:3 not sound JSON: duplicate key 'normals'"],
  ])('%j', async (text, expected) => {
    expect(await faultIn('a.json', text)).toBe(expected);
  });

  it('refuses what is nested too deeply', async () => {
    expect(await faultIn('a.json', '['.repeat(100_000))).toBe('-:- the JSON is nested too deeply');
  });

  it('finds the place past keys and strings that look like structure', async () => {
    const text = '{"title": "[{\\"normals\\": ]", "labels": ["}", "\\\\"],\n"normals": [[1], [0]]}';
    expect(await faultIn('a.json', text)).toBe('2:18 the normal is zero');
  });
});

describe('the JSON Schema', () => {
  it('is the one published beside the reader', () => {
    expect(arrangementSchema()).toEqual(published);
  });

  // ajv, a general-purpose validator, reads the published file.
  const validate = new Ajv2020({ strict: false }).compile(published);

  it.each([
    { normals: [[1, '-3/4']] },
    { $schema: 'arrangement.schema.json', normals: [[1]], labels: [null], ranges: [[0, '1/2']] },
    { title: null, coordinates: ['x'], normals: [[1]], labels: null },
  ])('accepts %j, as the reader does', async (document) => {
    expect(validate(document)).toBe(true);
    expect((await readAs('a.json', JSON.stringify(document))).normals).toHaveLength(1);
  });

  it.each([
    {},
    { normals: [] },
    { normals: [[]] },
    { normals: [[true]] },
    { normals: [[1]], extra: 1 },
    { normals: [[1]], labels: [1] },
    { normals: [[1]], ranges: [[1]] },
    { normals: [[1]], ranges: [[1, 2, 3]] },
    { normals: [[1]], coordinates: [] },
  ])('refuses %j, as the reader does', async (document) => {
    expect(validate(document)).toBe(false);
    expect(await faultIn('a.json', JSON.stringify(document))).toMatch(/^\d+:\d+ /);
  });
});
