// Loads a TypeScript module of this project into Node, for scripts that need the product's own code.
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { runnerImport } from 'vite';

export const ROOT = dirname(dirname(fileURLToPath(import.meta.url)));

/**
 * @param {string} file path from the root of the project
 * @returns {Promise<any>} the module
 */
export async function loadTypeScript(file) {
  const { module } = await runnerImport(join(ROOT, file), { root: ROOT, configFile: false, logLevel: 'error' });
  return module;
}
