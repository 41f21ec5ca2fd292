import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { paneModel, spokenSummary } from '../../src/pane/model';
import type { Range } from '../../src/sheet/range';

const PAIRS: Range = [['Choir', 'Ann'], ['Choir', 'Bob'], ['Organ', 'Ann'], ['Bells', 'Zed']];
const DUTIES: Range = [['Duty', 'Need', 'Priority'], ['Choir', 2, 1], ['Organ', 1, '']];

function fill(journal: Journal, id: string, address: string, ...ranges: (Range | null)[]): void {
  const fn = FUNCTIONS.find((entry) => entry.id === id)!;
  invoke(fn, ranges, address, journal);
}

describe('what the pane shows', () => {
  it('is one case for all cells that answer equal inputs, by their addresses', () => {
    const journal = new Journal();
    fill(journal, 'ASSIGN', 'Plan!B10', PAIRS, [[1]], DUTIES);
    fill(journal, 'SUMMARY', 'Plan!B9', PAIRS.map((row) => [...row]), [['1']], DUTIES);
    fill(journal, 'SUMMARY', 'Plan!B2', PAIRS, [[1]], DUTIES);
    const { cases } = paneModel(journal.calls());
    expect(cases).toHaveLength(2);
    const [{ id, cells, sheets, seats, priorities, short, errors, fingerprint }] = cases;
    expect({ id, cells, sheets }).toEqual({
      id: 'Plan!B2',
      cells: [
        { address: 'Plan!B2', functionId: 'SUMMARY' },
        { address: 'Plan!B10', functionId: 'ASSIGN' },
      ],
      sheets: ['Plan'],
    });
    expect(seats).toEqual({ needed: 3, covered: 2 });
    expect(priorities).toEqual([
      { label: 'Priority 1', needed: 2, covered: 2 },
      { label: 'No priority', needed: 1, covered: 0 },
    ]);
    expect(short.map(({ duty, seats: lacking }) => [duty, lacking])).toEqual([['Organ', 1]]);
    expect(errors).toEqual([]);
    expect(cases[1].fingerprint).toBe(fingerprint);
  });

  it('groups findings by kind with their places', () => {
    const journal = new Journal();
    fill(journal, 'FINDINGS', 'A!A1', [...PAIRS, ['Choir', 'Ann']], [[1]], DUTIES);
    const [{ findings }] = paneModel(journal.calls()).cases;
    expect(findings.map(({ finding, details }) => [finding, details.map(({ table, row }) => (row === null ? table : `${table}, row ${row}`))])).toEqual([
      ['Duty not listed', ['Pairs, row 4']],
      ['Row given twice', ['Pairs, row 5']],
    ]);
  });

  it('says every fault in words, once, and shows no plan', () => {
    const journal = new Journal();
    fill(journal, 'ASSIGN', 'A!A1', PAIRS, [['Ann', 'two'], ['Bob', -1]], DUTIES);
    fill(journal, 'LOADS', 'A!F1', PAIRS, [['Ann', 'two'], ['Bob', -1]], DUTIES);
    const [{ seats, errors }] = paneModel(journal.calls()).cases;
    expect(seats).toBeNull();
    expect(errors).toHaveLength(2);
    expect(errors[1]).toContain('row 2 of the range, column Maximum: found -1');
  });

  it('lists errors of functions that take no case', () => {
    const journal = new Journal();
    fill(journal, 'PAIRS', 'A!A1', [['only one column']]);
    expect(paneModel(journal.calls()).strays.map(({ address }) => address)).toEqual(['A!A1']);
  });

  it('is said in one sentence for those who hear it', () => {
    const journal = new Journal();
    expect(spokenSummary(paneModel([]))).toBe('No Dutyproof formulas have answered yet.');
    fill(journal, 'ASSIGN', 'A!A1', PAIRS, [[1]], DUTIES);
    expect(spokenSummary(paneModel(journal.calls()))).toBe('Recalculated: 1 seat uncovered.');
    fill(journal, 'ASSIGN', 'A!A1', PAIRS, [['no', 'numbers']], DUTIES);
    expect(spokenSummary(paneModel(journal.calls()))).toBe('Recalculated: 1 error.');
  });

  it('forgets what is no longer there', () => {
    const journal = new Journal();
    fill(journal, 'ASSIGN', 'A!A1', PAIRS, [[1]]);
    fill(journal, 'ASSIGN', 'A!B1', PAIRS, [[2]]);
    journal.keepOnly(({ address }) => address === 'A!B1');
    expect(paneModel(journal.calls()).cases.map(({ id }) => id)).toEqual(['A!B1']);
  });
});
