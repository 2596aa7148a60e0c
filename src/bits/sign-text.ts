// Sign vectors as users see them: a character for each normal given, parallel ones included.
import { bitAt } from './signs.js';

const PLUS = 0x2b;
const MINUS = 0x2d;
const ZERO = 0x30;

/** Writes packed signs over hyperplanes as text over n generators. */
export class SignText {
  readonly #hyperplaneOf: Int32Array;
  readonly #orientationOf: Int8Array;
  readonly #characters: Uint8Array;
  readonly #decoder = new TextDecoder('latin1');

  /** Both arrays have one entry a generator: its hyperplane, and +1 or -1 against its normal. */
  constructor(hyperplaneOf: Int32Array, orientationOf: Int8Array) {
    this.#hyperplaneOf = hyperplaneOf;
    this.#orientationOf = orientationOf;
    this.#characters = new Uint8Array(hyperplaneOf.length);
  }

  /** The row of `positive` at `offset` with the zero mask at `zeroOffset` (none for a region). */
  write(
    positive: Int32Array,
    offset: number,
    zero: Int32Array | null = null,
    zeroOffset = 0,
  ): string {
    const characters = this.#characters;
    for (let i = 0; i < characters.length; i++) {
      const h = this.#hyperplaneOf[i];
      if (zero !== null && bitAt(zero, zeroOffset, h) === 1) characters[i] = ZERO;
      else
        characters[i] =
          (bitAt(positive, offset, h) === 1) === this.#orientationOf[i] > 0 ? PLUS : MINUS;
    }
    return this.#decoder.decode(characters);
  }
}
