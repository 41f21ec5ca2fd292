import type { Knot } from '../cover/shortage';
import type { Spill } from '../sheet/range';
import { joinNames, writeTable } from '../sheet/write';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { knotReason } from './reasons';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Bottleneck', description: 'its number, as DUTY.UNCOVERED gives it' },
  { name: 'Duties', description: 'a smallest set of duties that cannot all be covered, separated by semicolons' },
  { name: 'People', description: 'everyone who may take any of them' },
  { name: 'Needed', description: 'seats these duties need' },
  { name: 'Places', description: 'seats of them that these people can hold at most, whatever else they are spared' },
  { name: 'Short', description: 'the difference; over all bottlenecks it adds up to all uncovered seats' },
  { name: 'Reason', description: 'the same in a sentence' },
];

export const BOTTLENECKS: CaseFunction = {
  id: 'BOTTLENECKS',
  summary: 'The smallest sets of duties that cannot all be covered, whatever the plan, with the people they hang on.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.BOTTLENECKS(Pairs, People, Duties, Rules)',
  ofCase: bottlenecks,
};

function bottlenecks(solved: Solved): Spill {
  const kase = solved.case;
  const knots = knotsOf(solved);
  const rows = knots.map((knot) => [
    knot.number,
    joinNames(knot.duties.map((d) => kase.duties[d].name)),
    joinNames(knot.people.map((p) => kase.people[p].name)),
    knot.needed,
    knot.places,
    knot.needed - knot.places,
    knotReason(kase, knot),
  ]);
  return writeTable(headings(COLUMNS), rows, 'No bottleneck: every seat is covered');
}

/** The bottlenecks of short duties, in the order of their numbers. */
export function knotsOf(solved: Solved): Knot[] {
  const knots = new Set(solved.shortages.flatMap(({ knot }) => (knot === null ? [] : [knot])));
  return [...knots].sort((a, b) => a.number - b.number);
}
