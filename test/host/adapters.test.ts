import { MemoryWorkbook } from '../../src/host/memory';
import { columnLetters, formatAddress, parseAddress, parseCell } from '../../src/host/address';
import { WorkbenchWorkbook } from '../../src/host/workbench/workbook';
import { describe, expect, it } from 'vitest';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { registerInEngine } from '../../src/host/workbench/register';
import { engine } from '../helpers/engine';
import { describeWorkbookPort } from './contract';

describeWorkbookPort('the workbook in memory', () => {
  const port = new MemoryWorkbook();
  return { port, write: (address, formula) => port.type(address, formula), selected: () => port.selected };
});

registerInEngine(engine, FUNCTIONS, new Journal(), () => undefined);

describeWorkbookPort('the workbench', () => {
  const model = new engine.Model({});
  return {
    port: new WorkbenchWorkbook(model, engine),
    write: (address, formula) => {
      const { column, row } = parseCell(parseAddress(address)!.cell)!;
      const sheetId = model.getters.getSheetIdByName('Sheet1')!;
      model.dispatch('UPDATE_CELL', { sheetId, col: column, row, content: formula ?? '' });
    },
    selected: () => {
      const { sheetId, col, row } = model.getters.getActivePosition();
      return `${model.getters.getSheetName(sheetId)}!${columnLetters(col)}${row + 1}`;
    },
  };
});

describe('cell addresses', () => {
  it.each([
    ['Sheet1!B4', 'Sheet1', 'B4'],
    ["'My sheet'!$B$4", 'My sheet', 'B4'],
    ["'O''Neil'!A1", "O'Neil", 'A1'],
    ['Übung!AA10', 'Übung', 'AA10'],
  ])('%s is a cell of a sheet', (address, sheet, cell) => {
    expect(parseAddress(address)).toEqual({ sheet, cell });
  });

  it('that make no sense are none', () => {
    expect([parseAddress('B4'), parseAddress('!B4'), parseAddress('')]).toEqual([null, null, null]);
    expect([parseCell('B0'), parseCell('4B'), parseCell('')]).toEqual([null, null, null]);
  });

  it.each(['Sheet1', 'My sheet', "O'Neil", 'A1', 'R1C1', '2026', 'Übung'])('on sheet %s come back as they were written', (sheet) => {
    expect(parseAddress(formatAddress({ sheet, cell: 'C7' }))).toEqual({ sheet, cell: 'C7' });
  });

  it('count columns as sheets do', () => {
    expect([0, 25, 26, 701, 702, 16_383].map(columnLetters)).toEqual(['A', 'Z', 'AA', 'ZZ', 'AAA', 'XFD']);
    for (let column = 0; column < 20_000; column += 97) {
      if (column < 16_384) expect(parseCell(`${columnLetters(column)}1`)).toEqual({ column, row: 0 });
    }
  });
});
