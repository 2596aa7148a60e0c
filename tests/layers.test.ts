// The one-way flow of the source: what each part may import, read from the import lines themselves.
import { readdirSync, readFileSync } from 'node:fs';
import { join, posix } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const source = fileURLToPath(new URL('../src', import.meta.url));

/** Parts that any part may use, and what they may use themselves. */
const ground = ['errors', 'limits', 'exact', 'bits'];

/** For each part the parts to its left that it may use besides the ground and itself. */
const leftOf: Record<string, string[]> = {
  errors: [],
  limits: [],
  exact: [],
  bits: [],
  input: [],
  arrangement: ['input'],
  region: ['input', 'arrangement'],
  face: ['input', 'arrangement', 'region'],
  // The polynomial and the listing of regions check each other, so neither may call the other.
  flat: ['input', 'arrangement'],
  zonotope: ['input', 'arrangement', 'region', 'face', 'flat'],
  census: ['input', 'arrangement', 'region', 'face', 'flat', 'zonotope'],
  export: ['input', 'arrangement', 'region', 'face', 'flat', 'zonotope', 'census'],
  picture: ['input', 'arrangement', 'region', 'face', 'flat', 'zonotope', 'census', 'export'],
  index: [
    'input',
    'arrangement',
    'region',
    'face',
    'flat',
    'zonotope',
    'census',
    'export',
    'picture',
  ],
  cli: [
    'input',
    'arrangement',
    'region',
    'face',
    'flat',
    'zonotope',
    'census',
    'export',
    'picture',
  ],
};

/** Packages that only some parts may load; a package not named here may be used by none. */
const packageParts: Record<string, string[]> = {
  'big-integer': ['exact', 'input', 'index', 'census'],
  'cli-progress': ['cli'],
  commander: ['cli'],
  'csv-parse': ['input', 'census'],
  d3: ['picture'],
  graphology: ['export', 'picture'],
  'graphology-gexf': ['export', 'picture'],
  'graphology-types': ['export', 'picture'],
  linkedom: ['picture'],
  'lossless-json': ['input', 'census'],
  picocolors: ['cli'],
  zod: ['input', 'census', 'export'],
  'node:crypto': ['input', 'cli'],
};

interface Import {
  readonly file: string;
  readonly part: string;
  /** A package, or a path under src. */
  readonly target: string;
  readonly relative: boolean;
}

function filesUnder(folder: string, prefix = ''): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) =>
    entry.isDirectory()
      ? filesUnder(join(folder, entry.name), `${prefix}${entry.name}/`)
      : entry.name.endsWith('.ts')
        ? [prefix + entry.name]
        : [],
  );
}

function partOf(path: string): string {
  return path.split('/')[0].replace(/\.(ts|js)$/, '');
}

/** What a source text imports: static, re-exported, dynamic, and types by import(). */
function importsOf(text: string): string[] {
  const pattern =
    /(?:\b(?:import|export)\b[^'"();]*?\bfrom\s*|\bimport\s*\(\s*|^\s*import\s+)(['"])([^'"]+)\1/gm;
  return [...text.matchAll(pattern)].map((match) => match[2]);
}

const files = filesUnder(source);
const imports: Import[] = files.flatMap((file) =>
  importsOf(readFileSync(join(source, file), 'utf8')).map((target) => ({
    file,
    part: partOf(file),
    relative: target.startsWith('.'),
    target: target.startsWith('.') ? posix.join(posix.dirname(file), target) : target,
  })),
);
const inside = imports.filter(({ relative }) => relative);
const outside = imports.filter(({ relative }) => !relative);

describe('the reader of import lines', () => {
  it('sees every way to import', () => {
    const text = `import a from './a.js';\nimport type { B } from "./b.js";\nexport * from './c.js';
      import './d.js';\nconst e = await import('./e.js');\nimport {\n  f,\n} from './f.js';\ncall('from', 'g');`;
    expect(importsOf(text)).toEqual(['./a.js', './b.js', './c.js', './d.js', './e.js', './f.js']);
  });

  it('finds the source', () => {
    expect(files.length).toBeGreaterThan(20);
    expect(inside.length).toBeGreaterThan(files.length);
  });
});

describe('layers', () => {
  it('knows every part', () => {
    expect(files.map(partOf).filter((part) => !(part in leftOf))).toEqual([]);
  });

  it('imports only from the left', () => {
    const wrong = inside.filter(({ part, target }) => {
      const to = partOf(target);
      return to !== part && !ground.includes(to) && !leftOf[part].includes(to);
    });
    expect(wrong).toEqual([]);
  });

  it('keeps the ground to itself', () => {
    const wrong = inside.filter(
      ({ part, target }) => ground.includes(part) && !ground.includes(partOf(target)),
    );
    expect(wrong).toEqual([]);
  });

  it('loads packages only where they belong', () => {
    const wrong = outside.filter(({ part, target }) => {
      if (target.startsWith('node:') && part === 'cli') return false;
      const name = target.startsWith('node:') ? target : target.split('/')[0];
      return !packageParts[name]?.includes(part);
    });
    expect(wrong).toEqual([]);
  });

  it('keeps the process out of everything but the command line', () => {
    const wrong = files.filter(
      (file) =>
        partOf(file) !== 'cli' &&
        /\bprocess\.(argv|env|exit|std(in|out|err)|on|cwd|exitCode)\b/.test(
          readFileSync(join(source, file), 'utf8'),
        ),
    );
    expect(wrong).toEqual([]);
  });
});
