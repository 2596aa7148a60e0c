// What the record says of the zonotope's measure, and the checks of it, from what the routes found.
import type { Arrangement } from '../arrangement/arrangement.js';
import { type ExactNumber, formatNumber } from '../exact/number.js';
import { formatPolynomial } from '../exact/polynomial.js';
import { elementaryDivisors } from '../exact/smith.js';
import type { FlatLattice } from '../flat/lattice.js';
import {
  boundaryPointsIn,
  type EhrhartTerms,
  ehrhartConstituents,
  ehrhartPeriod,
  interiorPointsIn,
  latticePointsIn,
} from '../zonotope/ehrhart-terms.js';
import { euclideanVolume } from '../zonotope/volume.js';
import { compare } from './compare.js';
import type { CensusRecord, Check } from './record.js';
import type { Measure } from './zonotope-measure.js';
import { dilatesText } from './zonotope-wording.js';

export type ZonotopeMeasures = Omit<CensusRecord['zonotope'], 'faces'>;

/** The fields of the record, with a note for each that is null. */
export function measuresOf(
  arrangement: Arrangement,
  measure: Measure,
): { measures: ZonotopeMeasures; notes: string[] } {
  const { obstacle, generators, ehrhart, volumes } = measure;
  const { radicand } = arrangement.generators;
  const terms = ehrhart[0]?.terms ?? null;
  const volume = volumes[0]?.value ?? null;
  const notes: string[] = [];
  if (volume === null) notes.push('volume: the routes to it were too dear');
  if (obstacle !== null) notes.push(`Ehrhart polynomial and lattice points: ${obstacle}`);
  else if (terms === null) {
    notes.push('Ehrhart polynomial and lattice points: the routes to them were too dear');
  }
  if (generators !== null && generators.scale !== 1n) notes.push(scaleNote(generators.scale));
  const period = terms === null ? 1n : ehrhartPeriod(terms);
  if (period !== 1n) {
    notes.push(
      `Ehrhart polynomial: no single one, since the corner is no lattice point; the quasi-polynomial has period ${period}`,
    );
  }
  const divisors = generators === null ? null : elementaryDivisors(generators.vectors);
  const count = (of: (terms: EhrhartTerms, t: bigint) => bigint): string | null =>
    terms === null ? null : String(of(terms, 1n));
  const measures: ZonotopeMeasures = {
    volume: volume && formatNumber(volume, radicand),
    euclideanVolume: volume && euclideanText(arrangement, volume),
    scale: generators && String(generators.scale),
    ehrhart: terms === null || period !== 1n ? null : terms[0].coefficients.map(String),
    quasiPolynomial: terms === null || period === 1n ? null : constituentsText(terms),
    latticePoints: count(latticePointsIn),
    interiorPoints: count(interiorPointsIn),
    boundaryPoints: count(boundaryPointsIn),
    unscaled: measure.unscaled && {
      latticePoints: String(measure.unscaled.points),
      interiorPoints: String(measure.unscaled.interior),
    },
    elementaryDivisors: divisors?.map(String) ?? null,
    sublatticeIndex: divisors && String(divisors.reduce((product, x) => product * x, 1n)),
  };
  return { measures, notes };
}

function scaleNote(scale: bigint): string {
  return `the generators are not all integer: Ehrhart polynomial, lattice points, elementary divisors and index are of the zonotope scaled by ${scale}; the volume is that of the unscaled one`;
}

export function constituentsText(
  terms: EhrhartTerms,
): { divisor: string; coefficients: string[] }[] {
  return ehrhartConstituents(terms).map(({ divisor, coefficients }) => ({
    divisor: String(divisor),
    coefficients: coefficients.map(String),
  }));
}

function euclideanText(
  arrangement: Arrangement,
  volume: ExactNumber,
): { square: string; decimal: string } {
  const { square, decimal } = euclideanVolume(arrangement, volume);
  return { square: formatNumber(square, arrangement.generators.radicand), decimal };
}

/** A polynomial, or each constituent with the t that it holds for. */
export function ehrhartText(terms: EhrhartTerms): string {
  const period = ehrhartPeriod(terms);
  const constituents = ehrhartConstituents(terms);
  if (constituents.length === 1) return formatPolynomial([...constituents[0].coefficients]);
  return constituents
    .map(({ divisor, coefficients }) => {
      return `${formatPolynomial([...coefficients])} (${dilatesText(String(divisor), String(period))})`;
    })
    .join('; ');
}

/** Checks of the measure, with those of the facets where the flats were listed. */
export function measureChecks(
  arrangement: Arrangement,
  measure: Measure,
  lattice: FlatLattice | null,
  rays: bigint | null,
): Check[] {
  const { ehrhart, volumes, counted, faults } = measure;
  const { radicand } = arrangement.generators;
  const terms = ehrhart[0]?.terms ?? null;
  const values = (of: (t: bigint) => bigint): string | null =>
    terms === null || counted.length === 0
      ? null
      : counted.map(({ dilate }) => of(BigInt(dilate))).join(' ');
  const dilates = counted.length === 1 ? 'dilate 1' : `dilates 1 to ${counted.length}`;
  const direct = (which: 'points' | 'interior'): string | null =>
    counted.length === 0 ? null : counted.map((count) => count[which]).join(' ');
  const lines =
    lattice === null
      ? null
      : lattice.rankOffsets[lattice.rank] - lattice.rankOffsets[lattice.rank - 1];
  return [
    compare('facets of the zonotope', [
      ['two for each line of the arrangement', lines === null ? null : BigInt(2 * lines)],
      ['rays listed', rays],
    ]),
    compare('Ehrhart polynomial', [
      ...ehrhart.map(({ route, terms: found }) => [route, ehrhartText(found)] as const),
      ...faults.map(({ route, why }) => [route, why] as const),
    ]),
    compare(
      'volume of the zonotope',
      volumes.map(({ route, value }) => [route, formatNumber(value, radicand)]),
    ),
    compare(`lattice points, ${dilates}`, [
      ['Ehrhart polynomial', values((t) => latticePointsIn(terms!, t))],
      ['counted within the facets', direct('points')],
    ]),
    compare(`interior lattice points, ${dilates}`, [
      ['Ehrhart polynomial, reciprocity', values((t) => interiorPointsIn(terms!, t))],
      ['counted within the facets', direct('interior')],
    ]),
  ].filter((check) => check !== null);
}
