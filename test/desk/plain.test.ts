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
    expect(await makePlain(port, 'Out')).toEqual({ done: 1, left: [] });
    expect(await shown()).toEqual(before);
    expect(await port.ourCells()).toEqual([]);
    expect(await plainState(port, await port.ourCells())).toEqual({ live: [], plain: ['Out'], lost: [] });
    await port.write('In!B2', [['Ben']]);
    expect(await shown()).toEqual(before);
    await port.write('In!B2', [['=Ann']]);
    expect(await makeLive(port, 'Out')).toEqual({ done: 1, left: [] });
    expect(await shown()).toEqual(before);
    expect((await port.ourCells()).map(({ formula }) => formula.replaceAll(' ', ''))).toEqual(['=DUTY.ASSIGN(In!A1:B2,In!D1:E2)']);
    expect(await plainState(port, await port.ourCells())).toEqual({ live: ['Out'], plain: [], lost: [] });
  });

  it('are not put back over cells that were changed or moved since', async () => {
    await makePlain(port, 'Out');
    await port.write('Out!B3', [['Someone else']]);
    const { done, left } = await makeLive(port, 'Out');
    expect(done).toBe(0);
    expect(left).toEqual([expect.stringMatching(/^Out!A2:D3 does not hold what was put there: .* kept in 'Formulas kept'!B2\.$/u)]);
    expect((await port.read('Out!B3'))!.values).toEqual([['Someone else']]);
    await port.write('Out!B3', [['=Ann']]);
    port.model.dispatch('ADD_COLUMNS_ROWS', { sheetId: port.model.getters.getSheetIdByName('Out')!, sheetName: 'Out', dimension: 'ROW', position: 'before', base: 0, quantity: 1 });
    expect((await makeLive(port, 'Out')).done).toBe(0);
    expect((await port.read('Out!A3'))!.values).toEqual([['Duty']]);
    expect(await plainState(port, await port.ourCells())).toMatchObject({ live: [], plain: ['Out'] });
  });

  it('that show an error are not made plain, and none is made plain that could not be kept', async () => {
    await port.write('Out!F1', [[{ formula: '=DUTY.ASSIGN(In!A1:B2, In!A1)' }]]);
    const { done, left } = await makePlain(port, 'Out');
    expect({ done, left }).toEqual({ done: 1, left: ['Out!F1 shows no answer.'] });
    await makeLive(port, 'Out');
    await port.write("'Formulas kept'!A2", Array.from({ length: 399 }, () => ['x', null, null, null, null]));
    const full = await makePlain(port, 'Out');
    expect(full.done).toBe(0);
    expect(full.left).toContainEqual(expect.stringMatching(/^Out!A2: the sheet Formulas kept is full/u));
    expect((await plainState(port, await port.ourCells())).live).toEqual(['Out']);
  });

  it('that the host has lost are entered anew', async () => {
    await port.write('Out!A2', [[{ formula: '=_xldudf_DUTY_ASSIGN(In!A1:B2,In!D1:E2)' }]]);
    expect((await plainState(port, await port.ourCells())).lost).toHaveLength(1);
    expect(await repair(port)).toBe(1);
    expect((await plainState(port, await port.ourCells())).lost).toEqual([]);
    expect(((await shown()) as unknown[][])[1]).toEqual(['Choir', '=Ann', null, null]);
  });

  it.each([
    ['=_xldudf_DUTY_ASSIGN(A1#)', '=DUTY.ASSIGN(A1#)'],
    ['=@DUTY.LOADS(P)', '=DUTY.LOADS(P)'],
    ['=ROWS(_xldudf_DUTY_UNCOVERED(_xldudf_DUTY_PAIRS(G),3))', '=ROWS(DUTY.UNCOVERED(DUTY.PAIRS(G),3))'],
    ['=_xlfn._xldudf_DUTY_PROOF(A1)', '=DUTY.PROOF(A1)'],
    ['=_xll.DUTY.GRID(A1)', '=DUTY.GRID(A1)'],
    ['=duty.check (A1)', '=DUTY.CHECK(A1)'],
    ['="_xldudf_DUTY_ASSIGN("&ROWS(_xldudf_DUTY_ASSIGN(A1))', '="_xldudf_DUTY_ASSIGN("&ROWS(DUTY.ASSIGN(A1))'],
    ['=MY_DUTY.ASSIGN(A1)', '=MY_DUTY.ASSIGN(A1)'],
    ['=SUM(A1)', '=SUM(A1)'],
  ])('%s is mended to %s', (formula, expected) => {
    expect(mended(formula)).toBe(expected);
  });
});
