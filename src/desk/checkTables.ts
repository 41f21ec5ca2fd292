import type { Case, Duty } from '../cover/case';
import { mostOf, setsOfDuty, type LimitSet } from '../cover/limits';
import { PairState } from '../cover/openPairs';
import type { Solved } from '../functions/solved';
import type { DraftCell } from '../host/port';

/**
 * The tables of the check: the case in plain values, with a number for every duty and person. All
 * counting is done on these numbers, because spreadsheets take some texts for conditions: COUNTIFS
 * would count `A*` for every name with an A in front, and `>5` for none at all. Names are looked up
 * by the sign =, which knows no such conditions.
 */

/** A table on the sheet: headings with the names of their columns, and rows. */
export interface Table {
  readonly title: string;
  readonly columns: readonly Column[];
  /** In a formula, `[0]` is the cell of the first column in its own row. */
  readonly rows: readonly (readonly DraftCell[])[];
}

interface Column {
  readonly heading: string;
  readonly name: string | null;
}

/** What a seat is by the tables and rules, whoever holds it. */
export type Standing = 'may' | 'fixed' | 'barred' | 'away';

/** A pair of numbers as one: duty or set first, person second; and the same in a formula. */
export const PAIR = 1_000_000;

/** More than anyone can hold. */
const NO_LIMIT = 1_000_000;

/** A row before the first of a table that is searched by size, so that every search ends somewhere. */
const SENTINEL = 0;

/** A column with its heading, and the name that formulas call it by. */
export function column(heading: string, name: string | null): Column {
  return { heading, name };
}

/** The slots or groups of a duty as the plan shows them. */
export function labelsOf(kase: Case, keys: readonly string[]): string {
  return keys.length === 0 ? '-' : keys.map((key) => kase.labelNames.get(key) ?? key).join(', ');
}

/** The slots and limited groups, numbered from 1, and which of them each duty is in. */
export interface Membership {
  readonly sets: readonly LimitSet[];
  /** Numbers of sets, by duty number. */
  readonly ofDuty: readonly (readonly number[])[];
  /** How many of them a duty is in at most. */
  readonly most: number;
}

/** Which slots and limited groups count for which duty. */
export function membershipOf({ case: { duties }, outcome: { open } }: Solved): Membership {
  // Duties too close in time and those that clash are counted by formulas of their own.
  const sets = open.sets.filter(({ kind }) => kind === 'label');
  const ofDuty = setsOfDuty(sets, duties.length).map((numbers) => numbers.map((s) => s + 1));
  return { sets, ofDuty, most: Math.max(0, ...ofDuty.map((numbers) => numbers.length)) };
}

/** True where the times of duties are part of the case. */
export function hasTimes({ duties }: Case): boolean {
  return duties.some(({ times }) => times.length > 0);
}

/** Every table the formulas of the check ask, but the rows of the plan and the bounds. */
export function caseTables(solved: Solved, membership: Membership): Table[] {
  const kase = solved.case;
  const some = (table: Table): Table[] => (table.rows.length === 0 ? [] : [table]);
  return [
    dutyTable(solved, membership),
    peopleTable(solved),
    pairTable(solved),
    priorityTable(solved),
    ...(membership.most === 0 ? [] : limitTables(kase, membership)),
    ...some(clashTable(kase)),
    ...some(togetherTable(kase)),
  ];
}

function dutyTable({ case: kase, outcome: { open } }: Solved, { ofDuty, most }: Membership): Table {
  const sets = Array.from({ length: most }, (_, i) => i);
  const timed = hasTimes(kase);
  const rows = kase.duties.map(({ name, need, slots, groups, load, priority, times }, d): DraftCell[] => [
    d + 1,
    name,
    need,
    labelsOf(kase, slots),
    labelsOf(kase, groups),
    load,
    priority,
    open.fixedOfDuty[d],
    { formula: '=COUNTIFS(RowDuty,[0],RowPerson,">0")' },
    ...(timed ? [times[0]?.start ?? null, times[0]?.end ?? null] : []),
    ...sets.map((i) => ofDuty[d][i] ?? 0),
  ]);
  return {
    title: 'Duties',
    columns: [
      column('Number', 'DutyNumber'),
      column('Duty', 'DutyName'),
      column('Need', 'DutyNeed'),
      column('Slot', 'DutySlot'),
      column('Group', 'DutyGroup'),
      column('Load', 'DutyLoad'),
      column('Priority', 'DutyPriority'),
      column('Fixed seats', 'DutyFixed'),
      column('Held', 'DutyHeld'),
      ...(timed ? [column('Start, in minutes', 'DutyStart'), column('End, in minutes', 'DutyEnd')] : []),
      ...sets.map((i) => column(`Limit ${i + 1}`, `DutySet${i + 1}`)),
    ],
    rows,
  };
}

function peopleTable({ case: kase, outcome: { open } }: Solved): Table {
  return {
    title: 'People',
    columns: [
      column('Number', 'PersonNumber'),
      column('Person', 'PersonName'),
      column('Maximum', 'PersonMaximum'),
      column('Minimum', 'PersonMinimum'),
      column('Load of Fixed seats', 'PersonFixed'),
      column('Holds', 'PersonHeld'),
    ],
    rows: kase.people.map(({ name, maximum, minimum }, p): DraftCell[] => [
      p + 1,
      name,
      maximum,
      minimum,
      open.fixedLoad[p],
      { formula: '=SUMIFS(RowLoad,RowPerson,[0])' },
    ]),
  };
}

/** Who may take what, and who is Fixed, Barred or Away; in the order of the number of the pair. */
function pairTable({ case: kase, outcome: { open } }: Solved): Table {
  const { pairs, duties, people, fixed } = kase;
  const rows = new Map<number, DraftCell[]>();
  const put = (duty: number, person: number, standing: Standing, listed: boolean): void => {
    const number = (duty + 1) * PAIR + person + 1;
    const parts = listed ? [duty + 1, person + 1] : [null, null];
    rows.set(number, [number, standing, duties[duty].name, people[person].name, ...parts]);
  };
  // A Fixed seat need not be listed as a pair.
  for (const { duty, person } of fixed) put(duty, person, 'fixed', false);
  for (let i = 0; i < pairs.count; i++) put(pairs.duty[i], pairs.person[i], standingOf(open.state[i]), true);
  return {
    title: 'Who may take what',
    columns: [
      column('Number', 'PairNumber'),
      column('Standing', 'PairStanding'),
      column('Duty', null),
      column('Person', null),
      column('Duty', 'PairDuty'),
      column('Person', 'PairPerson'),
    ],
    rows: [[SENTINEL, '-', '-', '-', null, null], ...[...rows].sort((a, b) => a[0] - b[0]).map(([, row]) => row)],
  };
}

function standingOf(state: number): Standing {
  switch (state) {
    case PairState.Fixed:
      return 'fixed';
    case PairState.Barred:
      return 'barred';
    case PairState.Away:
      return 'away';
    // What a limit forbids is counted there.
    default:
      return 'may';
  }
}

/** Seats covered by priority, when the plan was handed over and now. */
function priorityTable({ case: { duties }, outcome: { plan } }: Solved): Table {
  const covered = new Map<number, number>();
  duties.forEach(({ priority, need }: Duty, d) => covered.set(priority, (covered.get(priority) ?? 0) + Math.min(need, plan.heldOfDuty[d])));
  const now = '(DutyPriority=[0])*((DutyHeld<DutyNeed)*DutyHeld+(DutyHeld>=DutyNeed)*DutyNeed)';
  return {
    title: 'Seats covered',
    columns: [column('Priority', null), column('Handed over', 'CoverHanded'), column('Now', 'CoverNow')],
    rows: [...covered].sort((a, b) => a[0] - b[0]).map(([priority, count]) => [priority, count, { formula: `=SUMPRODUCT(${now})` }]),
  };
}

/** The most that each slot or limited group allows, and what it allows single people. */
function limitTables({ people }: Case, { sets }: Membership): Table[] {
  const own = sets.flatMap((set, s) =>
    [...set.single.keys()].map((person) => {
      const number = (s + 1) * PAIR + person + 1;
      return { number, most: mostOf(set, person), label: set.name, who: people[person].name };
    }),
  );
  own.sort((a, b) => a.number - b.number);
  return [
    {
      title: 'Limits for everyone',
      columns: [column('Number', null), column('Slot or group', null), column('Most', 'LimitMost')],
      rows: sets.map(({ name, everyone }, s): DraftCell[] => [s + 1, name, Math.min(everyone, NO_LIMIT)]),
    },
    {
      title: 'Limits for single people',
      columns: [column('Number', 'OwnNumber'), column('Most', 'OwnMost'), column('Slot or group', null), column('Person', null)],
      rows: [[SENTINEL, SENTINEL, '-', '-'], ...own.map(({ number, most, label, who }) => [number, most, label, who])],
    },
  ];
}

const PARTNERS = [
  column('Number', null),
  column('and number', null),
  column('Duty', null),
  column('and duty', null),
];

/** 1 for each person who holds, or has Fixed, a duty of the row. */
const holds = (duty: string): string => `(COUNTIFS(RowDuty,${duty},RowPerson,PersonNumber)>0)`;
const isFixed = (duty: string): string => `COUNTIFS(PairNumber,${duty}*${PAIR}+PersonNumber,PairStanding,"fixed")`;

/** Duties of which nobody holds both, unless both are Fixed. */
function clashTable(kase: Case): Table {
  const both = `${holds('[0]')}*${holds('[1]')}*(${isFixed('[0]')}+${isFixed('[1]')}<2)`;
  return { title: 'Clashes', columns: [...PARTNERS, column('People with both', 'ClashFaults')], rows: partnerRows(kase, kase.clashes, both) };
}

/** Duties that the same people hold; where one is Fixed for someone, that person may hold it alone. */
function togetherTable(kase: Case): Table {
  const apart = `(${holds('[0]')}<>${holds('[1]')})*(${isFixed('[0]')}+${isFixed('[1]')}=0)`;
  return {
    title: 'Duties that go together',
    columns: [...PARTNERS, column('People with one alone', 'TogetherFaults')],
    rows: partnerRows(kase, kase.together, apart),
  };
}

function partnerRows({ duties }: Case, list: Case['clashes'], counted: string): DraftCell[][] {
  return list.map(([one, other]) => [one + 1, other + 1, duties[one].name, duties[other].name, { formula: `=SUMPRODUCT(${counted})` }]);
}
