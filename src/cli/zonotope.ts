// `zonotope`: faces, volume, Ehrhart polynomial, lattice points; lists, margins of a point, a mesh.
import type { Command } from 'commander';
import type { Arrangement } from '../arrangement/arrangement.js';
import { Disagreement, InputError } from '../errors.js';
import type { ExactNumber } from '../exact/number.js';
import type { ListFormat } from '../export/regions.js';
import { defaultRouteSeconds, measurePatienceSeconds } from '../limits.js';
import { jsonText } from './json.js';
import { loadArrangement } from './load.js';
import {
  addCommonOptions,
  type CommonOptions,
  chooseFormat,
  either,
  memoryOf,
  readInteger,
  readSeconds,
} from './options.js';
import { writeTo } from './output.js';
import { type Progress, startProgress } from './progress.js';

const pageFormats = ['text', 'json'];
const listFormats = ['csv', 'ndjson', 'json'];
const lists = ['vertices', 'edges', 'facets', 'tiles'] as const;
type List = (typeof lists)[number];

interface ZonotopeFlags extends CommonOptions {
  readonly list?: string;
  readonly facetVertices?: boolean;
  readonly dilate?: bigint;
  readonly atOrigin?: boolean;
  readonly origin?: string;
  readonly mesh?: string;
  readonly project?: string;
  readonly budget?: number;
}

const after = `
The zonotope is the sum of the segments from low to high of all generators as
given (0 to 1 where the file gives no range), parallel and repeated ones too.
Volume and lattice points are relative to the lattice of its span.

Lists (csv, ndjson or json; they stream):
  vertices   signs (+ high, - low) and the point, in the order of regions
  edges      signs (0 along the edge), generators, both ends
  facets     normal . z <= offset with primitive integers; the signs of the ray,
             the free generators, how many vertices; --facet-vertices names them
             by their row in the list of vertices, from 1
  tiles      the half-open parallelepipeds that partition the zonotope, one for
             each independent set of generators: shift + the sum of segments,
             each without the end named in open; raised are at their high end

Examples:
  signwright zonotope normals.txt
  signwright zonotope normals.txt --dilate 10 --json
  signwright zonotope normals.txt --at-origin
  signwright zonotope thrusters.csv --origin=0,0,1/2
  signwright zonotope normals.txt --list facets -o facets.csv
  signwright zonotope normals.txt --mesh solid.obj
  signwright zonotope rank5.txt --mesh shadow.ply --project 1,2,4`;

export function addZonotope(program: Command): void {
  const command = program
    .command('zonotope')
    .summary('the zonotope: faces, volume, Ehrhart polynomial, lattice points')
    .description('The zonotope: faces, facets, volume, Ehrhart polynomial, lattice points, mesh.')
    .argument('<arrangement>', 'a file of normals, or - for standard input');
  addCommonOptions(command, [...pageFormats, 'csv', 'ndjson'])
    .option('--list <what>', `list ${either(lists)} instead of the page`)
    .option('--facet-vertices', 'with --list facets: which vertices are on each')
    .option('--dilate <k>', 'lattice points of k times the zonotope too', readInteger('--dilate'))
    .option('--at-origin', 'move the zonotope so that its centre is the origin')
    .option('--origin <point>', 'margins of a point, as 0,0,1/2 (with = before a sign)')
    .option('--mesh <file>', 'the boundary as OBJ, PLY, STL or glTF, by the ending (rank 3)')
    .option('--project <three>', 'with --mesh: coordinates 1,2,4 or names, or principal')
    .option(
      '--budget <seconds>',
      `time a route may take by estimate (default: ${defaultRouteSeconds})`,
      readSeconds,
    )
    .addHelpText('after', after)
    .action(run);
}

async function run(name: string, options: ZonotopeFlags): Promise<void> {
  const list = chosenList(options);
  const format = chooseFormat(options, list === null ? pageFormats : listFormats);
  const meshFormat = options.mesh === undefined ? null : await chosenMesh(options.mesh);
  const given = await loadArrangement(name);
  const point = options.origin === undefined ? null : await readPoint(options.origin, given);
  const progress = await startProgress(options.quiet);
  try {
    const { movedToOrigin } = await import('../zonotope/shape.js');
    const arrangement = options.atOrigin ? movedToOrigin(given) : given;
    if (meshFormat !== null) await writeMesh(arrangement, options, meshFormat, progress);
    if (list === null) await writeReport(given, arrangement, point, options, format, progress);
    else await writeList(arrangement, list, options, format as ListFormat, progress);
  } finally {
    progress.end();
  }
}

function chosenList({
  list,
  facetVertices,
  dilate,
  origin,
  project,
  mesh,
}: ZonotopeFlags): List | null {
  const chosen = list === undefined ? null : lists.find((what) => what === list);
  if (chosen === undefined) {
    throw new InputError(`--list ${list}: no such list`, `give ${either(lists)}`);
  }
  if (facetVertices && chosen !== 'facets') {
    throw new InputError(
      '--facet-vertices goes with --list facets',
      'add it, or leave the two out',
    );
  }
  if (project !== undefined && mesh === undefined) {
    throw new InputError('--project goes with --mesh FILE', 'add it');
  }
  if (dilate !== undefined && dilate < 1n) {
    throw new InputError(`--dilate ${dilate}: not a dilate`, 'give 1 or more');
  }
  const alone = dilate !== undefined ? '--dilate' : origin !== undefined ? '--origin' : null;
  if (chosen !== null && alone !== null) {
    throw new InputError(`${alone} does not go with --list`, 'ask for the two one after the other');
  }
  return chosen;
}

async function readPoint(text: string, { generators }: Arrangement): Promise<ExactNumber[]> {
  const { NumberFault, parseNumber } = await import('../input/number-text.js');
  const cells = text.trim().split(text.includes(',') ? ',' : /\s+/);
  const dimension = generators.normals[0].length;
  if (cells.length !== dimension) {
    throw new InputError(
      `--origin ${text}: ${cells.length} numbers, the arrangement has ${dimension} coordinates`,
      'give one for each, with commas between',
    );
  }
  return cells.map((cell) => {
    try {
      const { value, radicand } = parseNumber(cell.trim());
      if (radicand === null || radicand === generators.radicand) return value;
    } catch (fault) {
      if (!(fault instanceof NumberFault)) throw fault;
      throw new InputError(`--origin ${text}: ${fault.what}`, fault.remedy);
    }
    throw new InputError(
      `--origin ${text}: ${cell.trim()} is not in the field of the generators`,
      generators.radicand === null
        ? 'give rational numbers'
        : `use sqrt(${generators.radicand}) only`,
    );
  });
}

async function writeReport(
  given: Arrangement,
  arrangement: Arrangement,
  point: ExactNumber[] | null,
  options: ZonotopeFlags,
  format: string,
  progress: Progress,
): Promise<void> {
  const [{ reportZonotope }, { formatZonotopePage }, { heading }, { describeDisagreement }] =
    await Promise.all([
      import('../census/zonotope-report.js'),
      import('../census/zonotope-page.js'),
      import('../export/heading.js'),
      import('../census/census.js'),
    ]);
  const report = reportZonotope(arrangement, {
    secondsPerRoute: options.budget ?? defaultRouteSeconds,
    patienceSeconds: options.budget === undefined ? measurePatienceSeconds : 0,
    memoryBytes: memoryOf(options),
    dilate: options.dilate ?? null,
    point,
    listener: progress,
  });
  progress.end();
  const moved = options.atOrigin === true;
  const text =
    format === 'json'
      ? jsonText({ schema: 'signwright/zonotope/1', ...heading(given), atOrigin: moved, ...report })
      : formatZonotopePage(arrangement, report, moved);
  await writeTo(options.out ?? null, (result) => result.write(text));
  const wrong = report.checks.filter((check) => !check.agrees);
  if (wrong.length > 0) {
    throw new Disagreement(
      `${wrong.map(describeDisagreement).join('; ')}; do not use these numbers, and please report them`,
    );
  }
}

async function writeList(
  arrangement: Arrangement,
  list: List,
  options: ZonotopeFlags,
  format: ListFormat,
  progress: Progress,
): Promise<void> {
  const chunks = await listChunks(arrangement, list, options, format, progress);
  await writeTo(options.out ?? null, (result) => result.writeAll(chunks));
}

async function listChunks(
  arrangement: Arrangement,
  list: List,
  options: ZonotopeFlags,
  format: ListFormat,
  progress: Progress,
): Promise<Iterable<string>> {
  const memory = memoryOf(options);
  const [writers, rows] = await Promise.all([
    import('../export/zonotope-lists.js'),
    import('../census/zonotope-lists.js'),
  ]);
  if (list === 'vertices') {
    return writers.writeVertices(
      arrangement,
      rows.listVertices(arrangement, memory, progress),
      format,
    );
  }
  if (list === 'edges') {
    return writers.writeEdges(arrangement, rows.listEdges(arrangement, memory, progress), format);
  }
  if (list === 'tiles') {
    return writers.writeTiles(arrangement, rows.listTiles(arrangement, progress), format);
  }
  const named = options.facetVertices === true;
  const facets = rows.listFacets(arrangement, named, memory, progress);
  return writers.writeFacets(arrangement, facets, format, named);
}

type MeshFormat = import('../export/mesh.js').MeshFormat;

async function chosenMesh(file: string): Promise<MeshFormat> {
  const { meshFormatOf } = await import('../export/mesh.js');
  return meshFormatOf(file);
}

async function writeMesh(
  arrangement: Arrangement,
  { mesh, project }: ZonotopeFlags,
  format: MeshFormat,
  progress: Progress,
): Promise<void> {
  const [{ meshText }, { buildSolid }, { readProjection }] = await Promise.all([
    import('../export/mesh.js'),
    import('../zonotope/solid.js'),
    import('../zonotope/solid-projection.js'),
  ]);
  progress.stage('the mesh');
  const solid = buildSolid(arrangement, readProjection(project, arrangement.generators));
  await writeTo(mesh!, (file) => file.writeAll(meshText(format, solid)));
  progress.end();
}
