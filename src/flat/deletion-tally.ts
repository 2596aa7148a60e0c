// What a run of deletion-restriction adds up: the sets without broken circuit by size
// (H. Whitney, 1932, A logical expansion in mathematics), which are the coefficients of the
// characteristic polynomial up to sign.

/** Exact counters for rank r >= 3: doubles that are emptied into BigInt before they lose a unit. */
export class DeletionTally {
  /** Rank-3 arrangements closed so far. */
  bases = 0;
  private readonly rank: number;
  /** By size of the set, since the last flush. */
  private readonly counts: Float64Array;
  private readonly totals: bigint[];
  private readonly report: (bases: number) => void;
  private events = 0;

  constructor(rank: number, report: (bases: number) => void) {
    this.rank = rank;
    this.counts = new Float64Array(rank + 1);
    this.totals = new Array<bigint>(rank + 1).fill(0n);
    this.report = report;
  }

  /** A node of the recursion at `depth`: one set of that size. */
  open(depth: number): void {
    this.counts[depth]++;
    this.event(1);
  }

  /** A node at `depth` with n <= 2 planes left, which are independent, and all that is below it. */
  closeSmall(depth: number, n: number): void {
    this.counts[depth]++;
    if (n > 0) this.counts[depth + 1] += n;
    if (n === 2) this.counts[depth + 2]++;
    this.event(1);
  }

  /**
   * A rank-3 node of n planes, whose rank-2 flats have Moebius values adding up to `w2`: its
   * polynomial is t^3 - n t^2 + w2 t - (1 - n + w2), as it vanishes at 1 when n > 0.
   */
  close(n: number, w2: number): void {
    const { counts, rank } = this;
    this.bases++;
    counts[rank - 3]++;
    counts[rank - 2] += n;
    counts[rank - 1] += w2;
    if (n > 0) counts[rank] += 1 - n + w2;
    this.event(n);
    if ((this.bases & 0x3fff) === 0) this.report(this.bases);
  }

  /** An event adds at most n^2 / 2 + 1 to a counter: 2^20 of them less than 2^52 for n <= 2^16. */
  private event(n: number): void {
    if ((++this.events & 0xfffff) === 0 || n > 0x10000) this.flush();
  }

  private flush(): void {
    for (let k = 0; k <= this.rank; k++) this.totals[k] += BigInt(this.counts[k]);
    this.counts.fill(0);
  }

  /** Coefficients from t^0 up. */
  polynomial(): bigint[] {
    this.flush();
    return this.totals.map((w, k) => (k % 2 === 0 ? w : -w)).reverse();
  }
}
