import type { Absence } from '../cover/absences';
import type { Aim, Case } from '../cover/case';
import type { Use } from '../cover/choices';
import type { Remedies } from '../cover/remedies';
import type { Knot } from '../cover/shortage';

// What is asked of a search and what it answers: all that the rest of the product knows of this room.

/** An answer that may not have been worked out in time. */
export type InTime<T> = T | null;

/** How far an aim is from being proven best. */
export interface Verdict {
  readonly aim: 'cover' | 'minimums' | Aim | 'names';
  /** The priority whose cover it is; null for the later aims. */
  readonly priority: number | null;
  /** By how much at most a better plan could be better in it, earlier aims kept; 0: proven. */
  readonly gap: number;
}

/** What a search came to: a plan and how good it is known to be. */
export interface Found {
  /** Pairs held beside the Fixed seats, by pair number, ascending. */
  readonly held: Int32Array;
  /** The aims this case has, in their order, as far as they were reached. */
  readonly verdicts: readonly Verdict[];
  /** Seats more that can be covered at most, in all; 0: no plan covers more. */
  readonly moreSeats: number;
  /** True where every aim was worked on; false where the time was over or the search was stopped. */
  readonly isComplete: boolean;
}

/** What people are told while a search is under way. */
export interface Progress {
  /** The aim being worked on. */
  readonly aim: Verdict['aim'];
  readonly found: Found;
}

/** What each task answers. */
export interface Answers {
  readonly plan: Found;
  readonly bottlenecks: readonly Knot[];
  readonly gains: readonly InTime<number>[];
  readonly choices: readonly InTime<Use>[];
  readonly absences: readonly InTime<Absence>[];
  readonly remedies: InTime<Remedies>;
}

export type Task = keyof Answers;

/** One task to be worked on, as it is sent to a worker. */
export interface Order<T extends Task = Task> {
  readonly task: T;
  readonly kase: Case;
  /** The plan found before; null where the plan itself is asked for. */
  readonly found: Found | null;
}
