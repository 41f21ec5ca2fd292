import type { Case } from '../cover/case';
import type { Directory } from './directory';
import { essence, NearMisses } from './nearMiss';
import type { TableName } from './fault';
import type { PairRows } from './readPairs';
import type { Report } from './report';

/** Names that are not listed, beyond which none is compared with the listed ones. */
const COMPARED = 300;

/** Where a name that is not listed stands. */
interface Strays {
  readonly row: number;
  count: number;
}

/** Rows whose duty or person (`kind`) is not listed, by name: found once a name, with what it may mean. */
export function findStrays(
  table: TableName,
  kind: 'duty' | 'person',
  rows: PairRows,
  directory: Directory,
  listed: number,
  report: Report,
): void {
  const numbers = kind === 'duty' ? rows.duty : rows.person;
  const strays = new Map<number, Strays>();
  for (let i = 0; i < rows.count; i++) {
    if (numbers[i] < listed) continue;
    const stray = strays.get(numbers[i]);
    if (stray === undefined) strays.set(numbers[i], { row: rows.row[i], count: 1 });
    else stray.count++;
  }
  if (strays.size === 0) return;
  const near = new NearMisses(directory.names.names.slice(0, listed));
  const listedIn = kind === 'duty' ? 'the duties table' : 'the people table';
  const effect = kind === 'duty' ? 'the row is left out' : 'the maximum is taken as 0';
  let compared = 0;
  for (const [number, { row, count }] of strays) {
    const name = directory.names.names[number];
    const question = compared++ < COMPARED ? near.question(name) : '';
    const rowsMore = count === 1 ? '' : ` (${count} rows)`;
    const finding = kind === 'duty' ? 'Duty not listed' : 'Person not listed';
    report.find(table, row, finding, `"${name}" is not in ${listedIn}${rowsMore}: ${effect}.${question}`);
  }
}

/** Listed names, and labels, that are almost the same: one of them is probably a slip of the pen. */
export function findTwins(table: TableName, what: string, names: readonly string[], keys: readonly string[], report: Report): void {
  const first = new Map<string, string>();
  names.forEach((name, i) => {
    const kernel = essence(keys[i]);
    const twin = first.get(kernel);
    if (kernel === '') return;
    if (twin === undefined) first.set(kernel, name);
    else report.find(table, null, 'Almost the same', `The ${what} "${twin}" and "${name}" are taken as two different ones.`);
  });
}

/** Duties that need someone and that no pair names. */
export function findUnusedDuties({ duties, pairs, fixed }: Case, report: Report): void {
  const used = new Set(fixed.map(({ duty }) => duty));
  for (let i = 0; i < pairs.count; i++) used.add(pairs.duty[i]);
  duties.forEach(({ name, need }, d) => {
    if (used.has(d) || need === 0) return;
    report.find('Duties', null, 'Duty without pairs', `Nobody is listed in the pairs for "${name}".`);
  });
}

/** People of the table who have room and whom no pair names. */
export function findUnusedPeople({ people, pairs, fixed }: Case, report: Report): void {
  const used = new Set(fixed.map(({ person }) => person));
  for (let i = 0; i < pairs.count; i++) used.add(pairs.person[i]);
  people.forEach(({ name, listed, maximum }, p) => {
    if (used.has(p) || !listed || maximum === 0) return;
    report.find('People', null, 'Person without pairs', `"${name}" is listed for no duty in the pairs.`);
  });
}
