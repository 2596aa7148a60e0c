// Holding somebody else's list against ours. Their lists are made here from the definition (all sums
// of generators, kept where a random functional has its only maximum), never by the code under test.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { crosscheckCount, crosscheckList } from '../../src/census/crosscheck.js';
import { readTheirList } from '../../src/census/crosscheck-read.js';
import {
  type CrosscheckReport,
  crosscheckLines,
  type ListReport,
} from '../../src/census/crosscheck-report.js';
import { InputError } from '../../src/errors.js';
import { listRegions } from '../../src/region/regions.js';
import { allSubsets, arrangementOf, sequence, smallRows } from '../support/arrangements.js';
import { slowSigns } from '../support/slow-regions.js';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

async function check(
  arrangement: Arrangement,
  text: string,
  name = 'theirs.csv',
  listed?: number,
): Promise<CrosscheckReport> {
  const theirs = await readTheirList(bytes(text), name, arrangement);
  return crosscheckList(arrangement, listRegions(arrangement), theirs, listed);
}

async function checkPart(arrangement: Arrangement, text: string): Promise<ListReport> {
  const { parts } = await check(arrangement, text);
  expect(parts).toHaveLength(1);
  return parts[0] as ListReport;
}

/** Signs of all regions on all normals, by the slow listing of the tests. */
function allSigns(arrangement: Arrangement): number[][] {
  const half = slowSigns(arrangement);
  return [...half, ...half.map((row) => row.map((s) => -s))].map((row) =>
    Array.from(arrangement.hyperplaneOf, (h, i) => row[h] * arrangement.orientationOf[i]),
  );
}

/** Vertices of the zonotope of integer rows by their signs. */
function vertices(arrangement: Arrangement, rows: readonly number[][]): number[][] {
  return allSigns(arrangement).map((signs) =>
    rows[0].map((_, j) => rows.reduce((sum, row, i) => sum + (signs[i] > 0 ? row[j] : 0), 0)),
  );
}

const csv = (points: readonly (readonly (number | string)[])[]): string =>
  `${points.map((p) => p.join(',')).join('\n')}\n`;

function shuffled<T>(list: readonly T[], seed: number): T[] {
  const next = sequence(seed);
  return list
    .map((item) => ({ item, key: next(1e9) }))
    .sort((a, b) => a.key - b.key)
    .map(({ item }) => item);
}

const cube = allSubsets(3);
const cubeArrangement = arrangementOf(cube);
const cubeVertices = vertices(cubeArrangement, cube);

describe('a list of vertices', () => {
  it('agrees in any order, under any scale and shift', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(
          smallRows({ dimension: 2, maximum: 5 }),
          smallRows({ dimension: 3, maximum: 6 }),
          smallRows({ dimension: 4, maximum: 4, bound: 1 }),
        ),
        fc.integer({ min: 1, max: 12 }),
        fc.integer({ min: 1, max: 7 }),
        fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 4, maxLength: 4 }),
        fc.nat(99),
        async (rows, up, down, shift, seed) => {
          const arrangement = arrangementOf(rows);
          // (up x + shift) / down, written as fractions.
          const list = vertices(arrangement, rows).map((v) =>
            v.map((x, j) => `${up * x + shift[j]}/${down}`),
          );
          const part = await checkPart(arrangement, csv(shuffled(list, seed)));
          expect(part).toMatchObject({
            kind: 'vertices',
            agrees: true,
            counts: { matched: list.length, missing: 0, extra: 0, notExtreme: 0, repeated: 0 },
          });
        },
      ),
    );
  });

  it('names the usual conventions', async () => {
    const total = cube.reduce((sum, row) => sum.map((x, j) => x + row[j]), [0, 0, 0]);
    const said = async (list: (number | string)[][]): Promise<string | null> =>
      (await checkPart(cubeArrangement, csv(list))).placement;
    expect(await said(cubeVertices)).toBe('same place and scale as ours');
    expect(await said(cubeVertices.map((v) => v.map((x, j) => 2 * x - total[j])))).toBe(
      'theirs = 2 v + (-4, -4, -4) for each vertex v of ours (centred, segments from -1 to 1)',
    );
    expect(await said(cubeVertices.map((v) => v.map((x, j) => x - total[j] / 2)))).toBe(
      'theirs = v + (-2, -2, -2) for each vertex v of ours (centred, segments from -1/2 to 1/2)',
    );
    expect(await said(cubeVertices.map((v) => v.map((x) => `${x}/3`)))).toBe(
      'theirs = 1/3 v for each vertex v of ours',
    );
    expect(await said(cubeVertices.map((v) => v.map((x) => (x + 5).toFixed(2))))).toBe(
      'theirs = v + (5, 5, 5) for each vertex v of ours',
    );
    expect(await said(cubeVertices.map((v) => v.map((x) => `${x}*sqrt(2)`)))).toBe(
      'theirs = (sqrt(2)) v for each vertex v of ours',
    );
  });

  it('is told row by row: missing, extra, repeated, not extreme', async () => {
    const list = cubeVertices.map((v) => v.map((x) => 2 * x + 1));
    const [gone, twice] = [list[3], list[10]];
    const rows = list.filter((v) => v !== gone);
    const text = csv([...rows, twice, [5, 5, 5], [99, 0, 0], [6, 5, 5]]);
    const { parts, agrees } = await check(cubeArrangement, text);
    expect(agrees).toBe(false);
    const part = parts[0] as ListReport;
    expect(part.placement).toBe('theirs = 2 v + (1, 1, 1) for each vertex v of ours');
    expect(part.counts).toEqual({
      matched: 31,
      missing: 1,
      extra: 1,
      notExtreme: 2,
      undecided: 0,
      repeated: 1,
    });
    expect(part.missing[0].vertex).toEqual(gone.map(String));
    // The evidence: the functional of the interior point is greatest at the missing vertex alone.
    const direction = part.missing[0].point.map(Number);
    const value = (v: readonly number[]): number =>
      v.reduce((sum, x, j) => sum + x * direction[j], 0);
    expect(Math.max(...rows.map(value))).toBeLessThan(value(gone));
    expect(part.extra).toMatchObject([{ line: 34, text: '99, 0, 0' }]);
    const beyond = /direction \((.*)\)$/.exec(part.extra[0].reason)![1].split(', ').map(Number);
    const along = (v: readonly number[]): number => v.reduce((sum, x, j) => sum + x * beyond[j], 0);
    expect(along([99, 0, 0])).toBeGreaterThan(Math.max(...list.map(along)));
    expect(part.notExtreme.map(({ line }) => line)).toEqual([33, 35]);
    const first = rows.indexOf(twice) + 1;
    expect(part.repeated).toEqual([{ lines: [first, 32], text: twice.join(', ') }]);
  });

  it('is told that numbers seem rounded where that may be why they differ', async () => {
    const third = (v: readonly number[]) => v.map((x) => String(x / 3));
    const { parts } = await check(cubeArrangement, csv(cubeVertices.map(third)));
    expect((parts[0] as ListReport).placement).toMatch(/seem rounded|rounded ones match nothing/);
    const exact = await check(cubeArrangement, csv(cubeVertices.map((v) => v.map((x) => x / 4))));
    expect((exact.parts[0] as ListReport).placement).not.toContain('rounded');
    const fewer = await check(cubeArrangement, csv(cubeVertices.slice(1)));
    expect((fewer.parts[0] as ListReport).placement).not.toContain('rounded');
  });

  it('finds its place even when its outermost points are missing and others are outside', async () => {
    const rows = [
      [3, 1, 0],
      [1, -2, 4],
      [0, 5, 1],
      [2, 2, -3],
      [1, 1, 1],
      [4, 0, -1],
    ];
    const arrangement = arrangementOf(rows);
    const list = vertices(arrangement, rows).map((v) => v.map((x, j) => 3 * x + [7, -5, 2][j]));
    const outer = new Set<number>();
    for (let j = 0; j < 3; j++) {
      const column = list.map((v) => v[j]);
      column.forEach((x, i) => {
        if (x === Math.max(...column) || x === Math.min(...column)) outer.add(i);
      });
    }
    const kept = list.filter((_, i) => !outer.has(i));
    const part = await checkPart(arrangement, csv([...kept, [1000, 0, 0], [0, -900, 1]]));
    expect(part.placement).toBe('theirs = 3 v + (7, -5, 2) for each vertex v of ours');
    expect(part.counts).toMatchObject({ matched: kept.length, missing: outer.size, extra: 2 });
  });

  it('with all sums of generators has the vertices and points that are not extreme', async () => {
    const sums = new Set<string>();
    for (let bits = 0; bits < 2 ** 7; bits++) {
      const sum = [0, 1, 2].map((j) =>
        cube.reduce((total, row, i) => total + (((bits >> i) & 1) === 1 ? row[j] : 0), 0),
      );
      sums.add(sum.join(','));
    }
    const part = await checkPart(cubeArrangement, [...sums].join('\n'));
    expect(part.counts).toMatchObject({
      matched: 32,
      missing: 0,
      extra: 0,
      notExtreme: sums.size - 32,
    });
  });

  it('that is none of this arrangement says so', async () => {
    const part = await checkPart(
      cubeArrangement,
      csv([
        [1, 0, 0],
        ['1/7', 3, 0],
        [0, 0, 11],
      ]),
    );
    expect(part.agrees).toBe(false);
    expect(part.counts.missing).toBeGreaterThan(28);
  });

  it('takes ranges into account', async () => {
    const half = { a: 1n, b: 0n, d: 2n };
    const one = { a: 1n, b: 0n, d: 1n };
    const ranges = [
      { low: { a: -1n, b: 0n, d: 1n }, high: one },
      { low: half, high: one },
    ];
    const arrangement = arrangementOf(
      [
        [1, 0],
        [0, 4],
      ],
      { ranges },
    );
    const part = await checkPart(arrangement, '-1,2\n1,2\n-1,4\n1,4\n');
    expect(part).toMatchObject({ agrees: true, placement: 'same place and scale as ours' });
  });

  it('takes numbers of a quadratic field, and tells rounded ones from exact ones', async () => {
    // A rhombus: u = (2, 0) and v = (0, 1 + sqrt(5)), corners 0, u, v, u + v.
    const arrangement = arrangementOf([
      [2, 0],
      [0, [1, 1]],
    ]);
    const exact = '0,0\n2,0\n0,1+sqrt(5)\n2,(2+2*sqrt(5))/2\n';
    expect(await checkPart(arrangement, exact)).toMatchObject({ agrees: true });
    const centred = '-1,-(1+sqrt(5))/2\n1,-(1+sqrt(5))/2\n-1,(1+sqrt(5))/2\n1,(1+sqrt(5))/2\n';
    const part = await checkPart(arrangement, centred);
    expect(part.agrees).toBe(true);
    expect(part.placement).toMatch(/centred/);
    const rounded = await checkPart(arrangement, '0,0\n2,0\n0,3.236\n2,3.236\n');
    expect(rounded.counts).toMatchObject({ matched: 2, missing: 2, notExtreme: 2, extra: 0 });
    const above = await checkPart(arrangement, '0,0\n2,0\n0,3.2361\n2,3.2361\n');
    expect(above.counts).toMatchObject({ matched: 2, missing: 2, notExtreme: 0, extra: 2 });
  });

  it('is read with a header, labels, blanks or semicolons, and by our own column names', async () => {
    const lines = cubeVertices.map((v) => v.join(' '));
    const agree = async (text: string): Promise<void> => {
      expect((await check(cubeArrangement, text)).agrees).toBe(true);
    };
    await agree(`"x\ny",z,u\n${cubeVertices.join('\n')}`);
    await agree(`# ours\n${lines.join('\r\n')}\n`);
    await agree(`x;y;z\n${cubeVertices.map((v) => v.join(';')).join('\n')}`);
    await agree(`name,x,y,z\n${cubeVertices.map((v, i) => `"v, ${i}",${v}`).join('\n')}`);
    await agree(
      `id,vertex_1,vertex_2,vertex_3\n${cubeVertices.map((v, i) => `${i},${v}`).join('\n')}`,
    );
    await agree(
      `\ufeffx, y, z\n${cubeVertices.map((v) => v.map((x) => `"${x}.0"`).join(', ')).join('\n')}`,
    );
  });
});

describe('a list of sign vectors', () => {
  const text = (signs: readonly number[][]): string[] =>
    signs.map((row) => row.map((s) => (s > 0 ? '+' : '-')).join(''));

  it('agrees in any order, parallel normals included', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(smallRows({ dimension: 2, maximum: 5 }), smallRows({ dimension: 3, maximum: 6 })),
        fc.nat(99),
        async (rows, seed) => {
          const arrangement = arrangementOf([...rows, rows[0].map((x) => -x)]);
          const list = shuffled(text(allSigns(arrangement)), seed);
          const part = await checkPart(arrangement, `signs\n${list.join('\n')}`);
          expect(part).toMatchObject({ kind: 'signs', agrees: true, ours: list.length });
        },
      ),
      { numRuns: 30 },
    );
  });

  it('is told row by row', async () => {
    const arrangement = arrangementOf([
      [1, 0],
      [0, 1],
      [1, 1],
      [-2, 0],
    ]);
    // Regions of x = 0, y = 0, x + y = 0 in order: six of the eight sign choices.
    const part = await checkPart(arrangement, '+++-\n---+\n+-+-\n+--+\n-++ +\n'.replace(' ', ''));
    expect(part.counts).toMatchObject({ matched: 4, missing: 2, extra: 1, repeated: 0 });
    expect(part.extra).toEqual([{ line: 4, text: '+--+', reason: 'normals 1 and 4 are opposite' }]);
    expect(part.missing.map(({ signs }) => signs).sort()).toEqual(['+---', '-+-+']);
    for (const { signs, point } of part.missing) {
      const [x, y] = point.map(Number);
      const seen = [x, y, x + y, -2 * x].map((v) => (v > 0 ? '+' : v < 0 ? '-' : '0')).join('');
      expect(seen).toBe(signs);
    }
    const more = await checkPart(arrangement, '+++-\n++--\n+++-\n++--\n\n+++-\n');
    expect(more.counts).toMatchObject({ matched: 1, missing: 5, extra: 1, repeated: 3 });
    expect(more.extra).toEqual([{ line: 2, text: '++--', reason: 'no point has these signs' }]);
    expect(more.repeated).toEqual([
      { lines: [1, 3, 6], text: '+++-' },
      { lines: [2, 4], text: '++--' },
    ]);
  });

  it('stands beside vertices in our own list of regions, and both are checked', async () => {
    const signs = text(allSigns(cubeArrangement));
    const rows = signs.map((s, i) => `${s},"1 2 4",0,0,0,${cubeVertices[i]}`);
    const header = 'signs,walls,point_1,point_2,point_3,vertex_1,vertex_2,vertex_3';
    const { parts, agrees } = await check(cubeArrangement, [header, ...rows].join('\n'));
    expect(agrees).toBe(true);
    expect(parts.map(({ kind }) => kind)).toEqual(['vertices', 'signs']);
    const short = await check(cubeArrangement, [header, ...rows.slice(1)].join('\n'));
    expect(short.parts.map((part) => (part as ListReport).counts.missing)).toEqual([1, 1]);
  });
});

describe('a number of regions', () => {
  it('is compared exactly', () => {
    // E8: 696,729,600 regions, the product of 1 + exponent (P. Orlik, L. Solomon, 1980).
    expect(crosscheckCount(696_729_600n, 696_729_600n).agrees).toBe(true);
    const big = 1_955_230_985_997_140n;
    expect(crosscheckCount(big, big + 1n)).toMatchObject({
      agrees: false,
      parts: [{ kind: 'count', ours: '1955230985997140', theirs: '1955230985997141' }],
    });
  });
});

describe('faults of a list', () => {
  const faults: [string, string, RegExp][] = [
    ['an empty file', ' \n\n', /^theirs\.csv: the list is empty/],
    ['a header alone', 'x,y,z\n', /^theirs\.csv:1:1: no row follows the header/],
    ['a number that is none', '1,2,3\n1,2,x\n', /^theirs\.csv:2:5: cannot read "x" as a number/],
    ['a ragged row', '1,2,3\n1,2\n', /^theirs\.csv:2:1: 2 cells, the first row has 3/],
    ['a wrong width', '1,2\n3,4\n', /^theirs\.csv:1:1: 2 numbers a row, the arrangement has 3/],
    ['a single number', '1\n3\n', /1 number a row, the arrangement has 3 coordinates/],
    ['JSON', '{"signs":"+++++++"}\n', /^theirs\.csv: this is JSON; give the list as CSV/],
    ['JSON of rows', '[[1,2,3]]', /^theirs\.csv: this is JSON; give the list as CSV/],
    ['short signs', '+++++++\n+++\n', /^theirs\.csv:2:1: 3 signs, the arrangement has 7 normals/],
    [
      'a zero among signs',
      '+++++++\n++0++++\n',
      /^theirs\.csv:2:1: "0" in the signs "\+\+0\+\+\+\+"/,
    ],
    ['a letter among signs', 'n,signs\n1,+++a+++\n', /^theirs\.csv:2:3: "a" in the signs/],
    ['two roots', 'sqrt(2),0,0\nsqrt(3),0,0\n', /^theirs\.csv:2:1: sqrt\(3\) beside sqrt\(2\)/],
    ['an open quote', '1,2,3\n"1,2,3\n', /^theirs\.csv:\d+.*quote/],
  ];
  for (const [what, text, message] of faults) {
    it(`${what} is named with its place`, async () => {
      const error = await readTheirList(bytes(text), 'theirs.csv', cubeArrangement).catch((e) => e);
      expect(error).toBeInstanceOf(InputError);
      expect(error.message).toMatch(message);
    });
  }
});

describe('the report as text', () => {
  it('keeps to 80 columns, cuts lists and says how much more there is', async () => {
    const report = await check(cubeArrangement, csv(cubeVertices.slice(20)));
    const lines = crosscheckLines(report, 5);
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(80);
    expect(lines).toContain('  and 15 more');
    expect(lines.at(-1)).toBe('The two do NOT agree.');
    const cut = (await check(cubeArrangement, csv(cubeVertices.slice(20)), 'x', 3)).parts[0];
    expect((cut as ListReport).missing).toHaveLength(3);
    expect((cut as ListReport).counts.missing).toBe(20);
  });
});
