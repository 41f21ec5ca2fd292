import { columnLetters, formatAddress, parseAddress, parseReference, parseZone } from '../host/address';
import type { DraftCell, WorkbookPort } from '../host/port';
import { cellText } from '../sheet/cell';
import { nameKey } from '../sheet/name';
import type { Range } from '../sheet/range';

const COLUMNS = ['Rule', 'Duty', 'Person', 'Value'] as const;

/** A decision that stands in the rules table. */
export interface Decision {
  readonly word: 'Fixed' | 'Barred';
  readonly duty: string;
  readonly person: string;
  /** The cells of its rule, duty, person and value. */
  readonly cells: readonly string[];
}

/**
 * The arguments of the first call of one of our functions in a formula, as they are written there.
 * @returns null where there is none
 */
export function argumentsOf(formula: string): string[] | null {
  const start = /DUTY[._][A-Z]+\(/iu.exec(formula);
  if (start === null) return null;
  const list: string[] = [];
  let depth = 0;
  let from = start.index + start[0].length;
  let quote = '';
  for (let i = from; i < formula.length; i++) {
    const letter = formula[i];
    if (quote !== '') {
      if (letter === quote) quote = '';
    } else if (letter === '"' || letter === "'") quote = letter;
    else if (letter === '(' || letter === '{') depth++;
    else if ((letter === ')' || letter === '}') && depth > 0) depth--;
    else if ((letter === ',' && depth === 0) || letter === ')') {
      list.push(formula.slice(from, i).trim());
      from = i + 1;
      if (letter === ')') return list;
    }
  }
  // A call that does not end is none.
  return null;
}

/**
 * The reference of an argument of a case, by its place from 0, as it can be read from anywhere: a range
 * on the formula's own sheet is given that sheet's name.
 * @returns null where the formula gives none
 */
export async function argumentAt(port: WorkbookPort, cell: string, place: number): Promise<string | null> {
  const [formula] = await port.formulasAt([cell]);
  const argument = formula === null ? undefined : argumentsOf(formula)?.[place];
  if (argument === undefined || argument === '') return null;
  const cells = argument.replaceAll('$', '').replace(/#$/u, '');
  const sheet = parseAddress(cell)?.sheet;
  return sheet !== undefined && parseReference(cells, 0) !== null ? formatAddress({ sheet, cell: cells }) : argument;
}

/** The decisions that stand in the rules of a case, in the order of their rows. */
export async function decisionsOf(port: WorkbookPort, cell: string): Promise<Decision[]> {
  const reference = await argumentAt(port, cell, RULES);
  const block = reference === null ? null : await port.read(reference);
  if (block === null) return [];
  const { sheet, cell: cells } = parseAddress(block.address)!;
  const { top, left } = parseZone(cells)!;
  const place = placesOf(block.values);
  return block.values.flatMap((row, r): Decision[] => {
    const [rule, duty, person] = COLUMNS.map((_, i) => cellText(row[place[i]]));
    const word = (['Fixed', 'Barred'] as const).find((one) => nameKey(one) === nameKey(rule));
    if (word === undefined) return [];
    const own = place.filter((c) => c < row.length).map((c) => formatAddress({ sheet, cell: `${columnLetters(left + c)}${top + r + 1}` }));
    return [{ word, duty, person, cells: own }];
  });
}

/**
 * Writes a decision into the rules of a case.
 * @returns how it went, in words
 */
export async function decide(port: WorkbookPort, cell: string, word: Decision['word'], duty: string, person: string): Promise<string> {
  const reference = await argumentAt(port, cell, RULES);
  if (reference === null) {
    return 'This case has no rules table to write into. Give its formulas one as the fourth argument, with the headings Rule, Duty, Person, Value.';
  }
  const block = await port.read(reference);
  if (block === null) return `"${reference}" is no range that can be written into.`;
  const row: DraftCell[] = Array.from({ length: Math.max(4, block.values[0]?.length ?? 0) }, () => null);
  const place = placesOf(block.values);
  [word, duty, person].forEach((text, i) => (row[place[i]] = text));
  const address = await port.appendRow(reference, row);
  if (address === null) return `The rules table ${reference} has no blank row left. Insert one inside it, or let the formulas take a longer range, then press again.`;
  return `${word}: ${person}, ${duty}. It stands in ${address} and can be taken away there or below.`;
}

/** Takes a decision away, and leaves what else stands in its row. */
export async function undecide(port: WorkbookPort, cell: string, decision: Decision): Promise<string> {
  const { word, duty, person, cells } = decision;
  // Rows may have moved since the decision was read.
  const stands = (await decisionsOf(port, cell)).some((one) => JSON.stringify(one) === JSON.stringify(decision));
  if (!stands) return `${cells[0]} no longer holds this decision: the rules have changed meanwhile. Look again.`;
  for (const own of cells) await port.write(own, [[null]]);
  return `Taken away: ${word}, ${person}, ${duty}.`;
}

/** The rules are the fourth argument. */
const RULES = 3;

/** The columns of Rule, Duty, Person and Value: by heading where there are headings, else by position. */
function placesOf(values: Range): number[] {
  const first = (values[0] ?? []).map((cell) => (typeof cell === 'string' ? nameKey(cell) : ''));
  const hasHeadings = first.includes(nameKey('Rule'));
  return COLUMNS.map((heading, i) => {
    const at = hasHeadings ? first.indexOf(nameKey(heading)) : i;
    return at === -1 ? i : at;
  });
}
