// Bad input and usage: one line on standard error, the right status, nothing on standard output.
import { mkdirSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { fourPlanes, Workplace } from './program.js';

const place = new Workplace();
place.write('four.txt', fourPlanes);
place.write('ragged.txt', '1 0 0\n0 1\n');
place.write('zero.txt', '1 0\n0 0\n');
place.write('word.txt', '1 0\n0 one\n');
place.write('empty.txt', '# nothing\n');
place.write('roots.txt', 'sqrt(2) 0\n0 sqrt(3)\n');
place.write('twice.csv', 'label,x,y\na,1,0\na,0,1\n');
place.write('broken.json', '{"normals": [[1, 0], [0, 1]');
place.write('huge.txt', '1e999999999 0\n0 1\n');
mkdirSync(join(place.folder, 'folder'));
afterAll(() => place.remove());

function failure(args: readonly string[], input = ''): { status: number | null; line: string } {
  const { status, stdout, stderr } = place.run(args, input);
  expect(stdout, args.join(' ')).toBe('');
  expect(stderr, args.join(' ')).toMatch(/^signwright: [^\n]+\n$/);
  return { status, line: stderr.trimEnd() };
}

describe('bad input', () => {
  const cases: [string, RegExp][] = [
    ['ragged.txt', /ragged\.txt:2:\d+: .*;/],
    ['zero.txt', /zero\.txt:2/],
    ['word.txt', /word\.txt:2:3/],
    ['empty.txt', /empty\.txt/],
    ['roots.txt', /roots\.txt:2:3/],
    ['twice.csv', /twice\.csv:3/],
    ['broken.json', /broken\.json:1/],
    ['huge.txt', /huge\.txt:1/],
    ['nowhere.txt', /nowhere\.txt: no such file/],
    ['folder', /folder: is a folder/],
  ];
  for (const [name, pattern] of cases) {
    it(`names the place: ${name}`, () => {
      const { status, line } = failure(['census', name]);
      expect(line).toMatch(pattern);
      expect(status).toBe(name === 'huge.txt' ? status : 2);
      expect([2, 3]).toContain(status);
    });
  }

  it('leaves no file behind', () => {
    failure(['regions', 'ragged.txt', '-o', 'left.csv']);
    expect(readdirSync(place.folder).filter((name) => name.includes('left'))).toEqual([]);
  });
});

describe('bad usage', () => {
  const cases: [string, RegExp][] = [
    ['bogus', /unknown command 'bogus'; see: signwright --help/],
    ['help bogus', /unknown command 'bogus'/],
    ['censu four.txt', /did you mean census\? See: signwright --help$/],
    ['census', /missing required argument/],
    ['census four.txt four.txt', /too many arguments/],
    ['census four.txt --jsn', /unknown option '--jsn'; did you mean --json\?/],
    ['census four.txt --format pdf', /take text, markdown, latex or json/],
    ['census four.txt --json --format latex', /two formats/],
    ['census four.txt --threads 4', /--threads 4: this version runs on one thread/],
    ['census four.txt --memory lots', /write it as 500MB or 4GB/],
    ['census four.txt --budget -1', /--budget/],
    ['regions four.txt -o regions.xyz', /add --format/],
    ['regions four.txt -o folder', /folder/],
    ['regions four.txt -o folder/missing/r.csv', /r\.csv: there is no folder folder\/missing;/],
    ['regions four.txt -o zero.txt/r.csv', /zero\.txt\/r\.csv: a part of the path is not a folder/],
    ['census four.txt --record folder/missing/r.json', /there is no folder folder\/missing;/],
    ['faces four.txt --edges folder/', /--edges folder\/: is a folder/],
    ['census four.txt --json -o ./four.txt', /--out \.\/four\.txt: four\.txt is read too/],
    ['census four.txt --record r.json -o ./r.json', /--out is written to it too/],
    ['faces four.txt --dimension 4', /dimensions 0 to 3/],
    ['faces four.txt --dimension 1 --graph', /--dimension does not go with a graph/],
    ['faces four.txt --graph --format csv', /--edges FILE/],
    ['flats four.txt --edges e.csv --json', /graphs in CSV/],
    ['polynomial four.txt --route finite-field', /not in this version/],
    ['polynomial four.txt --route guess', /no such route/],
    ['crosscheck four.txt', /nothing to check/],
    ['crosscheck four.txt four.txt --regions 14', /a list and a number/],
    ['crosscheck - -', /given twice/],
    ['crosscheck four.txt --regions many', /not an integer/],
    ['draw hasse four.txt --above=+0', /2 signs for 4 normals/],
    ['draw hasse four.txt --above=++++ --below=----', /give one of them/],
    ['draw sphere four.txt', /this version has no such picture/],
    ['draw hasse', /missing required argument .* draw hasse --help/],
    ['draw -o a.svg hasse four.txt', /before -o; write: signwright draw hasse -o a\.svg four\.txt/],
    ['-o r.csv regions four.txt', /before -o; write: signwright regions -o r\.csv four\.txt/],
    ['draw four.txt hasse', /write: signwright draw hasse four\.txt/],
    ['four.txt draw hasse', /write: signwright draw hasse four\.txt/],
    ['four.txt census', /write: signwright census four\.txt/],
    ['make B3 reflection', /write: signwright make reflection B3/],
    ['make', /give reflection, all-subsets/],
    ['make dodecahedron', /no such family/],
    ['make reflection Z9', /Z9/],
    ['make graph', /--complete N/],
    ['make graph --complete 4 --cycle 4', /more than one graph/],
    ['make graph --grid 3by4', /3x4/],
    ['make graph --complete 1', /--complete 1: too small; give 2 or more/],
    ['make graph --complete 99999999999999999999', /too large/],
    ['make generic --rank 3', /--normals/],
    ['make random --rank 2 --normals 3 --bound x', /not an integer/],
    ['symmetry four.txt', /this version has no such command/],
  ];
  for (const [line, pattern] of cases) {
    it(`says how to mend it: ${line}`, () => {
      const { status, line: said } = failure(line.split(' '));
      expect(said).toMatch(pattern);
      expect(status).toBe(2);
    });
  }
});

it('shows no control character of a name or an argument', () => {
  for (const name of ['a\u001b[31mb', 'a\nb', 'a\u202eb']) {
    expect(failure(['census', name]).line).toMatch(/^signwright: a\ufffd(\[31m)?b: no such file;/);
    expect(failure(['census', `--${name}`]).line).not.toMatch(/[\p{Cc}\u202e]/u);
  }
});

describe('limits', () => {
  it('refuses a list that does not fit, with status 3, and says what it needs', () => {
    place.output(['make', 'all-subsets', '6', '-o', 'six.txt']);
    // OEIS A034997: 1,066,044 regions.
    const { status, line } = failure(['regions', 'six.txt', '--memory', '1MB']);
    expect(status).toBe(3);
    expect(line).toMatch(/1,066,044 regions: needs about \d+ MB .*the limit is 1 MB.*--memory/);
    expect(failure(['flats', 'six.txt', '--memory', '1MB']).status).toBe(3);
    expect(failure(['faces', 'six.txt', '--graph', '--memory', '1MB']).status).toBe(3);
    expect(failure(['make', 'all-subsets', '40']).status).toBe(3);
  });
});
