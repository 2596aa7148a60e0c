// Errors to one line and an exit status. The only place that knows the statuses:
// 0 done, 1 a fault of ours, 2 bad input or usage, 3 a limit, 4 a disagreement, 130 interrupted.
import { Disagreement, InputError, LimitError } from '../errors.js';

export interface Ending {
  readonly status: number;
  /** One line for standard error, or null to say nothing. */
  readonly message: string | null;
}

const done: Ending = { status: 0, message: null };

/** What a thrown value means for whoever started the program with `command`, if it is known. */
export function endingOf(error: unknown, command = ''): Ending {
  if (error instanceof InputError) return { status: 2, message: error.message };
  if (error instanceof LimitError) return { status: 3, message: error.message };
  if (error instanceof Disagreement) return { status: 4, message: error.message };
  if (!(error instanceof Error)) return { status: 1, message: fault(String(error)) };
  const { code, exitCode } = error as { code?: unknown; exitCode?: unknown };
  // A reader that has seen enough: `| head`.
  if (code === 'EPIPE') return done;
  if (typeof code === 'string' && code.startsWith('commander.')) {
    return exitCode === 0 ? done : { status: 2, message: usage(error.message, command) };
  }
  if (outOfMemory(error)) {
    return {
      status: 3,
      message:
        'memory: a table needs more than this machine or Node can give; ' +
        'take fewer normals, or ask for counts only',
    };
  }
  const system = systemFault(error);
  return system ?? { status: 1, message: fault(`${error.name}: ${error.message}`) };
}

/** A usage error on one line, with the suggestion and where to read more. */
function usage(message: string, command: string): string {
  const line = message
    .trim()
    .replace(/^error: /, '')
    .replace(/\s*\n\s*/g, ' ')
    .replace(/\.?\s*\(Did you mean (.*)\?\)$/, '; did you mean $1?')
    .replace(/\.$/, '');
  return `${line}${line.endsWith('?') ? ' See' : '; see'}: signwright ${command === '' ? '' : `${command} `}--help`;
}

function outOfMemory(error: Error): boolean {
  return (
    error instanceof RangeError &&
    /Array buffer allocation failed|Invalid typed array length|Invalid array length/.test(
      error.message,
    )
  );
}

/** Trouble with files is the user's to mend. */
function systemFault(error: Error): Ending | null {
  const { code, path } = error as { code?: unknown; path?: unknown };
  const where = typeof path === 'string' ? `${path}: ` : '';
  const known: Record<string, string> = {
    ENOENT: 'no such file or folder; check the name',
    EACCES: 'permission denied; choose a place you may read or write',
    EPERM: 'not permitted; choose a place you may read or write',
    EISDIR: 'is a folder; name a file in it',
    ENOTDIR: 'a part of the path is not a folder; check the name',
    ENOSPC: 'no space left on the disk; make room or write elsewhere',
    EROFS: 'the disk is read-only; write elsewhere',
    EMFILE: 'too many open files; close some programs',
    ENAMETOOLONG: 'the name is too long; choose a shorter one',
  };
  const text = typeof code === 'string' ? known[code] : undefined;
  return text === undefined ? null : { status: 2, message: `${where}${text}` };
}

function fault(text: string): string {
  return (
    `a fault of the program: ${text.replace(/\s*\n\s*/g, ' ')}; please report it with the input ` +
    '(SIGNWRIGHT_DEBUG=1 shows where)'
  );
}
