// Builds and opens the workbench.
//   npm start                     builds, serves on localhost and opens the browser
//   npm start -- --no-open        does not open a browser
//   npm start -- --port 4000      another first port to try
import { execFileSync, spawn } from 'node:child_process';
import { join } from 'node:path';
import { ROOT } from './load.mjs';
import { serve } from './serve.mjs';

const { argv } = process;
const port = argv.includes('--port') ? Number(argv[argv.indexOf('--port') + 1]) : 8420;
if (!Number.isInteger(port) || port < 0 || port > 65_535) {
  console.error('--port takes a number from 0 to 65535.');
  process.exit(1);
}

console.log('Building ...');
execFileSync(process.execPath, [join(ROOT, 'node_modules/webpack/bin/webpack.js'), '--mode', 'production', '--stats', 'errors-only'], {
  cwd: ROOT,
  stdio: 'inherit',
});
const { origin } = await serve(join(ROOT, 'dist'), port);
console.log(`The workbench is at ${origin}/workbench.html (Ctrl+C ends it).`);
if (!argv.includes('--no-open')) open(`${origin}/workbench.html`);

function open(address) {
  const [command, ...args] =
    process.platform === 'darwin'
      ? ['open', address]
      : process.platform === 'win32'
        ? ['cmd', '/c', 'start', '', address]
        : ['xdg-open', address];
  const opener = spawn(command, args, { stdio: 'ignore', detached: true });
  opener.on('error', () => console.log('Open the address in a browser: none could be started from here.'));
  opener.unref();
}
