import type { Range, Spill } from '../sheet/range';
import type { Solved } from './solved';

/** One parameter of a cell function. Every parameter is a range; one number is a range of one cell. */
export interface Parameter {
  readonly name: string;
  readonly description: string;
  readonly optional: boolean;
}

/** One column of what a function spills. */
export interface Column {
  readonly name: string;
  readonly description: string;
}

/** The headings of the columns. */
export function headings(columns: readonly Column[]): string[] {
  return columns.map(({ name }) => name);
}

/**
 * A cell function, declared once. functions.json, the registration in every host, the reference
 * page and the pane are derived from this.
 */
interface Declaration {
  /** Upper case, without the namespace; never changed once published. */
  readonly id: string;
  /** What it answers, in one sentence; at most 128 characters. */
  readonly summary: string;
  readonly parameters: readonly Parameter[];
  /** The columns of the spilled table; GRID, whose columns are people, stands for them in one. */
  readonly columns: readonly Column[];
  /** A formula on the named ranges of the demo workbook. */
  readonly example: string;
}

/** A function of the five input ranges of a case. */
export interface CaseFunction extends Declaration {
  /**
   * @returns the table with its headings
   * @throws InputFault where the inputs cannot be read; Refusal where the case needs what is not built
   */
  readonly ofCase: (solved: Solved) => Spill;
}

/** A function of ranges that are no case. */
export interface RangeFunction extends Declaration {
  /**
   * @param ranges one entry a parameter, in order; null where it was left out
   * @returns the table with its headings
   * @throws InputFault where the ranges cannot be read
   */
  readonly ofRanges: (ranges: readonly (Range | null)[]) => Spill;
}

export type CellFunction = CaseFunction | RangeFunction;

/** The parameters of every function of a case, so that a formula can be copied and only its name changed. */
export const CASE_PARAMETERS: readonly Parameter[] = [
  {
    name: 'pairs',
    description: 'Who may take what: columns Duty, Person and, if you like, Rank (1 is the most wanted).',
    optional: false,
  },
  {
    name: 'people',
    description: 'How much each can take: Person, Maximum, Minimum, Stretch; or one number, the maximum of everyone.',
    optional: false,
  },
  {
    name: 'duties',
    description: 'What must be covered: Duty, Need, Priority, Slot, by heading Group, Start, End, Load; or one number, the need of each.',
    optional: true,
  },
  {
    name: 'rules',
    description: 'Exceptions: columns Rule, Duty, Person, Value; for example Fixed, Barred, Away, Limit.',
    optional: true,
  },
  {
    name: 'current',
    description: 'The plan in force: columns Duty, Person.',
    optional: true,
  },
];
