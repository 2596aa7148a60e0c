// What a run of deletion-restriction adds up: the sets without broken circuit by size
// (H. Whitney, 1932, A logical expansion in mathematics), which are the coefficients of the
// characteristic polynomial up to sign.

/** Exact counters for rank r: doubles that are emptied into BigInt before they can lose a unit. */
export class DeletionTally {
  readonly rank: number;
  /** Rank-3 arrangements closed so far. */
  bases = 0;
  /** Nodes of the recursion by depth 0..r-3 since the last flush. */
  readonly nodes: Float64Array;
  private lines = 0;
  private points = 0;
  private ends = 0;
  private readonly totals: bigint[];
  private readonly report: ((bases: number) => void) | null;

  constructor(rank: number, report: ((bases: number) => void) | null) {
    this.rank = rank;
    this.nodes = new Float64Array(rank + 1);
    this.totals = new Array<bigint>(rank + 1).fill(0n);
    this.report = report;
  }

  /**
   * A rank-3 arrangement of n planes (any n from 0), whose rank-2 flats have Moebius values adding
   * up to `w2`: its polynomial is t^3 - n t^2 + w2 t - (1 - n + w2), as it vanishes at 1 when n > 0.
   */
  close(n: number, w2: number): void {
    this.bases++;
    this.lines += n;
    this.points += w2;
    if (n > 0) this.ends += 1 - n + w2;
    // Between two flushes each counter grows by at most 2^20 n^2 / 2, so by 2^51 for n <= 2^16.
    if ((this.bases & 0xfffff) === 0 || n > 0x10000) this.flush();
    if (this.report !== null && (this.bases & 0x3fff) === 0) this.report(this.bases);
  }

  private flush(): void {
    const { totals, rank } = this;
    for (let k = 0; k <= rank; k++) totals[k] += BigInt(this.nodes[k]);
    totals[rank - 2] += BigInt(this.lines);
    totals[rank - 1] += BigInt(this.points);
    totals[rank] += BigInt(this.ends);
    this.nodes.fill(0);
    this.lines = this.points = this.ends = 0;
  }

  /** Coefficients from t^0 up. */
  polynomial(): bigint[] {
    this.flush();
    return this.totals.map((w, k) => (k % 2 === 0 ? w : -w)).reverse();
  }
}
