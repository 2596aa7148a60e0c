// Somebody else's sign vectors held against our regions. A vector of theirs that we do not list is
// proved to belong to no region by exact linear programming, independent of the listing.
import type { Arrangement } from '../arrangement/arrangement.js';
import { SignText } from '../bits/sign-text.js';
import { bitAt } from '../bits/signs.js';
import { Disagreement } from '../errors.js';
import { InteriorPoints } from '../region/interior.js';
import { conePoint } from '../region/interior-exact.js';
import type { RegionTable } from '../region/regions.js';
import { eachRegion, RegionIndex } from '../region/walls.js';
import type { SignList } from './crosscheck-read.js';
import type { ExtraRow, ListReport, MissingRegion, RepeatedRow } from './crosscheck-report.js';

/** Holds sign vectors against a complete list; lists in the report are cut at `listed` entries. */
export function crosscheckSigns(
  arrangement: Arrangement,
  table: RegionTable,
  theirs: SignList,
  listed: number,
): ListReport {
  const index = new RegionIndex(table);
  const { words, wordsPerRow, rows } = theirs.table;
  const regions = 2 * table.half.rows;
  const writer = new SignText(arrangement.hyperplaneOf, arrangement.orientationOf);
  /** For each region the first row that names it, counted from 1. */
  const firstRow = new Int32Array(regions);
  const again = new Map<number, number[]>();
  const strange = new Map<string, number[]>();
  let matched = 0;
  for (let row = 0; row < rows; row++) {
    const at = row * wordsPerRow;
    const contradiction = theirs.contradictions.get(row);
    const region = contradiction === undefined ? index.regionOf(words, at) : -1;
    if (region < 0) {
      const key = theirs.texts.get(row) ?? writer.write(words, at);
      push(strange, key, row);
    } else if (firstRow[region] === 0) {
      firstRow[region] = row + 1;
      matched++;
    } else {
      const first = firstRow[region] - 1;
      if (!again.has(first)) again.set(first, [first]);
      push(again, first, row);
    }
  }

  const missing: MissingRegion[] = [];
  const points = new InteriorPoints(arrangement);
  eachRegion(table, (region, offset, number) => {
    if (firstRow[number] !== 0 || missing.length >= listed) return;
    const point = points.pointOf(region, offset, null).map(String);
    missing.push({ signs: writer.write(region, offset), point, vertex: null });
  });

  const extra: ExtraRow[] = [];
  const repeated: RepeatedRow[] = [];
  const lineOf = (row: number): number => theirs.lines[row];
  const textOf = (row: number): string =>
    theirs.texts.get(row) ?? writer.write(words, row * wordsPerRow);
  for (const [, list] of strange) {
    const [row] = list;
    if (list.length > 1) again.set(row, list);
    if (extra.length >= listed) continue;
    const reason = reasonFor(arrangement, theirs, row);
    extra.push({ line: lineOf(row), text: textOf(row), reason });
  }
  let repeats = 0;
  for (const [first, list] of again) {
    repeats += list.length - 1;
    if (repeated.length < listed) repeated.push({ lines: list.map(lineOf), text: textOf(first) });
  }
  return {
    kind: 'signs',
    ours: regions,
    theirs: rows,
    placement: null,
    counts: {
      matched,
      missing: regions - matched,
      extra: strange.size,
      notExtreme: 0,
      undecided: 0,
      repeated: repeats,
    },
    missing,
    extra,
    notExtreme: [],
    repeated,
    agrees: matched === regions && strange.size === 0 && repeats === 0,
  };
}

function push<K>(lists: Map<K, number[]>, key: K, row: number): void {
  const list = lists.get(key);
  if (list === undefined) lists.set(key, [row]);
  else list.push(row);
}

/** Why no point has the signs of the row. Disagreement when one has after all. */
function reasonFor(arrangement: Arrangement, theirs: SignList, row: number): string {
  const pair = theirs.contradictions.get(row);
  if (pair !== undefined) {
    const [i, j] = pair;
    const relation =
      arrangement.orientationOf[i] === arrangement.orientationOf[j] ? 'parallel' : 'opposite';
    return `normals ${i + 1} and ${j + 1} are ${relation}`;
  }
  const { words, wordsPerRow } = theirs.table;
  const { ring, hyperplanes } = arrangement;
  const sides = hyperplanes.map(({ essential }, h) =>
    bitAt(words, row * wordsPerRow, h) === 1 ? essential : essential.map((x) => ring.negate(x)),
  );
  if (conePoint(ring, sides) !== null) {
    throw new Disagreement(
      `line ${theirs.lines[row]} names a region that our list leaves out; ` +
        'do not use these lists, and please report this',
    );
  }
  return 'no point has these signs';
}
