// Options that mean the same for every command, and the reading of their values.
import { type Command, Option } from 'commander';
import { InputError } from '../errors.js';
import { defaultMemoryBytes } from '../limits.js';

export interface CommonOptions {
  readonly out?: string;
  readonly format?: string;
  readonly json?: boolean;
  readonly threads?: number;
  readonly memory?: number;
  readonly quiet?: boolean;
}

/** Adds --out, --format, --json (where json is a format), --threads, --memory and --quiet. */
export function addCommonOptions(command: Command, formats: readonly string[]): Command {
  command
    .option('-o, --out <file>', 'write the result to a file; its ending picks the format')
    .option('--format <name>', `${formats.join(', ')} (default: ${formats[0]})`);
  if (formats.includes('json')) command.option('--json', 'the same as --format json');
  return command
    .option('--threads <n>', 'threads to run on; this version runs on 1', readThreads)
    .option('--memory <size>', 'memory for tables, as 500MB or 4GB (default: 2GB)', readMemory)
    .option('-q, --quiet', 'no progress on standard error')
    .addOption(acceptedOption('--seed <n>').argParser(readInteger('--seed')));
}

/** An option that means the same everywhere and has nothing to change in this command. */
export function acceptedOption(flags: string): Option {
  return new Option(flags, 'accepted by every command').hideHelp();
}

/** Formats by the endings of file names. */
const endings: Record<string, readonly string[]> = {
  csv: ['csv'],
  ndjson: ['ndjson'],
  jsonl: ['ndjson'],
  json: ['json'],
  txt: ['text'],
  md: ['markdown'],
  markdown: ['markdown'],
  tex: ['latex'],
  graphml: ['graphml'],
  gexf: ['gexf'],
  svg: ['svg'],
};

/**
 * The format asked for: by --format or --json, else by the ending of --out, else the first of
 * `formats`. InputError when it is none of them, or the two ways to ask differ.
 */
export function chooseFormat(options: CommonOptions, formats: readonly string[]): string {
  const { format, json, out } = options;
  if (json && format !== undefined && format !== 'json') {
    throw new InputError(`--json and --format ${format} ask for two formats`, 'give one of them');
  }
  const asked = json ? 'json' : format;
  if (asked !== undefined) {
    if (formats.includes(asked)) return asked;
    throw new InputError(
      `--format ${asked}: not a format of this command`,
      `take ${either(formats)}`,
    );
  }
  if (out === undefined || out === '-' || out.startsWith('/dev/')) return formats[0];
  const ending = /\.([A-Za-z]+)$/.exec(out)?.[1]?.toLowerCase() ?? '';
  const fitting = endings[ending]?.find((name) => formats.includes(name));
  if (fitting !== undefined) return fitting;
  throw new InputError(
    `--out ${out}: the ending does not tell a format of this command`,
    `add --format with ${either(formats)}`,
  );
}

/** `a, b or c`. */
export function either(names: readonly string[]): string {
  return names.length < 2
    ? names.join('')
    : `${names.slice(0, -1).join(', ')} or ${names[names.length - 1]}`;
}

/** Bytes allowed for tables. */
export function memoryOf(options: CommonOptions): number {
  return options.memory ?? defaultMemoryBytes;
}

export function readThreads(text: string): number {
  if (text === '1') return 1;
  throw new InputError(
    `--threads ${text}: this version runs on one thread`,
    'leave the option out, or give 1',
  );
}

export function readMemory(text: string): number {
  const parts = /^(\d+(?:\.\d+)?)\s*([kMGT]?)i?B?$/i.exec(text);
  const power = ['', 'K', 'M', 'G', 'T'].indexOf(parts?.[2]?.toUpperCase() ?? '');
  const bytes = Number(parts?.[1]) * 1024 ** power;
  if (parts !== null && bytes >= 1024 ** 2) return bytes;
  throw new InputError(`--memory ${text}: not a size of 1MB or more`, 'write it as 500MB or 4GB');
}

/** A reader of whole numbers from `least` up, for the option or argument named. */
export function readWhole(name: string, least: number): (text: string) => number {
  return (text) => {
    const value = Number(text);
    if (/^[+]?\d+$/.test(text) && Number.isSafeInteger(value) && value >= least) return value;
    const whole = /^[+]?\d+$/.test(text);
    if (whole && value >= least) {
      throw new InputError(`${name} ${text}: too large`, 'give a smaller number');
    }
    const fault = whole ? 'too small' : 'not a whole number';
    throw new InputError(`${name} ${text}: ${fault}`, `give ${least} or more`);
  };
}

/** The same for integers of any length and sign. */
export function readInteger(name: string): (text: string) => bigint {
  return (text) => {
    if (/^[+-]?\d+$/.test(text)) return BigInt(text.replace(/^\+/, ''));
    throw new InputError(`${name} ${text}: not an integer`, 'give digits, with a sign if need be');
  };
}

/** A reader of positive seconds. */
export function readSeconds(text: string): number {
  const value = Number(text);
  if (/^\d+(\.\d+)?$/.test(text) && value > 0) return value;
  throw new InputError(`--budget ${text}: not a number of seconds`, 'give a number above 0');
}
