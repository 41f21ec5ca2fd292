import { writeTable } from '../sheet/write';
import type { Case, Seat } from '../cover/case';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { rankLookUp, seatsByDuty } from './seats';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Duty', description: 'the duty, in the order of the duties table; one row a seat' },
  { name: 'Person', description: 'who holds the seat, by name; blank where nobody can' },
  { name: 'Rank', description: 'the rank of the pair, where the pairs have ranks' },
  { name: 'Note', description: 'Fixed by a rule; with a current plan, Kept or New; Uncovered, where nobody holds the seat' },
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
  const { plan } = solved.outcome;
  const rankOf = rankLookUp(kase);
  const note = noteLookUp(kase);
  const rows = seatsByDuty(kase, plan).flatMap((seats, d) => {
    const { name, need } = kase.duties[d];
    const held = seats.map((seat) => [name, kase.people[seat.person].name, rankOf(seat), note(seat)]);
    const open = Array.from({ length: Math.max(0, need - seats.length) }, () => [name, '', '', 'Uncovered']);
    return [...held, ...open];
  });
  return writeTable(headings(COLUMNS), rows, 'No seats to assign');
}

/** What is said of a held seat: Fixed, or whether it is as in the current plan. */
function noteLookUp(kase: Case): (seat: Seat & { readonly fixed: boolean }) => string {
  const number = ({ duty, person }: Seat): number => duty * kase.people.length + person;
  const current = kase.current === null ? null : new Set(kase.current.map(number));
  return (seat) => {
    if (seat.fixed) return 'Fixed';
    if (current === null) return '';
    return current.has(number(seat)) ? 'Kept' : 'New';
  };
}
