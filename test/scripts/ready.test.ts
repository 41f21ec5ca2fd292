import { spawnSync } from 'node:child_process';
import {
  chmodSync,
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

const SCRIPTS = join(import.meta.dirname, '../../scripts');

/** A clone with nothing installed, on a machine that has only node and an npm that notes how it was called. */
let clone: string;
let programs: string;

beforeEach(() => {
  clone = mkdtempSync(join(tmpdir(), 'dutyproof-'));
  programs = join(clone, 'bin');
  mkdirSync(programs);
  mkdirSync(join(clone, 'scripts'));
  for (const name of ['ready.mjs', 'browser.mjs']) cpSync(join(SCRIPTS, name), join(clone, 'scripts', name));
  writeFileSync(join(clone, 'package-lock.json'), '{}');
  symlinkSync(process.execPath, join(programs, 'node'));
  for (const name of ['chmod', 'mkdir', 'true']) symlinkSync(`/bin/${name}`, join(programs, name));
  const installed = join(clone, 'node_modules');
  program('npm', `echo "npm $*" >> ${clone}/calls; mkdir -p ${installed}; : > ${installed}/.package-lock.json`);
});

afterEach(() => rmSync(clone, { recursive: true }));

/** Puts a shell script on the path. */
function program(name: string, script: string): void {
  writeFileSync(join(programs, name), `#!/bin/sh\n${script}\n`);
  chmodSync(join(programs, name), 0o755);
}

function ready(...args: string[]): { status: number | null; stderr: string } {
  const { status, stderr } = spawnSync(process.execPath, [join(clone, 'scripts/ready.mjs'), ...args], {
    env: { PATH: programs },
    encoding: 'utf8',
  });
  return { status, stderr };
}

function calls(): string {
  const file = join(clone, 'calls');
  return existsSync(file) ? readFileSync(file, 'utf8') : '';
}

/** The stand-ins above are shell scripts. */
describe.runIf(process.platform !== 'win32')('the script that makes a clone ready', () => {
  it('installs the packages once, and again when the lock file has changed', () => {
    expect(ready().status).toBe(0);
    expect(calls()).toBe('npm ci --no-audit --no-fund\n');
    ready();
    expect(calls().split('\n')).toHaveLength(2);
    const later = Date.now() / 1000 + 60;
    utimesSync(join(clone, 'package-lock.json'), later, later);
    ready();
    expect(calls().split('\n')).toHaveLength(3);
  });

  it('says in one line that the packages could not be installed', () => {
    program('npm', 'exit 7');
    const { status, stderr } = ready();
    expect(status).toBe(1);
    expect(stderr).toBe('The packages could not be installed: npm ci failed, for the reason it gave above.\n');
  });

});

/** Elsewhere there is no apt-get, and a browser may lie in one of the usual places. */
describe.runIf(process.platform === 'linux')('the script that finds a browser for the tests', () => {
  it('is content with a browser on the path', () => {
    program('chromium', 'exit 0');
    expect(ready('--browser')).toEqual({ status: 0, stderr: '' });
  });

  it('says in one line what to install where there is no browser and none can be installed', () => {
    const { status, stderr } = ready('--browser');
    expect(status).toBe(1);
    expect(stderr).toMatch(/^The tests need a Chromium-family browser: install .*\n$/u);
  });

  it('installs a browser by apt-get where that is allowed', () => {
    program('sudo', 'shift; exec "$@"');
    const browser = join(programs, 'chromium');
    program('apt-get', `echo "apt-get $*" >> ${clone}/calls; [ "$1" != install ] || { : > ${browser}; chmod 755 ${browser}; }`);
    expect(ready('--browser').status).toBe(0);
    expect(calls()).toContain('apt-get update\napt-get install -y --no-install-recommends chromium\n');
  });

  it('says what to install where apt-get fails', () => {
    program('sudo', 'shift; exec "$@"');
    program('apt-get', '[ "$1" = --version ] || exit 100');
    const { status, stderr } = ready('--browser');
    expect(status).toBe(1);
    expect(stderr).toContain('apt-get could not install Chromium.\nThe tests need a Chromium-family browser');
  });
});
