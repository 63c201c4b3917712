import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endpoints } from '@/api/endpoints.ts';
import { ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, root, startServer } from './built-server.ts';

let server: RunningServer;
beforeAll(async () => {
  server = await startServer();
}, 300_000);
afterAll(() => server.stop());

describe('the server', () => {
  it('says that it is well, and its version', async () => {
    const response = await fetch(`${server.base}/api/health`);
    const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
    expect([response.status, await response.json()]).toEqual([200, { ok: true, version }]);
  });

  it('sends the isolation headers with every answer, static files and refusals too', async () => {
    for (const path of ['/api/health', '/robots.txt', '/nothing-here', '/_image?href=x', '/api/v1/projects']) {
      const { headers } = await fetch(server.base + path);
      expect(headers.get('cross-origin-opener-policy'), path).toBe('same-origin');
      expect(headers.get('cross-origin-embedder-policy'), path).toBe('require-corp');
      expect(headers.get('cross-origin-resource-policy'), path).toBe('same-origin');
      expect(headers.get('x-content-type-options'), path).toBe('nosniff');
      expect(headers.get('content-security-policy'), path).toContain("object-src 'none'");
    }
  });

  it('answers to loopback names alone in local mode', async () => {
    const { request } = await import('node:http');
    const { hostname, port } = new URL(server.base);
    const status = await new Promise((resolve) => {
      const asked = { hostname, port, path: '/api/health', headers: { host: 'bench.example.test' } };
      request(asked, (response) => resolve(response.statusCode)).end();
    });
    expect(status).toBe(421);
  });

  it('has no image service', async () => {
    expect((await fetch(`${server.base}/_image?href=https://example.test/x.png`)).status).toBe(404);
  });
});

describe('the OpenAPI description', () => {
  it('tells every endpoint of the table, and refers to nothing that it lacks', async () => {
    const description = await (await fetch(`${server.base}/api/v1/openapi.json`)).json();
    expect(description.openapi).toBe('3.1.0');
    for (const [operationId, { method, path }] of Object.entries(endpoints)) {
      const operation = description.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()];
      expect(operation?.operationId).toBe(operationId);
      expect(operation.responses.default).toBeDefined();
    }
    for (const [, name] of JSON.stringify(description).matchAll(/"#\/components\/schemas\/(\w+)"/g)) {
      expect(description.components.schemas).toHaveProperty(name!);
    }
  });

  it('names addresses that all answer', async () => {
    const client = await demoClient(server.base, 'viewer');
    for (const { method, path } of Object.values(endpoints)) {
      const address = path.replace(/:\w+/g, '0123456789abcdefghjkmnpqrs');
      const body = method === 'GET' || method === 'DELETE' ? undefined : {};
      const answer = await client.fetch(`/api/v1${address}`, {
        method,
        headers: { origin: server.base, 'content-type': 'application/json' },
        body: body && JSON.stringify(body),
      });
      // A stream of events has no end to wait for.
      if (answer.headers.get('content-type')?.startsWith('text/event-stream')) {
        await answer.body?.cancel();
        continue;
      }
      // Refused for its empty input, its unknown id or the viewer's rights, but never as an unknown address.
      const text = await answer.text();
      expect(text, `${method} ${path}`).not.toMatch(/"code":"(method|internal)"|Nothing is at/);
    }
  });
});

describe('in production', () => {
  let production: RunningServer;
  beforeAll(async () => {
    production = await startServer({ PUBLIC_URL: 'https://bench.example.test', AUTH_SECRET: 'p'.repeat(40) });
  }, 300_000);
  afterAll(() => production.stop());

  it('there are no demo accounts', async () => {
    const client = new ApiClient(production.base);
    const response = await client.fetch('/api/auth/csrf');
    const { csrfToken } = await response.json();
    const form = new URLSearchParams({ csrfToken, email: 'owner@demo.test', password: 'shore-archive' });
    const headers = { origin: 'https://bench.example.test', 'X-Auth-Return-Redirect': '1' };
    const answer = await client.fetch('/api/auth/callback/credentials', { method: 'POST', headers, body: form });
    expect((await answer.json()).url).toMatch(/^https:\/\/bench\.example\.test\/sign-in\?.*error=CredentialsSignin/);
  });

  it('cookies are Secure, bound to the host, and transport is pinned', async () => {
    const response = await fetch(`${production.base}/api/auth/csrf`);
    expect(response.headers.getSetCookie().join()).toMatch(/__Host-authjs\.csrf-token=.*Secure/);
    expect(response.headers.get('strict-transport-security')).toMatch(/max-age=\d{7,}/);
  });

  it('the origin that counts is the public one', async () => {
    const post = (origin: string) =>
      fetch(`${production.base}/api/v1/projects`, {
        method: 'POST',
        headers: { origin, 'content-type': 'application/json', cookie: 'a=b', 'x-forwarded-host': 'evil.test' },
        body: '{}',
      });
    expect((await post('https://bench.example.test')).status).toBe(401);
    expect((await post(production.base)).status).toBe(403);
    expect((await post('https://evil.test')).status).toBe(403);
  });
});
