import { writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import { shortageReason } from './reasons';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Duty', description: 'a duty that is short' },
  { name: 'Short', description: 'seats it lacks' },
  { name: 'Need', description: 'seats it needs' },
  { name: 'Eligible', description: 'how many people may take it: listed for it, neither Barred nor Away' },
  { name: 'Bottleneck', description: 'a number that duties share whose people are all taken by these same duties' },
  { name: 'Reason', description: 'why, in a sentence' },
];

export const UNCOVERED: CaseFunction = {
  id: 'UNCOVERED',
  summary: 'The duties the best plan cannot fully cover, by how many seats they are short, and why.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.UNCOVERED(Pairs, People, Duties, Rules)',
  ofCase: uncovered,
};

function uncovered(solved: Solved): Spill {
  const kase = solved.case;
  const rows = solved.shortages.map((shortage) => {
    const { name, need } = kase.duties[shortage.duty];
    const { short, eligible, knot } = shortage;
    return [name, short, need, eligible, knot?.number ?? '', shortageReason(kase, shortage)];
  });
  return writeTable(headings(COLUMNS), rows, 'Every seat is covered');
}
