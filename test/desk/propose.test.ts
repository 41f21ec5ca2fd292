import { describe, expect, it } from 'vitest';
import { blankDrafts } from '../../src/desk/blankTables';
import { preview } from '../../src/desk/preview';
import { propose } from '../../src/desk/propose';
import { MemoryWorkbook } from '../../src/host/memory';
import type { DraftCell } from '../../src/host/port';

type Rows = readonly (readonly DraftCell[])[];

const PAIRS: Rows = [['Duty', 'Person', 'Rank'], ['Choir', 'Ann', 1], ['Organ', 'Ben', 2], ['Choir', 'Ben', null]];
const PEOPLE: Rows = [['Person', 'Maximum'], ['Ann', 2], ['Ben', 1]];
const DUTIES: Rows = [['Duty', 'Need'], ['Choir', 1], ['Organ', 1]];
const PRICES: Rows = [['Item', 'Price'], ['Chairs', 12], ['Lamps', 7]];

async function proposed(sheets: Record<string, Rows>): Promise<Record<string, string>> {
  const port = new MemoryWorkbook();
  await port.addSheets(Object.entries(sheets).map(([name, rows]) => ({ name, rows })));
  const found = propose(await port.blocks());
  return Object.fromEntries([...found].map(([role, { argument, obstacle }]) => [role, obstacle === '' ? argument : `! ${obstacle}`]));
}

describe('which table is which', () => {
  it.each<[string, Record<string, Rows>, Record<string, string>]>([
    ['tables with our headings', { A: PAIRS, B: PEOPLE, C: DUTIES }, { pairs: 'A!A1:C504', people: 'B!A1:B503', duties: 'C!A1:B503' }],
    ['a price list among them', { X: PRICES, A: PAIRS, B: PEOPLE }, { pairs: 'A!A1:C504', people: 'B!A1:B503' }],
    ['the plan in force beside the pairs', { 'Current plan': [['Duty', 'Person'], ['Choir', 'Ann']], A: PAIRS, B: PEOPLE }, { pairs: 'A!A1:C504', people: 'B!A1:B503', current: "'Current plan'!A1:B502" }],
    ['rules', { A: PAIRS, B: PEOPLE, R: [['Rule', 'Duty', 'Person', 'Value'], ['Fixed', 'Choir', 'Ann', null]] }, { pairs: 'A!A1:C504', people: 'B!A1:B503', rules: 'R!A1:D502' }],
    ['headings of their own in our order', { A: [['Shift', 'Name'], ['Early', 'Ann'], ['Late', 'Ben']], B: [['Name', 'Max'], ['Ann', 1], ['Ben', 1]] }, { pairs: 'A!A2:B503', people: 'B!A2:B503' }],
    ['headings of their own in another order', { A: [['Name', 'Shift'], ['Ann', 'Early']], B: PEOPLE }, { pairs: '! Rename the heading "Name" to Person and "Shift" to Duty.', people: 'B!A1:B503' }],
    ['a cross table', { G: [[null, 'Ann', 'Ben'], ['Choir', 'x', null], ['Organ', 1, 'x']], B: PEOPLE }, { pairs: 'DUTY.PAIRS(G!A1:C503)', people: 'B!A1:B503' }],
    ['a cross table with people down', { G: [[null, 'Choir', 'Organ'], ['Ann', 'x', null], ['Ben', 'x', 'x']], B: PEOPLE }, { pairs: 'DUTY.PAIRS(TRANSPOSE(G!A1:C503))', people: 'B!A1:B503' }],
    ['a table parted by blank rows', { A: [...PAIRS, [null, null, null], ['Flute', 'Ann', null], ['Bells', 'Ben', 1]], B: PEOPLE }, { pairs: 'A!A1:C507', people: 'B!A1:B503' }],
    ['tables one below the other', { A: [...PAIRS, [null], [null], [null], ...PEOPLE], C: DUTIES }, { pairs: 'A!A1:C6', people: 'A!A8:B510', duties: 'C!A1:B503' }],
    ['nothing like it', { X: PRICES }, {}],
  ])('%s', async (_, sheets, expected) => {
    expect(await proposed(sheets)).toEqual(expected);
  });

  it('counts rows that are added below later', async () => {
    const port = new MemoryWorkbook();
    await port.addSheets([{ name: 'A', rows: [...PAIRS, [null, null, null], ['Bells', 'Ann', 1]] }, { name: 'G', rows: [[null, 'Ann', 'Ben'], ['Choir', 'x', null]] }]);
    const { argument } = propose(await port.blocks()).get('pairs')!;
    await port.write('A!A9', [['Flute', 'Ann', 3]]);
    expect((await port.read(argument))!.values[8]).toEqual(['Flute', 'Ann', 3]);
  });

  it('is looked at before anything is written', async () => {
    const port = new MemoryWorkbook();
    await port.addSheets([{ name: 'A', rows: [...PAIRS, ['Flute', 'Anne', 1]] }, { name: 'B', rows: PEOPLE }, { name: 'C', rows: DUTIES }]);
    expect(preview(propose(await port.blocks()))).toEqual({ counts: ['3 pairs', '3 people', '2 duties with 2 seats'], faults: [], findings: 2, size: { rows: 3, people: 3, isLarge: false } });
    await port.write('B!B2', [['two']]);
    expect(preview(propose(await port.blocks())).faults[0]).toMatch(/^People table, row 2/u);
  });
});

describe('empty tables', () => {
  it('are labelled, named apart from what is there, and answered', async () => {
    const port = new MemoryWorkbook();
    await port.addSheets([{ name: 'Old', rows: PAIRS, names: [{ name: 'Pairs', cells: 'A1:C4' }] }]);
    const names = await port.addSheets(await blankDrafts(port));
    expect(names).toEqual(['Inputs', 'Results', 'Grid', 'Why']);
    expect((await port.read('Pairs'))!.address).toBe('Old!A1:C4');
    expect((await port.read('Pairs2'))!.values[0]).toEqual(['Duty', 'Person', 'Rank']);
    const formulas = (await port.ourCells()).map(({ formula }) => formula);
    expect(formulas).toContain('=DUTY.ASSIGN(Pairs2, People, Duties, Rules)');
  });
});
