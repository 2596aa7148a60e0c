// The measure of the zonotope in words, for the page, the Markdown, the LaTeX table and the page of
// the zonotope alone; from the record.
import { formatPolynomial } from '../exact/polynomial.js';
import { integerSquareRoot } from '../exact/quadratic.js';
import { grouped } from './layout.js';
import type { CensusRecord } from './record.js';

type Fields = Omit<CensusRecord['zonotope'], 'faces'>;

/** Volume and lattice results as terms with their text; those that are null are left out. */
export function measureRows(zonotope: Fields, rank: number, dimension: number): [string, string][] {
  const rows: [string, string][] = [];
  const { volume, euclideanVolume, scale, latticePoints, interiorPoints, boundaryPoints } =
    zonotope;
  const scaled = scale !== null && scale !== '1';
  if (volume !== null) {
    const about =
      rank === dimension && /[/s]/.test(volume) && euclideanVolume !== null
        ? `, about ${euclideanVolume.decimal}`
        : '';
    const unit = scale === null ? 'a basis' : 'the lattice';
    rows.push([
      'volume',
      `${grouped(volume)}${about}${rank === dimension ? '' : `, relative to ${unit} of the span`}`,
    ]);
  }
  if (euclideanVolume !== null && rank < dimension) {
    rows.push(['Euclidean', rootText(euclideanVolume)]);
  }
  const { unscaled } = zonotope;
  if (unscaled !== null) {
    const { latticePoints: all, interiorPoints: inside } = unscaled;
    rows.push([
      'unscaled',
      `${grouped(all)} lattice point${all === '1' ? '' : 's'}, ${grouped(inside)} of them inside`,
    ]);
  }
  if (scaled) {
    rows.push(['scaled by', `${grouped(scale)}, to make the generators integer, for what follows`]);
  }
  for (const [name, text] of ehrhartRows(zonotope)) rows.push([name, text]);
  if (latticePoints !== null && interiorPoints !== null && boundaryPoints !== null) {
    rows.push([
      'lattice points',
      `${grouped(latticePoints)}: ${grouped(interiorPoints)} inside, ${grouped(boundaryPoints)} on the boundary`,
    ]);
  }
  const { elementaryDivisors, sublatticeIndex } = zonotope;
  if (elementaryDivisors !== null && sublatticeIndex !== null) {
    rows.push([
      'generated',
      sublatticeIndex === '1'
        ? 'the whole lattice of the span'
        : `a sublattice of index ${grouped(sublatticeIndex)}, elementary divisors ${elementaryDivisors.map((x) => grouped(x)).join(' ')}`,
    ]);
  }
  return rows;
}

/** A root through its exact square: itself where that is rational, else a decimal and the square. */
export function rootText({ square, decimal }: { square: string; decimal: string }): string {
  const [a, d] = square.split('/');
  const roots = [a, d ?? '1'].map((text) => {
    const root = /^\d+$/.test(text) ? integerSquareRoot(BigInt(text)) : -1n;
    return root >= 0n && root * root === BigInt(text) ? root : null;
  });
  if (roots[0] !== null && roots[1] !== null) {
    return grouped(roots[1] === 1n ? `${roots[0]}` : `${roots[0]}/${roots[1]}`);
  }
  return `about ${decimal}, the square root of ${grouped(square)}`;
}

/** The Ehrhart polynomial, or a row for each constituent. */
export function ehrhartRows({ ehrhart, quasiPolynomial }: Fields): [string, string][] {
  if (ehrhart !== null) {
    return [['Ehrhart', grouped(formatPolynomial(ehrhart.map(BigInt)))]];
  }
  if (quasiPolynomial === null) return [];
  const period = quasiPolynomial[quasiPolynomial.length - 1].divisor;
  return quasiPolynomial.map(({ divisor, coefficients }, i) => [
    i === 0 ? 'Ehrhart' : '',
    `${grouped(formatPolynomial(coefficients.map(BigInt)))}  for ${dilatesText(divisor, period)}`,
  ]);
}

/** The t that a constituent holds for, in words. */
export function dilatesText(divisor: string, period: string): string {
  if (period === '2') return divisor === '2' ? 'even t' : 'odd t';
  return `t with gcd(t, ${period}) = ${divisor}`;
}
