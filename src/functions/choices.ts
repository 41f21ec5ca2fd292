import type { Spill } from '../sheet/range';
import { writeTable } from '../sheet/write';
import { NOT_IN_TIME } from './reasons';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Duty', description: 'the duty of a pair, in the order of the duties table' },
  { name: 'Person', description: 'the person of the pair, by name' },
  { name: 'Use', description: 'Always, Sometimes or Never: over all plans that keep Fixed and Barred and cover as well by priority' },
];

export const CHOICES: CaseFunction = {
  id: 'CHOICES',
  summary: 'For every pair, whether the plans that cover best use it always, sometimes or never: what is still open to choose.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.CHOICES(Pairs, People, Duties, Rules)',
  ofCase: spillChoices,
};

function spillChoices(solved: Solved): Spill {
  const { pairs, duties, people } = solved.case;
  const use = solved.choices;
  const inTableOrder = Array.from(use.keys()).sort((i, j) => pairs.duty[i] - pairs.duty[j] || i - j);
  const rows = inTableOrder.map((i) => [duties[pairs.duty[i]].name, people[pairs.person[i]].name, use[i] ?? NOT_IN_TIME]);
  return writeTable(headings(COLUMNS), rows, 'No pairs');
}
