import { beforeEach, describe, expect, it } from 'vitest';
import { makeLive, makePlain, mended, plainState, repair } from '../../src/desk/plain';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { registerInEngine } from '../../src/host/workbench/register';
import { WorkbenchWorkbook } from '../../src/host/workbench/workbook';
import { engine } from '../helpers/engine';

registerInEngine(engine, FUNCTIONS, new Journal(), () => undefined);

let port: WorkbenchWorkbook;
beforeEach(async () => {
  port = new WorkbenchWorkbook(new engine.Model({}), engine);
  await port.addSheets([
    { name: 'In', rows: [['Duty', 'Person', null, 'Person', 'Maximum'], ['Choir', '=Ann', null, '=Ann', 1]] },
    { name: 'Out', rows: [['Plan'], [{ formula: '=DUTY.ASSIGN(In!A1:B2, In!D1:E2)' }]] },
  ]);
});

const shown = async (): Promise<unknown> => (await port.read('Out!A2:D4'))!.values;

describe('formulas and plain values', () => {
  it('are exchanged and exchanged back, and what is shown stays the same', async () => {
    const before = await shown();
    expect(before).toEqual([['Duty', 'Person', 'Rank', 'Note'], ['Choir', '=Ann', null, null], [null, null, null, null]]);
    expect(await makePlain(port, 'Out')).toBe(1);
    expect(await shown()).toEqual(before);
    expect(await port.ourCells()).toEqual([]);
    expect(await plainState(port)).toEqual({ live: [], plain: ['Out'], lost: [] });
    await port.write('In!B2', [['Ben']]);
    expect(await shown()).toEqual(before);
    await port.write('In!B2', [['=Ann']]);
    expect(await makeLive(port, 'Out')).toBe(1);
    expect(await shown()).toEqual(before);
    expect((await port.ourCells()).map(({ formula }) => formula.replaceAll(' ', ''))).toEqual(['=DUTY.ASSIGN(In!A1:B2,In!D1:E2)']);
    expect(await plainState(port)).toEqual({ live: ['Out'], plain: [], lost: [] });
  });

  it('that the host has lost are entered anew', async () => {
    await port.write('Out!A2', [[{ formula: '=_xldudf_DUTY_ASSIGN(In!A1:B2,In!D1:E2)' }]]);
    expect((await plainState(port)).lost).toHaveLength(1);
    expect(await repair(port)).toBe(1);
    expect((await plainState(port)).lost).toEqual([]);
    expect(((await shown()) as unknown[][])[1]).toEqual(['Choir', '=Ann', null, null]);
  });

  it.each([
    ['=_xldudf_DUTY_ASSIGN(A1#)', '=DUTY.ASSIGN(A1#)'],
    ['=@DUTY.LOADS(P)', '=DUTY.LOADS(P)'],
    ['=ROWS(_xldudf_DUTY_UNCOVERED(_xldudf_DUTY_PAIRS(G),3))', '=ROWS(DUTY.UNCOVERED(DUTY.PAIRS(G),3))'],
    ['=SUM(A1)', '=SUM(A1)'],
  ])('%s is mended to %s', (formula, expected) => {
    expect(mended(formula)).toBe(expected);
  });
});
