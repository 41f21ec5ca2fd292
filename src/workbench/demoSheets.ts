import { REASONS, RESULTS, type Answer } from '../desk/answers';
import { PROOF_CHECKS } from '../functions/proofChecks';
import { widthInPixels } from '../host/workbench/widths';
import type { BookCell, BookSheet } from './files/book';

/** The sheets of answers of the demo workbook, which `npm run demo` writes. */

/** @public the look of headings */
export const HEADING = { bold: true, fill: '#e3efe9' } as const;
/** @public the look of titles */
export const TITLE = { bold: true, size: 14, colour: '#1f5a4c' } as const;

const CHOICES: Answer = { id: 'CHOICES', title: 'What is still open', widths: [26, 20, 11] };

/** Columns of the proof, in pixels, then a gap, then the checks. */
const PROOF_WIDTHS = [70, 190, 150, 100, 60, 60];
const CHECK_COLUMN = PROOF_WIDTHS.length + 1;
const FIRST_CHECK_ROW = 3;

/**
 * The answers beside each other.
 *
 * @param given names of ranges in the order of the parameters; '' for one that is left out
 * @public for the demo
 */
export function resultsSheet(name: string, given: readonly string[]): BookSheet {
  return answersSheet(name, RESULTS, given);
}

/**
 * The explanations beside each other.
 *
 * @param given as for `resultsSheet`
 * @public for the demo
 */
export function reasonsSheet(name: string, given: readonly string[]): BookSheet {
  return answersSheet(name, [...REASONS, CHOICES], given);
}

function answersSheet(name: string, answers: readonly Answer[], given: readonly string[]): BookSheet {
  const cells: BookCell[] = [];
  const widths = new Map<number, number>();
  let column = 0;
  for (const { id, title, widths: own } of answers) {
    cells.push(plainCell(0, column, title, TITLE), formulaCell(1, column, id, given));
    own.forEach((width, i) => {
      if (i > 0) cells.push(plainCell(1, column + i, null, HEADING));
      widths.set(column + i, widthInPixels(width));
    });
    widths.set(column + own.length, widthInPixels(2));
    column += own.length + 1;
  }
  return { name, hidden: false, cells, widths, merges: [], frozen: { rows: 2, columns: 0 } };
}

/**
 * The plan as a cross table.
 *
 * @param given as for `resultsSheet`
 * @param people how many columns of people there will be, about
 * @public for the demo
 */
export function gridSheet(name: string, given: readonly string[], people: number): BookSheet {
  const headings = Array.from({ length: people + 1 }, (_, i) => plainCell(1, i + 1, null, HEADING));
  return {
    name,
    hidden: false,
    cells: [plainCell(0, 0, 'The plan as a grid', TITLE), formulaCell(1, 0, 'GRID', given), ...headings],
    widths: new Map([[0, 200], ...Array.from({ length: people + 1 }, (_, i): [number, number] => [i + 1, 120])]),
    merges: [],
    frozen: { rows: 2, columns: 1 },
  };
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

/** A cell with a value, or only a look. */
function plainCell(row: number, column: number, value: string | null, style: BookCell['style']): BookCell {
  return { row, column, formula: null, value, style, format: null };
}

/** A heading cell whose formula fills the table below it. */
function formulaCell(row: number, column: number, id: string, given: readonly string[]): BookCell {
  return { row, column, formula: formula(id, given), value: null, style: HEADING, format: null };
}

function formula(id: string, given: readonly string[]): string {
  return `=DUTY.${id}(${given.join(', ').replace(/(?:, )+$/u, '')})`;
}
