import { CAUTION } from '../functions/caution';
import { proofWords } from '../functions/proofWords';
import { FUNCTIONS } from '../functions/registry';
import type { Solved } from '../functions/solved';
import { columnLetters } from '../host/address';
import { ALARM, type DraftCell, type SheetDraft } from '../host/port';
import { inLines } from './lines';
import { labelsOf } from './checkTables';
import { checkSheet, PLAN_NAMES, type CheckSheet } from './handOverCheck';

/**
 * Sheets of plain values that can be sent to people without the add-in: what was decided, by duty and
 * by person, what stays uncovered and why, the moves since the last plan, and a block of native
 * formulas that finds fault with the plan if someone changes it into an error.
 *
 * @param day the day of the handing over, as it is to stand there
 * @param prefix before every name of a range, so that none is taken twice
 * @throws like the functions it asks: Busy, Refusal, InputFault
 */
export function handOverSheets(solved: Solved, day: string, prefix: string): SheetDraft[] {
  const kase = solved.case;
  const seats = planRows(solved);
  const check = checkSheet(solved, prefix, Math.max(1, seats.length));
  const moves = kase.current === null ? [] : [listSheet(solved, 'STEPS', 'Moves', [6, 30, 24, 24, 30])];
  return [
    coverSheet(solved, day, check),
    planSheet(seats, prefix, check),
    peopleSheet(solved, prefix),
    listSheet(solved, 'UNCOVERED', 'Uncovered', [30, 8, 8, 9, 11, 90]),
    ...moves,
    check.sheet,
  ];
}

/** What a function spills, as plain rows. */
function spilled(solved: Solved, id: string): (string | number | null)[][] {
  const fn = FUNCTIONS.find((one) => one.id === id);
  if (fn === undefined || !('ofCase' in fn)) throw new Error(`no function ${id} of a case`);
  return fn.ofCase(solved).map((row) => row.map((cell) => (cell === '' ? null : typeof cell === 'boolean' ? String(cell) : cell)));
}

function listSheet(solved: Solved, id: string, name: string, widths: number[]): SheetDraft {
  return { name, rows: spilled(solved, id), headingRows: [0], widths };
}

/** Letters to a line: the widths of both columns of the cover sheet, less what wide letters take. */
const LINE = 80;

function coverSheet(solved: Solved, day: string, { verdict }: CheckSheet): SheetDraft {
  const { plan, method } = solved.outcome;
  const rows: DraftCell[][] = [
    ['The plan, handed over'],
    ['Date', day],
    ['Fingerprint of the case', solved.fingerprint],
    ['Seats needed', plan.needed],
    ['Seats covered', plan.covered],
    ['Seats uncovered', plan.needed - plan.covered],
    ['How it was found', method],
    ['How good it is', proofWords(solved.outcome)],
    ['Check', { formula: verdict }],
    [null],
    ['Signed by', null],
    [null],
    ...inLines(CAUTION, LINE),
    [null],
    ...inLines('The plan was made from the tables as they stood on the date above. It is plain text and numbers; only the check is calculated.', LINE),
  ];
  return { name: 'Handed over', rows, titleRows: [0], widths: [26, 60], alarms: ['B9'] };
}

/** A row a seat: duty, person, slot, group, load, and the note. */
function planRows(solved: Solved): DraftCell[][] {
  const kase = solved.case;
  const byName = new Map(kase.duties.map((duty) => [duty.name, duty]));
  return spilled(solved, 'ASSIGN')
    .slice(1)
    .flatMap(([duty, person, , note]): DraftCell[][] => {
      const entry = byName.get(String(duty));
      // Where there are no seats at all, the answer is a sentence.
      return entry === undefined ? [] : [[duty, person, labelsOf(kase, entry.slots), labelsOf(kase, entry.groups), entry.load, note]];
    });
}

/** The seats, each row with the fault that the check finds in it. */
function planSheet(seats: readonly (readonly DraftCell[])[], prefix: string, { faultOfRow }: CheckSheet): SheetDraft {
  const last = Math.max(1, seats.length) + 1;
  const names = Object.entries(PLAN_NAMES).map(([name, letter]) => ({ name: prefix + name, cells: `${letter}2:${letter}${last}` }));
  return {
    name: 'Plan by duty',
    rows: [['Duty', 'Person', 'Slot', 'Group', 'Load', 'Note', 'Check'], ...seats.map((row) => [...row, { formula: faultOfRow }])],
    headingRows: [0],
    widths: [30, 24, 14, 14, 6, 14, 34],
    names: [...names, { name: `${prefix}PlanAround`, cells: `A1:B${last + BELOW}` }],
    alarms: [`G2:G${last}`],
  };
}

/** Rows below the plan that are watched. */
const BELOW = 300;

/** Everyone's duties, each row with a word where the plan by duty says otherwise by now. */
function peopleSheet({ case: kase, outcome: { plan } }: Solved, prefix: string): SheetDraft {
  const own: number[][] = kase.people.map(() => []);
  for (const { duty, person } of [...plan.seats].sort((a, b) => a.duty - b.duty)) own[person].push(duty);
  const most = Math.max(1, ...own.map((duties) => duties.length));
  const numbered = Array.from({ length: most }, (_, i) => `Duty ${i + 1}`);
  const rows = kase.people.map(({ name }, p): DraftCell[] => {
    const duties = own[p].map((d) => kase.duties[d].name);
    const blanks = Array.from({ length: most - duties.length }, () => null);
    return [name, plan.heldByPerson[p], ...duties, ...blanks, { formula: changedFormula(prefix, p, own[p]) }];
  });
  const column = columnLetters(most + 2);
  return {
    name: 'Plan by person',
    rows: [['Person', 'Seats', ...numbered, 'Check'], ...rows],
    headingRows: [0],
    widths: [24, 7, ...numbered.map(() => 26), 40],
    alarms: [`${column}2:${column}${Math.max(1, kase.people.length) + 1}`],
  };
}

/** Says so where someone's duties are others than these, by the sums of their numbers and of the squares of these. */
function changedFormula(prefix: string, person: number, duties: readonly number[]): string {
  const sum = duties.reduce((total, d) => total + d + 1, 0);
  const squares = duties.reduce((total, d) => total + (d + 1) ** 2, 0);
  const [held, isTheirs] = [`${prefix}RowDuty`, `(${prefix}RowPerson=${person + 1})`];
  const isSame = `AND(SUMPRODUCT(${isTheirs}*${held})=${sum},SUMPRODUCT(${isTheirs}*${held}*${held})=${squares})`;
  return `=IFERROR(IF(${isSame},"","${ALARM}: changed since, see the plan by duty"),"${ALARM}: cannot be calculated")`;
}
