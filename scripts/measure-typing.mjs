// Measures, in the built workbench, the time from a keystroke to the painted answer.
//   npm run measure            10,000 pairs, every function on the sheets
//   npm run measure -- 50000   another number of pairs
import { join } from 'node:path';
import { chromium } from 'playwright-core';
import { findBrowser, QUIET_SWITCHES } from './browser.mjs';
import { ROOT } from './load.mjs';
import { serve } from './serve.mjs';

/** About as an office has them: sixteen people may take each duty. */
const pairs = Number(process.argv[2] ?? 10_000);
const duties = Math.round(pairs / 16);
const people = Math.round(duties / 4);
const ROUNDS = 21;

const text = (rows) => ({ mimeType: 'text/csv', buffer: Buffer.from(rows.map((row) => row.join(',')).join('\n')) });
const files = [
  {
    name: 'pairs.csv',
    ...text([['Duty', 'Person'], ...Array.from({ length: pairs }, (_, i) => [`Duty ${i % duties}`, `Person ${(i * 7919) % people}`])]),
  },
  { name: 'people.csv', ...text([['Person', 'Maximum'], ...Array.from({ length: people }, (_, i) => [`Person ${i}`, 4])]) },
];

const server = await serve(join(ROOT, 'dist'), 0);
const browser = await chromium.launch({ executablePath: findBrowser() ?? undefined, args: QUIET_SWITCHES });
const page = await browser.newPage({ viewport: { width: 1400, height: 900 } });
await page.goto(`${server.origin}/workbench.html`);
await page.locator('#pane main').getByText('uncovered').first().waitFor();
await page.setInputFiles('#files', files);
await page.locator('#pane main').getByRole('button', { name: 'Put the answers on new sheets' }).click();
await page.locator('#pane main').getByText(`of ${duties.toLocaleString('en-GB')} seats covered`).waitFor();
const answers = await page.evaluate(() => {
  const { getters } = window.dutyproof.workbook.model;
  const cells = getters.getSheetIds().flatMap((sheetId) => [...getters.getCells(sheetId)].filter(({ isFormula }) => isFormula));
  const broken = cells.filter(({ id }) => getters.getEvaluatedCell(getters.getCellPosition(id)).type === 'error');
  if (broken.length > 0) throw new Error('A formula shows an error: the measurement would be of nothing.');
  return cells.length;
});

const times = [];
for (let round = 0; round < ROUNDS; round++) {
  await page.evaluate(() => {
    const { model } = window.dutyproof.workbook;
    const sheetIdTo = model.getters.getSheetIdByName('people');
    const sheetIdFrom = model.getters.getActiveSheetId();
    if (sheetIdFrom !== sheetIdTo) model.dispatch('ACTIVATE_SHEET', { sheetIdFrom, sheetIdTo });
    model.selection.selectCell(1, 1);
    window.painted = new Promise((resolve) => {
      const start = (event) => {
        if (event.key !== 'Enter') return;
        document.removeEventListener('keydown', start, true);
        const began = performance.now();
        // The engine calculates on the key press; what it changed is painted with the next frame but one.
        setTimeout(() => requestAnimationFrame(() => requestAnimationFrame(() => resolve(performance.now() - began))), 0);
      };
      document.addEventListener('keydown', start, true);
    });
  });
  await page.keyboard.type(String(1 + (round % 3)));
  await page.keyboard.press('Enter');
  times.push(await page.evaluate(() => window.painted));
}
times.sort((a, b) => a - b);
const at = (share) => Math.round(times[Math.floor(share * (times.length - 1))]);
const size = `${pairs} pairs, ${duties} duties, ${people} people, ${answers} functions`;
console.log(`${size}: keystroke to painted, median ${at(0.5)} ms, 90 % ${at(0.9)} ms.`);
await browser.close();
await server.close();
