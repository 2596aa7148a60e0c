// What holding somebody else's list against ours found, as plain data that JSON can carry: numbers
// are texts, exact as the readers take them back; lists are cut at a length, counts are in full.

/** A region of ours that their list leaves out. */
export interface MissingRegion {
  readonly signs: string;
  /** An integer point strictly inside the region: proof that it exists. */
  readonly point: readonly string[];
  /** The vertex where their list would have it; null when they list signs. */
  readonly vertex: readonly string[] | null;
}

/** A row of theirs that is not a vertex, or not a region, of ours. */
export interface ExtraRow {
  readonly line: number;
  readonly text: string;
  /** Why it is none. */
  readonly reason: string;
}

/** A row that came more than once. */
export interface RepeatedRow {
  readonly lines: readonly number[];
  readonly text: string;
}

/** Vertices or signs held against ours. `counts` are of all rows, the lists may be cut. */
export interface ListReport {
  readonly kind: 'vertices' | 'signs';
  /** Regions of ours, and rows of theirs. */
  readonly ours: number;
  readonly theirs: number;
  /** How their vertices lie to ours, in words: scale and shift; null for signs. */
  readonly placement: string | null;
  readonly counts: {
    readonly matched: number;
    readonly missing: number;
    /** Distinct rows that are no vertex, or signs that no point has. */
    readonly extra: number;
    /** Distinct points of the zonotope that are not vertices; 0 for signs. */
    readonly notExtreme: number;
    /** Distinct points that are no vertices and were too many to be told apart further. */
    readonly undecided: number;
    /** Rows beyond the first of each. */
    readonly repeated: number;
  };
  readonly missing: readonly MissingRegion[];
  readonly extra: readonly ExtraRow[];
  readonly notExtreme: readonly ExtraRow[];
  readonly repeated: readonly RepeatedRow[];
  readonly agrees: boolean;
}

/** A facet of ours that their list leaves out, where their zonotope lies: normal . z <= offset. */
export interface MissingFacet {
  readonly normal: readonly string[];
  readonly offset: string;
  /** The signs of the ray that the normal is. */
  readonly signs: string;
}

/** Facet inequalities held against ours. `counts` are of all rows, the lists may be cut. */
export interface FacetReport {
  readonly kind: 'facets';
  readonly ours: number;
  readonly theirs: number;
  /** How their rows were read, and where their zonotope lies. */
  readonly reading: string;
  readonly counts: {
    readonly matched: number;
    readonly missing: number;
    /** Distinct rows that are no facet. */
    readonly extra: number;
    /** Rows beyond the first of each. */
    readonly repeated: number;
  };
  readonly missing: readonly MissingFacet[];
  readonly extra: readonly ExtraRow[];
  readonly repeated: readonly RepeatedRow[];
  readonly agrees: boolean;
}

/** Numbers of faces of the zonotope by dimension, from the vertices up, held against ours. */
export interface FacesReport {
  readonly kind: 'faces';
  readonly ours: readonly string[];
  readonly theirs: readonly string[];
  readonly agrees: boolean;
}

/** A number of regions held against ours. */
export interface CountReport {
  readonly kind: 'count';
  readonly ours: string;
  readonly theirs: string;
  readonly agrees: boolean;
}

/** Everything a crosscheck found; it agrees when all parts do. */
export interface CrosscheckReport {
  readonly parts: readonly (ListReport | FacetReport | FacesReport | CountReport)[];
  readonly agrees: boolean;
}

const COLUMNS = 80;

/** Cuts a line that is too long for the page, with three points at the end. */
function fitted(line: string): string {
  return line.length <= COLUMNS ? line : `${line.slice(0, COLUMNS - 3)}...`;
}

/** The report as lines of at most 80 characters; at most `rows` of each list. */
export function crosscheckLines(report: CrosscheckReport, rows = 10): string[] {
  const lines = report.parts.flatMap((part, i) => [
    ...(i > 0 ? [''] : []),
    ...partLines(part, rows),
  ]);
  return [...lines, '', report.agrees ? 'The two agree.' : 'The two do NOT agree.'].map(fitted);
}

function partLines(part: CrosscheckReport['parts'][number], rows: number): string[] {
  if (part.kind === 'count') return countLines(part);
  if (part.kind === 'faces') return facesLines(part);
  return part.kind === 'facets' ? facetLines(part, rows) : listLines(part, rows);
}

function facesLines({ ours, theirs }: FacesReport): string[] {
  const width = Math.max(...ours.map((x) => x.length), ...theirs.map((x) => x.length), 6);
  const row = (name: string, cells: readonly string[]): string =>
    `  ${name.padEnd(10)}${cells.map((cell) => `  ${cell.padStart(width)}`).join('')}`;
  const dimensions = ours.map((_, k) => String(k));
  const differs = ours.map((x, k) => theirs[k] !== undefined && theirs[k] !== x);
  return [
    'Faces of the zonotope',
    row('dimension', dimensions),
    row('ours', ours),
    row(
      'theirs',
      ours.map((_, k) => theirs[k] ?? '-'),
    ),
    ...(differs.includes(true)
      ? [
          row(
            '',
            differs.map((yes) => (yes ? 'differs' : '')),
          ),
        ]
      : []),
  ].map((line) => line.trimEnd());
}

function facetLines(part: FacetReport, rows: number): string[] {
  const { counts } = part;
  const table: [string, number][] = [
    ['ours', part.ours],
    ['theirs', part.theirs],
    ['the same', counts.matched],
    ['missing', counts.missing],
    ['extra', counts.extra],
    ['repeated', counts.repeated],
  ];
  const width = Math.max(...table.map(([, count]) => String(count).length));
  const lines = [
    'Facets of the zonotope',
    ...wrapped(`read as: ${part.reading}`),
    ...table.map(([name, count]) => `  ${name.padEnd(12)}  ${String(count).padStart(width)}`),
  ];
  section(lines, 'Missing', part.missing, counts.missing, rows, (item) => [
    `  (${item.normal.join(', ')}) . z <= ${item.offset}`,
    `    signs ${item.signs}`,
  ]);
  section(lines, 'Extra', part.extra, counts.extra, rows, extraLines);
  section(lines, 'Repeated', part.repeated, counts.repeated, rows, repeatedLines);
  return lines;
}

/** Adds a titled list, at most `rows` of it, with how many more there are. */
function section<T>(
  lines: string[],
  title: string,
  list: readonly T[],
  total: number,
  rows: number,
  line: (item: T) => string[],
): void {
  if (total === 0) return;
  lines.push('', `${title}:`);
  for (const item of list.slice(0, rows)) lines.push(...line(item));
  const rest = total - Math.min(rows, list.length);
  if (rest > 0) lines.push(`  and ${rest} more`);
}

function extraLines({ line, text, reason }: ExtraRow): string[] {
  return [`  line ${line}: ${text}`, `    ${reason}`];
}

function repeatedLines({ lines, text }: RepeatedRow): string[] {
  return [`  lines ${lines.join(', ')}: ${text}`];
}

function countLines({ ours, theirs }: CountReport): string[] {
  const width = Math.max(ours.length, theirs.length);
  return [
    'Number of regions',
    `  ours    ${ours.padStart(width)}`,
    `  theirs  ${theirs.padStart(width)}`,
  ];
}

function listLines(part: ListReport, rows: number): string[] {
  const { counts } = part;
  const what =
    part.kind === 'vertices' ? 'Vertices of the zonotope' : 'Sign vectors of the regions';
  const table: [string, number][] = [
    ['ours', part.ours],
    ['theirs', part.theirs],
    ['the same', counts.matched],
    ['missing', counts.missing],
    ['extra', counts.extra],
    ...(part.kind === 'vertices' ? [['not extreme', counts.notExtreme] as [string, number]] : []),
    ...(counts.undecided > 0 ? [['not vertices', counts.undecided] as [string, number]] : []),
    ['repeated', counts.repeated],
  ];
  const width = Math.max(...table.map(([, count]) => String(count).length));
  const lines = [
    what,
    ...(part.placement === null ? [] : wrapped(`placement: ${part.placement}`)),
    ...table.map(([name, count]) => `  ${name.padEnd(12)}  ${String(count).padStart(width)}`),
  ];
  section(lines, 'Missing', part.missing, counts.missing, rows, (item) => [
    `  ${item.vertex === null ? item.signs : `(${item.vertex.join(', ')})`}`,
    `    ${item.vertex === null ? '' : `signs ${item.signs}, `}region of the point (${item.point.join(', ')})`,
  ]);
  section(lines, 'Extra', part.extra, counts.extra, rows, extraLines);
  section(lines, 'Not extreme', part.notExtreme, counts.notExtreme, rows, extraLines);
  section(lines, 'Repeated', part.repeated, counts.repeated, rows, repeatedLines);
  return lines;
}

/** Words of a sentence over lines, indented by two. */
function wrapped(sentence: string): string[] {
  const lines: string[] = [];
  let line = ' ';
  for (const word of sentence.split(' ')) {
    if (line.length + 1 + word.length > COLUMNS && line !== ' ') {
      lines.push(line);
      line = '   ';
    }
    line += ` ${word}`;
  }
  return [...lines, line];
}
