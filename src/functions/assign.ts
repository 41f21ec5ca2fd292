import { writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { seatsByDuty } from './seats';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Duty', description: 'the duty, in the order of the duties table; one row a seat' },
  { name: 'Person', description: 'who holds the seat, by name; blank where nobody can' },
  { name: 'Rank', description: 'the rank of the pair, where the pairs have ranks' },
  { name: 'Note', description: 'Fixed, where a rule says so; Uncovered, where nobody holds the seat' },
];

export const ASSIGN: CaseFunction = {
  id: 'ASSIGN',
  summary: 'Who takes which duty, a row a seat: as many seats covered as possible, the most urgent duties first.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.ASSIGN(Pairs, People, Duties, Rules)',
  ofCase: assign,
};

function assign(solved: Solved): Spill {
  const kase = solved.case;
  const { plan } = solved.solution;
  const rows = seatsByDuty(kase, plan).flatMap((seats, d) => {
    const { name, need } = kase.duties[d];
    const held = seats.map(({ person, fixed }) => [name, kase.people[person].name, '', fixed ? 'Fixed' : '']);
    const open = Array.from({ length: Math.max(0, need - seats.length) }, () => [name, '', '', 'Uncovered']);
    return [...held, ...open];
  });
  return writeTable(headings(COLUMNS), rows, 'No seats to assign');
}
