import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { framesPerShard, freshRun, tallyWith } from './run-kit.ts';

let server: RunningServer;
let client: ApiClient;
let kit: Awaited<ReturnType<typeof freshRun>>;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'engineer');
  kit = await freshRun(client);
}, 300_000);
afterAll(() => server.stop());

const counts = async () => (await client.get(`/projects/${kit.projectId}`)).body.project.counts;

/** A refusal that names the field, says what is accepted, and leaves nothing behind. */
async function refused(path: string, body: unknown, field: string, accepted: RegExp, status = 400) {
  const before = await counts();
  const answer = await client.post(path, body);
  expect([answer.status, answer.body.error.fields]).toEqual([
    status,
    expect.objectContaining({ [field]: expect.stringMatching(accepted) }),
  ]);
  expect(answer.body.error.message).toMatch(/\S/);
  expect(await counts()).toEqual(before);
  return answer.body.error;
}

const code = (family: string, params: Record<string, unknown>) => ({
  design: { family, params },
  derivation: { kind: 'ldpc', checks: 'blocks' },
});

describe('a code', () => {
  it.each([
    ['projective-plane', { q: 1 }, 'design.params.q', /prime power/],
    ['projective-plane', { q: 'x' }, 'design.params.q', /prime power/],
    ['projective-plane', { q: 15 }, 'design.params.q', /prime power/],
    ['punctured-affine-plane', { q: -4 }, 'design.params.q', /prime power/],
    ['projective-plane', { q: 4, extra: 1 }, 'design.params.extra', /only q/],
    ['projective-plane', {}, 'design.params.q', /prime power/],
    ['no-such-family', {}, 'design.family', /projective-plane/],
  ])('of %s with %o is refused, naming %s', async (family, params, field, accepted) => {
    await refused(`/projects/${kit.projectId}/codes`, code(family, params), field, accepted);
  });

  it('of the plane of order 6 is refused by the theorem that forbids it', async () => {
    const { status, body } = await client.post(`/projects/${kit.projectId}/codes`, code('projective-plane', { q: 6 }));
    expect([status, body.error.code, body.error.reason.rule]).toEqual([422, 'infeasible', 'bruck-ryser-chowla']);
    expect(body.error.reason.source).toMatchObject({ authors: expect.any(String), year: expect.any(Number) });
  });

  it('of a triple system on 8 points is refused by its rule', async () => {
    const { status, body } = await client.post(
      `/projects/${kit.projectId}/codes`,
      code('steiner-triple', { v: 8, method: 'bose' }),
    );
    expect([status, body.error.code]).toEqual([422, 'infeasible']);
    expect(body.error.reason.statement).toMatch(/8/);
  });

  it('whose matrix the browser built otherwise is refused', async () => {
    const body = { ...code('projective-plane', { q: 4 }), fingerprint: '0'.repeat(64) };
    const error = await refused(`/projects/${kit.projectId}/codes`, body, 'fingerprint', /^[0-9a-f]{64},/, 409);
    expect(error.code).toBe('fingerprint');
  });

  it('kept already is refused, naming the one that is there', async () => {
    const error = await refused(
      `/projects/${kit.projectId}/codes`,
      code('projective-plane', { q: 16 }),
      'fingerprint',
      new RegExp(kit.codeId),
      409,
    );
    expect([error.code, error.existing]).toEqual(['duplicate', kit.codeId]);
  });

  it('in use by a run is not removed', async () => {
    const { status, body } = await client.call('DELETE', `/codes/${kit.codeId}`);
    expect([status, body.error.code]).toEqual([409, 'in-use']);
  });

  it('is given in no unknown format', async () => {
    const { status, body } = await client.get(`/codes/${kit.codeId}/matrix?format=docx`);
    expect(status).toBe(400);
    expect(body.error.fields.format).toMatch(/alist/);
  });
});

describe('a run', () => {
  const stated = (change: object, point: object = {}) => ({
    name: 'x',
    seed: 'x',
    framesPerShard: 100,
    stopping: { frameErrors: 10, maxFrames: 1000 },
    place: 'browser',
    points: [{ codeId: kit.codeId, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'gallager-b' }, ...point }],
    ...change,
  });
  const runs = () => `/projects/${kit.projectId}/runs`;

  it.each([0, -0.1, 0.51, 1, '0.1', null])('with p = %s is refused', async (p) => {
    const body = stated({}, { channel: { kind: 'bsc', p } });
    await refused(runs(), body, 'points.0.channel.p', /above 0 and at most 0.5/);
  });
  it.each([
    [{ framesPerShard: 0 }, 'framesPerShard', /at least 1 frame/],
    [{ framesPerShard: 1.5 }, 'framesPerShard', /whole number of frames/],
    [{ framesPerShard: 1e8 }, 'framesPerShard', /10 000 000/],
    [{ stopping: { frameErrors: 0, maxFrames: 10 } }, 'stopping.frameErrors', /1/],
    [{ stopping: { frameErrors: 1, maxFrames: 0 } }, 'stopping.maxFrames', /1/],
    [{ stopping: { frameErrors: 1 } }, 'stopping.maxFrames', /whole number of frames/],
    [{ points: [] }, 'points', /at least one point/],
    [{ seed: '' }, 'seed', /1 to 200 characters/],
    [{ name: ' ' }, 'name', /1 to 120 characters/],
    [{ place: 'moon' }, 'place', /browser/],
    [{ place: 'fleet' }, 'place', /browser/],
    [{ surprise: 1 }, 'surprise', /no such field/],
  ])('with %o is refused, naming %s', async (change, field, accepted) => {
    await refused(runs(), stated(change), field, accepted);
  });
  it.each([
    [{ codeId: 'nothing' }, 'points.0.codeId', /id of a code of this project/],
    [{ decoder: { kind: 'oracle' } }, 'points.0.decoder.kind', /\S/],
    [{ decoder: { kind: 'gallager-b', iterations: 0 } }, 'points.0.decoder.iterations', /1/],
    [{ channel: { kind: 'stratum', weight: 274 } }, 'points.0.channel.weight', /0 to 273/],
  ])('with a point of %o is refused, naming %s', async (point, field, accepted) => {
    await refused(runs(), stated({}, point), field, accepted);
  });
  it('with the same point twice is refused', async () => {
    const { points } = stated({});
    await refused(runs(), stated({ points: [...points, ...points] }), 'points.1', /differs from point 0/);
  });
});

describe('a shard', () => {
  const shard = (change: object, tally: object = {}) => ({
    shards: [{ pointId: kit.pointIds[0], index: 0, tally: { ...tallyWith(3), ...tally }, ...change }],
  });
  const path = () => `/runs/${kit.run.id}/shards`;

  it.each([
    [{ frameErrors: framesPerShard + 1 }, 'frameErrors', /at most 100/],
    [{ frames: framesPerShard + 1 }, 'frames', /exactly 100/],
    [{ bits: 1 }, 'bits', /27300/],
    [{ bitErrors: 2 }, 'bitErrors', /from 3 to/],
    [{ bitErrors: 3 * 273 + 1 }, 'bitErrors', /from 3 to/],
    [{ bitErrorsSquared: 2 }, 'bitErrorsSquared', /allow/],
    [{ undetected: 4 }, 'undetected', /at most 3/],
    [{ iterations: 99 }, 'iterations', /100/],
    [{ iterationHistogram: [1] }, 'iterationHistogram', /sum to 100/],
    [{ frameErrors: -1 }, 'frameErrors', /whole number from 0/],
    [{ frameErrors: 0.5 }, 'frameErrors', /whole number/],
    [{ frameErrors: 2 ** 60 }, 'frameErrors', /\S/],
  ])('with a tally of %o is refused, naming %s', async (tally, field, accepted) => {
    await refused(path(), shard({}, tally), `shards.0.tally.${field}`, accepted);
  });
  it('beyond what the stopping rule allows is refused', async () => {
    await refused(path(), shard({ index: 10 }), 'shards.0.index', /from 0 to 9/);
  });
  it('with a negative index is refused', async () => {
    await refused(path(), shard({ index: -1 }), 'shards.0.index', /0/);
  });
  it('for a point that is not there is refused, and its good neighbours are not stored', async () => {
    const [good] = shard({}).shards;
    const bad = { ...good, pointId: 'nothing' };
    await refused(path(), { shards: [good, bad] }, 'shards.1.pointId', /point of this run/);
    expect((await client.get(`/runs/${kit.run.id}`)).body.run.frames).toBe(0);
  });
  it('batch of none, or of more than 500, is refused', async () => {
    await refused(path(), { shards: [] }, 'shards', /at least one/);
    await refused(path(), { shards: Array(501).fill(shard({}).shards[0]) }, 'shards', /500/);
  });
});

describe('requirements', () => {
  const put = (body: unknown) => client.call('PUT', `/projects/${kit.projectId}/requirements`, body);
  it('without a target are refused', async () => {
    expect((await put({ payloadBits: 8 })).body.error.fields.targetFer).toMatch(/at least one target/);
  });
  it('with the lengths crossed are refused', async () => {
    const { body } = await put({ targetFer: 0.1, lengthMin: 10, lengthMax: 9 });
    expect(body.error.fields.lengthMax).toMatch(/not below the least/);
  });
});

describe('any request', () => {
  const raw = (init: RequestInit) => client.fetch('/api/v1/projects', { method: 'POST', ...init });
  const json = { 'content-type': 'application/json' };

  it('that is not JSON is told so in JSON', async () => {
    const response = await raw({ headers: json, body: '{"name":' });
    expect([response.status, (await response.json()).error.code]).toEqual([400, 'invalid']);
    const form = await raw({ headers: { origin: server.base }, body: new URLSearchParams({ name: 'x' }) });
    expect([form.status, (await form.json()).error.code]).toEqual([415, 'media-type']);
  });
  it('that is too large is refused without being read', async () => {
    const response = await raw({ headers: json, body: JSON.stringify({ name: 'x'.repeat(2 ** 20) }) });
    expect([response.status, (await response.json()).error.code]).toEqual([413, 'too-large']);
  });
  it('to an unknown address or by a wrong method is told so in JSON', async () => {
    const unknown = await client.get('/nothing/here');
    expect([unknown.status, unknown.body.error.code]).toEqual([404, 'not-found']);
    const wrong = await client.call('DELETE', '/projects');
    expect([wrong.status, wrong.body.error.code, wrong.headers.get('allow')]).toEqual([405, 'method', 'GET, POST']);
  });
  it('for ids that cannot be ours finds nothing', async () => {
    for (const path of ['/projects/1', '/codes/%00', "/runs/'or'1", '/jobs/x']) {
      expect((await client.get(path)).status, path).toBe(404);
    }
  });
});
