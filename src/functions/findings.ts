import { writeTable } from '../sheet/write';
import { CASE_PARAMETERS, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = ['Table', 'Row', 'Finding', 'Detail'];

export const FINDINGS: CaseFunction = {
  id: 'FINDINGS',
  summary:
    'Everything odd in the inputs: cells that cannot be read, rows given twice, names that are not listed and what they may mean.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.FINDINGS(Pairs, People, Duties, Rules)',
  ofCase: findings,
};

function findings({ reading }: Solved) {
  const rows = [
    ...reading.faults.map(({ place, message }) => [place.table, place.row ?? '', 'Cannot be read', message]),
    ...reading.findings.map(({ table, row, finding, detail }) => [table, row ?? '', finding, detail]),
  ];
  return writeTable(COLUMNS, rows, 'Nothing odd found');
}
