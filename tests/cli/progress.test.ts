// The progress on a terminal: it clears its line, and gives way to a result on the same terminal.
import type { SingleBar } from 'cli-progress';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Progress } from '../../src/cli/progress.js';

afterEach(() => vi.restoreAllMocks());

/** Writes to standard error while `work` runs. */
function written(work: () => void): string[] {
  const spy = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
  work();
  return spy.mock.calls.map(([text]) => String(text));
}

const noBar = (): SingleBar => {
  throw new Error('no bar is drawn here');
};

describe('progress', () => {
  it('clears the line of a stage before the next', () => {
    const progress = new Progress(noBar);
    const texts = written(() => {
      progress.stage('one');
      progress.stage('two');
      progress.end();
    });
    expect(texts).toEqual(['one ...', '\r\u001b[K', 'two ...', '\r\u001b[K']);
  });

  it('is silent once it has given way', () => {
    const progress = new Progress(noBar);
    const texts = written(() => {
      progress.stage('one');
      progress.silence();
      progress.stage('two');
      progress.part(1, 2);
      progress.end();
    });
    expect(texts).toEqual(['one ...', '\r\u001b[K']);
  });

  it('is silent where there is no terminal', () => {
    const progress = new Progress(null);
    expect(written(() => progress.stage('one'))).toEqual([]);
  });
});
