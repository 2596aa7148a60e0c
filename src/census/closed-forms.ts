// Counts known without looking, used as routes of their own in the checks.
//   Generic normals: T. Cover, 1965, Geometrical and statistical properties of systems of linear
//   inequalities; all faces: T. Zaslavsky, 1975, Facing up to Arrangements.
//   Rank 3: a plane section gives projective lines, whose cells follow from the multiplicities of
//   their points by Euler's relation; simplicial case: E. Melchior, 1940.

/** Binomial coefficient; 0 outside 0 <= k <= n. */
export function binomial(n: number, k: number): bigint {
  if (k < 0 || k > n) return 0n;
  let value = 1n;
  for (let i = 1; i <= k; i++) value = (value * BigInt(n - k + i)) / BigInt(i);
  return value;
}

/** Regions of n hyperplanes of rank r of which every r are independent. */
export function genericRegions(n: number, r: number): bigint {
  let sum = 0n;
  for (let i = 0; i < r; i++) sum += binomial(n - 1, i);
  return 2n * sum;
}

/** Their faces by dimension 0..r: a face of codimension k lies on exactly k hyperplanes. */
export function genericFaces(n: number, r: number): bigint[] {
  return Array.from({ length: r + 1 }, (_, dimension) => {
    const codimension = r - dimension;
    if (dimension === 0) return 1n;
    return binomial(n, codimension) * genericRegions(n - codimension, dimension);
  });
}

/** How many lines of a rank-3 arrangement lie on exactly k of its hyperplanes, by k. */
export type Multiplicities = ReadonlyMap<number, number>;

/** Regions of a rank-3 arrangement from its multiplicities: 2 + 2 sum of (k - 1) t_k. */
export function regionsByMultiplicities(t: Multiplicities): bigint {
  let sum = 1n;
  for (const [k, lines] of t) sum += BigInt(k - 1) * BigInt(lines);
  return 2n * sum;
}

/** Whether a rank-3 arrangement is simplicial, by Melchior's equality t_2 = 3 + sum (k - 3) t_k. */
export function simplicialByMultiplicities(t: Multiplicities): boolean {
  let sum = 3;
  for (const [k, lines] of t) if (k >= 4) sum += (k - 3) * lines;
  return (t.get(2) ?? 0) === sum;
}
