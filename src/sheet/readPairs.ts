import { cellText, isBlank, isBlankName, plainCell } from './cell';
import type { Names } from './name';
import type { Range } from './range';
import type { Report } from './report';
import { openTable, rowsOf, type Layout, type Table } from './table';

const LAYOUT: Layout = {
  table: 'Pairs',
  keys: ['Duty', 'Person'],
  columns: ['Duty', 'Person', 'Rank'],
  byHeading: [],
  required: ['Duty', 'Person'],
};

const CURRENT: Layout = {
  table: 'Current',
  keys: ['Duty', 'Person'],
  columns: ['Duty', 'Person'],
  byHeading: [],
  required: ['Duty', 'Person'],
};

/** The rank of a pair that was given none. */
export const NO_RANK = -1;

/** Rows of pairs as numbers, in row order, repeated rows and all. */
export interface PairRows {
  count: number;
  /** Duty and person by the numbers their names have. */
  readonly duty: Int32Array;
  readonly person: Int32Array;
  /** `NO_RANK` where blank. */
  readonly rank: Int32Array;
  /** The row within the range, from 1. */
  readonly row: Int32Array;
}

/** Reads pairs. Names met here for the first time get the next numbers. */
export function readPairs(range: Range, duties: Names, people: Names, report: Report): PairRows {
  return readRows(range, LAYOUT, duties, people, report);
}

/** Reads the plan in force, likewise. */
export function readCurrent(range: Range, duties: Names, people: Names, report: Report): PairRows {
  return readRows(range, CURRENT, duties, people, report);
}

function readRows(range: Range, layout: Layout, duties: Names, people: Names, report: Report): PairRows {
  const table = openTable(range, layout, report);
  const length = table === null ? 0 : table.end - table.first;
  const rows: PairRows = {
    count: 0,
    duty: new Int32Array(length),
    person: new Int32Array(length),
    rank: new Int32Array(length),
    row: new Int32Array(length),
  };
  if (table === null || length === 0) return rows;
  const dutyPlace = table.places.get('Duty')!;
  const personPlace = table.places.get('Person')!;
  const rankPlace = table.places.get('Rank') ?? -1;
  for (let index = table.first; index < table.end; index++) {
    const cells = table.range[index];
    const duty = plainName(cells[dutyPlace]);
    const person = plainName(cells[personPlace]);
    const rank = rankPlace === -1 ? undefined : cells[rankPlace];
    // The common row is read without an object of its own; anything else takes the careful way.
    if (duty !== '' && person !== '' && isPlainRank(rank)) {
      addRow(rows, duties.number(duty), people.number(person), rank ?? NO_RANK, index + 1);
    } else if (![cells[dutyPlace], cells[personPlace], rank].every((cell) => isBlankName(plainCell(cell)))) {
      readCarefully(table, index, rows, duties, people, report);
    }
  }
  return rows;
}

/** The text of a name that needs no care: visible text, or a number other than 0; otherwise ''. */
function plainName(cell: unknown): string {
  if (typeof cell === 'string') return isBlank(cell) ? '' : cell;
  return typeof cell === 'number' && cell !== 0 ? cellText(cell) : '';
}

function isPlainRank(cell: unknown): cell is number | null | undefined {
  return cell === null || cell === undefined || (typeof cell === 'number' && cell >= 0 && cell <= 1_000_000 && Number.isInteger(cell));
}

function addRow(rows: PairRows, duty: number, person: number, rank: number, row: number): void {
  rows.duty[rows.count] = duty;
  rows.person[rows.count] = person;
  rows.rank[rows.count] = rank;
  rows.row[rows.count++] = row;
}

function readCarefully(table: Table, index: number, rows: PairRows, duties: Names, people: Names, report: Report): void {
  const one = { ...table, first: index, end: index + 1 };
  for (const row of rowsOf(one, report)) {
    const rank = row.whole('Rank', 0, NO_RANK);
    const [duty, person] = [row.text('Duty'), row.text('Person')];
    if (duty !== '' && person !== '') addRow(rows, duties.number(duty), people.number(person), rank, row.number);
    else if (!row.isBroken) row.find('Incomplete row', `The row names ${duty === '' ? 'no duty' : 'no person'} and is left out.`);
  }
}

/** Rows sorted by duty, then person, then row: places into `rows`, by two counting sorts. */
export function sortRows(rows: PairRows, dutyRank: Int32Array, personRank: Int32Array): Int32Array {
  const inOrder = Int32Array.from({ length: rows.count }, (_, i) => i);
  const byPerson = countingSort(inOrder, (i) => personRank[rows.person[i]], personRank.length);
  return countingSort(byPerson, (i) => dutyRank[rows.duty[i]], dutyRank.length);
}

/** Stable: items of equal key stay in the order they came in. */
function countingSort(items: Int32Array, keyOf: (item: number) => number, keyCount: number): Int32Array {
  const next = new Int32Array(keyCount + 1);
  for (const item of items) next[keyOf(item) + 1]++;
  for (let key = 0; key < keyCount; key++) next[key + 1] += next[key];
  const sorted = new Int32Array(items.length);
  for (const item of items) sorted[next[keyOf(item)]++] = item;
  return sorted;
}
