import { writeTable } from '../sheet/write';
import type { Spill } from '../sheet/range';
import { CASE_PARAMETERS, headings, type CaseFunction } from './declaration';
import type { Solved } from './solved';

const COLUMNS = [
  { name: 'Table', description: 'the table' },
  { name: 'Row', description: 'the row within the range given, its first row being 1' },
  { name: 'Finding', description: 'what kind of thing it is' },
  { name: 'Detail', description: 'what was found, with names and numbers, and the likely meaning of a misspelt name' },
];

export const FINDINGS: CaseFunction = {
  id: 'FINDINGS',
  summary: 'Everything odd in the inputs: unreadable cells, repeated rows, and unlisted names with what they may mean.',
  parameters: CASE_PARAMETERS,
  columns: COLUMNS,
  example: '=DUTY.FINDINGS(Pairs, People, Duties, Rules)',
  ofCase: findings,
};

function findings({ reading }: Solved): Spill {
  const rows = [
    ...reading.faults.map(({ place, message }) => [place.table, place.row ?? '', 'Cannot be read', message]),
    ...reading.findings.map(({ table, row, finding, detail }) => [table, row ?? '', finding, detail]),
  ];
  return writeTable(headings(COLUMNS), rows, 'Nothing odd found');
}
