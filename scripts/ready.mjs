// Makes a fresh clone ready to build or test. Runs before other commands, on plain Node, without dependencies.
//   node scripts/ready.mjs            installs the packages when they are missing or out of date
//   node scripts/ready.mjs --browser  also makes sure that there is a browser for the tests
import { execFileSync } from 'node:child_process';
import { existsSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { findBrowser } from './browser.mjs';

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const OLDEST_NODE = [20, 19];

/** @param {string} sentence */
function giveUp(sentence) {
  console.error(sentence);
  process.exit(1);
}

function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor >= OLDEST_NODE[1])) return;
  giveUp(`Dutyproof needs Node.js ${OLDEST_NODE.join('.')} or newer; this is ${process.versions.node}.`);
}

/** npm notes what it installed in a hidden lock file; it is older than package-lock.json when that has changed since. */
function installPackages() {
  const installed = join(root, 'node_modules', '.package-lock.json');
  const wanted = join(root, 'package-lock.json');
  if (existsSync(installed) && statSync(installed).mtimeMs >= statSync(wanted).mtimeMs) return;
  console.log('Installing packages (npm ci) ...');
  try {
    execFileSync('npm', ['ci', '--no-audit', '--no-fund'], { cwd: root, stdio: 'inherit', shell: process.platform === 'win32' });
  } catch {
    giveUp('The packages could not be installed: npm ci failed, for the reason it gave above.');
  }
}

/** @returns {string[] | null} what to put before apt-get, or null where packages cannot be installed */
function haveAptGet() {
  if (process.platform !== 'linux') return null;
  try {
    execFileSync('apt-get', ['--version'], { stdio: 'ignore' });
    if (process.getuid?.() === 0) return [];
    execFileSync('sudo', ['-n', 'true'], { stdio: 'ignore' });
    return ['sudo', '-n'];
  } catch {
    return null;
  }
}

/**
 * @param {readonly string[]} prefix what makes the command run as root
 * @param {readonly string[]} args
 */
function aptGet(prefix, ...args) {
  const [command, ...rest] = [...prefix, 'apt-get', ...args];
  execFileSync(command, rest, { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } });
}

function installBrowser() {
  if (findBrowser() !== null) return;
  const prefix = haveAptGet();
  if (prefix !== null) {
    console.log('Installing Chromium for the tests (apt-get) ...');
    try {
      aptGet(prefix, 'update');
      aptGet(prefix, 'install', '-y', '--no-install-recommends', 'chromium');
    } catch {
      console.error('apt-get could not install Chromium.');
    }
  }
  if (findBrowser() !== null) return;
  giveUp('The tests need a Chromium-family browser: install Chromium, Chrome or Edge, or set CHROMIUM_PATH to its program.');
}

checkNode();
installPackages();
if (process.argv.includes('--browser')) installBrowser();
