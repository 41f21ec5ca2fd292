import { cellText, errorCode, isBlank, isBlankName, quoteCell } from './cell';
import { cleanName, nameKey } from './name';
import { readWhole } from './number';
import { InputFault } from './fault';
import type { Range } from './range';

/** A pair read from a cross table; rank null where the mark is no number. */
export interface GridPair {
  readonly duty: string;
  readonly person: string;
  readonly rank: number | null;
}

/** The word on the edges of a table that DUTY.GRID spilled: its totals are no pairs. */
const TOTAL = nameKey('Total');

/**
 * Reads a cross table: duties down the first column, people across the first row. A number is a
 * rank, any other mark a pair; blank, `no` and 0 are none.
 *
 * @throws InputFault at the first error cell, at a number that is no rank, or where there is no second column
 */
export function readGrid(range: Range): GridPair[] {
  const [people = [], ...rows] = range;
  if (people.length < 2) {
    throw new InputFault({
      table: 'Grid',
      row: null,
      column: null,
      found: `${people.length} ${people.length === 1 ? 'column' : 'columns'}`,
      expected: 'duties in the first column and at least one person beside it',
    });
  }
  const names = people.map((cell, c) => (c === 0 ? '' : edgeName(cell, 1, c)));
  const pairs: GridPair[] = [];
  rows.forEach((row, r) => {
    const duty = edgeName(row[0], r + 2, 0);
    if (duty === '') return;
    names.forEach((person, c) => {
      if (person !== '' && isMark(row[c], r + 2, person)) pairs.push({ duty, person, rank: rankOf(row[c], r + 2, person) });
    });
  });
  return pairs;
}

/** A name on an edge; '' for a blank one and for totals. */
function edgeName(cell: unknown, row: number, column: number): string {
  if (errorCode(cell) !== null) throw fault(row, column === 0 ? 'Duty' : `number ${column + 1}`, cell, 'a name');
  if (isBlankName(cell)) return '';
  const name = cleanName(cellText(cell));
  return nameKey(name) === TOTAL ? '' : name;
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
