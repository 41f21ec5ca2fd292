// Builds and opens the workbench.
//   npm start                     builds, serves on localhost and opens the browser
//   npm start -- --no-open        does not open a browser
//   npm start -- --port 4000      another first port to try
import { execFileSync, spawn } from 'node:child_process';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { ROOT } from './load.mjs';
import { serve } from './serve.mjs';

const WORKBENCH_PORT = 8420;

const options = readOptions();
console.log('Building ...');
build();
const { origin } = await serve(join(ROOT, 'dist'), options.port);
const address = `${origin}/workbench.html`;
console.log(`The workbench is at ${address} (Ctrl+C ends it).`);
if (options.open) open(address);

function readOptions() {
  try {
    const { values } = parseArgs({ options: { 'no-open': { type: 'boolean' }, port: { type: 'string' } } });
    const port = Number(values.port ?? WORKBENCH_PORT);
    if (!Number.isInteger(port) || port < 0 || port > 65_535) giveUp('--port takes a whole number from 0 to 65535.');
    return { port, open: values['no-open'] !== true };
  } catch (error) {
    return giveUp(`${error.message}; there are --no-open and --port.`);
  }
}

function build() {
  const webpack = join(ROOT, 'node_modules/webpack/bin/webpack.js');
  try {
    execFileSync(process.execPath, [webpack, '--mode', 'production', '--stats', 'errors-only'], {
      cwd: ROOT,
      stdio: 'inherit',
    });
  } catch {
    giveUp('The build failed, for the reason given above.');
  }
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
