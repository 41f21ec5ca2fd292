import { LAST_PRIORITY, type Interval } from '../cover/case';
import { errorCode, isBlank } from './cell';
import { nameKey, cleanName, type Names } from './name';
import type { Range } from './range';
import { readOneNumber } from './readPeople';
import type { Report } from './report';
import { isOneNumber, openTable, rowsOf, type Layout, type Row } from './table';

const LAYOUT: Layout = {
  table: 'Duties',
  keys: ['Duty'],
  columns: ['Duty', 'Need', 'Priority', 'Slot'],
  byHeading: ['Group', 'Start', 'End', 'Load'],
  required: ['Duty'],
};

const MINUTES_A_DAY = 24 * 60;

/** What is said of one duty, rows given twice combined. */
export interface DutyEntry {
  need: number;
  priority: number;
  load: number;
  readonly slots: Set<string>;
  readonly groups: Set<string>;
  readonly times: Interval[];
  /** The row that named the duty first. */
  readonly row: number;
}

/** The duties table: one entry a name, by its number; or one need for every duty in pairs. */
export type DutiesTable =
  | { readonly kind: 'table'; readonly entries: readonly DutyEntry[] }
  | { readonly kind: 'every'; readonly need: number };

/** A duty of which nothing is said. */
export function plainDuty(need: number): DutyEntry {
  return { need, priority: LAST_PRIORITY, load: 1, slots: new Set(), groups: new Set(), times: [], row: 0 };
}

/**
 * Reads duties; names are numbered in table order.
 *
 * @param labels is given every slot and group with its first spelling
 */
export function readDuties(range: Range | null, duties: Names, labels: Map<string, string>, report: Report): DutiesTable {
  if (range === null) return { kind: 'every', need: 1 };
  if (isOneNumber(range)) return { kind: 'every', need: readOneNumber(LAYOUT, 'Need', range, report) };
  const entries: DutyEntry[] = [];
  const table = openTable(range, LAYOUT, report);
  if (table === null) return { kind: 'every', need: 1 };
  for (const row of rowsOf(table, report)) {
    const name = row.text('Duty');
    // What cannot be read is reported in a row without a name too, but its labels name nothing.
    const entry = readEntry(row, name === '' ? new Map<string, string>() : labels);
    if (name === '') {
      if (!row.isBroken) row.find('Incomplete row', 'The row names no duty and is left out.');
      continue;
    }
    const number = duties.number(name);
    if (number === entries.length) entries.push(entry);
    else combine(entries[number], entry, duties.names[number], row);
  }
  return { kind: 'table', entries };
}

function readEntry(row: Row, labels: Map<string, string>): DutyEntry {
  return {
    need: row.whole('Need', 0, 1),
    priority: row.whole('Priority', 1, LAST_PRIORITY),
    load: row.whole('Load', 0, 1),
    slots: readLabel(row, 'Slot', labels),
    groups: readLabel(row, 'Group', labels),
    times: readTimes(row),
    row: row.number,
  };
}

function readLabel(row: Row, column: string, labels: Map<string, string>): Set<string> {
  const text = row.text(column);
  if (text === '') return new Set();
  const key = nameKey(text);
  if (!labels.has(key)) labels.set(key, cleanName(text));
  return new Set([key]);
}

/** Start and End as minutes; an End at or before its Start is on the next day. */
function readTimes(row: Row): Interval[] {
  const start = readMinutes(row, 'Start');
  const end = readMinutes(row, 'End');
  if (start === undefined || end === undefined) return [];
  // Older desktops hand over blank cells as 0.
  if ((start ?? 0) === 0 && (end ?? 0) === 0) return [];
  if (start === null || end === null) {
    const missing = start === null ? 'Start' : 'End';
    row.fault(missing, row.cell(missing), 'a date and time here too, or both Start and End blank');
    return [];
  }
  let last = end;
  if (last <= start) last += MINUTES_A_DAY;
  if (last > start) return [{ start, end: last }];
  row.fault('End', row.cell('End'), 'an End on the day of the Start or the day after it');
  return [];
}

/** Minutes of a serial date-time or time; null where blank; undefined, with a fault reported, where it is none. */
function readMinutes(row: Row, column: string): number | null | undefined {
  const cell = row.cell(column);
  if (isBlank(cell)) return null;
  if (errorCode(cell) !== null) return undefined;
  if (typeof cell === 'number' && cell >= 0 && cell < 3_000_000) return Math.round(cell * MINUTES_A_DAY);
  row.fault(column, cell, 'a date and time, or a time, as a cell value and not as text');
  return undefined;
}

/** Of two rows about one duty, the stricter number counts, and every label and time. */
function combine(entry: DutyEntry, other: DutyEntry, name: string, row: Row): void {
  row.find(
    'Row given twice',
    `${name} stands in row ${entry.row} already; of each number the stricter one counts, and every slot and group.`,
  );
  entry.need = Math.max(entry.need, other.need);
  entry.priority = Math.min(entry.priority, other.priority);
  entry.load = Math.max(entry.load, other.load);
  for (const key of other.slots) entry.slots.add(key);
  for (const key of other.groups) entry.groups.add(key);
  for (const time of other.times) {
    if (!entry.times.some(({ start, end }) => start === time.start && end === time.end)) entry.times.push(time);
  }
}
