// Builds and opens the workbench, or serves the add-in to an Excel on this machine.
//   npm start                     builds, serves on localhost and opens the browser
//   npm start -- --no-open        does not open a browser
//   npm start -- --port 4000      another first port to try
//   npm run start:excel           serves over https at the address the manifest names by default
import { execFileSync, spawn } from 'node:child_process';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { ROOT } from './load.mjs';
import { serve } from './serve.mjs';

const WORKBENCH_PORT = 8420;
/** The port in the default of DUTYPROOF_ORIGIN. */
const EXCEL_PORT = 3000;

const options = readOptions();
console.log('Building ...');
build();
try {
  await (options.excel ? startExcel() : startWorkbench());
} catch (error) {
  giveUp(error.code === 'EADDRINUSE' ? `Port ${error.port} is taken: end the program that uses it.` : error.message);
}

function readOptions() {
  try {
    const { values } = parseArgs({
      options: { 'no-open': { type: 'boolean' }, port: { type: 'string' }, excel: { type: 'boolean' } },
    });
    const port = Number(values.port ?? WORKBENCH_PORT);
    if (!Number.isInteger(port) || port < 0 || port > 65_535) giveUp('--port takes a whole number from 0 to 65535.');
    return { port, excel: values.excel === true, open: values['no-open'] !== true };
  } catch (error) {
    return giveUp(`${error.message}; there are --no-open, --port and --excel.`);
  }
}

function build() {
  const webpack = join(ROOT, 'node_modules/webpack/bin/webpack.js');
  try {
    execFileSync(process.execPath, [webpack, '--mode', 'production', '--stats', 'errors-only'], {
      cwd: ROOT,
      stdio: 'inherit',
      env: options.excel ? { ...process.env, DUTYPROOF_ORIGIN: `https://localhost:${EXCEL_PORT}` } : process.env,
    });
  } catch {
    giveUp('The build failed, for the reason given above.');
  }
}

async function startWorkbench() {
  const { origin } = await serve(join(ROOT, 'dist'), options.port);
  const address = `${origin}/workbench.html`;
  console.log(`The workbench is at ${address} (Ctrl+C ends it).`);
  if (options.open) open(address);
}

/** Excel loads add-ins over https only; the certificate is made, and trusted, on this machine. */
async function startExcel() {
  const { getHttpsServerOptions } = await import('office-addin-dev-certs');
  const { origin } = await serve(join(ROOT, 'dist'), EXCEL_PORT, await getHttpsServerOptions());
  console.log(`The add-in is at ${origin} (Ctrl+C ends it). Give Excel the file ${join(ROOT, 'dist/manifest.xml')}.`);
}

/** @param {string} address shown in the browser of this machine, where it has one */
function open(address) {
  const openers = { darwin: ['open', address], win32: ['cmd', '/c', 'start', '', address] };
  const [command, ...args] = openers[process.platform] ?? ['xdg-open', address];
  const opener = spawn(command, args, { stdio: 'ignore', detached: true });
  opener.on('error', () => console.log('Open the address in a browser: none could be started from here.'));
  opener.unref();
}

/** @param {string} sentence */
function giveUp(sentence) {
  console.error(sentence);
  process.exit(1);
}
