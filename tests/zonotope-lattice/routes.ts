// The three routes to the Ehrhart polynomial of one arrangement, for tests that hold them against
// something else.
import type { Arrangement } from '../../src/arrangement/arrangement.js';
import { listFlats } from '../../src/flat/lattice.js';
import { ehrhartByContraction } from '../../src/zonotope/ehrhart-by-contraction.js';
import { ehrhartByFlats } from '../../src/zonotope/ehrhart-by-flats.js';
import { ehrhartBySubsets } from '../../src/zonotope/ehrhart-by-subsets.js';
import type { EhrhartTerms } from '../../src/zonotope/ehrhart-terms.js';
import { centredGenerators, latticeGenerators } from '../../src/zonotope/lattice-generators.js';

export function generatorsFor(arrangement: Arrangement, centred = false) {
  const generators = latticeGenerators(arrangement);
  return centred ? centredGenerators(generators) : generators;
}

export const routes: Record<string, (arrangement: Arrangement, centred?: boolean) => EhrhartTerms> =
  {
    subsets: (arrangement, centred) => ehrhartBySubsets(generatorsFor(arrangement, centred)),
    contraction: (arrangement, centred) =>
      ehrhartByContraction(generatorsFor(arrangement, centred)),
    'contraction in big integers': (arrangement, centred) =>
      ehrhartByContraction(generatorsFor(arrangement, centred), { arithmetic: 'big' }),
    flats: (arrangement, centred) =>
      ehrhartByFlats(arrangement, generatorsFor(arrangement, centred), listFlats(arrangement)),
  };

/** The coefficients of a lattice zonotope as one line, from t^0 up. */
export function lineOf(terms: EhrhartTerms): string {
  if (terms.length !== 1 || terms[0].order !== 1n) throw new Error('not a lattice zonotope');
  return terms[0].coefficients.join(' ');
}
