import { writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { currentKept, minimumsMissed, rankTotal } from './measures';
import { proofWords } from './proofWords';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Item', description: 'Seats needed, covered and uncovered; People used; Minimums missed; Current kept; Rank total; Method; Proven; Findings; Fingerprint' },
  { name: 'Value', description: 'its value; the fingerprint is equal for equal cases, whatever the order of their rows' },
];

export const SUMMARY: CaseFunction = {
  id: 'SUMMARY',
  summary: 'The case at a glance: seats needed, covered and uncovered, how it was solved, a fingerprint to compare.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.SUMMARY(Pairs, People, Duties, Rules)',
  ofCase: summary,
};

function summary(solved: Solved): Spill {
  const kase = solved.case;
  const { plan, method } = solved.outcome;
  const rows: (readonly [string, string | number])[] = [
    ['Seats needed', plan.needed],
    ['Seats covered', plan.covered],
    ['Seats uncovered', plan.needed - plan.covered],
    ['People used', plan.heldByPerson.reduce((used, held) => used + (held > 0 ? 1 : 0), 0)],
    ['Minimums missed', minimumsMissed(kase, plan)],
    ['Current kept', kase.current === null ? 'no current plan given' : currentKept(kase, plan)],
    ['Rank total', kase.ranked ? rankTotal(kase, plan) : 'no ranks given'],
    ['Method', method],
    ['Proven', proofWords(solved.outcome)],
    ['Findings', solved.reading.findings.length],
    ['Fingerprint', solved.fingerprint],
  ];
  return writeTable(headings(COLUMNS), rows, '');
}
