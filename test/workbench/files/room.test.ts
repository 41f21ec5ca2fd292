import { describe, expect, it } from 'vitest';
import { Journal } from '../../../src/functions/journal';
import { FUNCTIONS } from '../../../src/functions/registry';
import { registerInEngine } from '../../../src/host/workbench/register';
import { gridSheet, resultsSheet } from '../../../src/workbench/demoSheets';
import { openCsv } from '../../../src/workbench/files/openCsv';
import { makeModel } from '../../../src/workbench/files/room';
import { engine } from '../../helpers/engine';

registerInEngine(engine, FUNCTIONS, new Journal(), () => undefined);

describe('sheets', () => {
  it('have room for answers of thousands of rows, and for more of them', () => {
    const rows = (count: number, row: (i: number) => string) => Array.from({ length: count }, (_, i) => row(i)).join('\n');
    const taken = new Set<string>();
    const sheets = [
      openCsv('pairs.csv', `Duty,Person\n${rows(2000, (i) => `Duty ${i},Person ${i % 40}`)}`, taken),
      openCsv('people.csv', `Person,Maximum\n${rows(40, (i) => `Person ${i},99`)}`, taken),
    ];
    const given = ['pairs!A1:B2001', 'people!A1:B41'];
    const answers = [resultsSheet('Results', given), gridSheet('Grid', given, 40)];
    const { getters } = makeModel({ sheets: [...sheets, ...answers], names: [], lost: [] }, engine);
    for (const [name, col, row] of [['Results', 3, 2001], ['Grid', 0, 2002]] as const) {
      const sheetId = getters.getSheetIdByName(name)!;
      expect(getters.getEvaluatedCell({ sheetId, col, row }).type).toBe('text');
      expect(getters.getNumberRows(sheetId)).toBeGreaterThan(2500);
    }
  });
});
