// Somebody else's vertices held against ours, wherever their zonotope lies. A point of theirs that is
// no vertex of ours is told, exactly and by linear programming, to lie in the zonotope or beyond it.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { type ExactNumber, formatNumber } from '../exact/number.js';
import { InteriorPoints } from '../region/interior.js';
import type { RegionTable } from '../region/regions.js';
import { eachRegion } from '../region/walls.js';
import { ZonotopeMembership } from '../zonotope/membership.js';
import { ZonotopeVertices } from '../zonotope/vertices.js';
import { findPlacement } from './crosscheck-place.js';
import { describePlacement, takenBack } from './crosscheck-placement.js';
import { type PointSet, pointKey, pointOfKey } from './crosscheck-points.js';
import type { ExtraRow, ListReport, MissingRegion, RepeatedRow } from './crosscheck-report.js';

/** Points that are no vertices up to which each is told to lie in the zonotope or beyond it. */
const MEMBERSHIP_POINTS = 2_000;

/** Holds vertices against a complete list; lists in the report are cut at `listed` entries. */
export function crosscheckVertices(
  arrangement: Arrangement,
  table: RegionTable,
  theirs: PointSet,
  listed: number,
): ListReport {
  const found = findPlacement(arrangement, table, theirs);
  const { placement } = found;
  const { radicand } = placement;
  const format = (point: readonly ExactNumber[]): string[] =>
    point.map((x) => formatNumber(x, radicand));
  const vertices = new ZonotopeVertices(arrangement, placement);
  const points = new InteriorPoints(arrangement);
  const writer = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  const strange = new Map(theirs.first);
  const missing: MissingRegion[] = [];
  let matched = 0;
  eachRegion(table, (words, offset) => {
    const vertex = vertices.vertexOf(words, offset);
    if (strange.delete(pointKey(vertex))) {
      matched++;
    } else if (missing.length < listed) {
      const point = points.pointOf(words, offset, null).map(String);
      missing.push({ signs: writer.write(words, offset), point, vertex: format(vertex) });
    }
  });

  const membership = new ZonotopeMembership(arrangement, radicand);
  const extra: ExtraRow[] = [];
  const notExtreme: ExtraRow[] = [];
  let beyond = 0;
  let inside = 0;
  for (const [key, line] of strange) {
    if (beyond + inside === MEMBERSHIP_POINTS) break;
    const point = pointOfKey(key);
    const text = format(point).join(', ');
    const direction = membership.beyond(takenBack(point, placement));
    if (direction === null) {
      inside++;
      const reason = 'in the zonotope, but not a vertex';
      if (notExtreme.length < listed) notExtreme.push({ line, text, reason });
    } else {
      beyond++;
      const reason = `beyond the zonotope in the direction (${format(direction).join(', ')})`;
      if (extra.length < listed) extra.push({ line, text, reason });
    }
  }
  const repeated: RepeatedRow[] = [];
  let repeats = 0;
  for (const [key, lines] of theirs.again) {
    repeats += lines.length;
    if (repeated.length >= listed) continue;
    const text = format(pointOfKey(key)).join(', ');
    repeated.push({ lines: [theirs.first.get(key)!, ...lines], text });
  }
  const regions = 2 * table.half.rows;
  const agrees = matched === regions && strange.size === 0 && repeats === 0;
  const rounded =
    theirs.seemsRounded && !agrees
      ? '; some numbers seem rounded, and all are taken exactly as written'
      : '';
  return {
    kind: 'vertices',
    ours: regions,
    theirs: theirs.rows,
    placement:
      matched === 0
        ? 'none: no scale and shift takes a vertex of ours to one of theirs; numbers are taken exactly as written, so rounded ones match nothing'
        : `${describePlacement(arrangement, placement)}${rounded}`,
    counts: {
      matched,
      missing: regions - matched,
      extra: beyond,
      notExtreme: inside,
      undecided: strange.size - beyond - inside,
      repeated: repeats,
    },
    missing,
    extra,
    notExtreme,
    repeated,
    agrees,
  };
}
