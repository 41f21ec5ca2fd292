// A small server of the built pages, for the workbench and the tests. Answers this machine only.
import { createReadStream, statSync } from 'node:fs';
import { createServer } from 'node:http';
import { createServer as createSecureServer } from 'node:https';
import { extname, join, normalize, sep } from 'node:path';

const TYPES = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.xml': 'application/xml; charset=utf-8',
  '.txt': 'text/plain; charset=utf-8',
  '.png': 'image/png',
  '.svg': 'image/svg+xml',
  '.wasm': 'application/wasm',
  '.xlsx': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
};

const OFFICE = 'https://appsforoffice.microsoft.com';

/** No page needs any of these. */
const NEVER = `object-src 'none'; base-uri 'none'; form-action 'none'`;

/** What each page may load. The engine of the workbench compiles its formulas, hence 'unsafe-eval' there only. */
const POLICIES = {
  '/workbench.html':
    `default-src 'self'; script-src 'self' 'unsafe-eval'; style-src 'self' 'unsafe-inline'; ` +
    `img-src 'self' data: blob:; font-src 'self' data:; frame-ancestors 'none'; ${NEVER}`,
  // Excel on the web shows the pane in a frame.
  '/pane.html':
    `default-src 'self' ${OFFICE}; script-src 'self' ${OFFICE}; style-src 'self' 'unsafe-inline'; ` +
    `img-src 'self' data:; ${NEVER}`,
  // The solver is WebAssembly; only its worker may compile it.
  '/search.js': `default-src 'self'; script-src 'self' 'wasm-unsafe-eval'; ${NEVER}`,
};
const STRICT = `default-src 'self'; style-src 'self' 'unsafe-inline'; frame-ancestors 'none'; ${NEVER}`;

/** How many ports beyond the first are tried. */
const MORE_PORTS = 50;

/**
 * Serves a folder on the loopback address.
 * @param {string} folder
 * @param {number} port the first port to try; 0 for any free one
 * @param {{ cert: string | Buffer, key: string | Buffer }} [secure] serves over https, and on exactly this port
 * @returns {Promise<{ origin: string, close: () => Promise<void> }>}
 */
export async function serve(folder, port, secure) {
  const respond = (request, response) => answer(folder, request, response);
  const server = secure === undefined ? createServer(respond) : createSecureServer(secure, respond);
  const taken = await listen(server, port, secure === undefined ? port + MORE_PORTS : port);
  return {
    origin: `${secure === undefined ? 'http' : 'https'}://localhost:${taken}`,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

/** Listens on the first free port from `port` to `last`. */
async function listen(server, port, last) {
  for (let candidate = port; ; candidate++) {
    const error = await new Promise((resolve) => {
      server.once('error', resolve);
      server.listen(candidate, '127.0.0.1', () => {
        server.off('error', resolve);
        resolve(null);
      });
    });
    if (error === null) return server.address().port;
    if (error.code !== 'EADDRINUSE' || candidate >= last) throw error;
  }
}

function answer(folder, request, response) {
  const path = pathOf(request.url ?? '/');
  const file = path === null ? null : join(folder, path);
  const size = file === null || !(request.method === 'GET' || request.method === 'HEAD') ? null : sizeOf(file);
  if (size === null) {
    response.writeHead(404, { 'content-type': TYPES['.txt'] }).end('Not found\n');
    return;
  }
  response.writeHead(200, {
    'content-type': TYPES[extname(file)] ?? 'application/octet-stream',
    'content-length': size,
    'content-security-policy': POLICIES[path] ?? STRICT,
    'cache-control': 'no-store',
    'x-content-type-options': 'nosniff',
  });
  if (request.method === 'HEAD') response.end();
  // A new build may take the file away meanwhile: the answer then breaks off, and the server stays.
  else createReadStream(file).on('error', () => response.destroy()).pipe(response);
}

/** The path inside the folder, or null where the request leads out of it or makes no sense. */
function pathOf(url) {
  try {
    const path = normalize(decodeURIComponent(new URL(url, 'http://localhost').pathname));
    if (path.includes('\0') || path.split(sep).includes('..')) return null;
    return path === sep ? '/workbench.html' : path.replaceAll(sep, '/');
  } catch {
    return null;
  }
}

function sizeOf(file) {
  try {
    const stats = statSync(file);
    return stats.isFile() ? stats.size : null;
  } catch {
    return null;
  }
}
