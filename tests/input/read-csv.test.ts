// The CSV form (RFC 4180): values, quoting, ranges, and every fault at its line and column.
import { describe, expect, it } from 'vitest';
import { faultIn, faultOf, readAs, shown } from './reading.js';

describe('CSV', () => {
  it('reads labels, ranges and named coordinates in any order of columns', async () => {
    const list = await readAs(
      'a.csv',
      'surge,label,high,sway\r\n1,fore,2.5,0\r\n1/2,"aft, ""old""",,-1e-2\r\n0,,7, 1 + sqrt(5) \r\n',
    );
    expect(list.coordinates).toEqual(['surge', 'sway']);
    expect(list.labels).toEqual(['fore', 'aft, "old"', null]);
    expect(shown(list)).toEqual([
      ['1', '0'],
      ['1/2', '-1/100'],
      ['0', '1+sqrt(5)'],
    ]);
    expect(list.ranges?.map(({ low, high }) => [low, high])).toEqual([
      [
        { a: 0n, b: 0n, d: 1n },
        { a: 5n, b: 0n, d: 2n },
      ],
      [
        { a: 0n, b: 0n, d: 1n },
        { a: 1n, b: 0n, d: 1n },
      ],
      [
        { a: 0n, b: 0n, d: 1n },
        { a: 7n, b: 0n, d: 1n },
      ],
    ]);
  });

  it('takes any line ending, a byte-order mark and no last line ending', async () => {
    for (const end of ['\n', '\r', '\r\n']) {
      const list = await readAs('a.csv', `\ufeffx,y${end}1,2${end}"3",4`);
      expect(list.coordinates).toEqual(['x', 'y']);
      expect(shown(list)).toEqual([
        ['1', '2'],
        ['3', '4'],
      ]);
    }
  });

  it('holds a range over a quadratic field to its exact order', async () => {
    // 2889/1292 > sqrt(5) by about 1.3e-7 (a convergent of its continued fraction).
    const list = await readAs('a.csv', 'x,low,high\n1,sqrt(5),2889/1292\n');
    expect(list.radicand).toBe(5n);
    expect(await faultIn('a.csv', 'x,low,high\n1,2889/1292,sqrt(5)\n')).toBe(
      '2:3 low is not below high',
    );
  });

  it.each([
    ['x,y\n1,2,3\n', '2:5 this row has 3 cells, the header has 2'],
    ['x,y\n1,2\n1\n', '3:1 this row has 1 cell, the header has 2'],
    ['x,y,x\n1,2,3', '1:5 columns 1 and 3 are both named "x"'],
    ['label,x,label\na,1,b', '1:9 columns 1 and 3 are both named "label"'],
    ['x,,y\n1,2,3', '1:3 column 2 has no name'],
    ['x,y\n1,"2\n3,4', '2:3 this quote is not closed'],
    ['x,y\n1,"2"z\n', '2:6 text after a closing quote'],
    ['x,y\n1, "2"\n', '2:4 a quote inside a cell that does not begin with one'],
    ['x,y\n1,\n', '2:3 a number is missing'],
    ['x,y\n1,0\n\n"0",0', '4:2 the normal is zero'],
    ['x,y\n1,"0,5"\n', '2:5 cannot read "0,5" as a number'],
    ['x,label\n1,a\n2,"b"\n3,a', '4:3 the label "a" is used twice, first on line 2'],
    [
      'x,"y"\n"sqrt(2)",1\n1,"1+sqrt(3)"',
      '3:6 sqrt(3) beside sqrt(2) on line 2: two different square roots',
    ],
    [
      'label,x\n"two\nlines",1',
      '2:2 the name "two\\nlines" has a line break or control character in it',
    ],
    ['x,"a\nb"\n1,2', '1:4 the name "a\\nb" has a line break or control character in it'],
    ['x,low,high\n1,2,1', '2:3 low is not below high'],
    ['x,high\n1,0', '2:3 low is not below high'],
    ['x,low\n1,1', '2:3 low is not below high'],
    ['1,2\n3,4', '1:1 the first line holds numbers, not names of columns'],
    ['Label,x\na,1', '1:1 the column "Label" may be label or a coordinate'],
    ['x;y\n1;2', '1:1 the cells are not separated by commas'],
    ['x\ty\n1\t2', '1:1 the cells are not separated by commas'],
    ['x y\n1 2', '1:1 the cells are not separated by commas'],
    ['\nx\n1 2 3', '2:1 the cells are not separated by commas'],
    ['label,low\na,0', '1:1 no column is a coordinate'],
    ['x,y\n', '-:- there is no normal'],
  ])('%j', async (text, expected) => {
    expect(await faultIn('a.csv', text)).toBe(expected);
  });

  it('says how to mend a ragged row', async () => {
    const fault = await faultOf(() => readAs('a.csv', 'x,y\n1,2,3\n'));
    expect(fault.message).toBe(
      'a.csv:2:5: this row has 3 cells, the header has 2; give every row as many cells as the header, and quote cells that have commas',
    );
  });
});
