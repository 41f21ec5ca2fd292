// Measures the search on cases that are no flow, beside a plain formulation of the same (a row for
// every two duties that conflict).
//   npm run measure:search           realistic weeks and one crowded day
//   npm run measure:search -- weeks  the weeks only
import { createRequire } from 'node:module';
import { loadTypeScript } from './load.mjs';

const { search } = await loadTypeScript('src/exact/search.ts');
const { readCase } = await loadTypeScript('src/sheet/readCase.ts');
const highs = await createRequire(import.meta.url)('highs')();

/** Duties at random times of some days, people who may take some of them. Lengths and rest in minutes. */
function randomCase({ seed, duties, people, pairs, days, shortest, longest, rest, seconds }) {
  let state = seed;
  const random = (below) => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return (state >>> 8) % below;
  };
  const rows = Array.from({ length: duties }, (_, d) => {
    const start = 46_000 + random(days) + (6 * 60 + 15 * random(56)) / 1440;
    return [`Duty ${d}`, 1, start, start + (shortest + 15 * random((longest - shortest) / 15 + 1)) / 1440];
  });
  const listed = new Map();
  while (listed.size < pairs) {
    const [d, p] = [random(duties), random(people)];
    listed.set(d * people + p, [`Duty ${d}`, `Person ${p}`, 1 + random(5)]);
  }
  const { case: kase } = readCase([
    [['Duty', 'Person', 'Rank'], ...listed.values()],
    [['Person', 'Maximum', 'Minimum'], ...Array.from({ length: people }, (_, p) => [`Person ${p}`, 5, random(3)])],
    [['Duty', 'Need', 'Start', 'End'], ...rows],
    [['Rule', 'Duty', 'Person', 'Value'], ['Rest', '', '', rest], ['Seconds', '', '', seconds]],
    null,
  ]);
  return kase;
}

function run(kase, formulation) {
  const began = performance.now();
  const reached = [];
  let done = 0;
  const onProgress = ({ found: { verdicts } }) => {
    if (verdicts.length === done) return;
    done = verdicts.length;
    const { aim, gap } = verdicts.at(-1);
    reached.push(`${aim} ${gap === 0 ? 'proven' : `gap ${Math.round(gap)}`} at ${((performance.now() - began) / 1000).toFixed(2)} s`);
  };
  const { held } = search(highs, kase, { seconds: kase.seconds, formulation, onProgress });
  return { seconds: (performance.now() - began) / 1000, held: held.length, reached };
}

function compare(name, kase) {
  const [plain, ours] = ['pairs', 'cliques'].map((formulation) => run(kase, formulation));
  console.log(`${name}: ${ours.held} seats; ${ours.seconds.toFixed(2)} s, plain ${plain.seconds.toFixed(2)} s: ${(plain.seconds / ours.seconds).toFixed(1)} times as long`);
  console.log(`  ours:  ${ours.reached.join(', ')}`);
  console.log(`  plain: ${plain.reached.join(', ')}`);
}

const week = { duties: 200, people: 60, pairs: 2_000, days: 5, shortest: 60, longest: 480, rest: 660, seconds: 60 };
for (let seed = 1; seed <= 5; seed++) compare(`Week ${seed}`, randomCase({ ...week, seed }));
if (process.argv[2] !== 'weeks') {
  const day = { duties: 200, people: 40, pairs: 2_000, days: 1, shortest: 120, longest: 480, rest: 0, seconds: 60 };
  for (let seed = 1; seed <= 3; seed++) compare(`Crowded day ${seed}`, randomCase({ ...day, seed }));
}
