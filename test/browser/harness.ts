import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type Page } from 'playwright-core';
import { findBrowser, QUIET_SWITCHES } from '../../scripts/browser.mjs';
import { serve } from '../../scripts/serve.mjs';

const DIST = join(import.meta.dirname, '../../dist');

/** A browser with the built pages served to it. */
export interface Site {
  readonly origin: string;
  readonly browser: Browser;
  close(): Promise<void>;
}

export async function openSite(): Promise<Site> {
  if (!existsSync(join(DIST, 'pane.html'))) throw new Error('dist/ is not built.');
  const server = await serve(DIST, 0);
  const executablePath = findBrowser();
  if (executablePath === null) throw new Error('No Chromium-family browser: run "node scripts/ready.mjs --browser".');
  const browser = await chromium.launch({ executablePath, args: QUIET_SWITCHES });
  return {
    origin: server.origin,
    browser,
    close: async () => {
      await browser.close();
      await server.close();
    },
  };
}

/** What a page asked of others and complained of while it was open. */
export interface Watch {
  readonly foreign: string[];
  readonly errors: string[];
}

/** Notes every request that leaves the page's own origin and every uncaught error. */
export function watch(page: Page, origin: string): Watch {
  const seen: Watch = { foreign: [], errors: [] };
  page.on('request', (request) => {
    const url = request.url();
    if (!url.startsWith(origin) && !/^(data|blob):/u.test(url)) seen.foreign.push(url);
  });
  page.on('pageerror', (error) => seen.errors.push(error.message));
  return seen;
}
