import { cellText, errorCode, isBlank, isBlankName, plainCell, quoteCell } from './cell';
import type { TableName } from './fault';
import { nameKey } from './name';
import { readWhole, wholeExpected } from './number';
import type { Range } from './range';
import type { Report } from './report';

/** How a table is laid out. */
export interface Layout {
  readonly table: TableName;
  /** A first row that holds all of these is a heading row. */
  readonly keys: readonly string[];
  /** The columns by position. */
  readonly columns: readonly string[];
  /** Further columns, found by heading only. */
  readonly byHeading: readonly string[];
  /** The columns a table cannot do without. */
  readonly required: readonly string[];
}

/** A table whose columns have been found. */
export interface Table {
  readonly table: TableName;
  readonly range: Range;
  /** The first row below the headings, and the row after the last that is not blank; from 0. */
  readonly first: number;
  readonly end: number;
  /** The place of each column that is there, by heading, from 0. */
  readonly places: ReadonlyMap<string, number>;
}

/**
 * Finds the heading row, the columns and the last row of a range.
 *
 * @returns null, with a fault reported, where the table lacks a column it needs
 */
export function openTable(range: Range, layout: Layout, report: Report): Table | null {
  const end = endOfRows(range);
  let first = 0;
  while (first < end && isBlankRow(range[first])) first++;
  if (first === end) return { table: layout.table, range, first, end, places: new Map() };
  const headed = holdsHeadings(range[first], layout.keys);
  const places = headed
    ? placesByHeading(range[first], first, layout, report)
    : new Map(layout.columns.slice(0, range[first].length).map((column, i) => [column, i]));
  const missing = layout.required.filter((column) => !places.has(column));
  if (missing.length > 0) {
    const width = range[first].length;
    report.fault({
      table: layout.table,
      row: headed ? first + 1 : null,
      column: null,
      found: headed ? `no column headed ${missing.join(' or ')}` : `${width} ${width === 1 ? 'column' : 'columns'}`,
      expected: headed
        ? `the headings ${layout.required.join(', ')}`
        : `at least ${layout.required.length} columns: ${layout.required.join(', ')}`,
    });
    return null;
  }
  return { table: layout.table, range, first: headed ? first + 1 : first, end, places };
}

/** Whole columns end in hundreds of thousands of blank rows: they are skipped from below. */
export function endOfRows(range: Range): number {
  let end = range.length;
  while (end > 0 && isBlankRow(range[end - 1])) end--;
  return end;
}

/** True where no cell says anything; a plain loop, as a million of them may have to be skipped. */
export function isBlankRow(row: readonly unknown[]): boolean {
  for (let c = 0; c < row.length; c++) {
    const cell = row[c];
    if (cell === null || cell === '' || cell === undefined) continue;
    if (!isBlankName(plainCell(cell))) return false;
  }
  return true;
}

function holdsHeadings(row: readonly unknown[], keys: readonly string[]): boolean {
  const texts = new Set(row.map(headingKey));
  return keys.every((key) => texts.has(nameKey(key)));
}

function headingKey(cell: unknown): string {
  const plain = plainCell(cell);
  return typeof plain === 'string' ? nameKey(plain) : '';
}

function placesByHeading(
  row: readonly unknown[],
  index: number,
  { table, columns, byHeading }: Layout,
  report: Report,
): Map<string, number> {
  const known = new Map([...columns, ...byHeading].map((column) => [nameKey(column), column]));
  const places = new Map<string, number>();
  row.forEach((cell, place) => {
    const column = known.get(headingKey(cell));
    if (column === undefined) return;
    if (places.has(column)) {
      report.find(table, index + 1, 'Heading given twice', `The first column headed ${column} is read, the other is not.`);
    } else {
      places.set(column, place);
    }
  });
  return places;
}

/** One row of a table, read cell by cell; what cannot be read is reported. */
export class Row {
  readonly #table: Table;
  readonly #report: Report;
  /** Row within the range, from 1. */
  readonly number: number;
  /** True where an error cell stands in the row; it has been reported. */
  isBroken = false;

  constructor(table: Table, index: number, report: Report) {
    this.#table = table;
    this.#report = report;
    this.number = index + 1;
  }

  /** The value in the cell; undefined where the column is not there. */
  cell(column: string): unknown {
    const place = this.#table.places.get(column);
    return place === undefined ? undefined : plainCell(this.#table.range[this.number - 1][place]);
  }

  /** A name or label; '' where blank. */
  text(column: string): string {
    const cell = this.cell(column);
    return isBlankName(cell) || errorCode(cell) !== null ? '' : cellText(cell);
  }

  /**
   * A whole number from `least` to `most`; `blank` where the cell is blank, and also, with a fault reported,
   * where it is no such number: the rest of the row can then still be read.
   */
  whole(column: string, least: number, blank: number, most?: number): number {
    const cell = this.cell(column);
    if (errorCode(cell) !== null) return blank;
    const read = readWhole(cell, least, most);
    if (read.kind === 'blank') return blank;
    if (read.kind === 'other') {
      this.fault(column, cell, wholeExpected(least, most));
      return blank;
    }
    if (read.asText) {
      this.find('Number written as text', `Column ${column}: the text ${quoteCell(cell)} is read as the number ${read.value}.`);
    }
    return read.value;
  }

  fault(column: string, cell: unknown, expected: string): void {
    this.#report.fault({ table: this.#table.table, row: this.number, column, found: quoteCell(cell), expected });
  }

  find(finding: string, detail: string): void {
    this.#report.find(this.#table.table, this.number, finding, detail);
  }
}

/** The rows that say something. Error cells in columns that are read are reported. */
export function* rowsOf(table: Table, report: Report): Generator<Row> {
  const places = [...table.places.entries()];
  for (let index = table.first; index < table.end; index++) {
    const cells = table.range[index];
    if (places.every(([, place]) => isBlankName(plainCell(cells[place])))) continue;
    const row = new Row(table, index, report);
    for (const [column] of places) {
      const cell = row.cell(column);
      if (errorCode(cell) === null) continue;
      row.fault(column, cell, expectedIn(column));
      row.isBroken = true;
    }
    yield row;
  }
}

const NAME_COLUMNS = new Set(['Duty', 'Person', 'Slot', 'Group', 'Rule', 'Value']);

function expectedIn(column: string): string {
  if (column === 'Start' || column === 'End') return 'a date and time';
  if (NAME_COLUMNS.has(column)) return column === 'Duty' || column === 'Person' ? 'a name' : 'a text';
  return wholeExpected(column === 'Priority' ? 1 : 0);
}

/** True for a range that is one number, or text that reads as one: "the same for everyone". */
export function isOneNumber(range: Range): boolean {
  if (range.length !== 1 || range[0].length !== 1) return false;
  const cell = plainCell(range[0][0]);
  if (isBlank(cell)) return false;
  return typeof cell === 'number' || typeof cell === 'boolean' || errorCode(cell) !== null || readWhole(cell, 0).kind === 'number';
}
