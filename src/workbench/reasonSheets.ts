import { PROOF_CHECKS } from '../functions/proofChecks';
import { formulaCell, HEADING, plainCell, TITLE } from './answerSheets';
import type { BookCell, BookSheet } from './files/book';

/** Explanations beside each other on the sheet of reasons, with the widths of their columns in pixels. */
const REASONS = [
  { id: 'BOTTLENECKS', title: 'Why seats stay uncovered', widths: [85, 320, 220, 65, 60, 50, 560] },
  { id: 'REMEDIES', title: 'The cheapest remedy', widths: [50, 130, 150, 190, 50] },
  { id: 'ABSENCES', title: 'If one person were away', widths: [150, 60, 50, 260, 420] },
  { id: 'CHOICES', title: 'What is still open', widths: [190, 150, 90] },
] as const;

/** Columns of the proof, then a gap, then the checks. */
const PROOF_WIDTHS = [70, 190, 150, 100, 60, 60];
const CHECK_COLUMN = PROOF_WIDTHS.length + 1;
const FIRST_CHECK_ROW = 3;

/**
 * The explanations beside each other.
 *
 * @param given names of ranges in the order of the parameters
 * @public for the demo
 */
export function reasonsSheet(name: string, given: readonly string[]): BookSheet {
  const cells: BookCell[] = [];
  const widths = new Map<number, number>();
  let column = 0;
  for (const { id, title, widths: own } of REASONS) {
    cells.push(plainCell(0, column, title, TITLE), formulaCell(1, column, id, given));
    own.forEach((width, i) => {
      if (i > 0) cells.push(plainCell(1, column + i, null, HEADING));
      widths.set(column + i, width);
    });
    widths.set(column + own.length, 24);
    column += own.length + 1;
  }
  return { name, hidden: false, cells, widths, merges: [], frozen: { rows: 2, columns: 0 } };
}

/**
 * The proof, and beside it the native formulas that check it, with a verdict above them. The names
 * they use must be given to the columns of the inputs and of the proof.
 *
 * @param given names of ranges in the order of the parameters
 * @public for the demo
 */
export function proofSheet(name: string, given: readonly string[]): BookSheet {
  const last = FIRST_CHECK_ROW + PROOF_CHECKS.length;
  const counts = `I${FIRST_CHECK_ROW + 1}:I${last}`;
  const native = (row: number, formula: string, value: string | number): BookCell => ({
    ...plainCell(row, CHECK_COLUMN + 1, null, null),
    formula,
    value,
  });
  const cells: BookCell[] = [
    plainCell(0, 0, 'The plan, and why none covers more', TITLE),
    formulaCell(1, 0, 'PROOF', given),
    ...PROOF_WIDTHS.slice(1).map((_, i) => plainCell(1, i + 1, null, HEADING)),
    plainCell(0, CHECK_COLUMN, 'Checked by native formulas', TITLE),
    plainCell(1, CHECK_COLUMN, 'Verdict: the proof', HEADING),
    { ...native(1, `=IF(SUM(${counts})=0,"holds","does not hold")`, 'holds'), style: HEADING },
    plainCell(2, CHECK_COLUMN, 'Faults', HEADING),
    plainCell(2, CHECK_COLUMN + 1, 'Found', HEADING),
    ...PROOF_CHECKS.flatMap(({ fault, formula }, i) => [
      plainCell(FIRST_CHECK_ROW + i, CHECK_COLUMN, fault, null),
      native(FIRST_CHECK_ROW + i, formula, 0),
    ]),
  ];
  const widths = new Map(PROOF_WIDTHS.map((width, i): [number, number] => [i, width]));
  widths.set(CHECK_COLUMN, 420).set(CHECK_COLUMN + 1, 100);
  return { name, hidden: false, cells, widths, merges: [], frozen: { rows: 2, columns: 0 } };
}
