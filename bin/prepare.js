#!/usr/bin/env node
// Gets a checkout ready: installs the packages of the lock file and builds dist, each only when it
// is missing or older than what it is made from. Everything it says goes to standard error.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const top = fileURLToPath(new URL('..', import.meta.url));
process.chdir(top);

function say(text) {
  process.stderr.write(`prepare: ${text}\n`);
}

function fail(text) {
  say(text);
  process.exit(1);
}

/** Runs a program with its output on standard error. */
function run(program, args) {
  const done = spawnSync(program, args, { stdio: ['ignore', 2, 2] });
  if (done.error) fail(`cannot start ${program}: ${done.error.message}`);
  if (done.status !== 0) fail(`\`${[program, ...args].join(' ')}\` failed`);
}

/** Milliseconds of the last change of a file, or of anything in a folder; 0 where it is missing. */
function changed(path) {
  if (!existsSync(path)) return 0;
  const status = statSync(path);
  if (!status.isDirectory()) return status.mtimeMs;
  return readdirSync(path).reduce(
    (latest, name) => Math.max(latest, changed(`${path}/${name}`)),
    status.mtimeMs,
  );
}

const [major, minor] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 11)) {
  fail(`Node ${process.versions.node} is too old; install Node 20.11 or later`);
}

// npm notes what it installed, and so when, in this file.
if (changed('node_modules/.package-lock.json') < changed('package-lock.json')) {
  say('installing the packages of package-lock.json (npm ci)');
  const npm = process.env.npm_execpath;
  const args = ['ci', '--no-fund', '--no-audit'];
  if (npm) run(process.execPath, [npm, ...args]);
  else run('npm', args);
}

const newestSource = Math.max(changed('src'), changed('tsconfig.json'), changed('package.json'));
if (changed('dist/index.js') < newestSource) {
  say('building dist from src (tsc)');
  const started = new Date();
  // Built beside and moved into place: what a deleted source left behind goes, and a failed build
  // leaves the old one standing.
  rmSync('dist.partial', { recursive: true, force: true });
  run(process.execPath, ['node_modules/typescript/bin/tsc', '-p', '.', '--outDir', 'dist.partial']);
  rmSync('dist', { recursive: true, force: true });
  renameSync('dist.partial', 'dist');
  utimesSync('dist/index.js', started, started);
}
