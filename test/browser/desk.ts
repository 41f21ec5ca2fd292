import type { Page } from 'playwright-core';
import type { Site } from './harness';

/** The workbench as a person at it sees it. */
export class DeskPage {
  readonly page: Page;

  private constructor(page: Page) {
    this.page = page;
  }

  /** Opens the page and waits for the demo to be answered. */
  static async open(site: Site, options: Parameters<Site['browser']['newPage']>[0] = {}): Promise<DeskPage> {
    const page = await site.browser.newPage({ viewport: { width: 1400, height: 900 }, ...options });
    const desk = new DeskPage(page);
    await page.goto(`${site.origin}/workbench.html`);
    await desk.pane.getByText('3 uncovered').waitFor();
    await page.waitForFunction(() => document.querySelector('.o-spreadsheet canvas') !== null);
    return desk;
  }

  get pane() {
    return this.page.locator('#pane main');
  }

  get notice() {
    return this.page.locator('#notice');
  }

  /** The value shown in a cell such as `Results!B3`. */
  async valueAt(address: string): Promise<unknown> {
    return this.page.evaluate((text) => {
      const [sheet, cell] = text.split('!');
      const { getters } = window.dutyproof!.workbook.model;
      const row = Number(cell.replace(/\D/gu, '')) - 1;
      const col = Array.from(cell.replace(/\d/gu, '')).reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1;
      return getters.getEvaluatedCell({ sheetId: getters.getSheetIdByName(sheet)!, col, row }).value;
    }, address);
  }

  /** Selects a cell as a click does. */
  async select(address: string): Promise<void> {
    await this.page.evaluate((text) => window.dutyproof!.workbook.select(text), address);
  }

  /** Types into a cell, key by key. */
  async type(address: string, text: string): Promise<void> {
    await this.select(address);
    // A click on the cell would bring the keys here too.
    await this.page.locator('.o-grid .o-composer').focus();
    await this.page.keyboard.type(text, { delay: 15 });
    await this.page.keyboard.press('Enter');
  }

  /** Names of the sheets, in order. */
  async sheets(): Promise<string[]> {
    return this.page.evaluate(() => {
      const { getters } = window.dutyproof!.workbook.model;
      return getters.getSheetIds().map((id) => getters.getSheetName(id));
    });
  }

  /** Gives files to the page as its Open button does. */
  async give(files: Readonly<Record<string, string | Uint8Array>>): Promise<void> {
    const list = Object.entries(files).map(([name, content]) => ({ name, mimeType: '', buffer: Buffer.from(content as string) }));
    await this.page.setInputFiles('#files', list);
  }

  /** Saves, and gives what was saved. */
  async save(): Promise<{ name: string; bytes: Uint8Array }> {
    const [download] = await Promise.all([this.page.waitForEvent('download'), this.page.click('#save')]);
    const chunks: Buffer[] = [];
    for await (const chunk of await download.createReadStream()) chunks.push(chunk as Buffer);
    return { name: download.suggestedFilename(), bytes: new Uint8Array(Buffer.concat(chunks)) };
  }
}
