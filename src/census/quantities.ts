// Estimates in words: times and sizes with the two digits an estimate deserves.

const binaryUnits = ['B', 'kB', 'MB', 'GB', 'TB', 'PB'];

function twoDigits(value: number): string {
  return value >= 10
    ? Math.round(value).toLocaleString('en-US')
    : String(Number(value.toPrecision(2)));
}

/** No estimate is better than to a thousandth of a second. */
const leastSeconds = 0.001;

/** Seconds as people say them: `0.4 s`, `12 min`, `3.5 h`, `40 days`, `1,200 years`. */
export function formatSeconds(seconds: number): string {
  const day = 86400;
  if (!Number.isFinite(seconds) || seconds > 1e6 * 365 * day) return 'more than a million years';
  if (seconds < 100) return `${twoDigits(Math.max(seconds, leastSeconds))} s`;
  if (seconds < 100 * 60) return `${twoDigits(seconds / 60)} min`;
  if (seconds < 3 * day) return `${twoDigits(seconds / 3600)} h`;
  if (seconds < 800 * day) return `${twoDigits(seconds / day)} days`;
  return `${twoDigits(seconds / (365 * day))} years`;
}

/** Bytes in units of 1024: `300 MB`, `5.6 GB`. */
export function formatBytes(bytes: number): string {
  let unit = 0;
  let value = bytes;
  while (value >= 1000 && unit < binaryUnits.length - 1) {
    value /= 1024;
    unit++;
  }
  return value < 1e6 ? `${twoDigits(value)} ${binaryUnits[unit]}` : 'more than a million PB';
}

/** Digits in groups of three, for counts in sentences. */
export function formatCount(count: bigint | number): string {
  return count.toLocaleString('en-US');
}
