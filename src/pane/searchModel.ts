import { planOf } from '../cover/plan';
import type { Task, Verdict } from '../exact/answers';
import type { Solved } from '../functions/solved';

/** A search under way. */
export interface SearchView {
  /** What it is about, in words to go on with. */
  readonly what: string;
  /** Seats of the best plan so far; null where there is none yet, or something else is sought. */
  readonly covered: number | null;
  readonly needed: number;
  /** Seconds it has taken, and may take, whole. */
  readonly seconds: number;
  readonly allowed: number;
  /** Ends it with the best plan so far; null where it cannot be. */
  readonly stop: (() => void) | null;
}

const SOUGHT: Readonly<Record<Task, string>> = {
  plan: 'the best plan',
  bottlenecks: 'why seats stay uncovered',
  gains: 'what one place more would gain',
  choices: 'what is still open to choose',
  absences: 'what each absence would cost',
  remedies: 'the cheapest remedy',
};

const AIMS: Readonly<Record<Verdict['aim'], string>> = {
  cover: 'covering most seats',
  minimums: 'missing fewest minimums',
  changes: 'changing least',
  ranks: 'the best ranks',
  evenness: 'the most even spread',
  names: 'the choice between equally good plans',
};

/** What a case is searched for; null: nothing. */
export function searchView(solved: Solved): SearchView | null {
  const { searching } = solved;
  if (searching === null) return null;
  const { task, since, progress } = searching;
  const kase = solved.case;
  const isPlan = task === 'plan';
  return {
    what: isPlan && progress !== null ? `${SOUGHT.plan}: ${AIMS[progress.aim]}` : SOUGHT[task],
    covered: isPlan && progress !== null ? planOf(kase, progress.found.held).covered : null,
    needed: kase.duties.reduce((sum, { need }) => sum + need, 0),
    seconds: Math.floor((performance.now() - since) / 1000),
    allowed: kase.seconds,
    stop: isPlan ? () => solved.stop() : null,
  };
}

