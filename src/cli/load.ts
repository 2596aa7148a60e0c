// The operand ARRANGEMENT: a file, or - for standard input.
import { readFileSync, statSync } from 'node:fs';
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';

/** All bytes of a file or of standard input. InputError for a folder or a missing file. */
export async function readBytes(name: string): Promise<Uint8Array> {
  if (name === '-') {
    if (process.stdin.isTTY)
      process.stderr.write('signwright: reading from the terminal; end with Ctrl-D\n');
    const chunks: Buffer[] = [];
    for await (const chunk of process.stdin) chunks.push(chunk as Buffer);
    return Buffer.concat(chunks);
  }
  const status = statSync(name, { throwIfNoEntry: false });
  if (status === undefined)
    throw new InputError(`${name}: no such file`, 'check the name, or give - for standard input');
  if (status.isDirectory()) throw new InputError(`${name}: is a folder`, 'name a file in it');
  return readFileSync(name);
}

/** Reads and builds the arrangement. */
export async function loadArrangement(name: string): Promise<Arrangement> {
  const bytes = await readBytes(name);
  const [{ readGenerators }, { buildArrangement }] = await Promise.all([
    import('../input/read.js'),
    import('../arrangement/build.js'),
  ]);
  return buildArrangement(await readGenerators(bytes, name));
}
