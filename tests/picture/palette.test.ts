// The palette's promises, computed: contrast by the formulas of WCAG 2.2 (W3C Recommendation, 2023,
// definitions of relative luminance and contrast ratio), colour vision by the matrices of G. Machado,
// M. Oliveira, L. Fernandes, 2009, A physiologically-based model for simulation of color vision
// deficiency, IEEE Trans. Vis. Comput. Graph. 15, table for severity 1 (from memory), difference by
// CIE 1976 L*a*b*.
import { describe, expect, it } from 'vitest';
import {
  faceRole,
  faceTints,
  ink,
  line,
  mark,
  normalInks,
  page,
  sideTints,
  softInk,
} from '../../src/picture/palette.js';

type Triple = readonly number[];

function linear(colour: string): Triple {
  return [1, 3, 5].map((i) => {
    const c = Number.parseInt(colour.slice(i, i + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
}

function times(matrix: readonly Triple[], vector: Triple): Triple {
  return matrix.map((row) => row.reduce((sum, x, i) => sum + x * vector[i], 0));
}

function contrast(a: string, b: string): number {
  const luminance = (c: string) => times([[0.2126, 0.7152, 0.0722]], linear(c))[0];
  const [dark, light] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (light + 0.05) / (dark + 0.05);
}

const visions: [string, readonly Triple[]][] = [
  [
    'all cones',
    [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
  ],
  [
    'no long-wave cones',
    [
      [0.152286, 1.052583, -0.204868],
      [0.114503, 0.786281, 0.099216],
      [-0.003882, -0.048116, 1.051998],
    ],
  ],
  [
    'no middle-wave cones',
    [
      [0.367322, 0.860646, -0.227968],
      [0.280085, 0.672501, 0.047413],
      [-0.01182, 0.04294, 0.968881],
    ],
  ],
  [
    'no short-wave cones',
    [
      [1.255528, -0.076749, -0.178779],
      [-0.078411, 0.930809, 0.147602],
      [0.004733, 0.691367, 0.3039],
    ],
  ],
];

function lab(rgb: Triple): Triple {
  const [x, y, z] = times(
    [
      [0.4124 / 0.9505, 0.3576 / 0.9505, 0.1805 / 0.9505],
      [0.2126, 0.7152, 0.0722],
      [0.0193 / 1.089, 0.1192 / 1.089, 0.9505 / 1.089],
    ],
    rgb.map((c) => Math.min(1, Math.max(0, c))),
  ).map((t) => (t > (6 / 29) ** 3 ? Math.cbrt(t) : (t * (29 / 6) ** 2) / 3 + 4 / 29));
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)];
}

describe('contrast', () => {
  it('agrees with the formula at its ends', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
    expect(contrast('#777777', '#777777')).toBe(1);
  });

  it('of words is at least 7', () => {
    for (const { fill } of Object.values(faceTints)) {
      expect(contrast(ink, fill)).toBeGreaterThanOrEqual(7);
    }
    for (const fill of sideTints) expect(contrast(ink, fill)).toBeGreaterThanOrEqual(7);
    expect(contrast(ink, page)).toBeGreaterThanOrEqual(7);
    expect(contrast(softInk, page)).toBeGreaterThanOrEqual(7);
  });

  it('of outlines and lines is at least 3', () => {
    for (const { stroke } of Object.values(faceTints)) {
      expect(contrast(stroke, page)).toBeGreaterThanOrEqual(3);
    }
    for (const colour of [...normalInks, mark.fill, mark.stroke]) {
      expect(contrast(colour, page)).toBeGreaterThanOrEqual(3);
    }
    expect(contrast(line, page)).toBeGreaterThanOrEqual(3);
  });
});

describe.each(visions)('tints for eyes with %s', (_, matrix) => {
  // A difference of 2.3 is just noticeable (M. Mahy, L. Van Eycken, A. Oosterlinck, 1994); three
  // times that is plain in neighbouring patches.
  it.each([
    ['faces of a poset', Object.values(faceTints).map(({ fill }) => fill)],
    ['faces of a solid', sideTints],
    ['edges of a solid', normalInks],
  ] as [string, readonly string[]][])('stay apart: %s', (_name, colours) => {
    const tints = colours.map((colour) => lab(times(matrix, linear(colour))));
    tints.forEach((a, i) => {
      for (const b of tints.slice(0, i)) {
        expect(Math.hypot(...a.map((x, k) => x - b[k]))).toBeGreaterThan(6.9);
      }
    });
  });
});

describe('roles', () => {
  it('name every dimension of every rank', () => {
    const roles = (r: number) => Array.from({ length: r + 1 }, (_, k) => faceRole(k, r));
    expect(roles(1)).toEqual(['origin', 'region']);
    expect(roles(2)).toEqual(['origin', 'wall', 'region']);
    expect(roles(3)).toEqual(['origin', 'ray', 'wall', 'region']);
    expect(roles(5)).toEqual(['origin', 'ray', 'between', 'between', 'wall', 'region']);
  });
});
