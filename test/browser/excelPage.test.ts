import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { openSite, watch, type Site, type Watch } from './harness';

/**
 * The page that Excel loads, when Office's script is slow, missing or busy: a stand-in of a few lines
 * takes its place, and the clock of the page is ours.
 */

/** Answers when told to; refuses every request the way Excel does while a cell is being edited. */
const STAND_IN = `
  window.handlers = {};
  window.CustomFunctions = { associate: (id, handler) => (window.handlers[id] = handler) };
  window.Office = {
    onReady: () => new Promise((resolve) => (window.answer = (host) => resolve({ host, platform: null }))),
    context: { requirements: { isSetSupported: () => true } },
  };
  window.Excel = { run: () => Promise.reject(new Error('InvalidOperationInCellEditMode')) };
`;

interface PageGlobals {
  answer(host: string | null): void;
  readonly handlers: Record<string, (...args: unknown[]) => unknown>;
}

let site: Site;
let page: Page;
let seen: Watch;

beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());
afterEach(() => page.close());

/** @param script what comes in place of Office's script; null where its address cannot be reached */
async function openPage(script: string | null): Promise<void> {
  page = await site.browser.newPage();
  seen = watch(page, site.origin);
  await page.clock.install();
  await page.route('https://appsforoffice.microsoft.com/**', (route) =>
    script === null ? route.abort() : route.fulfill({ body: script, contentType: 'text/javascript' }),
  );
  await page.goto(`${site.origin}/pane.html`);
}

const answer = (host: string | null): Promise<void> =>
  page.evaluate((name) => (window as unknown as PageGlobals).answer(name), host);
const paneText = (): Promise<string> => page.locator('#pane').innerText();

describe('the page that Excel loads', () => {
  it('says where it belongs when it is opened in a browser', async () => {
    await openPage(STAND_IN);
    await answer(null);
    await expect.poll(paneText).toContain('Open it from Excel');
    expect(seen.errors).toEqual([]);
  });

  it('says so, and breaks nothing, where the script of Office cannot be reached', async () => {
    await openPage(null);
    await expect.poll(paneText).toContain('Open it from Excel');
    expect(seen.errors).toEqual([]);
  });

  it('says that it waits for a slow Excel, and shows the desk when Excel answers after all', async () => {
    await openPage(STAND_IN);
    await page.clock.fastForward(11_000);
    await expect.poll(paneText).toContain('has not answered yet');
    await answer('Excel');
    await expect.poll(() => page.getByRole('button', { name: 'Recalculate' }).count()).toBe(1);
    expect(await paneText()).not.toContain('has not answered yet');
  });

  it('follows the functions while Excel is busy with a cell being edited', async () => {
    await openPage(STAND_IN);
    await answer('Excel');
    await expect.poll(() => page.getByRole('button', { name: 'Recalculate' }).count()).toBe(1);
    await page.clock.fastForward(2_000);
    await page.evaluate(() => {
      const { ASSIGN } = (window as unknown as PageGlobals).handlers;
      ASSIGN([['Organ', 'Zoe']], [[1]], [['Organ', 7]], null, null, { address: 'Sheet1!B2' });
    });
    await page.clock.fastForward(2_000);
    await expect.poll(paneText).toMatch(/\b7\b/u);
    expect(seen.errors).toEqual([]);
  });
});
