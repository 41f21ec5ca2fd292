import { columnLetters, formatAddress } from '../host/address';
import { nameKey } from '../sheet/name';
import type { Book, BookCell, BookName, BookSheet } from './files/book';
import { usesOurs } from './files/spelling';

/** The tables of a case in the order the functions take them, and the headings they are known by. */
const TABLES = [
  { name: 'Pairs', keys: ['Duty', 'Person'], others: ['Rule', 'Maximum', 'Need'] },
  { name: 'People', keys: ['Person', 'Maximum'], others: ['Rule'] },
  { name: 'Duties', keys: ['Duty', 'Need'], others: ['Rule'] },
  { name: 'Rules', keys: ['Rule'], others: [] },
] as const;

/** A grid of more cells than this makes every edit slow. */
const LARGEST_GRID = 120_000;
/** Blank rows below a table that its name takes in, so that rows can be added. */
const ROOM = 100;

/** @public also the look of the demo's headings */
export const HEADING = { bold: true, fill: '#e3efe9' } as const;
/** @public also the look of the demo's titles */
export const TITLE = { bold: true, size: 14, colour: '#1f5a4c' } as const;

/** Answers beside each other on the results sheet, with the widths of their columns in pixels. */
const ANSWERS = [
  { id: 'SUMMARY', title: 'At a glance', widths: [130, 190] },
  { id: 'ASSIGN', title: 'Who takes what', widths: [200, 150, 50, 90] },
  { id: 'UNCOVERED', title: 'What stays uncovered', widths: [200, 50, 50, 70, 90, 560] },
  { id: 'LOADS', title: 'What each person holds', widths: [150, 75, 75, 80, 60, 55, 420, 200] },
  { id: 'FINDINGS', title: 'What is odd in the tables', widths: [70, 50, 190, 480] },
] as const;

/** A book with its tables answered, and what is to be said about that. */
export interface Answered {
  readonly book: Book;
  readonly remarks: readonly string[];
}

/**
 * A book with its input tables named and their answers on new sheets; nothing that is there is
 * touched.
 *
 * @returns null where no sheet begins with the headings of pairs or none with those of people, and
 *   where functions of ours answer already
 */
export function answerSheets(book: Book): Answered | null {
  if (book.sheets.some(({ cells }) => cells.some((cell) => cell.formula !== null && usesOurs(cell.formula)))) return null;
  const found = findTables(book);
  const pairs = found.get('Pairs');
  const people = found.get('People');
  if (pairs === undefined || people === undefined) return null;
  const taken = new Set([...book.names, ...(book.otherNames ?? [])].map(({ name }) => name.toLowerCase()));
  const names: BookName[] = [];
  const given: string[] = [];
  for (const { name } of TABLES) {
    const sheet = found.get(name);
    if (sheet === undefined) {
      given.push('');
      continue;
    }
    const free = freeName(name, taken);
    given.push(free);
    names.push({ name: free, reference: wholeOf(sheet) });
  }
  const sheetNames = new Set(book.sheets.map(({ name }) => name.toLowerCase()));
  const results = resultsSheet(freeName('Results', sheetNames), given);
  const gridCells = lastRow(people) * dutiesOf(found.get('Duties') ?? pairs);
  const grids = gridCells > LARGEST_GRID ? [] : [gridSheet(freeName('Grid', sheetNames), given, lastRow(people))];
  return {
    book: { ...book, sheets: [...book.sheets, results, ...grids], names: [...book.names, ...names] },
    remarks:
      grids.length > 0
        ? []
        : [`No grid was made: of ${gridCells.toLocaleString('en-GB')} cells, it would make every change slow. ${formula('GRID', given)} makes one.`],
  };
}

/**
 * The answers beside each other.
 *
 * @param given names of ranges in the order of the parameters; '' for one that is left out
 * @public also for the demo
 */
export function resultsSheet(name: string, given: readonly string[]): BookSheet {
  const cells: BookCell[] = [];
  const widths = new Map<number, number>();
  let column = 0;
  for (const { id, title, widths: own } of ANSWERS) {
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
 * The plan as a cross table.
 *
 * @param given as for `resultsSheet`
 * @param people how many columns of people there will be, about
 * @public also for the demo
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

/** The first sheet of each kind; one that is named as a plan in force is no table of pairs. */
function findTables({ sheets }: Book): Map<string, BookSheet> {
  const found = new Map<string, BookSheet>();
  for (const sheet of sheets) {
    const headings = headingsOf(sheet);
    const has = (heading: string): boolean => headings.has(nameKey(heading));
    const table = TABLES.find(({ keys, others }) => keys.every(has) && !others.some(has));
    if (table === undefined || found.has(table.name)) continue;
    if (table.name === 'Pairs' && /^(?:current|plan)\b/iu.test(sheet.name)) continue;
    found.set(table.name, sheet);
  }
  return found;
}

/** The first row that holds anything. */
function headingsOf({ cells }: BookSheet): Set<string> {
  const first = cells.reduce((row, cell) => (cell.value === null ? row : Math.min(row, cell.row)), Infinity);
  return new Set(cells.flatMap(({ row, value }) => (row === first && typeof value === 'string' ? [nameKey(value)] : [])));
}

/** How many duties the table names, about. */
function dutiesOf(sheet: BookSheet): number {
  const heading = sheet.cells.find(({ value }) => typeof value === 'string' && nameKey(value) === nameKey('Duty'));
  return new Set(sheet.cells.flatMap(({ column, value }) => (column === heading?.column ? [nameKey(String(value))] : []))).size;
}

function lastRow({ cells }: BookSheet): number {
  return cells.reduce((row, cell) => Math.max(row, cell.row), 0);
}

/** The whole of what a sheet holds, with room below. */
function wholeOf(sheet: BookSheet): string {
  const column = sheet.cells.reduce((last, cell) => Math.max(last, cell.column), 0);
  return formatAddress({ sheet: sheet.name, cell: `A1:${columnLetters(column)}${lastRow(sheet) + 1 + ROOM}` });
}

function freeName(name: string, taken: Set<string>): string {
  for (let number = 1; ; number++) {
    const candidate = number === 1 ? name : `${name}${number}`;
    if (taken.has(candidate.toLowerCase())) continue;
    taken.add(candidate.toLowerCase());
    return candidate;
  }
}

/** A cell with a value, or only a look. */
export function plainCell(row: number, column: number, value: string | null, style: BookCell['style']): BookCell {
  return { row, column, formula: null, value, style, format: null };
}

/** A heading cell whose formula fills the table below it. */
export function formulaCell(row: number, column: number, id: string, given: readonly string[]): BookCell {
  return { row, column, formula: formula(id, given), value: null, style: HEADING, format: null };
}

function formula(id: string, given: readonly string[]): string {
  return `=DUTY.${id}(${given.join(', ').replace(/(?:, )+$/u, '')})`;
}
