import { steps } from '../cover/steps';
import type { Spill } from '../sheet/range';
import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

/** In the place of a person where there is none. */
const NOBODY = '(nobody)';

const COLUMNS = [
  { name: 'Step', description: 'the number of the move; carried out in this order, nobody is over a limit at any time, where that is possible' },
  { name: 'Duty', description: 'the duty of which one seat passes on' },
  { name: 'From', description: 'who holds it now; (nobody) for a seat that is not held' },
  { name: 'To', description: 'who takes it; (nobody) where it is put down for the moment, or stays uncovered' },
  { name: 'Chain', description: 'moves of one chain depend on each other; also who holds nothing after the move, and what is uncovered from then on' },
];

export const STEPS: CaseFunction = {
  id: 'STEPS',
  summary: 'The moves that lead from the current plan to the best one, short chains first, each possible when its turn comes.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.STEPS(Pairs, People, Duties, Rules, Current)',
  ofCase: spillSteps,
};

function spillSteps(solved: Solved): Spill {
  const kase = solved.case;
  if (kase.current === null) return writeTable(headings(COLUMNS), [], 'No current plan is given');
  const { plan, open } = solved.outcome;
  const held = new Int32Array(kase.people.length);
  for (const { person } of kase.current) held[person]++;
  const name = (person: number | null): string => (person === null ? NOBODY : kase.people[person].name);
  const rows: (string | number)[][] = [];
  steps(kase, open, plan).forEach((chain, c) => {
    chain.forEach(({ duty, from, to }, i) => {
      if (from !== null) held[from]--;
      if (to !== null) held[to]++;
      const later = chain.slice(i + 1).some((move) => move.duty === duty && move.from === null);
      const notes = [];
      if (from !== null && held[from] === 0 && plan.heldByPerson[from] === 0) notes.push(`${name(from)} is now free`);
      if (to === null && !later && plan.heldOfDuty[duty] < kase.duties[duty].need) notes.push('now uncovered');
      rows.push([rows.length + 1, kase.duties[duty].name, name(from), name(to), [c + 1, ...notes].join('; ')]);
    });
  });
  return writeTable(headings(COLUMNS), rows, 'No moves: the current plan is the best plan');
}
