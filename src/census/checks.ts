// The checks of a census: each claim with the values that independent routes gave for it. A check
// has two routes or more; a claim with one route is a count and not a check.
import type { Arrangement } from '../arrangement/arrangement.js';
import { evaluatePolynomial, formatPolynomial } from '../exact/polynomial.js';
import {
  binomial,
  genericFaces,
  genericRegions,
  type Multiplicities,
  regionsByMultiplicities,
  simplicialByMultiplicities,
} from './closed-forms.js';
import { compare } from './compare.js';
import { regionsFromPolynomial } from './polynomial.js';
import { isGeneric, isSimplicial, multiplicities } from './properties.js';
import type { Check } from './record.js';
import type { Findings } from './routes.js';

/** All checks that the findings allow, in the order they are read. */
export function checksOf(arrangement: Arrangement, found: Findings): Check[] {
  const { rank } = arrangement;
  const n = arrangement.hyperplanes.length;
  const { polynomialByDeletion, polynomialByFlats, facesByListing, facesByMoebius } = found;
  const polynomial = (polynomialByDeletion ?? polynomialByFlats)!;
  const generic = isGeneric(polynomial, n);
  const t = found.lattice === null || rank < 2 ? null : multiplicities(found.lattice);
  const faces = facesByListing ?? facesByMoebius;
  const regionsOf = (p: readonly bigint[] | null) => (p === null ? null : regionsFromPolynomial(p));

  return [
    compare('regions', [
      ['listing', found.regionsByListing],
      ['points inside, certified', found.evidence?.points ?? null],
      ['deletion-restriction, |chi(-1)|', regionsOf(polynomialByDeletion)],
      ['flats, |chi(-1)|', regionsOf(polynomialByFlats)],
      ['faces listed flat by flat', facesByListing?.[rank] ?? null],
      ['formula for generic normals', generic ? genericRegions(n, rank) : null],
      ['multiplicities of lines', rank === 3 && t !== null ? regionsByMultiplicities(t) : null],
    ]),
    compare('characteristic polynomial, essential part', [
      ['deletion-restriction', polynomialByDeletion && formatPolynomial(polynomialByDeletion)],
      ['flats', polynomialByFlats && formatPolynomial(polynomialByFlats)],
    ]),
    compare('characteristic polynomial at 1', [
      [
        'deletion-restriction',
        polynomialByDeletion && evaluatePolynomial(polynomialByDeletion, 1n),
      ],
      ['flats', polynomialByFlats && evaluatePolynomial(polynomialByFlats, 1n)],
      ['any central arrangement', 0n],
    ]),
    compare('faces by dimension', [
      ['listing', list(facesByListing)],
      ['Moebius values of flats', list(facesByMoebius)],
      ['formula for generic normals', generic && faces ? list(genericFaces(n, rank)) : null],
    ]),
    compare('alternating sum of the faces', [
      ['faces by listing', facesByListing && alternatingSum(facesByListing)],
      ['faces by Moebius values', facesByMoebius && alternatingSum(facesByMoebius)],
      ['Euler relation', faces && (rank % 2 === 0 ? 1n : -1n)],
    ]),
    compare('pairs of hyperplanes', [
      ['in flats of rank 2', t && pairsIn(t)],
      ['all there are', t && binomial(n, 2)],
    ]),
    compare('simplicial', [
      ['walls of all regions', rank === 3 && faces ? yesNo(isSimplicial(faces)) : null],
      [
        'multiplicities of lines',
        rank === 3 && t !== null ? yesNo(simplicialByMultiplicities(t)) : null,
      ],
    ]),
    compare('vertices of the zonotope', [
      ['regions listed', found.evidence && found.regionsByListing],
      ['distinct and extreme', found.evidence?.extremes ?? null],
    ]),
  ].filter((check) => check !== null);
}

function list(counts: readonly bigint[] | null): string | null {
  return counts?.join(' ') ?? null;
}

function alternatingSum(faces: readonly bigint[]): bigint {
  return faces.reduce((sum, count, k) => (k % 2 === 0 ? sum + count : sum - count), 0n);
}

function pairsIn(t: Multiplicities): bigint {
  let pairs = 0n;
  for (const [k, flats] of t) pairs += BigInt(flats) * binomial(k, 2);
  return pairs;
}

function yesNo(value: boolean): string {
  return value ? 'yes' : 'no';
}
