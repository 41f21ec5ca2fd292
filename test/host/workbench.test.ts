import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { CellFunction } from '../../src/functions/declaration';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import type { EngineModel } from '../../src/host/workbench/engine';
import { registerInEngine } from '../../src/host/workbench/register';
import { WorkbenchWorkbook } from '../../src/host/workbench/workbook';
import type { Range } from '../../src/sheet/range';
import { toEngineData } from '../../src/workbench/files/toEngine';
import { engine } from '../helpers/engine';

const journal = new Journal();
let given: readonly (Range | null)[] = [];
const probe = { id: 'PROBE', summary: '', columns: [], example: '', parameters: FUNCTIONS[0].parameters };

/** Shows what a function is given. */
const PROBE: CellFunction = {
  ...probe,
  ofRanges: (ranges) => {
    given = ranges;
    return [['ok']];
  },
};
/** Fails in a way nobody foresaw. */
const BROKEN: CellFunction = {
  ...probe,
  id: 'BROKEN',
  ofRanges: () => {
    throw new Error('unforeseen');
  },
};

let model: EngineModel;

function type(place: string, content: string, sheet = 'S'): void {
  const col = place.charCodeAt(0) - 65;
  model.dispatch('UPDATE_CELL', { sheetId: model.getters.getSheetIdByName(sheet)!, col, row: Number(place.slice(1)) - 1, content });
}

function at(place: string, sheet = 'S') {
  const col = place.charCodeAt(0) - 65;
  return model.getters.getEvaluatedCell({ sheetId: model.getters.getSheetIdByName(sheet)!, col, row: Number(place.slice(1)) - 1 });
}

beforeAll(() => registerInEngine(engine, [...FUNCTIONS, PROBE, BROKEN], journal, () => undefined));
beforeEach(() => {
  const sheet = (name: string) => ({ name, hidden: false, cells: [], widths: new Map(), merges: [], frozen: { rows: 0, columns: 0 } });
  model = new engine.Model(toEngineData({ sheets: [sheet('S'), sheet("O'Neil")], names: [], lost: [] }, engine));
});

describe('what a function is given by the sheet engine', () => {
  it('is row by row: blanks null, texts and numbers as they are, errors as objects with the usual codes', () => {
    type('A1', "'001");
    type('B1', '2.5');
    type('A2', 'TRUE');
    type('B2', '=1/0');
    type('A3', '#1 team');
    type('C1', '=A1:A2&"x"');
    type('B3', '=NOSUCH(1)');
    type('E1', '=DUTY.PROBE(A1:B4,2,,B9)');
    const error = (basicValue: string) => ({ type: 'Error', basicValue });
    expect(given).toEqual([[['001', 2.5], [true, error('#DIV/0!')], ['#1 team', error('#NAME?')]], [[2]], null, [[null]], null]);
  });

  it('ends with the last row that holds anything, in whole columns too', () => {
    type('A1', 'x');
    type('B3', 'y');
    type('E1', '=DUTY.PROBE(A:B,D1:D9)');
    expect(given.slice(0, 2)).toEqual([[['x', null], [null, null], [null, 'y']], [[null]]]);
  });

  it('comes with the address of the cell that asks, its sheet quoted', () => {
    type('C2', '=DUTY.PROBE(A1,1)', "O'Neil");
    expect(journal.calls().at(-1)).toMatchObject({ address: "'O''Neil'!C2", functionId: 'PROBE' });
  });
});

describe('what a function gives back', () => {
  it('spills over as many cells as it has', () => {
    type('A1', 'Choir');
    type('B1', 'Ann');
    type('D1', '=DUTY.ASSIGN(A1:B1,1)');
    expect(['D1', 'E1', 'F1', 'G1', 'D2', 'E2'].map((place) => at(place).value)).toEqual(['Duty', 'Person', 'Rank', 'Note', 'Choir', 'Ann']);
  });

  it('is #VALUE! with our message where the input cannot be read', () => {
    type('A1', 'Choir');
    type('B1', 'Ann');
    type('D1', '=DUTY.ASSIGN(A1:B1,"two")');
    expect(at('D1')).toMatchObject({ type: 'error', value: '#VALUE!' });
    expect(at('D1').message).toContain('People table');
  });

  it('is #VALUE! in words where something failed that nobody foresaw', () => {
    type('D1', '=DUTY.BROKEN(A1,1)');
    expect(at('D1')).toMatchObject({ type: 'error', value: '#VALUE!' });
    expect(at('D1').message).toContain('unforeseen');
    expect(at('D1').message).not.toContain('http');
  });

  it('says so where a formula is among its own inputs', () => {
    type('A1', 'Choir');
    type('B1', '=DUTY.ASSIGN(A1:B2,1)');
    expect(at('B1')).toMatchObject({ type: 'error', value: '#CYCLE' });
  });
});

describe('A1#', () => {
  it('is what a formula fills, on its own sheet and on another, as it grows and shrinks', () => {
    type('A1', 'Choir');
    type('B1', 'Ann');
    type('D1', '=DUTY.ASSIGN(A1:B9,1)');
    type('A1', '=ROWS(S!D1#)', "O'Neil");
    type('A2', '=INDEX(S!D1#,2,2)', "O'Neil");
    type('J1', '=ROWS(D1#)');
    const rows = () => [at('A1', "O'Neil").value, at('J1').value, at('A2', "O'Neil").value];
    expect(rows()).toEqual([2, 2, 'Ann']);
    type('A2', 'Organ');
    type('B2', 'Bob');
    expect(rows()).toEqual([3, 3, 'Ann']);
    type('B1', 'Cid');
    expect(rows()).toEqual([3, 3, 'Cid']);
    type('A2', '');
    type('B2', '');
    expect(rows()).toEqual([2, 2, 'Cid']);
  });

  it('is an error where the cell fills nothing', () => {
    type('A1', '5');
    type('B1', '=SUM(A1#)');
    expect(at('B1').type).toBe('error');
  });
});

describe('the workbook port of the workbench', () => {
  it('tells of one change once, and again of the workbook that takes the place of another', async () => {
    const port = new WorkbenchWorkbook(model, engine);
    let told = 0;
    port.onRecalculated(() => told++);
    type('A1', 'x');
    type('A2', 'y');
    await Promise.resolve();
    expect(told).toBe(1);
    const before = model;
    port.replace(new engine.Model({}));
    await Promise.resolve();
    expect(told).toBe(2);
    model = before;
    type('A3', 'z');
    await Promise.resolve();
    expect(told).toBe(2);
  });

  it('brings a cell of a hidden sheet into view', async () => {
    const sheetId = model.getters.getSheetIdByName("O'Neil")!;
    model.dispatch('HIDE_SHEET', { sheetId });
    await new WorkbenchWorkbook(model, engine).select("'O''Neil'!B2");
    expect(model.getters.getActivePosition()).toEqual({ sheetId, col: 1, row: 1 });
    expect(model.getters.isSheetVisible(sheetId)).toBe(true);
  });

  it('takes sheets back in one step of undo, with their names, and brings them again in one', async () => {
    const port = new WorkbenchWorkbook(model, engine);
    const before = await port.sheetNames();
    const draft = { rows: [['Duty', 'Need'], ['Choir', 2]], headingRows: [0], titleRows: [0], widths: [20, 8], alarms: ['A1:A2'] };
    await port.addSheets([
      { ...draft, name: 'One', names: [{ name: 'First', cells: 'A1:B2' }], wholes: [{ column: 1, from: 1, least: 0 }] },
      { ...draft, name: 'Two', names: [{ name: 'Second', cells: 'A1:B2' }], rows: [[{ formula: '=ROWS(First)' }]], headingRows: [] },
    ]);
    const after = await port.sheetNames();
    model.dispatch('REQUEST_UNDO');
    expect(await port.sheetNames()).toEqual(before);
    expect(await port.read('First')).toBeNull();
    model.dispatch('REQUEST_REDO');
    expect(await port.sheetNames()).toEqual(after);
    expect((await port.read('Two!A1'))!.values).toEqual([[2]]);
    expect((await port.read('Second'))!.address).toBe('Two!A1:B2');
  });
});

describe('sheets that are added', () => {
  const drafts = [
    { name: 'Table', rows: [['Duty', 'Need'], ['Choir', 2]], names: [{ name: 'Needs', cells: 'A1:B9' }], widths: [20, 8], headingRows: [0] },
    { name: 'Answer', rows: [['At a glance'], [{ formula: '=SUM(Needs)' }]], titleRows: [0], alarms: ['A2'] },
    { name: 'Counts', rows: [['Count'], [1]], wholes: [{ column: 0, from: 1, least: 0 }] },
  ];
  /** All there is to a workbook, but for the ids of styles. */
  const whole = () => {
    const { sheets, namedRanges } = model.exportData();
    return { sheets, namedRanges };
  };

  it('go with one step of undo, and come with one of redo: cells, names, widths, alarms and checks', async () => {
    const workbook = new WorkbenchWorkbook(model, engine);
    type('A1', 'before');
    const before = whole();
    await workbook.addSheets(drafts);
    const after = whole();
    expect(after.sheets.map(({ name }) => name)).toEqual(['S', "O'Neil", 'Table', 'Answer', 'Counts']);
    expect(at('A2', 'Answer').value).toBe(2);
    expect(after.sheets[4].dataValidationRules).toHaveLength(1);
    expect(after.sheets[3].conditionalFormats).toHaveLength(1);
    for (let time = 0; time < 3; time++) {
      model.dispatch('REQUEST_UNDO');
      expect(whole()).toEqual(before);
      model.dispatch('REQUEST_REDO');
      expect(whole()).toEqual(after);
      expect(at('A2', 'Answer').value).toBe(2);
    }
    model.dispatch('REQUEST_UNDO');
    model.dispatch('REQUEST_UNDO');
    expect(at('A1').value).toBe(null);
  });
});
