import type { Pairs, Seat } from '../cover/case';
import type { Directory } from './directory';
import type { TableName } from './fault';
import { NO_RANK, sortRows, type PairRows } from './readPairs';
import type { Report } from './report';

/** The pairs of a case from the rows of the table: numbered as in the case, sorted, each once. */
export function casePairs(
  rows: PairRows,
  duties: Directory,
  people: Directory,
  report: Report,
): { pairs: Pairs; ranked: boolean } {
  const kept = inCase(rows, duties, people);
  let worst = -1;
  for (let i = 0; i < kept.count; i++) worst = Math.max(worst, kept.rank[i]);
  const ranked = worst >= 0;
  const { sorted, starts } = uniqueRows(kept, 'Pairs', duties, people, report);
  const count = starts.length - 1;
  const pairs = {
    count,
    duty: new Int32Array(count),
    person: new Int32Array(count),
    rank: new Int32Array(count),
  };
  for (let k = 0; k < count; k++) {
    pairs.duty[k] = kept.duty[sorted[starts[k]]];
    pairs.person[k] = kept.person[sorted[starts[k]]];
    if (!ranked) continue;
    let best = worst + 1;
    for (let i = starts[k]; i < starts[k + 1]; i++) {
      const rank = kept.rank[sorted[i]];
      if (rank !== NO_RANK) best = Math.min(best, rank);
    }
    pairs.rank[k] = best;
  }
  return { pairs, ranked };
}

/** The plan in force as seats of the case, sorted, each once. */
export function caseSeats(rows: PairRows, duties: Directory, people: Directory, report: Report): Seat[] {
  const kept = inCase(rows, duties, people);
  const { sorted, starts } = uniqueRows(kept, 'Current', duties, people, report);
  return Array.from(starts.subarray(0, -1), (start) => {
    const i = sorted[start];
    return { duty: kept.duty[i], person: kept.person[i] };
  });
}

/** The rows whose duty and person are in the case, with the numbers they have there. */
function inCase(rows: PairRows, duties: Directory, people: Directory): PairRows {
  const kept: PairRows = {
    count: 0,
    duty: new Int32Array(rows.count),
    person: new Int32Array(rows.count),
    rank: new Int32Array(rows.count),
    row: new Int32Array(rows.count),
  };
  for (let i = 0; i < rows.count; i++) {
    const duty = duties.inCase[rows.duty[i]];
    const person = people.inCase[rows.person[i]];
    if (duty === -1 || person === -1) continue;
    const k = kept.count++;
    kept.duty[k] = duty;
    kept.person[k] = person;
    kept.rank[k] = rows.rank[i];
    kept.row[k] = rows.row[i];
  }
  return kept;
}

/** Rows in sorted order: those of the k-th pair are sorted[starts[k]] .. sorted[starts[k + 1] - 1]. */
interface UniqueRows {
  readonly sorted: Int32Array;
  readonly starts: Int32Array;
}

/** Sorts the rows and brings those of one duty and person together; what is repeated is found. */
function uniqueRows(
  rows: PairRows,
  table: TableName,
  duties: Directory,
  people: Directory,
  report: Report,
): UniqueRows {
  const sorted = sortRows(rows, duties.rank, people.rank);
  const starts = new Int32Array(sorted.length + 1);
  let count = 0;
  let first = -1;
  sorted.forEach((i, at) => {
    if (first === -1 || rows.duty[first] !== rows.duty[i] || rows.person[first] !== rows.person[i]) {
      starts[count++] = at;
      first = i;
      return;
    }
    const duty = duties.names.names[duties.fromCase[rows.duty[i]]];
    const person = people.names.names[people.fromCase[rows.person[i]]];
    report.find(table, rows.row[i], 'Row given twice', `${duty} with ${person} stands in row ${rows.row[first]} already.`);
  });
  starts[count] = sorted.length;
  return { sorted, starts: starts.subarray(0, count + 1) };
}
