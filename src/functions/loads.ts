import { gains } from '../cover/gains';
import type { Person } from '../cover/case';
import { joinNames, writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { dutiesByPerson } from './seats';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Person', description: 'everyone in the people table, in its order, then people who are not listed' },
  { name: 'Assigned', description: 'seats held' },
  { name: 'Minimum', description: 'the fewest seats' },
  { name: 'Maximum', description: 'the most seats' },
  { name: 'Spare', description: 'places left' },
  { name: 'Gain', description: 'seats more that could be covered if this person alone took one more' },
  { name: 'Duties', description: 'what they hold, separated by semicolons' },
  { name: 'Note', description: 'over the maximum by Fixed rows; below the minimum, and why; not in the people table' },
];

export const LOADS: CaseFunction = {
  id: 'LOADS',
  summary: 'What each person holds against their limits; Gain: seats more that could be covered if they took one more.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.LOADS(Pairs, People, Duties, Rules)',
  ofCase: loads,
};

function loads(solved: Solved): Spill {
  const kase = solved.case;
  const { reduction, residual, plan } = solved.solution;
  const gain = gains(reduction, residual);
  const held = dutiesByPerson(kase, plan);
  const mayTake = reduction.open.fixedByPerson.slice();
  for (const i of reduction.openPair) mayTake[kase.pairs.person[i]]++;
  const rows = kase.people.map((person, p) => {
    const { name, minimum, maximum } = person;
    const assigned = plan.heldByPerson[p];
    const spare = Math.max(0, maximum - assigned);
    const duties = joinNames(held[p].map((d) => kase.duties[d].name));
    return [name, assigned, minimum, maximum, spare, gain[p], duties, note(person, assigned, mayTake[p])];
  });
  return writeTable(headings(COLUMNS), rows, 'No people');
}

/** What is remarkable about what a person holds. */
function note({ minimum, maximum, listed }: Person, assigned: number, mayTake: number): string {
  const notes: string[] = [];
  if (!listed) notes.push('Not in the people table, so the maximum is 0.');
  if (assigned > maximum) notes.push(`Over the maximum by ${assigned - maximum}: Fixed rows say so.`);
  if (assigned < minimum) notes.push(`Below the minimum by ${minimum - assigned}: ${whyBelow(minimum, maximum, mayTake)}`);
  return notes.join(' ');
}

/** Since the shortfall of minimums is the least possible, one of these holds for everyone below theirs. */
function whyBelow(minimum: number, maximum: number, mayTake: number): string {
  if (maximum < minimum) return `the maximum is ${maximum}.`;
  if (mayTake < minimum) return `${mayTake === 0 ? 'no duty is' : mayTake === 1 ? 'only 1 duty is' : `only ${mayTake} duties are`} open to them.`;
  return 'no duty can pass to them from anyone who is above their own minimum, and none is left uncovered that they could take.';
}
