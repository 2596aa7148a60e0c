// The zonotope through the built program. Sources beside each check; values without one follow from
// the four planes e1, e2, e3, (1,1,1), whose zonotope is the rhombic dodecahedron (14, 24, 12).
import { afterAll, describe, expect, it } from 'vitest';
import { fourPlanes, Workplace } from './program.js';

const place = new Workplace();
const file = place.write('four.txt', fourPlanes);
afterAll(() => place.remove());

const lines = (text: string) => text.trimEnd().split('\n');
const report = (args: readonly string[], input = '') =>
  JSON.parse(place.output(['zonotope', ...args, '--json'], input));
const made = (...family: string[]) => place.output(['make', ...family]);

describe('published values', () => {
  // F. Ardila, M. Beck, J. McWhirter, 2020, The arithmetic of Coxeter permutahedra, figure 1.
  it('moves type B2 to the origin: 1 + 4t + 7t^2 for even t, 2t + 7t^2 for odd t', () => {
    const args = ['-', '--at-origin', '--dilate', '2'];
    const { measures, centre, dilate } = report(args, made('reflection', 'B2'));
    expect(measures.ehrhart).toBeNull();
    expect(measures.quasiPolynomial).toEqual([
      { divisor: '1', coefficients: ['0', '2', '7'] },
      { divisor: '2', coefficients: ['1', '4', '7'] },
    ]);
    expect(centre).toEqual(['0', '0']);
    expect(dilate).toMatchObject({ factor: '2', latticePoints: String(1 + 4 * 2 + 7 * 4) });
    expect(place.output(['zonotope', ...args], made('reflection', 'B2'))).toMatch(
      /Ehrhart +7 t\^2 \+ 2 t for odd t\n +7 t\^2 \+ 4 t \+ 1 for even t\n/,
    );
  });

  // OEIS A343805, type B.
  it('has the Ehrhart polynomial of type B4', () => {
    const { measures } = report(['-'], made('reflection', 'B4'));
    expect(measures.ehrhart).toEqual(['1', '16', '126', '608', '1553']);
  });

  // R. Stanley, 1991, A zonotope associated with graphical degree sequences: forests by edges; those
  // of K4 by separate count 1 6 15 16, of the cycle C5 1 5 10 10 5.
  it.each([
    ['--complete 4', '1 6 15 16'],
    ['--cycle 5', '1 5 10 10 5'],
  ])('counts the forests of %s, in a subspace', (graph, forests) => {
    const { measures, checks } = report(['-'], made('graph', ...graph.split(' ')));
    expect(measures.ehrhart.join(' ')).toBe(forests);
    // The span of a connected graph on n vertices has a lattice cell of squared volume n.
    const n = BigInt(graph.slice(-1));
    expect(measures.euclideanVolume.square).toBe(String(BigInt(measures.volume) ** 2n * n));
    expect(checks.every(({ agrees }: { agrees: boolean }) => agrees)).toBe(true);
  });

  // Separate slow programs, two routes: all 0/1 vectors of length 4 and 5.
  it.each([
    ['4', '1 15 105 440 1050'],
    ['5', '1 31 465 4470 30090 131760'],
  ])('sums up all 0/1 vectors of length %s', (d, ehrhart) => {
    expect(report(['-'], made('all-subsets', d)).measures.ehrhart.join(' ')).toBe(ehrhart);
  });

  // Volume and faces of E7 by separate slow programs, two routes each.
  it('has volume 248454360 for E7 in the coordinates of its simple roots', () => {
    const { measures, faces, edgeClasses } = report(['-'], made('reflection', 'E7'));
    expect(measures.volume).toBe('248454360');
    expect(faces.join(' ')).toBe('2903040 10160640 13789440 9072000 2938320 415800 17642 1');
    const edges = edgeClasses.map((edge: { edges: string }) => Number(edge.edges));
    expect(edges.reduce((a: number, b: number) => a + b)).toBe(10160640);
  });

  // Determinants of 3 by 3 at sight: twice e1 and thrice e2; then the two of index 2 that have one
  // volume and different polynomials.
  it.each([
    ['2 0\n0 3\n', '1 5 6', '1 6', '6'],
    ['1 0 0\n-1 2 0\n0 0 1\n', '1 3 4 2', '1 1 2', '2'],
    ['1 0 0\n0 1 0\n-1 -1 2\n', '1 3 3 2', '1 1 2', '2'],
    ['1 1 1\n1 -1 -1\n-1 1 -1\n-1 -1 1\n', '1 4 12 16', '1 2 2', '4'],
  ])('tells the lattice of %j', (rows, ehrhart, divisors, index) => {
    const { measures } = report(['-'], rows);
    expect(measures.ehrhart.join(' ')).toBe(ehrhart);
    expect(measures.elementaryDivisors.join(' ')).toBe(divisors);
    expect(measures.sublatticeIndex).toBe(index);
  });

  // J. Kepler's solid of 30 rhombs: 32 vertices, 60 edges; with edge length a its volume is
  // 4 sqrt(5 + 2 sqrt(5)) a^3 (E. Weisstein, MathWorld, Rhombic Triacontahedron; from memory).
  it('takes a quadratic field: a volume, no lattice, and the reason', () => {
    const t = '(1+sqrt(5))/2';
    const rows = [`0 1 ${t}`, `${t} 0 1`, `1 ${t} 0`, `0 1 -${t}`, `-${t} 0 1`, `1 -${t} 0`];
    const { measures, faces, notes, polygons, edgeClasses } = report(['-'], rows.join('\n'));
    expect(faces).toEqual(['32', '60', '30', '1']);
    expect(polygons).toEqual([{ sides: 4, count: '30' }]);
    const a = Number(edgeClasses[0].length);
    const volume = 4 * Math.sqrt(5 + 2 * Math.sqrt(5)) * a ** 3;
    expect(Number(measures.euclideanVolume.decimal)).toBeCloseTo(volume, 9);
    expect(measures).toMatchObject({ ehrhart: null, latticePoints: null, sublatticeIndex: null });
    expect(notes.join()).toContain('Q(sqrt(5))');
  });
});

describe('the page', () => {
  it('says the four planes on lines of 80 columns at most', () => {
    const page = place.output(['zonotope', file, '--dilate', '3', '--origin=1,1,1/2']);
    for (const line of lines(page)) expect(line.length).toBeLessThanOrEqual(80);
    expect(page).toMatch(/^Zonotope of four\.txt\n/);
    for (const text of [
      /facets +12 {2}12 parallelograms\n/,
      /volume +4\n/,
      /Ehrhart +4 t\^3 \+ 6 t\^2 \+ 4 t \+ 1\n/,
      /lattice points +15: 1 inside, 14 on the boundary\n/,
      /dilate 3 +175 lattice points: 65 inside, 110 on the boundary\n/,
      /largest ball +radius about 0\.353553390593273, the square root of 1\/8\n/,
      /not a rating of equipment/,
    ]) {
      expect(page).toMatch(text);
    }
  });

  it('says the scale of generators that are not integer, and the volume without it', () => {
    const { measures, notes } = report(['-'], '1/2 0\n0 1/3\n');
    expect(measures).toMatchObject({ volume: '1/6', scale: '6', ehrhart: ['1', '5', '6'] });
    // [0, 5/2] x [0, 4/3] holds (0..2, 0..1), of which (1, 1) and (2, 1) are inside.
    const { measures: larger } = report(['-'], '5/2 0\n0 4/3\n');
    expect(larger.unscaled).toEqual({ latticePoints: '6', interiorPoints: '2' });
    expect(notes.join()).toContain('scaled by 6');
    const page = place.output(['zonotope', '-'], '1/2 0\n0 1/3\n');
    expect(page).toMatch(
      /volume +1\/6, about 0\.166666666666666\n {2}unscaled +1 lattice point, 0 of them inside\n {2}scaled by +6/,
    );
  });

  it('leaves out what the budget does not allow, and says so', () => {
    const { status, stdout } = place.run(['zonotope', file, '--budget', '0.000000001']);
    expect(status).toBe(0);
    expect(stdout).toContain('Ehrhart polynomial by subsets: would need about');
    expect(stdout).not.toMatch(/volume +4/);
  });

  it('takes ranges: a segment from -1 to 1 twice, and -1/2 to 1/2', () => {
    const csv = 'x,y,low,high\n1,0,-1,1\n0,1,-1/2,1/2\n';
    const { centre, measures, caution } = report(['-'], csv);
    expect(centre).toEqual(['0', '0']);
    // 2 by 1 with corner (-1, -1/2): (2t + 1)(t + 1) points for even t, (2t + 1) t for odd t.
    expect(measures.quasiPolynomial).toEqual([
      { divisor: '1', coefficients: ['0', '1', '2'] },
      { divisor: '2', coefficients: ['1', '3', '2'] },
    ]);
    expect(caution).toContain('not a rating');
  });
});

describe('margins', () => {
  it('are those of a box by hand', () => {
    // [0, 4] x [0, 2]: from (1, 1/2) the side below is nearest.
    const { margins } = report(['-', '--origin=1,1/2'], 'long: 4 0\nshort: 0 2\n');
    expect(margins).toMatchObject({
      place: 'inside',
      distance: { square: '1/4', decimal: '0.5' },
      nearest: {
        normal: ['0', '-1'],
        offset: '0',
        atLimit: [{ generator: 2, label: 'short', end: 'low' }],
      },
      box: { half: '1/2' },
      forced: [],
    });
  });

  it('tell boundary, outside and off the span apart', () => {
    const rows = '4 0 0\n0 2 0\n';
    expect(report(['-', '--origin=4,1,0'], rows).margins).toMatchObject({
      place: 'boundary',
      forced: [{ generator: 1, end: 'high' }],
    });
    expect(report(['-', '--origin=-3,1,0'], rows).margins).toMatchObject({
      place: 'outside',
      distance: { square: '9' },
      nearest: { atLimit: [{ generator: 1, end: 'low' }] },
      box: null,
    });
    expect(report(['-', '--origin=1,1,1'], rows).margins).toMatchObject({
      place: 'off-span',
      nearest: null,
    });
  });

  it.each([
    ['1,2', /2 numbers, the arrangement has 3 coordinates/],
    ['1,2,x', /--origin 1,2,x: /],
    ['1,2,sqrt(2)', /not in the field of the generators; give rational numbers/],
  ])('refuse the point %s', (point, message) => {
    const { status, stderr } = place.run(['zonotope', file, `--origin=${point}`]);
    expect(status).toBe(2);
    expect(stderr).toMatch(message);
    expect(lines(stderr)).toHaveLength(1);
  });
});

describe('lists', () => {
  const list = (kind: string, ...more: string[]) =>
    lines(place.output(['zonotope', file, '--list', kind, ...more]));

  it('have a row for each vertex, edge, facet and tile', () => {
    expect(list('vertices')[0]).toBe('signs,vertex_1,vertex_2,vertex_3');
    expect(list('edges')[0]).toBe('signs,generators,from_1,from_2,from_3,to_1,to_2,to_3');
    expect(list('facets')[0]).toBe('signs,normal_1,normal_2,normal_3,offset,generators,vertices');
    expect(list('tiles')[0]).toBe('generators,open,raised,shift_1,shift_2,shift_3');
    // Independent sets of four generic vectors: 1 + 4 + 6 + 4 (R. Stanley, 1991, theorem 2.2).
    const counts = ['vertices', 'edges', 'facets', 'tiles'].map((kind) => list(kind).length - 1);
    expect(counts).toEqual([14, 24, 12, 15]);
  });

  it('agree among themselves: edges join vertices, facets hold and are met where they say', () => {
    const vertices = list('vertices')
      .slice(1)
      .map((row) => row.split(',').slice(1).map(Number));
    const known = new Set(vertices.map(String));
    for (const row of list('edges').slice(1)) {
      const numbers = row.split(',').slice(2).map(Number);
      expect(known).toContain(String(numbers.slice(0, 3)));
      expect(known).toContain(String(numbers.slice(3)));
      expect(String(numbers.slice(0, 3))).not.toBe(String(numbers.slice(3)));
    }
    for (const row of list('facets', '--facet-vertices').slice(1)) {
      const cells = row.split(',');
      const [a, b, c, offset] = cells.slice(1, 5).map(Number);
      const on = vertices.flatMap(([x, y, z], i) => {
        const value = a * x + b * y + c * z;
        expect(value).toBeLessThanOrEqual(offset);
        return value === offset ? [i + 1] : [];
      });
      expect(cells[7]).toBe(on.join(' '));
      expect(cells[6]).toBe(String(on.length));
    }
  });

  it('come as NDJSON and JSON', () => {
    const rows = list('facets', '--format', 'ndjson').map((row) => JSON.parse(row));
    expect(rows).toHaveLength(12);
    expect(rows[0]).toEqual({
      signs: '00++',
      normal: [0, 0, 1],
      offset: 2,
      generators: [1, 2],
      vertices: 4,
    });
    const whole = JSON.parse(place.output(['zonotope', file, '--list', 'tiles', '--json']));
    expect(whole).toMatchObject({ schema: 'signwright/tiles/1', input: { normalCount: 4 } });
    expect(whole.tiles).toHaveLength(15);
  });

  it.each([
    [['--list', 'faces'], /no such list; give vertices, edges, facets or tiles/],
    [['--list', 'tiles', '--dilate', '2'], /--dilate does not go with --list/],
    [['--facet-vertices'], /goes with --list facets/],
    [['--project', '1,2,3'], /goes with --mesh/],
    [['--dilate', '0'], /not a dilate/],
    [['--mesh', 'solid.xyz'], /solid\.xyz/],
  ])('refuses %j', (args, message) => {
    const { status, stderr, stdout } = place.run(['zonotope', file, ...args]);
    expect(status).toBe(2);
    expect(stderr).toMatch(message);
    expect(stdout).toBe('');
  });

  it('refuses a list of tiles without end, and says how many', () => {
    const { status, stderr } = place.run(['zonotope', '-', '--list', 'tiles'], undefined);
    expect(status).toBe(2);
    expect(stderr).toContain('standard input');
    const big = place.run(
      ['zonotope', '-', '--list', 'tiles'],
      made('generic', '--normals', '200', '--rank', '6'),
    );
    expect(big.status).toBe(3);
    expect(big.stderr).toMatch(/a list of tiles: needs about [\d,]+ of them/);
  });
});

describe('a mesh', () => {
  it('is written beside the page, closed by Euler: V - E + F = 2', () => {
    place.output(['zonotope', file, '--mesh', 'solid.obj']);
    const obj = lines(place.read('solid.obj'));
    const faces = obj
      .filter((line) => line.startsWith('f '))
      .map((line) => line.split(' ').slice(1));
    const edges = new Set(
      faces.flatMap((face) =>
        face.map((v, i) => [v, face[(i + 1) % face.length]].sort().join(' ')),
      ),
    );
    const vertices = obj.filter((line) => line.startsWith('v ')).length;
    expect([vertices, edges.size, faces.length]).toEqual([14, 24, 12]);
  });
});

describe('crosscheck', () => {
  const check = (text: string, ...args: string[]) => {
    place.write('theirs.csv', text);
    return place.run(['crosscheck', file, 'theirs.csv', '--as', 'facets', '--json', ...args]);
  };
  const facets = () =>
    lines(place.output(['zonotope', file, '--list', 'facets']))
      .slice(1)
      .map((row) => row.split(',').slice(1, 5).map(Number));
  const csv = (rows: readonly (readonly number[])[]) => rows.map((row) => row.join(',')).join('\n');

  it('takes our own list of facets, and others in any order and scale', () => {
    place.output(['zonotope', file, '--list', 'facets', '-o', 'ours.csv']);
    expect(place.output(['crosscheck', file, 'ours.csv', '--as', 'facets'])).toContain('agree');
    const scaled = facets().map((row, i) => row.map((x) => x * (i + 1)));
    const { status, stdout } = check(csv(scaled.reverse()));
    expect(status).toBe(0);
    expect(JSON.parse(stdout).parts[0].counts).toMatchObject({ matched: 12, missing: 0, extra: 0 });
  });

  it.each([
    ['a . z >= b', (row: number[]) => row.map((x) => -x)],
    ['a . z + b >= 0', ([a, b, c, d]: number[]) => [-a, -b, -c, d]],
    ['a . z + b <= 0', ([a, b, c, d]: number[]) => [a, b, c, -d]],
  ])('tells that rows mean %s', (words, turned) => {
    const { status, stdout } = check(csv(facets().map(turned)));
    expect(status).toBe(0);
    expect(JSON.parse(stdout).parts[0].reading).toContain(words);
  });

  it('tells a centred zonotope, with segments from -1 to 1', () => {
    const centred = facets().map(([a, b, c, d]) => [a, b, c, 2 * (d - (a + b + c))]);
    const { status, stdout } = check(csv(centred));
    expect(status).toBe(0);
    expect(JSON.parse(stdout).parts[0].reading).toContain('doubled');
  });

  it('names what is missing, extra and repeated', () => {
    const [first, second, ...rest] = facets();
    const wrong = [second[0], second[1], second[2], second[3] + 1];
    const { status, stdout, stderr } = check(csv([wrong, ...rest, rest[0], [1, 1, 1, 6]]));
    expect(status).toBe(4);
    expect(stderr).toMatch(/does not agree/);
    const [part] = JSON.parse(stdout).parts;
    expect(part.counts).toEqual({ matched: 10, missing: 2, extra: 2, repeated: 1 });
    expect(part.missing.map(({ normal }: { normal: string[] }) => normal.map(Number))).toEqual([
      first.slice(0, 3),
      second.slice(0, 3),
    ]);
    expect(part.extra[0].reason).toContain('stays away from it by 1');
    expect(part.extra[1].reason).toContain('touches the zonotope in a face smaller');
    expect(part.repeated[0].lines).toEqual([2, 12]);
  });

  it('takes numbers of faces, with or without the zonotope itself', () => {
    for (const faces of ['14 24 12', '14,24,12,1']) {
      expect(place.output(['crosscheck', file, '--faces', faces])).toContain('The two agree.');
    }
    const { status, stdout } = place.run(['crosscheck', file, '--faces', '14 24 13']);
    expect(status).toBe(4);
    expect(stdout).toMatch(/theirs +14 +24 +13 +-\n +differs\n/);
    for (const args of [
      ['--faces', '14 24'],
      ['--faces', 'x'],
      ['--regions', '14', '--as', 'facets'],
    ]) {
      expect(place.run(['crosscheck', file, ...args]).status).toBe(2);
    }
  });

  it.each([
    ['1,2\n', /2 cells a row, the arrangement has 3 coordinates/],
    ['1,2,3,4\n1,2,3\n', /theirs\.csv:2:1: 3 cells, the first row has 4/],
    ['1,2,3,x\n', /theirs\.csv:1/],
    ['\n', /the list is empty/],
  ])('refuses %j', (text, message) => {
    const { status, stderr } = check(text);
    expect(status).toBe(2);
    expect(stderr).toMatch(message);
  });
});
