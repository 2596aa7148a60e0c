// What kind of arrangement it is, against theorems on graphs, published tables and slow search.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { takeCensus } from '../../src/census/census.js';
import type { CensusRecord } from '../../src/census/record.js';
import { type Stages, standardStages } from '../../src/census/stages.js';
import { completeGraph, cycleGraph } from '../../src/input/families/graph.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { allSubsets } from '../../src/input/families/subsets.js';
import type { GeneratorList } from '../../src/input/generators.js';
import { generatorsOf } from '../support/arrangements.js';

function propertiesOf(list: GeneratorList): CensusRecord['properties'] {
  // Properties need no look at single regions.
  const stages: Stages = { ...standardStages, examineRegions: () => null };
  return takeCensus(buildArrangement(list), { stages }).properties;
}

type Edge = readonly [number, number];

/** The hyperplanes x_i = x_j of a graph. */
function graphic(vertices: number, edges: readonly Edge[]): GeneratorList {
  return generatorsOf(
    edges.map(([a, b]) =>
      Array.from({ length: vertices }, (_, v) => (v === a ? 1 : v === b ? -1 : 0)),
    ),
  );
}

const graphs = fc.integer({ min: 3, max: 6 }).chain((vertices) => {
  const pairs: Edge[] = [];
  for (let a = 0; a < vertices; a++) for (let b = a + 1; b < vertices; b++) pairs.push([a, b]);
  return fc.subarray(pairs, { minLength: 1 }).map((edges) => ({ vertices, edges }));
});

/** A vertex whose neighbours are all joined is taken away as long as there is one. */
function isChordal(vertices: number, edges: readonly Edge[]): boolean {
  const joined = (a: number, b: number) =>
    edges.some(([p, q]) => (p === a && q === b) || (p === b && q === a));
  let left = Array.from({ length: vertices }, (_, v) => v);
  while (left.length > 0) {
    const free = left.find((v) => {
      const near = left.filter((u) => u !== v && joined(u, v));
      return near.every((a) => near.every((b) => a === b || joined(a, b)));
    });
    if (free === undefined) return false;
    left = left.filter((v) => v !== free);
  }
  return true;
}

/** All edges in one block: any two on a common cycle, or a single edge. */
function isOneBlock(edges: readonly Edge[]): boolean {
  const touched = [...new Set(edges.flat())];
  const connected = (without: number | null) => {
    const left = touched.filter((v) => v !== without);
    const reached = new Set(left.slice(0, 1));
    for (let round = 0; round < left.length; round++) {
      for (const [a, b] of edges) {
        if (a === without || b === without) continue;
        if (reached.has(a)) reached.add(b);
        if (reached.has(b)) reached.add(a);
      }
    }
    return reached.size === left.length;
  };
  return connected(null) && touched.every((v) => touched.length === 2 || connected(v));
}

describe('supersolvable', () => {
  it('is what a chordal graph gives (R. Stanley, 1972, Supersolvable lattices)', () => {
    let both = 0;
    fc.assert(
      fc.property(graphs, ({ vertices, edges }) => {
        const chordal = isChordal(vertices, edges);
        both |= chordal ? 1 : 2;
        expect(propertiesOf(graphic(vertices, edges)).supersolvable).toBe(chordal);
      }),
      { numRuns: 60 },
    );
    expect(both).toBe(3);
  });

  it('is A and B, not D, E, F, H of rank above 2, though all their roots are integers', () => {
    // T. Hoge, G. Röhrle, 2014, On supersolvable reflection arrangements, Proc. AMS 142 (from memory).
    for (const type of ['A2', 'A5', 'B3', 'B5', 'C4', 'G2', 'I2(8)']) {
      expect(propertiesOf(reflectionArrangement(type)).supersolvable, type).toBe(true);
    }
    for (const type of ['D4', 'D5', 'E6', 'F4', 'H3', 'H4']) {
      expect(propertiesOf(reflectionArrangement(type)).supersolvable, type).toBe(false);
    }
  });
});

describe('irreducible', () => {
  it('is a graph of one block', () => {
    let both = 0;
    fc.assert(
      fc.property(graphs, ({ vertices, edges }) => {
        const one = isOneBlock(edges);
        both |= one ? 1 : 2;
        expect(propertiesOf(graphic(vertices, edges)).irreducible).toBe(one);
      }),
      { numRuns: 60 },
    );
    expect(both).toBe(3);
  });
});

describe('generic', () => {
  it('is every r of the hyperplanes independent, by determinants', () => {
    const rows = fc
      .array(fc.tuple(...new Array(3).fill(fc.integer({ min: -3, max: 3 }))), {
        minLength: 3,
        maxLength: 7,
      })
      .map((list) => list as [number, number, number][]);
    const det = (a: number[], b: number[], c: number[]) =>
      a[0] * (b[1] * c[2] - b[2] * c[1]) -
      a[1] * (b[0] * c[2] - b[2] * c[0]) +
      a[2] * (b[0] * c[1] - b[1] * c[0]);
    let both = 0;
    fc.assert(
      fc.property(rows, (list) => {
        const minors: number[] = [];
        list.forEach((a, i) => {
          list.slice(i + 1).forEach((b, j) => {
            for (const c of list.slice(i + j + 2)) minors.push(det(a, b, c));
          });
        });
        // Distinct hyperplanes that span, so that no pair is parallel.
        const cross = (a: number[], b: number[]) =>
          [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]].some(
            (x) => x !== 0,
          );
        fc.pre(list.every((a, i) => list.slice(i + 1).every((b) => cross(a, b))));
        fc.pre(minors.some((m) => m !== 0));
        const generic = minors.every((m) => m !== 0);
        both |= generic ? 1 : 2;
        expect(propertiesOf(generatorsOf(list)).generic).toBe(generic);
      }),
      { numRuns: 100 },
    );
    expect(both).toBe(3);
  });
});

describe('simplicial', () => {
  it('is every reflection arrangement (J. Humphreys, 1990, section 1.12)', () => {
    for (const type of ['A1', 'A4', 'B4', 'D4', 'F4', 'H3', 'I2(5)']) {
      expect(propertiesOf(reflectionArrangement(type)).simplicial, type).toBe(true);
    }
  });

  it('is no longer generic planes, cycles, or 0/1 vectors past R^3', () => {
    // The 0/1 vectors in R^3 are A(7,1) of B. Grünbaum, 2009.
    expect(propertiesOf(allSubsets(3)).simplicial).toBe(true);
    expect(propertiesOf(allSubsets(4)).simplicial).toBe(false);
    expect(propertiesOf(cycleGraph(4)).simplicial).toBe(false);
    expect(propertiesOf(completeGraph(4)).simplicial).toBe(true);
  });
});

describe('lines by multiplicity', () => {
  it('are the t-vectors of the catalogue (B. Grünbaum, 2009)', () => {
    const t = (list: GeneratorList) => propertiesOf(list).linesByMultiplicity;
    expect(t(reflectionArrangement('A3'))).toEqual({ 2: '3', 3: '4' });
    expect(t(allSubsets(3))).toEqual({ 2: '3', 3: '6' });
    expect(t(reflectionArrangement('B3'))).toEqual({ 2: '6', 3: '4', 4: '3' });
    expect(t(reflectionArrangement('H3'))).toEqual({ 2: '15', 3: '10', 5: '6' });
    expect(t(reflectionArrangement('A4'))).toBeNull();
  });
});
