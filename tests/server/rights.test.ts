import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { freshRun, tallyWith } from './run-kit.ts';

const roles = ['owner', 'engineer', 'reviewer', 'viewer'] as const;
type Who = (typeof roles)[number] | 'outsider' | 'nobody';

let server: RunningServer;
const clients = new Map<Who, ApiClient>();
const at: Record<string, string> = {};

beforeAll(async () => {
  server = await startServer();
  for (const role of roles) clients.set(role, await demoClient(server.base, role));
  clients.set('nobody', new ApiClient(server.base));
  const { projectId, codeId, run, pointIds } = await freshRun(clients.get('engineer')!);
  Object.assign(at, { project: projectId, code: codeId, run: run.id, point: pointIds[0] });
  // The owner's own project, where the engineer is the outsider.
  const own = (await clients.get('owner')!.post('/projects', { name: 'Of the owner alone' })).body.project.id;
  const design = { family: 'projective-plane', params: { q: 4 } };
  const derivation = { kind: 'ldpc', checks: 'blocks' };
  const made = await clients.get('owner')!.post(`/projects/${own}/codes`, { design, derivation });
  const code = made.body.code.id;
  const points = [{ codeId: code, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'gallager-b' } }];
  const stopping = { frameErrors: 10, maxFrames: 1000 };
  const stated = { name: 'Own', seed: 'own', framesPerShard: 100, stopping, place: 'browser', points };
  const ownRun = (await clients.get('owner')!.post(`/projects/${own}/runs`, stated)).body.run;
  Object.assign(at, { ownProject: own, ownCode: code, ownRun: ownRun.id, ownPoint: ownRun.points[0].id });
}, 300_000);
afterAll(() => server.stop());

type Deed = [what: string, method: string, path: () => string, body?: () => unknown];

const reading: Deed[] = [
  ['a project', 'GET', () => `/projects/${at.project}`],
  ['its requirements', 'GET', () => `/projects/${at.project}/requirements`],
  ['its codes', 'GET', () => `/projects/${at.project}/codes`],
  ['its runs', 'GET', () => `/projects/${at.project}/runs`],
  ['its points', 'GET', () => `/projects/${at.project}/points`],
  ['a code', 'GET', () => `/codes/${at.code}`],
  ['its manifest', 'GET', () => `/codes/${at.code}/manifest`],
  ['a run', 'GET', () => `/runs/${at.run}`],
];

const writing: Deed[] = [
  ['stating requirements', 'PUT', () => `/projects/${at.project}/requirements`, () => ({ targetFer: 0.01 })],
  [
    'keeping a code',
    'POST',
    () => `/projects/${at.project}/codes`,
    () => ({
      design: { family: 'projective-plane', params: { q: 16 } },
      derivation: { kind: 'ldpc', checks: 'blocks' },
    }),
  ],
  ['removing a code', 'DELETE', () => `/codes/${at.code}`],
  [
    'stating a run',
    'POST',
    () => `/projects/${at.project}/runs`,
    () => ({
      name: 'x',
      seed: 'x',
      framesPerShard: 100,
      stopping: { frameErrors: 1, maxFrames: 100 },
      place: 'browser',
      points: [{ codeId: at.code, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'gallager-b' } }],
    }),
  ],
  ['renaming a run', 'PATCH', () => `/runs/${at.run}`, () => ({ name: 'Another name' })],
  [
    'handing in a shard',
    'POST',
    () => `/runs/${at.run}/shards`,
    () => ({ shards: [{ pointId: at.point, index: 0, tally: tallyWith(1) }] }),
  ],
];

const send = (who: Who, [, method, path, body]: Deed) => clients.get(who)!.call(method, path(), body?.());

describe.each(reading)('reading %s', (...deed) => {
  it.each(roles)('is a %s’s right', async (role) => {
    expect((await send(role, deed)).status).toBe(200);
  });
  it('needs signing in', async () => {
    const { status, body } = await send('nobody', deed);
    expect([status, body.error.code]).toEqual([401, 'unauthenticated']);
  });
});

describe.each(writing)('%s', (...deed) => {
  it.each(['viewer', 'reviewer'] as const)('is refused to a %s', async (role) => {
    const { status, body } = await send(role, deed);
    expect([status, body.error.code]).toEqual([403, 'forbidden']);
  });
  it('needs signing in', async () => {
    expect((await send('nobody', deed)).status).toBe(401);
  });
  it.each(['owner', 'engineer'] as const)('is not refused to an %s for want of rights', async (role) => {
    // A code in use and a matrix already kept are conflicts, found only after rights were.
    expect([200, 201, 409]).toContain((await send(role, deed)).status);
  });
});

describe('a project of others', () => {
  const swapped = (path: string) =>
    path.replace(at.project!, at.ownProject!).replace(at.code!, at.ownCode!).replace(at.run!, at.ownRun!);

  it.each([...reading, ...writing])('does not exist for %s', async (...[, method, path, body]) => {
    const { status, body: answer } = await clients.get('engineer')!.call(method, swapped(path()), body?.());
    expect([status, answer.error.code]).toEqual([404, 'not-found']);
  });

  it('does not lend its points to a run of one’s own', async () => {
    const shards = [{ pointId: at.ownPoint, index: 0, tally: tallyWith(0, 21) }];
    const { status, body } = await clients.get('engineer')!.post(`/runs/${at.run}/shards`, { shards });
    expect(status).toBe(400);
    expect(body.error.fields).toEqual({ 'shards.0.pointId': 'the id of a point of this run' });
  });

  it('does not lend its codes to a run of one’s own', async () => {
    const points = [{ codeId: at.ownCode, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'gallager-b' } }];
    const stopping = { frameErrors: 1, maxFrames: 100 };
    const stated = { name: 'x', seed: 'x', framesPerShard: 100, stopping, place: 'browser', points };
    const { status, body } = await clients.get('engineer')!.post(`/projects/${at.project}/runs`, stated);
    expect(status).toBe(400);
    expect(Object.keys(body.error.fields)).toEqual(['points.0.codeId']);
  });
});

describe('starting a project', () => {
  it('is refused to a guest, such as the demo’s viewer', async () => {
    expect((await clients.get('viewer')!.post('/projects', { name: 'x' })).status).toBe(403);
  });
  it('makes a member its owner', async () => {
    const { status, body } = await clients.get('reviewer')!.post('/projects', { name: 'Of the reviewer' });
    expect([status, body.project.role]).toEqual([201, 'owner']);
  });
});
