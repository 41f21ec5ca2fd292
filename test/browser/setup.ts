import { execFileSync } from 'node:child_process';
import { join } from 'node:path';

/** Builds the pages once before the browser tests. */
export function setup(): void {
  const root = join(import.meta.dirname, '../..');
  execFileSync(process.execPath, [join(root, 'node_modules/webpack/bin/webpack.js'), '--mode', 'production', '--stats', 'errors-only'], {
    cwd: root,
    stdio: 'inherit',
  });
}
