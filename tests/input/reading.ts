// Helpers: read a text as a file of a name, and catch the fault of a text that cannot be read.
import { InputError } from '../../src/errors.js';
import { type ExactNumber, formatNumber } from '../../src/exact/number.js';
import type { GeneratorList } from '../../src/input/generators.js';
import { readGenerators } from '../../src/input/read.js';

export function readAs(name: string, text: string): Promise<GeneratorList> {
  return readGenerators(new TextEncoder().encode(text), name);
}

/** The normals as users write them. */
export function shown(list: GeneratorList): string[][] {
  return list.normals.map((normal) =>
    normal.map((x: ExactNumber) => formatNumber(x, list.radicand)),
  );
}

/** The InputError thrown; an Error of the tests where none is. */
export async function faultOf(work: () => unknown): Promise<InputError> {
  try {
    await work();
  } catch (error) {
    if (error instanceof InputError) return error;
    throw error;
  }
  throw new Error('no fault was found');
}

/** `line:column what` of the fault in a text read as a file of a name. */
export async function faultIn(name: string, text: string): Promise<string> {
  const { position, what, remedy } = await faultOf(() => readAs(name, text));
  if (remedy === '') throw new Error('the fault has no remedy');
  return `${position?.line ?? '-'}:${position?.column ?? '-'} ${what}`;
}
