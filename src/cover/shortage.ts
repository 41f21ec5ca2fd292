import type { Case } from './case';
import { PairState, type OpenPairs } from './openPairs';
import type { Plan } from './plan';
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
  /** The knot it is part of; null where a search found none that it is part of. */
  readonly knot: Knot | null;
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
  /** Seats of these duties that are held: no plan that covers the most urgent first holds more. */
  readonly places: number;
  /** True where it is known that no duty of it can be spared; a search may not have had the time to try. */
  readonly isSmallest: boolean;
  /** True where fewer seats would lack if urgent duties did not come first. */
  readonly isByPriority: boolean;
}

/**
 * The short duties in table order.
 *
 * @param found the knots of the case
 */
export function shortages(kase: Case, open: OpenPairs, plan: Plan, found: readonly Knot[]): readonly Shortage[] {
  const short = kase.duties.flatMap(({ need }, duty) => (plan.heldOfDuty[duty] < need ? [duty] : []));
  if (short.length === 0) return [];
  const counts = countPairs(kase, open, new Set(short));
  const knotOf = new Map(found.flatMap((knot) => knot.duties.map((duty) => [duty, knot] as const)));
  return short.map((duty) => {
    const { listed, barred, away, open: openCount, fixed } = counts.get(duty)!;
    const eligible = fixed + listed - barred - away;
    const missing = kase.duties[duty].need - plan.heldOfDuty[duty];
    return { duty, short: missing, eligible, listed, barred, away, open: openCount, knot: knotOf.get(duty) ?? null };
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

function countPairs(kase: Case, open: OpenPairs, duties: ReadonlySet<number>): Map<number, PairCounts> {
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
  readonly isSmallest: boolean;
  readonly isByPriority: boolean;
}

/** The knots of a flow, in the order of their numbers. Every short duty is in one, if only by itself. */
export function knots(kase: Case, { reduction, residual, plan }: Solution): readonly Knot[] {
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
    const knot = drafts.get(number) ?? blank(drafts.size + 1);
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
  return [...drafts.values()];
}

function blank(number: number): KnotDraft {
  return { number, duties: [], people: [], needed: 0, places: 0, isSmallest: true, isByPriority: false };
}
