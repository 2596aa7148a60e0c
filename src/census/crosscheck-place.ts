// Where somebody else's zonotope lies: the scale s > 0 and shift t that take our vertices to theirs.
// Candidates come from the usual conventions, from the boxes around both, and, where too much is
// missing or extra for these, from differences between their points; each is scored by how many of
// a sample of their points it explains exactly.
import type { Arrangement } from '../arrangement/arrangement.js';
import {
  addNumbers,
  divideNumbers,
  type ExactNumber,
  exactNumber,
  exactOne,
  exactZero,
  isZero,
  multiplyNumbers,
  negateNumber,
} from '../exact/number.js';
import type { RegionTable } from '../region/regions.js';
import { eachRegion } from '../region/walls.js';
import { type Placement, ZonotopeVertices } from '../zonotope/vertices.js';
import { minus, minusNumber, plus, type Vector } from './crosscheck-placement.js';
import { type PointSet, pointKey, pointOfKey, signOfNumber } from './crosscheck-points.js';

/** Their points looked at when candidates are scored. */
const SAMPLE = 64;
/** Vertices of ours up to which differences are tried. */
const VOTE_VERTICES = 100_000;
/** Their points compared in pairs when differences vote. */
const VOTE_POINTS = 1_000;

/** A placement and how many of the sampled points it explains. */
export interface FoundPlacement {
  readonly placement: Placement;
  readonly explained: number;
  readonly sampled: number;
}

/** The best candidate; the identity when none explains anything. */
export function findPlacement(
  arrangement: Arrangement,
  table: RegionTable,
  theirs: PointSet,
): FoundPlacement {
  const search = new PlacementSearch(arrangement, table, theirs);
  const usual = search.score(search.usualCandidates());
  if (2 * usual.explained >= usual.sampled || 2 * table.half.rows > VOTE_VERTICES) return usual;
  const voted = search.score(search.votedCandidates());
  // Any two points can be made to coincide: a vote has to explain more than that.
  return voted.explained > Math.max(usual.explained, voted.sampled > 2 ? 2 : 0) ? voted : usual;
}

class PlacementSearch {
  private readonly arrangement: Arrangement;
  private readonly table: RegionTable;
  private readonly theirs: PointSet;
  private readonly radicand: bigint | null;
  private readonly k: bigint;
  private readonly sample: readonly ExactNumber[][];

  constructor(arrangement: Arrangement, table: RegionTable, theirs: PointSet) {
    this.arrangement = arrangement;
    this.table = table;
    this.theirs = theirs;
    this.radicand = arrangement.generators.radicand ?? theirs.radicand;
    this.k = this.radicand ?? 0n;
    this.sample = this.spread(SAMPLE);
  }

  /** About `count` of their points, evenly over the file. */
  private spread(count: number): ExactNumber[][] {
    const step = Math.max(1, Math.floor(this.theirs.first.size / count));
    const points: ExactNumber[][] = [];
    let i = 0;
    for (const key of this.theirs.first.keys()) {
      if (i++ % step === 0 && points.length < count) points.push(pointOfKey(key));
    }
    return points;
  }

  private times(x: ExactNumber, v: Vector): ExactNumber[] {
    return v.map((y) => multiplyNumbers(x, y, this.k));
  }

  private over(x: ExactNumber, y: ExactNumber): ExactNumber {
    return divideNumbers(x, y, this.k);
  }

  private isPositive(x: ExactNumber): boolean {
    return signOfNumber(x, this.radicand) > 0;
  }

  /** The box around our zonotope, from its generators alone. */
  private ourBox(): { low: ExactNumber[]; high: ExactNumber[] } {
    const { normals, ranges } = this.arrangement.generators;
    const low = normals[0].map(() => exactZero);
    const high = normals[0].map(() => exactZero);
    normals.forEach((normal, i) => {
      const ends = [ranges?.[i].low ?? exactZero, ranges?.[i].high ?? exactOne];
      normal.forEach((x, j) => {
        const [a, b] = ends.map((t) => multiplyNumbers(t, x, this.k));
        const rising = this.isPositive(minusNumber(b, a));
        low[j] = addNumbers(low[j], rising ? a : b);
        high[j] = addNumbers(high[j], rising ? b : a);
      });
    });
    return { low, high };
  }

  usualCandidates(): Placement[] {
    const { low, high } = this.ourBox();
    const half = exactNumber(1n, 0n, 2n);
    const centre = this.times(half, plus(low, high));
    const zero = low.map(() => exactZero);
    const found: Placement[] = [];
    const add = (scale: ExactNumber, shift: Vector): void => {
      if (this.isPositive(scale)) found.push({ scale, shift, radicand: this.radicand });
    };
    const about = (scale: ExactNumber, point: Vector): void =>
      add(scale, minus(point, this.times(scale, centre)));
    add(exactOne, zero);
    about(exactOne, zero);
    about(exactNumber(2n), zero);
    const { theirs } = this;
    const middle = this.times(half, plus(theirs.low, theirs.high));
    const mean = theirs.centre();
    const scales = new Map<string, ExactNumber>();
    low.forEach((_, j) => {
      const width = minusNumber(high[j], low[j]);
      if (isZero(width)) return;
      const scale = this.over(minusNumber(theirs.high[j], theirs.low[j]), width);
      scales.set(pointKey([scale]), scale);
    });
    for (const scale of [exactOne, exactNumber(2n), ...scales.values()]) {
      about(scale, middle);
      about(scale, mean);
      add(scale, minus(theirs.low, this.times(scale, low)));
      add(scale, minus(theirs.high, this.times(scale, high)));
    }
    return found;
  }

  /**
   * Scales and shifts that many pairs of points agree on: neighbouring vertices differ by a multiple
   * of a normal, and that multiple tells the scale; then differences to our vertices tell the shift.
   */
  votedCandidates(): Placement[] {
    const few = this.spread(24);
    const many = this.spread(VOTE_POINTS);
    const steps = this.stepsByDirection();
    const scales = new Votes<ExactNumber>();
    for (const p of few) {
      for (const q of many) {
        const difference = minus(p, q);
        const pivot = difference.findIndex((x) => !isZero(x));
        if (pivot < 0) continue;
        const step = steps.get(this.directionKey(difference, pivot));
        if (step === undefined) continue;
        const ratio = this.over(difference[pivot], step[pivot]);
        const scale = this.isPositive(ratio) ? ratio : negateNumber(ratio);
        scales.add(pointKey([scale]), scale);
      }
    }
    const candidates: Placement[] = [];
    for (const scale of [exactOne, ...scales.best(3)]) {
      const shifts = new Votes<Vector>();
      const shift = this.times(scale, this.arrangement.generators.normals[0]).map(() => exactZero);
      const ours = new ZonotopeVertices(this.arrangement, {
        scale,
        shift,
        radicand: this.radicand,
      });
      eachRegion(this.table, (words, offset) => {
        const vertex = ours.vertexOf(words, offset);
        for (const point of few.slice(0, 8)) {
          const t = minus(point, vertex);
          shifts.add(pointKey(t), t);
        }
      });
      for (const t of shifts.best(3)) candidates.push({ scale, shift: t, radicand: this.radicand });
    }
    return candidates;
  }

  /** What crossing each hyperplane adds to a vertex, by direction. */
  private stepsByDirection(): Map<string, Vector> {
    const { hyperplanes, generators } = this.arrangement;
    const steps = new Map<string, Vector>();
    for (const { members } of hyperplanes) {
      const first = generators.normals[members[0]];
      const pivot = first.findIndex((x) => !isZero(x));
      let length = exactZero;
      for (const i of members) {
        const { low, high } = generators.ranges?.[i] ?? { low: exactZero, high: exactOne };
        const ratio = this.over(generators.normals[i][pivot], first[pivot]);
        const share = multiplyNumbers(ratio, minusNumber(high, low), this.k);
        length = addNumbers(length, this.isPositive(share) ? share : negateNumber(share));
      }
      steps.set(this.directionKey(first, pivot), this.times(length, first));
    }
    return steps;
  }

  private directionKey(v: Vector, pivot: number): string {
    return pointKey(v.map((x) => this.over(x, v[pivot])));
  }

  /** The candidate that explains most of the sample; the first of equals. */
  score(candidates: readonly Placement[]): FoundPlacement {
    const { sample, radicand } = this;
    const zero = this.theirs.low.map(() => exactZero);
    // The sample taken back to our coordinates by every candidate, looked up in one pass over ours.
    const wanted = new Map<string, number[]>();
    candidates.forEach(({ scale, shift }, c) => {
      for (const point of sample) {
        const key = pointKey(minus(point, shift).map((x) => this.over(x, scale)));
        const list = wanted.get(key);
        if (list === undefined) wanted.set(key, [c]);
        else if (list[list.length - 1] !== c) list.push(c);
      }
    });
    const hits = new Array<number>(candidates.length).fill(0);
    const ours = new ZonotopeVertices(this.arrangement, { scale: exactOne, shift: zero, radicand });
    eachRegion(this.table, (words, offset) => {
      for (const c of wanted.get(pointKey(ours.vertexOf(words, offset))) ?? []) hits[c]++;
    });
    let best = 0;
    hits.forEach((count, c) => {
      if (count > hits[best]) best = c;
    });
    const identity: Placement = { scale: exactOne, shift: zero, radicand };
    return {
      placement: candidates[best] ?? identity,
      explained: hits[best] ?? 0,
      sampled: sample.length,
    };
  }
}

/** Counts values by key and gives those named most often. */
class Votes<T> {
  private readonly counts = new Map<string, { value: T; count: number }>();

  add(key: string, value: T): void {
    const vote = this.counts.get(key);
    if (vote === undefined) this.counts.set(key, { value, count: 1 });
    else vote.count++;
  }

  best(limit: number): T[] {
    const votes = [...this.counts.values()].filter(({ count }) => count > 1);
    votes.sort((a, b) => b.count - a.count);
    return votes.slice(0, limit).map(({ value }) => value);
  }
}
