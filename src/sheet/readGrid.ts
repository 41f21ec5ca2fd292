import { cellText, errorCode, isBlank, isBlankName, plainCell, quoteCell } from './cell';
import { InputFault } from './fault';
import { cleanName, nameKey } from './name';
import { readWhole } from './number';
import type { Range } from './range';
import { endOfRows, isBlankRow } from './table';

/** A row of a pairs table, read from a cross table; rank null where the mark is no number. */
export interface PairRow {
  readonly duty: string;
  readonly person: string;
  readonly rank: number | null;
}

/** The word on the last row and column of a table that DUTY.GRID spilled: its totals are no pairs. */
const TOTAL = nameKey('Total');

/**
 * Reads a cross table: duties down the first column, people across the first row that is not blank.
 * A number is a rank, any other mark a pair; blank, `no` and 0 are none. A last row or column of
 * totals is left out.
 *
 * @throws InputFault at the first error cell, at a number that is no rank, or where there is no second column
 */
export function readGrid(range: Range): PairRow[] {
  const end = endOfRows(range);
  let first = 0;
  while (first < end && isBlankRow(range[first])) first++;
  const width = range.length === 0 ? 0 : range[Math.min(first, range.length - 1)].length;
  if (width < 2) throw tooNarrow(width);
  if (first === end) return [];
  const people = withoutTotal(range[first].map((cell, c) => (c === 0 ? '' : edgeName(cell, first + 1, c))));
  const duties = withoutTotal(range.slice(first, end).map((row, r) => (r === 0 ? '' : edgeName(row[0], first + r + 1, 0))));
  const pairs: PairRow[] = [];
  duties.forEach((duty, r) => {
    if (duty === '') return;
    people.forEach((person, c) => {
      if (person === '') return;
      const cell = plainCell(range[first + r][c]);
      if (isMark(cell, first + r + 1, person)) pairs.push({ duty, person, rank: rankOf(cell, first + r + 1, person) });
    });
  });
  return pairs;
}

/** The names on an edge without a last one that heads totals. */
function withoutTotal(names: readonly string[]): readonly string[] {
  let last = names.length - 1;
  while (last > 0 && names[last] === '') last--;
  return last > 0 && nameKey(names[last]) === TOTAL ? names.slice(0, last) : names;
}

/** A name on an edge; '' for a blank one. */
function edgeName(cell: unknown, row: number, column: number): string {
  const plain = plainCell(cell);
  if (errorCode(plain) !== null) throw fault(row, column === 0 ? 'Duty' : `number ${column + 1}`, plain, 'a name');
  return isBlankName(plain) ? '' : cleanName(cellText(plain));
}

function isMark(cell: unknown, row: number, person: string): boolean {
  if (errorCode(cell) !== null) throw fault(row, person, cell, 'a rank, a mark, or nothing');
  if (isBlank(cell) || cell === false) return false;
  const key = nameKey(cellText(cell));
  return key !== 'no' && key !== '0' && key !== 'false';
}

function rankOf(cell: unknown, row: number, person: string): number | null {
  const read = readWhole(cell, 1);
  if (read.kind === 'number') return read.value;
  if (typeof cell === 'number') throw fault(row, person, cell, 'a rank, a whole number from 1 to 1,000,000');
  return null;
}

function fault(row: number, column: string, cell: unknown, expected: string): InputFault {
  return new InputFault({ table: 'Grid', row, column, found: quoteCell(cell), expected });
}

function tooNarrow(width: number): InputFault {
  return new InputFault({
    table: 'Grid',
    row: null,
    column: null,
    found: `${width} ${width === 1 ? 'column' : 'columns'}`,
    expected: 'duties in the first column and at least one person beside it',
  });
}
