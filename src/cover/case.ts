/**
 * A case: one set of inputs, read and made canonical. It holds numbers and names, never cells.
 *
 * Duties and people are numbered in the order of their tables, which is the order people see.
 * Everything that decides who holds what uses the name order instead (`dutyOrder`, `personOrder`),
 * so that re-sorting the rows of a table never changes an answer.
 */

/** A spelling to show and the key it is compared by. */
export interface Label {
  /** As first written in the table that lists it. */
  readonly name: string;
  /** Trimmed, inner white space as one space, NFC, case folded: equal keys are one name. */
  readonly key: string;
}

/** A piece of work to be covered. */
export interface Duty extends Label {
  /** How many people it needs: whole, >= 0. Each of them is a seat. */
  readonly need: number;
  /** 1 is the most urgent; `LAST_PRIORITY` where none was given. */
  readonly priority: number;
  /** Keys of the time labels it occupies; more than one where rows given twice disagree. */
  readonly slots: readonly string[];
  /** Keys of the groups it belongs to; more than one where rows given twice disagree. */
  readonly groups: readonly string[];
  /** When it takes place; more than one where rows given twice disagree, none where no time is given. */
  readonly times: readonly Interval[];
  /** How much of a maximum one seat uses: whole, >= 0; 1 where nothing is said. */
  readonly load: number;
}

/** Whole minutes since day 0 of the sheet's calendar; end > start. Duties that only touch do not overlap. */
export interface Interval {
  readonly start: number;
  readonly end: number;
}

/** Someone who can take duties. */
export interface Person extends Label {
  /** The most seats this person may hold: whole, >= 0. */
  readonly maximum: number;
  /** The fewest seats this person should hold: whole, >= 0. */
  readonly minimum: number;
  /** How many places more could be asked of this person: whole, >= 0. */
  readonly stretch: number;
  /** Seats held in earlier terms; counts in evenness only. */
  readonly carried: number;
  /** False for a person named in pairs or rules but not in the people table. */
  readonly listed: boolean;
}

/**
 * Who may take what: pair i is (duty[i], person[i], rank[i]), each pair once, sorted by the name
 * order of the duty, then of the person. Rank 0 where the table has no ranks at all.
 */
export interface Pairs {
  readonly count: number;
  readonly duty: Int32Array;
  readonly person: Int32Array;
  readonly rank: Int32Array;
}

/** A duty and a person, by number. */
export interface Seat {
  readonly duty: number;
  readonly person: number;
}

/** A person takes no duty whose slot or group has this key. */
export interface Away {
  readonly person: number;
  readonly label: Label;
}

/** At most `most` duties whose slot or group has this key; `person` null: for everyone. */
export interface Limit {
  readonly person: number | null;
  readonly label: Label;
  readonly most: number;
}

/** What a plan aims at after covering and minimums. */
export type Aim = 'changes' | 'ranks' | 'evenness';

/** One set of inputs, canonical. */
export interface Case {
  /** In table order; without a duties table in the order of first appearance. */
  readonly duties: readonly Duty[];
  /** In table order, then the unlisted ones by name; people given as one number: by name. */
  readonly people: readonly Person[];
  /** Duty numbers sorted by key. */
  readonly dutyOrder: Int32Array;
  /** Person numbers sorted by key. */
  readonly personOrder: Int32Array;
  readonly pairs: Pairs;
  /** True where the pairs table gives at least one rank. */
  readonly ranked: boolean;
  /** Seats that are held whatever else is said; sorted like pairs, each once; none is barred. */
  readonly fixed: readonly Seat[];
  /** Pairs that never hold; sorted like pairs, each once. */
  readonly barred: readonly Seat[];
  /** Sorted by person, then label key; each once. */
  readonly away: readonly Away[];
  /** Sorted by label key, then everyone first, then person; each (person, label) once. */
  readonly limits: readonly Limit[];
  /** Pairs of different duties that one person never holds both of; lower name order first, each once. */
  readonly clashes: readonly (readonly [number, number])[];
  /** Pairs of different duties that the same person holds, or nobody; likewise. */
  readonly together: readonly (readonly [number, number])[];
  /** The fewest minutes between two duties of one person. */
  readonly rest: number;
  /** The plan in force, sorted like pairs, each seat once; null where none was given. */
  readonly current: readonly Seat[] | null;
  /** The later aims, best first; all three. */
  readonly order: readonly Aim[];
  /** What a remedy costs; null: not allowed. */
  readonly prices: { readonly place: number | null; readonly eligibility: number | null };
  /** How long an exact search may take, in seconds. */
  readonly seconds: number;
  /** For each slot and group key, the label as first written in the duties table. */
  readonly labelNames: ReadonlyMap<string, string>;
}

/** The priority of a duty that was given none: after every given one (those end at 1,000,000). */
export const LAST_PRIORITY = 1_000_001;

/** The order of the later aims where no Order rule says otherwise. */
export const DEFAULT_ORDER: readonly Aim[] = ['changes', 'ranks', 'evenness'];
