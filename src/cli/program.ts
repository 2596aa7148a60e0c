// The commands with their help. Only the file of the command that is run is loaded, and that loads
// what it computes with only when it runs, so that the program starts at once.
import { Command } from 'commander';
import { version } from '../census/version.js';
import { checkPlaces } from './places.js';

interface Entry {
  readonly name: string;
  readonly summary: string;
  /** Loads the command's file and adds the command to the program. */
  readonly add: (program: Command) => Promise<void>;
}

const entries: readonly Entry[] = [
  {
    name: 'census',
    summary: 'every count, each by independent routes',
    add: async (program) => (await import('./census.js')).addCensus(program),
  },
  {
    name: 'regions',
    summary: 'the list of regions: signs, walls, point, zonotope vertex',
    add: async (program) => (await import('./regions.js')).addRegions(program),
  },
  {
    name: 'faces',
    summary: 'every face with its dimension; the face poset as a graph',
    add: async (program) => (await import('./faces.js')).addFaces(program),
  },
  {
    name: 'flats',
    summary: 'the intersection lattice: rank and Moebius value of each flat',
    add: async (program) => (await import('./flats.js')).addFlats(program),
  },
  {
    name: 'polynomial',
    summary: 'the characteristic polynomial, without listing regions',
    add: async (program) => (await import('./polynomial.js')).addPolynomial(program),
  },
  {
    name: 'zonotope',
    summary: 'the zonotope: faces, volume, Ehrhart polynomial, lattice points',
    add: async (program) => (await import('./zonotope.js')).addZonotope(program),
  },
  {
    name: 'crosscheck',
    summary: "somebody else's list, or number of regions, held against ours",
    add: async (program) => (await import('./crosscheck.js')).addCrosscheck(program),
  },
  {
    name: 'draw',
    summary: 'a picture as SVG: hasse, zonotope, tiling',
    add: async (program) => (await import('./draw.js')).addDraw(program),
  },
  {
    name: 'make',
    summary: 'the normals of a standard family',
    add: async (program) => (await import('./make.js')).addMake(program),
  },
];

/** The commands by name, in the order of the help. */
export const commandNames: readonly string[] = entries.map(({ name }) => name);

const about = `
Regions, faces, flats, characteristic polynomial and zonotope of a central
hyperplane arrangement, computed exactly, each count by independent routes.`;

const after = `
ARRANGEMENT is a file of normals (text, CSV, JSON or NPY), or - for standard
input. Numbers are exact: 12, -3/4, 0.125, 2+3*sqrt(5).

Examples:
  signwright census normals.txt              every count, cross-checked
  signwright make reflection B3 | signwright census -
  signwright regions normals.txt -o regions.csv
  signwright draw hasse normals.txt -o faces.svg

Exit status: 0 done, 1 a fault of ours, 2 bad input or usage, 3 a limit was
reached, 4 a check disagrees, 130 interrupted.`;

/**
 * The program, ready to parse the command `wanted`; the others are there by name, for the help and
 * for suggestions. Errors are thrown, never printed.
 */
export async function buildProgram(wanted: string | undefined): Promise<Command> {
  const program = new Command('signwright')
    .description(about.trim())
    .usage('COMMAND ARRANGEMENT [options]')
    .version(version, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print help; after a command, its own')
    .helpCommand(false)
    .addHelpText('after', after)
    .configureHelp({ helpWidth: 80, subcommandTerm: (command) => command.name() })
    .configureOutput({ writeErr: () => {}, getOutHelpWidth: () => 80, getErrHelpWidth: () => 80 })
    .exitOverride()
    .hook('preAction', (_, command) => checkPlaces(command.opts(), command.args));
  for (const { name, summary, add } of entries) {
    if (name === wanted) await add(program);
    else program.command(name).summary(summary);
  }
  return program;
}
