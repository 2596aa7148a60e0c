// Runs the built program as a user would, in a folder of its own.
import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const program = fileURLToPath(new URL('../../bin/signwright.js', import.meta.url));

export interface Outcome {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** A folder for one test file, with the program started in it. */
export class Workplace {
  readonly folder = mkdtempSync(join(tmpdir(), 'signwright-'));

  write(name: string, content: string | Uint8Array): string {
    writeFileSync(join(this.folder, name), content);
    return name;
  }

  read(name: string): string {
    return readFileSync(join(this.folder, name), 'utf8');
  }

  run(args: readonly string[], input = ''): Outcome {
    const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...args], {
      cwd: this.folder,
      input,
      encoding: 'utf8',
      maxBuffer: 2 ** 28,
    });
    return { status, stdout, stderr };
  }

  /** Runs and gives back standard output; throws unless all went well and quietly. */
  output(args: readonly string[], input = ''): string {
    const { status, stdout, stderr } = this.run(args, input);
    if (status !== 0 || stderr !== '') throw new Error(`${args.join(' ')}: ${status}: ${stderr}`);
    return stdout;
  }

  start(args: readonly string[]): ChildProcess {
    return spawn(process.execPath, [program, ...args], {
      cwd: this.folder,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
  }

  shell(line: string): Outcome {
    const { status, stdout, stderr } = spawnSync('bash', ['-o', 'pipefail', '-c', line], {
      cwd: this.folder,
      encoding: 'utf8',
      env: { ...process.env, SIGNWRIGHT: `${process.execPath} ${program}` },
    });
    return { status, stdout, stderr };
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}

/** The example of the record: three coordinate planes and one across. */
export const fourPlanes = '1 0 0\n0 1 0\n0 0 1\n1 1 1\n';
