// Pipes, files and signals: nothing half-written, nothing left behind.
import { existsSync, readdirSync, statSync, symlinkSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, describe, expect, it } from 'vitest';
import { fourPlanes, Workplace } from './program.js';

const place = new Workplace();
place.write('four.txt', fourPlanes);
place.output(['make', 'all-subsets', '6', '-o', 'six.txt']);
afterAll(() => place.remove());

const names = (part: string) => readdirSync(place.folder).filter((name) => name.includes(part));

describe('a closed pipe', () => {
  it('ends quietly, whatever is being written', () => {
    for (const command of [
      'faces six.txt',
      'regions six.txt',
      'flats six.txt',
      'census four.txt',
    ]) {
      const { status, stdout, stderr } = place.shell(`$SIGNWRIGHT ${command} | head -n 1`);
      expect(stderr, command).toBe('');
      expect(stdout.split('\n')).toHaveLength(2);
      expect(status, command).toBe(0);
    }
  });

  it('delivers all of a long list to a slow reader', () => {
    const { stdout } = place.shell('$SIGNWRIGHT flats six.txt | (sleep 0.3; wc -l)');
    // 1 + 63 + 1351 + 11445 + 35525 + 28875 + 1 flats, and the head.
    expect(Number(stdout)).toBe(1 + 63 + 1351 + 11445 + 35525 + 28875 + 1 + 1);
  });
});

describe('an interrupted command', () => {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    it(`leaves no file: ${signal}`, async () => {
      const child = place.start(['faces', 'six.txt', '-o', 'stopped.csv']);
      const ended = new Promise<number | null>((resolve) => child.on('exit', resolve));
      while (names('stopped').length === 0 && child.exitCode === null) await pause(5);
      expect(names('stopped')).toEqual([expect.stringMatching(/^stopped\.csv\.\d+\.partial$/)]);
      child.kill(signal);
      expect(await ended).toBe(130);
      expect(names('stopped')).toEqual([]);
    });
  }
});

describe('--out', () => {
  it('replaces a file only when the new one is complete', () => {
    place.write('kept.csv', 'old');
    expect(place.run(['regions', 'six.txt', '--memory', '1MB', '-o', 'kept.csv']).status).toBe(3);
    expect(place.read('kept.csv')).toBe('old');
    place.output(['regions', 'four.txt', '-o', 'kept.csv']);
    expect(place.read('kept.csv')).toBe(place.output(['regions', 'four.txt']));
    expect(names('partial')).toEqual([]);
  });

  it('writes through a link, and into a device without replacing it', () => {
    place.write('target.csv', 'old');
    symlinkSync('target.csv', join(place.folder, 'link.csv'));
    place.output(['regions', 'four.txt', '-o', 'link.csv']);
    expect(place.read('target.csv')).toContain('signs,walls');
    place.output(['regions', 'four.txt', '-o', '/dev/null']);
    expect(statSync('/dev/null').isFile()).toBe(false);
    expect(existsSync('/dev/null')).toBe(true);
  });

  it('takes - for standard output, and options that mean the same everywhere', () => {
    const plain = place.output(['regions', 'four.txt']);
    const common = ['--threads', '1', '--memory', '1GB', '--quiet', '--seed', '7'];
    expect(place.output(['regions', 'four.txt', '--out', '-', ...common])).toBe(plain);
    place.output(['make', 'reflection', 'A2', ...common]);
  });

  it('writes no progress where standard error is not a terminal', () => {
    expect(place.run(['regions', 'four.txt', '-o', 'quiet.csv'])).toMatchObject({
      status: 0,
      stdout: '',
      stderr: '',
    });
  });
});
