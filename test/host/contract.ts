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
  });
}
