// Draws assets/icons/*.png from the drawings beside them, in a browser.
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { chromium } from 'playwright-core';
import { findBrowser, QUIET_SWITCHES } from './browser.mjs';
import { ROOT } from './load.mjs';

const folder = join(ROOT, 'assets/icons');
const PICTURES = [
  ...[16, 32, 64, 80].map((size) => ({ drawing: 'icon.svg', picture: `icon-${size}.png`, size })),
  { drawing: 'icon.svg', picture: 'colour.png', size: 192 },
  { drawing: 'outline.svg', picture: 'outline.png', size: 32 },
];

const browser = await chromium.launch({ executablePath: findBrowser() ?? undefined, args: QUIET_SWITCHES });
for (const { drawing, picture, size } of PICTURES) {
  const page = await browser.newPage({ viewport: { width: size, height: size } });
  const svg = readFileSync(join(folder, drawing), 'utf8');
  await page.setContent(`<style>body{margin:0}svg{display:block;width:${size}px;height:${size}px}</style>${svg}`);
  writeFileSync(join(folder, picture), await page.screenshot({ omitBackground: true }));
}
await browser.close();
