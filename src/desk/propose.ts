import type { Block } from '../host/port';
import { nameKey } from '../sheet/name';
import type { Range } from '../sheet/range';
import { formatAddress, formatZone, parseAddress, parseZone } from '../host/address';
import type { Zone } from '../host/regions';

/** The tables of a case, in the order the functions take them. */
export const ROLES = ['pairs', 'people', 'duties', 'rules', 'current'] as const;
export type Role = (typeof ROLES)[number];

/** A block taken as one of the tables. */
export interface Candidate {
  readonly role: Role;
  readonly block: Block;
  /** As a formula takes it: a name, an address, or a cross table turned into a list. */
  readonly argument: string;
  /** The same as values, for a look at what it would give; a cross table as it stands. */
  readonly values: Range;
  readonly isGrid: boolean;
  /** What must be changed before it can be used; '' where nothing. */
  readonly obstacle: string;
}

/** Headings by what they mean: ours first, then others that people write. */
const WORDS: Readonly<Record<string, readonly string[]>> = {
  Duty: ['duty', 'session', 'shift', 'course', 'task', 'job', 'exam', 'clinic', 'section', 'event', 'class', 'post'],
  Person: ['person', 'name', 'staff', 'who', 'employee', 'member', 'volunteer', 'teacher', 'tutor', 'invigilator', 'doctor', 'nurse'],
  Maximum: ['maximum', 'max', 'capacity', 'most', 'limit', 'how many'],
  Need: ['need', 'needed', 'needs', 'required', 'places', 'seats'],
  Rule: ['rule'],
  Rank: ['rank', 'preference', 'wish'],
  Minimum: ['minimum', 'min', 'fewest'],
  Priority: ['priority', 'urgency'],
  Slot: ['slot', 'time', 'when'],
};

/** The columns of a table by position. */
const POSITIONS: Readonly<Record<Role, readonly string[]>> = {
  pairs: ['Duty', 'Person', 'Rank'],
  people: ['Person', 'Maximum', 'Minimum'],
  duties: ['Duty', 'Need', 'Priority', 'Slot'],
  rules: ['Rule', 'Duty', 'Person', 'Value'],
  current: ['Duty', 'Person'],
};

const CURRENT = /\b(?:current|last|plan|now|in force)\b/iu;

function isCurrent({ name, address }: Block): boolean {
  return CURRENT.test(`${name ?? ''} ${address}`);
}

/** Blank rows inside a table, at most; more of them end it. */
const GAP = 5;

/** Joins what blank rows have parted: a table goes on below them where no new headings begin. */
export function joined(blocks: readonly Block[]): Block[] {
  const parts = blocks.map((block) => ({ block, at: parseAddress(block.address), zone: parseZone(parseAddress(block.address)?.cell ?? '') }));
  const ordered = parts.sort((a, b) => (a.zone?.top ?? 0) - (b.zone?.top ?? 0));
  const result: Block[] = [];
  for (const { block, at, zone } of ordered) {
    const isPlain = block.name === null && at !== null && zone !== null;
    const above = result.findIndex((one) => isPlain && one.name === null && goesOn(one, at.sheet, zone));
    if (above === -1 || candidatesOf(block).length > 0) result.push(block);
    else result[above] = append(result[above], block);
  }
  return result;
}

function goesOn(upper: Block, sheet: string, lower: Zone): boolean {
  const at = parseAddress(upper.address)!;
  const zone = parseZone(at.cell)!;
  const gap = lower.top - zone.bottom - 1;
  const isBelow = gap >= 0 && gap <= GAP && lower.left >= zone.left && lower.right <= zone.right;
  return at.sheet === sheet && isBelow && candidatesOf(upper).length > 0;
}

function append(upper: Block, lower: Block): Block {
  const { sheet, cell } = parseAddress(upper.address)!;
  const [zone, more] = [parseZone(cell)!, parseZone(parseAddress(lower.address)!.cell)!];
  const width = zone.right - zone.left + 1;
  const blank = (): null[] => Array.from({ length: width }, () => null);
  const values = [
    ...upper.values,
    ...Array.from({ length: more.top - zone.bottom - 1 }, blank),
    ...lower.values.map((row) => Array.from({ length: width }, (_, c) => row[c - (more.left - zone.left)] ?? null)),
  ];
  const address = formatAddress({ sheet, cell: formatZone({ ...zone, bottom: more.bottom }) });
  return { name: null, address, values, room: lower.room ?? 0 };
}

/** What a block could be, likeliest first. */
export function candidatesOf(block: Block): Candidate[] {
  const first = block.values[0] ?? [];
  const meanings = first.map(meaningOf);
  const has = (word: string): boolean => meanings.includes(word);
  const roles: Role[] = [];
  if (has('Rule')) roles.push('rules');
  else if (has('Duty') && has('Person')) roles.push(...(isCurrent(block) ? (['current', 'pairs'] as const) : (['pairs', 'current'] as const)));
  else if (has('Person')) roles.push('people');
  else if (has('Duty')) roles.push('duties');
  if (block.values.length < 2 && roles.length > 0) return [];
  const listed = roles.map((role) => asList(block, role, meanings));
  return isGrid(block.values) ? [asGrid(block), ...listed.filter(({ role }) => role !== 'duties')] : listed;
}

/**
 * Which block is which table, as far as headings, shapes and shared names tell.
 *
 * @param blocks what the workbook holds; a block may be part of another one
 */
export function propose(blocks: readonly Block[]): Map<Role, Candidate> {
  const all = joined(blocks).flatMap(candidatesOf);
  const found = new Map<Role, Candidate>();
  const people = all.filter(({ role }) => role === 'people').sort(bySize)[0];
  const turned = all.map((one) => turn(one, people));
  for (const role of ['people', 'pairs', 'duties', 'rules', 'current'] as const) {
    const taken = new Set([...found.values()].map(({ block }) => block.address));
    const free = turned.filter((one) => one.role === role && !taken.has(one.block.address));
    const fitting = free.sort((a, b) => score(b, people) - score(a, people) || bySize(a, b));
    // A plan in force is only proposed where it is called so: it looks like pairs.
    const [best] = role === 'current' ? fitting.filter(({ block }) => isCurrent(block)) : fitting;
    if (best !== undefined) found.set(role, best);
  }
  return found;
}

/** Sharing names with the people is the surest sign of pairs; a list with our headings comes before one without. */
function score({ obstacle, isGrid: grid, values, role, block }: Candidate, people: Candidate | undefined): number {
  const plain = (obstacle === '' ? 2 : 0) + (block.name === null ? 0 : 1);
  if (people === undefined || role !== 'pairs') return plain;
  const known = new Set(people.values.map(([name]) => nameKey(text(name))));
  const names = grid ? (values[0] ?? []).slice(1) : values.flatMap((row) => row);
  const shared = names.filter((name) => text(name) !== '' && known.has(nameKey(text(name)))).length;
  return plain + (shared > 0 ? 10 : 0);
}

/** A cross table with the people down its first column is turned. */
export function turn(one: Candidate, people: Candidate | undefined): Candidate {
  if (!one.isGrid || people === undefined) return one;
  const known = new Set(people.values.map(([name]) => nameKey(text(name))));
  const count = (names: readonly unknown[]): number => names.filter((name) => text(name) !== '' && known.has(nameKey(text(name)))).length;
  if (count(one.values.slice(1).map(([name]) => name)) <= count((one.values[0] ?? []).slice(1))) return one;
  const values = one.values[0].map((_, c) => one.values.map((row) => row[c]));
  return { ...one, values, argument: `DUTY.PAIRS(TRANSPOSE(${referenceTo(one.block)}))` };
}

function bySize(a: Candidate, b: Candidate): number {
  return b.values.length - a.values.length;
}

function meaningOf(cell: unknown): string {
  const key = nameKey(text(cell));
  return Object.keys(WORDS).find((word) => WORDS[word].includes(key)) ?? '';
}

function text(cell: unknown): string {
  return typeof cell === 'string' || typeof cell === 'number' ? String(cell) : '';
}

function asList(block: Block, role: Role, meanings: readonly string[]): Candidate {
  const reference = referenceTo(block);
  const expected = POSITIONS[role];
  const ours = (word: string): boolean => (block.values[0] ?? []).some((cell) => nameKey(text(cell)) === nameKey(word));
  const keys = role === 'pairs' || role === 'current' ? ['Duty', 'Person'] : role === 'people' ? ['Person', 'Maximum'] : [expected[0]];
  const common = { role, block, isGrid: false };
  if (keys.every(ours)) return { ...common, argument: reference, values: block.values, obstacle: '' };
  // Headings of their own: below them the columns are read by position, where they stand as expected.
  const known = meanings.map((word) => word || null);
  const inOrder = known.every((word, i) => word === null || word === expected[i]) && keys.every((word, i) => known[i] === word);
  const below = withoutFirstRow(block);
  if (inOrder && meanings.length <= expected.length) return { ...common, argument: referenceTo(below), values: below.values, obstacle: '' };
  const wrong = (block.values[0] ?? []).flatMap((cell, i) =>
    meanings[i] !== '' && !ours(meanings[i]) && keys.includes(meanings[i]) ? [`"${text(cell)}" to ${meanings[i]}`] : [],
  );
  const missing = keys.filter((word) => !meanings.includes(word));
  const cures = [...(wrong.length > 0 ? [`Rename the heading ${wrong.join(' and ')}`] : []), ...missing.map((word) => `Add a column headed ${word}`)];
  return { ...common, argument: reference, values: block.values, obstacle: `${cures.join('. ')}.` };
}

function withoutFirstRow(block: Block): Block {
  const { sheet, cell } = parseAddress(block.address)!;
  const zone = parseZone(cell)!;
  const address = formatAddress({ sheet, cell: formatZone({ ...zone, top: zone.top + 1 }) });
  return { ...block, name: null, address, values: block.values.slice(1) };
}

/** As a formula takes a table: by its name, or its cells with the blank rows below, which will be typed into. */
function referenceTo({ name, address, room = 0 }: Block): string {
  if (name !== null) return name;
  const { sheet, cell } = parseAddress(address)!;
  const zone = parseZone(cell)!;
  return formatAddress({ sheet, cell: formatZone({ ...zone, bottom: zone.bottom + room }) });
}

/** Names down and across, and marks, ranks or nothing in between. */
function isGrid(values: Range): boolean {
  if (values.length < 3 || values[0].length < 3) return false;
  const across = values[0].slice(1);
  const down = values.slice(1).map(([name]) => name);
  if (![...across, ...down].every((name) => typeof name === 'string' || name === null)) return false;
  if (across.some((cell) => meaningOf(cell) !== '') || across.filter((cell) => text(cell) !== '').length < 2) return false;
  const body = values.slice(1).flatMap((row) => row.slice(1));
  const marks = body.filter((cell) => text(cell) !== '');
  const kinds = new Set(marks.map((cell) => nameKey(text(cell))));
  return marks.length > 0 && kinds.size <= 12 && marks.every((cell) => text(cell).length <= 5);
}

function asGrid(block: Block): Candidate {
  const reference = referenceTo(block);
  return { role: 'pairs', block, argument: `DUTY.PAIRS(${reference})`, values: block.values, isGrid: true, obstacle: '' };
}
