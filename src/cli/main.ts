// The program: arguments in, exit status out. Nothing else sets the status.
import { type Ending, endingOf } from './exit.js';
import { checkOrder } from './order.js';
import { buildProgram } from './program.js';

/** Runs one command; never rejects. */
export async function main(words: readonly string[]): Promise<void> {
  // `help make` is read as `make --help`.
  const args = words[0] === 'help' ? [...words.slice(1), '--help'] : words;
  const program = buildProgram();
  const commands = program.commands.map((command) => command.name());
  const command = commands.find((name) => name === args[0]);
  const finish = (error: unknown): void => end(endingOf(error, command), error);
  process.stderr.on('error', () => {});
  process.stdout.on('error', finish);
  try {
    checkOrder(args, commands);
    if (args.length === 0) program.outputHelp();
    else await program.parseAsync([...args], { from: 'user' });
  } catch (error) {
    finish(error);
  }
}

function end({ status, message }: Ending, error: unknown): void {
  process.exitCode = status;
  if (message !== null) process.stderr.write(`signwright: ${message}\n`);
  if (status === 1 && process.env.SIGNWRIGHT_DEBUG && error instanceof Error) {
    process.stderr.write(`${error.stack}\n`);
  }
}
