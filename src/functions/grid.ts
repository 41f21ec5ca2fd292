import { cutText, SHEET_COLUMNS } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, type CaseFunction } from './declaration';
import { Refusal } from './refusal';
import type { Solved } from './solved';

/** What a cell of the grid holds where the person has the duty. */
const MARK = 'x';
const TOTAL = 'Total';

const COLUMNS = [
  { name: 'Duty', description: 'the duties down the first column, people across; a mark where the duty is held, totals on both edges' },
];

export const GRID: CaseFunction = {
  id: 'GRID',
  summary: 'The plan as a cross table: duties down, people across, a mark where held, totals on both edges.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.GRID(Pairs, People, Duties, Rules)',
  ofCase: grid,
};

function grid(solved: Solved): Spill {
  const kase = solved.case;
  const { plan } = solved.outcome;
  const width = kase.people.length + 2;
  if (width > SHEET_COLUMNS) {
    throw new Refusal(
      `A grid of ${kase.people.length} people needs ${width} columns and a sheet has ${SHEET_COLUMNS}. Use DUTY.ASSIGN or DUTY.LOADS.`,
    );
  }
  const rows: (string | number)[][] = kase.duties.map(({ name }, d) => [
    cutText(name),
    ...Array.from(kase.people, () => ''),
    plan.heldOfDuty[d],
  ]);
  for (const { duty, person } of plan.seats) rows[duty][1 + person] = MARK;
  return [
    ['Duty', ...kase.people.map(({ name }) => cutText(name)), TOTAL],
    ...rows,
    [TOTAL, ...plan.heldByPerson, plan.seats.length],
  ];
}
