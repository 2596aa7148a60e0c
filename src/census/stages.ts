// The computations a census is made of, as one value, so that a test can put a wrong one in and see
// it caught. Each is a plain function from data to data; none knows of another.
import type { Arrangement } from '../arrangement/arrangement.js';
import { countFaces } from '../face/faces.js';
import { characteristicPolynomialByDeletion } from '../flat/by-deletion.js';
import { characteristicPolynomialByFlats } from '../flat/by-flats.js';
import { faceCountsByMoebius } from '../flat/by-moebius.js';
import { estimateDeletion, estimateFlats } from '../flat/estimate.js';
import type { FlatLattice } from '../flat/lattice.js';
import { listFlats } from '../flat/lattice.js';
import type { RegionTable } from '../region/regions.js';
import { listRegions } from '../region/regions.js';
import { examineRegions, type RegionEvidence } from './evidence.js';
import { estimateMoebiusSeconds } from './moebius-estimate.js';
import { standardZonotopeStages, type ZonotopeStages } from './zonotope-measure.js';

/** Told how far a computation is, now and then. */
export type PartListener = (done: number, total: number) => void;

export interface Stages {
  readonly estimateDeletion: (arrangement: Arrangement) => {
    readonly bases: number;
    readonly seconds: number;
  };
  readonly estimateFlats: (arrangement: Arrangement) => {
    readonly flats: number;
    readonly seconds: number;
    readonly bytes: number;
  };
  readonly polynomialByDeletion: (
    arrangement: Arrangement,
    onBases: (bases: number) => void,
  ) => readonly bigint[];
  readonly listFlats: (arrangement: Arrangement, onFlats: PartListener) => FlatLattice;
  readonly polynomialByFlats: (lattice: FlatLattice) => readonly bigint[];
  readonly estimateMoebius: (lattice: FlatLattice) => number;
  readonly facesByMoebius: (lattice: FlatLattice) => readonly bigint[];
  readonly listRegions: (arrangement: Arrangement) => RegionTable;
  /** Looks at every listed region on its own; null where that would take long. */
  readonly examineRegions: (arrangement: Arrangement, table: RegionTable) => RegionEvidence | null;
  /** Faces by dimension 0..rank, counted as they stream past. */
  readonly countFaces: (arrangement: Arrangement) => readonly number[];
  /** Volume, Ehrhart polynomial and facets. */
  readonly zonotope: ZonotopeStages;
}

export const standardStages: Stages = {
  estimateDeletion,
  estimateFlats,
  polynomialByDeletion: (arrangement, onBases) =>
    characteristicPolynomialByDeletion(arrangement, { onProgress: onBases }),
  listFlats: (arrangement, onFlats) =>
    listFlats(arrangement, { onProgress: ({ done, of }) => onFlats(done, of) }),
  polynomialByFlats: characteristicPolynomialByFlats,
  estimateMoebius: estimateMoebiusSeconds,
  facesByMoebius: faceCountsByMoebius,
  listRegions,
  examineRegions,
  countFaces,
  zonotope: standardZonotopeStages,
};
