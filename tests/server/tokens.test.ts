import { join } from 'node:path';
import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endpoints } from '@/api/endpoints.ts';
import { type ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { freshRun, tallyWith } from './run-kit.ts';
import { callByToken, makeToken } from './token-client.ts';

let server: RunningServer;
let engineer: ApiClient;
let owner: ApiClient;
beforeAll(async () => {
  server = await startServer();
  engineer = await demoClient(server.base, 'engineer');
  owner = await demoClient(server.base, 'owner');
}, 300_000);
afterAll(() => server.stop());

const call = (secret: string, method: string, path: string, body?: unknown) =>
  callByToken(server.base, secret, method, path, body);

function inDatabase<T>(work: (db: Database.Database) => T): T {
  const db = new Database(join(server.dataDir, 'blockwright.sqlite'));
  try {
    return work(db);
  } finally {
    db.close();
  }
}

describe('a token', () => {
  it('is 256 random bits, told once, and kept as a digest only', async () => {
    const { token, secret } = await makeToken(engineer, ['read']);
    expect(secret).toMatch(/^bw_[\w-]{43}$/);
    expect(token.ending).toBe(secret.slice(-4));
    const listed = (await engineer.get('/account/tokens')).body.tokens;
    expect(listed[0]).toMatchObject({ id: token.id, scopes: ['read'], lastUsedAt: null });
    expect(JSON.stringify(listed)).not.toContain(secret.slice(3, 20));
    const rows = inDatabase((db) => JSON.stringify(db.prepare('SELECT * FROM api_tokens').all()));
    expect(rows).not.toContain(secret.slice(3, 20));
    const events = inDatabase((db) => JSON.stringify(db.prepare('SELECT * FROM audit_events').all()));
    expect(events).toContain('token.created');
    expect(events).not.toContain(secret.slice(3, 20));
  });

  it('shows when it was last used', async () => {
    const { token, secret } = await makeToken(engineer, ['read']);
    const from = new Date().toISOString();
    expect((await call(secret, 'GET', '/projects')).status).toBe(200);
    const listed = (await engineer.get('/account/tokens')).body.tokens.find(
      ({ id }: { id: string }) => id === token.id,
    );
    expect(listed.lastUsedAt >= from).toBe(true);
  });

  it('works no longer from the moment it is revoked, and open streams of it end', async () => {
    const { token, secret } = await makeToken(engineer, ['read']);
    const { run, pointIds } = await freshRun(engineer);
    const stream = await fetch(`${server.base}/api/v1/runs/${run.id}/events`, {
      headers: { authorization: `Bearer ${secret}` },
    });
    const reader = stream.body!.getReader();
    await reader.read();
    expect((await engineer.call('DELETE', `/account/tokens/${token.id}`)).status).toBe(204);
    const { status, body, headers } = await call(secret, 'GET', '/projects');
    expect([status, body.error.code]).toEqual([401, 'unauthenticated']);
    expect(body.error.message).toMatch(/^Authorization: the token was revoked at 20/);
    expect(headers.get('www-authenticate')).toMatch(/^Bearer/);
    // The next change of the run finds the stream's token revoked.
    await engineer.post(`/runs/${run.id}/shards`, {
      shards: [{ pointId: pointIds[0], index: 0, tally: tallyWith(1) }],
    });
    let text = '';
    for (let part = await reader.read(); !part.done; part = await reader.read()) text += Buffer.from(part.value);
    expect(text).not.toContain('"frames":100');
    const { tokens } = (await engineer.get('/account/tokens')).body;
    expect(tokens.map(({ id }: { id: string }) => id)).not.toContain(token.id);
  });

  it('that has expired is refused, and says when it did', async () => {
    const { token, secret } = await makeToken(engineer, ['read'], 1);
    inDatabase((db) =>
      db.prepare('UPDATE api_tokens SET expires_at = ? WHERE id = ?').run('2026-01-01T00:00:00.000Z', token.id),
    );
    const { status, body } = await call(secret, 'GET', '/projects');
    expect(status).toBe(401);
    expect(body.error.message).toContain('expired at 2026-01-01T00:00:00.000Z');
  });

  it('that nobody made is refused, beside a good cookie too', async () => {
    expect((await call(`bw_${'a'.repeat(43)}`, 'GET', '/projects')).status).toBe(401);
    const answer = await engineer.fetch('/api/v1/projects', { headers: { authorization: 'Bearer nonsense' } });
    expect(answer.status).toBe(401);
  });

  it('opens no page and no sign-in address', async () => {
    const { secret } = await makeToken(engineer, ['read']);
    const headers = { authorization: `Bearer ${secret}` };
    const page = await fetch(`${server.base}/`, { headers, redirect: 'manual' });
    expect([page.status, page.headers.get('location')]).toEqual([302, '/sign-in']);
  });
});

describe('another person’s token', () => {
  it('is not listed and cannot be revoked', async () => {
    const { token, secret } = await makeToken(engineer, ['read']);
    const listed = (await owner.get('/account/tokens')).body.tokens;
    expect(listed.map(({ id }: { id: string }) => id)).not.toContain(token.id);
    expect((await owner.call('DELETE', `/account/tokens/${token.id}`)).status).toBe(404);
    expect((await call(secret, 'GET', '/projects')).status).toBe(200);
  });

  it('reaches what its owner reaches, and not what is another’s', async () => {
    const { secret } = await makeToken(engineer, ['read', 'run', 'release:read']);
    const hidden = (await owner.post('/projects', { name: 'Of the owner' })).body.project.id;
    expect((await call(secret, 'GET', `/projects/${hidden}`)).status).toBe(404);
    expect((await call(secret, 'GET', `/projects/${hidden}/releases`)).status).toBe(404);
  });

  it('loses what its owner loses: a viewer’s may not run whatever its scope', async () => {
    const viewer = await demoClient(server.base, 'viewer');
    const { secret } = await makeToken(viewer, ['run']);
    const { run } = await freshRun(engineer);
    const { status, body } = await call(secret, 'PATCH', `/runs/${run.id}`, { name: 'x' });
    expect([status, body.error.code]).toEqual([403, 'forbidden']);
  });
});

describe('a scope', () => {
  const secrets = new Map<string, string>();
  beforeAll(async () => {
    for (const scope of ['read', 'run', 'release:read'])
      secrets.set(scope, (await makeToken(engineer, [scope])).secret);
  });

  it.each(Object.entries(endpoints))('is asked for at %s', async (_, { method, path, scopes }) => {
    const address = path.replace(/:\w+/g, '0123456789abcdefghjkmnpqrs');
    const body = method === 'GET' || method === 'DELETE' ? undefined : {};
    for (const [scope, secret] of secrets) {
      const query = path.endsWith('/end') ? '?seconds=0' : '';
      const answer = await call(secret, method, address + query, body);
      const refused = answer.status === 403 && answer.body.error.fields?.scope !== undefined;
      expect([scope, refused]).toEqual([scope, !scopes.some((one) => one === scope)]);
    }
  });

  it('that is missing is named in the refusal', async () => {
    const { projectId } = await freshRun(engineer);
    const { status, body } = await call(secrets.get('read')!, 'POST', `/projects/${projectId}/runs`, {});
    expect(status).toBe(403);
    expect(body.error.fields).toEqual({ scope: 'a token with the scope run' });
  });

  it('never reaches the account: no token makes, lists or revokes tokens, nor changes the password', async () => {
    for (const secret of secrets.values()) {
      expect((await call(secret, 'GET', '/account/tokens')).status).toBe(403);
      expect((await call(secret, 'POST', '/account/tokens', { name: 'x', scopes: ['read'], days: 1 })).status).toBe(
        403,
      );
      expect((await call(secret, 'PUT', '/account/password', { current: 'a', next: 'b' })).status).toBe(403);
    }
  });
});

describe('a bad token request', () => {
  it.each([
    ['name', { name: ' ', scopes: ['read'], days: 1 }, 'a name of 1 to 80 characters'],
    ['scopes', { name: 'x', scopes: [], days: 1 }, 'at least one of read, run, release:read'],
    ['scopes.0', { name: 'x', scopes: ['write'], days: 1 }, 'read, run or release:read'],
    ['scopes', { name: 'x', scopes: ['read', 'read'], days: 1 }, 'each of read, run, release:read once'],
    ['days', { name: 'x', scopes: ['read'], days: 367 }, 'a whole number of days from 1 to 366'],
    ['days', { name: 'x', scopes: ['read'], days: 1.5 }, 'a whole number of days from 1 to 366'],
    ['forever', { name: 'x', scopes: ['read'], days: 1, forever: true }, 'nothing: no such field is known'],
  ])('names %s and what is accepted', async (field, body, accepted) => {
    const answer = await engineer.post('/account/tokens', body);
    expect([answer.status, answer.body.error.fields]).toEqual([400, { [field]: accepted }]);
  });
});

describe('by token a script', () => {
  it('states a run, hands in shards, waits for its end and fetches its points as JSON and CSV', async () => {
    const { secret } = await makeToken(engineer, ['run']);
    const { projectId, codeId } = await freshRun(engineer);
    const stated = await call(secret, 'POST', `/projects/${projectId}/runs`, {
      name: 'By "script", =1',
      seed: 's',
      framesPerShard: 100,
      stopping: { frameErrors: 10, maxFrames: 1000 },
      place: 'browser',
      points: [0.01, 0.02].map((p) => ({ codeId, channel: { kind: 'bsc', p }, decoder: { kind: 'gallager-b' } })),
    });
    expect(stated.status).toBe(201);
    const { id, points } = stated.body.run;

    const early = await call(secret, 'GET', `/runs/${id}/end?seconds=0`);
    expect([early.body.ended, early.body.run.state]).toEqual([false, 'ready']);
    const waiting = call(secret, 'GET', `/runs/${id}/end?seconds=30`);
    const shards = points.map((point: { id: string }, i: number) => ({
      pointId: point.id,
      index: 0,
      tally: tallyWith(10 + i),
    }));
    expect((await call(secret, 'POST', `/runs/${id}/shards`, { shards })).status).toBe(200);
    const from = Date.now();
    expect((await waiting).body).toMatchObject({ ended: true, run: { state: 'finished' } });
    expect(Date.now() - from).toBeLessThan(3000);

    const first = (await call(secret, 'GET', `/runs/${id}/points?limit=1`)).body;
    expect([first.points.length, first.next]).toEqual([1, points[0].id]);
    const second = (await call(secret, 'GET', `/runs/${id}/points?limit=1&after=${first.next}`)).body;
    expect([second.points[0].id, second.next]).toEqual([points[1].id, undefined]);
    expect(second.points[0].fer).toBeCloseTo(0.11, 12);

    const csv = await call(secret, 'GET', `/runs/${id}/points?format=csv`);
    expect(csv.headers.get('content-type')).toBe('text/csv; charset=utf-8');
    const lines = csv.body.split('\r\n');
    expect(lines[0]).toMatch(/^run,seed,point id,code id,/);
    expect(lines.length).toBe(4);
    expect(lines[1]).toContain('"By ""script"", =1"');
    expect(lines[1]).toContain('"{""kind"":""bsc"",""p"":0.01}"');
    const byAccept = await fetch(`${server.base}/api/v1/runs/${id}/points`, {
      headers: { authorization: `Bearer ${secret}`, accept: 'text/csv' },
    });
    expect(await byAccept.text()).toBe(csv.body);
  });

  it('is told what is accepted when it waits wrongly', async () => {
    const { secret } = await makeToken(engineer, ['run']);
    const { run } = await freshRun(engineer);
    const { status, body } = await call(secret, 'GET', `/runs/${run.id}/end?seconds=61`);
    expect([status, body.error.fields]).toEqual([400, { seconds: 'a whole number of seconds from 0 to 60' }]);
    expect((await call(secret, 'GET', `/runs/${run.id}/points?format=xml`)).status).toBe(400);
  });

  it('may change things without an Origin, while a browser of another site may not', async () => {
    const { secret } = await makeToken(engineer, ['run']);
    const { run } = await freshRun(engineer);
    expect((await call(secret, 'PATCH', `/runs/${run.id}`, { name: 'Renamed' })).status).toBe(200);
    const forged = await engineer.fetch(`/api/v1/runs/${run.id}`, {
      method: 'PATCH',
      headers: { origin: 'https://elsewhere.test', 'content-type': 'application/json' },
      body: '{"name":"Forged"}',
    });
    expect(forged.status).toBe(403);
  });
});

it('the OpenAPI description says of each operation which scopes open it', async () => {
  const description = await (await fetch(`${server.base}/api/v1/openapi.json`)).json();
  expect(description.components.securitySchemes.token).toMatchObject({ type: 'http', scheme: 'bearer' });
  for (const { method, path, scopes } of Object.values(endpoints)) {
    const operation = description.paths[path.replace(/:(\w+)/g, '{$1}')][method.toLowerCase()];
    expect(operation.security).toEqual([{ session: [] }, ...scopes.map((scope) => ({ token: [scope] }))]);
  }
  const points = description.paths['/runs/{id}/points'].get.responses['200'].content;
  expect(Object.keys(points)).toEqual(['application/json', 'text/csv']);
});
