import type { Case, Seat } from './case';
import { limitSets, mostOf, setsOfDuty, type LimitSet } from './limits';

/** Why a pair of the pairs table cannot hold, or that it can. */
export const PairState = {
  /** May be held. */
  Open: 0,
  /** Held by a Fixed row. */
  Fixed: 1,
  /** A Barred row. */
  Barred: 2,
  /** The person is away in a slot or group of the duty. */
  Away: 3,
  /** Fixed seats, or a limit of 0, leave no room in a slot or group. */
  NoRoom: 4,
} as const;

/** What Fixed, Barred, Away and Limit rows leave to decide. */
export interface OpenPairs {
  /** A `PairState` for every pair of the case. */
  readonly state: Uint8Array;
  /** Every set a person can be limited by. */
  readonly sets: readonly LimitSet[];
  /** For each duty, the numbers of the sets it is in. */
  readonly setsOf: readonly (readonly number[])[];
  /** For each person with Fixed seats, how many of them lie in each set, by set number. */
  readonly fixedInSet: ReadonlyMap<number, ReadonlyMap<number, number>>;
  /** Fixed seats of each duty, by duty number. */
  readonly fixedOfDuty: Int32Array;
  /** Fixed seats of each person, by person number. */
  readonly fixedByPerson: Int32Array;
  /** Load of the Fixed seats of each person, by person number. */
  readonly fixedLoad: Int32Array;
}

/** Sorts every pair of the case by what the rules say of it. */
export function openPairs(kase: Case): OpenPairs {
  const sets = limitSets(kase);
  const setsOf = setsOfDuty(sets, kase.duties.length);
  const fixedOfDuty = new Int32Array(kase.duties.length);
  const fixedByPerson = new Int32Array(kase.people.length);
  const fixedLoad = new Int32Array(kase.people.length);
  const fixedInSet = new Map<number, Map<number, number>>();
  for (const { duty, person } of kase.fixed) {
    fixedOfDuty[duty]++;
    fixedByPerson[person]++;
    fixedLoad[person] += kase.duties[duty].load;
    const inSet = fixedInSet.get(person) ?? new Map<number, number>();
    fixedInSet.set(person, inSet);
    for (const s of setsOf[duty]) inSet.set(s, (inSet.get(s) ?? 0) + 1);
  }
  const partial = { sets, setsOf, fixedInSet, fixedOfDuty, fixedByPerson, fixedLoad };
  return { ...partial, state: pairStates(kase, partial) };
}

/** The most duties of set s the person may hold beside the Fixed ones: whole, >= 0. */
export function roomInSet(open: Omit<OpenPairs, 'state'>, s: number, person: number): number {
  return Math.max(0, mostOf(open.sets[s], person) - (open.fixedInSet.get(person)?.get(s) ?? 0));
}

function pairStates(kase: Case, open: Omit<OpenPairs, 'state'>): Uint8Array {
  const { pairs, people, duties } = kase;
  const seatNumber = ({ duty, person }: Seat): number => duty * people.length + person;
  const fixed = new Set(kase.fixed.map(seatNumber));
  const barred = new Set(kase.barred.map(seatNumber));
  const away = new Map<number, Set<string>>();
  for (const { person, label } of kase.away) {
    const keys = away.get(person) ?? new Set<string>();
    away.set(person, keys.add(label.key));
  }
  const state = new Uint8Array(pairs.count);
  for (let i = 0; i < pairs.count; i++) {
    const duty = pairs.duty[i];
    const person = pairs.person[i];
    const number = duty * people.length + person;
    const keys = away.get(person);
    if (fixed.has(number)) state[i] = PairState.Fixed;
    else if (barred.has(number)) state[i] = PairState.Barred;
    else if (keys !== undefined && inAny(duties[duty], keys)) state[i] = PairState.Away;
    else if (open.setsOf[duty].some((s) => roomInSet(open, s, person) === 0)) state[i] = PairState.NoRoom;
  }
  return state;
}

function inAny(duty: { slots: readonly string[]; groups: readonly string[] }, keys: ReadonlySet<string>): boolean {
  return duty.slots.some((key) => keys.has(key)) || duty.groups.some((key) => keys.has(key));
}
