import { isBlank } from './cell';
import { cleanName, type Names } from './name';
import type { Range } from './range';
import type { Report } from './report';
import { isOneNumber, openTable, Row, rowsOf, type Layout } from './table';

const LAYOUT: Layout = {
  table: 'People',
  keys: ['Person'],
  columns: ['Person', 'Maximum', 'Minimum', 'Stretch'],
  byHeading: ['Carried'],
  required: ['Person', 'Maximum'],
};

/** The numbers of one person, rows given twice combined. */
export interface PersonEntry {
  maximum: number;
  minimum: number;
  stretch: number;
  carried: number;
  /** The row that named the person first. */
  readonly row: number;
}

/** The people table: one entry a name, by its number; or one maximum for everyone. */
export type PeopleTable =
  | { readonly kind: 'table'; readonly entries: readonly PersonEntry[] }
  | { readonly kind: 'everyone'; readonly maximum: number };

/** Reads people; names are numbered in table order. */
export function readPeople(range: Range, people: Names, report: Report): PeopleTable {
  if (isOneNumber(range)) return { kind: 'everyone', maximum: readOneNumber(LAYOUT, 'Maximum', range, report) };
  const entries: PersonEntry[] = [];
  const table = openTable(range, LAYOUT, report);
  if (table === null) return { kind: 'everyone', maximum: 0 };
  for (const row of rowsOf(table, report)) {
    const name = row.text('Person');
    const entry = readEntry(row);
    if (name === '') {
      if (!row.isBroken) row.find('Incomplete row', 'The row names no person and is left out.');
      continue;
    }
    if (isBlank(row.cell('Maximum'))) {
      row.find('Blank maximum', `The maximum of ${cleanName(name)} is blank and is read as 0.`);
    }
    const number = people.number(name);
    if (number === entries.length) entries.push(entry);
    else combine(entries[number], entry, people.names[number], row);
  }
  entries.forEach(({ maximum, minimum, row }, p) => {
    if (minimum > maximum) {
      const detail = `${people.names[p]} should hold at least ${minimum} and at most ${maximum}; the difference counts as missed.`;
      report.find('People', row, 'Minimum above maximum', detail);
    }
  });
  return { kind: 'table', entries };
}

function readEntry(row: Row): PersonEntry {
  return {
    maximum: row.whole('Maximum', 0, 0),
    minimum: row.whole('Minimum', 0, 0),
    stretch: row.whole('Stretch', 0, 1),
    carried: row.whole('Carried', 0, 0),
    row: row.number,
  };
}

/** Of two rows about one person, the stricter number counts. */
function combine(entry: PersonEntry, other: PersonEntry, name: string, row: Row): void {
  row.find('Row given twice', `${name} stands in row ${entry.row} already; of each number the stricter one counts.`);
  entry.maximum = Math.min(entry.maximum, other.maximum);
  entry.minimum = Math.max(entry.minimum, other.minimum);
  entry.stretch = Math.min(entry.stretch, other.stretch);
  entry.carried = Math.max(entry.carried, other.carried);
}

/** Reads the one number of a range that is one number; 0, with a fault reported, where it is no whole number. */
export function readOneNumber(layout: Layout, column: string, range: Range, report: Report): number {
  const table = { table: layout.table, range, first: 0, end: 1, places: new Map([[column, 0]]) };
  const [row] = rowsOf(table, report);
  return (row ?? new Row(table, 0, report)).whole(column, 0, 0);
}
