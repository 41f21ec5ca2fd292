import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request, type IncomingMessage } from 'node:http';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { serve } from '../../scripts/serve.mjs';

const outside = mkdtempSync(join(tmpdir(), 'dutyproof-'));
const folder = join(outside, 'dist');
let server: Awaited<ReturnType<typeof serve>>;

beforeAll(async () => {
  mkdirSync(join(folder, 'vendor'), { recursive: true });
  writeFileSync(join(outside, 'secret.txt'), 'secret');
  writeFileSync(join(folder, 'secret.txt'), 'not secret');
  for (const name of ['workbench.html', 'pane.html', 'functions.html', 'pane.js', 'demo.xlsx', 'vendor/engine.xml']) {
    writeFileSync(join(folder, name), name);
  }
  server = await serve(folder, 0);
});

afterAll(async () => {
  await server.close();
  rmSync(outside, { recursive: true });
});

interface Answer {
  readonly status: number | undefined;
  readonly headers: IncomingMessage['headers'];
  readonly text: string;
}

/** Asks with the path as it is written: `fetch` would tidy it first. */
function ask(path: string, method = 'GET'): Promise<Answer> {
  const { port } = new URL(server.origin);
  return new Promise((resolve, reject) => {
    const asked = request({ host: '127.0.0.1', port, path, method, agent: false }, (response) => {
      let text = '';
      response.setEncoding('utf8').on('data', (part: string) => (text += part));
      response.on('end', () => resolve({ status: response.statusCode, headers: response.headers, text }));
    });
    asked.on('error', reject).end();
  });
}

describe('the server of the built pages', () => {
  it.each([
    ['/', 'text/html; charset=utf-8', 'workbench.html'],
    ['/pane.html?_host_Info=Excel$Win32', 'text/html; charset=utf-8', 'pane.html'],
    ['/pane.js', 'text/javascript; charset=utf-8', 'pane.js'],
    ['/vendor/engine.xml', 'application/xml; charset=utf-8', 'vendor/engine.xml'],
    ['/demo.xlsx', 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', 'demo.xlsx'],
  ])('answers %s as %s', async (path, type, text) => {
    const answer = await ask(path);
    expect(answer).toMatchObject({ status: 200, text });
    expect(answer.headers).toMatchObject({ 'content-type': type, 'x-content-type-options': 'nosniff' });
  });

  it.each(['/../secret.txt', '/%2e%2e/secret.txt', '/..%2fsecret.txt', '/vendor/..%2f..%2fsecret.txt', '/%2e%2e%2fsecret.txt'])(
    'never leaves its folder: %s',
    async (path) => {
      expect((await ask(path)).text).not.toBe('secret');
    },
  );

  it.each(['/missing.js', '/vendor', '/%00', '/%zz'])('has nothing at %s', async (path) => {
    expect((await ask(path)).status).toBe(404);
  });

  it('answers HEAD without a body, and takes nothing in', async () => {
    expect(await ask('/pane.js', 'HEAD')).toMatchObject({ status: 200, text: '' });
    expect((await ask('/pane.js', 'POST')).status).toBe(404);
  });

  it('lets the workbench alone compile code, and the pane alone load the script of Office', async () => {
    const policyOf = async (path: string): Promise<string | string[] | undefined> => (await ask(path)).headers['content-security-policy'];
    const [workbench, root, pane, other] = await Promise.all(
      ['/workbench.html', '/', '/pane.html', '/functions.html'].map(policyOf),
    );
    expect(root).toBe(workbench);
    expect(workbench).toContain("'unsafe-eval'");
    expect(workbench).not.toContain('https:');
    expect(pane).toContain('https://appsforoffice.microsoft.com');
    expect(pane).not.toContain("'unsafe-eval'");
    expect(other).not.toMatch(/unsafe-eval|https:/u);
  });

  it('takes the next port where the first is taken', async () => {
    const other = createServer();
    await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
    const { port } = other.address() as AddressInfo;
    const second = await serve(folder, port);
    expect(Number(new URL(second.origin).port)).toBeGreaterThan(port);
    await second.close();
    other.close();
  });
});
