import type { DraftCell, SheetDraft } from '../host/port';

/** What is put on a sheet of answers: a function, its title, and the widths of its columns in characters. */
export interface Answer {
  readonly id: string;
  readonly title: string;
  readonly widths: readonly number[];
}

/** What is asked of every case. */
export const RESULTS: readonly Answer[] = [
  { id: 'SUMMARY', title: 'At a glance', widths: [18, 28] },
  { id: 'ASSIGN', title: 'Who takes what', widths: [28, 22, 7, 12] },
  { id: 'UNCOVERED', title: 'What stays uncovered', widths: [28, 7, 7, 9, 12, 70] },
  { id: 'LOADS', title: 'What each person holds', widths: [22, 10, 10, 10, 8, 8, 60, 40] },
  { id: 'FINDINGS', title: 'What is odd in the tables', widths: [10, 7, 26, 70] },
];

/** Why it is so. */
export const REASONS: readonly Answer[] = [
  { id: 'BOTTLENECKS', title: 'Why seats stay uncovered', widths: [12, 44, 30, 9, 8, 7, 80] },
  { id: 'REMEDIES', title: 'The cheapest remedy', widths: [7, 18, 22, 28, 7] },
  { id: 'ABSENCES', title: 'If one person were away', widths: [22, 8, 8, 40, 60] },
];

const GRID: Answer = { id: 'GRID', title: 'The plan as a grid', widths: [28] };

const MOVES: Answer = { id: 'STEPS', title: 'The moves from the current plan', widths: [6, 28, 22, 22, 36] };

/** How much the answers of a case fill, about. */
export interface CaseSize {
  /** Seats, people or duties, whichever are most. */
  readonly rows: number;
  readonly people: number;
  /** True where some answers would make every keystroke slow. */
  readonly isLarge: boolean;
}

/**
 * Sheets that answer a case: the answers beside each other, each with free columns up to the next, so
 * that none gets in the way of another.
 *
 * @param given the arguments as a formula takes them, in order; '' for one that is left out
 * @param size of the case
 */
export function answerDrafts(given: readonly string[], { rows, people, isLarge }: CaseSize): SheetDraft[] {
  const withCurrent = given[4] !== undefined && given[4] !== '';
  const reasons = isLarge ? REASONS.slice(0, 1) : REASONS;
  // A case grows with the term.
  const room = { rows: 2 * rows, columns: 0 };
  const grids = isLarge ? [] : [{ ...sheet('Grid', [GRID], given), room: { ...room, columns: 2 * people } }];
  const why = { ...sheet('Why', withCurrent ? [MOVES, ...reasons] : reasons, given), room };
  return [{ ...sheet('Results', RESULTS, given), room }, ...grids, why];
}

/** A call of one of our functions; arguments left out at the end are not written. */
function formulaOf(id: string, given: readonly string[]): string {
  return `=DUTY.${id}(${given.join(', ').replace(/(?:, )+$/u, '')})`;
}

function sheet(name: string, answers: readonly Answer[], given: readonly string[]): SheetDraft {
  const titles: DraftCell[] = [];
  const formulas: DraftCell[] = [];
  const widths: number[] = [];
  for (const { id, title, widths: own } of answers) {
    titles[widths.length] = title;
    formulas[widths.length] = { formula: formulaOf(id, given) };
    widths.push(...own, 3);
  }
  const filled = (row: DraftCell[]): DraftCell[] => Array.from({ length: widths.length - 1 }, (_, i) => row[i] ?? null);
  return { name, rows: [filled(titles), filled(formulas)], titleRows: [0], headingRows: [1], widths };
}
