// The program: arguments in, exit status out. Nothing else sets the status.
import type { Command } from 'commander';
import { type Ending, endingOf } from './exit.js';
import { checkOrder } from './order.js';
import { buildProgram, commandNames } from './program.js';

/** Runs one command; never rejects. */
export async function main(words: readonly string[]): Promise<void> {
  const args = words[0] === 'help' ? helpFor(words.slice(1)) : words;
  const program = await buildProgram(args.find((arg) => commandNames.includes(arg)));
  const command = commandPath(program, args);
  const finish = (error: unknown): void => end(endingOf(error, command), error);
  process.stderr.on('error', () => {});
  process.stdout.on('error', finish);
  try {
    checkOrder(args, commandNames);
    if (args.length === 0) program.outputHelp();
    else await program.parseAsync([...args], { from: 'user' });
  } catch (error) {
    finish(error);
  }
}

/** `help make` is `make --help`; of what is no command there is none. */
function helpFor(words: readonly string[]): readonly string[] {
  const [first] = words;
  return first === undefined || commandNames.includes(first) ? [...words, '--help'] : [first];
}

/** `census`, `draw hasse`: the words that name what was started; '' where they name nothing. */
function commandPath(program: Command, args: readonly string[]): string {
  const named = (within: Command, name: string | undefined) =>
    within.commands.find((command) => command.name() === name);
  const command = named(program, args[0]);
  if (command === undefined) return '';
  const word = named(command, args[1]);
  return word === undefined ? command.name() : `${command.name()} ${word.name()}`;
}

function end({ status, message }: Ending, error: unknown): void {
  process.exitCode = status;
  if (message !== null) process.stderr.write(`signwright: ${onOneLine(message)}\n`);
  if (status === 1 && process.env.SIGNWRIGHT_DEBUG && error instanceof Error) {
    process.stderr.write(`${error.stack}\n`);
  }
}

/** Names of files and arguments may hold anything; a terminal is shown no control character. */
function onOneLine(message: string): string {
  return message.replace(/[\p{Cc}\u2028\u2029\u202a-\u202e\u2066-\u2069]/gu, '\ufffd');
}
