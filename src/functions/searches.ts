import type { Answers, Order, Progress, Task } from '../exact/answers';
import type { Solved } from './solved';

/** A task under way. */
export interface Run<T> {
  /** Rejects where the task failed; never settles once ended by `drop`. */
  readonly done: Promise<T>;
  /** Ends it; nobody waits for the answer any more. */
  drop(): void;
}

/** How a host has tasks worked on, away from the page's own thread. */
export interface Searcher {
  start<T extends Task>(order: Order<T>, onProgress: (progress: Progress) => void): Run<Answers[T]>;
}

/** Thrown where an answer is still being searched for. */
export class Busy extends Error {
  readonly solved: Solved;
  /** Resolves to true when it is worth asking again, to false when nobody asks any more; never rejects. */
  readonly settled: Promise<boolean>;

  constructor(solved: Solved, settled: Promise<boolean>) {
    super('The best plan is being searched for.');
    this.name = 'Busy';
    this.solved = solved;
    this.settled = settled;
  }
}

let searcher: Searcher | null = null;
const underWay = new Set<Solved>();
const listeners = new Set<() => void>();

/** Says who searches; to be called once by the page. */
export function provideSearcher(one: Searcher): void {
  searcher = one;
}

/** @returns who searches, or null on a page that has none */
export function currentSearcher(): Searcher | null {
  return searcher;
}

/** Notes whether a case has a search under way. */
export function noteSearch(solved: Solved, isUnderWay: boolean): void {
  if (isUnderWay) underWay.add(solved);
  else underWay.delete(solved);
  tellSearch();
}

/** Tells whoever shows searches that there is news. */
export function tellSearch(): void {
  for (const listener of [...listeners]) listener();
}

/**
 * Calls the listener whenever a search begins, gets on or ends.
 * @returns a function that ends the subscription
 */
export function onSearch(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Ends the searches of cases that no cell asks about any more. */
export function dropSearchesBut(isAsked: (solved: Solved) => boolean): void {
  for (const solved of [...underWay]) if (!isAsked(solved)) solved.drop();
}
