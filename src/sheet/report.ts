import { InputFault, type FaultPlace, type Finding, type TableName } from './fault';

/** Findings of one kind in one table that are listed before the rest is only counted. */
const LISTED = 1000;

/** Cells of one column that cannot be read and are listed one by one before the rest is only counted. */
const FAULTS_LISTED = 10_000;

/** More rows than a sheet has. */
const LAST_ROW = 2_000_000;

const TABLES: readonly TableName[] = ['Pairs', 'People', 'Duties', 'Rules', 'Current', 'Plan', 'Grid'];

/** Collects what is wrong and what is odd while tables are read, in whatever order they are read. */
export class Report {
  readonly #faults: InputFault[] = [];
  readonly #findings: Finding[] = [];
  readonly #counts = new Map<string, number>();
  readonly #faultCounts = new Map<string, { place: FaultPlace; count: number }>();

  fault(place: FaultPlace): void {
    const kind = `${place.table} ${place.column}`;
    const entry = this.#faultCounts.get(kind) ?? { place, count: 0 };
    this.#faultCounts.set(kind, entry);
    if (++entry.count <= FAULTS_LISTED) this.#faults.push(new InputFault(place));
  }

  find(table: TableName, row: number | null, finding: string, detail: string): void {
    const kind = `${table} ${finding}`;
    const count = (this.#counts.get(kind) ?? 0) + 1;
    this.#counts.set(kind, count);
    if (count <= LISTED) this.#findings.push({ table, row, finding, detail });
  }

  /** The faults in the order of the tables, then of the rows; what was too much to list is counted. */
  faults(): InputFault[] {
    const rest = [...this.#faultCounts.values()]
      .filter(({ count }) => count > FAULTS_LISTED)
      .map(({ place, count }) => new InputFault({ ...place, row: null, found: `${count - FAULTS_LISTED} more cells like these` }));
    return [...this.#faults, ...rest]
      .map((fault) => ({ fault, table: fault.place.table, row: fault.place.row }))
      .sort(byPlace)
      .map(({ fault }) => fault);
  }

  /** The findings in the same order; what was too much to list is counted at the end of its table. */
  findings(): Finding[] {
    const all = [...this.#findings];
    for (const [kind, count] of this.#counts) {
      if (count <= LISTED) continue;
      const { table, finding } = all.find((entry) => `${entry.table} ${entry.finding}` === kind)!;
      all.push({ table, row: LAST_ROW + 1, finding, detail: `And ${count - LISTED} more of this kind.` });
    }
    return all.sort(byPlace).map((entry) => (entry.row === LAST_ROW + 1 ? { ...entry, row: null } : entry));
  }
}

interface Place {
  readonly table: TableName;
  readonly row: number | null;
}

/** What is said of a whole table comes after its rows. */
function rowOf({ row }: Place): number {
  return row ?? LAST_ROW;
}

function byPlace(a: Place, b: Place): number {
  return TABLES.indexOf(a.table) - TABLES.indexOf(b.table) || rowOf(a) - rowOf(b);
}
