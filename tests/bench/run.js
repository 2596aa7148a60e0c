// npm run bench: the listing of regions beside a plain depth-first search with an exact feasibility
// test, both timed in this run, in CPU seconds. A figure is a ratio of the two; absolute times say
// what this machine was like. The search is stopped after some seconds and its rate taken.
import { buildArrangement } from '../../dist/arrangement/build.js';
import { countFaces } from '../../dist/face/faces.js';
import { randomNormals } from '../../dist/input/families/random.js';
import { reflectionArrangement } from '../../dist/input/families/reflection.js';
import { allSubsets } from '../../dist/input/families/subsets.js';
import { listRegions, regionCount } from '../../dist/region/regions.js';
import { searchRegions } from './plain-search.js';

const random = (rank, count, bound) =>
  randomNormals({ rank, count, bound: BigInt(bound), seed: 1n });
const cases = [
  ['E6', reflectionArrangement('E6')],
  ['E7', reflectionArrangement('E7')],
  ['0/1 vectors, R^6', allSubsets(6)],
  ['1000 random, R^3', random(3, 1000, 9999)],
  ['200 random, R^4', random(4, 200, 999)],
  ['40 random, R^7', random(7, 40, 29)],
];
const searchSeconds = Number(process.env.BENCH_SECONDS ?? 8);

function timed(task) {
  const start = process.cpuUsage();
  const value = task();
  const { user, system } = process.cpuUsage(start);
  return { value, seconds: (user + system) / 1e6 };
}

const median = (values) => values.sort((a, b) => a - b)[values.length >> 1];
const columns = [18, 10, 12, 12, 9];
const line = (cells) =>
  cells.map((cell, i) => (i === 0 ? cell.padEnd(columns[i]) : cell.padStart(columns[i]))).join('');

console.log('Regions a second of CPU: listing against a plain search (median of 5 listings)\n');
console.log(line(['arrangement', 'regions', 'listing/s', 'search/s', 'ratio']));
for (const [name, list] of cases) {
  const arrangement = buildArrangement(list);
  const normals = arrangement.hyperplanes.map((h) => h.essential.map(Number));
  const listings = Array.from({ length: 5 }, () =>
    timed(() => regionCount(listRegions(arrangement))),
  );
  const regions = listings[0].value;
  const ours = regions / median(listings.map((x) => x.seconds));
  const search = searchRegions(normals, searchSeconds);
  if (search.finished && search.regions !== regions) {
    throw new Error(`${name}: the search finds ${search.regions} regions, the listing ${regions}`);
  }
  const theirs = search.regions / search.seconds;
  const cells = [regions, ours, theirs].map((x) => Math.round(x).toString());
  console.log(
    line([name, ...cells, search.regions < 200 ? 'too few' : (ours / theirs).toFixed(0)]),
  );
}
console.log(
  '\nFaces a second of CPU, every covector listed, over regions a second in the same run\n',
);
console.log(line(['arrangement', 'faces', 'faces/s', 'regions/s', 'ratio']));
for (const [name, list] of [cases[0], cases[2], cases[1]]) {
  const arrangement = buildArrangement(list);
  const faces = timed(() => countFaces(arrangement).reduce((sum, x) => sum + x, 0));
  const regions = timed(() => regionCount(listRegions(arrangement)));
  const rates = [faces, regions].map((x) => x.value / x.seconds);
  console.log(
    line([
      name,
      faces.value.toString(),
      ...rates.map((x) => Math.round(x).toString()),
      (rates[0] / rates[1]).toFixed(2),
    ]),
  );
}
