import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';

let server: RunningServer;
let client: ApiClient;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'viewer');
}, 300_000);
afterAll(() => server.stop());

describe('the catalogue', () => {
  it('finds PG(2,16) and the affine plane without the origin in their windows', async () => {
    const found = async (query: string) => (await client.get(`/catalogue?${query}&limit=200`)).body.candidates;
    const plane = { family: 'projective-plane', params: { q: 16 } };
    expect(await found('n=273&rate=0.69..')).toContainEqual(expect.objectContaining({ design: plane, n: 273 }));
    const affine = { family: 'punctured-affine-plane', params: { q: 32 } };
    expect(await found('n=1000..1050&structure=cyclic')).toContainEqual(expect.objectContaining({ design: affine }));
  });

  it.each([
    ['n=abc', 'n', /window such as/],
    ['p=0.6', 'p', /at most 0.5/],
    ['limit=0', 'limit', /1/],
    ['colour=red', 'colour', /no such field/],
  ])('refuses %s, naming %s', async (query, field, accepted) => {
    const { status, body } = await client.get(`/catalogue?${query}`);
    expect([status, body.error.fields]).toEqual([400, { [field]: expect.stringMatching(accepted) }]);
  });

  it('needs signing in', async () => {
    expect((await new ApiClient(server.base).get('/catalogue')).status).toBe(401);
  });
});

describe('feasibility', () => {
  it('names the theorem that forbids a plane of order 6', async () => {
    const { status, body } = await client.post('/feasibility', { t: 2, v: 43, k: 7, lambda: 1 });
    expect([status, body.verdict]).toEqual([200, 'impossible']);
    expect(body.reasons[0]).toMatchObject({ rule: 'bruck-ryser-chowla', statement: expect.any(String) });
  });
  it('refuses numbers that are none, naming each', async () => {
    const { status, body } = await client.post('/feasibility', { t: 2, v: -1, k: 'x', lambda: 1 });
    expect(status).toBe(400);
    expect(Object.keys(body.error.fields).sort()).toEqual(['k', 'v']);
  });
});
