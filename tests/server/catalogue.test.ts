import { setTimeout as delay } from 'node:timers/promises';
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

  it('answers a link that states everything, and says of each requirement how it stands', async () => {
    const link =
      'n=200..300&k=100..&rate=0.5..&columnWeight=..20&rowWeight=..20&girthMin=6&distanceMin=10&radiusMin=8' +
      '&structure=cyclic&families=projective-plane&payloadBits=128&parityBits=82&shortenTo=210&p=0.001&targetFer=1e-9' +
      '&sort=distance&descending=true&offset=0&limit=50';
    const { status, body } = await client.get(`/catalogue?${link}`);
    expect([status, body.matching, body.nearest, body.obstacles]).toEqual([200, 2, [], []]);
    for (const candidate of body.candidates) {
      expect(candidate).toMatchObject({ n: 210, transforms: [{ kind: 'shorten', bits: 63 }] });
      const { verdicts } = candidate as { verdicts: { requirement: string; outcome: string; grade: string }[] };
      expect(verdicts.length).toBeGreaterThanOrEqual(13);
      expect(verdicts.every(({ outcome, grade }) => outcome === 'meets' && grade)).toBe(true);
    }
  });

  it('hands out pages that join without a gap, over at least 50,000 candidates', async () => {
    const first = (await client.get('/catalogue?sort=rate&limit=40')).body;
    expect(first.total).toBeGreaterThanOrEqual(50_000);
    expect([first.matching, first.next]).toEqual([first.total, 40]);
    const second = (await client.get(`/catalogue?sort=rate&limit=40&offset=${first.next}`)).body;
    const both = (await client.get('/catalogue?sort=rate&limit=80')).body.candidates;
    expect([...first.candidates, ...second.candidates]).toEqual(both);
    const last = (await client.get(`/catalogue?offset=${first.total - 1}`)).body;
    expect([last.candidates.length, last.next]).toEqual([1, undefined]);
  });

  it('keeps a kept-classes candidate that it offered', async () => {
    const { body } = await client.get('/catalogue?n=65&families=transversal&limit=200');
    const offered = body.candidates.find((candidate: { keptClasses?: number }) => candidate.keptClasses);
    expect(offered.transforms).toEqual([{ kind: 'keep-classes', classes: offered.keptClasses }]);
    const owner = await demoClient(server.base, 'owner');
    const { project } = (await owner.post('/projects', { name: 'Kept classes' })).body;
    const derivation = { kind: 'ldpc', checks: offered.checks, transforms: offered.transforms };
    const kept = await owner.post(`/projects/${project.id}/codes`, { design: offered.design, derivation });
    expect((await codeOnceBuilt(owner, kept.body)).n).toBe(65);
  });

  it('names what comes nearest and the theorem in the way when nothing fits', async () => {
    const { body } = await client.get('/catalogue?n=43&structure=cyclic&radiusMin=3&rate=0.2..');
    expect(body.matching).toBe(0);
    expect(body.obstacles.map(({ rule }: { rule: string }) => rule)).toContain('bruck-ryser-chowla');
    expect(body.nearest.map(({ givenUp }: { givenUp: string }) => givenUp)).toContain('length');
  });

  it.each([
    ['n=abc', 'n', /window such as/],
    ['p=0.6', 'p', /at most 0.5/],
    ['limit=0', 'limit', /1/],
    ['payloadBits=0', 'payloadBits', /from 1/],
    ['families=nonesuch', 'families', /projective-plane/],
    ['colour=red', 'colour', /no such field/],
  ])('refuses %s, naming %s', async (query, field, accepted) => {
    const { status, body } = await client.get(`/catalogue?${query}`);
    expect([status, body.error.fields]).toEqual([400, { [field]: expect.stringMatching(accepted) }]);
  });

  it('maps every match of a window, and finds one by its id', async () => {
    const window = 'n=200..1100&rate=0.6..&structure=cyclic';
    const map = (await client.get(`/catalogue/map?${window}`)).body;
    const { candidates, matching } = (await client.get(`/catalogue?${window}&meetsFirst=true`)).body;
    expect(map.matching).toBe(matching);
    expect(map.cells.reduce((sum: number, cell: { count: number }) => sum + cell.count, 0)).toBe(matching);
    const id = encodeURIComponent(candidates.at(-1).id);
    expect((await client.get(`/catalogue/candidate?${window}&id=${id}`)).body.candidate).toEqual(candidates.at(-1));
    expect((await client.get(`/catalogue/candidate?n=7&id=${id}`)).body).toEqual({ candidate: null });
    expect((await client.get('/catalogue/candidate?n=7')).status).toBe(400);
  });

  it('needs signing in', async () => {
    expect((await new ApiClient(server.base).get('/catalogue')).status).toBe(401);
  });
});

/** The code of an answer, waited for where its build became a job. */
async function codeOnceBuilt(owner: ApiClient, { code, job }: { code?: { n: number }; job?: { id: string } }) {
  if (code) return code;
  for (;;) {
    const { state, codeId } = (await owner.get(`/jobs/${job!.id}`)).body.job;
    expect(state).not.toBe('failed');
    if (codeId) return (await owner.get(`/codes/${codeId}`)).body.code;
    await delay(100);
  }
}

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
