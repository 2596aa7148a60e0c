// The text layout of the terminal page: nothing is wider than asked, nothing is lost.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  columnsOf,
  cut,
  grouped,
  hanging,
  padLeft,
  printable,
  table,
  wrap,
} from '../../src/census/layout.js';

const words = fc.array(fc.string({ unit: 'grapheme', minLength: 1, maxLength: 30 }), {
  maxLength: 12,
});

describe('wrapping', () => {
  it('keeps every line within the width and every character in order', () => {
    fc.assert(
      fc.property(words, fc.integer({ min: 4, max: 30 }), (list, width) => {
        const text = list.map((word) => printable(word).replaceAll(' ', '')).join(' ');
        const lines = wrap(text, width);
        for (const line of lines) expect(columnsOf(line)).toBeLessThanOrEqual(width);
        expect(lines.join('').replaceAll(' ', '')).toBe(text.replaceAll(' ', ''));
      }),
    );
  });

  it('breaks a number longer than the page, and only there', () => {
    const digits = '7'.repeat(190);
    const lines = hanging('  regions  ', digits, 80);
    expect(lines).toHaveLength(3);
    expect(lines.map((line) => line.slice(11)).join('')).toBe(digits);
    expect(wrap('one two three', 7)).toEqual(['one two', 'three']);
  });
});

describe('single values', () => {
  it('cuts by columns, wide characters counting two', () => {
    expect(columnsOf('海a\u0301b')).toBe(4);
    expect(cut('海海海海', 5)).toBe('海海…');
    expect(cut('short', 5)).toBe('short');
  });

  it('makes control characters and direction marks visible', () => {
    expect(printable('a\u001b[31mred\u202e\nnext')).toBe('a\ufffd[31mred\ufffd next');
  });

  it('groups digits as JavaScript itself does in English', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 10n ** 40n }), (n) => {
        expect(grouped(n.toString())).toBe(n.toLocaleString('en-US'));
      }),
    );
    expect(grouped('t^3 - 12345 t')).toBe('t^3 - 12,345 t');
  });
});

describe('tables', () => {
  it('aligns numbers on the right', () => {
    expect(
      table(
        ['k', 'faces'],
        [
          ['0', '1'],
          ['10', '240'],
        ],
        80,
      ),
    ).toEqual(['   k  faces', '   0      1', '  10    240']);
  });

  it('moves columns that do not fit into tables below, and wraps what never fits', () => {
    const wide = '9'.repeat(50);
    const huge = '8'.repeat(100);
    const lines = table(['k', 'a', 'b', 'c'], [['0', wide, wide, huge]], 80);
    for (const line of lines) expect(columnsOf(line)).toBeLessThanOrEqual(80);
    expect(lines.filter((line) => line.endsWith(wide))).toHaveLength(2);
    expect(lines.join('').match(/8/g)).toHaveLength(100);
    expect(padLeft('ab', 4)).toBe('  ab');
  });
});
