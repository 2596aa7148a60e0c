// The inputs to try are what fixtures/README.md says they are.
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { compareOptions } from '../../src/input/families/comparisons.js';
import { readGraph } from '../../src/input/families/graph.js';
import { readGenerators } from '../../src/input/read.js';
import { determinant, subsets } from './families/determinant.js';
import { shown } from './reading.js';

const file = (name: string) => readFileSync(new URL(`../../fixtures/${name}`, import.meta.url));

describe('fixtures', () => {
  it('survey-float.csv: seven thrusters, two parallel, two planes with three hyperplanes each', async () => {
    const list = await readGenerators(file('survey-float.csv'), 'survey-float.csv');
    expect(list.normals).toHaveLength(7);
    expect(list.coordinates).toEqual(['surge', 'sway', 'heave']);
    const { hyperplanes } = buildArrangement(list);
    expect(hyperplanes.map(({ members }) => members.length)).toEqual([2, 1, 1, 1, 1, 1]);
    const flat = [...subsets(hyperplanes, 3)].filter(
      (three) => determinant(three.map(({ normal }) => normal as bigint[])) === 0n,
    );
    expect(flat.map((three) => three.map(({ members }) => list.labels![members[0]!]))).toEqual([
      ['drive port', 'swing fore', 'swing aft'],
      ['drive port', 'lift fore', 'lift aft'],
    ]);
  });

  it('tender.csv: fifteen comparisons of six offers by four criteria', async () => {
    const list = await compareOptions(file('tender.csv'), 'tender.csv');
    expect(list.normals).toHaveLength(15);
    expect(list.coordinates).toEqual(['price', 'delivery', 'upkeep', 'warranty']);
    expect(buildArrangement(list).rank).toBe(4);
  });

  it('golden.txt: six normals over Q(sqrt 5), every two at the same angle', async () => {
    const list = await readGenerators(file('golden.txt'), 'golden.txt');
    expect(list.radicand).toBe(5n);
    const rows = list.normals.map((row) =>
      row.map((x) => (Number(x.a) + Number(x.b) * Math.sqrt(5)) / Number(x.d)),
    );
    for (const [u, v] of subsets(rows, 2)) {
      const dot = u!.reduce((sum, x, i) => sum + x * v![i]!, 0);
      // The six axes through opposite corners of an icosahedron: cosine 1/sqrt(5).
      expect(Math.abs(dot) / (1 + ((1 + Math.sqrt(5)) / 2) ** 2)).toBeCloseTo(1 / Math.sqrt(5), 12);
    }
  });

  it('the small ones', async () => {
    expect(shown(await readGenerators(file('hexagon.txt'), 'hexagon.txt'))).toEqual([
      ['1', '0'],
      ['0', '1'],
      ['1', '1'],
    ]);
    const diagonals = await readGenerators(file('cube-diagonals.txt'), 'cube-diagonals.txt');
    expect(diagonals.normals.every((row) => row.every((x) => x.a ** 2n === 1n && x.d === 1n))).toBe(
      true,
    );
    expect(buildArrangement(diagonals).hyperplanes).toHaveLength(4);
    expect(shown(await readGenerators(file('planes.npy'), 'planes.npy')).at(-1)).toEqual([
      '1/2',
      '1/4',
      '-1',
    ]);
    const winches = await readGenerators(file('winches.json'), 'winches.json');
    expect(shown(winches)[2]).toEqual(['-3/5', '4/5']);
    expect(winches.ranges?.[3]?.low).toEqual({ a: 1n, b: 0n, d: 3n });
    const paths = readGraph(file('footpaths.txt'), 'footpaths.txt');
    expect(paths.coordinates).toEqual(['mill', 'lock', 'weir', 'ferry', 'staith']);
    expect(buildArrangement(paths).hyperplanes).toHaveLength(5);
  });
});
