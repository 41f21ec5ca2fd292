import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { openXlsx } from '../../src/workbench/files/openXlsx';
import { openSite, watch, type Site, type Watch } from './harness';

let site: Site;
let page: Page;
let seen: Watch;
const folder = mkdtempSync(join(tmpdir(), 'dutyproof-'));

beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

beforeEach(async () => {
  page = await site.browser.newPage({ viewport: { width: 1400, height: 900 } });
  seen = watch(page, site.origin);
  await page.goto(`${site.origin}/workbench.html`);
  await page.waitForFunction(() => document.querySelector('.o-spreadsheet canvas') !== null);
});

afterEach(async () => {
  expect(seen.foreign).toEqual([]);
  expect(seen.errors).toEqual([]);
  await page.close();
});

/** The value shown in a cell. */
async function valueAt(sheet: string, column: number, row: number): Promise<unknown> {
  return page.evaluate(
    ({ sheet: name, column: col, row: line }) => {
      const { getters } = window.dutyproof!.workbook.model;
      return getters.getEvaluatedCell({ sheetId: getters.getSheetIdByName(name)!, col, row: line }).value;
    },
    { sheet, column, row },
  );
}

/** Selects a cell as a click does, and types into it. */
async function type(sheet: string, column: number, row: number, text: string): Promise<void> {
  await page.evaluate(
    ({ sheet: name, column: col, row: line }) => {
      const { model } = window.dutyproof!.workbook;
      const sheetIdTo = model.getters.getSheetIdByName(name)!;
      const sheetIdFrom = model.getters.getActiveSheetId();
      if (sheetIdFrom !== sheetIdTo) model.dispatch('ACTIVATE_SHEET', { sheetIdFrom, sheetIdTo });
      model.selection.selectCell(col, line);
    },
    { sheet, column, row },
  );
  await page.keyboard.type(text, { delay: 15 });
  await page.keyboard.press('Enter');
}

function pane(): ReturnType<Page['locator']> {
  return page.locator('#pane main');
}

describe('the workbench with the demo', () => {
  it('opens with the demo answered, in the sheet and in the pane', async () => {
    expect(await valueAt('Results', 0, 2)).toBe('Seats needed');
    expect(await valueAt('Results', 1, 2)).toBe(52);
    expect(await valueAt('Results', 1, 4)).toBe(3);
    await pane().getByText('of 52 seats covered').waitFor();
    await pane().getByText('3 uncovered').waitFor();
  });

  it('recomputes every result and the pane when a cell is typed in', async () => {
    await type('People', 1, 17, '3');
    await pane().getByText('1 uncovered').waitFor();
    expect(await valueAt('Results', 1, 4)).toBe(1);
  });

  it('shows what cannot be read in words, and answers again when it is mended', async () => {
    await type('People', 1, 17, 'two');
    await pane().getByText('People table, row 18 of the range, column Maximum: found "two"').waitFor();
    expect(await valueAt('Results', 0, 1)).toBe('#VALUE!');
    await type('People', 1, 17, '1');
    await pane().getByText('3 uncovered').waitFor();
  });

  it('forgets a case whose formulas are gone', async () => {
    await page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      for (const name of ['Results', 'Grid']) model.dispatch('DELETE_SHEET', { sheetId: model.getters.getSheetIdByName(name)! });
    });
    await pane().getByText('Nothing has been calculated yet').waitFor();
  });

  it('jumps to the cell that a button of the pane names', async () => {
    await pane().getByText('Where it answers').click();
    await pane().getByRole('button', { name: 'GRID Grid!A1' }).click();
    expect(await page.evaluate(() => window.dutyproof!.workbook.model.getters.getActiveSheetId())).toBe(
      await page.evaluate(() => window.dutyproof!.workbook.model.getters.getSheetIdByName('Grid')),
    );
  });

  it('nests our functions in native ones and follows A1# across sheets', async () => {
    await type('Rules', 6, 0, '=ROWS(DUTY.UNCOVERED(Pairs, People, Duties, Rules))');
    expect(await valueAt('Rules', 6, 0)).toBe(4);
    await type('Rules', 6, 1, '=ROWS(Results!A2#)');
    expect(await valueAt('Rules', 6, 1)).toBe(12);
    await type('Rules', 6, 2, '=DUTY.ASSIGN(Pairs, Peple)');
    expect(String(await valueAt('Rules', 6, 2))).toMatch(/^#/u);
  });
});

describe('files', () => {
  async function save(): Promise<string> {
    const [download] = await Promise.all([page.waitForEvent('download'), page.click('#save')]);
    const file = join(folder, `saved-${Date.now()}.xlsx`);
    await download.saveAs(file);
    return file;
  }

  it('saves formulas and values that come back when the file is opened again', async () => {
    await type('People', 1, 17, '2');
    await pane().getByText('2 uncovered').waitFor();
    const file = await save();
    await page.click('#demo');
    await pane().getByText('3 uncovered').waitFor();
    await page.setInputFiles('#files', file);
    await pane().getByText('2 uncovered').waitFor();
    expect(await valueAt('Results', 1, 4)).toBe(2);
    const book = await openXlsx(new Uint8Array(readFileSync(file)));
    const formulas = book.sheets.flatMap(({ cells }) => cells.flatMap(({ formula }) => (formula === null ? [] : [formula])));
    expect(formulas).toContain('=DUTY.ASSIGN(Pairs,People,Duties,Rules)');
    expect(formulas).toHaveLength(6);
    expect(book.names.map(({ name }) => name).sort()).toEqual(['Duties', 'Pairs', 'People', 'Rules']);
  });

  it('opens tables as text files and answers them on new sheets when asked', async () => {
    const files = {
      'pairs.csv': '\uFEFFDuty;Person\r\nChoir;Ann\r\n"Organ; large";Bob\r\nOrgan, small;Ann\r\n',
      'people.csv': 'Person,Maximum\nAnn,1\nBob,1\n',
    };
    for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text);
    await page.setInputFiles('#files', Object.keys(files).map((name) => join(folder, name)));
    await page.getByText('Answer them on new sheets').click();
    await pane().getByText('of 3 seats covered').waitFor();
    expect(await valueAt('pairs', 0, 2)).toBe('Organ; large');
    expect(await valueAt('Results', 1, 4)).toBe(1);
  });

  it('says what is wrong with a file it cannot open', async () => {
    const broken = join(folder, 'broken.xlsx');
    writeFileSync(broken, 'no workbook');
    await page.setInputFiles('#files', broken);
    await page.getByText('This file cannot be read as an .xlsx workbook').waitFor();
  });

  it('keeps names that look like markup, formulas or numbers as text', async () => {
    const hostile = ['<img src=x onerror="window.hacked=1">', '=1+1', '001', '+44', '\u202Ename', '🙂'.repeat(200), 'x'.repeat(10_000)];
    const cell = (text: string): string => `"${text.replaceAll('"', '""')}"`;
    writeFileSync(join(folder, 'pairs.csv'), ['Duty,Person', ...hostile.map((name) => `${cell(name)},${cell(name)}`)].join('\n'));
    writeFileSync(join(folder, 'people.csv'), 'Person,Maximum\nNobody,1\n');
    await page.setInputFiles('#files', ['pairs.csv', 'people.csv'].map((name) => join(folder, name)));
    await page.getByText('Answer them on new sheets').click();
    await pane().getByText('of 7 seats covered').waitFor();
    await pane().getByText('Findings (').click();
    expect(await page.evaluate(() => 'hacked' in window)).toBe(false);
    expect(await page.locator('img[src="x"]').count()).toBe(0);
    expect(await valueAt('pairs', 0, 2)).toBe('=1+1');
    expect(await valueAt('pairs', 0, 3)).toBe('001');
    const width = await pane().evaluate((element) => element.scrollWidth - element.clientWidth);
    expect(width).toBeLessThanOrEqual(0);
  });
});
