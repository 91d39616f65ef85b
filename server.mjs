/**
 * The product's process: static files, compression and limits of the connection in front of Astro's handler, a clean end
 * on SIGTERM. Settings are parsed inside the bundle at the first request, which this file makes itself.
 */
import http from 'node:http';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import compression from 'compression';
import sirv from 'sirv';

process.env.NODE_ENV ??= 'production';
process.env.ASTRO_NODE_AUTOSTART = 'disabled';
process.env.ASTRO_TELEMETRY_DISABLED = '1';

const root = path.dirname(fileURLToPath(import.meta.url));
const started = Date.now();

/** @returns a number of a port; ends the process with a sentence for anything else. */
function portOf(text) {
  const port = Number(text);
  if (Number.isInteger(port) && port >= 0 && port <= 65535) return port;
  return stop(`The setting PORT reads "${text}", which is not a port.`);
}

function stop(sentence) {
  console.error(sentence);
  process.exit(1);
}

const host = process.env.HOST || '127.0.0.1';
const port = portOf(process.env.PORT || '4321');
const trustsProxy = ['on', '1', 'true', 'yes'].includes(process.env.TRUST_PROXY ?? '');

const { handler } = await import('./dist/server/entry.mjs');
const YEAR_S = 31_536_000;
const FILE_HEADERS = {
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'strict-origin-when-cross-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'Content-Security-Policy': "default-src 'none'; frame-ancestors 'none'; style-src 'unsafe-inline'; sandbox",
};
const files = sirv(path.join(root, 'dist/client'), {
  brotli: true,
  gzip: true,
  etag: true,
  dotfiles: false,
  setHeaders(response, pathname) {
    const lasts = pathname.startsWith('/_astro/');
    response.setHeader(
      'Cache-Control',
      lasts ? `public, max-age=${YEAR_S}, immutable` : 'public, max-age=3600',
    );
    for (const [name, value] of Object.entries(FILE_HEADERS)) response.setHeader(name, value);
  },
});
/** Brotli at its quickest level for what is made anew each time; events and pictures are left alone. */
const compress = compression({ threshold: 1024, brotli: { params: { 1: 1 } } });

/** The address that our own proxy saw stands last; whatever stands before it, a client may have written. */
function trustOneProxy({ headers }) {
  if (!trustsProxy)
    for (const name of ['x-forwarded-for', 'x-forwarded-host', 'x-forwarded-proto']) delete headers[name];
  const seen = headers['x-forwarded-for']?.split(',').at(-1)?.trim();
  if (seen) headers['x-forwarded-for'] = seen;
}

function serve(request, response) {
  trustOneProxy(request);
  const dynamic = () => {
    compress(request, response, () => {
      void Promise.resolve(handler(request, response)).catch((error) => {
        console.error(error);
        if (!response.headersSent) response.writeHead(500).end();
        else response.destroy();
      });
    });
  };
  if (request.method === 'TRACE' || request.method === 'CONNECT') response.writeHead(405).end();
  else if (request.method === 'GET' || request.method === 'HEAD') files(request, response, dynamic);
  else dynamic();
}

const server = http.createServer({ maxHeaderSize: 16_384 }, serve);
server.headersTimeout = 20_000;
server.requestTimeout = 300_000;
server.keepAliveTimeout = 10_000;

server.on('error', (error) => {
  const why = error.code === 'EADDRINUSE' ? 'the port is taken: set PORT to another' : error.message;
  stop(`Driftwright cannot listen on ${host}:${port}: ${why}.`);
});

const runtime = () => globalThis[Symbol.for('driftwright.runtime')];

server.listen(port, host, async () => {
  const at = server.address();
  const name = at.family === 'IPv6' ? `[${at.address}]` : at.address;
  const own = name === '0.0.0.0' ? '127.0.0.1' : name === '[::]' ? '[::1]' : name;
  await fetch(`http://${own}:${at.port}/api/health`).catch(() => undefined);
  const state = runtime();
  if (state?.error) stop(state.error.message);
  console.log(
    `Driftwright is ready at http://${own}:${at.port} (${((Date.now() - started) / 1000).toFixed(1)} s)`,
  );
});

/** What an answer under way is given to end. */
const GRACE_MS = 10_000;

let ending = false;
async function end() {
  if (ending) return;
  ending = true;
  // Answers under way may still need the database: it closes after the last connection.
  const closed = new Promise((done) => server.close(done));
  runtime()?.endStreams?.();
  server.closeIdleConnections();
  setTimeout(() => server.closeAllConnections(), GRACE_MS).unref();
  await closed;
  await runtime()?.close?.();
  process.exit(0);
}
process.on('SIGTERM', end);
process.on('SIGINT', end);
