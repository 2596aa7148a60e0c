// The commands with their help. Each command's file loads what it computes with only when it runs,
// so that the program starts at once.
import { Command } from 'commander';
import { version } from '../census/version.js';
import { addCensus } from './census.js';
import { addCrosscheck } from './crosscheck.js';
import { addDraw } from './draw.js';
import { addFaces } from './faces.js';
import { addFlats } from './flats.js';
import { addMake } from './make.js';
import { checkPlaces } from './places.js';
import { addPolynomial } from './polynomial.js';
import { addRegions } from './regions.js';
import { addZonotope } from './zonotope.js';

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

/** The program, ready to parse; errors are thrown, never printed. */
export function buildProgram(): Command {
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
  for (const add of [
    addCensus,
    addRegions,
    addFaces,
    addFlats,
    addPolynomial,
    addZonotope,
    addCrosscheck,
    addDraw,
    addMake,
  ]) {
    add(program);
  }
  return program;
}
