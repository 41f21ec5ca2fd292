import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openSite, type Site } from './harness';

const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

async function openWorkbench(colorScheme: 'light' | 'dark'): Promise<Page> {
  const page = await site.browser.newPage({ colorScheme, viewport: { width: 1300, height: 900 }, bypassCSP: true });
  await page.goto(`${site.origin}/workbench.html`);
  await page.locator('#pane main').getByText('3 uncovered').waitFor();
  return page;
}

/** Violations of WCAG 2.2 AA that axe finds in our own parts of the page. */
async function violations(page: Page): Promise<string[]> {
  await page.evaluate(AXE);
  return page.evaluate(async () => {
    const axe = (window as unknown as { axe: { run(context: object, options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> } }).axe;
    const { violations: found } = await axe.run(
      { include: [['#pane'], ['.wb-bar']] },
      { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'] },
    );
    return found.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`);
  });
}

describe('the pane', () => {
  it.each(['light', 'dark'] as const)('keeps WCAG 2.2 AA in %s, with everything opened', async (scheme) => {
    const page = await openWorkbench(scheme);
    const field = page.locator('#pane').getByLabel('A duty or a person');
    await field.fill('Economics paper');
    await field.press('Enter');
    await page.locator('#pane').getByRole('button', { name: 'What follows' }).first().click();
    for (const summary of await page.locator('#pane summary').all()) await summary.click();
    // The drawings are made when they are looked at.
    await page.locator('#pane figure').first().waitFor();
    for (const summary of await page.locator('#pane figure summary').all()) await summary.click();
    expect(await page.locator('#pane .dp-moves li').count()).toBeGreaterThan(0);
    expect(await violations(page)).toEqual([]);
    await page.close();
  });

  it('keeps the focus and what is opened when the sheet is recalculated', async () => {
    const page = await openWorkbench('light');
    await page.locator('#pane summary', { hasText: 'Where it answers' }).click();
    await page.locator('#pane').getByRole('button', { name: 'ASSIGN' }).focus();
    await page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      model.dispatch('UPDATE_CELL', { sheetId: model.getters.getSheetIdByName('Inputs')!, col: 7, row: 18, content: '3' });
    });
    await page.locator('#pane main').getByText('1 uncovered').waitFor();
    const focused = await page.evaluate(() => document.querySelector('#pane')!.shadowRoot!.activeElement?.textContent);
    expect(focused).toContain('ASSIGN');
    expect(await page.locator('#pane').getByRole('button', { name: 'GRID' }).isVisible()).toBe(true);
    expect(await page.locator('#pane .dp-hidden[role=status]').textContent()).toBe('Recalculated: 1 seat uncovered.');
    await page.close();
  });

  it('stays within 300 pixels and answers quickly with a thousand short duties', async () => {
    const page = await openWorkbench('light');
    await page.addStyleTag({ content: '.wb-pane { width: 300px !important; }' });
    await page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      const sheetId = model.getters.getSheetIdByName('Inputs')!;
      // The pane is on trial here, not the native formulas of the proof, whose work grows with the square of the rows.
      for (const name of ['Why', 'Proof']) model.dispatch('DELETE_SHEET', { sheetId: model.getters.getSheetIdByName(name)!, sheetName: name });
      model.dispatch('ADD_COLUMNS_ROWS', { sheetId, sheetName: 'Inputs', dimension: 'ROW', base: 43, quantity: 1200, position: 'before' });
      for (let row = 43; row < 1243; row++) model.dispatch('UPDATE_CELL', { sheetId, col: 0, row, content: `Extra duty number ${row}` });
    });
    await page.locator('#pane main').getByText('1,203 uncovered').waitFor();
    expect(await page.locator('#pane .dp-item').count()).toBeLessThan(40);
    const overflow = await page.locator('#pane main').evaluate((element) => element.scrollWidth - element.clientWidth);
    expect(overflow).toBeLessThanOrEqual(0);
    await page.locator('#pane').getByRole('button', { name: 'Show all 1,203' }).click();
    expect(await page.locator('#pane .dp-item').count()).toBeGreaterThan(1200);
    await page.close();
  });
});
