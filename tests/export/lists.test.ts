// Lists written and read back by general CSV and JSON parsers.
import { parse as parseCsv } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import type { FaceRow } from '../../src/census/face-rows.js';
import type { RegionRow } from '../../src/census/region-rows.js';
import type { ExactNumber } from '../../src/exact/number.js';
import { exactNumber } from '../../src/exact/number.js';
import { batched } from '../../src/export/chunks.js';
import { writeFaces } from '../../src/export/faces.js';
import { csvField, csvLabel, jsonInteger } from '../../src/export/fields.js';
import { writeFlats } from '../../src/export/flats.js';
import { titleOf } from '../../src/export/heading.js';
import { writeRegions } from '../../src/export/regions.js';
import { arrangementOf, generatorsOf } from '../support/arrangements.js';
import { slowLattice } from '../support/slow-poset.js';

const big = 2n ** 53n;
const plane = arrangementOf([
  [1, 0],
  [0, 1],
]);
const golden = buildArrangement({
  ...generatorsOf([
    [1, [1, 1]],
    [0, 2],
  ]),
  coordinates: ['surge, aft', 'sway "port"'],
  title: 'line\nbreak',
});

const regions: RegionRow[] = [
  {
    signs: '+-',
    walls: [1, 2],
    point: [big - 1n, -big],
    vertex: numbers([1n, 0n, 1n], [0n, 0n, 1n]),
  },
  { signs: '=+', walls: [2], point: [0n, 5n], vertex: numbers([-3n, 0n, 4n], [1n, 3n, 2n]) },
];
const faces: FaceRow[] = [
  {
    signs: '00',
    dimension: 0,
    zonotopeDimension: 2,
    base: numbers([0n, 0n, 1n], [0n, 0n, 1n]),
    free: [1, 2],
  },
  {
    signs: '+-',
    dimension: 2,
    zonotopeDimension: 0,
    base: numbers([1n, 0n, 1n], [-1n, 2n, 1n]),
    free: [],
  },
];

function numbers(...parts: [bigint, bigint, bigint][]): ExactNumber[] {
  return parts.map(([a, b, d]) => exactNumber(a, b, d));
}

describe('regions', () => {
  it('as CSV have a column a coordinate, named as the file names them', () => {
    const [header, ...rows] = parseCsv([...writeRegions(golden, regions, 'csv')].join(''));
    expect(header).toEqual([
      'signs',
      'walls',
      'point_surge, aft',
      'point_sway "port"',
      'vertex_surge, aft',
      'vertex_sway "port"',
    ]);
    expect(rows).toEqual([
      ['+-', '1 2', '9007199254740991', '-9007199254740992', '1', '0'],
      ['=+', '2', '0', '5', '-3/4', '1/2+3/2*sqrt(5)'],
    ]);
    const [plain] = [...writeRegions(plane, [], 'csv')];
    expect(plain).toBe('signs,walls,point_1,point_2,vertex_1,vertex_2\n');
  });

  const records = [
    { signs: '+-', walls: [1, 2], point: [9007199254740991, '-9007199254740992'], vertex: [1, 0] },
    { signs: '=+', walls: [2], point: [0, 5], vertex: ['-3/4', '1/2+3/2*sqrt(5)'] },
  ];

  it('as NDJSON are an object a line, integers past 2^53 as strings', () => {
    const lines = [...writeRegions(golden, regions, 'ndjson')].join('').trimEnd().split('\n');
    expect(lines.map((line) => JSON.parse(line))).toEqual(records);
    expect([...writeRegions(golden, [], 'ndjson')]).toEqual([]);
  });

  it('as JSON come with the arrangement, and can be empty', () => {
    const parsed = JSON.parse([...writeRegions(golden, regions, 'json')].join(''));
    expect(parsed.regions).toEqual(records);
    expect(parsed.schema).toBe('signwright/regions/1');
    expect(parsed.input).toMatchObject({
      title: 'line\nbreak',
      normalCount: 2,
      ambientDimension: 2,
      field: 'Q(sqrt(5))',
      normals: [
        [1, '1+sqrt(5)'],
        [0, 2],
      ],
    });
    expect(parsed.arrangement).toEqual({ hyperplanes: 2, rank: 2, lineality: 0 });
    expect(JSON.parse([...writeRegions(plane, [], 'json')].join('')).regions).toEqual([]);
  });
});

describe('faces', () => {
  it('as CSV', () => {
    expect(parseCsv([...writeFaces(golden, faces, 'csv')].join(''))).toEqual([
      ['signs', 'dimension', 'zonotope_dimension', 'base_surge, aft', 'base_sway "port"', 'free'],
      ['00', '0', '2', '0', '0', '1 2'],
      ['+-', '2', '0', '1', '-1+2*sqrt(5)', ''],
    ]);
  });

  it('as NDJSON and JSON', () => {
    const records = [
      { signs: '00', dimension: 0, zonotopeDimension: 2, base: [0, 0], free: [1, 2] },
      { signs: '+-', dimension: 2, zonotopeDimension: 0, base: [1, '-1+2*sqrt(5)'], free: [] },
    ];
    const lines = [...writeFaces(golden, faces, 'ndjson')].join('').trimEnd().split('\n');
    expect(lines.map((line) => JSON.parse(line))).toEqual(records);
    expect(JSON.parse([...writeFaces(golden, faces, 'json')].join('')).faces).toEqual(records);
  });

  it('stream: the first chunk is there before most rows are made', () => {
    let made = 0;
    function* rows(): Generator<FaceRow> {
      for (; made < 100_000; made++) yield faces[made % 2];
    }
    const chunks = writeFaces(golden, rows(), 'csv');
    expect((chunks.next().value as string).length).toBeGreaterThan(60_000);
    expect(made).toBeLessThan(10_000);
    expect([...chunks].join('').split('\n').length).toBeGreaterThan(90_000);
    expect(made).toBe(100_000);
  });
});

describe('flats', () => {
  // Three lines in the plane: t^2 - 3 t + 2, so Moebius values 1, -1 three times, 2.
  const arrangement = arrangementOf([
    [1, 0],
    [0, 1],
    [-2, 0],
    [1, 1],
  ]);

  it('list parallel normals together', () => {
    expect([...writeFlats(arrangement, slowLattice(arrangement), 'csv')].join('')).toBe(
      'rank,dimension,normals,moebius\n0,2,,1\n1,1,1 3,-1\n1,1,2,-1\n1,1,4,-1\n2,0,1 2 3 4,2\n',
    );
  });

  it('keep every digit of a Moebius value', () => {
    const lattice = { ...slowLattice(arrangement), moebius: [1n, -1n, -1n, -1n, 10n ** 20n] };
    const text = [...writeFlats(arrangement, lattice, 'ndjson')].join('');
    const rows = text
      .trimEnd()
      .split('\n')
      .map((line) => JSON.parse(line));
    expect(rows.map((row) => row.moebius)).toEqual([1, -1, -1, -1, '100000000000000000000']);
    expect(rows[1]).toEqual({ rank: 1, dimension: 1, normals: [1, 3], moebius: -1 });
    const whole = JSON.parse([...writeFlats(arrangement, lattice, 'json')].join(''));
    expect(whole.flats).toEqual(rows);
  });
});

describe('titles', () => {
  it('fall back on the name of the file, without its folders', () => {
    const named = (name: string, title: string | null = null) =>
      titleOf({
        ...plane,
        generators: { ...plane.generators, title, source: { name, sha256: null } },
      });
    expect(named('folder/of/normals.txt')).toBe('normals.txt');
    expect(named('C:\\data\\normals.csv')).toBe('normals.csv');
    expect(named('standard input')).toBe('standard input');
    expect(named('x/y.txt', 'either/or')).toBe('either/or');
  });
});

describe('fields', () => {
  it('any text survives a CSV parser', () => {
    fc.assert(
      fc.property(fc.array(fc.string({ unit: 'grapheme' }), { minLength: 2 }), (texts) => {
        const line = `${texts.map(csvField).join(',')}\n`;
        expect(parseCsv(line)).toEqual([texts]);
      }),
    );
  });

  it('free text never begins as a formula does', () => {
    fc.assert(
      fc.property(fc.constantFrom('=', '+', '-', '@', '\t', '\r'), fc.string(), (first, rest) => {
        const [[field]] = parseCsv(`${csvLabel(first + rest)},x\n`) as string[][];
        expect(field).toBe(`'${first}${rest}`);
      }),
    );
    expect(csvLabel('fore, port')).toBe('"fore, port"');
  });

  it('JSON integers read back with every digit', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: -(2n ** 70n), max: 2n ** 70n }), (value) => {
        expect(BigInt(JSON.parse(JSON.stringify(jsonInteger(value))))).toBe(value);
      }),
    );
  });
});

describe('chunks', () => {
  it('keep the text whole and stay near 64 kB', () => {
    const pieces = Array.from({ length: 30_000 }, (_, i) => `${i}\n`);
    const chunks = [...batched(pieces)];
    expect(chunks.join('')).toBe(pieces.join(''));
    expect(chunks.slice(0, -1).every(({ length }) => length >= 65536 && length < 65600)).toBe(true);
    expect(chunks.length).toBeGreaterThan(2);
  });
});
