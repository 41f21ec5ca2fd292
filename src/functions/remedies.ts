import type { Spill } from '../sheet/range';
import { writeTable } from '../sheet/write';
import { NOT_IN_TIME } from './reasons';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Step', description: 'a number; the changes work together, in any order' },
  { name: 'Change', description: 'one more place for a person, or make eligible for a duty' },
  { name: 'Person', description: 'the person asked' },
  { name: 'Duty', description: 'the duty, where someone is made eligible' },
  { name: 'Price', description: 'as the Price rules say; 1 for a place and 2 for eligibility where they say nothing' },
];

export const REMEDIES: CaseFunction = {
  id: 'REMEDIES',
  summary: 'A cheapest set of changes after which every seat can be covered, or as many as can: places and eligibilities.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.REMEDIES(Pairs, People, Duties, Rules)',
  ofCase: spillRemedies,
};

function spillRemedies(solved: Solved): Spill {
  const kase = solved.case;
  const { plan } = solved.outcome;
  const found = solved.remedies;
  if (found === null) return writeTable(headings(COLUMNS), [], NOT_IN_TIME);
  const rows: (string | number)[][] = found.changes.map(({ person, duty, price }, i) => [
    i + 1,
    duty === null ? 'one more place' : 'make eligible',
    kase.people[person].name,
    duty === null ? '' : kase.duties[duty].name,
    price,
  ]);
  const left = plan.needed - found.covered;
  if (left > 0) rows.push(['', beyondHelp(left), '', '', '']);
  return writeTable(headings(COLUMNS), rows, 'No change is needed: every seat is covered');
}

/** What no change can mend. */
export function beyondHelp(seats: number): string {
  return `${seats} ${seats === 1 ? 'seat stays' : 'seats stay'} uncovered: no change that is allowed helps`;
}
