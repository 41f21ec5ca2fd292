import { readGrid } from '../sheet/readGrid';
import { writeTable } from '../sheet/write';
import { headings, type RangeFunction } from './declaration';

const COLUMNS = [
  { name: 'Duty', description: 'from the first column' },
  { name: 'Person', description: 'from the first row' },
  { name: 'Rank', description: 'the number in the cell, if it is one' },
];

export const PAIRS: RangeFunction = {
  id: 'PAIRS',
  summary: 'A cross table of who may take what (duties down, people across) as the list of pairs the others read.',
  parameters: [
    {
      name: 'grid',
      description:
        'Duties down, people across; a number is a rank, any other mark means yes, and blank, no or 0 means no.',
      optional: false,
    },
  ],
  columns: COLUMNS,
  example: '=DUTY.PAIRS(Inputs!A1:Z50)',
  ofRanges: ([grid]) =>
    writeTable(headings(COLUMNS), readGrid(grid ?? []).map(({ duty, person, rank }) => [duty, person, rank ?? '']), 'No pairs'),
};
