import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { errorResponse } from '@/server/http/error-response.ts';
import { keepCode } from '@/server/use-cases/codes/keep-code.ts';
import { createRun } from '@/server/use-cases/runs/create-run.ts';
import { getRun } from '@/server/use-cases/runs/get-run.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { buildDemoCode } from '../../db/seeds/demo/build.ts';
import { tallyWith } from './run-kit.ts';
import { furnishedScratch } from './scratch-database.ts';

const plane4 = {
  key: 'pg4',
  name: 'PG(2,4)',
  design: { family: 'projective-plane', params: { q: 4 } },
  derivation: { kind: 'ldpc', checks: 'blocks' },
} as const;

type Furnished = Awaited<ReturnType<typeof furnishedScratch>>;
let at: Furnished & { runId: string; pointId: string };

beforeEach(async () => {
  const scratch = await furnishedScratch();
  const { context, projectId } = scratch;
  const built = await buildDemoCode(plane4);
  const { design, derivation } = plane4;
  const keeping = { projectId, userId: context.caller.id, request: { design, derivation } };
  const codeId = await keepCode(context.db, built, keeping);
  const run = await createRun(context, projectId, {
    name: 'x',
    seed: 'x',
    framesPerShard: 100,
    stopping: { frameErrors: 1e6, maxFrames: 1e8 },
    place: 'browser',
    points: [{ codeId, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'majority-logic' } }],
  });
  at = { ...scratch, runId: run.id, pointId: run.points[0]!.id };
  // What cannot be stored is logged as well.
  vi.spyOn(console, 'error').mockImplementation(() => {});
});
afterEach(async () => {
  vi.restoreAllMocks();
  await at.db.destroy();
});

const batch = (first: number, size = 500) => ({
  shards: Array.from({ length: size }, (_, i) => ({ pointId: at.pointId, index: first + i, tally: tallyWith(2, 21) })),
});

async function answerTo(first: number) {
  try {
    return await postShards(at.context, at.runId, batch(first));
  } catch (error) {
    const response = errorResponse(error, 'a test');
    return { status: response.status, body: await response.json(), retryAfter: response.headers.get('retry-after') };
  }
}

const framesStored = async () => (await getRun(at.context, at.runId)).run.frames;
const framesInShards = async () => Number((await at.db('shards').sum({ frames: 'frames' }).first())?.frames ?? 0);

const refusal = {
  status: 503,
  retryAfter: '5',
  body: { error: { code: 'storage', message: expect.stringMatching(/cannot be read or written.*try again/) } },
};

describe('a database that cannot be written', () => {
  it('because the disk is full refuses a batch whole, keeps what it acknowledged, and goes on when there is room', async () => {
    expect(await answerTo(0)).toMatchObject({ accepted: 500 });
    const [{ page_count: pages }] = await at.db.raw('PRAGMA page_count');
    await at.db.raw(`PRAGMA max_page_count = ${pages + 3}`);
    let first = 500;
    let answer: unknown;
    for (; first < 20_000; first += 500) {
      answer = await answerTo(first);
      if ((answer as { status?: number }).status) break;
    }
    expect(answer).toEqual(refusal);
    expect(await framesStored()).toBe(first * 100);
    expect(await framesInShards()).toBe(first * 100);
    await at.db.raw('PRAGMA max_page_count = 1000000');
    expect(await answerTo(first)).toMatchObject({ accepted: 500 });
    expect(await framesInShards()).toBe((first + 500) * 100);
  });

  it('because it is read-only says so, and goes on when it is not', async () => {
    await at.db.raw('PRAGMA query_only = ON');
    expect(await answerTo(0)).toEqual(refusal);
    expect(await framesStored()).toBe(0);
    await at.db.raw('PRAGMA query_only = OFF');
    expect(await answerTo(0)).toMatchObject({ accepted: 500 });
  });
});
