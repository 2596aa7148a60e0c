// Somebody else's facet inequalities held against ours, in any order and at any positive scale. Two
// rows are the same when their functionals agree on the span up to a positive factor, offsets too.
import type { Arrangement } from '../arrangement/arrangement.js';
import { InputError } from '../errors.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactOne,
  exactZero,
  formatNumber,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import { signOfNumber } from '../exact/number-order.js';
import type { Quadratic } from '../exact/quadratic.js';
import type { FlatLattice } from '../flat/lattice.js';
import { isNumber } from '../input/number-text.js';
import { SourceText, shownName } from '../input/source.js';
import { facetsOf } from '../zonotope/facets.js';
import { centreOf } from '../zonotope/shape.js';
import { pointKey } from './crosscheck-points.js';
import type { ExtraRow, FacetReport, MissingFacet } from './crosscheck-report.js';
import { type Row, TableText } from './crosscheck-table.js';
import { facetRow } from './facet-rows.js';

/** d coefficients and an offset, and the line they stand on. */
interface TheirFacet {
  readonly normal: readonly ExactNumber[];
  readonly offset: ExactNumber;
  readonly line: number;
}

export interface TheirFacets {
  readonly rows: readonly TheirFacet[];
  readonly radicand: bigint | null;
}

/**
 * Reads d coefficients and an offset a row: columns named normal_* and offset (or b, bound, rhs) where
 * a header has them, else d + 1 numbers, the offset last. InputError names the line that is wrong.
 */
export async function readTheirFacets(
  bytes: Uint8Array,
  name: string,
  arrangement: Arrangement,
): Promise<TheirFacets> {
  const file = shownName(name);
  if (!bytes.some((byte) => byte > 32)) {
    throw new InputError('the list is empty', 'give a facet a line', { file });
  }
  const source = new TableText(new SourceText(bytes, name));
  const { dimension, generators } = arrangement;
  let columns: number[] | null = null;
  let names: readonly string[] | null = null;
  let width = 0;
  let radicand = generators.radicand;
  const rows: TheirFacet[] = [];
  await source.eachRow((row: Row) => {
    if (columns === null && names === null && !row.cells.some(isNumber)) {
      names = row.cells;
      return;
    }
    if (columns === null) {
      width = names?.length ?? row.cells.length;
      if (row.cells.length !== width) throw source.raggedFault(row, width);
      columns = columnsFor(names, row, dimension);
      if (columns === null) {
        throw source.fault(
          row.line,
          0,
          `${row.cells.length} cells a row, the arrangement has ${dimension} coordinates`,
          `give ${dimension} coefficients and the offset, or name them normal_1, ..., offset`,
        );
      }
    }
    if (row.cells.length !== width) throw source.raggedFault(row, width);
    const numbers = columns.map((column) => {
      const read = source.numberIn(row, column, radicand);
      radicand = read.radicand;
      return read.value;
    });
    const normal = numbers.slice(0, dimension);
    rows.push({ normal, offset: numbers[dimension], line: row.line });
  });
  if (rows.length === 0)
    throw source.fault(1, 0, 'no row follows the header', 'give a facet a line');
  return { rows, radicand };
}

/** Columns of the coefficients, then of the offset. */
function columnsFor(names: readonly string[] | null, row: Row, dimension: number): number[] | null {
  const all = row.cells.map((_, column) => column);
  const offset = names?.findIndex((name) => /^(offset|b|bound|rhs)$/i.test(name)) ?? -1;
  const normal = all.filter((column) => names?.[column].startsWith('normal_'));
  if (offset >= 0 && normal.length === dimension) return [...normal, offset];
  const numeric = all.filter((column) => isNumber(row.cells[column]));
  if (numeric.length !== dimension + 1) return null;
  if (offset < 0) return numeric;
  return [...numeric.filter((column) => column !== offset), offset];
}

/** A way to read (a, b) as normal . z <= offset: what each is multiplied by. */
interface Reading {
  readonly words: string;
  readonly normal: 1 | -1;
  readonly offset: 1 | -1;
}

const readings: readonly Reading[] = [
  { words: 'a . z <= b', normal: 1, offset: 1 },
  { words: 'a . z >= b', normal: -1, offset: -1 },
  { words: 'a . z + b >= 0', normal: -1, offset: 1 },
  { words: 'a . z + b <= 0', normal: 1, offset: -1 },
];

interface Put {
  readonly words: string;
  readonly scale: ExactNumber;
  readonly shift: readonly ExactNumber[];
}

/** Holds facets against ours; lists in the report are cut at `listed` entries. */
export function crosscheckFacets(
  arrangement: Arrangement,
  lattice: FlatLattice,
  theirs: TheirFacets,
  listed = 100,
): FacetReport {
  const { radicand } = theirs;
  const space = new FunctionalSpace(arrangement, radicand);
  const ours = [...facetsOf(arrangement, lattice)].map((facet) => facetRow(arrangement, facet));
  const centre = centreOf(arrangement);
  const puts: Put[] = [
    { words: 'the zonotope as it is', scale: exactOne, shift: centre.map(() => exactZero) },
    { words: 'centred at the origin', scale: exactOne, shift: centre.map(negateNumber) },
    {
      words: 'centred at the origin and doubled',
      scale: exactNumber(2n),
      shift: centre.map((x) => multiplyNumbers(exactNumber(-2n), x, 0n)),
    },
  ];
  let best: { reading: Reading; put: Put; keys: Map<string, number>; hits: number } | null = null;
  for (const put of puts) {
    const keys = new Map(
      ours.map(({ normal, offset }, i) => [space.key(normal, space.moved(normal, offset, put)), i]),
    );
    for (const reading of readings) {
      const hit = new Set(theirs.rows.map((row) => keys.get(space.keyOf(row, reading))));
      hit.delete(undefined);
      const hits = hit.size;
      if (best === null || hits > best.hits) best = { reading, put, keys, hits };
    }
  }
  const { reading, put, keys } = best!;
  const text = (x: ExactNumber): string => formatNumber(x, radicand);
  const lines = new Map<string, number[]>();
  const extra: ExtraRow[] = [];
  const found = new Set<number>();
  let extras = 0;
  const rowText = ({ normal, offset }: TheirFacet): string =>
    `${normal.map(text).join(', ')}; ${text(offset)}`;
  const texts = new Map<string, string>();
  for (const row of theirs.rows) {
    const key = space.keyOf(row, reading);
    const before = lines.get(key);
    if (before !== undefined) {
      before.push(row.line);
      continue;
    }
    lines.set(key, [row.line]);
    texts.set(key, rowText(row));
    const facet = keys.get(key);
    if (facet !== undefined) {
      found.add(facet);
      continue;
    }
    extras++;
    if (extra.length < listed) {
      extra.push({ line: row.line, text: rowText(row), reason: space.why(row, reading, put) });
    }
  }
  const missing = ours.filter((_, i) => !found.has(i));
  const again = [...lines].filter(([, list]) => list.length > 1);
  const repeated = again.reduce((sum, [, list]) => sum + list.length - 1, 0);
  return {
    kind: 'facets',
    ours: ours.length,
    theirs: theirs.rows.length,
    reading: `${reading.words}, ${put.words}`,
    counts: { matched: found.size, missing: missing.length, extra: extras, repeated },
    missing: missing.slice(0, listed).map(
      ({ normal, offset, signs }): MissingFacet => ({
        normal: normal.map(text),
        offset: text(space.moved(normal, offset, put)),
        signs,
      }),
    ),
    extra,
    repeated: again.slice(0, listed).map(([key, list]) => ({ lines: list, text: texts.get(key)! })),
    agrees: missing.length === 0 && extras === 0 && repeated === 0,
  };
}

/** Functionals on the span, as their values on its basis. */
class FunctionalSpace {
  private readonly basis: readonly (readonly ExactNumber[])[];
  private readonly arrangement: Arrangement;
  private readonly radicand: bigint | null;
  private readonly k: bigint;

  constructor(arrangement: Arrangement, radicand: bigint | null) {
    this.arrangement = arrangement;
    this.radicand = radicand;
    this.k = radicand ?? 0n;
    const rational = arrangement.generators.radicand === null;
    this.basis = arrangement.spanBasis.map((row) =>
      row.map((e) =>
        rational ? exactNumber(e as bigint) : exactNumber((e as Quadratic).a, (e as Quadratic).b),
      ),
    );
  }

  private dot(u: readonly ExactNumber[], v: readonly ExactNumber[]): ExactNumber {
    return u.reduce((sum, x, i) => addNumbers(sum, multiplyNumbers(x, v[i], this.k)), exactZero);
  }

  /** The offset where the zonotope is put. */
  moved(normal: readonly ExactNumber[], offset: ExactNumber, { scale, shift }: Put): ExactNumber {
    return addNumbers(multiplyNumbers(scale, offset, this.k), this.dot(normal, shift));
  }

  /** One text for all positive multiples of an inequality. */
  key(normal: readonly ExactNumber[], offset: ExactNumber): string {
    const values = this.basis.map((u) => this.dot(normal, u));
    const lead = values.find((x) => !isZero(x));
    if (lead === undefined) return `zero ${pointKey([...normal, offset])}`;
    const size = signOfNumber(lead, this.radicand) < 0 ? negateNumber(lead) : lead;
    return pointKey([...values, offset].map((x) => divideNumbers(x, size, this.k)));
  }

  keyOf({ normal, offset }: TheirFacet, reading: Reading): string {
    return this.key(...this.read({ normal, offset }, reading));
  }

  private read(
    { normal, offset }: Pick<TheirFacet, 'normal' | 'offset'>,
    reading: Reading,
  ): [ExactNumber[], ExactNumber] {
    const signed = (x: ExactNumber, sign: 1 | -1): ExactNumber => (sign < 0 ? negateNumber(x) : x);
    return [normal.map((x) => signed(x, reading.normal)), signed(offset, reading.offset)];
  }

  /** Why a row is no facet: where its hyperplane lies to the zonotope. */
  why(row: TheirFacet, reading: Reading, put: Put): string {
    const [normal, offset] = this.read(row, reading);
    const { normals, ranges } = this.arrangement.generators;
    if (this.basis.every((u) => isZero(this.dot(normal, u)))) {
      return 'it is constant on the span of the zonotope';
    }
    let most = exactZero;
    normals.forEach((u, j) => {
      const value = this.dot(normal, u);
      const { low, high } = ranges?.[j] ?? { low: exactZero, high: exactOne };
      const end = signOfNumber(value, this.radicand) > 0 ? high : low;
      most = addNumbers(most, multiplyNumbers(value, end, this.k));
    });
    const slack = addNumbers(offset, negateNumber(this.moved(normal, most, put)));
    const sign = signOfNumber(slack, this.radicand);
    if (sign === 0) return 'it touches the zonotope in a face smaller than a facet';
    return sign > 0
      ? `it holds, but the zonotope stays away from it by ${formatNumber(slack, this.radicand)}`
      : `it cuts points of the zonotope off, by ${formatNumber(negateNumber(slack), this.radicand)}`;
  }
}
