import { minimumsMissed } from '../functions/measures';
import type { Solved } from '../functions/solved';
import { columnLetters } from '../host/address';
import { ALARM, type DraftCell, type SheetDraft } from '../host/port';
import { boundChecks, isProvable, proofTables } from './checkProof';
import { planChecks, rowTable } from './checkRows';
import { inLines } from './lines';
import { caseTables, membershipOf, type Table } from './checkTables';

/** The sheet with the check, and the formulas that give its verdict on other sheets. */
export interface CheckSheet {
  readonly sheet: SheetDraft;
  readonly verdict: string;
  /** The fault of a row of the plan, on the same row of the sheet of the plan. */
  readonly faultOfRow: string;
}

/** Names on the sheet of the plan, with the columns they are of. */
export const PLAN_NAMES = { PlanDuty: 'A', PlanPerson: 'B', PlanSlot: 'C', PlanGroup: 'D', PlanLoad: 'E' } as const;

const HOLDS = 'All is well: nothing in the plan breaks what is checked';
/** The rows of the check: title, verdict, blank, headings, checks. */
const FIRST_CHECK = 4;
/** Letters to a line below the checks. */
const LINE = 62;
/** The tables begin here, a free column after the checks. */
const FIRST_TABLE = 3;

/**
 * The check block with the tables it needs, all in plain values but the formulas.
 *
 * @param count the rows of the plan on its sheet, at least 1
 * @param prefix before every name of a range
 */
export function checkSheet(solved: Solved, prefix: string, count: number): CheckSheet {
  const kase = solved.case;
  const membership = membershipOf(solved);
  const isProven = isProvable(solved);
  const missed = minimumsMissed(kase, solved.outcome.plan);
  const checks = [...planChecks(kase, membership, count, missed), ...(isProven ? boundChecks() : [])];
  const tables = [rowTable(kase, membership, count), ...caseTables(solved, membership), ...(isProven ? proofTables(solved) : [])];
  const own = new Set([...tables.flatMap(({ columns }) => columns.flatMap(({ name }) => name ?? [])), ...Object.keys(PLAN_NAMES), 'PlanAround']);
  const named = (formula: string): string => formula.replace(/[A-Z][A-Za-z]+\d*/gu, (word) => (own.has(word) ? prefix + word : word));

  const paper = new Paper();
  const counts = `B${FIRST_CHECK + 1}:B${FIRST_CHECK + checks.length}`;
  paper.put(0, 0, 'The check');
  paper.put(1, 0, { formula: verdictFormula(counts, checks.length) });
  paper.put(3, 0, 'Looked for');
  paper.put(3, 1, 'Found');
  checks.forEach(({ fault, formula }, i) => {
    paper.put(FIRST_CHECK + i, 0, fault);
    paper.put(FIRST_CHECK + i, 1, { formula: named(formula) });
  });
  inLines(scopeWords(solved, isProven), LINE).forEach(([line], i) => paper.put(FIRST_CHECK + checks.length + 1 + i, 0, line));
  const names = layTables(paper, tables, named).map(({ name, cells }) => ({ name: prefix + name, cells }));
  names.push({ name: `${prefix}Verdict`, cells: 'A2' });
  return {
    sheet: { name: 'Check', rows: paper.rows, titleRows: [0], headingRows: [3], widths: [62, 8], names, alarms: ['A2'] },
    verdict: `=${prefix}Verdict`,
    // Wherever the rows of the plan are sorted to, the fault of the row is beside it.
    faultOfRow: `=INDEX(${prefix}RowFault,ROW()-1)`,
  };
}

/** Counts that are errors or are not there are no good sign either. */
function verdictFormula(counts: string, many: number): string {
  const faults = `SUM(${counts})`;
  const found = `"${ALARM}: "&${faults}&IF(${faults}=1," fault"," faults")&", listed with the check"`;
  return `=IFERROR(IF(COUNT(${counts})<${many},"${ALARM}: part of the check is missing",IF(${faults}=0,"${HOLDS}",${found})),"${ALARM}: the check cannot be calculated")`;
}

/** What is counted, and what is not. */
function scopeWords({ case: { duties } }: Solved, isProven: boolean): string {
  const unsaid = [
    ...(duties.some(({ times }) => times.length > 1) ? ['second times of a duty'] : []),
    ...(isProven ? [] : ['whether another plan covers more']),
  ];
  const beyond = unsaid.length === 0 ? '' : ` Not among it: ${unsaid.join(', ')}.`;
  return `Counted by formulas of the spreadsheet alone: that the plan keeps what is listed here${isProven ? ', and that no plan covers more' : ''}.${beyond}`;
}

/** Cells put down one by one. */
class Paper {
  readonly rows: DraftCell[][] = [];

  put(row: number, column: number, cell: DraftCell): void {
    while (this.rows.length <= row) this.rows.push([]);
    while (this.rows[row].length <= column) this.rows[row].push(null);
    this.rows[row][column] = cell;
  }
}

/** Puts the tables down beside each other and returns the names of their columns, without a prefix. */
function layTables(paper: Paper, tables: readonly Table[], named: (formula: string) => string): { name: string; cells: string }[] {
  const ranges: { name: string; cells: string }[] = [];
  let left = FIRST_TABLE;
  for (const { title, columns, rows } of tables) {
    const start = left;
    paper.put(2, start, title);
    columns.forEach(({ heading, name }, c) => {
      paper.put(3, start + c, heading);
      const letters = columnLetters(start + c);
      // A named column of nothing still needs a cell.
      const last = FIRST_CHECK + Math.max(1, rows.length);
      if (name !== null) ranges.push({ name, cells: `${letters}${FIRST_CHECK + 1}:${letters}${last}` });
    });
    rows.forEach((row, r) => {
      const inRow = (formula: string): string => formula.replace(/\[(\d+)\]/gu, (_, c) => `${columnLetters(start + Number(c))}${FIRST_CHECK + r + 1}`);
      row.forEach((cell, c) => paper.put(FIRST_CHECK + r, start + c, isFormula(cell) ? { formula: inRow(named(cell.formula)) } : cell));
    });
    left += columns.length + 1;
  }
  return ranges;
}

function isFormula(cell: DraftCell): cell is { readonly formula: string } {
  return cell !== null && typeof cell === 'object';
}
