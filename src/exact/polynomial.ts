// Polynomials over Z in one variable t: dense coefficient lists from t^0 up, of any size, and the
// three ways they are written: expanded, in LaTeX, and by their integer roots.
import { integerSquareRoot } from './quadratic.js';

/** Coefficients from t^0 up; no trailing zeros but in the zero polynomial, which is [0n]. */
export type Polynomial = readonly bigint[];

/** A root and how often it occurs. */
export interface IntegerRoot {
  readonly root: bigint;
  readonly multiplicity: number;
}

/** The product p q. */
export function multiplyPolynomials(p: Polynomial, q: Polynomial): bigint[] {
  const product = new Array<bigint>(p.length + q.length - 1).fill(0n);
  for (let i = 0; i < p.length; i++) {
    for (let j = 0; j < q.length; j++) product[i + j] += p[i] * q[j];
  }
  while (product.length > 1 && product[product.length - 1] === 0n) product.pop();
  return product;
}

/** p(a), by Horner's rule. */
export function evaluatePolynomial(p: Polynomial, a: bigint): bigint {
  let value = 0n;
  for (let i = p.length - 1; i >= 0; i--) value = value * a + p[i];
  return value;
}

/** p = quotient (t - a) + remainder. */
export function divideByLinear(
  p: Polynomial,
  a: bigint,
): { readonly quotient: bigint[]; readonly remainder: bigint } {
  const quotient = new Array<bigint>(Math.max(1, p.length - 1)).fill(0n);
  let carried = 0n;
  for (let i = p.length - 1; i > 0; i--) {
    carried = carried * a + p[i];
    quotient[i - 1] = carried;
  }
  return { quotient, remainder: carried * a + p[0] };
}

/**
 * The roots of a monic polynomial when every one of them is an integer, ascending; null when some
 * root is not. RangeError when p is not monic.
 *
 * The search is finite and short: if all roots are integers, the sum of their squares is
 * p_(n-1)^2 - 2 p_(n-2), so none is larger than the square root of that.
 */
export function integerRoots(p: Polynomial): IntegerRoot[] | null {
  const degree = p.length - 1;
  if (p[degree] !== 1n) throw new RangeError('integerRoots: polynomial: expected monic');
  if (degree === 0) return [];
  const squares = p[degree - 1] * p[degree - 1] - 2n * (degree > 1 ? p[degree - 2] : 0n);
  if (squares < 0n) return null;
  const bound = integerSquareRoot(squares);
  const roots: IntegerRoot[] = [];
  let rest = [...p];
  const collect = (root: bigint): void => {
    // A root divides the last coefficient; where that is 0 the only candidate is 0 itself.
    if (root === 0n ? rest[0] !== 0n : rest[0] % root !== 0n) return;
    let multiplicity = 0;
    while (rest.length > 1) {
      const { quotient, remainder } = divideByLinear(rest, root);
      if (remainder !== 0n) break;
      rest = quotient;
      multiplicity++;
    }
    if (multiplicity > 0) roots.push({ root, multiplicity });
  };
  collect(0n);
  for (let a = 1n; a <= bound && rest.length > 1; a++) {
    collect(a);
    collect(-a);
  }
  if (rest.length > 1) return null;
  return roots.sort((x, y) => (x.root < y.root ? -1 : 1));
}

/** `t^3 - 4 t^2 + 6 t - 3`. */
export function formatPolynomial(p: Polynomial): string {
  return written(p, (k) => `t^${k}`);
}

/** `t^{3} - 4 t^{2} + 6 t - 3`, for a mathematical formula in LaTeX. */
export function formatPolynomialLatex(p: Polynomial): string {
  return written(p, (k) => `t^{${k}}`);
}

/** `(t - 1)^2 (t - 3)` from the roots; `1` when there are none. */
export function formatFactors(roots: readonly IntegerRoot[]): string {
  return factored(roots, (k) => `^${k}`);
}

/** `(t - 1)^{2} (t - 3)`. */
export function formatFactorsLatex(roots: readonly IntegerRoot[]): string {
  return factored(roots, (k) => `^{${k}}`);
}

function written(p: Polynomial, power: (k: number) => string): string {
  let text = '';
  for (let k = p.length - 1; k >= 0; k--) {
    const c = p[k];
    if (c === 0n) continue;
    const size = c < 0n ? -c : c;
    const variable = k === 0 ? '' : k === 1 ? 't' : power(k);
    const term = variable === '' ? `${size}` : size === 1n ? variable : `${size} ${variable}`;
    if (text === '') text = c < 0n ? `-${term}` : term;
    else text += c < 0n ? ` - ${term}` : ` + ${term}`;
  }
  return text === '' ? '0' : text;
}

function factored(roots: readonly IntegerRoot[], power: (k: number) => string): string {
  const factors = roots.map(({ root, multiplicity }) => {
    const base = root === 0n ? 't' : root > 0n ? `(t - ${root})` : `(t + ${-root})`;
    return multiplicity === 1 ? base : base + power(multiplicity);
  });
  return factors.length === 0 ? '1' : factors.join(' ');
}
