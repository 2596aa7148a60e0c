#!/usr/bin/env node
// The command: hands over to the built program, or says how to build it.
import { existsSync } from 'node:fs';

const program = new URL('../dist/cli/main.js', import.meta.url);
if (existsSync(program)) {
  const { main } = await import(program.href);
  await main(process.argv.slice(2));
} else {
  process.stderr.write(
    'signwright: not built yet; run `node bin/prepare.js` in the checkout (it installs and builds)\n',
  );
  process.exitCode = 1;
}
