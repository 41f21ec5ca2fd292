import { shortages } from '../cover/shortage';
import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, type CaseFunction } from './declaration';
import { shortageReason } from './reasons';
import type { Solved } from './solved';

const COLUMNS = ['Duty', 'Short', 'Need', 'Eligible', 'Bottleneck', 'Reason'];

export const UNCOVERED: CaseFunction = {
  id: 'UNCOVERED',
  summary: 'The duties that cannot be fully covered in the best plan, by how many seats they are short, and why.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.UNCOVERED(Pairs, People, Duties, Rules)',
  ofCase: uncovered,
};

function uncovered(solved: Solved) {
  const kase = solved.case;
  const { reduction, residual, plan } = solved.solution;
  const rows = shortages(kase, reduction, residual, plan).map((shortage) => {
    const { name, need } = kase.duties[shortage.duty];
    const { short, eligible, knot } = shortage;
    return [name, short, need, eligible, knot?.number ?? '', shortageReason(kase, shortage)];
  });
  return writeTable(COLUMNS, rows, 'Every seat is covered');
}
