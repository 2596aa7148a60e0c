// Where results go: standard output, or a file written beside its name and renamed when complete.
import {
  closeSync,
  openSync,
  realpathSync,
  renameSync,
  rmSync,
  statSync,
  writeSync,
} from 'node:fs';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { InputError } from '../errors.js';
import { giveWayToResult } from './progress.js';

/** Ctrl-C, a polite kill, a terminal that is closed. */
const interrupts = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/** A destination of text; nothing is opened before the first chunk. */
export class Destination {
  readonly #file: string | null;
  #descriptor: number | null = null;
  /** Name of the file being written, when it is to be renamed at the end. */
  #partial: string | null = null;
  #target = '';
  readonly #interrupted = (): void => {
    this.abandon();
    process.exit(130);
  };

  /** `file` null or `-` is standard output. */
  constructor(file: string | null) {
    this.#file = file === '-' ? null : file;
    if (file?.endsWith('/')) throw new InputError(`${file} is a folder`, 'name a file in it');
  }

  write(chunk: string): void {
    if (chunk === '') return;
    const descriptor = this.#open();
    const bytes = Buffer.from(chunk, 'utf8');
    let written = 0;
    while (written < bytes.length) {
      try {
        written += writeSync(descriptor, bytes, written);
      } catch (error) {
        // A pipe that was set not to block, and is full: its reader needs a moment.
        if ((error as { code?: string }).code !== 'EAGAIN') throw error;
        Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 5);
      }
    }
  }

  /** Writes all chunks, and lets signals through between them. */
  async writeAll(chunks: Iterable<string>): Promise<void> {
    for (const chunk of chunks) {
      this.write(chunk);
      await nextTurn();
    }
  }

  /** Closes the file and gives it its name. */
  finish(): void {
    if (this.#file !== null) this.#open();
    this.#close();
    if (this.#partial !== null) renameSync(this.#partial, this.#target);
    this.#partial = null;
    this.#release();
  }

  /** Removes what was begun. */
  abandon(): void {
    this.#close();
    if (this.#partial !== null) rmSync(this.#partial, { force: true });
    this.#partial = null;
    this.#release();
  }

  #open(): number {
    if (this.#descriptor !== null) return this.#descriptor;
    if (this.#file === null) {
      if (process.stdout.isTTY) giveWayToResult();
      this.#descriptor = 1;
      return 1;
    }
    const status = statSync(this.#file, { throwIfNoEntry: false });
    if (status?.isDirectory())
      throw new InputError(`${this.#file} is a folder`, 'name a file in it');
    if (status !== undefined && !status.isFile()) {
      // A device or a named pipe is written to, never replaced.
      this.#descriptor = openSync(this.#file, 'w');
      return this.#descriptor;
    }
    this.#target = status === undefined ? this.#file : realpathSync(this.#file);
    this.#partial = `${this.#target}.${process.pid}.partial`;
    for (const signal of interrupts) process.once(signal, this.#interrupted);
    try {
      this.#descriptor = openSync(this.#partial, 'w', status?.mode ?? 0o666);
    } catch (error) {
      throw Object.assign(error as Error, { path: this.#file });
    }
    return this.#descriptor;
  }

  #close(): void {
    if (this.#descriptor !== null && this.#descriptor !== 1) closeSync(this.#descriptor);
    this.#descriptor = null;
  }

  #release(): void {
    for (const signal of interrupts) process.removeListener(signal, this.#interrupted);
  }
}

/** Opens a destination, hands it to `work`, and finishes it, or leaves nothing behind. */
export async function writeTo(
  file: string | null,
  work: (destination: Destination) => void | Promise<void>,
): Promise<void> {
  const destination = new Destination(file);
  try {
    await work(destination);
    destination.finish();
  } catch (error) {
    destination.abandon();
    throw error;
  }
}
