// Builds the add-in and serves it over https on this machine, for loading it into an Excel here.
//   npm run excel     then sideload dist/manifest.xml
import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import devCerts from 'office-addin-dev-certs';
import { ROOT } from './load.mjs';
import { serve } from './serve.mjs';

const PORT = 3000;

execFileSync(process.execPath, [join(ROOT, 'node_modules/webpack/bin/webpack.js'), '--mode', 'production', '--stats', 'errors-only'], {
  cwd: ROOT,
  stdio: 'inherit',
  env: { ...process.env, DUTYPROOF_ORIGIN: `https://localhost:${PORT}` },
});
const { origin } = await serve(join(ROOT, 'dist'), PORT, await devCerts.getHttpsServerOptions());
console.log(`The add-in is served at ${origin}; sideload ${join(ROOT, 'dist/manifest.xml')} (Ctrl+C ends it).`);
if (origin !== `https://localhost:${PORT}`) console.log(`Port ${PORT} is taken: free it, since the manifest names it.`);
