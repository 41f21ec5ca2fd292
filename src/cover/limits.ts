import type { Case } from './case';
import { conflictSets } from './conflicts';

/**
 * Limits of a person as sets of duties: "at most one duty in this slot", "at most two of this group".
 * Where the sets of every person are nested (any two are disjoint, or one contains the other), they
 * form a tree below the person's maximum and the whole case is a flow.
 */

/** The kinds of set a case limits, each with the duties in it. */
export interface LimitSet {
  /** A slot or group with this name, or duties that one person cannot hold together for another reason. */
  readonly kind: 'label' | 'conflict';
  /** The slot or group as shown, or what the conflict is. */
  readonly name: string;
  /** The most duties of the set anyone may hold: whole, >= 0; Infinity where only some people are limited. */
  readonly everyone: number;
  /** Lower limits of single people, by person number. */
  readonly single: ReadonlyMap<number, number>;
  /** Duty numbers, ascending. */
  readonly duties: readonly number[];
}

/** The most duties of this set the person may hold. */
export function mostOf(set: LimitSet, person: number): number {
  return Math.min(set.everyone, set.single.get(person) ?? Infinity);
}

/**
 * Every set a person can be limited by: each slot, at most one duty; each slot or group that a Limit
 * row names; and duties too close in time or in a Clash. In the order of their keys, slots first.
 */
export function limitSets(kase: Case): readonly LimitSet[] {
  const slots = new Map<string, number[]>();
  const labels = new Map<string, number[]>();
  kase.duties.forEach((duty, d) => {
    for (const key of duty.slots) append(slots, key, d);
    for (const key of new Set([...duty.slots, ...duty.groups])) append(labels, key, d);
  });
  const sets: LimitSet[] = [];
  for (const key of [...slots.keys()].sort()) {
    sets.push({ kind: 'label', name: kase.labelNames.get(key) ?? key, everyone: 1, single: new Map(), duties: slots.get(key)! });
  }
  const limited = new Map<string, { name: string; everyone: number; single: Map<number, number> }>();
  for (const { label, person, most } of kase.limits) {
    const entry = limited.get(label.key) ?? { name: label.name, everyone: Infinity, single: new Map<number, number>() };
    limited.set(label.key, entry);
    if (person === null) entry.everyone = Math.min(entry.everyone, most);
    else entry.single.set(person, Math.min(entry.single.get(person) ?? Infinity, most));
  }
  for (const key of [...limited.keys()].sort()) {
    const duties = labels.get(key);
    if (duties !== undefined) sets.push({ kind: 'label', ...limited.get(key)!, duties });
  }
  return [...sets, ...conflictSets(kase)];
}

function append(map: Map<string, number[]>, key: string, duty: number): void {
  const list = map.get(key);
  if (list === undefined) map.set(key, [duty]);
  else if (list[list.length - 1] !== duty) list.push(duty);
}

/** For each duty, the numbers of the sets it is in, ascending. */
export function setsOfDuty(sets: readonly LimitSet[], dutyCount: number): readonly (readonly number[])[] {
  const of: number[][] = Array.from({ length: dutyCount }, () => []);
  sets.forEach((set, s) => {
    for (const d of set.duties) of[d].push(s);
  });
  return of;
}
