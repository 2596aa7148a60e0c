// Where a command is to write, looked at before it computes anything: a run of minutes must not end
// at a folder that is not there, nor two results in one file, nor a result in what was read.
import { accessSync, constants, existsSync, realpathSync, statSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { InputError } from '../errors.js';

/** Options that name a file to write. */
const writing = ['out', 'record', 'edges', 'mesh'];

/** Throws InputError unless all that the options name can be written and is apart. */
export function checkPlaces(
  options: Readonly<Record<string, unknown>>,
  operands: readonly string[],
): void {
  const taken = new Map<string, string>();
  for (const operand of operands) {
    const file = realFile(operand);
    if (file !== null) taken.set(file, `${operand} is read`);
  }
  for (const option of writing) {
    const name = options[option];
    if (typeof name !== 'string' || name === '-') continue;
    const what = `--${option} ${name}`;
    requirePlace(name, what);
    const file = realFile(name) ?? resolve(name);
    const other = taken.get(file);
    if (other !== undefined && !file.startsWith('/dev/')) {
      throw new InputError(`${what}: ${other} too`, 'name another file');
    }
    taken.set(file, `--${option} is written to it`);
  }
}

function requirePlace(name: string, what: string): void {
  if (name === '') throw new InputError(`${what}: no name is given`, 'name a file');
  const status = statSync(name, { throwIfNoEntry: false });
  if (name.endsWith('/') || status?.isDirectory()) {
    throw new InputError(`${what}: is a folder`, 'name a file in it');
  }
  // A device or a named pipe is written to where it is; a file is written beside and renamed.
  if (status !== undefined && !status.isFile()) return;
  const folder = dirname(status === undefined ? name : realpathSync(name));
  if (!existsSync(folder)) {
    throw new InputError(`${what}: there is no folder ${folder}`, 'make it, or check the name');
  }
  try {
    accessSync(folder, constants.W_OK);
  } catch {
    throw new InputError(
      `${what}: the folder ${folder} may not be written to`,
      'choose a place you may write to',
    );
  }
}

/** The file of a name with links followed; null where there is none, or it is no plain file. */
function realFile(name: string): string | null {
  return statSync(name, { throwIfNoEntry: false })?.isFile() ? realpathSync(name) : null;
}
