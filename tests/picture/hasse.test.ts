// The Hasse diagram taken apart again: what is drawn is the poset, every label stands free inside the
// sheet, and no text of an input can break the document. The files in references/ were looked at,
// on screen and in print size, before they were kept.
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { describe, expect, it } from 'vitest';
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { buildArrangement } from '../../src/arrangement/build.js';
import { InputError } from '../../src/errors.js';
import type { FacePoset } from '../../src/face/poset.js';
import type { HasseOptions } from '../../src/picture/hasse.js';
import { drawHasse } from '../../src/picture/hasse.js';
import { faceSigns } from '../../src/picture/selection.js';
import { signAdvance } from '../../src/picture/sheet.js';
import { allSubsets, arrangementOf, generatorsOf, typeA } from '../support/arrangements.js';
import { slowPoset } from '../support/slow-poset.js';

// biome-ignore lint/suspicious/noExplicitAny: parsed XML has no type of its own.
type Parsed = any;

interface Box {
  readonly id: string;
  readonly label: string;
  readonly title: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly turned: boolean;
}

function parse(svg: string): Parsed {
  expect(XMLValidator.validate(svg)).toBe(true);
  const parsed = new XMLParser({
    ignoreAttributes: false,
    attributeNamePrefix: '',
    textNodeName: '#text',
    parseTagValue: false,
    htmlEntities: true,
    isArray: (name, _path, _leaf, isAttribute) =>
      !isAttribute && ['g', 'path', 'text', 'rect', 'line'].includes(name),
  }).parse(svg);
  return parsed.svg;
}

function group(svg: Parsed, name: string): Parsed {
  return svg.g.find((g: Parsed) => g.class === name);
}

function words(element: Parsed): string {
  return typeof element === 'string' ? element : (element?.['#text'] ?? '');
}

function boxesOf(svg: Parsed): Box[] {
  return group(svg, 'faces').g.map((g: Parsed) => {
    const [x, y] = /translate\((\S+) (\S+)\)/.exec(g.transform)!.slice(1).map(Number);
    return {
      id: g.id,
      label: words(g.text[0]),
      title: words(g.title),
      x,
      y,
      width: Number(g.rect[0].width),
      height: Number(g.rect[0].height),
      turned: g.text[0].transform === 'rotate(-90)',
    };
  });
}

/** Lines between layers, as pairs of labels, found again by where they begin and end. */
function coversOf(svg: Parsed, boxes: readonly Box[]): string[] {
  const covers: string[] = [];
  for (const path of group(svg, 'covers').path) {
    const own = boxes.find((box) => box.id === `hasse-${path['data-face']}`)!;
    for (const [, x1, , x2, y2] of path.d.matchAll(/M(\S+) (\S+?)L(\S+) ([\d.]+)/g)) {
      expect(Number(x1)).toBe(own.x);
      const above = boxes.filter((box) => box.x === Number(x2) && box.y < Number(y2));
      const nearest = above.sort((a, b) => b.y - a.y)[0];
      covers.push(`${own.label} ${nearest.label}`);
    }
  }
  return covers.sort();
}

function coversWanted(arrangement: Arrangement, poset: FacePoset): string[] {
  const signs = faceSigns(arrangement, poset);
  const wanted: string[] = [];
  for (let f = 0; f < poset.faceCount; f++) {
    for (let c = poset.coverOffsets[f]; c < poset.coverOffsets[f + 1]; c++) {
      wanted.push(`${signs(f)} ${signs(poset.coverTargets[c])}`);
    }
  }
  return wanted.sort();
}

function expectReadable(svg: Parsed, boxes: readonly Box[]): void {
  const [, , width, height] = svg.viewBox.split(' ').map(Number);
  const font = Number(group(svg, 'faces')['font-size']);
  expect(font).toBeGreaterThanOrEqual(5.5);
  const sorted = [...boxes].sort((a, b) => a.x - b.x);
  const touching: string[] = [];
  sorted.forEach((a, i) => {
    expect(a.x - a.width / 2).toBeGreaterThan(20);
    expect(a.x + a.width / 2).toBeLessThan(width - 20);
    expect(a.y - a.height / 2).toBeGreaterThan(20);
    expect(a.y + a.height / 2).toBeLessThan(height - 20);
    expect(a.label.length * signAdvance * font).toBeLessThan(a.turned ? a.height : a.width);
    for (const b of sorted.slice(i + 1)) {
      const apart =
        Math.abs(a.x - b.x) >= (a.width + b.width) / 2 ||
        Math.abs(a.y - b.y) >= (a.height + b.height) / 2;
      if (!apart) touching.push(`${a.label} and ${b.label}`);
    }
  });
  expect(touching).toEqual([]);
}

const cases: [string, Arrangement, number][] = [
  ['the hexagon', arrangementOf(typeA(2)), 13],
  ['A3', arrangementOf(typeA(3)), 75],
  ['A4', arrangementOf(typeA(4)), 541],
  ['all 0/1 vectors in space', arrangementOf(allSubsets(3)), 99],
  [
    'parallel normals and a lineality space',
    arrangementOf([
      [1, 0, 1],
      [-2, 0, -2],
      [0, 1, 0],
    ]),
    9,
  ],
  ['one normal', arrangementOf([[2, -1]]), 3],
];

// Faces in all: 13, 75 and 541 are the ordered Bell numbers (OEIS A000670); 99 = 32 + 48 + 18 + 1
// (the vertices of the zonotope of all 0/1 vectors are OEIS A034997).
describe.each(cases)('%s', (_, arrangement, faces) => {
  const poset = slowPoset(arrangement);
  for (const orientation of ['landscape', 'portrait'] as const) {
    it(`is drawn whole, ${orientation}: each face and cover once, no label over another`, () => {
      const text = drawHasse(arrangement, poset, { orientation });
      const svg = parse(text);
      const boxes = boxesOf(svg);
      expect(boxes.length).toBe(faces);
      expectReadable(svg, boxes);
      expect(coversOf(svg, boxes)).toEqual(coversWanted(arrangement, poset));
      expect(drawHasse(arrangement, poset, { orientation })).toBe(text);
    });
  }

  it('stands on its layer: all faces of a dimension between those below and above', () => {
    const boxes = boxesOf(parse(drawHasse(arrangement, poset)));
    const height = new Map(boxes.map((box) => [box.id, box.y]));
    for (let k = 0; k < poset.rank; k++) {
      const layer = (d: number) =>
        Array.from(
          { length: poset.dimensionOffsets[d + 1] - poset.dimensionOffsets[d] },
          (_, i) => height.get(`hasse-f${poset.dimensionOffsets[d] + i + 1}`)!,
        );
      expect(Math.min(...layer(k))).toBeGreaterThan(Math.max(...layer(k + 1)));
    }
  });
});

describe('parts', () => {
  const arrangement = arrangementOf(typeA(3));
  const poset = slowPoset(arrangement);
  const signs = faceSigns(arrangement, poset);
  const all = Array.from({ length: poset.faceCount }, (_, f) => signs(f));
  const below = (a: string, b: string) => [...a].every((s, i) => s === '0' || s === b[i]);
  const labels = (options: HasseOptions) =>
    boxesOf(parse(drawHasse(arrangement, poset, options)))
      .map(({ label }) => label)
      .sort();

  it('show a face with all above it, or all below', () => {
    for (const start of [all[0], all[3], all[20], all[60]]) {
      expect(labels({ part: { kind: 'above', signs: start } })).toEqual(
        all.filter((other) => below(start, other)).sort(),
      );
      expect(labels({ part: { kind: 'below', signs: start } })).toEqual(
        all.filter((other) => below(other, start)).sort(),
      );
    }
  });

  it('show regions and walls only', () => {
    expect(labels({ part: { kind: 'regions-and-walls' } })).toEqual(
      all.slice(poset.dimensionOffsets[2]).sort(),
    );
  });

  it('refuse signs that are no face, and say why', () => {
    const draw = (bad: string) => () =>
      drawHasse(arrangement, poset, { part: { kind: 'above', signs: bad } });
    expect(draw('+-+-+-')).toThrow(InputError);
    expect(draw('+-+-+-')).toThrow(/no face of the arrangement/);
    expect(draw('++')).toThrow(/2 signs for 6 normals/);
    expect(draw('++x+++')).toThrow(/'x' is not a sign/);
  });
});

describe('words', () => {
  const hostile = '</title><script>alert("x")</script> & ]]>\u0000\u0007\ud800 浮標';
  const arrangement = buildArrangement({
    ...generatorsOf([
      [1, 0],
      [0, 1],
      [1, 1],
    ]),
    title: hostile,
    labels: ['<b onload="x">', '&amp;', "'\u0001"],
  });
  const poset = slowPoset(arrangement);

  it('of an input stay words', () => {
    for (const summary of [false, true]) {
      const text = drawHasse(arrangement, poset, { summary, idPrefix: '" onload="x' });
      const svg = parse(text);
      expect(words(svg.title)).toBe('</title><script>alert("x")</script> & ]]>��� 浮標: faces');
      expect(text).not.toContain('<script');
      expect(svg.onload).toBeUndefined();
      expect([...'\u0000\u0001\u0007'].some((character) => text.includes(character))).toBe(false);
    }
    const [{ title }] = boxesOf(parse(drawHasse(arrangement, poset))).slice(-1);
    expect(title).toContain('<b onload="x">');
  });

  it('for screen readers are there and joined to the picture', () => {
    for (const summary of [false, true]) {
      const svg = parse(drawHasse(arrangement, poset, { summary, idPrefix: 'here' }));
      expect(svg.role).toBe('img');
      expect(svg['aria-labelledby']).toBe(`${svg.title.id} ${svg.desc.id}`);
      expect(svg.title.id).toBe('here-title');
      expect(words(svg.desc)).toMatch(
        /dimension 0, 1 least face; dimension 1, 6 walls; dimension 2, 6 regions/,
      );
    }
  });

  it('say one face and one line as one', () => {
    const point = arrangementOf([[2]]);
    const drawn = (part: NonNullable<HasseOptions['part']>) =>
      parse(drawHasse(point, slowPoset(point), { part }));
    const one = drawn({ kind: 'above', signs: '+' });
    expect(words(one.desc)).toMatch(/with 1 hyperplane\. .*: dimension 1, 1 region\.$/);
    expect(words(one.text[1])).toMatch(/: 1 face, 0 covers, rank 1, 1 hyperplane$/);
    const two = drawn({ kind: 'below', signs: '+' });
    expect(words(two.desc)).toMatch(/1 line joins a face to one a dimension higher/);
    expect(words(two.text[1])).toMatch(/: 2 faces, 1 cover, /);
  });

  it('at the side count the faces of each layer, and of the zonotope', () => {
    const texts = group(parse(drawHasse(arrangement, poset)), 'layers').text.map(words);
    expect(texts).toEqual([
      'dimension 0',
      '1 least face',
      'zonotope: whole zonotope',
      'dimension 1',
      '6 walls',
      'zonotope: 6 edges',
      'dimension 2',
      '6 regions',
      'zonotope: 6 vertices',
    ]);
  });

  it('of a tooltip name the zonotope face', () => {
    const plain = arrangementOf(typeA(2));
    const boxes = boxesOf(parse(drawHasse(plain, slowPoset(plain))));
    expect(boxes.find(({ label }) => label === '+0-')!.title).toMatch(
      /^\+0- \(f\d+\): wall, dimension 1\. Zonotope: edge; generators high: 1; low: 3; free: 2$/,
    );
  });
});

describe('long signs', () => {
  it('become numbers with a key, or with the signs in tooltips', () => {
    const pencil = Array.from({ length: 160 }, (_, i) => [1, i]);
    const parallel = Array.from({ length: 500 }, (_, i) => (i % 2 === 0 ? [1, 0] : [0, 1]));
    for (const [rows, keyed] of [
      [pencil, false],
      [parallel, true],
    ] as const) {
      const arrangement = arrangementOf(rows);
      const poset = slowPoset(arrangement);
      const signs = faceSigns(arrangement, poset);
      const svg = parse(drawHasse(arrangement, poset));
      const boxes = boxesOf(svg);
      expectReadable(svg, boxes);
      const ids = boxes.map((_, f) => `f${f + 1}`);
      expect(boxes.map(({ label }) => label)).toEqual(ids);
      expect(boxes.map(({ title }) => title.split(':')[0])).toEqual(
        ids.map((id, f) => `${signs(f)} (${id})`),
      );
      const key = group(svg, 'key')?.text.map((text: Parsed) => words(text).trim().split(/\s+/));
      expect(key).toEqual(keyed ? ids.map((id, f) => [id, signs(f)]) : undefined);
    }
  });
});

describe('the summary', () => {
  const generic = arrangementOf(Array.from({ length: 8 }, (_, i) => [1, i, i * i, i ** 3]));
  const poset = slowPoset(generic);
  const svg = parse(drawHasse(generic, poset));

  it('is drawn past what can be read, and says so', () => {
    expect(poset.faceCount).toBeGreaterThan(700);
    expect(group(svg, 'faces')).toBeUndefined();
    expect(group(svg, 'legend').text.map(words).join(' ')).toContain(
      `The ${poset.faceCount} faces are summed up, not drawn one by one`,
    );
  });

  it('counts every face and every cover once', () => {
    const boxes = group(svg, 'types').g.map((g: Parsed) => g.text.map(words));
    const sum = (texts: string[]) =>
      texts.reduce((total, text) => total + Number.parseInt(text, 10), 0);
    expect(sum(boxes.map(([first]: string[]) => first))).toBe(poset.faceCount);
    const lines = group(svg, 'covers').line.map((l: Parsed) => words(l.title));
    expect(sum(lines)).toBe(poset.coverTargets.length);
  });

  // Generic normals: every 2-face lies in two hyperplanes and bounds four faces; the counts are
  // 2 C(n, k) sum_{i < d - k} C(n - 1 - k, i) (T. Zaslavsky, 1975, Facing up to Arrangements).
  it('names types by hyperplanes and by what bounds what', () => {
    const boxes = group(svg, 'types').g.map((g: Parsed) => g.text.map(words));
    expect(boxes).toContainEqual(['112 rays', 'in 3 hyperplanes', 'bounded by 1', 'bounds 6']);
    expect(boxes).toContainEqual(['336 2-faces', 'in 2 hyperplanes', 'bounded by 2', 'bounds 4']);
    expect(boxes).toContainEqual(['1 least face', 'in 8 hyperplanes', 'bounds 112']);
  });

  it('keeps its boxes apart and inside the sheet, numbers off the boxes', () => {
    const [, , width, height] = svg.viewBox.split(' ').map(Number);
    const rectangle = (x: number, y: number, w: number, h: number) => ({ x, y, w, h });
    const boxes = group(svg, 'types').g.map((g: Parsed) => {
      const [x, y] = /translate\((\S+) (\S+)\)/.exec(g.transform)!.slice(1).map(Number);
      const [w, h] = [Number(g.rect[0].width), Number(g.rect[0].height)];
      return rectangle(x - w / 2, y - h / 2, w, h);
    });
    const numbers = group(svg, 'cover-counts').rect.map((r: Parsed) =>
      rectangle(Number(r.x), Number(r.y), Number(r.width), Number(r.height)),
    );
    const all = [...boxes, ...numbers];
    all.forEach((a, i) => {
      expect(a.x > 0 && a.y > 0 && a.x + a.w < width && a.y + a.h < height).toBe(true);
      for (const b of all.slice(0, i)) {
        expect(
          a.x + a.w <= b.x + 0.02 ||
            b.x + b.w <= a.x + 0.02 ||
            a.y + a.h <= b.y + 0.02 ||
            b.y + b.h <= a.y + 0.02,
        ).toBe(true);
      }
    });
  });
});

describe('pictures that were looked at', () => {
  const folder = fileURLToPath(new URL('./references/', import.meta.url));
  // Coordinates to the nearest point: far below what an eye sees on a sheet.
  const normalised = (text: string) =>
    text.replace(/-?\d+\.\d+/g, (number) => `${Math.round(Number(number)) + 0}`);

  it.each([
    ['hexagon', typeA(2), {}],
    ['a3', typeA(3), {}],
    ['a3-above', typeA(3), { part: { kind: 'above', signs: '+++000' } }],
    ['a4-summary', typeA(4), { summary: true }],
  ] as [string, number[][], HasseOptions][])('%s is as it was', (name, rows, options) => {
    const arrangement = buildArrangement({ ...generatorsOf(rows), title: name });
    const file = `${folder}${name}.svg`;
    expect(existsSync(file)).toBe(true);
    const drawn = drawHasse(arrangement, slowPoset(arrangement), options);
    expect(normalised(drawn)).toBe(normalised(readFileSync(file, 'utf8')));
  });
});
