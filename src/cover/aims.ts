import type { Aim, Case } from './case';
import { keyHash, lot } from './lots';
import type { Reduction } from './reduce';
import type { Tally } from './tally';

/** One aim as costs on arcs: the less the flow costs, the better the plan is in this aim. */
export interface AimCost {
  readonly aim: 'minimums' | Aim | 'names';
  readonly cost: Float64Array;
}

/** The aims after covering that this case has, in their order. An aim on which nothing depends is left out. */
export function aimCosts(kase: Case, reduction: Reduction, tally: Tally): AimCost[] {
  const makers: Record<AimCost['aim'], () => Float64Array | null> = {
    minimums: () => minimumCost(kase, reduction, tally),
    changes: () => changeCost(kase, reduction, tally),
    ranks: () => rankCost(kase, reduction, tally),
    evenness: () => evennessCost(kase, reduction, tally),
    names: () => nameCost(kase, reduction, tally),
  };
  return (['minimums', ...kase.order, 'names'] as const).flatMap((aim) => {
    const cost = makers[aim]();
    return cost === null ? [] : [{ aim, cost }];
  });
}

/** Every seat up to a person's minimum saves one. */
function minimumCost({ people }: Case, { open }: Reduction, { arcCount, first }: Tally): Float64Array | null {
  if (people.every(({ minimum }) => minimum === 0)) return null;
  const cost = new Float64Array(arcCount);
  people.forEach(({ minimum }, p) => {
    const wanted = Math.max(0, minimum - open.fixedByPerson[p]);
    for (let a = first[p]; a < Math.min(first[p + 1], first[p] + wanted); a++) cost[a] = -1;
  });
  return cost;
}

/** Every seat of the plan in force that is kept saves one. */
function changeCost({ current, people, pairs }: Case, reduction: Reduction, { arcCount }: Tally): Float64Array | null {
  if (current === null) return null;
  const cost = new Float64Array(arcCount);
  const held = new Set(current.map(({ duty, person }) => duty * people.length + person));
  reduction.openPair.forEach((i, k) => {
    if (held.has(pairs.duty[i] * people.length + pairs.person[i])) cost[reduction.firstPairArc + k] = -1;
  });
  return cost;
}

/** Every seat costs its rank. */
function rankCost({ ranked, pairs }: Case, { openPair, firstPairArc }: Reduction, { arcCount }: Tally): Float64Array | null {
  if (!ranked) return null;
  const cost = new Float64Array(arcCount);
  openPair.forEach((i, k) => (cost[firstPairArc + k] = pairs.rank[i]));
  return cost;
}

/**
 * The sum of squares of (seats held + carried), seat by seat: the n-th seat adds n^2 - (n - 1)^2 =
 * 2n - 1. These costs rise with every seat, so the cheapest way always fills the first places first.
 */
function evennessCost({ people }: Case, { open }: Reduction, { arcCount, first }: Tally): Float64Array {
  const cost = new Float64Array(arcCount);
  people.forEach(({ carried }, p) => {
    const before = carried + open.fixedByPerson[p];
    for (let a = first[p]; a < first[p + 1]; a++) cost[a] = 2 * (before + a - first[p] + 1) - 1;
  });
  return cost;
}

function nameCost({ duties, people, pairs }: Case, { openPair, firstPairArc }: Reduction, { arcCount }: Tally): Float64Array {
  const cost = new Float64Array(arcCount);
  const dutyHash = duties.map(({ key }) => keyHash(key));
  const personHash = people.map(({ key }) => keyHash(key));
  openPair.forEach((i, k) => {
    cost[firstPairArc + k] = lot(dutyHash[pairs.duty[i]], personHash[pairs.person[i]]);
  });
  return cost;
}
