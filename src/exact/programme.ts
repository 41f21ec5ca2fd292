import type { Case } from '../cover/case';
import { mostOf } from '../cover/limits';
import { PairState, roomInSet, type OpenPairs } from '../cover/openPairs';
import { cliqueRows } from './cliques';

/** A linear row over columns: the sum of weight times column is at most `most`. */
export interface Row {
  readonly columns: readonly number[];
  /** One a column; null: all 1. */
  readonly weights: readonly number[] | null;
  readonly most: number;
}

/**
 * What is left to decide as an integer programme: one column of 0 or 1 for every open pair, in the
 * order of the case's pairs, which is name order; so equal cases give equal programmes.
 */
export interface Programme {
  /** The pair of the case behind each column. */
  readonly pair: Int32Array;
  readonly duty: Int32Array;
  readonly person: Int32Array;
  /** Loads a seat of the column's duty puts on its person. */
  readonly load: Int32Array;
  /** What people must keep. */
  readonly rows: readonly Row[];
  /** Seats each duty still needs beside its Fixed ones, by duty number. */
  readonly need: Int32Array;
  /** Load each person may still take beside their Fixed seats, by person number. */
  readonly room: Int32Array;
  /** Columns that hold together or not at all. */
  readonly ties: readonly (readonly [number, number])[];
}

/** How rows for conflicts are written; `pairs` exists to measure what the other is worth. */
export type Formulation = 'cliques' | 'pairs';

/** @param open what the rules leave open in this case */
export function programmeOf(kase: Case, open: OpenPairs, formulation: Formulation = 'cliques'): Programme {
  const { pairs, duties, people } = kase;
  const closed = closedByTogether(kase, open);
  const kept: number[] = [];
  for (let i = 0; i < pairs.count; i++) {
    if (open.state[i] === PairState.Open && duties[pairs.duty[i]].need > 0 && !closed.has(i)) kept.push(i);
  }
  const pair = Int32Array.from(kept);
  const duty = pair.map((i) => pairs.duty[i]);
  const person = pair.map((i) => pairs.person[i]);
  const own: number[][] = people.map(() => []);
  person.forEach((p, column) => own[p].push(column));
  return {
    pair,
    duty,
    person,
    load: duty.map((d) => duties[d].load),
    rows: own.flatMap((columns, p) => limitRows(open, p, columns, duty, formulation)),
    need: Int32Array.from(duties, ({ need }, d) => Math.max(0, need - open.fixedOfDuty[d])),
    room: Int32Array.from(people, ({ maximum }, p) => Math.max(0, maximum - open.fixedLoad[p])),
    ties: tiesOf(kase, duty, person),
  };
}

/** The rows of one person: counted limits, and conflicts as sets of which at most one duty is held. */
function limitRows(open: OpenPairs, person: number, columns: readonly number[], duty: Int32Array, formulation: Formulation): Row[] {
  const members = new Map<number, number[]>();
  for (const column of columns) {
    for (const s of open.setsOf[duty[column]]) {
      if (mostOf(open.sets[s], person) === Infinity) continue;
      members.set(s, [...(members.get(s) ?? []), column]);
    }
  }
  const counted: Row[] = [];
  const single: number[][] = [];
  for (const [s, list] of [...members].sort((a, b) => a[0] - b[0])) {
    const most = roomInSet(open, s, person);
    if (most >= list.length) continue;
    if (most === 1) single.push(list);
    else counted.push({ columns: list, weights: null, most });
  }
  return [...counted, ...cliqueRows(single, formulation).map((list): Row => ({ columns: list, weights: null, most: 1 }))];
}

/**
 * Pairs that a Together rule closes: the person may take one of the two duties but not the other.
 * A Fixed seat stands whatever else is said; where the person holds one of the two by a Fixed row,
 * they may take the other.
 */
function closedByTogether({ together, pairs, people, fixed: kaseFixed }: Case, open: OpenPairs): Set<number> {
  const closed = new Set<number>();
  if (together.length === 0) return closed;
  const numberOf = new Map<number, number>();
  for (let i = 0; i < pairs.count; i++) numberOf.set(pairs.duty[i] * people.length + pairs.person[i], i);
  const isIn = (i: number | undefined, state: number): boolean => i !== undefined && open.state[i] === state;
  const fixed = new Set(kaseFixed.map(({ duty, person }) => duty * people.length + person));
  // Closing a pair may leave another one without its partner.
  for (let before = -1; before !== closed.size; ) {
    before = closed.size;
    for (const [one, other] of together) {
      for (let p = 0; p < people.length; p++) {
        for (const [a, b] of [[one, other], [other, one]]) {
          const [i, j] = [a, b].map((d) => numberOf.get(d * people.length + p));
          if (!isIn(i, PairState.Open) || fixed.has(b * people.length + p)) continue;
          if (!isIn(j, PairState.Open) || closed.has(j!)) closed.add(i!);
        }
      }
    }
  }
  return closed;
}

function tiesOf({ together, people }: Case, duty: Int32Array, person: Int32Array): [number, number][] {
  if (together.length === 0) return [];
  const columnOf = new Map<number, number>();
  duty.forEach((d, column) => columnOf.set(d * people.length + person[column], column));
  return together.flatMap(([one, other]) =>
    people.flatMap((_, p): [number, number][] => {
      const [a, b] = [columnOf.get(one * people.length + p), columnOf.get(other * people.length + p)];
      return a === undefined || b === undefined ? [] : [[a, b]];
    }),
  );
}
