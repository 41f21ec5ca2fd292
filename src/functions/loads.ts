import { PairState } from '../cover/openPairs';
import type { Person } from '../cover/case';
import { joinNames, writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { NOT_IN_TIME } from './reasons';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { dutiesByPerson } from './seats';
import type { Outcome, Solved } from './solved';

const COLUMNS = [
  { name: 'Person', description: 'everyone in the people table, in its order, then people who are not listed' },
  { name: 'Assigned', description: 'seats held; where duties have a Load, the sum of their loads' },
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
  const { plan, open, method } = solved.outcome;
  const gain = solved.gains;
  const held = dutiesByPerson(kase, plan);
  const mayTake = open.fixedLoad.slice();
  open.state.forEach((state, i) => {
    if (state === PairState.Open) mayTake[kase.pairs.person[i]] += kase.duties[kase.pairs.duty[i]].load;
  });
  const rows = kase.people.map((person, p) => {
    const { name, minimum, maximum } = person;
    const assigned = plan.loadByPerson[p];
    const spare = Math.max(0, maximum - assigned);
    const duties = joinNames(held[p].map((d) => kase.duties[d].name));
    return [name, assigned, minimum, maximum, spare, gain[p] ?? NOT_IN_TIME, duties, note(person, assigned, mayTake[p], method)];
  });
  return writeTable(headings(COLUMNS), rows, 'No people');
}

/** What is remarkable about what a person holds. */
function note({ minimum, maximum, listed }: Person, assigned: number, mayTake: number, method: Outcome['method']): string {
  const notes: string[] = [];
  if (!listed) notes.push('Not in the people table, so the maximum is 0.');
  if (assigned > maximum) notes.push(`Over the maximum by ${assigned - maximum}: Fixed rows say so.`);
  if (assigned < minimum) notes.push(`Below the minimum by ${minimum - assigned}: ${whyBelow(minimum, maximum, mayTake, method)}`);
  return notes.join(' ');
}

/** Since the shortfall of minimums is the least possible, one of these holds for everyone below theirs. */
function whyBelow(minimum: number, maximum: number, mayTake: number, method: Outcome['method']): string {
  if (maximum < minimum) return `the maximum is ${maximum}.`;
  if (mayTake < minimum) return `${mayTake === 0 ? 'no duty is' : mayTake === 1 ? 'only 1 duty is' : `only ${mayTake} duties are`} open to them.`;
  if (method === 'exact search') return 'no plan found that covers as well misses fewer in all.';
  return 'no duty can pass to them from anyone who is above their own minimum, and none is left uncovered that they could take.';
}
