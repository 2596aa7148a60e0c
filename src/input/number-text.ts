// One number as users write it, read exactly: integers of any length, fractions, decimals, and
// numbers of a real quadratic field.
//   sum     = [sign] product { sign product }
//   product = factor { ("*" | "/") [sign] factor }
//   factor  = numeral | "sqrt" "(" sum ")" | "(" sum ")"
//   numeral = digits [ "." [digits] ] [ "e" [sign] digits ] | "." digits [ "e" [sign] digits ]
import { bitLength } from '../exact/integers.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { expandedDigits, parenthesisDepth } from '../limits.js';
import { quoted } from './source.js';
import { splitSquare } from './square-free.js';

/** A number with the field it needs: radicand null exactly when it is rational. */
export interface ParsedNumber {
  readonly value: ExactNumber;
  readonly radicand: bigint | null;
  /** Where in the text its root stands; 0 where it has none. */
  readonly rootOffset: number;
}

/** A text that is not a number. `offset` points into the text. */
export class NumberFault extends Error {
  override readonly name = 'NumberFault';
  readonly what: string;
  readonly remedy: string;
  readonly offset: number;

  constructor(what: string, remedy: string, offset: number) {
    super(`${what}; ${remedy}`);
    this.what = what;
    this.remedy = remedy;
    this.offset = offset;
  }
}

const howToWrite = 'write a number such as 3, -3/4, 0.125, 1e-3 or 2+3*sqrt(5)';

/** Reads the whole text as one number, blanks allowed; throws NumberFault. */
export function parseNumber(text: string): ParsedNumber {
  if (/^[+-]?\d{1,15}$/.test(text)) {
    return { value: { a: BigInt(text), b: 0n, d: 1n }, radicand: null, rootOffset: 0 };
  }
  return new NumberParser(text).parse();
}

/** True where the whole text is one number. */
export function isNumber(text: string): boolean {
  try {
    parseNumber(text);
    return true;
  } catch (fault) {
    if (fault instanceof NumberFault) return false;
    throw fault;
  }
}

class NumberParser {
  readonly #text: string;
  #at = 0;
  #depth = 0;
  #expands = false;
  #radicand: bigint | null = null;
  #rootOffset = 0;

  constructor(text: string) {
    // A minus sign as word processors set it; the same length, so offsets hold.
    this.#text = text.replaceAll('\u2212', '-');
  }

  parse(): ParsedNumber {
    const start = this.#peek();
    if (start === '') throw new NumberFault('a number is missing', howToWrite, 0);
    const value = this.#sum();
    if (this.#peek() !== '') throw this.#unexpected();
    return value.b === 0n
      ? { value, radicand: null, rootOffset: 0 }
      : { value, radicand: this.#radicand, rootOffset: this.#rootOffset };
  }

  /** The next character that is not blank; '' at the end. */
  #peek(): string {
    while (/\s/.test(this.#text.charAt(this.#at))) this.#at += 1;
    return this.#text.charAt(this.#at);
  }

  #take(characters: string): string {
    const next = this.#peek();
    if (next === '' || !characters.includes(next)) return '';
    this.#at += 1;
    return next;
  }

  #sum(): ExactNumber {
    let sign = this.#take('+-');
    let total: ExactNumber | null = null;
    do {
      const product = this.#product();
      const term = sign === '-' ? negateNumber(product) : product;
      total = total === null ? term : this.#checked(addNumbers(total, term));
      sign = this.#take('+-');
    } while (sign !== '');
    return total;
  }

  #product(): ExactNumber {
    let total = this.#factor();
    for (;;) {
      const operator = this.#take('*/');
      if (operator === '') return total;
      const negative = this.#take('+-') === '-';
      this.#peek();
      const start = this.#at;
      const factor = this.#factor();
      const k = this.#radicand ?? 0n;
      if (operator === '/' && isZero(factor)) {
        throw new NumberFault('division by zero', 'write a divisor that is not zero', start);
      }
      const result =
        operator === '*' ? multiplyNumbers(total, factor, k) : divideNumbers(total, factor, k);
      total = this.#checked(negative ? negateNumber(result) : result);
    }
  }

  #factor(): ExactNumber {
    const next = this.#peek();
    const start = this.#at;
    if (next === '(') return this.#parenthesis();
    const word = /[a-z]+|\u221a/iy;
    word.lastIndex = start;
    const name = word.exec(this.#text)?.[0].toLowerCase();
    if (name === 'sqrt' || name === '\u221a') {
      this.#at += name.length;
      if (this.#peek() !== '(') {
        throw new NumberFault('a root has no parenthesis', 'write a root as sqrt(5)', this.#at);
      }
      return this.#root(this.#parenthesis(), start);
    }
    const numeral = /(\d+)(?:\.(\d*))?(?:e([+-]?\d+))?|\.(\d+)(?:e([+-]?\d+))?/iy;
    numeral.lastIndex = start;
    const match = numeral.exec(this.#text);
    if (match === null) throw this.#unexpected();
    this.#at += match[0].length;
    return this.#numeral(match[1] ?? '', match[2] ?? match[4] ?? '', match[3] ?? match[5], start);
  }

  #parenthesis(): ExactNumber {
    const start = this.#at;
    this.#depth += 1;
    if (this.#depth > parenthesisDepth) {
      const what = `more than ${parenthesisDepth} parentheses inside each other`;
      throw new NumberFault(what, 'simplify the number', start);
    }
    this.#at += 1;
    const value = this.#sum();
    if (this.#take(')') === '') {
      if (this.#peek() !== '') throw this.#unexpected();
      const remedy =
        'close it with ), and in a text file leave no blanks or commas inside a number';
      throw new NumberFault('a parenthesis is not closed', remedy, start);
    }
    this.#depth -= 1;
    return value;
  }

  #numeral(whole: string, decimals: string, exponent: string | undefined, start: number) {
    const digits = BigInt(whole + decimals);
    if (exponent === undefined) return exactNumber(digits, 0n, 10n ** BigInt(decimals.length));
    const shift = BigInt(exponent);
    if (shift > expandedDigits || shift < -expandedDigits) {
      const what = `the exponent ${exponent.length > 20 ? 'is' : `${exponent} is`} out of range`;
      const remedy = `exponents go from -${expandedDigits} to ${expandedDigits}; scale the normals`;
      throw new NumberFault(what, remedy, start);
    }
    this.#expands = true;
    const power = shift - BigInt(decimals.length);
    return this.#checked(
      power < 0n ? exactNumber(digits, 0n, 10n ** -power) : exactNumber(digits * 10n ** power),
    );
  }

  /** sqrt(p/q) = sqrt(p q) / q, and p q = s^2 k. */
  #root(x: ExactNumber, start: number): ExactNumber {
    if (x.b !== 0n) {
      const remedy = 'take roots of integers and fractions only';
      throw new NumberFault('a root of a number that is not rational', remedy, start);
    }
    if (x.a < 0n) {
      const remedy = 'signwright works over the real numbers; take roots of what is not negative';
      throw new NumberFault('a root of a negative number', remedy, start);
    }
    const split = splitSquare(x.a * x.d);
    if (split === null) {
      const what = 'the square part of the number under this root cannot be found cheaply';
      const remedy = 'take squares out by hand: s*sqrt(k) with k below 10^18';
      throw new NumberFault(what, remedy, start);
    }
    const { square, free } = split;
    if (free === 1n) return exactNumber(square, 0n, x.d);
    if (this.#radicand !== null && this.#radicand !== free) {
      throw differentRoots(free, this.#radicand, '', start);
    }
    this.#radicand = free;
    this.#rootOffset = start;
    return exactNumber(0n, square, x.d);
  }

  /** Only exponents let a number grow beyond what is written. */
  #checked(x: ExactNumber): ExactNumber {
    if (!this.#expands) return x;
    const bits = Math.max(bitLength(x.a), bitLength(x.b), bitLength(x.d));
    if (bits > Math.log2(10) * (expandedDigits + this.#text.length)) {
      const what = `a number with more than ${expandedDigits} digits beyond those written`;
      throw new NumberFault(what, 'use smaller exponents, or scale the normals', 0);
    }
    return x;
  }

  #unexpected(): NumberFault {
    const text = this.#text;
    const next = this.#peek();
    const what = `cannot read ${quoted(text)} as a number`;
    if (next === '') {
      const remedy = `${howToWrite}, in a text file without blanks`;
      return new NumberFault(`${what}: it stops short`, remedy, this.#at);
    }
    if (/^\s*[+-]?\d+,\d+\s*$/.test(text)) {
      return new NumberFault(what, 'write decimals with a point: 0.5', this.#at);
    }
    if (
      /^(sqrt|\u221a|\()/i.test(text.slice(this.#at)) &&
      /[\d)]\s*$/.test(text.slice(0, this.#at))
    ) {
      return new NumberFault(what, 'write products with *, such as 3*sqrt(5)', this.#at);
    }
    if (next === '^')
      return new NumberFault(what, 'write powers out, and roots as sqrt(5)', this.#at);
    return new NumberFault(what, howToWrite, this.#at);
  }
}

/** The fault of a second root; `where` says where the first stands, with a leading blank, or ''. */
export function differentRoots(
  second: bigint,
  first: bigint,
  where: string,
  offset: number,
): NumberFault {
  const what = `sqrt(${second}) beside sqrt(${first})${where}: two different square roots`;
  return new NumberFault(what, 'one arrangement takes the roots of one number only', offset);
}
