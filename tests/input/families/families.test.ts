// The other families: what each promises, by slow and plain means.
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../../src/arrangement/build.js';
import { InputError, LimitError } from '../../../src/errors.js';
import { genericNormals } from '../../../src/input/families/generic.js';
import {
  completeGraph,
  cycleGraph,
  gridGraph,
  readGraph,
} from '../../../src/input/families/graph.js';
import { polarZonohedron } from '../../../src/input/families/polar.js';
import { randomNormals } from '../../../src/input/families/random.js';
import { allSubsets, thresholdNormals } from '../../../src/input/families/subsets.js';
import type { GeneratorList } from '../../../src/input/generators.js';
import { faultOf, shown } from '../reading.js';
import { determinant, subsets } from './determinant.js';

const whole = (list: GeneratorList) => list.normals.map((normal) => normal.map((x) => x.a));
const bytes = (text: string) => new TextEncoder().encode(text);

describe('0/1 vectors', () => {
  it('come in numeric order, the first coordinate leading', () => {
    for (const d of [1, 2, 5]) {
      const values = whole(allSubsets(d)).map((row) => Number.parseInt(row.join(''), 2));
      expect(values).toEqual(Array.from({ length: 2 ** d - 1 }, (_, i) => i + 1));
    }
  });

  it('make threshold normals with a leading 1', () => {
    expect(whole(thresholdNormals(0))).toEqual([[1n]]);
    const rows = whole(thresholdNormals(4));
    expect(rows.map((row) => Number.parseInt(row.join(''), 2))).toEqual(
      Array.from({ length: 16 }, (_, i) => 16 + i),
    );
  });

  it('are refused where there are too many, before they are made', () => {
    expect(() => allSubsets(16)).toThrow(LimitError);
    expect(() => allSubsets(5000)).toThrow(LimitError);
    expect(() => thresholdNormals(40)).toThrow(LimitError);
    expect(() => allSubsets(0)).toThrow(InputError);
    expect(() => allSubsets(2.5)).toThrow(InputError);
    expect(() => thresholdNormals(-1)).toThrow(InputError);
  });
});

describe('generic normals', () => {
  it.each([
    [1, 5],
    [2, 14],
    [3, 12],
    [4, 11],
    [5, 9],
    [6, 6],
  ])('in R^%i, %i of them, have no vanishing maximal minor', (rank, count) => {
    const rows = whole(genericNormals(rank, count));
    expect(rows).toHaveLength(count);
    for (const chosen of subsets(rows, rank)) expect(determinant(chosen)).not.toBe(0n);
  });

  it('keep their entries small', () => {
    const largest = Math.max(
      ...whole(genericNormals(3, 1000))
        .flat()
        .map((x) => Math.abs(Number(x))),
    );
    expect(largest).toBeLessThan(1000);
  });

  it('need as many normals as the rank', () => {
    expect(() => genericNormals(4, 3)).toThrow(InputError);
    expect(() => genericNormals(1000, 1001)).toThrow(LimitError);
  });
});

describe('random normals', () => {
  it('follow SplitMix64', () => {
    // First outputs from seed 1234567, from memory of the reference implementation's test values.
    const bound = 2n ** 63n - 1n;
    const list = randomNormals({ rank: 1, count: 5, bound, seed: 1234567n });
    expect(whole(list).map(([x]) => x! + bound)).toEqual([
      6457827717110365317n,
      3203168211198807973n,
      9817491932198370423n,
      4593380528125082431n,
      16408922859458223821n,
    ]);
  });

  it('are the same from the same seed, others from another', () => {
    const make = (seed: bigint) => whole(randomNormals({ rank: 3, count: 8, bound: 5n, seed }));
    expect(make(4n)).toEqual(make(4n));
    expect(make(4n)).not.toEqual(make(5n));
  });

  it('are non-zero, within the bound, of full rank, and reach every value about as often', () => {
    const counts = new Map<bigint, number>();
    for (let seed = 0n; seed < 60n; seed += 1n) {
      const list = randomNormals({ rank: 4, count: 5, bound: 1n, seed });
      expect(buildArrangement(list).rank).toBe(4);
      for (const x of whole(list).flat()) counts.set(x, (counts.get(x) ?? 0) + 1);
    }
    expect([...counts.keys()].sort()).toEqual([-1n, 0n, 1n]);
    for (const times of counts.values()) expect(Math.abs(times - 400)).toBeLessThan(80);
    const large = randomNormals({ rank: 2, count: 40, bound: 10n ** 40n, seed: 1n });
    const sizes = whole(large)
      .flat()
      .map((x) => (x < 0n ? -x : x));
    expect(sizes.every((x) => x <= 10n ** 40n)).toBe(true);
    expect(sizes.some((x) => x > 10n ** 39n)).toBe(true);
  });

  it('refuse what makes no sense', () => {
    const base = { rank: 3, count: 5, bound: 2n, seed: 0n };
    expect(() => randomNormals({ ...base, count: 2 })).toThrow(InputError);
    expect(() => randomNormals({ ...base, bound: 0n })).toThrow(InputError);
    expect(() => randomNormals({ ...base, rank: 0 })).toThrow(InputError);
  });
});

describe('polar zonohedra', () => {
  it.each([3, 4, 5, 7, 12, 31])('with %i zones have their points on a circle, nearly even', (n) => {
    const { normals } = polarZonohedron(n);
    normals.forEach(([x, y, z], k) => {
      expect(x!.a ** 2n * y!.d ** 2n + y!.a ** 2n * x!.d ** 2n).toBe(x!.d ** 2n * y!.d ** 2n);
      expect(z).toEqual({ a: 1n, b: 0n, d: 1n });
      const turn =
        Math.atan2(Number(y!.a) / Number(y!.d), Number(x!.a) / Number(x!.d)) / (2 * Math.PI);
      const off = n * turn - k;
      expect(Math.abs(off - n * Math.round(off / n))).toBeLessThan(0.05);
    });
    const scaled = normals.map(([x, y]) => [x!.a * y!.d, y!.a * x!.d, x!.d * y!.d]);
    // Any three on a cone are independent: so n^2 - n + 2 vertices, as for generic normals.
    for (const chosen of subsets(scaled.slice(0, 14), 3)) expect(determinant(chosen)).not.toBe(0n);
  });

  it('need three zones', () => {
    expect(() => polarZonohedron(2)).toThrow(InputError);
  });
});

describe('graphs', () => {
  it('have a normal for each edge and a coordinate for each vertex', () => {
    expect(completeGraph(5).normals).toHaveLength(10);
    expect(cycleGraph(6).normals).toHaveLength(6);
    expect(gridGraph(3, 4).normals).toHaveLength(17);
    expect(gridGraph(1, 2).labels).toEqual(['r1c1-r1c2']);
    for (const list of [completeGraph(5), cycleGraph(6), gridGraph(3, 4)]) {
      // The rank of a connected graph is one less than its vertices.
      expect(buildArrangement(list).rank).toBe(list.coordinates!.length - 1);
      for (const row of whole(list))
        expect([...row].sort()).toEqual([-1n, ...row.slice(2).fill(0n), 1n]);
    }
  });

  it('give totally unimodular matrices', () => {
    // A. Schrijver, 1986, Theory of Linear and Integer Programming, section 19.3, example 2.
    const rows = whole(completeGraph(4));
    for (let size = 1; size <= 4; size += 1) {
      for (const chosen of subsets(rows, size)) {
        for (const columns of subsets([0, 1, 2, 3], size)) {
          const minor = determinant(chosen.map((row) => columns.map((j) => row[j]!)));
          expect([-1n, 0n, 1n]).toContain(minor);
        }
      }
    }
  });

  it('read an edge list', () => {
    const list = readGraph(
      bytes('# paths\nmill, lock\r\nlock weir # twice\nlock\tweir\n'),
      'p.txt',
    );
    expect(list.coordinates).toEqual(['mill', 'lock', 'weir']);
    expect(list.labels).toEqual(['mill-lock', 'lock-weir', 'lock-weir (2)']);
    expect(shown(list)).toEqual([
      ['1', '-1', '0'],
      ['0', '1', '-1'],
      ['0', '1', '-1'],
    ]);
    expect(list.source.sha256).toMatch(/^[0-9a-f]{64}$/);
    expect(readGraph(bytes('a-b c\na b-c'), 'p.txt').labels).toEqual(['a-b-c', 'a-b-c (2)']);
  });

  it.each([
    ['a b\nb  b', '2:4 a loop at "b"'],
    ['a b\nc', '2:1 an edge with one vertex'],
    ['a b\na b c', '2:5 an edge with 3 words'],
    ['# nothing\n', '-:- there is no edge'],
    ['', '-:- the file is empty'],
  ])('refuse the edge list %j', async (text, expected) => {
    const { position, what } = await faultOf(() => readGraph(bytes(text), 'p.txt'));
    expect(`${position?.line ?? '-'}:${position?.column ?? '-'} ${what}`).toBe(expected);
  });

  it('refuse what is too small or too large', () => {
    expect(() => completeGraph(1)).toThrow(InputError);
    expect(() => cycleGraph(2)).toThrow(InputError);
    expect(() => gridGraph(1, 1)).toThrow(InputError);
    expect(() => completeGraph(1000)).toThrow(LimitError);
    expect(() => gridGraph(10_000, 10_000)).toThrow(LimitError);
  });
});
