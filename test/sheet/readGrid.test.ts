import { describe, expect, it } from 'vitest';
import { readGrid } from '../../src/sheet/readGrid';

/** Pairs as short texts. */
function read(...range: unknown[][]): string[] {
  return readGrid(range).map(({ duty, person, rank }) => `${duty} | ${person} | ${rank}`);
}

describe('a cross table', () => {
  it('gives a rank for a number, a pair for another mark, and nothing for blank, no and 0', () => {
    const marks = [2, '3', 'x', 'yes', true, '', null, ' No ', 0, '0', false];
    const names = marks.map((_, i) => `P${i}`);
    expect(read(['', ...names], ['Choir', ...marks])).toEqual([
      'Choir | P0 | 2',
      'Choir | P1 | 3',
      'Choir | P2 | null',
      'Choir | P3 | null',
      'Choir | P4 | null',
    ]);
  });

  it('is read whatever its corner says and wherever its first filled row is', () => {
    expect(read(['', ''], [{ type: 'Error', basicValue: '#N/A' }, ' Ann  Lee '], ['', 'x'], ['Choir', 'x'], ['', ''])).toEqual(['Choir | Ann Lee | null']);
  });

  it('leaves out the totals on its edges, as a spilled grid has them', () => {
    expect(read(['Duty', 'Ann', 'Bob', 'Total'], ['Choir', 'x', '', 1], ['Total', 1, 0, 1])).toEqual(['Choir | Ann | null']);
  });

  it('takes Total for a name where it is not the last', () => {
    expect(read(['', 'Total', 'Ann'], ['Total', 'x', ''], ['Choir', '', 'x'])).toEqual(['Total | Total | null', 'Choir | Ann | null']);
  });

  it('reads a number that comes with its format', () => {
    expect(read(['', 'Ann'], ['Choir', { type: 'FormattedNumber', basicValue: 2, numberFormat: '0' }])).toEqual(['Choir | Ann | 2']);
  });

  it('has no pairs where nothing is written', () => {
    expect(read(['', ''], ['', ''])).toEqual([]);
    expect(read(['', 'Ann'])).toEqual([]);
  });

  it.each([
    ['an error cell', ['Choir', { type: 'Error', basicValue: '#N/A' }], 'Grid table, row 2 of the range, column Ann: found the error #N/A; expected a rank, a mark, or nothing.'],
    ['a fraction', ['Choir', 1.5], 'Grid table, row 2 of the range, column Ann: found 1.5; expected a rank, a whole number from 1 to 1,000,000.'],
    ['a negative number', ['Choir', -1], 'Grid table, row 2 of the range, column Ann: found -1; expected a rank, a whole number from 1 to 1,000,000.'],
    ['an error for a duty', [{ code: '#REF!' }, 'x'], 'Grid table, row 2 of the range, column Duty: found the error #REF!; expected a name.'],
  ])('says where it holds %s', (_, row, message) => {
    expect(() => readGrid([['', 'Ann'], row])).toThrow(message);
  });

  it('says so where it is too narrow', () => {
    expect(() => readGrid([['Choir']])).toThrow('Grid table: found 1 column; expected duties in the first column and at least one person beside it.');
    expect(() => readGrid([])).toThrow('found 0 columns');
  });
});
