// The one seam between kinds of numbers. Cold code is generic over it; hot loops use plain numbers
// behind a proved gate and come here only when the gate says no.

/** An ordered integral domain: Z, or Z[sqrt(k)] inside the reals. Elements are immutable. */
export interface Ring<E> {
  /** Null for Z; k for Z[sqrt(k)], square-free and above 1. */
  readonly radicand: bigint | null;
  readonly zero: E;
  readonly one: E;
  fromInteger(value: bigint): E;
  add(a: E, b: E): E;
  subtract(a: E, b: E): E;
  multiply(a: E, b: E): E;
  negate(a: E): E;
  /** a / b where b divides a; throws RangeError when it does not. */
  divideExactly(a: E, b: E): E;
  /** -1, 0 or 1, exactly. */
  sign(a: E): number;
  /** A positive integer that divides a in the ring and every other such: the content; 0 for zero. */
  content(a: E): bigint;
  /**
   * a / b as a double with relative error at most 2^-48, b not zero; NaN when the quotient or its
   * parts leave the range of doubles.
   */
  ratio(a: E, b: E): number;
  /** As users write it: `12`, `2+3*sqrt(5)`. */
  format(a: E): string;
}
