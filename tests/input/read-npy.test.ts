// NPY files written by NumPy 2.4.6 (numpy.lib.format.write_array), values as given to it.
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readGenerators } from '../../src/input/read.js';
import { faultOf, shown } from './reading.js';

const file = (name: string) => readFileSync(new URL(`npy/${name}.npy`, import.meta.url));
const read = (name: string) => readGenerators(file(name), `${name}.npy`);

const large = [
  ['9223372036854775807', '-9223372036854775808'],
  ['1', '-1'],
  ['0', '7'],
];

describe('NPY', () => {
  it.each([
    ['int64-v1', large],
    ['int64-big-endian-fortran-v2', large],
    ['uint64-v3', [['18446744073709551615', '1']]],
    ['int8', [['-128', '127']]],
    ['uint16-big-endian', [['65535', '256']]],
    // 0.1 as Python's fractions.Fraction(0.1) and Fraction(float(numpy.float32(0.1))) give it.
    ['double-big-endian', [['3602879701896397/36028797018963968', '-3/4']]],
    ['float32', [['13421773/134217728', '5/2']]],
  ])('reads %s', async (name, expected) => {
    expect(shown(await read(name))).toEqual(expected);
  });

  it('reads the smallest and the largest doubles as they are', async () => {
    const { normals } = await read('double');
    expect(normals[0]![2]).toEqual({ a: 1n, b: 0n, d: 2n ** 1074n });
    expect(normals[1]![0]).toEqual({ a: BigInt(1e300), b: 0n, d: 1n });
    expect(normals[1]![2]).toEqual({ a: 0n, b: 0n, d: 1n });
  });

  it('is known by its first bytes on standard input, at any offset of a buffer', async () => {
    const bytes = file('int64-v1');
    const shifted = new Uint8Array(bytes.length + 3);
    shifted.set(bytes, 3);
    expect(shown(await readGenerators(shifted.subarray(3), '-'))).toEqual(large);
  });

  it.each([
    ['nan', 'row 2, column 2 is not a finite number'],
    ['vector', 'an array of shape (2,)'],
    ['complex', 'entries of type "<c16"'],
    ['records', 'a table of named columns'],
    ['zero-row', 'the normal is zero'],
  ])('refuses %s', async (name, what) => {
    const fault = await faultOf(() => read(name));
    expect(fault.what).toBe(what);
    expect(fault.position?.file).toBe(`${name}.npy`);
  });

  it('refuses files cut short, too long, of another version or kind', async () => {
    const bytes = Uint8Array.from(file('int64-v1'));
    const what = async (changed: Uint8Array, name = 'a.npy') =>
      (await faultOf(() => readGenerators(changed, name))).what;
    expect(await what(bytes.subarray(0, bytes.length - 1))).toBe(
      '47 bytes of entries where 48 are needed',
    );
    expect(await what(bytes.subarray(0, 60))).toBe('the NPY header is cut short');
    expect(await what(bytes.subarray(0, 8))).toBe('this is not a whole NPY file');
    const later = bytes.slice();
    later[6] = 4;
    expect(await what(later)).toBe('NPY version 4 is not known');
    expect(await what(new TextEncoder().encode('1 2 3 4 5 6 7'))).toBe(
      'this is not a whole NPY file',
    );
    expect(await what(bytes, 'a.csv')).toBe('these are the bytes of an NPY file');
  });
});
