// Regions against a linear-programming package (HiGHS): a sign vector belongs to a region exactly when
// the programme s_h (normal_h . x) >= 1 for all h has a solution. Every sign vector is asked.
import loadHighs from 'highs';
import { beforeAll, describe, expect, it } from 'vitest';
import { bitAt } from '../../src/bits/signs.js';
import { listRegions } from '../../src/region/regions.js';
import { RegionIndex } from '../../src/region/walls.js';
import { allSubsets, arrangementOf, sequence } from '../support/arrangements.js';

// The package's types describe its CommonJS side; this is what is used of it.
type Highs = { solve(programme: string): { Status: string } };
const load = loadHighs as unknown as () => Promise<Highs>;

let highs: Highs;

beforeAll(async () => {
  highs = await load();
});

/** Whether the programme has a solution; `rows` are integer normals turned to their positive sides. */
function hasSolution(rows: readonly (readonly number[])[]): boolean {
  const sum = (row: readonly number[]): string =>
    row.map((a, j) => `${a < 0 ? '-' : '+'} ${Math.abs(a)} x${j}`).join(' ');
  const programme = [
    'Minimize',
    ' value: 0 x0',
    'Subject To',
    ...rows.map((row, i) => ` r${i}: ${sum(row)} >= 1`),
    'Bounds',
    ...rows[0].map((_, j) => ` x${j} free`),
    'End',
  ].join('\n');
  const { Status } = highs.solve(programme);
  if (Status !== 'Optimal' && Status !== 'Infeasible') throw new Error(`HiGHS says ${Status}`);
  return Status === 'Optimal';
}

function expectSameSigns(rows: readonly (readonly number[])[]): void {
  const arrangement = arrangementOf(rows);
  const table = listRegions(arrangement);
  const index = new RegionIndex(table);
  const normals = arrangement.hyperplanes.map((h) => h.normal.map(Number));
  let regions = 0;
  for (let bits = 0; bits < 2 ** normals.length; bits++) {
    const word = Int32Array.of(bits);
    const feasible = hasSolution(
      normals.map((normal, h) => (bitAt(word, 0, h) === 1 ? normal : normal.map((x) => -x))),
    );
    expect(index.regionOf(word, 0) >= 0).toBe(feasible);
    if (feasible) regions++;
  }
  expect(2 * table.half.rows).toBe(regions);
}

describe('a linear-programming package finds the same regions', () => {
  it('for small random arrangements of ranks 2 to 5, parallels and deficient ranks among them', () => {
    const next = sequence(11);
    for (let run = 0; run < 24; run++) {
      const d = 2 + (run % 4);
      const rows = Array.from({ length: 4 + (run % 3) }, () =>
        Array.from({ length: d }, () => next(7) - 3),
      ).filter((row) => row.some((x) => x !== 0));
      if (run % 5 === 0) rows.push(rows[0].map((x) => -2 * x));
      if (run % 6 === 0) for (const row of rows) row[d - 1] = row[0];
      expectSameSigns(rows.filter((row) => row.some((x) => x !== 0)));
    }
  });

  it('for all 0/1 vectors in R^3', () => {
    expectSameSigns(allSubsets(3));
  });
});
