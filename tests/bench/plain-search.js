// The other side of the benchmark: a plain depth-first search over sign vectors. At each node it
// asks, for the next normal a and the signed normals so far, whether -a lies in the cone they span
// (then only one side of a is met; J. Farkas, 1902), and the same for a. The answer is exact: an
// integer simplex with Bland's rule (R. Bland, 1977) and integer pivoting, in plain numbers while
// every product stays below 2^53, from the start in BigInt otherwise.

/** Is `target` a combination of `columns` with no negative coefficient? Exact for any integers. */
function spans(columns, target) {
  return inConePlain(columns, target) ?? inConeBig(columns, target);
}

// Products of entries up to this, and their differences, stay below 2^53.
const SAFE_ENTRY = 2 ** 26;
let tableau = new Float64Array(1 << 12);

/** The same in plain numbers; null when an entry grows too large for them. */
function inConePlain(columns, target) {
  const r = target.length;
  const width = columns.length;
  const stride = width + 1;
  if ((r + 1) * stride > tableau.length) tableau = new Float64Array(2 * (r + 1) * stride);
  // Rows 0 .. r - 1: the columns, then the right side, made non-negative; artificial columns stay
  // implicit. Row r: the sum of the others, what is left to drive out of the artificials.
  const t = tableau;
  t.fill(0, r * stride, (r + 1) * stride);
  for (let i = 0; i < r; i++) {
    const flip = target[i] < 0 ? -1 : 1;
    for (let j = 0; j < width; j++) t[i * stride + j] = flip * columns[j][i];
    t[i * stride + width] = flip * target[i];
    for (let j = 0; j <= width; j++) t[r * stride + j] += t[i * stride + j];
  }
  const basis = new Int32Array(r).fill(-1);
  let previous = 1;
  for (;;) {
    if (t[r * stride + width] === 0) return true;
    let enter = 0;
    while (enter < width && t[r * stride + enter] <= 0) enter++;
    if (enter === width) return false;
    let leave = -1;
    for (let i = 0; i < r; i++) {
      const x = t[i * stride + enter];
      if (x <= 0) continue;
      if (leave < 0) {
        leave = i;
        continue;
      }
      const ours = t[i * stride + width] * t[leave * stride + enter];
      const theirs = t[leave * stride + width] * x;
      if (ours < theirs || (ours === theirs && basis[i] < basis[leave])) leave = i;
    }
    const from = leave * stride;
    const pivot = t[from + enter];
    let largest = 0;
    for (let i = 0; i <= r; i++) {
      if (i === leave) continue;
      const row = i * stride;
      const factor = t[row + enter];
      for (let j = 0; j <= width; j++) {
        const x = (pivot * t[row + j] - factor * t[from + j]) / previous;
        t[row + j] = x;
        if (x > largest) largest = x;
        else if (-x > largest) largest = -x;
      }
    }
    if (largest > SAFE_ENTRY) return null;
    previous = pivot;
    basis[leave] = enter;
  }
}

function inConeBig(columns, target) {
  const rows = target.map((b, i) => {
    const flip = b < 0 ? -1 : 1;
    return [...columns.map((column) => BigInt(flip * column[i])), BigInt(flip * b)];
  });
  const width = columns.length;
  const cost = rows[0].map((_, j) => rows.reduce((sum, row) => sum + row[j], 0n));
  const basis = rows.map(() => -1);
  let previous = 1n;
  for (;;) {
    if (cost[width] === 0n) return true;
    const enter = cost.findIndex((x, j) => j < width && x > 0n);
    if (enter < 0) return false;
    let leave = -1;
    rows.forEach((row, i) => {
      if (row[enter] <= 0n) return;
      if (leave < 0) {
        leave = i;
        return;
      }
      const ours = row[width] * rows[leave][enter];
      const theirs = rows[leave][width] * row[enter];
      if (ours < theirs || (ours === theirs && basis[i] < basis[leave])) leave = i;
    });
    const pivotRow = rows[leave];
    const pivot = pivotRow[enter];
    for (const row of [...rows, cost]) {
      if (row === pivotRow) continue;
      const factor = row[enter];
      for (let j = 0; j <= width; j++) row[j] = (pivot * row[j] - factor * pivotRow[j]) / previous;
    }
    previous = pivot;
    basis[leave] = enter;
  }
}

/** Regions on the positive side of the first normal, until all are found or `seconds` of CPU passed. */
export function searchRegions(normals, seconds) {
  const start = process.cpuUsage();
  const signed = [normals[0]];
  let found = 0;
  let finished = true;
  const spent = () => {
    const { user, system } = process.cpuUsage(start);
    return (user + system) / 1e6;
  };
  const visit = (k) => {
    if (k === normals.length) {
      found++;
      return;
    }
    const a = normals[k];
    const minus = a.map((x) => -x);
    const onlyPositive = spans(signed, a);
    const onlyNegative = !onlyPositive && spans(signed, minus);
    for (const [blocked, side] of [
      [onlyNegative, a],
      [onlyPositive, minus],
    ]) {
      if (blocked || !finished) continue;
      if ((found & 15) === 0 && spent() > seconds) finished = false;
      signed.push(side);
      visit(k + 1);
      signed.pop();
    }
  };
  visit(1);
  return { regions: 2 * found, seconds: spent(), finished };
}
