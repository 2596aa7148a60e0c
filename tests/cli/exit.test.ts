// Errors to one line and an exit status, as the interface lists them.
import { describe, expect, it } from 'vitest';
import { endingOf } from '../../src/cli/exit.js';
import { Disagreement, InputError, LimitError } from '../../src/errors.js';

function fileError(code: string): Error {
  return Object.assign(new Error(`${code}: open 'x'`), { code, path: 'x' });
}

describe('exit status', () => {
  it('is 2, 3 and 4 for input, limits and disagreements, with their own words', () => {
    const place = { file: 'normals.txt', line: 3, column: 5 };
    expect(endingOf(new InputError('what', 'how', place))).toEqual({
      status: 2,
      message: 'normals.txt:3:5: what; how',
    });
    expect(endingOf(new LimitError('list', '5 GB', '2 GB', 'raise it')).status).toBe(3);
    expect(endingOf(new Disagreement('regions: 13 by listing, 14 by flats'))).toEqual({
      status: 4,
      message: 'regions: 13 by listing, 14 by flats',
    });
  });

  it('is 0 and silent for a closed pipe', () => {
    expect(endingOf(fileError('EPIPE'))).toEqual({ status: 0, message: null });
  });

  it('is 2 for files that cannot be read or written, and says which', () => {
    for (const code of ['ENOENT', 'EACCES', 'EISDIR', 'ENOSPC']) {
      expect(endingOf(fileError(code)).status).toBe(2);
      expect(endingOf(fileError(code)).message).toMatch(/^x: .*;/);
    }
  });

  it('is 3 where a table cannot be allocated', () => {
    let error: unknown;
    try {
      new Int32Array(2 ** 40);
    } catch (thrown) {
      error = thrown;
    }
    expect(endingOf(error).status).toBe(3);
  });

  it('is 1 for a fault of ours, on one line, asking for a report', () => {
    const { status, message } = endingOf(new TypeError('x is not\na function'));
    expect(status).toBe(1);
    expect(message).toMatch(/^a fault of the program: TypeError: x is not a function; .*report/);
    expect(endingOf('text').status).toBe(1);
  });
});
