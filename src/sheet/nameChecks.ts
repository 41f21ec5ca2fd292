import type { Case, Label } from '../cover/case';
import type { TableName } from './fault';
import type { Names } from './name';
import { essence, NearMisses } from './nearMiss';
import type { PairRows } from './readPairs';
import type { Report } from './report';

/** Names that rows may use: the first `listed` of `names`; what it means for a row to use another. */
export interface Listing {
  readonly kind: 'duty' | 'person';
  readonly names: Names;
  readonly listed: number;
  /** Where the names are listed, as in "is not in the duties table". */
  readonly where: string;
  /** What becomes of a row with another name. */
  readonly effect: string;
}

/** Rows whose duty or person is not listed, by name: found once a name, with what it may mean. */
export function findStrays(table: TableName, rows: PairRows, listing: Listing, report: Report): void {
  const { kind, names, listed, where, effect } = listing;
  const numbers = kind === 'duty' ? rows.duty : rows.person;
  const strays = new Map<number, { readonly row: number; count: number }>();
  for (let i = 0; i < rows.count; i++) {
    if (numbers[i] < listed) continue;
    const stray = strays.get(numbers[i]);
    if (stray === undefined) strays.set(numbers[i], { row: rows.row[i], count: 1 });
    else stray.count++;
  }
  const near = new NearMisses(() => names.names.slice(0, listed));
  const finding = kind === 'duty' ? 'Duty not listed' : 'Person not listed';
  for (const [number, { row, count }] of strays) {
    const name = names.names[number];
    const rowsMore = count === 1 ? '' : ` (${count} rows)`;
    report.find(table, row, finding, `"${name}" is not in ${where}${rowsMore}: ${effect}.${near.question(name)}`);
  }
}

/** Listed names, or labels, that are almost the same: one of them is probably a slip of the pen. */
export function findTwins(
  table: TableName,
  what: string,
  entries: readonly Label[],
  rowOf: (index: number) => number | null,
  report: Report,
): void {
  const first = new Map<string, string>();
  entries.forEach(({ name, key }, i) => {
    const kernel = essence(key);
    const twin = first.get(kernel);
    if (kernel === '') return;
    if (twin === undefined) first.set(kernel, name);
    else report.find(table, rowOf(i), 'Almost the same', `The ${what} "${twin}" and "${name}" are taken as two different ones.`);
  });
}

/** Duties that need someone and that no pair names. */
export function findUnusedDuties(
  { duties, pairs, fixed }: Case,
  rowOf: (duty: number) => number | null,
  report: Report,
): void {
  const used = new Set(fixed.map(({ duty }) => duty));
  for (let i = 0; i < pairs.count; i++) used.add(pairs.duty[i]);
  duties.forEach(({ name, need }, d) => {
    if (used.has(d) || need === 0) return;
    report.find('Duties', rowOf(d), 'Duty without pairs', `Nobody is listed in the pairs for "${name}".`);
  });
}

/** People of the table who have room and whom no pair names. */
export function findUnusedPeople(
  { people, pairs, fixed }: Case,
  rowOf: (person: number) => number | null,
  report: Report,
): void {
  const used = new Set(fixed.map(({ person }) => person));
  for (let i = 0; i < pairs.count; i++) used.add(pairs.person[i]);
  people.forEach(({ name, listed, maximum }, p) => {
    if (used.has(p) || !listed || maximum === 0) return;
    report.find('People', rowOf(p), 'Person without pairs', `"${name}" is listed for no duty in the pairs.`);
  });
}
