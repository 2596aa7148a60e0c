// Where a value stands in a JSON text that has been parsed already. Run only for messages.

/** Keys and indices from the root to a value. */
export type JsonPath = readonly (string | number)[];

/**
 * Offset of the value at `path` in a sound JSON text, or of the nearest part around it that exists;
 * with `key`, offset of that key in the object at `path`.
 */
export function offsetOfJson(text: string, path: JsonPath, key: string | null = null): number {
  const walker = new JsonWalker(text);
  let best = walker.skipBlanks(0);
  for (const step of path) {
    const next = walker.child(best, step, false);
    if (next === null) return best;
    best = next;
  }
  return key === null ? best : (walker.child(best, key, true) ?? best);
}

class JsonWalker {
  readonly #text: string;

  constructor(text: string) {
    this.#text = text;
  }

  skipBlanks(from: number): number {
    let at = from;
    while (' \t\r\n'.includes(this.#text.charAt(at) || 'x')) at += 1;
    return at;
  }

  /** Offset of the last child named `step` (the one that parsing keeps), or of its key. */
  child(from: number, step: string | number, keyWanted: boolean): number | null {
    const opening = this.#text.charAt(from);
    if (opening !== '{' && opening !== '[') return null;
    let found: number | null = null;
    let index = 0;
    let at = this.skipBlanks(from + 1);
    while (!'}]'.includes(this.#text.charAt(at))) {
      const start = at;
      let name: string | number = index;
      if (opening === '{') {
        const end = this.#end(at);
        name = JSON.parse(this.#text.slice(at, end)) as string;
        at = this.skipBlanks(this.skipBlanks(end) + 1);
      }
      if (name === step) found = keyWanted ? start : at;
      at = this.skipBlanks(this.#end(at));
      if (this.#text.charAt(at) === ',') at = this.skipBlanks(at + 1);
      index += 1;
    }
    return found;
  }

  /** Offset after the value that starts here. */
  #end(from: number): number {
    const token = /"(?:[^"\\]|\\.)*"|[{}[\]]|[^\s,:{}[\]"]+/g;
    token.lastIndex = from;
    let depth = 0;
    for (let match = token.exec(this.#text); match !== null; match = token.exec(this.#text)) {
      if (match[0] === '{' || match[0] === '[') depth += 1;
      else if (match[0] === '}' || match[0] === ']') depth -= 1;
      if (depth === 0) return token.lastIndex;
    }
    return this.#text.length;
  }
}
