import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, type CaseFunction } from './declaration';
import { seatsByDuty } from './seats';
import type { Solved } from './solved';

const COLUMNS = ['Duty', 'Person', 'Rank', 'Note'];

export const ASSIGN: CaseFunction = {
  id: 'ASSIGN',
  summary: 'Who takes which duty: one row a seat, covering as many seats as possible, the most urgent duties first.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.ASSIGN(Pairs, People, Duties, Rules)',
  ofCase: assign,
};

function assign(solved: Solved) {
  const kase = solved.case;
  const { plan } = solved.solution;
  const rows = seatsByDuty(kase, plan).flatMap((seats, d) => {
    const { name, need } = kase.duties[d];
    const held = seats.map(({ person, fixed }) => [name, kase.people[person].name, '', fixed ? 'Fixed' : '']);
    const open = Array.from({ length: Math.max(0, need - seats.length) }, () => [name, '', '', 'Uncovered']);
    return [...held, ...open];
  });
  return writeTable(COLUMNS, rows, 'No seats to assign');
}
