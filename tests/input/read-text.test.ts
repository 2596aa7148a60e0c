// The text form: values, line endings, labels, and every fault at its line and column.
import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { readGenerators } from '../../src/input/read.js';
import { faultIn, faultOf, readAs, shown } from './reading.js';

describe('text', () => {
  it('reads labels, comments, blanks and commas', async () => {
    const list = await readAs(
      'a.txt',
      '# title\n\nfore: 1 0 -2\n  1,2 ,\t3 # three\nx: y: 0 0 1/2\n',
    );
    expect(shown(list)).toEqual([
      ['1', '0', '-2'],
      ['1', '2', '3'],
      ['0', '0', '1/2'],
    ]);
    expect(list.labels).toEqual(['fore', null, 'x: y']);
    expect(list.coordinates).toBeNull();
    expect(list.ranges).toBeNull();
    expect(list.radicand).toBeNull();
  });

  it('reads a title and names of coordinates from comments above the first normal', async () => {
    const list = await readAs(
      'a.txt',
      '# by hand\n#title:  Three winds \n# coordinates: east, up and north\n1 0 # title: no\n# title: late\n',
    );
    expect(list.title).toBe('Three winds');
    expect(list.coordinates).toEqual(['east', 'up and north']);
  });

  it('takes no offence at a comment that only looks like one of these', async () => {
    for (const comment of [
      'title:',
      'title: \u001b[31m',
      'coordinates: metres',
      'coordinates: x, x',
      'coordinates: x,',
      'titles: a',
    ]) {
      const list = await readAs('a.txt', `# ${comment}\n1 0\n`);
      expect([list.title, list.coordinates], comment).toEqual([null, null]);
    }
  });

  it('takes any line ending and a byte-order mark', async () => {
    for (const end of ['\n', '\r', '\r\n']) {
      expect(shown(await readAs('a.txt', `\ufeff1 2${end}3 4${end}`))).toEqual([
        ['1', '2'],
        ['3', '4'],
      ]);
      expect(await faultIn('a.txt', `\ufeff1 2${end}${end}3 z`)).toMatch(/^3:3 /);
    }
  });

  it('brings all numbers into one field', async () => {
    const list = await readAs('a.txt', '1 sqrt(20)\n(1-sqrt(5))/2 0');
    expect(list.radicand).toBe(5n);
    expect(shown(list)).toEqual([
      ['1', '2*sqrt(5)'],
      ['1/2-1/2*sqrt(5)', '0'],
    ]);
    expect(
      (await readAs('a.txt', '1 sqrt(5)-sqrt(5)\nsqrt(4) sqrt(3)*sqrt(3)')).radicand,
    ).toBeNull();
  });

  it('keeps the hash of the bytes and the name', async () => {
    const bytes = new TextEncoder().encode('1 2\n');
    const { source } = await readGenerators(bytes, '-', 'text');
    expect(source).toEqual({
      name: 'standard input',
      sha256: createHash('sha256').update('1 2\n').digest('hex'),
    });
  });

  it.each([
    ['1 0\n2 0 1', '2:1 this normal has 3 coordinates, the first has 2'],
    ['1 0\n  1', '2:3 this normal has 1 coordinate, the first has 2'],
    ['1 0\n\n0 0/3', '3:1 the normal is zero'],
    ['1 0\n0 1x', '2:4 cannot read "1x" as a number'],
    [
      '1 sqrt(2)\n1 0\n3 2*sqrt(3)',
      '3:5 sqrt(3) beside sqrt(2) on line 1: two different square roots',
    ],
    ['a: 1 0\nb: 0 1\na: 1 1', '3:1 the label "a" is used twice, first on line 1'],
    ['1 0\n2,,1', '2:3 a comma with no number before it'],
    [', 1', '1:1 a comma with no number before it'],
    ['1, 2,', '1:5 a comma with no number after it'],
    ['a:', '1:2 a label without numbers'],
    [': 1 2', '1:1 a colon without a label'],
    ['1 (1 - 2)', '1:3 a parenthesis is not closed'],
    ['# only\n', '-:- there is no normal'],
    [' \n', '-:- the file is empty'],
    ['', '-:- the file is empty'],
    ['\u{1f6a2}: 1 q', '1:6 cannot read "q" as a number'],
    ['a\u202eb: 1', '1:1 the name "a\\u202eb" has a line break or control character in it'],
    ['a\u0007b: 1', '1:1 the name "a\\u0007b" has a line break or control character in it'],
  ])('%j', async (text, expected) => {
    expect(await faultIn('a.txt', text)).toBe(expected);
  });

  it('says file, place, fault and remedy in one line', async () => {
    const fault = await faultOf(() => readAs('fleet.txt', '1 0\n1 1e999999999'));
    expect(fault.message).toBe(
      'fleet.txt:2:3: the exponent 999999999 is out of range; exponents go from -10000 to 10000; scale the normals',
    );
  });

  it('names the byte that is not UTF-8', async () => {
    const bytes = Uint8Array.from([0xef, 0xbb, 0xbf, 0x31, 0x0a, 0xef, 0xbf, 0xbd, 0xe9, 0x20]);
    const fault = await faultOf(() => readGenerators(bytes, 'a.txt'));
    expect(fault.message).toBe('a.txt:2:2: byte 0xe9 is not UTF-8; save the file as UTF-8');
    const wide = await faultOf(() =>
      readGenerators(Uint8Array.from([0xff, 0xfe, 0x31, 0]), 'a.txt'),
    );
    expect(wide.what).toBe('the text is UTF-16');
  });
});

describe('the form of a file without a telling name', () => {
  it.each([
    ['x,y\n1,2', ['x', 'y']],
    ['label,surge\na,2', ['surge']],
    ['x\n2', ['x']],
    ['1 2', null],
    ['fore: 1, 2', null],
    ['fore: 1 2', null],
    ['# thrust 1, thrust 2\n1,2', null],
    ['fore, port: 1 2', null],
    ['{fore}: 1 2', null],
    ['1 2,\n3 4', null],
    ['time: s,x\n1,2', ['time: s', 'x']],
    ['(1+sqrt(5))/2,1', null],
    [' {"normals": [[1, 2]], "coordinates": ["p", "q"]}', ['p', 'q']],
  ])('%j', async (text, coordinates) => {
    const read = () => readAs('-', text);
    if (text.startsWith('1 2,')) expect((await faultOf(read)).what).toMatch(/^a comma with no/);
    else expect((await read()).coordinates).toEqual(coordinates);
  });

  it('is looked for in a file named .txt too, where it is plain', async () => {
    expect((await readAs('a.txt', 'x,y\n1,2')).coordinates).toEqual(['x', 'y']);
    expect((await readAs('a.TXT', '{"normals": [[1, 2]], "title": "t"}')).title).toBe('t');
    expect((await readAs('a.txt', '[fore]: 1 2')).labels).toEqual(['[fore]']);
    expect((await readAs('a.txt', 'fore, port: 1 2')).labels).toEqual(['fore, port']);
    expect(await faultIn('a.txt', 'one two\n1 2')).toBe('1:1 cannot read "one" as a number');
  });
});
