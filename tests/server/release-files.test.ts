import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readBlockListText } from '@/core/formats/block-list.ts';
import { readBlockListJson } from '@/core/formats/block-list-json.ts';
import { readGeneratorCirculants } from '@/core/formats/generator-circulants.ts';
import { readGeneratorPolynomial } from '@/core/formats/generator-polynomial.ts';
import { readGeneratorSystematic } from '@/core/formats/generator-systematic.ts';
import { ApiClient, demoClient, demoProject } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { type FakeObjectStore, startObjectStore } from './fake-object-store.ts';

const key = { accessKeyId: 'bench', secretAccessKey: 'a secret of the bench', region: 'us-east-1' };
let store: FakeObjectStore;
let server: RunningServer;
let engineer: ApiClient;
let viewer: ApiClient;
let projectId: string;
let code: { id: string; fingerprint: string; n: number; k: number };
beforeAll(async () => {
  store = await startObjectStore(key);
  server = await startServer({
    S3_BUCKET: 'releases',
    S3_ENDPOINT: store.endpoint,
    S3_ACCESS_KEY_ID: key.accessKeyId,
    S3_SECRET_ACCESS_KEY: key.secretAccessKey,
  });
  [engineer, viewer] = [await demoClient(server.base, 'engineer'), await demoClient(server.base, 'viewer')];
  projectId = await demoProject(engineer, 'Shore archive');
  const { body } = await engineer.get(`/projects/${projectId}/codes`);
  code = body.codes.find((one: { n: number }) => one.n === 273);
}, 300_000);
afterAll(async () => {
  await server.stop();
  await store.stop();
});

const bytesAt = async (path: string) => {
  const response = await viewer.fetch(`/api/v1${path}`);
  expect(response.status, path).toBe(200);
  return new Uint8Array(await response.arrayBuffer());
};

describe('a code’s other files', () => {
  it('are those that it can be given as', async () => {
    const { body } = await viewer.get(`/codes/${code.id}/forms`);
    expect(body.formats).toHaveLength(9);
    expect(body.generators.map(({ id }: { id: string }) => id)).toEqual(['polynomial', 'circulants', 'systematic']);
    expect(body.blocks.map(({ id }: { id: string }) => id)).toEqual(['text', 'json']);
  });

  it('hold its blocks and its generator', async () => {
    for (const list of [
      readBlockListText(await bytesAt(`/codes/${code.id}/blocks?form=text`)),
      readBlockListJson(await bytesAt(`/codes/${code.id}/blocks?form=json`)),
    ]) {
      expect([list.v, list.b]).toEqual([273, 273]);
    }
    const generator = (form: string) => bytesAt(`/codes/${code.id}/generator?form=${form}`);
    expect(readGeneratorPolynomial(await generator('polynomial')).n).toBe(273);
    expect(readGeneratorCirculants(await generator('circulants')).rows[0]!.shifts).toBe(191);
    expect(readGeneratorSystematic(await generator('systematic')).infoPositions).toHaveLength(191);
  });

  it('say in JSON where the matrix is from and what is known of it', async () => {
    const matrix = JSON.parse(new TextDecoder().decode(await bytesAt(`/codes/${code.id}/matrix?format=json`)));
    expect(matrix).toMatchObject({
      fingerprint: code.fingerprint,
      code: { n: 273, k: 191 },
      certificate: { holds: true },
    });
    expect(matrix.properties.every((one: { grade: string }) => one.grade)).toBe(true);
  });
});

describe('test vectors', () => {
  const address = (more: Record<string, string> = {}) =>
    `/codes/${code.id}/vectors?${new URLSearchParams({
      form: 'jsonl',
      seed: 'a',
      count: '300',
      channel: '{"kind":"bsc","p":0.01}',
      decoders: '[{"kind":"gallager-b"},{"kind":"bit-flipping","iterations":5}]',
      ...more,
    })}`;

  it('come frame by frame, the same for the same seed', async () => {
    const text = new TextDecoder().decode(await bytesAt(address()));
    const lines = text.trimEnd().split('\n');
    expect(lines).toHaveLength(301);
    expect(JSON.parse(lines[0]!)).toMatchObject({
      fingerprint: code.fingerprint,
      n: 273,
      k: 191,
      seed: 'a',
      count: 300,
    });
    expect(new TextDecoder().decode(await bytesAt(address()))).toBe(text);
    expect(new TextDecoder().decode(await bytesAt(address({ seed: 'b' })))).not.toBe(text);
    expect(new TextDecoder().decode(await bytesAt(address({ form: 'hex' })))).toMatch(/^# test vectors/);
  });

  it.each([
    [{ count: '0' }, 'count', /1 to 100 000/],
    [{ channel: 'bsc' }, 'channel', /JSON text/],
    [{ channel: '{"kind":"bsc","p":2}' }, 'channel.p', /at most 0.5/],
    [{ decoders: '[]' }, 'decoders', /at least one/],
    [{ decoders: '[{"kind":"peeling"}]' }, 'channel.kind', /bec/],
  ])('asked for with %j are refused by field', async (more, field, words) => {
    const { status, body } = await viewer.get(address(more as Record<string, string>));
    expect(status).toBe(400);
    expect(body.error.fields[field]).toMatch(words);
  });

  it('too many for one file are refused at once, with the limit', async () => {
    const { body } = await viewer.get(`/projects/${projectId}/codes`);
    const long = body.codes.find((one: { n: number }) => one.n === 1023);
    const kinds = ['gallager-b', 'bit-flipping', 'majority-logic', 'gallager-a', 'min-sum', 'bit-flipping-max'];
    const decoders = JSON.stringify(kinds.map((kind) => ({ kind })));
    const asked = await viewer.get(address({ count: '100000', decoders }).replace(code.id, long.id));
    expect([asked.status, asked.body.error]).toEqual([
      422,
      { code: 'limit', message: expect.stringMatching(/268435456 bytes/) },
    ]);
  });

  it('abandoned on the way leave the server free for the next', async () => {
    const leave = new AbortController();
    const response = await viewer.fetch(`/api/v1${address({ count: '100000' })}`, { signal: leave.signal });
    await response.body!.getReader().read();
    leave.abort();
    expect((await bytesAt(address({ count: '3' }))).length).toBeGreaterThan(100);
  });
});

describe('the files of a release', () => {
  let id: string;
  let bundle: { name: string; sizeBytes: number; sha256: string };
  beforeAll(async () => {
    const contents = { formats: ['alist', 'npz'], generators: ['polynomial'], blocks: ['text'] };
    const { status, body } = await engineer.post(`/projects/${projectId}/releases`, { codeId: code.id, contents });
    expect([status, body.error]).toEqual([201, undefined]);
    ({ id, bundle } = body.release);
  }, 60_000);
  const ask = (name: string, headers: Record<string, string> = {}, method = 'GET') =>
    viewer.fetch(`/api/v1/releases/${id}/files/${name}`, { method, headers });

  it('lie in the object store under their digests, and come back whole', async () => {
    const { body } = await viewer.get(`/releases/${id}`);
    for (const { name, sha256, sizeBytes } of [...body.files, bundle]) {
      const response = await ask(name, { 'accept-encoding': 'gzip' });
      const bytes = Buffer.from(await response.arrayBuffer());
      expect([response.status, bytes.length, createHash('sha256').update(bytes).digest('hex')]).toEqual([
        200,
        sizeBytes,
        sha256,
      ]);
      expect(response.headers.get('etag')).toBe(`"${sha256}"`);
      expect(response.headers.get('content-encoding')).toBeNull();
      expect(store.objects.get(`/releases/${sha256.slice(0, 2)}/${sha256}`)!.equals(bytes)).toBe(true);
    }
    expect(body.manifest.fingerprint).toBe(code.fingerprint);
    expect(body.manifest.measurements.length).toBeGreaterThan(0);
    for (const { run, tally, grade } of body.manifest.measurements) {
      expect([run.seed.length > 0, tally.frames > 0, grade]).toEqual([true, true, 'sampled']);
    }
  });

  it('come in ranges, not again, and not beyond their end', async () => {
    const whole = Buffer.from(await (await ask('H.alist')).arrayBuffer());
    const part = await ask('H.alist', { range: 'bytes=100-199' });
    expect([part.status, part.headers.get('content-range')]).toEqual([206, `bytes 100-199/${whole.length}`]);
    expect(Buffer.from(await part.arrayBuffer()).equals(whole.subarray(100, 200))).toBe(true);
    expect((await ask('H.alist', { 'if-none-match': part.headers.get('etag')! })).status).toBe(304);
    expect((await ask('H.alist', { range: `bytes=${whole.length}-` })).status).toBe(416);
    expect((await ask('H.alist', { range: 'bytes=0-9', 'if-range': '"other"' })).status).toBe(200);
    const head = await ask('H.alist', {}, 'HEAD');
    expect([head.status, head.headers.get('content-length'), await head.text()]).toEqual([
      200,
      String(whole.length),
      '',
    ]);
  });

  it('are only those it has, and only for members', async () => {
    expect((await ask('H.mtx')).status).toBe(404);
    expect((await ask('..%2F..%2Fsecret')).status).toBe(404);
    const nobody = new ApiClient(server.base);
    expect((await nobody.fetch(`/api/v1/releases/${id}/files/H.alist`)).status).toBe(401);
  });

  it('come out the same when made again', async () => {
    const { body } = await viewer.post(`/releases/${id}/rebuild`, {});
    expect(body).toEqual({ identical: true, released: bundle.sha256, rebuilt: bundle.sha256 });
  });

  it('are neither made nor ended by a viewer', async () => {
    const contents = { formats: ['alist'] };
    expect((await viewer.post(`/projects/${projectId}/releases`, { codeId: code.id, contents })).status).toBe(403);
    expect((await viewer.post(`/releases/${id}/endings`, { kind: 'withdrawn', reason: 'No.' })).status).toBe(403);
  });

  it('are asked for by fields that are named when wrong', async () => {
    const { status, body } = await engineer.post(`/projects/${projectId}/releases`, {
      codeId: code.id,
      contents: { formats: [] },
    });
    expect([status, body.error.fields]).toEqual([400, { 'contents.formats': 'at least one matrix format' }]);
    const ending = await engineer.post(`/releases/${id}/endings`, { kind: 'withdrawn', reason: '' });
    expect([ending.status, ending.body.error.fields]).toEqual([400, { reason: 'a reason of 3 to 2000 characters' }]);
  });

  it('are not released while the store refuses, and that is said', async () => {
    store.fail(1000);
    const contents = { formats: ['mtx'] };
    const { status, body } = await engineer.post(`/projects/${projectId}/releases`, { codeId: code.id, contents });
    store.fail(0);
    expect([status, body.error.code]).toEqual([503, 'storage']);
    expect((await viewer.get(`/projects/${projectId}/releases`)).body.releases).toHaveLength(1);
  });
});
