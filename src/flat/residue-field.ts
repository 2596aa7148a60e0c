// Z or Z[sqrt(k)] modulo a prime: a ring homomorphism onto F_p, so whatever vanishes in the ring
// vanishes here, and what differs here differs in the ring. The converse is for the caller to prove.
import { integerSquareRoot, type Quadratic } from '../exact/quadratic.js';
import type { Ring } from '../exact/ring.js';

/** Arithmetic of F_p on doubles 0..p-1, p below 2^25. */
export class ResidueField {
  readonly p: number;
  /** 1/p as a double: floor((x + 0.5) * inverseOfP) is floor(x / p) for integers 0 <= x < 2^50, as
   * the product is within 2^-27 of (x + 0.5) / p, which is at least 2^-26 from every integer. */
  readonly inverseOfP: number;
  private readonly root: bigint;

  constructor(p: number, root: number) {
    this.p = p;
    this.inverseOfP = 1 / p;
    this.root = BigInt(root);
  }

  /** a b mod p. */
  multiply(a: number, b: number): number {
    const x = a * b;
    return x - Math.floor((x + 0.5) * this.inverseOfP) * this.p;
  }

  /** 1 / a, a not 0, by Euclid's algorithm. */
  inverse(a: number): number {
    let x = this.p;
    let y = a;
    let s = 0;
    let t = 1;
    while (y !== 0) {
      const q = (x / y) | 0;
      const r = x - q * y;
      x = y;
      y = r;
      const u = s - q * t;
      s = t;
      t = u;
    }
    return s < 0 ? s + this.p : s;
  }

  /** The image of a ring element. */
  imageOf<E>(ring: Ring<E>, x: E): number {
    const p = BigInt(this.p);
    let value: bigint;
    if (ring.radicand === null) {
      value = x as bigint;
    } else {
      const { a, b } = x as Quadratic;
      value = a + b * this.root;
    }
    const residue = Number(value % p);
    return residue < 0 ? residue + this.p : residue;
  }
}

/** F_p for the `index`-th largest prime below 2^25 in which the radicand, if any, is a square. */
export function residueFieldFor(radicand: bigint | null, index: number): ResidueField {
  let left = index;
  for (let p = 2 ** 25 - 1; p > 2 ** 24; p -= 2) {
    if (!isPrime(p)) continue;
    const root = radicand === null ? 0 : squareRootModulo(Number(radicand % BigInt(p)), p);
    if (root < 0) continue;
    if (left-- === 0) return new ResidueField(p, root);
  }
  throw new RangeError(
    `residueFieldFor: index: expected fewer than the primes there are, got ${index}`,
  );
}

function isPrime(n: number): boolean {
  const bound = Number(integerSquareRoot(BigInt(n)));
  for (let d = 3; d <= bound; d += 2) if (n % d === 0) return false;
  return true;
}

/** A square root of k modulo a prime p that is 3 modulo 4, or -1 when there is none or p is not. */
function squareRootModulo(k: number, p: number): number {
  if (p % 4 !== 3 || k === 0) return -1;
  // k^((p+1)/4) is a root exactly when k is a square (L. Euler's criterion).
  const modulus = BigInt(p);
  let power = 1n;
  let base = BigInt(k);
  for (let e = (p + 1) / 4; e > 0; e = Math.floor(e / 2)) {
    if (e % 2 === 1) power = (power * base) % modulus;
    base = (base * base) % modulus;
  }
  return (power * power) % modulus === BigInt(k) ? Number(power) : -1;
}
