import type { Seat } from '../cover/case';
import type { Use } from '../cover/choices';
import { PairState } from '../cover/openPairs';
import { steps, type Move } from '../cover/steps';
import type { Trial } from '../cover/trials';
import type { Solved } from '../functions/solved';
import { FREE, trialCost, trialWords } from './trialWords';

/** What is to be said of one person and one duty. */
export interface Option extends Seat {
  readonly isHeld: boolean;
  /** `holds it`, `costs no seat`, `costs 1 seat: Night watch`, `barred`, ...; '' where nothing is known. */
  readonly words: string;
  /** True where it can be tried. */
  readonly isOpen: boolean;
  /** What would follow; null where it is held, cannot be held, or would have to be searched. */
  readonly trial: Trial | null;
}

/** What follows where someone is made to hold a duty. */
export interface Consequence {
  /** The moves from the plan at hand to the best one that keeps this. */
  readonly moves: readonly Move[];
  /** Who would come below the minimum, or further below, in words. */
  readonly below: readonly string[];
}

/** Everyone listed for a duty: those first who hold it, then by what it would cost. */
export function optionsOfDuty(solved: Solved, duty: number): Option[] {
  return optionsWhere(solved, (seat) => seat.duty === duty, solved.isFlow ? solved.trials.ofDuty(duty) : []);
}

/** Every duty someone is listed for, in the same order. */
export function optionsOfPerson(solved: Solved, person: number): Option[] {
  return optionsWhere(solved, (seat) => seat.person === person, solved.isFlow ? solved.trials.ofPerson(person) : []);
}

function optionsWhere(solved: Solved, test: (seat: Seat) => boolean, trials: readonly Trial[]): Option[] {
  const { pairs, people } = solved.case;
  const { plan, open } = solved.outcome;
  const number = ({ duty, person }: Seat): number => duty * people.length + person;
  const held = new Set(plan.seats.map(number));
  const use = solved.isAtHand('choices') ? solved.choices : null;
  const trialOf = new Map(trials.map((trial) => [trial.pair, trial]));
  const options: Option[] = [];
  for (let i = 0; i < pairs.count; i++) {
    const seat = { duty: pairs.duty[i], person: pairs.person[i] };
    if (!test(seat)) continue;
    const isHeld = held.delete(number(seat));
    const trial = trialOf.get(i) ?? null;
    // A flow without a trial would be none with this seat: what it costs is not known.
    const known = solved.isFlow && !isHeld ? null : (use?.[i] ?? null);
    const words = trial === null ? plainWords(open.state[i], isHeld, known) : trialWords(solved, trial);
    options.push({ ...seat, isHeld, words, isOpen: open.state[i] === PairState.Open, trial });
  }
  // What is held without being listed, a Fixed row holds.
  for (const { duty, person } of plan.seats.filter((seat) => test(seat) && held.has(number(seat)))) {
    options.push({ duty, person, isHeld: true, words: plainWords(PairState.Fixed, true, null), isOpen: false, trial: null });
  }
  return options.sort((a, b) => costOf(a) - costOf(b));
}

/** Where an option stands in the list: what is held first, then what costs least. */
function costOf({ isHeld, isOpen, words, trial }: Option): number {
  if (isHeld) return -1;
  if (!isOpen) return Number.MAX_VALUE;
  if (trial === null) return words === FREE ? 0 : 1;
  return trialCost(trial);
}

/** What is said without a trial. */
function plainWords(state: number, isHeld: boolean, use: Use | null): string {
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
      return use === null ? '' : use === 'Never' ? 'costs cover' : FREE;
  }
}

/** What follows from a trial, move by move. */
export function consequenceOf(solved: Solved, trial: Trial): Consequence {
  const kase = solved.case;
  const { plan, open } = solved.outcome;
  const after = solved.trials.planWith(trial);
  const below = kase.people.flatMap(({ name, minimum }, p) => {
    const load = after.loadByPerson[p];
    return load < minimum && load < plan.loadByPerson[p] ? [`${name} (${load} of ${minimum})`] : [];
  });
  const current = plan.seats.map(({ duty, person }) => ({ duty, person }));
  return { moves: steps({ ...kase, current }, open, after).flat(), below };
}
