// Faces as commands want them: a list that streams flat by flat, and the poset where it fits.
import type { Arrangement } from '../arrangement/arrangement.js';
import { wordsFor } from '../bits/signs.js';
import { Disagreement, LimitError } from '../errors.js';
import { facesByFlat } from '../face/faces.js';
import { buildFacePoset, type FacePoset } from '../face/poset.js';
import { quickPolynomialSeconds } from '../limits.js';
import { type FaceRow, FaceRows } from './face-rows.js';
import { expectRegions, holdAgainst } from './listing.js';
import { type CensusListener, silentListener } from './polynomial.js';
import { formatBytes, formatCount } from './quantities.js';
import { standardStages } from './stages.js';

/**
 * The faces of one dimension, or all where that is null, as rows. LimitError before the first when
 * the tables would pass `memoryBytes`; Disagreement after the last when the faces break the Euler
 * relation or the regions are not as many as the polynomial says.
 */
export function* faceRows(
  arrangement: Arrangement,
  dimension: number | null,
  memoryBytes: number,
  listener: CensusListener = silentListener,
): Generator<FaceRow> {
  const expected = expectRegions(arrangement, memoryBytes, listener);
  const { rank } = arrangement;
  const maker = new FaceRows(arrangement);
  let regions = 0;
  let alternating = 0;
  listener.stage('listing faces flat by flat');
  for (const block of facesByFlat(arrangement)) {
    const faces = block.mirrored ? 2 * block.rows : block.rows;
    if (block.dimension === rank) regions += faces;
    alternating += (rank - block.dimension) % 2 === 0 ? faces : -faces;
    if (dimension !== null && block.dimension !== dimension) continue;
    yield* maker.ofFlat(block);
  }
  holdAgainst(expected, BigInt(regions));
  if (alternating !== 1) {
    throw new Disagreement(
      `alternating sum of the faces from the regions down: ${alternating} by listing, 1 by the ` +
        'Euler relation; do not use this list, and please report it',
    );
  }
}

/** Bytes of tables a face of a poset takes, with its covers. */
function bytesPerFace({ rank, hyperplanes }: Arrangement): number {
  return 4 * (2 * wordsFor(hyperplanes.length) + 8 + 2 * rank);
}

/** The face poset; LimitError where its tables would pass `memoryBytes`. */
export function buildPosetWithin(
  arrangement: Arrangement,
  memoryBytes: number,
  listener: CensusListener = silentListener,
): FacePoset {
  expectRegions(arrangement, memoryBytes, listener);
  const perFace = bytesPerFace(arrangement);
  const flats = standardStages.estimateFlats(arrangement);
  // Where the flats are quickly had they tell the number of faces, and no work begins in vain.
  if (flats.seconds <= quickPolynomialSeconds && flats.bytes <= memoryBytes) {
    const counts = standardStages.facesByMoebius(standardStages.listFlats(arrangement, () => {}));
    const faces = counts.reduce((sum, count) => sum + count, 0n);
    const bytes = Number(faces) * perFace;
    if (bytes > memoryBytes) {
      throw new LimitError(
        `the poset of ${formatCount(faces)} faces`,
        formatBytes(bytes),
        formatBytes(memoryBytes),
        'raise it with --memory SIZE, or list the faces without a graph',
      );
    }
  }
  listener.stage('building the face poset');
  return buildFacePoset(arrangement, Math.floor(memoryBytes / perFace));
}
