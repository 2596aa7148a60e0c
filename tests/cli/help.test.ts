// Help and version: for every command, at most 80 columns, on standard output.
import { readFileSync } from 'node:fs';
import { afterAll, describe, expect, it } from 'vitest';
import { Workplace } from './program.js';

const place = new Workplace();
afterAll(() => place.remove());

const commands = [
  [],
  ...'census regions faces flats polynomial crosscheck draw make'.split(' ').map((name) => [name]),
  ...['hasse', 'zonotope', 'tiling'].map((name) => ['draw', name]),
  ...'reflection all-subsets threshold graph generic random polar-zonohedron comparisons'
    .split(' ')
    .map((name) => ['make', name]),
];

describe('help', () => {
  for (const command of commands) {
    it(`of ${['signwright', ...command].join(' ')}`, () => {
      const help = place.output([...command, '--help']);
      expect(help).toMatch(/^Usage: signwright/);
      for (const line of help.split('\n')) expect(line.length, line).toBeLessThanOrEqual(80);
      if (command[0] !== 'make' || command.length === 1) expect(help).toContain('Example');
    });
  }

  it('names every command, and comes without arguments too', () => {
    const help = place.output([]);
    expect(help).toBe(place.output(['--help']));
    for (const [name] of commands.slice(1, 9)) expect(help).toMatch(new RegExp(`^  ${name} `, 'm'));
  });

  it('comes by the word help too', () => {
    expect(place.output(['help', 'draw', 'hasse'])).toBe(place.output(['draw', 'hasse', '--help']));
  });

  it('of make says the coordinates of every type, and lists the families', () => {
    const help = place.output(['make', '--help']);
    for (const word of [
      'e_i-e_j',
      '2e_i',
      'simple roots',
      'n+1 coordinates',
      'I2(m)',
      'A1',
      'H4',
    ]) {
      expect(help).toContain(word);
    }
    for (const [, family] of commands.slice(12)) expect(help).toContain(family);
  });
});

describe('version', () => {
  it('is that of the package', () => {
    const manifest = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
    expect(place.output(['--version'])).toBe(`${JSON.parse(manifest).version}\n`);
  });
});
