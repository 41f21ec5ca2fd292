import { absenceOf, absences, type Absence } from '../cover/absences';
import type { Case } from '../cover/case';
import { choices, type Use } from '../cover/choices';
import { fingerprint } from '../cover/fingerprint';
import { gains } from '../cover/gains';
import { openPairs, type OpenPairs } from '../cover/openPairs';
import { planOf, type Plan } from '../cover/plan';
import { remedies, type Remedies } from '../cover/remedies';
import type { NotFlow } from '../cover/reduce';
import { knots, shortages, type Shortage } from '../cover/shortage';
import { solve, type Solution } from '../cover/solve';
import { Trials } from '../cover/trials';
import type { Answers, Found, Task } from '../exact/answers';
import { readCase } from '../sheet/readCase';
import type { Range } from '../sheet/range';
import type { Reading } from '../sheet/reading';
import { Asking } from './asking';
import { notFlowMessage, Refusal } from './refusal';

/** The plan of a case, however it was come by. */
export interface Outcome {
  readonly plan: Plan;
  readonly open: OpenPairs;
  readonly method: 'flow' | 'exact search';
  /** What a search knows of its plan; null for a flow. */
  readonly found: Found | null;
  /** Faults in the proof of a flow; empty: proven best. */
  readonly faults: readonly string[];
}

/**
 * One case with all that is known of it; equal inputs share one. Everything beyond the reading is
 * worked out when first asked for and then kept. Where a case is no flow, it is searched away from
 * this thread, and whoever asks meanwhile gets a Busy thrown.
 */
export class Solved {
  readonly reading: Reading;
  readonly #asking: Asking;
  #flow: Solution | NotFlow | null = null;
  #outcome: Outcome | null = null;
  #shortages: readonly Shortage[] | null = null;
  #absences: readonly Absence[] | null = null;
  #trials: Trials | null = null;
  #remedies: Remedies | NotFlow | 'too many' | null = null;
  #fingerprint: string | null = null;

  constructor(ranges: readonly (Range | null)[]) {
    this.reading = readCase(ranges);
    this.#asking = new Asking(this);
  }

  /**
   * The case.
   * @throws InputFault the first one, where the inputs cannot be read
   */
  get case(): Case {
    if (this.reading.case === null) throw this.reading.faults[0];
    return this.reading.case;
  }

  /**
   * The best plan and its flow, for what only a flow can tell.
   * @throws InputFault like `case`; Refusal where the case is no flow
   */
  get solution(): Solution {
    const flow = this.#solve();
    if ('crossing' in flow) throw new Refusal(`This is answered only where the limits of every person lie inside one another. ${notFlowMessage(this.case, flow)}`);
    return flow;
  }

  /** True where the case is answered by a flow, at once; false where it is searched. */
  get isFlow(): boolean {
    return !('crossing' in this.#solve());
  }

  /**
   * The best plan.
   * @throws InputFault like `case`; Busy while it is searched for; Refusal where that failed
   */
  get outcome(): Outcome {
    this.#outcome ??= this.#makeOutcome();
    return this.#outcome;
  }

  /**
   * The duties that are short in the best plan, in table order.
   * @throws like `outcome`
   */
  get shortages(): readonly Shortage[] {
    this.#shortages ??= this.#findShortages();
    return this.#shortages;
  }

  /**
   * Seats more that could be covered if one person alone took one more, by person; null: not worked out in time.
   * @throws like `outcome`
   */
  get gains(): readonly (number | null)[] {
    const flow = this.#solve();
    return 'crossing' in flow ? this.#ask('gains') : Array.from(gains(flow.reduction, flow.residual));
  }

  /**
   * How the plans that cover as well use each pair; null: not worked out in time.
   * @throws like `outcome`
   */
  get choices(): readonly (Use | null)[] {
    const flow = this.#solve();
    return 'crossing' in flow ? this.#ask('choices') : choices(flow);
  }

  /**
   * What follows where a person is made to hold an open pair.
   * @throws like `solution`
   */
  get trials(): Trials {
    this.#trials ??= new Trials(this.case, this.solution);
    return this.#trials;
  }

  /**
   * What the absence of each person would cost, by person; null: not worked out in time.
   * @throws like `outcome`
   */
  get absences(): readonly (Absence | null)[] {
    const flow = this.#solve();
    if ('crossing' in flow) return this.#ask('absences');
    this.#absences ??= absences(this.case, flow);
    return this.#absences;
  }

  /**
   * The same for one person; null: it would have to be searched.
   * @throws like `outcome`
   */
  absence(person: number): Absence | null {
    if (this.isFlow) return this.#absences?.[person] ?? absenceOf(this.case, this.solution, person);
    return this.isAtHand('absences') ? this.absences[person] : null;
  }

  /**
   * The cheapest remedies; null: not worked out in time.
   * @throws like `outcome`; Refusal also where there is too much to look at
   */
  get remedies(): Remedies | null {
    const { plan } = this.outcome;
    if (plan.covered === plan.needed) return { changes: [], covered: plan.covered, faults: [] };
    this.#remedies ??= remedies(this.case) ?? 'too many';
    if (this.#remedies === 'too many') {
      throw new Refusal('There are more than a million possible pairs of duties and people to look at. Ask about a part of the duties.');
    }
    if ('crossing' in this.#remedies || !this.isFlow) return this.#ask('remedies');
    if (this.#remedies.faults.length > 0) throw new Refusal(`The remedies could not be proven cheapest: ${this.#remedies.faults[0]}`);
    return this.#remedies;
  }

  /**
   * A short text that is equal for equal cases, whatever the order of their rows.
   * @throws InputFault like `case`
   */
  get fingerprint(): string {
    this.#fingerprint ??= fingerprint(this.case);
    return this.#fingerprint;
  }

  /** True where asking costs no search: a flow tells it, or the search is over. */
  isAtHand(task: Task): boolean {
    return this.isFlow || this.#asking.has(task);
  }

  /** True where anything of it was searched for, so that forgetting it is dear. */
  get wasSearched(): boolean {
    return this.#asking.wasAsked;
  }

  /** What is being searched for, for whoever shows it; null: nothing. */
  get searching(): Asking['underWay'] {
    return this.#asking.underWay;
  }

  /** Ends the search for the plan and takes the best one found so far. */
  stop(): void {
    this.#asking.stop();
  }

  /** Ends all searches: no cell asks any more. */
  drop(): void {
    this.#asking.drop();
  }

  #solve(): Solution | NotFlow {
    this.#flow ??= solve(this.case);
    return this.#flow;
  }

  #makeOutcome(): Outcome {
    const flow = this.#solve();
    if (!('crossing' in flow)) return { plan: flow.plan, open: flow.reduction.open, method: 'flow', found: null, faults: flow.faults };
    const found = this.#asking.ask('plan', null);
    return { plan: planOf(this.case, found.held), open: openPairs(this.case), method: 'exact search', found, faults: [] };
  }

  #findShortages(): readonly Shortage[] {
    const { plan, open } = this.outcome;
    if (plan.covered === plan.needed) return [];
    const flow = this.#solve();
    return shortages(this.case, open, plan, 'crossing' in flow ? this.#ask('bottlenecks') : knots(this.case, flow));
  }

  /** Asks for more than the plan, once that is found. */
  #ask<T extends Exclude<Task, 'plan'>>(task: T): Answers[T] {
    const { found } = this.outcome;
    return this.#asking.ask(task, found);
  }
}
