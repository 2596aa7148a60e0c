// Scored options: a normal for each pair, and the faults a table can have.
import { describe, expect, it } from 'vitest';
import { compareOptions } from '../../../src/input/families/comparisons.js';
import { faultOf, shown } from '../reading.js';

const compare = (text: string) => compareOptions(new TextEncoder().encode(text), 'o.csv');

describe('comparisons', () => {
  it('are differences of scores, exactly', async () => {
    const list = await compare('option,price,speed\nA,1,0.5\nB,1/2,2\n"C, late",0,1e1\n');
    expect(list.labels).toEqual(['A over B', 'A over C, late', 'B over C, late']);
    expect(list.coordinates).toEqual(['price', 'speed']);
    expect(shown(list)).toEqual([
      ['1/2', '-3/2'],
      ['1', '-19/2'],
      ['1/2', '-8'],
    ]);
  });

  it('drop a root that cancels', async () => {
    const list = await compare('label,x\nA,1+sqrt(5)\nB,sqrt(5)\n');
    expect(list.radicand).toBeNull();
    expect(shown(list)).toEqual([['1']]);
  });

  it.each([
    ['name,x\nA,1\nB,2', '1:1 the first column is named "name"'],
    ['option\nA\nB', '1:1 there is no criterion'],
    ['option,x\nA,1', '-:- there is nothing to compare'],
    ['option,x\nA,1\nA,2', '3:1 the option "A" is named twice, first on line 2'],
    ['option,x\n,1\nA,2', '2:1 an option has no name'],
    ['option,x,y\nA,1,2\nB,3,4\nC,1,2/1', '4:1 "A" and "C" have the same scores throughout'],
    ['option,x\nA,1\nB,', '3:3 a number is missing'],
    [
      'option,x\nA,sqrt(2)\nB,sqrt(3)',
      '3:3 sqrt(3) beside sqrt(2) on line 2: two different square roots',
    ],
  ])('refuse %j', async (text, expected) => {
    const { position, what } = await faultOf(() => compare(text));
    expect(`${position?.line ?? '-'}:${position?.column ?? '-'} ${what}`).toBe(expected);
  });
});
