// Words in an unexpected order: noticed before the arguments are parsed, and named.
import { InputError } from '../errors.js';
import { either } from './options.js';

/** Commands that take a word before what they work on, with what it is and the words they take. */
const wordFirst: Record<string, { readonly noun: string; readonly words: readonly string[] }> = {
  draw: { noun: 'picture', words: ['hasse', 'zonotope', 'tiling'] },
  make: {
    noun: 'family',
    words: [
      'reflection',
      'all-subsets',
      'threshold',
      'graph',
      'generic',
      'random',
      'polar-zonohedron',
      'comparisons',
    ],
  },
};

/** Commands of the trade that this version does not have. */
const later = [
  'symmetry',
  'report',
  'locate',
  'separation',
  'compare',
  'audit',
  'snap',
  'derive',
  'worker',
  'gather',
];

/** Pictures that this version does not draw. */
const laterPictures = ['sphere', 'lines', 'region-graph'];

/** Throws InputError with the command as it was meant, where that can be told. */
export function checkOrder(args: readonly string[], commands: readonly string[]): void {
  const words = args.filter((arg) => !arg.startsWith('-') || arg === '-');
  const [first, second] = words;
  if (first === undefined) return;
  const known = (word: string | undefined): boolean =>
    word !== undefined && commands.includes(word);
  if (!known(first)) {
    const command = words.find(known);
    if (command !== undefined) {
      throw new InputError(
        `the command comes first, before ${args[0]}`,
        `write: signwright ${inOrder(command, args)}`,
      );
    }
    if (later.includes(first)) {
      throw new InputError(
        `${first}: this version has no such command`,
        `it has ${commands.join(', ')}`,
      );
    }
    return;
  }
  const takes = wordFirst[first];
  if (takes === undefined || (second !== undefined && takes.words.includes(second))) return;
  if (second === undefined) {
    if (args.includes('--help') || args.includes('-h')) return;
    throw new InputError(`${first}: no ${takes.noun} is named`, `give ${either(takes.words)}`);
  }
  if (first === 'draw' && laterPictures.includes(second)) {
    throw new InputError(
      `draw ${second}: this version has no such picture`,
      `it has ${takes.words.join(', ')}`,
    );
  }
  if (words.slice(2).some((word) => takes.words.includes(word))) {
    throw new InputError(
      `${first}: the ${takes.noun} comes first, before ${args[args.indexOf(first) + 1]}`,
      `write: signwright ${inOrder(first, args)}`,
    );
  }
  throw new InputError(`${first} ${second}: no such ${takes.noun}`, `give ${either(takes.words)}`);
}

/** All arguments, the command and the word it takes moved to the front. */
function inOrder(command: string, args: readonly string[]): string {
  const rest = args.toSpliced(args.indexOf(command), 1);
  const words = wordFirst[command]?.words ?? [];
  const at = rest.findIndex((word) => words.includes(word));
  const word = at < 0 ? [] : rest.splice(at, 1);
  return [command, ...word, ...rest].map(quotedForShell).join(' ');
}

function quotedForShell(word: string): string {
  return /^[\w./:=+,@%-]+$/.test(word) ? word : `'${word.replaceAll("'", "'\\''")}'`;
}
