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
  const unique = uniqueRows(kept, 'Pairs', duties, people, report);
  const pairs = {
    count: unique.length,
    duty: new Int32Array(unique.length),
    person: new Int32Array(unique.length),
    rank: new Int32Array(unique.length),
  };
  const rankOf = (i: number): number => (kept.rank[i] === NO_RANK ? worst + 1 : kept.rank[i]);
  unique.forEach((group, k) => {
    pairs.duty[k] = kept.duty[group[0]];
    pairs.person[k] = kept.person[group[0]];
    pairs.rank[k] = ranked ? Math.min(...group.map(rankOf)) : 0;
  });
  return { pairs, ranked };
}

/** The plan in force as seats of the case, sorted, each once. */
export function caseSeats(rows: PairRows, duties: Directory, people: Directory, report: Report): Seat[] {
  const kept = inCase(rows, duties, people);
  return uniqueRows(kept, 'Current', duties, people, report).map(([i]) => ({ duty: kept.duty[i], person: kept.person[i] }));
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

/** Sorted rows, those of one duty and person together; what is repeated is found. */
function uniqueRows(rows: PairRows, table: TableName, duties: Directory, people: Directory, report: Report): number[][] {
  const groups: number[][] = [];
  for (const i of sortRows(rows, duties.rank, people.rank)) {
    const group = groups.length > 0 ? groups[groups.length - 1] : null;
    if (group === null || rows.duty[group[0]] !== rows.duty[i] || rows.person[group[0]] !== rows.person[i]) {
      groups.push([i]);
      continue;
    }
    group.push(i);
    const duty = duties.names.names[duties.fromCase[rows.duty[i]]];
    const person = people.names.names[people.fromCase[rows.person[i]]];
    report.find(table, rows.row[i], 'Row given twice', `${duty} with ${person} stands in row ${rows.row[group[0]]} already.`);
  }
  return groups;
}
