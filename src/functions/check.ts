import type { Case, Seat } from '../cover/case';
import { LAST_PRIORITY } from '../cover/case';
import { check, type Wrong } from '../cover/check';
import type { Plan } from '../cover/plan';
import type { Range, Spill } from '../sheet/range';
import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, headings, type RangeFunction } from './declaration';
import { recall } from './memory';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Finding', description: 'what kind of thing is wrong' },
  { name: 'Duty', description: 'the duty, where it is about one' },
  { name: 'Person', description: 'the person, where it is about one' },
  { name: 'Detail', description: 'what was found and what is allowed' },
];

export const CHECK: RangeFunction = {
  id: 'CHECK',
  summary: 'Everything wrong with a plan made or changed by hand, and by how many seats it is short of the best.',
  parameters: [
    { name: 'plan', description: 'The plan to check: columns Duty, Person. What DUTY.ASSIGN spilled will do.', optional: false },
    ...CASE_PARAMETERS.slice(0, 4),
  ],
  columns: COLUMNS,
  example: '=DUTY.CHECK(Current, Pairs, People, Duties, Rules)',
  ofRanges: checkPlan,
};

function checkPlan([plan, ...ranges]: readonly (Range | null)[]): Spill {
  // The plan is read as a current plan would be; what can be covered is asked without it, as other functions ask.
  const solved = recall([...ranges.slice(0, 4), plan ?? []]);
  const kase = solved.case;
  const best = recall([...ranges.slice(0, 4), null]).outcome;
  const seats = kase.current ?? [];
  const rows = [
    ...readingRows(solved),
    ...check(kase, best.open, seats).map((entry) => wrongRow(kase, entry)),
    ...shortRows(kase, best.plan, seats),
  ];
  return writeTable(headings(COLUMNS), rows, 'Nothing is wrong: every rule is kept, and no plan covers more');
}

/** Names of the plan that are not listed, and rows given twice. An uncovered row of DUTY.ASSIGN names nobody and is right. */
function readingRows({ reading }: Solved): string[][] {
  return reading.findings
    .filter(({ table, finding }) => table === 'Current' && finding !== 'Incomplete row')
    .map(({ row, finding, detail }) => [finding, '', '', `Row ${row} of the plan: ${detail}`]);
}

function wrongRow(kase: Case, entry: Wrong): string[] {
  const { kind, duty, person } = entry;
  const name = duty === null ? '' : kase.duties[duty].name;
  return [kind, name, person === null ? '' : kase.people[person].name, detailOf(entry)];
}

function detailOf({ kind, found, allowed, label }: Wrong): string {
  switch (kind) {
    case 'Fixed not kept':
      return 'A Fixed rule gives this seat to this person; the plan does not.';
    case 'Barred':
      return 'A Barred rule says never.';
    case 'Away':
      return `The person is Away in "${label}".`;
    case 'Not eligible':
      return 'The pairs do not list this person for this duty.';
    case 'Too many':
    case 'Uncovered':
      return `${holders(found)}; it needs ${allowed}.`;
    case 'Over maximum':
      return `Holds ${found}; the maximum is ${allowed}.`;
    case 'Below minimum':
      return `Holds ${found}; the minimum is ${allowed}.`;
    case 'Over a limit':
      return `Holds ${found} in "${label}"; ${allowed === 0 ? 'none is' : allowed === 1 ? 'at most 1 is' : `at most ${allowed} are`} allowed.`;
    case 'Too close in time':
      return `Overlaps "${label}", or leaves less than the Rest between them.`;
    case 'Clash':
      return `A Clash rule says that nobody holds this and "${label}".`;
    case 'Not together':
      return `A Together rule says that whoever holds this holds "${label}" too.`;
  }
}

function holders(count: number): string {
  if (count === 0) return 'Nobody holds it';
  return count === 1 ? '1 person holds it' : `${count} people hold it`;
}

/** How the plan's cover compares with the best: in all, and where urgent seats are given up for less urgent ones. */
function shortRows(kase: Case, plan: Plan, seats: readonly Seat[]): string[][] {
  const held = new Int32Array(kase.duties.length);
  for (const { duty } of seats) held[duty]++;
  const mine = coverByPriority(kase, held);
  const best = coverByPriority(kase, plan.heldOfDuty);
  const total = (cover: Map<number, number>): number => [...cover.values()].reduce((sum, count) => sum + count, 0);
  const short = total(best) - total(mine);
  const rows: string[][] = [];
  if (short > 0) {
    rows.push(['Short of the best', '', '', `The plan covers ${seatsIn(total(mine))}; ${total(best)} can be covered, ${short} more.`]);
  }
  const first = [...best.keys()].sort((a, b) => a - b).find((priority) => mine.get(priority) !== best.get(priority));
  if (first !== undefined && mine.get(first)! < best.get(first)!) {
    const label = first === LAST_PRIORITY ? 'Duties without priority' : `Priority ${first}`;
    rows.push(['Short of the best', '', '', `${label}: the plan covers ${seatsIn(mine.get(first)!)}; ${best.get(first)} can be covered without giving up a more urgent one.`]);
  }
  return rows;
}

function seatsIn(count: number): string {
  return `${count} ${count === 1 ? 'seat' : 'seats'}`;
}

function coverByPriority({ duties }: Case, held: Int32Array): Map<number, number> {
  const cover = new Map<number, number>();
  duties.forEach(({ priority, need }, d) => cover.set(priority, (cover.get(priority) ?? 0) + Math.min(need, held[d])));
  return cover;
}
