import { describe, expect, it } from 'vitest';
import type { WorkbookPort } from '../../src/host/port';

/** A workbook under test, and the hand of a person in it. */
export interface Harness {
  readonly port: WorkbookPort;
  /** Types a formula into a cell of a sheet that exists, or clears the cell. */
  readonly write: (address: string, formula: string | null) => void;
  /** The cell that is selected. */
  readonly selected: () => string | null;
}

/** What every adapter of the port must do; run once for each of them. */
export function describeWorkbookPort(name: string, makeHarness: () => Harness): void {
  describe(`the workbook port of ${name}`, () => {
    it('tells the formulas of cells, and null where there is none', async () => {
      const { port, write } = makeHarness();
      write('Sheet1!B2', '=1+1');
      const [formula, ...others] = await port.formulasAt(['Sheet1!B2', 'Sheet1!B3', 'Gone!A1', 'nonsense']);
      expect(formula?.replaceAll(' ', '')).toBe('=1+1');
      expect(others).toEqual([null, null, null]);
      write('Sheet1!B2', null);
      expect(await port.formulasAt(['Sheet1!B2'])).toEqual([null]);
      expect(await port.formulasAt([])).toEqual([]);
    });

    it('calls listeners after a change until they end their subscription', async () => {
      const { port, write } = makeHarness();
      let calls = 0;
      const end = port.onRecalculated(() => calls++);
      write('Sheet1!A1', '=2');
      await Promise.resolve();
      expect(calls).toBeGreaterThan(0);
      end();
      const before = calls;
      write('Sheet1!A1', '=3');
      await Promise.resolve();
      expect(calls).toBe(before);
    });

    it('selects a cell, and ignores one that is gone', async () => {
      const { port, write, selected } = makeHarness();
      write('Sheet1!C4', '=1');
      await port.select('Sheet1!C4');
      expect(selected()).toBe('Sheet1!C4');
      await port.select('Gone!A1');
      expect(selected()).toBe('Sheet1!C4');
    });

    it('recalculates and tells whoever listens', async () => {
      const { port } = makeHarness();
      let calls = 0;
      port.onRecalculated(() => calls++);
      await port.recalculate();
      expect(calls).toBeGreaterThan(0);
    });

    it('adds sheets, and never writes over what is there', async () => {
      const { port } = makeHarness();
      const draft = { name: 'Tables', rows: [['Duty', 'Person'], ['=Choir', 1], [null, null]], names: [{ name: 'Choices', cells: 'A1:B3' }] };
      const [first] = await port.addSheets([draft]);
      const [second] = await port.addSheets([{ ...draft, rows: [['Other']] }]);
      expect(new Set([first, second].map((name) => name.toLowerCase())).size).toBe(2);
      expect(await port.sheetNames()).toEqual(expect.arrayContaining([first, second]));
      const block = (await port.read('choices'))!;
      expect(block.address).toBe(`${first}!A1:B3`);
      expect(block.values).toEqual([['Duty', 'Person'], ['=Choir', 1], [null, null]]);
      expect((await port.blocks()).map(({ address }) => address)).toContain(`${first}!A1:B3`);
      expect(await port.formulasAt([`${first}!A2`])).toEqual([null]);
    });

    it('puts rows where there is room, and says where there is none', async () => {
      const { port } = makeHarness();
      const [sheet] = await port.addSheets([{ name: 'Rows', rows: [['Rule'], [null], [null]] }]);
      expect(await port.appendRow(`${sheet}!A1:A3`, ['+1'])).toBe(`${sheet}!A2`);
      expect(await port.appendRow(`${sheet}!A1:A3`, [2])).toBe(`${sheet}!A3`);
      expect(await port.appendRow(`${sheet}!A1:A3`, [3])).toBeNull();
      expect(await port.appendRow('Nowhere', [3])).toBeNull();
      expect((await port.read(`${sheet}!A1:A3`))!.values).toEqual([['Rule'], ['+1'], [2]]);
    });

    it('reads whole columns down to a blank row below what is filled, and puts rows there', async () => {
      const { port } = makeHarness();
      const [sheet] = await port.addSheets([{ name: 'Columns', rows: [['Rule', 'Duty'], ['Fixed', 'Choir']] }]);
      const block = (await port.read(`${sheet}!$A:$B`))!;
      expect(block.address).toBe(`${sheet}!A1:B3`);
      expect(block.values).toEqual([['Rule', 'Duty'], ['Fixed', 'Choir'], [null, null]]);
      expect(await port.appendRow(`${sheet}!A:B`, ['Barred'])).toBe(`${sheet}!A3`);
      expect(await port.appendRow(`${sheet}!A:B`, ['Barred'])).toBe(`${sheet}!A4`);
    });

    it('writes cells, formulas among them, and finds those that are ours', async () => {
      const { port } = makeHarness();
      const [sheet] = await port.addSheets([{ name: 'Ours', rows: [['x']] }]);
      await port.write(`${sheet}!B2`, [['text', { formula: '=DUTY.FINDINGS(A1:B2,3)' }]]);
      const ours = (await port.ourCells()).filter(({ address }) => address.startsWith(`${sheet}!`));
      expect(ours.map(({ address }) => address)).toEqual([`${sheet}!C2`]);
      expect(ours[0].formula.replaceAll(' ', '')).toBe('=DUTY.FINDINGS(A1:B2,3)');
      expect(await port.shownBy([`${sheet}!C2`])).toHaveLength(1);
      expect(await port.calculation()).toEqual({ isManual: false, isPending: false });
      await port.write(`${sheet}!C2`, [[null]]);
      expect((await port.ourCells()).filter(({ address }) => address.startsWith(`${sheet}!`))).toEqual([]);
    });

    it('tells what is selected, and when that changes', async () => {
      const { port } = makeHarness();
      const [sheet] = await port.addSheets([{ name: 'Selected', rows: [['Duty', 'Need', null], ['Choir', 2, null], [null, null, null]] }]);
      const seen: string[] = [];
      const end = port.onSelected((address) => seen.push(address));
      await port.select(`${sheet}!B2`);
      expect((await port.selection())!.values).toEqual([['Duty', 'Need'], ['Choir', 2]]);
      await port.select(`${sheet}!C3`);
      expect(await port.selection()).toBeNull();
      expect(seen.at(-1)).toBe(`${sheet}!C3`);
      end();
      await port.select(`${sheet}!A1`);
      expect(seen.at(-1)).toBe(`${sheet}!C3`);
    });
  });
}
