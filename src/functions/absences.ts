import type { Spill } from '../sheet/range';
import { joinNames, writeTable } from '../sheet/write';
import { NOT_IN_TIME } from './reasons';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Person', description: 'everyone, in the order of the people table' },
  { name: 'Holds', description: 'seats they hold in the best plan' },
  { name: 'Lost', description: 'seats fewer that could be covered if this person alone were away' },
  { name: 'Duties lost', description: 'the duties that then become short' },
  { name: 'Taken over', description: 'which of their duties others would take, and who' },
];

export const ABSENCES: CaseFunction = {
  id: 'ABSENCES',
  summary: 'For every person, what would be lost if they alone were away, and who would take over the rest of their duties.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.ABSENCES(Pairs, People, Duties, Rules)',
  ofCase: spillAbsences,
};

function spillAbsences(solved: Solved): Spill {
  const kase = solved.case;
  const { plan } = solved.outcome;
  const duty = (d: number): string => kase.duties[d].name;
  const rows = solved.absences.map((answer, p) => {
    if (answer === null) return [kase.people[p].name, plan.heldByPerson[p], NOT_IN_TIME];
    const { holds, lost, dutiesLost, takenOver } = answer;
    const takers = takenOver.map(({ duty: d, by }) => (by.length === 0 ? duty(d) : `${duty(d)} (${joinNames(by.map((q) => kase.people[q].name))})`));
    return [kase.people[p].name, holds.length, lost, joinNames(dutiesLost.map(duty)), joinNames(takers)];
  });
  return writeTable(headings(COLUMNS), rows, 'No people');
}
