import { coverBounds, type Bound, type Charge } from '../cover/bound';
import type { Case } from '../cover/case';
import { mostOf } from '../cover/limits';
import { PairState } from '../cover/openPairs';
import type { Solution } from '../cover/solve';
import type { Spill } from '../sheet/range';
import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Part', description: 'Seat, In, Duty, Person, Limit: the plan and what it keeps; Bound, Charge, Total: why no plan covers more' },
  { name: 'Duty', description: 'the duty it is about, if it is about one' },
  { name: 'Person', description: 'the person it is about, if it is about one' },
  { name: 'Limit', description: 'a slot or group; for bounds and charges also need, maximum, pair, fixed, or why the pair is closed' },
  { name: 'Count', description: 'seats held; for bounds what the tables allow; for the total the seats covered' },
  { name: 'Most', description: 'seats allowed; for bounds what is left beside Fixed seats; for the total the sum of the bounds' },
];

type ProofRow = [part: string, duty: string, person: string, limit: string, count: number, most: number];

export const PROOF: CaseFunction = {
  id: 'PROOF',
  summary: 'The plan and a proof, as a table that native formulas can check: it keeps every limit, and no plan covers more.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.PROOF(Pairs, People, Duties, Rules)',
  ofCase: proof,
};

function proof(solved: Solved): Spill {
  const kase = solved.case;
  const { solution } = solved;
  const { bounds, charges } = coverBounds(kase, solution);
  const sum = bounds.reduce((total, { most }) => total + most, 0);
  const rows = [
    ...planRows(kase, solution),
    ...bounds.map((bound) => boundRow(kase, bound)),
    ...charges.map((charge) => chargeRow(kase, charge)),
    ['Total', '', '', 'covered', solution.plan.covered, sum] satisfies ProofRow,
  ];
  return writeTable(headings(COLUMNS), rows, 'Nothing to prove');
}

/** Who holds what, in which slots and limited groups, and every count against its limit. */
function planRows(kase: Case, { plan, reduction: { open } }: Solution): ProofRow[] {
  const { duties, people } = kase;
  const seats: ProofRow[] = [];
  const inSets: ProofRow[] = [];
  const counts = new Map<string, ProofRow>();
  for (const { duty, person } of plan.seats) {
    const [d, p] = [duties[duty].name, people[person].name];
    seats.push(['Seat', d, p, '', 1, 1]);
    const labels = new Map<string, number>();
    for (const s of open.setsOf[duty]) {
      const { name } = open.sets[s];
      labels.set(name, Math.min(mostOf(open.sets[s], person), labels.get(name) ?? Infinity));
    }
    for (const [label, most] of labels) {
      if (most === Infinity) continue;
      inSets.push(['In', d, p, label, 1, 1]);
      const row = counts.get(`${person} ${label}`) ?? ['Limit', '', p, label, 0, most];
      row[4]++;
      counts.set(`${person} ${label}`, row);
    }
  }
  return [
    ...seats,
    ...inSets,
    ...duties.map(({ name, need }, d): ProofRow => ['Duty', name, '', '', plan.heldOfDuty[d], need]),
    ...people.map(({ name, maximum }, p): ProofRow => ['Person', '', name, '', plan.heldByPerson[p], maximum]),
    ...counts.values(),
  ];
}

function boundRow(kase: Case, { kind, duty, person, label, allowed, most }: Bound): ProofRow {
  return [
    'Bound',
    duty === null ? '' : kase.duties[duty].name,
    person === null ? '' : kase.people[person].name,
    kind === 'limit' ? label : kind,
    allowed,
    most,
  ];
}

const CLOSED = new Map<number, string>([
  [PairState.Barred, 'barred'],
  [PairState.Away, 'away'],
  [PairState.NoRoom, 'no room'],
]);

function chargeRow(kase: Case, { duty, person, bound, state }: Charge): ProofRow {
  const under = bound === null ? (CLOSED.get(state) ?? '') : bound.kind === 'limit' ? bound.label : bound.kind;
  return ['Charge', kase.duties[duty].name, kase.people[person].name, under, 1, bound === null ? 0 : 1];
}
