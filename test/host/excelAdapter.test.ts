import { describe, expect, it } from 'vitest';
import { decide, decisionsOf } from '../../src/desk/decide';
import { propose } from '../../src/desk/propose';
import { formatAddress, formatZone, parseZone } from '../../src/host/address';
import { ExcelWorkbook } from '../../src/host/excel/workbook';
import { FakeExcel, typeInto } from '../helpers/fakeExcel';
import { describeWorkbookPort } from './contract';

describeWorkbookPort('Excel', () => {
  const excel = new FakeExcel();
  excel.install();
  return {
    port: new ExcelWorkbook(),
    write: (address, formula) => typeInto(excel, address, formula),
    selected: () => formatAddress({ sheet: excel.selected.sheet, cell: formatZone(excel.selected.zone) }),
  };
});

describe('tables and names of Excel', () => {
  async function workbook(): Promise<{ excel: FakeExcel; port: ExcelWorkbook }> {
    const excel = new FakeExcel();
    excel.install();
    const port = new ExcelWorkbook();
    await port.write('Sheet1!A1', [['Duty', 'Person'], ['Desk', 'Ada'], ['Desk', 'Bo']]);
    await port.write('Sheet1!D1', [['Person', 'Maximum'], ['Ada', 1], ['Bo', 1]]);
    await port.write('Sheet1!G1', [['Rule', 'Duty', 'Person', 'Value'], ['Barred', 'Desk', 'Bo', null]]);
    for (const [name, cells] of [['Choices', 'A1:B3'], ['Staff', 'D1:E3'], ['Promises', 'G1:J2']]) {
      excel.tables.set(name, { sheet: 'Sheet1', zone: parseZone(cells)! });
    }
    return { excel, port };
  }

  it('are proposed with their headings, and read with and without them', async () => {
    const { port } = await workbook();
    const chosen = propose(await port.blocks());
    expect([...chosen].map(([role, { argument }]) => [role, argument]).sort()).toEqual([
      ['pairs', 'Choices[#All]'],
      ['people', 'Staff[#All]'],
      ['rules', 'Promises[#All]'],
    ]);
    expect((await port.read('Choices[#All]'))!.address).toBe('Sheet1!A1:B3');
    expect((await port.read('Choices'))!.address).toBe('Sheet1!A2:B3');
    expect(await port.read('Choices[[#All],[Duty]]')).toBeNull();
  });

  it('grow by a decision where they are full', async () => {
    const { excel, port } = await workbook();
    await port.write('Sheet1!L1', [[{ formula: '=DUTY.ASSIGN(Choices[#All],Staff[#All],,Promises[#All])' }]]);
    expect(await decide(port, 'Sheet1!L1', 'Fixed', '=Desk', 'Ada')).toContain('It stands in Sheet1!G3');
    expect(formatZone(excel.tables.get('Promises')!.zone)).toBe('G1:J3');
    expect((await decisionsOf(port, 'Sheet1!L1')).map(({ word, duty }) => [word, duty])).toEqual([['Barred', 'Desk'], ['Fixed', '=Desk']]);
  });

  it('that lost their cells do not stand in the way of new names; others are left as they are', async () => {
    const { excel, port } = await workbook();
    excel.names.set('plan', null);
    excel.names.set('people', { sheet: 'Sheet1', zone: parseZone('D1:E3')! });
    const [sheet] = await port.addSheets([{ name: 'New', rows: [['x']], names: [{ name: 'Plan', cells: 'A1:A2' }, { name: 'People', cells: 'A1:A2' }] }]);
    expect((await port.read('Plan'))!.address).toBe(`${sheet}!A1:A2`);
    expect((await port.read('People'))!.address).toBe('Sheet1!D1:E3');
  });

  it('tell how it stands with the calculation', async () => {
    const { excel, port } = await workbook();
    excel.calculation = { calculationMode: 'Manual', calculationState: 'Pending' };
    expect(await port.calculation()).toEqual({ isManual: true, isPending: true });
  });

  it('are looked through where a sheet is protected', async () => {
    const { excel, port } = await workbook();
    await port.write('Sheet1!L1', [[{ formula: '=DUTY.ASSIGN(Choices[#All],1)' }]]);
    excel.protected.add('Sheet1');
    expect((await port.ourCells()).map(({ address }) => address)).toEqual(['Sheet1!L1']);
  });
});
