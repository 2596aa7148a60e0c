// Bytes to text: UTF-8 with or without a byte-order mark, any line ending, and the line and column
// of every character for messages.
import { createHash } from 'node:crypto';
import { InputError, type Position } from '../errors.js';

/** Where something stands: called with an offset into it, only when a message needs it. */
export type Place = (offset?: number) => Position;

/** SHA-256 of the bytes, in hex. */
export function sha256(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

/** The name as messages show it: `-` is standard input. */
export function shownName(name: string): string {
  return name === '-' ? 'standard input' : name;
}

/** A piece of the input as messages quote it: at most 40 characters, control characters escaped. */
export function quoted(text: string): string {
  const characters = [...text];
  return JSON.stringify(
    characters.length > 40 ? `${characters.slice(0, 37).join('')}...` : text,
  ).replace(
    /[\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069]/g,
    (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

/** A text with its name. Offsets count UTF-16 units, as JavaScript does; columns count characters. */
export class SourceText {
  readonly name: string;
  readonly text: string;
  readonly sha256: string;

  /** Throws InputError where the bytes are not UTF-8 or hold nothing but blanks. */
  constructor(bytes: Uint8Array, name: string) {
    this.name = shownName(name);
    this.sha256 = sha256(bytes);
    if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) {
      throw new InputError('the text is UTF-16', 'save it as UTF-8', { file: this.name });
    }
    this.text = new TextDecoder().decode(bytes);
    this.#refuseInvalid(bytes);
    if (this.text.trim() === '') {
      throw new InputError('the file is empty', 'give at least one normal', { file: this.name });
    }
  }

  /** Line and column, 1-based. */
  place(offset: number): Position {
    let line = 1;
    let start = 0;
    for (const match of this.text.matchAll(/\r\n|\r|\n/g)) {
      const end = match.index + match[0].length;
      if (end > offset) break;
      line += 1;
      start = end;
    }
    return { file: this.name, line, column: [...this.text.slice(start, offset)].length + 1 };
  }

  fault(offset: number, what: string, remedy: string): InputError {
    return new InputError(what, remedy, this.place(offset));
  }

  // Decoding puts U+FFFD where bytes are not UTF-8; the first that the bytes do not spell out is
  // the place. All before it is sound, so encoding it again gives its length in bytes.
  #refuseInvalid(bytes: Uint8Array): void {
    const encoder = new TextEncoder();
    const mark = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
    let byte = mark;
    let from = 0;
    for (let at = this.text.indexOf('\ufffd'); at >= 0; at = this.text.indexOf('\ufffd', from)) {
      byte += encoder.encode(this.text.slice(from, at)).length;
      if (bytes[byte] !== 0xef || bytes[byte + 1] !== 0xbf || bytes[byte + 2] !== 0xbd) {
        const value = bytes[byte]!.toString(16).padStart(2, '0');
        throw this.fault(at, `byte 0x${value} is not UTF-8`, 'save the file as UTF-8');
      }
      byte += 3;
      from = at + 1;
    }
  }
}
