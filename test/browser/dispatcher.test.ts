import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { FUNCTIONS } from '../../src/functions/registry';
import { openSite, watch, type Site, type Watch } from './harness';

/**
 * The contract with Excel, tested with Office's real client: its script is served from the package
 * on this machine in place of the vendor's address, the page believes to be inside Excel, and calls
 * arrive the way Excel's dispatcher sends them.
 */

const OFFICE = join(import.meta.dirname, '../../node_modules/@microsoft/office-js/dist');
const VENDOR = 'https://appsforoffice.microsoft.com/lib/1/hosted';

let site: Site;
let page: Page;
let seen: Watch;

/** What the client sends back for one call: whether it succeeded, and the table or the error. */
interface Outcome {
  readonly succeeded: boolean;
  readonly value: unknown;
}

beforeAll(async () => {
  site = await openSite();
  page = await site.browser.newPage();
  seen = watch(page, site.origin);
  await page.route(`${VENDOR}/**`, async (route) => {
    const file = join(OFFICE, new URL(route.request().url()).pathname.replace('/lib/1/hosted/', ''));
    if (existsSync(file)) await route.fulfill({ body: readFileSync(file), contentType: 'text/javascript' });
    else await route.abort();
  });
  await page.addInitScript(() => {
    interface Bridge {
      sendMessageToHost(text: string): void;
      onMessageFromHost?(text: string): void;
    }
    const sent: string[] = [];
    const bridge: Bridge = {
      sendMessageToHost(text) {
        sent.push(text);
        const { id, type } = JSON.parse(text) as { id: number; type: number };
        if (type !== 1) return;
        const body = JSON.stringify({ Results: [] });
        setTimeout(() => bridge.onMessageFromHost?.(JSON.stringify({ type: 2, id, message: { statusCode: 200, headers: {}, body } })), 0);
      },
    };
    Object.assign(window, { _richApiNativeBridge: bridge, sentToHost: sent });
  });
  await page.goto(`${site.origin}/pane.html?_host_Info=Excel$Win32$16.01$en-US$$$$0`);
  await page.waitForFunction(() => 'onMessageFromHost' in (window as unknown as Record<string, object>)._richApiNativeBridge);
});

afterAll(() => site.close());

let nextCall = 100;

/** Calls a function as Excel does and waits for what the client sends back. */
async function call(id: string, args: unknown[]): Promise<Outcome> {
  const number = nextCall++;
  return page.evaluate(
    async ({ number: invocation, id: name, args: values }) => {
      const { _richApiNativeBridge: bridge, sentToHost: sent } = window as unknown as {
        _richApiNativeBridge: { onMessageFromHost(text: string): void };
        sentToHost: string[];
      };
      sent.length = 0;
      const message = JSON.stringify([invocation, name, values, ['Sheet1!B2'], 0]);
      bridge.onMessageFromHost(JSON.stringify({ type: 3, message: { entries: [{ messageCategory: 1, messageType: 1000, message }] } }));
      for (let waited = 0; waited < 600; waited++) {
        for (const text of sent) {
          const { message: request } = JSON.parse(text) as {
            message: { body: { Actions: { Name: string; ArgumentInfo: { Arguments: [number, boolean, unknown][][] } }[] } };
          };
          const action = request.body.Actions.find(({ Name }) => Name === 'SetInvocationArrayResults');
          const result = action?.ArgumentInfo.Arguments[0].find(([answered]) => answered === invocation);
          if (result !== undefined) return { succeeded: result[1], value: result[2] };
        }
        await new Promise((resolve) => setTimeout(resolve, 50));
      }
      throw new Error('no answer');
    },
    { number, id, args },
  );
}

describe('the functions behind the real client', () => {
  it.each(FUNCTIONS.map(({ id }) => id))('%s is registered and answers', async (id) => {
    const pairs = [['Duty', 'Person'], ['Choir', 'Ann']];
    const args = id === 'PAIRS' ? [[['', 'Ann'], ['Choir', 'x']]] : [pairs, [['Person', 'Maximum'], ['Ann', 2]], null, null, null];
    const { succeeded, value } = await call(id, args);
    expect(succeeded).toBe(true);
    const rows = value as unknown[][];
    expect(rows.length).toBeGreaterThan(1);
    expect(rows.every((row) => row.length === rows[0].length && row.every((cell) => cell !== null))).toBe(true);
  });

  it('ASSIGN spills who takes what', async () => {
    const { value } = await call('ASSIGN', [[['Choir', 'Ann'], ['Choir', 'Bob']], [[1]], [['Choir', 3]], null, null]);
    expect(value).toEqual([
      ['Duty', 'Person', 'Rank', 'Note'],
      ['Choir', 'Ann', '', ''],
      ['Choir', 'Bob', '', ''],
      ['Choir', '', '', 'Uncovered'],
    ]);
  });

  it('an error in a cell becomes #VALUE! with our own words', async () => {
    const people = [['Person', 'Maximum'], ['Ann', { type: 'Error', basicType: 'Error', basicValue: '#N/A' }]];
    const { succeeded, value } = await call('ASSIGN', [[['Choir', 'Ann']], people, null, null, null]);
    expect(succeeded).toBe(false);
    expect(JSON.stringify(value)).toContain('People table, row 2 of the range, column Maximum: found the error #N/A');
  });

  it('ASSIGN answers 100,000 pairs', async () => {
    const duties = 20_000;
    const pairs: unknown[][] = [['Duty', 'Person']];
    for (let i = 0; i < 100_000; i++) pairs.push([`Duty ${i % duties}`, `Person ${(i * 7919) % 6_667}`]);
    const { succeeded, value } = await call('ASSIGN', [pairs, [[3]], null, null, null]);
    expect(succeeded).toBe(true);
    const rows = value as unknown[][];
    expect(rows).toHaveLength(1 + duties);
    expect(rows.filter((row) => row[3] === 'Uncovered').length).toBeLessThan(10);
  });

  it('a case that is no flow is answered when its search is over', async () => {
    const day = 46_000;
    const times: [string, number, number][] = [['Dawn', 6, 12], ['Noon', 11, 16], ['Dusk', 15, 20]];
    const duties = [['Duty', 'Start', 'End'], ...times.map(([name, from, to]) => [name, day + from / 24, day + to / 24])];
    const pairs = [['Dawn', 'Ann'], ['Noon', 'Ann'], ['Noon', 'Bo'], ['Dusk', 'Ann']];
    const { succeeded, value } = await call('ASSIGN', [pairs, [[2]], duties, null, null]);
    expect(succeeded).toBe(true);
    expect((value as unknown[][]).slice(1).map(([duty, person]) => [duty, person])).toEqual([['Dawn', 'Ann'], ['Noon', 'Bo'], ['Dusk', 'Ann']]);
  });

  it('the page asks nothing of anyone but its own origin and the vendor', () => {
    expect(seen.foreign.filter((url) => !url.startsWith(VENDOR))).toEqual([]);
    expect(seen.errors).toEqual([]);
  });
});
