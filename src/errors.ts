// The kinds of failure a caller can meet. Each message is one line: what, where, how to mend it.
// The command line maps them to exit codes; the library throws them as they are.

/** A place in an input: the name shown to the user, and 1-based line and column where they are known. */
export interface Position {
  readonly file: string;
  readonly line?: number;
  readonly column?: number;
}

function placed(position: Position | null, what: string): string {
  if (position === null) return what;
  const { file, line, column } = position;
  const place =
    line === undefined
      ? file
      : column === undefined
        ? `${file}:${line}`
        : `${file}:${line}:${column}`;
  return `${place}: ${what}`;
}

/** Input or usage that cannot be taken as it is. `what` says what is wrong, `remedy` how to mend it. */
export class InputError extends Error {
  override readonly name = 'InputError';
  readonly position: Position | null;
  readonly what: string;
  readonly remedy: string;

  constructor(what: string, remedy: string, position: Position | null = null) {
    super(`${placed(position, what)}; ${remedy}`);
    this.what = what;
    this.remedy = remedy;
    this.position = position;
  }
}

/** A bound that would be passed. `estimate` and `bound` carry their unit; `done` says what was finished. */
export class LimitError extends Error {
  override readonly name = 'LimitError';
  readonly estimate: string;
  readonly bound: string;
  readonly remedy: string;
  readonly done: string;

  constructor(
    what: string,
    estimate: string,
    bound: string,
    remedy: string,
    done = 'nothing was written',
  ) {
    super(`${what}: needs about ${estimate}, the limit is ${bound}; ${remedy}; ${done}`);
    this.estimate = estimate;
    this.bound = bound;
    this.remedy = remedy;
    this.done = done;
  }
}

/** Two routes to one value that differ, or somebody's list that does not hold. */
export class Disagreement extends Error {
  override readonly name = 'Disagreement';
}
