// Every command and format through the built program. Counts of the four planes e1, e2, e3, (1,1,1):
// T. Cover, 1965, and T. Zaslavsky, 1975, for generic planes; the rhombic dodecahedron's for the zonotope.
import { XMLParser } from 'fast-xml-parser';
import { afterAll, describe, expect, it } from 'vitest';
import { recordSchema } from '../../src/census/record.js';
import { readGenerators } from '../../src/input/read.js';
import { fourPlanes, Workplace } from './program.js';

const place = new Workplace();
const file = place.write('four.txt', fourPlanes);
afterAll(() => place.remove());

const read = (text: string) => readGenerators(new TextEncoder().encode(text), '-');
const lines = (text: string) => text.trimEnd().split('\n');
const faceCounts = ['1', '12', '24', '14'];

describe('census', () => {
  it('prints a page', () => {
    const page = place.output(['census', file]);
    expect(page).toMatch(/^four\.txt\n {2}given +4 normals in R\^3, rational\n/);
    expect(page).toContain('14 regions, as many as the zonotope has vertices');
    expect(page).toMatch(/^Checks: all \d+ agree$/m);
    for (const line of lines(page)) expect(line.length).toBeLessThanOrEqual(80);
  });

  it('prints the record, from standard input too, the same each time', () => {
    const first = recordSchema.parse(JSON.parse(place.output(['census', file, '--json'])));
    const input = place.output(['census', '-', '--format', 'json'], fourPlanes);
    const second = recordSchema.parse(JSON.parse(input));
    expect(first.faces).toEqual(faceCounts);
    expect(first.input.sha256).toBe(second.input.sha256);
    expect(second.input.source).toBe('standard input');
    const fixed = ({
      input: { source, ...input },
      run: { seconds, ...run },
      ...rest
    }: typeof first) => ({
      ...rest,
      input,
      run,
    });
    expect(fixed(first)).toEqual(fixed(second));
  });

  it('writes tables by the ending of --out, and the record beside', () => {
    expect(place.output(['census', file, '-o', 'table.md', '--record', 'record.json'])).toBe('');
    expect(place.read('table.md')).toContain('| total | 12 | 51 | 51 |');
    expect(recordSchema.parse(JSON.parse(place.read('record.json'))).regions).toBe('14');
    place.output(['census', file, '--out', 'table.tex']);
    expect(place.read('table.tex')).toContain('total & 12 & 51 & 51 \\\\');
    place.output(['census', file, '--out', 'page.txt']);
    expect(place.read('page.txt')).toMatch(/^Checks: all \d+ agree$/m);
    place.output(['census', file, '--format', 'latex', '--out', 'odd.dat']);
    expect(place.read('odd.dat')).toContain('\\begin{table}');
  });

  it('takes limits, and says what it left out', () => {
    const record = JSON.parse(
      place.output(['census', file, '--json', '--budget', '0.0000001', '--memory', '1MB']),
    );
    expect(record.run.notRun.length).toBeGreaterThan(0);
    expect(record.regions).toBe('14');
  });
});

describe('regions', () => {
  it('lists them as CSV, each point on the sides its signs say, each vertex the sum of its normals', () => {
    const [head, ...rows] = lines(place.output(['regions', file]));
    expect(head).toBe('signs,walls,point_1,point_2,point_3,vertex_1,vertex_2,vertex_3');
    expect(new Set(rows.map((row) => row.split(',')[0])).size).toBe(14);
    const normals = [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
      [1, 1, 1],
    ];
    for (const row of rows) {
      const [signs, , ...numbers] = row.split(',');
      const point = numbers.slice(0, 3).map(Number);
      const vertex = [0, 0, 0];
      normals.forEach((normal, i) => {
        const side = normal.reduce((sum, x, j) => sum + x * point[j], 0);
        expect(signs[i]).toBe(side > 0 ? '+' : '-');
        if (side > 0) {
          normal.forEach((x, j) => {
            vertex[j] += x;
          });
        }
      });
      expect(numbers.slice(3).map(Number)).toEqual(vertex);
    }
  });

  it('names columns as the file does', () => {
    const named = place.write('named.csv', 'label,surge,sway\na,1,0\nb,0,1\n');
    expect(lines(place.output(['regions', named]))[0]).toBe(
      'signs,walls,point_surge,point_sway,vertex_surge,vertex_sway',
    );
  });

  it('lists them as NDJSON and JSON too', () => {
    const ndjson = lines(place.output(['regions', file, '--format', 'ndjson'])).map((line) =>
      JSON.parse(line),
    );
    const json = JSON.parse(place.output(['regions', file, '--json']));
    expect(json.regions).toEqual(ndjson);
    expect(ndjson).toHaveLength(14);
    expect(Object.keys(ndjson[0])).toEqual(['signs', 'walls', 'point', 'vertex']);
    place.output(['regions', file, '-o', 'regions.ndjson']);
    expect(lines(place.read('regions.ndjson'))).toHaveLength(14);
  });

  it('only counts', () => {
    expect(place.output(['regions', file, '--count'])).toBe('14\n');
    expect(JSON.parse(place.output(['regions', file, '--count', '--json']))).toMatchObject({
      regions: '14',
      route: 'listing',
    });
  });
});

describe('faces', () => {
  it('lists them with dimensions', () => {
    const rows = lines(place.output(['faces', file])).slice(1);
    const counts = [0, 1, 2, 3].map(
      (k) => rows.filter((row) => row.split(',')[1] === String(k)).length,
    );
    expect(counts.map(String)).toEqual(faceCounts);
    const rays = lines(place.output(['faces', file, '--dimension', '1', '--format', 'ndjson']));
    expect(rays).toHaveLength(12);
    for (const ray of rays) expect(JSON.parse(ray)).toMatchObject({ zonotopeDimension: 2 });
  });

  it('writes the poset as a graph in every format, with the same nodes and covers', () => {
    // Covers: 12 rays over the origin; 24 plane faces of 2 rays each; 14 regions with 48 walls.
    const covers = 12 + 48 + 48;
    place.output(['faces', file, '-o', 'faces.graphml']);
    const { graphml } = new XMLParser({ ignoreAttributes: false }).parse(
      place.read('faces.graphml'),
    );
    expect(graphml.graph.node).toHaveLength(51);
    expect(graphml.graph.edge).toHaveLength(covers);
    place.output(['faces', file, '-o', 'faces.gexf']);
    const { gexf } = new XMLParser({ ignoreAttributes: false }).parse(place.read('faces.gexf'));
    expect(gexf.graph.nodes.node).toHaveLength(51);
    expect(gexf.graph.edges.edge).toHaveLength(covers);
    const json = JSON.parse(place.output(['faces', file, '--graph']));
    expect(json.nodes).toHaveLength(51);
    expect(json.edges).toHaveLength(covers);
    place.output(['faces', file, '-o', 'nodes.csv', '--edges', 'edges.csv']);
    expect(lines(place.read('nodes.csv'))).toHaveLength(52);
    expect(lines(place.read('edges.csv'))).toHaveLength(covers + 1);
  });
});

describe('flats', () => {
  it('lists them with Moebius values whose sizes add up to the regions', () => {
    const rows = lines(place.output(['flats', file])).slice(1);
    expect(rows).toHaveLength(12);
    const sum = rows.reduce((total, row) => total + Math.abs(Number(row.split(',').at(-1))), 0);
    expect(sum).toBe(14);
    expect(JSON.parse(place.output(['flats', file, '--json'])).flats).toHaveLength(12);
  });

  it('writes their lattice as a graph', () => {
    const json = JSON.parse(place.output(['flats', file, '--graph', '--json']));
    // 4 planes under the space, 2 planes through each of 6 lines, 6 lines over the point.
    expect([json.nodes.length, json.edges.length]).toEqual([12, 4 + 12 + 6]);
    place.output(['flats', file, '-o', 'flats.gexf']);
    expect(place.read('flats.gexf')).toContain('<gexf');
  });
});

describe('polynomial', () => {
  it('is written three ways, by either route', () => {
    const text = 't^3 - 4 t^2 + 6 t - 3\n';
    expect(place.output(['polynomial', file])).toBe(text);
    expect(place.output(['polynomial', file, '--route', 'flats'])).toBe(text);
    expect(place.output(['polynomial', file, '--route=deletion-restriction'])).toBe(text);
    expect(place.output(['polynomial', file, '--format', 'latex'])).toBe(
      't^{3} - 4 t^{2} + 6 t - 3\n',
    );
    expect(JSON.parse(place.output(['polynomial', file, '--json', '--route', 'flats']))).toEqual({
      schema: 'signwright/polynomial/1',
      route: 'flats',
      coefficients: ['-3', '6', '-4', '1'],
      text: text.trim(),
      integerRoots: null,
      regions: '14',
    });
  });
});

describe('crosscheck', () => {
  it('agrees with our own list and number', () => {
    place.output(['regions', file, '-o', 'own.csv']);
    expect(place.output(['crosscheck', file, 'own.csv'])).toContain('The two agree.');
    expect(place.output(['crosscheck', file, '--regions', '14'])).toContain('The two agree.');
  });

  it('says what is missing, repeated and extra, with status 4', () => {
    const rows = lines(place.output(['regions', file])).map((row) => row.split(',')[0]);
    place.write('signs.txt', [rows[5], ...rows.slice(2), '+++-'].join('\n'));
    const { status, stdout, stderr } = place.run(['crosscheck', file, 'signs.txt', '--json']);
    expect(status).toBe(4);
    expect(JSON.parse(stdout).agrees).toBe(false);
    expect(stderr).toMatch(/^signwright: signs\.txt: .*\n$/);
    const count = place.run(['crosscheck', file, '--regions', '15']);
    expect(count.status).toBe(4);
    expect(count.stdout).toMatch(/ours +14\n +theirs +15/);
  });
});

describe('draw', () => {
  it('draws the Hasse diagram, whole or in part, the same each time', () => {
    const svg = place.output(['draw', 'hasse', file]);
    expect(svg).toMatch(/^<(\?xml|svg)/);
    expect(svg).toContain('<title');
    expect(place.output(['draw', 'hasse', file])).toBe(svg);
    place.output(['draw', 'hasse', file, '--below=++++', '--title', 'One region', '-o', 'one.svg']);
    expect(place.read('one.svg')).toContain('One region');
    expect(place.read('one.svg').length).toBeLessThan(svg.length);
    for (const flag of ['--above=+00+', '--regions-and-walls', '--summary', '--portrait']) {
      expect(place.output(['draw', 'hasse', file, flag]), flag).not.toBe(svg);
    }
  });
});

describe('draw zonotope and draw tiling', () => {
  it('draw the solid, marked or from elsewhere, and its tiles, the same each time', () => {
    for (const picture of ['zonotope', 'tiling']) {
      const svg = place.output(['draw', picture, file]);
      expect(svg).toContain('<title');
      expect(place.output(['draw', picture, file])).toBe(svg);
      for (const flag of ['--view=-1,2,0.5', '--project=1,2', '--portrait', '--title=Ours']) {
        expect(place.output(['draw', picture, file, flag]), flag).not.toBe(svg);
      }
    }
    place.output(['draw', 'zonotope', file, '--region=++++', '-o', 'marked.svg']);
    expect(place.read('marked.svg')).toContain('region ++++ is marked');
  });

  it('refuse what makes no sense', () => {
    for (const [flags, says] of [
      [['--view=1,2'], /view 1,2: not a direction/],
      [['--view=1,a,2'], /--view 1,a,2: not three numbers/],
      [['--view=0,0,0'], /not a direction/],
      [['--region=++'], /not 4 signs/],
      [['--region=---+'], /no region of the arrangement/],
      [['--project=1,9'], /'9' is not one of 3 coordinates/],
      [['--project=1,2', '--view=1,1,1'], /leave the view out/],
    ] as [string[], RegExp][]) {
      const { status, stderr, stdout } = place.run(['draw', 'zonotope', file, ...flags]);
      expect([status, stdout]).toEqual([2, '']);
      expect(stderr).toMatch(says);
    }
  });
});

describe('make', () => {
  const edges = place.write('edges.txt', 'a b\nb c\nc a\n');
  const offers = place.write('offers.csv', 'option,price,speed\nA,1,2\nB,2,1\nC,3,3\n');
  // Normals of each family, by counting its members.
  const families: [string[], number][] = [
    [['reflection', 'B3'], 9],
    [['reflection', 'H3'], 15],
    [['reflection', 'I2(8)'], 8],
    [['all-subsets', '4'], 15],
    [['threshold', '3'], 8],
    [['graph', edges], 3],
    [['graph', '--complete', '5'], 10],
    [['graph', '--cycle', '7'], 7],
    [['graph', '--grid', '2x3'], 7],
    [['generic', '--rank', '3', '--normals', '8'], 8],
    [['random', '--rank', '3', '--normals', '6', '--bound', '9', '--seed', '5'], 6],
    [['polar-zonohedron', '5'], 5],
    [['comparisons', offers], 3],
  ];

  for (const [args, count] of families) {
    it(`writes ${args.join(' ')}, to be read back`, async () => {
      const json = place.output(['make', ...args, '--json']);
      expect((await read(json)).normals).toHaveLength(count);
    });
  }

  it('writes every form with the same normals', async () => {
    for (const args of [
      ['reflection', 'H3'],
      ['comparisons', offers],
    ]) {
      const { normals } = await read(place.output(['make', ...args, '--json']));
      for (const format of ['text', 'csv']) {
        const text = place.output(['make', ...args, '--format', format]);
        expect((await read(text)).normals, format).toEqual(normals);
      }
    }
  });

  it('writes by itself what the next command reads, from a pipe or from a file of any name', async () => {
    for (const args of [
      ['reflection', 'G2'],
      ['graph', '--cycle', '4'],
      ['comparisons', offers],
    ]) {
      const text = place.output(['make', ...args]);
      const { title, coordinates, labels } = await read(place.output(['make', ...args, '--json']));
      expect(await read(text)).toMatchObject({ title, coordinates, labels });
      expect(place.output(['census', '-'], text).split('\n')[0]).toBe(title);
      for (const name of ['made.txt', 'made.dat', 'made']) {
        expect(place.output(['census', place.write(name, text)]).split('\n')[0]).toBe(title);
      }
    }
    const hostile = place.write('hostile.csv', 'option,"a,b",c\n#1,1,2\n#2,2,1\n');
    expect(
      place.output(['regions', '-', '--count'], place.output(['make', 'comparisons', hostile])),
    ).toBe('2\n');
  });

  it('writes to a file by its ending, the same for the same seed', () => {
    const random = ['make', 'random', '--rank', '4', '--normals', '9', '--bound', '99'];
    place.output([...random, '--seed', '3', '-o', 'a.json']);
    place.output([...random, '--seed', '3', '-o', 'b.json']);
    place.output([...random, '--seed', '4', '-o', 'c.json']);
    expect(place.read('a.json')).toBe(place.read('b.json'));
    expect(place.read('a.json')).not.toBe(place.read('c.json'));
  });
});
