import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { MemoryWorkbook } from '../../src/host/memory';
import { freshnessOf } from '../../src/pane/freshness';

async function look(isManual: boolean, isPending: boolean | null, answered: readonly string[]): Promise<[state: string, words: string]> {
  const port = new MemoryWorkbook();
  await port.addSheets([{ name: 'Plan', rows: [[{ formula: '=DUTY.SUMMARY(P, Q)' }, { formula: '=DUTY.ASSIGN(P, Q)' }]] }]);
  port.calculated = { isManual, isPending };
  const journal = new Journal();
  for (const address of answered) invoke(FUNCTIONS.find(({ id }) => id === 'SUMMARY')!, [[['Choir', 'Ann']], [[1]]], address, journal);
  const { state, words } = await freshnessOf(port, journal, await port.ourCells());
  return [state, words];
}

const ALL = ['Plan!A1', 'Plan!B1'];

describe('whether what is shown is up to date', () => {
  it.each<[string, boolean, boolean | null, readonly string[], string, RegExp]>([
    ['every formula has answered', false, false, ALL, 'fresh', /^Up to date\.$/u],
    ['one has not', false, false, ['Plan!A1'], 'stale', /^1 formula has not been calculated/u],
    ['none has', false, null, [], 'stale', /^2 formulas have not been calculated/u],
    ['a change is not calculated yet', true, true, ALL, 'stale', /^Something has changed/u],
    ['the workbook is calculated by hand, and has been', true, false, ALL, 'fresh', /only when someone asks\.$/u],
    ['the workbook is calculated by hand, and the host tells no more', true, null, ALL, 'stale', /^This workbook is calculated only/u],
    ['the host does not tell where formulas are', false, false, [''], 'fresh', /^Up to date\.$/u],
  ])('where %s', async (_, isManual, isPending, answered, state, words) => {
    expect(await look(isManual, isPending, answered)).toEqual([state, expect.stringMatching(words)]);
  });
});
