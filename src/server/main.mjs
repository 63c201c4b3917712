// The production entry. The adapter's own start has no hook for headers on static files (a worker's script needs
// them) and no way to choose the public origin at run time, so its handler is wrapped in a plain server here.
import { createServer, get } from 'node:http';
import { fileURLToPath } from 'node:url';
import compression from 'compression';
import { prepareEnvironment, SettingError } from './environment.mjs';

const settings = readSettings();
const { host, port, publicUrl, trustProxy } = settings;

process.env.NODE_ENV ??= 'production';
process.env.ASTRO_NODE_AUTOSTART = 'disabled';
process.chdir(fileURLToPath(new URL('../..', import.meta.url)));
const { handler } = await import('../../dist/server/entry.mjs');

const headers = {
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Embedder-Policy': 'require-corp',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=()',
  // For everything but pages, whose own policy with hashes replaces it. A worker's policy comes with its own script.
  'Content-Security-Policy':
    "default-src 'self'; script-src 'self' 'wasm-unsafe-eval'; object-src 'none'; base-uri 'none'; frame-ancestors 'none'",
  ...(publicUrl?.protocol === 'https:' && { 'Strict-Transport-Security': 'max-age=31536000' }),
};
const loopback = /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/;
const signInBodyLimitBytes = 64 * 1024;
const compress = compression();

const server = createServer((req, res) => {
  for (const [name, value] of Object.entries(headers)) res.setHeader(name, value);
  pinAddresses(req);
  const refusal = refusalOf(req);
  if (refusal) {
    const { status, code, message } = refusal;
    res.writeHead(status, { 'Content-Type': 'application/json', Connection: 'close' });
    res.end(JSON.stringify({ error: { code, message } }));
    return;
  }
  compress(req, res, () => handler(req, res));
});

server.on('error', (error) => {
  const taken = error.code === 'EADDRINUSE';
  console.error(taken ? `PORT: ${port} is in use on ${host}; set PORT to another.` : error.message);
  process.exit(1);
});
server.listen(port, host, async () => {
  const address = server.address();
  const shown = host.includes(':') ? `[${host}]` : host;
  const local = `http://${shown}:${address.port}`;
  // For the links of letters, which are sent from the first request on.
  process.env.LOCAL_URL = local;
  // The first request loads the middleware, which migrates the database and seeds the demo.
  const status = await healthStatus(address.address, address.port);
  if (status !== 200) {
    console.error(`Not healthy: /api/health answered ${status}.`);
    process.exit(1);
  }
  console.log(`Blockwright listens on ${local}${publicUrl ? ` for ${publicUrl.origin}` : ''}`);
});

for (const signal of ['SIGTERM', 'SIGINT']) {
  process.once(signal, () => {
    server.close(() => process.exit(0));
    server.closeIdleConnections();
    // Event streams never end by themselves.
    setTimeout(() => server.closeAllConnections(), 1500).unref();
  });
}

function readSettings() {
  try {
    return prepareEnvironment();
  } catch (error) {
    if (!(error instanceof SettingError)) throw error;
    console.error(error.message);
    process.exit(1);
  }
}

/** What reaches Astro is believed (`allowedDomains` is open), so only pinned values reach it. */
function pinAddresses(req) {
  const forwardedFor = String(req.headers['x-forwarded-for'] ?? '');
  for (const name of ['x-forwarded-host', 'x-forwarded-proto', 'x-forwarded-port', 'x-forwarded-for', 'forwarded']) {
    delete req.headers[name];
  }
  // The nearest proxy appends the address it saw; entries before it are the client's own claim.
  const seen = trustProxy ? forwardedFor.split(',').at(-1)?.trim() : '';
  req.headers['x-client-address'] = seen || req.socket.remoteAddress || 'unknown';
  if (publicUrl) {
    req.headers.host = publicUrl.host;
    req.headers['x-forwarded-proto'] = publicUrl.protocol.slice(0, -1);
  }
}

function refusalOf(req) {
  const path = req.url ?? '/';
  if (!publicUrl && !loopback.test(req.headers.host ?? '')) {
    const message = 'This server answers to 127.0.0.1 and localhost alone; set PUBLIC_URL to serve another host.';
    return { status: 421, code: 'host', message };
  }
  if (path.startsWith('/_image')) return { status: 404, code: 'not-found', message: 'There is no image service.' };
  if (path.startsWith('/api/auth/') && req.method !== 'GET' && req.method !== 'HEAD') {
    const length = Number(req.headers['content-length'] ?? Number.NaN);
    if (!(length <= signInBodyLimitBytes)) {
      const message = `A sign-in form states its Content-Length, at most ${signInBodyLimitBytes} bytes.`;
      return { status: 413, code: 'too-large', message };
    }
  }
  return undefined;
}

function healthStatus(address, portNumber) {
  return new Promise((resolve) => {
    const target = { host: address === '0.0.0.0' ? '127.0.0.1' : address, port: portNumber, path: '/api/health' };
    const request = get({ ...target, headers: { host: `127.0.0.1:${portNumber}` } }, (response) => {
      response.resume();
      resolve(response.statusCode);
    });
    request.on('error', (error) => resolve(error.message));
  });
}
