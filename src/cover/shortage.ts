import type { Case } from './case';
import { PairState } from './openPairs';
import type { Plan } from './plan';
import type { Reduction } from './reduce';
import type { Solution } from './solve';
import { components } from '../flow/components';
import { reachable } from '../flow/residual';

/** A duty that is short, and what is known of it. */
export interface Shortage {
  readonly duty: number;
  /** Need less seats held: whole, >= 1. */
  readonly short: number;
  /** People who may take it: listed for it (or Fixed to it), neither Barred nor Away. */
  readonly eligible: number;
  /** People listed for it, however the rules stand. */
  readonly listed: number;
  readonly barred: number;
  readonly away: number;
  /** People who may take it beside their Fixed duties, if only they had a place left. */
  readonly open: number;
  /** The knot it is part of. */
  readonly knot: Knot;
}

/**
 * Duties whose people are all taken by these same duties: the duties and people that residual arcs
 * connect with a short duty. These people hold as many of these seats as they ever can.
 */
export interface Knot {
  /** Numbered from 1 by their first duty in table order. */
  readonly number: number;
  /** In table order. */
  readonly duties: readonly number[];
  readonly people: readonly number[];
  readonly needed: number;
  /** Seats of these duties that are held: no plan holds more. */
  readonly places: number;
}

/** The short duties in table order. */
export function shortages(kase: Case, { reduction, residual, plan }: Solution): readonly Shortage[] {
  const short = kase.duties.flatMap(({ need }, duty) => (plan.heldOfDuty[duty] < need ? [duty] : []));
  if (short.length === 0) return [];
  const counts = countPairs(kase, reduction, new Set(short));
  const knotOf = findKnots(kase, reduction, residual, plan);
  return short.map((duty) => {
    const { listed, barred, away, open, fixed } = counts.get(duty)!;
    const eligible = fixed + listed - barred - away;
    // A short duty is reached from the source, so it is in a knot, if only by itself.
    const knot = knotOf.get(duty)!;
    return { duty, short: kase.duties[duty].need - plan.heldOfDuty[duty], eligible, listed, barred, away, open, knot };
  });
}

interface PairCounts {
  listed: number;
  barred: number;
  away: number;
  open: number;
  /** Fixed seats whose pair is not listed. */
  fixed: number;
}

function countPairs(kase: Case, { open }: Reduction, duties: ReadonlySet<number>): Map<number, PairCounts> {
  const counts = new Map<number, PairCounts>();
  for (const duty of duties) {
    counts.set(duty, { listed: 0, barred: 0, away: 0, open: 0, fixed: open.fixedOfDuty[duty] });
  }
  for (let i = 0; i < kase.pairs.count; i++) {
    const count = counts.get(kase.pairs.duty[i]);
    if (count === undefined) continue;
    count.listed++;
    if (open.state[i] === PairState.Barred) count.barred++;
    if (open.state[i] === PairState.Away) count.away++;
    if (open.state[i] === PairState.Open) count.open++;
    if (open.state[i] === PairState.Fixed) count.fixed--;
  }
  return counts;
}

interface KnotDraft {
  readonly number: number;
  readonly duties: number[];
  readonly people: number[];
  needed: number;
  places: number;
}

/** The knot of each duty that is in one, by duty number. */
function findKnots(
  kase: Case,
  reduction: Reduction,
  residual: Int32Array,
  plan: Plan,
): ReadonlyMap<number, Knot> {
  const { network, source, classes, dutyNode, openPair } = reduction;
  const member = reachable(network, residual, [source]);
  member[source] = 0;
  for (const { node } of classes) member[node] = 0;
  const part = components(network, member);

  const drafts = new Map<number, KnotDraft>();
  const knotOf = new Map<number, KnotDraft>();
  kase.duties.forEach(({ need }, duty) => {
    const number = part[dutyNode[duty]];
    if (number === -1) return;
    const knot = drafts.get(number) ?? { number: drafts.size + 1, duties: [], people: [], needed: 0, places: 0 };
    drafts.set(number, knot);
    knotOf.set(duty, knot);
    knot.duties.push(duty);
    knot.needed += need;
    knot.places += Math.min(need, plan.heldOfDuty[duty]);
  });
  const people = new Map<KnotDraft, Set<number>>();
  for (const knot of drafts.values()) people.set(knot, new Set());
  for (const i of openPair) {
    const knot = knotOf.get(kase.pairs.duty[i]);
    if (knot !== undefined) people.get(knot)!.add(kase.pairs.person[i]);
  }
  for (const { duty, person } of kase.fixed) {
    const knot = knotOf.get(duty);
    if (knot !== undefined) people.get(knot)!.add(person);
  }
  for (const [knot, numbers] of people) knot.people.push(...[...numbers].sort((a, b) => a - b));
  return knotOf;
}
