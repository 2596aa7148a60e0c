// The census as a terminal page, as Markdown and as LaTeX, for inputs of every kind.
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { takeCensus } from '../../src/census/census.js';
import { escapeLatex, formatLatex } from '../../src/census/latex.js';
import { columnsOf } from '../../src/census/layout.js';
import { escapeMarkdown, formatMarkdown } from '../../src/census/markdown.js';
import { formatPage } from '../../src/census/page.js';
import type { CensusRecord } from '../../src/census/record.js';
import { type Stages, standardStages } from '../../src/census/stages.js';
import { genericNormals } from '../../src/input/families/generic.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { readGenerators } from '../../src/input/read.js';

async function recordOf(text: string, name: string): Promise<CensusRecord> {
  const bytes = new TextEncoder().encode(text);
  return takeCensus(buildArrangement(await readGenerators(bytes, name)));
}

const hostile = JSON.stringify({
  title: `A | title_with *marks* <b>&amp;</b> $x^2$ 100% #1 \\begin{x} ~ ${'very '.repeat(40)}`,
  coordinates: ['surge'.repeat(20), '海流の方向'],
  normals: [
    ['123456789012345678901234567890', 1],
    ['-123456789012345678901234567890', -1],
    [0, '1/7'],
  ],
  labels: ['port|side', 'x'.repeat(300), null],
  ranges: [
    [0, 1],
    [0, 2],
    ['-1/3', 1],
  ],
});

const records: [string, CensusRecord][] = [
  ['hostile text', await recordOf(hostile, 'hostile.json')],
  ['rank 1', await recordOf('5\n-3\n', 'one.txt')],
  ['hundreds of parallels', await recordOf('1 0\n'.repeat(300), 'parallel.txt')],
  ['a long name', await recordOf('1 0\n0 1\n', `${'folder/'.repeat(30)}normals.txt`)],
  ['a quadratic field', takeCensus(buildArrangement(reflectionArrangement('H3')))],
  ['rank 7', takeCensus(buildArrangement(reflectionArrangement('A7')), { memoryBytes: 2 ** 20 })],
  ['40 in rank 12', takeCensus(buildArrangement(genericNormals(12, 13)))],
  [
    'huge coefficients',
    takeCensus(buildArrangement(reflectionArrangement('B3')), {
      stages: {
        ...standardStages,
        polynomialByDeletion: () => [-(10n ** 90n), 10n ** 70n, -9n, 1n],
      },
    }),
  ],
];

describe('the page', () => {
  for (const [name, record] of records) {
    it(`keeps to 80 columns and to printable characters: ${name}`, () => {
      const page = formatPage(record);
      for (const line of page.split('\n')) expect(columnsOf(line), line).toBeLessThanOrEqual(80);
      expect(page).not.toMatch(/[^\P{Cc}\n]/u);
      expect(page).not.toMatch(/ \n/);
      expect(page).toContain(`${record.checks.length}`);
      expect(page.endsWith('\n')).toBe(true);
    });
  }

  it('gives every count of the record', () => {
    const record = takeCensus(buildArrangement(reflectionArrangement('A4')));
    const page = formatPage(record);
    for (const count of [...(record.faces ?? []), ...(record.flats ?? [])]) {
      expect(page).toMatch(new RegExp(`\\b${count}\\b`));
    }
    expect(page).toContain('(t - 1) (t - 2) (t - 3) (t - 4)');
    for (const { claim, routes } of record.checks) {
      expect(page).toContain(claim);
      for (const { route } of routes) expect(page).toContain(route);
    }
  });

  it('shows both values of a check that fails, and how many do', () => {
    const wrong: Partial<Stages> = { countFaces: () => [1, 26, 70, 48] };
    const stages = { ...standardStages, ...wrong };
    const page = formatPage(takeCensus(buildArrangement(reflectionArrangement('B3')), { stages }));
    expect(page).toMatch(/^Checks: 3 of 13 DISAGREE$/m);
    expect(page).toMatch(/^ {2}faces by dimension +DISAGREE$/m);
    expect(page).toMatch(/^ {4}listing +1 26 70 48$/m);
    expect(page).toMatch(/^ {4}Moebius values of flats +1 26 72 48$/m);
  });

  it('cautions where names or ranges stand for something real, and only there', async () => {
    const caution = 'local codes and licensed practice decide';
    const flat = (page: string) => page.replace(/\s+/g, ' ');
    expect(flat(formatPage(records[0][1]))).toContain(caution);
    expect(flat(formatMarkdown(records[0][1]))).toContain(caution);
    expect(flat(formatLatex(records[0][1]))).toContain(caution);
    const plain = await recordOf('1 0\n0 1\n', 'plain.txt');
    expect(formatPage(plain)).not.toContain('licensed');
  });

  it('says what was not run and what would let it', () => {
    const page = formatPage(records[5][1]);
    expect(page).toContain('Not run');
    expect(page.replace(/\s+/g, ' ')).toMatch(/regions by listing: 40,320 regions: .*--memory/);
  });
});

describe('Markdown', () => {
  it('has tables whose rows have as many cells as their head, whatever the text', () => {
    for (const [name, record] of records) {
      const blocks = formatMarkdown(record).split('\n\n');
      const tables = blocks.filter((block) => block.startsWith('|'));
      expect(tables.length, name).toBeGreaterThanOrEqual(3);
      for (const table of tables) {
        const cells = table
          .trim()
          .split('\n')
          .map((line) => line.match(/(?<!\\)\|/g)?.length);
        expect(new Set(cells).size, table).toBe(1);
      }
    }
  });

  it('escapes what could be markup', () => {
    expect(escapeMarkdown('a*b_c|d<e>&[f](g)')).toBe('a\\*b\\_c\\|d&lt;e&gt;&amp;\\[f\\]\\(g\\)');
    expect(formatMarkdown(records[0][1])).not.toContain('<b>');
  });
});

describe('LaTeX', () => {
  it('has balanced braces and environments, and as many cells in each row', () => {
    for (const [name, record] of records) {
      const text = formatLatex(record).replace(/^%.*$/gm, '');
      const plain = text.replace(/\\[\\{}]/g, '');
      let depth = 0;
      for (const c of plain) {
        depth += c === '{' ? 1 : c === '}' ? -1 : 0;
        expect(depth, name).toBeGreaterThanOrEqual(0);
      }
      expect(depth, name).toBe(0);
      expect(plain.match(/\\begin/g)?.length).toBe(plain.match(/\\end/g)?.length);
      expect((plain.match(/(?<!\\)\$/g)?.length ?? 0) % 2).toBe(0);
      const bodies = [...text.matchAll(/\\begin\{tabular\}\{[^\n]*\}\n([\s\S]*?)\\end/g)];
      expect(bodies).toHaveLength(2);
      for (const [, body] of bodies) {
        const rows = body.split('\n').filter((row) => row.endsWith('\\\\'));
        const cells = rows.map((row) => row.split(/(?<!\\)&/).length);
        expect(new Set(cells).size, body).toBe(1);
      }
    }
  });

  it('escapes all ten special characters of TeX', () => {
    // D. Knuth, 1984, The TeXbook, chapter 7: \ { } $ & # ^ _ % ~ have meanings of their own.
    expect(escapeLatex('"')).toBe('\\symbol{34}');
    expect(escapeLatex('\\{}$&#^_%~')).toBe(
      '\\textbackslash{}\\{\\}\\$\\&\\#\\textasciicircum{}\\_\\%\\textasciitilde{}',
    );
  });
});
