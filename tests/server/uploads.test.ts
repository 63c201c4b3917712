import { readdirSync } from 'node:fs';
import { request } from 'node:http';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { writeBlockListText } from '@/core/formats/block-list.ts';
import { exportMatrix, matrixFormats } from '@/core/formats/index.ts';
import { quasiCyclicPlane } from '../models/quasi-cyclic-plane.ts';
import { type ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';

let server: RunningServer;
let client: ApiClient;
let projectId: string;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'engineer');
  projectId = await newProject('Uploads');
}, 300_000);
afterAll(() => server.stop());

const newProject = async (name: string): Promise<string> => (await client.post('/projects', { name })).body.project.id;

async function upload(
  bytes: Uint8Array | string,
  query: Record<string, string> = {},
  {
    as = client,
    into = projectId,
    headers = {},
  }: { as?: ApiClient; into?: string; headers?: Record<string, string> } = {},
) {
  const search = new URLSearchParams({ fileName: 'matrix.txt', ...query });
  const response = await as.fetch(`/api/v1/projects/${into}/uploads?${search}`, {
    method: 'POST',
    headers: { origin: server.base, 'content-type': 'application/octet-stream', ...headers },
    body: bytes as BodyInit,
  });
  return { status: response.status, body: await response.json() };
}

/** The answer to a body whose stated length is all that is sent of it. */
const statusOfStated = (bytes: number) =>
  new Promise<number>((resolve, reject) => {
    const headers = {
      origin: server.base,
      cookie: [...client.cookies].map((pair) => pair.join('=')).join('; '),
      'content-type': 'application/octet-stream',
      'content-length': bytes,
    };
    const address = `${server.base}/api/v1/projects/${projectId}/uploads?fileName=large`;
    const sent = request(address, { method: 'POST', headers }, (response) => {
      resolve(response.statusCode!);
      sent.destroy();
    });
    sent.on('error', reject);
    sent.flushHeaders();
  });

const H = quasiCyclicPlane;

describe('a matrix file', () => {
  it.each(matrixFormats.map(({ id }) => id))(
    'in %s becomes a code with the matrix’s own fingerprint',
    async (format) => {
      const into = await newProject(`Uploads as ${format}`);
      const { status, body } = await upload(exportMatrix(H, format), { checksAre: 'rows', name: 'Ours' }, { into });
      expect([status, body.error?.message]).toEqual([201, undefined]);
      expect(body.code).toMatchObject({
        name: 'Ours',
        n: H.cols,
        fingerprint: await fingerprint(H),
        certificate: null,
      });
      expect(body.code.design).toMatchObject({ family: 'uploaded', params: { format, fileName: 'matrix.txt' } });
      expect(body.code.designTitle).toContain('Uploaded matrix');
    },
  );

  it('is a code like any other: listed, exported, run', async () => {
    const { body } = await upload(exportMatrix(H, 'alist'), { checksAre: 'columns' });
    const { id, derivation } = body.code;
    expect(derivation).toEqual({ kind: 'matrix', checksAre: 'columns' });
    expect((await client.get(`/projects/${projectId}/codes`)).body.codes[0].id).toBe(id);
    expect((await client.fetch(`/api/v1/codes/${id}/matrix?format=mtx`)).status).toBe(200);
    expect((await client.get(`/codes/${id}/manifest`)).body.design.params.sha256).toMatch(/^[0-9a-f]{64}$/);
    expect((await client.fetch(`/api/v1/codes/${id}/blocks?form=text`)).status).toBe(400);
    const points = [{ codeId: id, channel: { kind: 'bsc', p: 0.02 }, decoder: { kind: 'gallager-b' } }];
    const stopping = { frameErrors: 10, maxFrames: 1000 };
    const run = { name: 'of an upload', seed: 's', framesPerShard: 100, stopping, place: 'browser', points };
    expect((await client.post(`/projects/${projectId}/runs`, run)).status).toBe(201);
  });

  it('that is there already is named, and not kept twice', async () => {
    const into = await newProject('Twice');
    const first = await upload(exportMatrix(H, 'mtx'), { checksAre: 'rows' }, { into });
    const again = await upload(exportMatrix(H, 'npz'), { checksAre: 'rows' }, { into });
    expect([again.status, again.body.error.existing]).toEqual([409, first.body.code.id]);
  });
});

describe('a file of blocks', () => {
  it('is verified and kept with its certificate', async () => {
    const bytes = writeBlockListText(buildDesign({ family: 'witt', params: { v: 12 } }));
    const { status, body } = await upload(bytes, { checks: 'points', fileName: 'blocks.txt' });
    expect(status).toBe(201);
    expect(body.code).toMatchObject({ n: 132, name: 'blocks.txt', certificate: { holds: true, t: 5, lambda: 1 } });
    expect(body.code.designTitle).toBe('Uploaded 5-(12, 6, 1) design');
  });
});

describe('a file that cannot be taken', () => {
  it.each([
    ['names line and column', 'alist', '4 2\n2 3\n1 2 1 1\n2 3\n0\n1 2\n2\n2\n1 2\n2 3 4\n', /line 5.*counts? from 1/],
    ['of no known format lists the formats', undefined, '<html></html>', /alist, mtx/],
    ['with NUL bytes', 'csv', 'row,column\n0,\0\n', /line 2/],
    [
      'whose sizes pass the limits',
      'mtx',
      '%%MatrixMarket matrix coordinate pattern general\n9999999 9 1\n1 1\n',
      /1000000/,
    ],
  ])('%s', async (_, format, text, message) => {
    const { status, body } = await upload(text, format ? { format } : {});
    expect([400, 422]).toContain(status);
    expect(body.error.message).toMatch(message);
  });

  it('is asked, by name, for what it does not tell', async () => {
    const square = await upload(exportMatrix(H, 'mtx'));
    expect([square.status, Object.keys(square.body.error.fields)]).toEqual([400, ['checksAre']]);
    const blocks = await upload('0 1 3\n1 2 4\n');
    expect([blocks.status, Object.keys(blocks.body.error.fields)]).toEqual([400, ['checks']]);
  });

  it('states its kind, is no more than 200 MB and is not empty', async () => {
    expect((await upload('x', {}, { headers: { 'content-type': 'text/plain' } })).status).toBe(415);
    expect((await upload('')).status).toBe(400);
    expect((await upload('x', { format: 'docx' })).body.error.fields.format).toContain('alist');
    expect(await statusOfStated(200_000_001)).toBe(413);
  });

  it('leaves nothing behind on the disk', () => {
    expect(readdirSync(join(server.dataDir, 'incoming'))).toEqual([]);
  });
});

describe('rights', () => {
  it('a viewer and a stranger may not upload', async () => {
    const demo = (await client.get('/projects')).body.projects.find(
      (p: { name: string }) => p.name === 'Shore archive',
    ).id;
    const viewer = await demoClient(server.base, 'viewer');
    expect((await upload('x', {}, { as: viewer, into: demo })).status).toBe(403);
    expect((await upload('x', {}, { as: viewer })).status).toBe(404);
  });
});
