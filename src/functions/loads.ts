import { gains } from '../cover/gains';
import type { Person } from '../cover/case';
import { joinNames, writeTable } from '../sheet/write';
import { CASE_PARAMETERS, type CaseFunction } from './declaration';
import { dutiesByPerson } from './seats';
import type { Solved } from './solved';

const COLUMNS = ['Person', 'Assigned', 'Minimum', 'Maximum', 'Spare', 'Gain', 'Duties', 'Note'];

export const LOADS: CaseFunction = {
  id: 'LOADS',
  summary:
    'How much each person holds against their limits. Gain tells how many seats more could be covered if this person alone took one more.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.LOADS(Pairs, People, Duties, Rules)',
  ofCase: loads,
};

function loads(solved: Solved) {
  const kase = solved.case;
  const { reduction, residual, plan } = solved.solution;
  const gain = gains(reduction, residual);
  const held = dutiesByPerson(kase, plan);
  const rows = kase.people.map((person, p) => {
    const { name, minimum, maximum } = person;
    const assigned = plan.heldByPerson[p];
    const spare = Math.max(0, maximum - assigned);
    const duties = joinNames(held[p].map((d) => kase.duties[d].name));
    return [name, assigned, minimum, maximum, spare, gain[p], duties, note(person, assigned)];
  });
  return writeTable(COLUMNS, rows, 'No people');
}

function note({ maximum, listed }: Person, assigned: number): string {
  const notes: string[] = [];
  if (!listed) notes.push('Not in the people table, so the maximum is 0.');
  if (assigned > maximum) notes.push(`Over the maximum by ${assigned - maximum}: Fixed rows say so.`);
  return notes.join(' ');
}
