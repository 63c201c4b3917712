import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { importMatrix } from '@/core/formats/index.ts';
import { packMatrix, unpackMatrix } from '@/server/files/matrix-blob.ts';
import { buildDemoCode } from '../../db/seeds/demo/build.ts';
import { demoProjects } from '../../db/seeds/demo/scenario.ts';
import { type ApiClient, demoClient, demoProject } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';

let server: RunningServer;
let client: ApiClient;
let code: { id: string; fingerprint: string; n: number; k: number };
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'viewer');
  const { body } = await client.get(`/projects/${await demoProject(client, 'Shore archive')}/codes`);
  code = body.codes.find((one: { n: number }) => one.n === 273);
}, 300_000);
afterAll(() => server.stop());

const file = async (format: string) => {
  const response = await client.fetch(`/api/v1/codes/${code.id}/matrix?format=${format}`);
  expect(response.status).toBe(200);
  return { response, bytes: new Uint8Array(await response.arrayBuffer()) };
};

describe('a matrix file', () => {
  it.each(['alist', 'mtx', 'csv', 'json', 'npz', 'npy', 'mat', 'qc'])(
    'as %s holds the very matrix of the code',
    async (format) => {
      const { bytes } = await file(format);
      expect(await fingerprint(importMatrix(bytes, format))).toBe(code.fingerprint);
    },
  );

  it('is offered for keeping under a name that tells design, length and fingerprint', async () => {
    const { response } = await file('alist');
    expect(response.headers.get('content-disposition')).toMatch(
      new RegExp(`^attachment; filename="[a-z0-9-]+-n273-k191-${code.fingerprint.slice(0, 8)}\\.alist"$`),
    );
  });

  it('has the digest that the manifest states', async () => {
    const { body } = await client.get(`/codes/${code.id}/manifest`);
    expect(body).toMatchObject({ fingerprint: code.fingerprint, parameters: { n: 273, k: 191 } });
    expect(body.caution).toMatch(/not for a device/);
    for (const { format, sha256, sizeBytes } of body.files) {
      const { bytes } = await file(format);
      expect(bytes.length).toBe(sizeBytes);
      expect(createHash('sha256').update(bytes).digest('hex')).toBe(sha256);
    }
    expect(body.files.map((entry: { format: string }) => entry.format)).toEqual(['alist', 'mtx']);
  });
});

describe('the stored blob of a matrix', () => {
  it('gives back the matrix, and its inflated bytes are those of the fingerprint', async () => {
    for (const demoCode of demoProjects.flatMap((project) => project.codes)) {
      const { H, fingerprint: print } = await buildDemoCode(demoCode);
      expect(await fingerprint(unpackMatrix(packMatrix(H)))).toBe(print);
    }
  });
});
