import type { Spill } from '../sheet/range';
import type { Solved } from './solved';

/** What a cell function came to: a table to spill, #VALUE! with its message, or #BUSY!. */
export type Answer =
  | { readonly kind: 'spill'; readonly spill: Spill }
  /** Still searched for; worth asking again once this resolves to true. */
  | { readonly kind: 'busy'; readonly settled: Promise<boolean> }
  | { readonly kind: 'fault'; readonly message: string };

/** One cell in which a function of ours answered. */
export interface Call {
  /** The cell as `Sheet!B4`, or '' where the host does not tell. */
  readonly address: string;
  readonly functionId: string;
  readonly answer: Answer;
  /** The case behind the answer; null for functions that take no case. */
  readonly solved: Solved | null;
  /** The case whose search the answer waits for; null for all others. */
  readonly waitsFor: Solved | null;
}

/** Remembers, for every cell, the last answer of each of our functions in it; the pane reads it. */
export class Journal {
  readonly #calls = new Map<string, Call>();
  readonly #listeners = new Set<() => void>();

  record(call: Call): void {
    const key = `${call.functionId} ${call.address}`;
    this.#calls.delete(key);
    this.#calls.set(key, call);
    for (const listener of this.#listeners) listener();
  }

  /**
   * Calls the listener after every answer; a recalculation may be many.
   * @returns a function that ends the subscription
   */
  onRecord(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  /** Forgets the calls the test rejects: their cells hold no formula of ours any more. */
  keepOnly(test: (call: Call) => boolean): void {
    for (const [key, call] of this.#calls) if (!test(call)) this.#calls.delete(key);
  }

  /** True while an answer is the last one of its cell. */
  isLast(answer: Answer): boolean {
    return this.calls().some((call) => call.answer === answer);
  }

  /** The calls, oldest answer first. */
  calls(): readonly Call[] {
    return [...this.#calls.values()];
  }
}
