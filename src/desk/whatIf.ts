import { LAST_PRIORITY, type Case, type Seat } from '../cover/case';
import type { Use } from '../cover/choices';
import { check, type Wrong } from '../cover/check';
import { PairState } from '../cover/openPairs';
import type { Plan } from '../cover/plan';
import { solve } from '../cover/solve';
import { steps, type Move } from '../cover/steps';
import type { Solved } from '../functions/solved';

/** What is to be said of one person and one duty. */
export interface Option extends Seat {
  readonly isHeld: boolean;
  /** `holds it`, `costs no seat`, `barred`, ... */
  readonly words: string;
  /** True where it can be tried. */
  readonly isOpen: boolean;
}

/** What follows where someone is made to hold a duty. */
export interface Consequence {
  /** Seats fewer that are covered then, in all. */
  readonly lost: number;
  /** The most urgent priority that loses a seat; null where none does. */
  readonly urgent: number | null;
  /** The moves from the plan at hand to the best one that keeps this. */
  readonly moves: readonly Move[];
  /** Duties that are short then and were not before. */
  readonly short: readonly number[];
  /** Limits that it would pass, in words. */
  readonly passes: readonly string[];
}

/** Everyone listed for a duty, those first who hold it, then those who cost nothing. */
export function optionsOfDuty(solved: Solved, duty: number): Option[] {
  return optionsWhere(solved, (seat) => seat.duty === duty);
}

/** Every duty someone is listed for, in the same order. */
export function optionsOfPerson(solved: Solved, person: number): Option[] {
  return optionsWhere(solved, (seat) => seat.person === person);
}

function optionsWhere(solved: Solved, test: (seat: Seat) => boolean): Option[] {
  const { pairs, people } = solved.case;
  const { plan, open } = solved.outcome;
  const held = new Set(plan.seats.map(({ duty, person }) => duty * people.length + person));
  const use = solved.isAtHand('choices') ? solved.choices : null;
  const options: Option[] = [];
  for (let i = 0; i < pairs.count; i++) {
    const seat = { duty: pairs.duty[i], person: pairs.person[i] };
    if (!test(seat)) continue;
    const isHeld = held.has(seat.duty * people.length + seat.person);
    options.push({ ...seat, isHeld, words: wordsFor(open.state[i], isHeld, use?.[i] ?? null), isOpen: open.state[i] === PairState.Open });
  }
  const place = ({ isHeld, words }: Option): number => (isHeld ? 0 : words === FREE ? 1 : words === COSTS || words === '' ? 2 : 3);
  return options.sort((a, b) => place(a) - place(b));
}

const FREE = 'costs no seat';
const COSTS = 'costs cover';

function wordsFor(state: number, isHeld: boolean, use: Use | null): string {
  switch (state) {
    case PairState.Fixed:
      return 'fixed by a rule';
    case PairState.Barred:
      return 'barred';
    case PairState.Away:
      return 'away then';
    case PairState.NoRoom:
      return 'no room beside Fixed duties';
    default:
      if (isHeld) return use === 'Always' ? 'holds it in every plan that covers as well' : 'holds it';
      return use === null ? '' : use === 'Never' ? COSTS : FREE;
  }
}

/**
 * What follows where a person is made to hold a duty: the best plan with that seat fixed and else as
 * little changed as can be.
 *
 * @returns null where the case is no flow, so that this would have to be searched
 */
export function consequenceOf(solved: Solved, seat: Seat): Consequence | null {
  const kase = solved.case;
  const { plan } = solved.outcome;
  const trial: Case = {
    ...kase,
    fixed: sortSeats(kase, [...kase.fixed, seat]),
    current: plan.seats.map(({ duty, person }) => ({ duty, person })),
    order: ['changes', ...kase.order.filter((aim) => aim !== 'changes')],
  };
  const solution = solve(trial);
  if ('crossing' in solution) return null;
  const after = solution.plan;
  const lostIn = (d: number): number => short(kase, after, d) - short(kase, plan, d);
  const byPriority = new Map<number, number>();
  kase.duties.forEach(({ priority }, d) => byPriority.set(priority, (byPriority.get(priority) ?? 0) + lostIn(d)));
  const urgent = [...byPriority].filter(([, lost]) => lost > 0).map(([priority]) => priority);
  return {
    lost: plan.covered - after.covered,
    urgent: urgent.length === 0 ? null : Math.min(...urgent),
    moves: steps(trial, solution.reduction.open, after).flat(),
    short: kase.duties.flatMap((_, d) => (lostIn(d) > 0 ? [d] : [])),
    passes: passed(solved, after),
  };
}

/** What is wrong with the new plan and was not with the old one. */
function passed({ case: kase, outcome: { plan, open } }: Solved, after: Plan): string[] {
  const wrongs = ({ seats }: Plan): string[] =>
    check(kase, open, seats).flatMap((wrong) => (wrong.kind === 'Uncovered' || wrong.kind === 'Below minimum' ? [] : [passedWords(kase, wrong)]));
  const before = new Set(wrongs(plan));
  return wrongs(after).filter((words) => !before.has(words));
}

function passedWords({ duties, people }: Case, { kind, duty, person, found, allowed, label }: Wrong): string {
  if (kind === 'Too many') return `${found} people for "${duties[duty!].name}", which needs ${allowed}`;
  const who = people[person!].name;
  return label === '' ? `${who} holds ${found} of at most ${allowed}` : `${who} holds ${found} in "${label}", at most ${allowed}`;
}

/** What follows, in a sentence and the moves one by one. */
export function consequenceWords({ duties, people }: Case, { lost, urgent, moves, short: lacking, passes }: Consequence): string[] {
  const name = (person: number | null): string => (person === null ? 'nobody' : people[person].name);
  const limit = passes.length === 0 ? '' : `Passes a limit: ${passes.join('; ')}. `;
  const cost =
    lost > 0
      ? `Costs ${lost === 1 ? '1 seat' : `${lost} seats`}${urgent === null || urgent === LAST_PRIORITY ? '' : `, of priority ${urgent} first`}: ${lacking.map((d) => duties[d].name).join('; ')}.`
      : urgent === null
        ? 'Costs no seat.'
        : `Costs no seat in all, but an urgent one (priority ${urgent}): ${lacking.map((d) => duties[d].name).join('; ')}.`;
  return [limit + cost, ...moves.map(({ duty, from, to }) => `${duties[duty].name}: from ${name(from)} to ${name(to)}`)];
}

function short({ duties }: Case, { heldOfDuty }: Plan, d: number): number {
  return Math.max(0, duties[d].need - heldOfDuty[d]);
}

function sortSeats({ dutyOrder, personOrder }: Case, seats: readonly Seat[]): Seat[] {
  const [dutyPlace, personPlace] = [dutyOrder, personOrder].map((order) => new Map([...order].map((number, i) => [number, i])));
  const place = (map: Map<number, number>, number: number): number => map.get(number)!;
  return [...seats].sort(
    (a, b) => place(dutyPlace, a.duty) - place(dutyPlace, b.duty) || place(personPlace, a.person) - place(personPlace, b.person),
  );
}
