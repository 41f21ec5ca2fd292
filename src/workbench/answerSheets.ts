import { columnLetters } from '../host/address';
import { nameKey } from '../sheet/name';
import type { Book, BookCell, BookSheet } from './files/book';

/** The tables of a case by the name their ranges get, and the headings they are known by. */
const TABLES: readonly { readonly name: string; readonly keys: readonly string[]; readonly without?: readonly string[] }[] = [
  { name: 'Rules', keys: ['Rule', 'Value'] },
  { name: 'Pairs', keys: ['Duty', 'Person'] },
  { name: 'People', keys: ['Person', 'Maximum'] },
  { name: 'Duties', keys: ['Duty', 'Need'] },
];

const HEADING = { bold: true, fill: '#e3efe9' } as const;
/** Columns between one answer and the next. */
const GAP = 1;
/** Answers beside each other on the results sheet, with the columns each of them fills. */
const ANSWERS = [
  { id: 'SUMMARY', title: 'At a glance', columns: 2, widths: [130, 170] },
  { id: 'ASSIGN', title: 'Who takes what', columns: 4, widths: [200, 150, 50, 90] },
  { id: 'UNCOVERED', title: 'What stays uncovered', columns: 6, widths: [200, 50, 50, 60, 80, 420] },
  { id: 'LOADS', title: 'What each person holds', columns: 8, widths: [150, 70, 70, 75, 55, 50, 320, 200] },
  { id: 'FINDINGS', title: 'What is odd in the tables', columns: 4, widths: [70, 50, 150, 420] },
] as const;

/**
 * A book with its input tables named and their answers on new sheets; nothing that is there is
 * touched.
 *
 * @returns null where no sheet begins with the headings of pairs and none with those of people
 */
export function answerSheets(book: Book): Book | null {
  const found = new Map<string, string>();
  for (const sheet of book.sheets) {
    const headings = new Set(
      sheet.cells.filter(({ row, value }) => row === 0 && typeof value === 'string').map(({ value }) => nameKey(String(value))),
    );
    const table = TABLES.find(({ name, keys }) => !found.has(name) && keys.every((key) => headings.has(nameKey(key))));
    if (table !== undefined) found.set(table.name, referenceTo(sheet));
  }
  const pairs = found.get('Pairs');
  const people = found.get('People');
  if (pairs === undefined || people === undefined) return null;
  const taken = new Set(book.names.map(({ name }) => name.toLowerCase()));
  const names = ['Pairs', 'People', 'Duties', 'Rules'].flatMap((name) => {
    const reference = found.get(name);
    return reference === undefined ? [] : [{ name: freeName(name, taken), table: name, reference }];
  });
  const argument = (table: string): string => names.find((entry) => entry.table === table)?.name ?? '';
  const given = [argument('Pairs'), argument('People'), argument('Duties'), argument('Rules')].join(', ').replace(/(, )+$/u, '');
  const sheetNames = new Set(book.sheets.map(({ name }) => name.toLowerCase()));
  return {
    ...book,
    sheets: [...book.sheets, resultsSheet(freeName('Results', sheetNames), given), gridSheet(freeName('Grid', sheetNames), given)],
    names: [...book.names, ...names.map(({ name, reference }) => ({ name, reference }))],
  };
}

/** The whole of what a sheet holds. */
function referenceTo({ name, cells }: BookSheet): string {
  const row = Math.max(...cells.map((cell) => cell.row)) + 1;
  const column = columnLetters(Math.max(...cells.map((cell) => cell.column)));
  return `${/^[a-z_]\w*$/iu.test(name) ? name : `'${name.replaceAll("'", "''")}'`}!A1:${column}${row}`;
}

function freeName(name: string, taken: Set<string>): string {
  for (let number = 1; ; number++) {
    const candidate = number === 1 ? name : `${name}${number}`;
    if (taken.has(candidate.toLowerCase())) continue;
    taken.add(candidate.toLowerCase());
    return candidate;
  }
}

function resultsSheet(name: string, given: string): BookSheet {
  const cells: BookCell[] = [];
  const widths = new Map<number, number>();
  let column = 0;
  for (const { id, title, columns, widths: own } of ANSWERS) {
    cells.push({ row: 0, column, formula: null, value: title, style: { bold: true, size: 13 }, format: null });
    cells.push({ row: 1, column, formula: `=DUTY.${id}(${given})`, value: null, style: HEADING, format: null });
    for (let i = 1; i < columns; i++) cells.push({ row: 1, column: column + i, formula: null, value: null, style: HEADING, format: null });
    own.forEach((width, i) => widths.set(column + i, width));
    widths.set(column + columns, 24);
    column += columns + GAP;
  }
  return { name, hidden: false, cells, widths, merges: [], frozen: { rows: 2, columns: 0 } };
}

function gridSheet(name: string, given: string): BookSheet {
  const cells: BookCell[] = [{ row: 0, column: 0, formula: `=DUTY.GRID(${given})`, value: null, style: HEADING, format: null }];
  return { name, hidden: false, cells, widths: new Map([[0, 200]]), merges: [], frozen: { rows: 1, columns: 1 } };
}
