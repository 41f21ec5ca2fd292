import { leastCostFaults } from '../flow/certificate';
import { NetworkSimplex } from '../flow/networkSimplex';
import type { Case, Pairs } from './case';
import { coverBest } from './coverBest';
import { keyHash, lot } from './lots';
import { reduce, type NotFlow, type Reduction } from './reduce';
import { makeTally, type Tally } from './tally';

/** A change that helps. `duty` null: one more place for the person; otherwise the person is made eligible for it. */
export interface Remedy {
  readonly person: number;
  readonly duty: number | null;
  readonly price: number;
}

/** Pairs looked at, at most: those listed and those that could be. */
const MOST_PAIRS = 1_000_000;

/** The cheapest changes, and how many seats are covered with them. */
export interface Remedies {
  readonly changes: readonly Remedy[];
  readonly covered: number;
  /** Faults in the proof that no set of changes is cheaper; empty: proven. */
  readonly faults: readonly string[];
}

/**
 * A cheapest set of changes after which as many seats are covered as with all changes allowed; of
 * several, one with the fewest changes, then one that covers the most urgent seats, and then by lots
 * drawn from the names.
 *
 * Every change is an arc with a price: a place beyond the maximum, a pair that is not listed. A
 * maximum flow with all of them is made cheapest, so that each change it uses is needed.
 *
 * @returns null where there are too many pairs to look at
 */
export function remedies(kase: Case): Remedies | NotFlow | null {
  const { place, eligibility } = kase.prices;
  const listed = kase.people.filter((person) => person.listed).length;
  if (eligibility !== null && kase.duties.length * listed > MOST_PAIRS) return null;
  const wide = widen(kase);
  const reduction = reduce(wide.kase);
  if ('crossing' in reduction) return reduction;
  const residual = coverBest(reduction);
  const tally = makeTally(wide.kase, reduction, residual);
  const simplex = new NetworkSimplex(reduction.network.nodeCount, tally.arcs, tally.flow, reduction.personArc);
  const faults: string[] = [];
  const priced = priceArcs(kase, wide, reduction, tally, place ?? 0, eligibility ?? 0);
  for (const cost of priced.costs) {
    simplex.minimise(cost);
    faults.push(...leastCostFaults(tally.arcs, tally.flow, cost, simplex.potential, (a) => simplex.isOpen(a)));
    simplex.narrow();
  }
  const changes = priced.arcs.flatMap(({ arc, remedy, times }) =>
    tally.flow[arc] > 0 ? Array.from({ length: times }, () => remedy) : [],
  );
  const seats = reduction.classes.reduce((sum, { arc }) => sum + tally.flow[arc], 0);
  const fixedSeats = kase.duties.reduce((sum, { need }, d) => sum + Math.min(need, reduction.open.fixedOfDuty[d]), 0);
  return { changes: sortChanges(kase, changes), covered: seats + fixedSeats, faults };
}

/** The case with every change made that is allowed. */
interface Wide {
  readonly kase: Case;
  /** 1 for each of its pairs that is not listed. */
  readonly isNew: Uint8Array;
}

/** The case with every change made that is allowed. */
export function widen(kase: Case): Wide {
  const { place, eligibility } = kase.prices;
  const people = kase.people.map((person) => {
    const stretch = place === null || !person.listed ? 0 : person.stretch;
    return { ...person, maximum: person.maximum + stretch, stretch: 0 };
  });
  if (eligibility === null) return { kase: { ...kase, people }, isNew: new Uint8Array(kase.pairs.count) };
  const { pairs, isNew } = allPairs(kase);
  return { kase: { ...kase, people, pairs }, isNew };
}

/** The listed pairs, and those of every listed person with every duty; in name order. */
function allPairs({ duties, people, dutyOrder, personOrder, pairs }: Case): { pairs: Pairs; isNew: Uint8Array } {
  const listed = new Set<number>();
  for (let i = 0; i < pairs.count; i++) listed.add(pairs.duty[i] * people.length + pairs.person[i]);
  const rows: { duty: number; person: number; isNew: boolean }[] = [];
  for (const duty of dutyOrder) {
    for (const person of personOrder) {
      const isNew = !listed.has(duty * people.length + person);
      if (!isNew || (people[person].listed && duties[duty].need > 0)) rows.push({ duty, person, isNew });
    }
  }
  return {
    pairs: {
      count: rows.length,
      duty: Int32Array.from(rows, ({ duty }) => duty),
      person: Int32Array.from(rows, ({ person }) => person),
      rank: new Int32Array(rows.length),
    },
    isNew: Uint8Array.from(rows, ({ isNew }) => Number(isNew)),
  };
}

interface Priced {
  /** Price, number of changes, the classes from the most urgent on, lots: each an aim. */
  readonly costs: readonly Float64Array[];
  /** What each of these arcs stands for, and how often. */
  readonly arcs: readonly { readonly arc: number; readonly remedy: Remedy; readonly times: number }[];
}

function priceArcs(kase: Case, wide: Wide, reduction: Reduction, tally: Tally, place: number, eligibility: number): Priced {
  const [prices, counts, lots] = [0, 1, 2].map(() => new Float64Array(tally.arcCount));
  const classes = reduction.classes.map(({ arc }) => {
    const cost = new Float64Array(tally.arcCount);
    cost[arc] = -1;
    return cost;
  });
  const arcs: { arc: number; remedy: Remedy; times: number }[] = [];
  const personHash = kase.people.map(({ key }) => keyHash(key));
  const dutyHash = kase.duties.map(({ key }) => keyHash(key));
  const add = (arc: number, remedy: Remedy, draw: number, times: number): void => {
    prices[arc] = remedy.price * times;
    counts[arc] = times;
    lots[arc] = draw;
    arcs.push({ arc, remedy, times });
  };
  reduction.openPair.forEach((i, k) => {
    if (wide.isNew[i] === 0) return;
    const [duty, person] = [wide.kase.pairs.duty[i], wide.kase.pairs.person[i]];
    add(reduction.firstPairArc + k, { person, duty, price: eligibility }, lot(dutyHash[duty], personHash[person]), 1);
  });
  kase.people.forEach(({ maximum }, person) => {
    const left = maximum - reduction.open.fixedByPerson[person];
    const first = tally.first[person] + Math.max(0, left);
    for (let a = first; a < tally.first[person + 1]; a++) {
      // Where Fixed seats pass the maximum, the first place that helps takes several more.
      const times = a === first ? 1 + Math.max(0, -left) : 1;
      add(a, { person, duty: null, price: place }, lot(0, personHash[person]), times);
    }
  });
  return { costs: [prices, counts, ...classes, lots], arcs };
}

/** By person in name order, places first, then duties in name order. */
export function sortChanges({ personOrder, dutyOrder }: Case, changes: readonly Remedy[]): Remedy[] {
  const personPlace = new Map([...personOrder].map((p, i) => [p, i]));
  const dutyPlace = new Map<number | null, number>([[null, -1], ...[...dutyOrder].map((d, i) => [d, i] as const)]);
  return [...changes].sort(
    (a, b) => personPlace.get(a.person)! - personPlace.get(b.person)! || dutyPlace.get(a.duty)! - dutyPlace.get(b.duty)!,
  );
}
