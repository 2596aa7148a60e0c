// What kind of arrangement it is, decided exactly from the counts, or null where the counts that
// would decide it were not made.
import type { Arrangement } from '../arrangement/arrangement.js';
import { countBits } from '../bits/signs.js';
import { evaluatePolynomial } from '../exact/polynomial.js';
import type { FlatLattice } from '../flat/lattice.js';
import { binomial, type Multiplicities } from './closed-forms.js';
import type { CensusRecord } from './record.js';
import { isSupersolvable } from './supersolvable.js';

/**
 * Every r hyperplanes independent. Exactly when |w_(r-1)| = C(n, r-1): that coefficient counts the
 * (r-1)-sets without a broken circuit (H. Whitney, 1932), so all are such, and then no circuit has
 * r elements or fewer. `polynomial` in essential rank, from t^0 up.
 */
export function isGeneric(polynomial: readonly bigint[], hyperplanes: number): boolean {
  const r = polynomial.length - 1;
  const coefficient = polynomial[1];
  return (coefficient < 0n ? -coefficient : coefficient) === binomial(hyperplanes, r - 1);
}

/** Not a product: the beta invariant |chi'(1)| is not 0 (H. Crapo, 1967, A higher invariant for matroids). */
export function isIrreducible(polynomial: readonly bigint[]): boolean {
  const derivative = polynomial.map((c, k) => c * BigInt(k)).slice(1);
  return evaluatePolynomial(derivative, 1n) !== 0n;
}

/** Every region a simplicial cone: each has at least r walls, and they number 2 f_(r-1) in all. */
export function isSimplicial(faces: readonly bigint[]): boolean {
  const r = faces.length - 1;
  return 2n * faces[r - 1] === BigInt(r) * faces[r];
}

/** How many flats of rank 2 lie on exactly k hyperplanes, by k, ascending. */
export function multiplicities(lattice: FlatLattice): Multiplicities {
  const { rankOffsets, wordsPerRow, zero } = lattice;
  const found = new Map<number, number>();
  for (let flat = rankOffsets[2]; flat < rankOffsets[3]; flat++) {
    const k = countBits(zero, flat * wordsPerRow, wordsPerRow);
    found.set(k, (found.get(k) ?? 0) + 1);
  }
  return new Map([...found].sort(([a], [b]) => a - b));
}

/** Properties with the reason for each null, as notes. */
export function propertiesOf(
  arrangement: Arrangement,
  polynomial: readonly bigint[],
  roots: readonly bigint[] | null,
  lattice: FlatLattice | null,
  faces: readonly bigint[] | null,
): { readonly properties: CensusRecord['properties']; readonly notes: string[] } {
  const { rank, hyperplanes } = arrangement;
  const notes: string[] = [];
  if (faces === null) notes.push('simplicial: not decided, since the faces were not counted');
  let supersolvable: boolean | null = null;
  if (rank <= 2) supersolvable = true;
  else if (roots === null) supersolvable = false;
  else if (lattice !== null) supersolvable = isSupersolvable(lattice, roots);
  else notes.push('supersolvable: not decided, since the flats were not listed');
  let linesByMultiplicity: Record<string, string> | null = null;
  if (rank !== 3) notes.push('lines by multiplicity: asked of rank 3 only');
  else if (lattice === null) notes.push('lines by multiplicity: the flats were not listed');
  else {
    linesByMultiplicity = Object.fromEntries(
      [...multiplicities(lattice)].map(([k, lines]) => [String(k), String(lines)]),
    );
  }
  const properties = {
    simplicial: faces === null ? null : isSimplicial(faces),
    generic: isGeneric(polynomial, hyperplanes.length),
    irreducible: isIrreducible(polynomial),
    supersolvable,
    linesByMultiplicity,
  };
  return { properties, notes };
}
