// The census as a whole: the record, the choice of routes, and faults that must not pass.
import { readFileSync } from 'node:fs';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { buildArrangement } from '../../src/arrangement/build.js';
import { describeDisagreement, disagreements, takeCensus } from '../../src/census/census.js';
import { listChecked } from '../../src/census/listing.js';
import type { CensusListener } from '../../src/census/polynomial.js';
import { recordJsonSchema, recordSchema } from '../../src/census/record.js';
import { type Stages, standardStages } from '../../src/census/stages.js';
import { version } from '../../src/census/version.js';
import { Disagreement, LimitError } from '../../src/errors.js';
import { multiplyPolynomials } from '../../src/exact/polynomial.js';
import { reflectionArrangement } from '../../src/input/families/reflection.js';
import { allSubsets } from '../../src/input/families/subsets.js';
import { readGenerators } from '../../src/input/read.js';
import { secondsPerIntervalStep } from '../../src/limits.js';

async function arrangementOf(text: string) {
  return buildArrangement(await readGenerators(new TextEncoder().encode(text), 'normals.txt'));
}

const fourPlanes = await arrangementOf('1 0 0\n0 1 0\n0 0 1\n1 1 1\n');
const B3 = buildArrangement(reflectionArrangement('B3'));

describe('the record', () => {
  it('is that of the interface for e1, e2, e3 and (1,1,1)', () => {
    // Counts: T. Cover, 1965, theorem 1, and T. Zaslavsky, 1975, for four generic planes.
    const record = takeCensus(fourPlanes);
    expect(record).toMatchObject({
      schema: 'signwright/record/1',
      input: {
        title: null,
        normalCount: 4,
        ambientDimension: 3,
        field: 'Q',
        normals: [
          ['1', '0', '0'],
          ['0', '1', '0'],
          ['0', '0', '1'],
          ['1', '1', '1'],
        ],
      },
      arrangement: {
        hyperplanes: 4,
        rank: 3,
        lineality: 0,
        parallelClasses: [[1], [2], [3], [4]],
      },
      regions: '14',
      faces: ['1', '12', '24', '14'],
      flats: ['1', '4', '6', '1'],
      characteristicPolynomial: {
        coefficients: ['-3', '6', '-4', '1'],
        text: 't^3 - 4 t^2 + 6 t - 3',
        integerRoots: null,
      },
      properties: {
        simplicial: false,
        generic: true,
        irreducible: true,
        supersolvable: false,
        linesByMultiplicity: { 2: '6' },
      },
      zonotope: {
        faces: ['14', '24', '12', '1'],
        volume: '4',
        ehrhart: ['1', '4', '6', '4'],
        latticePoints: '15',
        interiorPoints: '1',
      },
      lists: [],
      run: { version, threads: 1, notRun: [] },
    });
    expect(disagreements(record)).toEqual([]);
    const regions = record.checks.find(({ claim }) => claim === 'regions');
    expect(regions?.routes.length).toBeGreaterThanOrEqual(5);
    expect(record.notes).toEqual([]);
  });

  it('fits its schema, and the JSON Schema that is published', async () => {
    const published = JSON.parse(
      readFileSync(new URL('../../src/census/record.schema.json', import.meta.url), 'utf8'),
    );
    expect(recordJsonSchema()).toEqual(published);
    const validate = new Ajv2020({ strict: false }).compile(published);
    const inputs = [
      fourPlanes,
      B3,
      await arrangementOf('a: 2 0\nb: -3 0\n'),
      await arrangementOf('1 0 (1+sqrt(5))/2\n0 1 0\n'),
    ];
    for (const arrangement of inputs) {
      for (const secondsPerRoute of [60, 1e-9]) {
        const record = JSON.parse(JSON.stringify(takeCensus(arrangement, { secondsPerRoute })));
        expect(recordSchema.parse(record)).toEqual(record);
        expect(validate(record), JSON.stringify(validate.errors)).toBe(true);
      }
    }
    const wrong = { ...JSON.parse(JSON.stringify(takeCensus(B3))), regions: 48 };
    expect(validate(wrong)).toBe(false);
    expect(recordSchema.safeParse(wrong).success).toBe(false);
  });

  it('has the version of the package', () => {
    const manifest = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
    expect(version).toBe(JSON.parse(manifest).version);
  });

  it('counts in the ambient space when the normals do not span it', async () => {
    const record = takeCensus(await arrangementOf('1 -1 0\n0 1 -1\n1 0 -1\n2 -2 0\n'));
    expect(record.arrangement).toEqual({
      hyperplanes: 3,
      rank: 2,
      lineality: 1,
      parallelClasses: [[1, 4], [2], [3]],
    });
    // The chromatic polynomial of a triangle is t (t - 1) (t - 2).
    expect(record.characteristicPolynomial.text).toBe('t^3 - 3 t^2 + 2 t');
    expect(record.characteristicPolynomial.integerRoots).toEqual(['0', '1', '2']);
    expect(record.faces).toEqual(['1', '6', '6']);
  });

  it('is the same twice, but for the time', () => {
    const without = () => ({ ...takeCensus(B3), run: null });
    expect(without()).toEqual(without());
  });
});

describe('the choice of routes', () => {
  it('runs every route that fits and says what the others would need', () => {
    const record = takeCensus(B3, { memoryBytes: 500 });
    const notRun = record.run.notRun.map(({ route }) => route);
    expect(notRun).toContain('regions by listing');
    expect(notRun).toContain('faces by listing');
    // B3 has 48 regions (P. Orlik, L. Solomon, 1980: (1+1)(1+3)(1+5)), known without a list.
    expect(record.regions).toBe('48');
    const why = record.run.notRun.find(({ route }) => route === 'regions by listing')?.why;
    expect(why).toMatch(/^48 regions: would need about .* --memory \d+GB allows it$/);
  });

  it('never lists unasked what would take long: E8 and its 696,729,600 regions', () => {
    // J. Humphreys, 1990, section 3.20: exponents 1, 7, 11, 13, 17, 19, 23, 29.
    const E8 = buildArrangement(reflectionArrangement('E8'));
    let chi = [1n];
    for (const root of [1n, 7n, 11n, 13n, 17n, 19n, 23n, 29n]) {
      chi = multiplyPolynomials(chi, [-root, 1n]);
    }
    const never = () => {
      throw new Error('this would take minutes');
    };
    const stages: Stages = {
      ...standardStages,
      estimateFlats: () => ({ flats: 5e6, seconds: 100, bytes: 1e9 }),
      polynomialByDeletion: () => chi,
      listFlats: never,
      listRegions: never,
      countFaces: never,
    };
    const record = takeCensus(E8, { stages });
    expect(record.regions).toBe('696729600');
    expect(record.faces).toBeNull();
    expect(record.properties).toMatchObject({ simplicial: null, irreducible: true });
    const why = record.run.notRun.find(({ route }) => route === 'regions by listing')?.why;
    expect(why).toMatch(/696,729,600 regions: .* min and \d+ GB; --budget \d+ --memory \d+GB/);
    expect(record.run.notRun.map(({ route }) => route)).toEqual([
      'flats with Moebius values, and all counts by dimension',
      'regions by listing',
      'faces by listing',
      'Ehrhart polynomial by flats',
      'Ehrhart polynomial by deletion-contraction',
      'Ehrhart polynomial by subsets',
    ]);
  });

  it('runs the cheapest way to the polynomial even past the budget', () => {
    const estimates = {
      estimateDeletion: () => ({ bases: 1, seconds: 100 }),
      estimateFlats: () => ({ flats: 1, seconds: 90, bytes: 1000 }),
    };
    const record = takeCensus(B3, { stages: { ...standardStages, ...estimates } });
    expect(record.flats).toEqual(['1', '9', '13', '1']);
    expect(record.run.notRun.map(({ route }) => route)).toEqual([
      'polynomial by deletion-restriction',
    ]);
  });

  it('leaves out the faces by Moebius values where only they are too dear', () => {
    const stages: Stages = { ...standardStages, estimateMoebius: () => 1000 };
    const record = takeCensus(B3, { stages });
    expect(record.flats).toEqual(['1', '9', '13', '1']);
    expect(record.faces).toBeNull();
    expect(record.properties).toMatchObject({ simplicial: null, supersolvable: true });
    expect(record.run.notRun.map(({ route }) => route)).toEqual([
      'faces by Moebius values',
      'faces by listing',
    ]);
    expect(recordSchema.parse(record).zonotope.faces).toBeNull();
  });

  it('foretells the walk of the lattice within a factor of four', () => {
    // Slow obvious count: for each flat, the covers inside the flats that it contains or equals.
    const A5 = buildArrangement(reflectionArrangement('A5'));
    const lattice = standardStages.listFlats(A5, () => {});
    const { flatCount, zero, coverOffsets } = lattice;
    let covers = 0;
    for (let x = 0; x < flatCount; x++) {
      for (let y = 0; y < flatCount; y++) {
        if ((zero[x] & ~zero[y]) === 0) covers += coverOffsets[y + 1] - coverOffsets[y];
      }
    }
    const ratio = standardStages.estimateMoebius(lattice) / (covers * secondsPerIntervalStep);
    expect(ratio).toBeGreaterThan(0.25);
    expect(ratio).toBeLessThan(4);
  });

  it('gives up where no way is worth waiting for, and says what would be needed', () => {
    const stages: Stages = {
      ...standardStages,
      estimateDeletion: () => ({ bases: 1e12, seconds: 1e7 }),
      estimateFlats: () => ({ flats: 1e12, seconds: 1e5, bytes: 1e13 }),
    };
    expect(() => takeCensus(B3, { stages })).toThrow(LimitError);
    expect(() => takeCensus(B3, { stages })).toThrow(/116 days.*28 h.*9\.1 TB.*--budget/);
  });

  it('tells what it is at', () => {
    const heard: string[] = [];
    const listener: CensusListener = { stage: (text) => heard.push(text), part: () => {} };
    takeCensus(fourPlanes, { listener });
    expect(heard.join('\n')).toMatch(/deletion-restriction[\s\S]*flats[\s\S]*listing 14 regions/);
  });
});

describe('a planted fault', () => {
  const cases: [string, string, Partial<Stages>][] = [
    [
      'a region left out of the list',
      'regions',
      {
        listRegions: (arrangement) => {
          const table = standardStages.listRegions(arrangement);
          table.half.rows--;
          return table;
        },
      },
    ],
    [
      'a region listed in place of another',
      'regions',
      {
        listRegions: (arrangement) => {
          const table = standardStages.listRegions(arrangement);
          table.half.words[0] = table.half.words[1];
          return table;
        },
      },
    ],
    [
      'a sign vector that no point has',
      'regions',
      {
        listRegions: (arrangement) => {
          const table = standardStages.listRegions(arrangement);
          const { words, rows } = table.half;
          const real = new Set(words.subarray(0, rows));
          words[0] = [...Array(256).keys()].map((i) => 2 * i + 1).find((x) => !real.has(x)) ?? 0;
          return table;
        },
      },
    ],
    [
      'a wrong coefficient by deletion-restriction',
      'characteristic polynomial, essential part',
      { polynomialByDeletion: () => [-15n, 24n, -9n, 1n] },
    ],
    [
      'a wrong coefficient by flats',
      'characteristic polynomial at 1',
      { polynomialByFlats: () => [-15n, 24n, -9n, 1n] },
    ],
    ['a wrong Moebius count', 'faces by dimension', { facesByMoebius: () => [1n, 26n, 74n, 48n] }],
    [
      'a wrong count of listed faces',
      'alternating sum of the faces',
      { countFaces: () => [1, 26, 70, 48] },
    ],
    [
      'a vertex that is not extreme',
      'vertices of the zonotope',
      { examineRegions: () => ({ points: '48', extremes: 'vertex 3 is not extreme' }) },
    ],
  ];

  for (const [name, claim, fault] of cases) {
    it(`is caught: ${name}`, () => {
      const record = takeCensus(B3, { stages: { ...standardStages, ...fault } });
      const found = disagreements(record);
      expect(found.map((check) => check.claim)).toContain(claim);
      const line = describeDisagreement(found[0]);
      for (const { value } of found[0].routes) expect(line).toContain(value);
      expect(disagreements(takeCensus(B3))).toEqual([]);
    });
  }

  it('is caught when flats of rank 2 overlap', () => {
    const stages: Stages = {
      ...standardStages,
      listFlats: (arrangement, onFlats) => {
        const lattice = standardStages.listFlats(arrangement, onFlats);
        const zero = lattice.zero.slice();
        // Hyperplanes put into a flat that does not lie on them.
        zero[lattice.rankOffsets[2]] |= 0x1ff;
        return { ...lattice, zero };
      },
    };
    const claims = disagreements(takeCensus(B3, { stages })).map(({ claim }) => claim);
    expect(claims).toContain('pairs of hyperplanes');
  });

  it('stops a list before it is written', () => {
    const short: Stages = {
      ...standardStages,
      listRegions: (arrangement) => {
        const table = standardStages.listRegions(arrangement);
        table.half.rows--;
        return table;
      },
    };
    expect(() => listChecked(B3, 2 ** 30, undefined, short)).toThrow(Disagreement);
    expect(() => listChecked(B3, 2 ** 30, undefined, short)).toThrow(/46 by listing, 48 by/);
    const small = buildArrangement(allSubsets(5));
    expect(() => listChecked(small, 2 ** 17)).toThrow(/11,292 regions.*--memory/);
  });
});
