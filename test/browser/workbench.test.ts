import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { DeskPage } from './desk';
import { openSite, watch, type Site, type Watch } from './harness';

/** The maximum of Quentin Rook, who may take the labs that are short. */
const SCARCE = 'Inputs!H19';

let site: Site;
let desk: DeskPage;
let seen: Watch;

beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

beforeEach(async () => {
  desk = await DeskPage.open(site);
  seen = watch(desk.page, site.origin);
});

afterEach(async () => {
  expect(seen.foreign).toEqual([]);
  expect(seen.errors).toEqual([]);
  await desk.page.close();
});

describe('the workbench with the demo', () => {
  it('opens with the demo answered, in the sheet and in the pane', async () => {
    expect(await desk.sheets()).toEqual(['Inputs', 'Results', 'Grid', 'Why', 'Proof']);
    expect(await desk.valueAt('Results!A3')).toBe('Seats needed');
    expect(await desk.valueAt('Results!B3')).toBe(52);
    expect(await desk.valueAt('Results!B5')).toBe(3);
    await desk.pane.getByText('of 52 seats covered').waitFor();
    expect(await desk.page.title()).toBe('demo.xlsx · Dutyproof workbench');
  });

  it('asks nothing of any other origin while it opens', async () => {
    const page = await site.browser.newPage();
    const { foreign, errors } = watch(page, site.origin);
    await page.goto(`${site.origin}/workbench.html`);
    await page.locator('#pane main').getByText('3 uncovered').waitFor();
    await page.getByRole('button', { name: 'Licences' }).click();
    expect(foreign).toEqual([]);
    expect(errors).toEqual([]);
    await page.close();
  });

  it('never scrolls as a page: the pane and the sheet do', async () => {
    await desk.type('Inputs!A3', 'Algebra paper');
    const { scrolled, beyond } = await desk.page.evaluate(() => ({
      scrolled: document.scrollingElement!.scrollTop + document.body.scrollTop,
      beyond: document.documentElement.scrollHeight - window.innerHeight,
    }));
    expect({ scrolled, beyond: Math.max(0, beyond) }).toEqual({ scrolled: 0, beyond: 0 });
  });

  it('recomputes every result and the pane when a cell is typed in', async () => {
    await desk.type(SCARCE, '3');
    await desk.pane.getByText('1 uncovered').waitFor();
    expect(await desk.valueAt('Results!B5')).toBe(1);
  });

  it('takes in a row that is added below a table', async () => {
    await desk.type('Inputs!G25', 'Wilma Tarn');
    await desk.pane.getByText('Findings (1)').click();
    await desk.select('Results!A1');
    await desk.pane.getByRole('button', { name: 'People, row 24' }).click();
    await desk.page.waitForFunction(() => {
      const { getters } = window.dutyproof!.workbook.model;
      const { sheetId, col, row } = getters.getActivePosition();
      return getters.getSheetName(sheetId) === 'Inputs' && col === 6 && row === 24;
    });
  });

  it('shows what cannot be read in words, and answers again when it is mended', async () => {
    await desk.type(SCARCE, 'two');
    await desk.pane.getByText('People table, row 18 of the range, column Maximum: found "two"').waitFor();
    expect(await desk.valueAt('Results!A2')).toBe('#VALUE!');
    await desk.type(SCARCE, '1');
    await desk.pane.getByText('3 uncovered').waitFor();
  });

  it('forgets a case whose formulas are gone', async () => {
    await desk.page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      for (const name of ['Results', 'Grid', 'Why', 'Proof']) model.dispatch('DELETE_SHEET', { sheetId: model.getters.getSheetIdByName(name)!, sheetName: name });
    });
    await desk.pane.getByText('This workbook holds no formulas of Dutyproof yet').waitFor();
  });

  it('jumps to the cell that a button of the pane names', async () => {
    await desk.pane.getByText('Where it answers').click();
    await desk.pane.getByRole('button', { name: 'GRID Grid!A2' }).click();
    await desk.page.locator('.o-sheet.active', { hasText: 'Grid' }).waitFor();
  });

  it('nests our functions in native ones and follows A1# across sheets', async () => {
    await desk.type('Inputs!R1', '=ROWS(DUTY.UNCOVERED(Pairs, People, Duties, Rules))');
    expect(await desk.valueAt('Inputs!R1')).toBe(4);
    await desk.type('Inputs!R2', '=ROWS(Results!A2#)');
    expect(await desk.valueAt('Inputs!R2')).toBe(12);
    await desk.type('Inputs!R3', '=DUTY.ASSIGN(Pairs, Peple)');
    expect(String(await desk.valueAt('Inputs!R3'))).toMatch(/^#/u);
  });
});

describe('the page', () => {
  it('shows the formula line, the grid and the tabs of the engine, and none of its menus', async () => {
    const { page } = desk;
    for (const part of ['.o-topbar-composer', '.o-grid canvas', '.o-sheet-list']) expect(await page.locator(part).first().isVisible()).toBe(true);
    for (const part of ['.o-topbar-top', '.tool-container', '.o-list-sheets', '.o-sheet-icon', '.o-menu-wrapper']) {
      expect(await page.locator(`${part} >> visible=true`).count(), part).toBe(0);
    }
    await page.keyboard.press('Control+f');
    await page.keyboard.press('Control+h');
    expect(await page.locator('.o-sidePanel').count()).toBe(0);
  });

  it('names the publisher of the engine among the licences and nowhere else', async () => {
    const outside = await desk.page.evaluate(() => {
      const copy = document.body.cloneNode(true) as HTMLElement;
      copy.querySelector('#licence-dialog')!.remove();
      return copy.innerText + document.title;
    });
    expect(outside).not.toMatch(/odoo/iu);
    for (const link of await desk.page.locator('#licence-dialog a').all()) {
      const target = (await link.getAttribute('href'))!;
      expect((await desk.page.request.get(`${site.origin}/${target}`)).status(), target).toBe(200);
    }
  });

  it('never scrolls as a whole, whatever the engine brings into view', async () => {
    await desk.select('Inputs!A1');
    await desk.page.locator('.o-sheet', { hasText: 'Grid' }).click();
    await desk.page.waitForTimeout(400);
    expect((await desk.page.locator('.wb-bar').boundingBox())!.y).toBe(0);
  });

  it('inserts and deletes rows from a menu of its own, and formulas follow', async () => {
    const { page } = desk;
    await desk.select('Inputs!A3');
    const box = (await page.locator('.o-grid-overlay').boundingBox())!;
    await page.mouse.click(box.x + 80, box.y + 85, { button: 'right' });
    await page.getByRole('menuitem', { name: 'Insert row above' }).click();
    expect(await desk.valueAt('Inputs!H20')).toBe(1);
    await desk.type('Inputs!H20', '3');
    await desk.pane.getByText('1 uncovered').waitFor();
    await page.keyboard.press('Control+z');
    await desk.pane.getByText('3 uncovered').waitFor();
  });

  it('has a menu on the tabs: hide a sheet and show it again', async () => {
    const { page } = desk;
    const tab = (name: string) => page.locator('.o-sheet', { hasText: name });
    await tab('Grid').click({ button: 'right' });
    await page.getByRole('menuitem', { name: 'Hide' }).click();
    await tab('Grid').waitFor({ state: 'detached' });
    await tab('Results').click({ button: 'right' });
    await page.getByRole('menuitem', { name: 'Show "Grid"' }).click();
    await tab('Grid').waitFor();
  });

  it('is reached by keys alone: F6 leads from the sheet to the pane, to the bar and back', async () => {
    const { page } = desk;
    const focused = () => page.evaluate(() => {
      const { activeElement } = document;
      return activeElement?.closest('#grid, #pane, .wb-bar')?.id ?? '';
    });
    await desk.select('Results!A1');
    await page.locator('.o-grid-overlay').click({ position: { x: 60, y: 60 } });
    expect(await focused()).toBe('grid');
    await page.keyboard.press('F6');
    expect(await focused()).toBe('pane');
    await page.keyboard.press('F6');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('open');
    await page.keyboard.press('F6');
    expect(await focused()).toBe('grid');
  });

  it('gives the pane more room when the divider is moved', async () => {
    const width = async () => (await desk.page.locator('#pane').boundingBox())!.width;
    const before = await width();
    await desk.page.locator('#divider').focus();
    await desk.page.keyboard.press('ArrowLeft');
    expect(await width()).toBeGreaterThan(before);
    const line = (await desk.page.locator('#divider').boundingBox())!;
    await desk.page.mouse.move(line.x + 3, 400);
    await desk.page.mouse.down();
    await desk.page.mouse.move(line.x + 103, 400);
    await desk.page.mouse.up();
    expect(await width()).toBeLessThan(before);
  });
});
