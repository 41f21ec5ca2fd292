import type { Answers, Found, Progress, Task } from '../exact/answers';
import { Refusal } from './refusal';
import { Busy, currentSearcher, noteSearch, tellSearch, type Run } from './searches';
import type { Solved } from './solved';

type State =
  | { readonly kind: 'busy'; readonly run: Run<unknown>; readonly settled: Promise<boolean>; readonly settle: (isWorthAsking: boolean) => void }
  | { readonly kind: 'done'; readonly answer: Answers[Task] }
  | { readonly kind: 'failed'; readonly message: string };

/** The tasks of one case that are searched for, each at most once. */
export class Asking {
  readonly #solved: Solved;
  readonly #states = new Map<Task, State>();
  #progress: Progress | null = null;
  #since = 0;

  constructor(solved: Solved) {
    this.#solved = solved;
  }

  /** True where the answer to a task is at hand. */
  has(task: Task): boolean {
    return this.#states.get(task)?.kind === 'done';
  }

  /** True once anything was asked. */
  get wasAsked(): boolean {
    return this.#states.size > 0;
  }

  /** The task under way, since when (milliseconds of the page's clock), and the best plan so far; null: none. */
  get underWay(): { readonly task: Task; readonly since: number; readonly progress: Progress | null } | null {
    for (const [task, { kind }] of this.#states) if (kind === 'busy') return { task, since: this.#since, progress: this.#progress };
    return null;
  }

  /**
   * The answer to a task.
   *
   * @param found the plan found before, for all tasks but the plan itself
   * @throws Busy while it is worked on, Refusal where it failed
   */
  ask<T extends Task>(task: T, found: Found | null): Answers[T] {
    const state = this.#states.get(task) ?? this.#start(task, found);
    if (state.kind === 'done') return state.answer as Answers[T];
    if (state.kind === 'failed') throw new Refusal(state.message);
    throw new Busy(this.#solved, state.settled);
  }

  /** Ends the search for the plan with the best one so far; none found yet: no seats beside the Fixed ones. */
  stop(): void {
    const state = this.#states.get('plan');
    if (state?.kind !== 'busy') return;
    state.run.drop();
    const none: Found = { held: new Int32Array(), verdicts: [], moreSeats: Infinity, isComplete: false };
    this.#settle('plan', state, { kind: 'done', answer: this.#progress?.found ?? none });
  }

  /** Ends all tasks under way; asked again, they begin anew. */
  drop(): void {
    for (const [task, state] of [...this.#states]) {
      if (state.kind !== 'busy') continue;
      state.run.drop();
      this.#states.delete(task);
      state.settle(false);
    }
    this.#progress = null;
    noteSearch(this.#solved, false);
  }

  #start(task: Task, found: Found | null): State {
    const searcher = currentSearcher();
    if (searcher === null) throw new Refusal('This case is no flow, and this page has no search that could answer it.');
    let settle: (isWorthAsking: boolean) => void = () => undefined;
    const settled = new Promise<boolean>((resolve) => (settle = resolve));
    const run = searcher.start({ task, kase: this.#solved.case, found }, (progress) => {
      this.#progress = progress;
      tellSearch();
    });
    const state: State = { kind: 'busy', run, settled, settle };
    this.#states.set(task, state);
    this.#since = performance.now();
    noteSearch(this.#solved, true);
    run.done.then(
      (answer) => this.#settle(task, state, { kind: 'done', answer }),
      (error: unknown) => this.#settle(task, state, { kind: 'failed', message: `The search failed: ${error instanceof Error ? error.message : String(error)}` }),
    );
    return state;
  }

  /** A task that was ended meanwhile is not settled twice. */
  #settle(task: Task, state: State & { kind: 'busy' }, next: State): void {
    if (this.#states.get(task) !== state) return;
    this.#states.set(task, next);
    noteSearch(this.#solved, this.underWay !== null);
    state.settle(true);
  }
}
