import { DEFAULT_ORDER as AIMS, type Aim } from '../cover/case';
import { isBlank } from './cell';
import { cleanName, nameKey } from './name';
import { wholeExpected } from './number';
import type { Range } from './range';
import type { Report } from './report';
import { openTable, rowsOf, type Layout, type Row } from './table';

const LAYOUT: Layout = {
  table: 'Rules',
  keys: ['Rule'],
  columns: ['Rule', 'Duty', 'Person', 'Value'],
  byHeading: [],
  required: ['Rule', 'Duty', 'Person'],
};

/** The longest time an exact search may be given: one hour. */
const MOST_SECONDS = 3600;

/** A rule as written; names are cleaned texts, looked up later. */
export type Rule = { readonly row: number } & (
  | { readonly word: 'Fixed' | 'Barred'; readonly duty: string; readonly person: string }
  | { readonly word: 'Away'; readonly person: string; readonly label: string }
  | { readonly word: 'Limit'; readonly label: string; readonly person: string; readonly most: number }
  | { readonly word: 'Clash' | 'Together'; readonly duty: string; readonly other: string }
  | { readonly word: 'Order'; readonly aims: readonly Aim[] }
  | { readonly word: 'Price'; readonly what: 'place' | 'eligibility'; readonly price: number | null }
  | { readonly word: 'Rest'; readonly minutes: number }
  | { readonly word: 'Seconds'; readonly seconds: number }
);

const READERS: Record<Rule['word'], (row: Row) => Rule | null> = {
  Fixed: (row) => readSeat(row, 'Fixed'),
  Barred: (row) => readSeat(row, 'Barred'),
  Away: readAway,
  Limit: readLimit,
  Clash: (row) => readTwoDuties(row, 'Clash'),
  Together: (row) => readTwoDuties(row, 'Together'),
  Order: readOrder,
  Price: readPrice,
  Rest: (row) => {
    const minutes = readValue(row, 0, 'Rest needs the fewest minutes between two duties');
    return minutes === null ? null : { word: 'Rest', minutes, row: row.number };
  },
  Seconds: (row) => {
    const seconds = readValue(row, 1, 'Seconds needs the time an exact search may take', MOST_SECONDS);
    return seconds === null ? null : { word: 'Seconds', seconds, row: row.number };
  },
};

const WORDS = new Map(Object.keys(READERS).map((word) => [nameKey(word), word as Rule['word']]));

/** Reads rules in row order. A row that is not a whole rule is a fault: a rule must not be dropped unseen. */
export function readRules(range: Range, report: Report): Rule[] {
  const table = openTable(range, LAYOUT, report);
  const rules: Rule[] = [];
  for (const row of table === null ? [] : rowsOf(table, report)) {
    if (row.isBroken) continue;
    const word = WORDS.get(nameKey(row.text('Rule')));
    if (word === undefined) {
      row.fault('Rule', row.cell('Rule'), `one of the words ${[...WORDS.values()].join(', ')}`);
      continue;
    }
    const rule = READERS[word](row);
    if (rule !== null) rules.push(rule);
  }
  return rules;
}

/** A text the rule needs; '' with a fault reported where it is blank. */
function need(row: Row, column: string, expected: string): string {
  const text = cleanName(row.text(column));
  if (text === '') row.fault(column, row.cell(column), expected);
  return text;
}

function readSeat(row: Row, word: 'Fixed' | 'Barred'): Rule | null {
  const duty = need(row, 'Duty', `the duty that ${word} is about`);
  const person = need(row, 'Person', `the person that ${word} is about`);
  return duty === '' || person === '' ? null : { word, duty, person, row: row.number };
}

function readAway(row: Row): Rule | null {
  const person = need(row, 'Person', 'the person who is Away');
  const label = need(row, 'Value', 'the slot or group in which the person is Away');
  return person === '' || label === '' ? null : { word: 'Away', person, label, row: row.number };
}

function readLimit(row: Row): Rule | null {
  const label = need(row, 'Duty', 'the slot or group that Limit is about');
  const most = readValue(row, 0, 'Limit needs the most duties of it one person may hold');
  if (label === '' || most === null) return null;
  return { word: 'Limit', label, person: cleanName(row.text('Person')), most, row: row.number };
}

function readTwoDuties(row: Row, word: 'Clash' | 'Together'): Rule | null {
  const duty = need(row, 'Duty', `the first of the two duties that ${word} is about`);
  const other = need(row, 'Value', `the second of the two duties that ${word} is about`);
  if (duty === '' || other === '') return null;
  if (nameKey(duty) !== nameKey(other)) return { word, duty, other, row: row.number };
  row.fault('Value', row.cell('Value'), 'a duty other than the one in the Duty column');
  return null;
}

function readOrder(row: Row): Rule | null {
  const expected = `a list of ${AIMS.join(', ')}, each at most once`;
  const words = nameKey(need(row, 'Value', expected)).split(/[\s,;]+/u).filter(Boolean);
  if (words.length === 0) return null;
  const aims = words.filter((word): word is Aim => AIMS.some((aim) => aim === word));
  if (aims.length < words.length || new Set(aims).size < aims.length) {
    row.fault('Value', row.cell('Value'), expected);
    return null;
  }
  return { word: 'Order', aims: [...aims, ...AIMS.filter((aim) => !aims.includes(aim))], row: row.number };
}

function readPrice(row: Row): Rule | null {
  const what = nameKey(row.text('Duty'));
  if (what !== 'place' && what !== 'eligibility') {
    row.fault('Duty', row.cell('Duty'), 'place or eligibility, the change that the price is for');
    return null;
  }
  if (isBlank(row.cell('Value'))) return { word: 'Price', what, price: null, row: row.number };
  return { word: 'Price', what, price: row.whole('Value', 0, 0), row: row.number };
}

/** The number in Value, which the rule cannot do without. */
function readValue(row: Row, least: number, why: string, most?: number): number | null {
  if (!isBlank(row.cell('Value'))) return row.whole('Value', least, 0, most);
  row.fault('Value', row.cell('Value'), `${wholeExpected(least, most)}: ${why}`);
  return null;
}
