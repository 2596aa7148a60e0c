// Progress on standard error, for people at a terminal only.
import type { SingleBar } from 'cli-progress';

/** Shows what is being done; silent unless standard error is a terminal and --quiet is not given. */
export class Progress {
  #makeBar: (() => SingleBar) | null;
  #bar: SingleBar | null = null;
  #stage = '';
  #lineShown = false;

  /** `makeBar` null shows nothing. */
  constructor(makeBar: (() => SingleBar) | null) {
    this.#makeBar = makeBar;
  }

  /** A stage begins; it takes the place of the one before. */
  stage(text: string): void {
    if (this.#makeBar === null) return;
    this.end();
    this.#stage = text;
    const columns = process.stderr.columns || 80;
    process.stderr.write(`${text} ...`.slice(0, columns - 1));
    this.#lineShown = true;
  }

  /** How far the stage is. */
  part(done: number, total: number): void {
    if (this.#makeBar === null || total <= 0) return;
    if (this.#bar === null) {
      this.#clearLine();
      this.#bar = this.#makeBar();
      this.#bar.start(total, done, { stage: this.#stage });
    } else {
      this.#bar.setTotal(total);
      this.#bar.update(Math.min(done, total));
    }
  }

  /** Rows as they pass, `total` of them. */
  *counted<Row>(rows: Iterable<Row>, total: number): Generator<Row> {
    let done = 0;
    for (const row of rows) {
      yield row;
      if ((++done & 0xfff) === 0) this.part(done, total);
    }
    this.end();
  }

  /** Clears the line, so that nothing of it is left on the screen. */
  end(): void {
    this.#bar?.stop();
    this.#bar = null;
    this.#clearLine();
  }

  /** Ends it, and shows nothing more. */
  silence(): void {
    this.end();
    this.#makeBar = null;
  }

  #clearLine(): void {
    if (this.#lineShown) process.stderr.write('\r\u001b[K');
    this.#lineShown = false;
  }
}

/** The progress on the terminal now. */
let shown: Progress | null = null;

/** The progress of a command; the package that draws bars is loaded only when one can be seen. */
export async function startProgress(quiet: boolean | undefined): Promise<Progress> {
  if (quiet === true || process.stderr.isTTY !== true) return new Progress(null);
  const { default: bars } = await import('cli-progress');
  shown = new Progress(
    () =>
      new bars.SingleBar({
        format: '{stage} [{bar}] {percentage}%',
        barsize: 20,
        fps: 5,
        clearOnComplete: true,
        hideCursor: false,
        linewrap: false,
        stream: process.stderr,
      }),
  );
  return shown;
}

/** Clears the progress for good: the result comes to the same terminal. */
export function giveWayToResult(): void {
  shown?.silence();
  shown = null;
}
