// Finds a Chromium-family browser on this machine. Without dependencies.
import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome', 'microsoft-edge', 'msedge'];

const USUAL_PLACES = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  '/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge',
  ...['ProgramFiles', 'ProgramFiles(x86)', 'LOCALAPPDATA'].flatMap((variable) => {
    const folder = process.env[variable];
    if (folder === undefined) return [];
    return [join(folder, 'Google/Chrome/Application/chrome.exe'), join(folder, 'Microsoft/Edge/Application/msedge.exe')];
  }),
];

/** @param {string} file */
function isProgram(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** @returns {string | null} the path of the program; CHROMIUM_PATH goes first */
export function findBrowser() {
  const chosen = process.env.CHROMIUM_PATH;
  if (chosen !== undefined && isProgram(chosen)) return chosen;
  const folders = (process.env.PATH ?? '').split(delimiter).filter(Boolean);
  const endings = process.platform === 'win32' ? ['.exe'] : [''];
  const onPath = NAMES.flatMap((name) => folders.flatMap((folder) => endings.map((ending) => join(folder, name + ending))));
  return [...onPath, ...USUAL_PLACES].find(isProgram) ?? null;
}

/** Switches under which the browser asks nothing of the network on its own. */
export const QUIET_SWITCHES = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
