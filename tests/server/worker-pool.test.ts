import { setTimeout as delay } from 'node:timers/promises';
import type { FilesRequest } from '@workers/files/api.ts';
import { afterEach, describe, expect, it } from 'vitest';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { createFilesPool, type FilesPool } from '@/server/jobs/files-pool.ts';
import { workerStream } from '@/server/jobs/worker-stream.ts';

const { H } = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 4 } }), { checks: 'blocks' });
const vectors = (count: number): FilesRequest => ({
  kind: 'vectors',
  H,
  request: { channel: { kind: 'bsc', p: 0.05 }, decoders: [{ kind: 'gallager-b' }], seed: 's', count },
  form: 'jsonl',
  head: { fingerprint: '', title: '' },
});
const polynomial = { kind: 'generator', H, form: 'polynomial' } as const;

let pool: FilesPool;
afterEach(() => pool.close());

const never = () => new AbortController().signal;
const text = async (stream: ReadableStream<Uint8Array>) => new Response(stream).text();

describe('a pool of workers', () => {
  it('ends the work that was given up, and goes on with the next', async () => {
    pool = createFilesPool();
    const leave = new AbortController();
    const given = pool.run(vectors(100_000), { signal: leave.signal, onPart: () => leave.abort(new Error('gone')) });
    const next = pool.run(polynomial);
    await expect(given).rejects.toThrow('gone');
    expect(await next).toEqual({ ok: true });
  });

  it('drops what was given up while it waited', async () => {
    pool = createFilesPool();
    const first = pool.run(vectors(2000));
    const leave = new AbortController();
    const waiting = pool.run(vectors(100_000), { signal: leave.signal });
    leave.abort(new Error('gone'));
    await expect(waiting).rejects.toThrow('gone');
    expect(await first).toEqual({ ok: true });
    await expect(pool.run(polynomial, { signal: leave.signal })).rejects.toThrow('gone');
  });

  it('gives no work to a worker that is on its way out', async () => {
    pool = createFilesPool({ idleMs: 5 });
    for (let i = 0; i < 6; i++) {
      expect(await pool.run(polynomial)).toEqual({ ok: true });
      await delay(i);
    }
  });

  it('refuses what is too much to wait for', async () => {
    pool = createFilesPool({ waiting: 1 });
    const all = [pool.run(vectors(500)), pool.run(vectors(500))];
    await expect(pool.run(polynomial)).rejects.toMatchObject({ code: 'busy' });
    expect(await Promise.all(all)).toEqual([{ ok: true }, { ok: true }]);
  });
});

describe('the stream of a worker’s file', () => {
  it('holds the whole file', async () => {
    pool = createFilesPool();
    const lines = (await text(await workerStream(pool, vectors(3000), never()))).trimEnd().split('\n');
    expect([lines.length, JSON.parse(lines.at(-1)!).frame]).toEqual([3001, 2999]);
  });

  it('does not begin when the engine refuses', async () => {
    pool = createFilesPool();
    await expect(workerStream(pool, vectors(0), never())).rejects.toMatchObject({
      code: 'param',
      detail: { fields: { count: expect.any(String) } },
    });
  });

  it('ends the worker when its reader goes away', async () => {
    pool = createFilesPool();
    const stream = await workerStream(pool, vectors(100_000), never());
    const reader = stream.getReader();
    await reader.read();
    await reader.cancel();
    expect(await text(await workerStream(pool, polynomial, never()))).toContain('degree=');
  });
});
