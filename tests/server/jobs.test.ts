import { afterAll, afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { nowText } from '@/server/context.ts';
import { newId } from '@/server/ids.ts';
import { type BuildPool, createBuildPool } from '@/server/jobs/build-pool.ts';
import { insertJob, jobById } from '@/server/repositories/jobs.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { getJob } from '@/server/use-cases/jobs/get-job.ts';
import { redoInterruptedJobs } from '@/server/use-cases/jobs/redo-interrupted-jobs.ts';
import { furnishedScratch } from './scratch-database.ts';

const pool = createBuildPool();
afterAll(() => pool.close());

/** The same builds, told of only after a while. */
const slow = (ms: number): BuildPool => ({
  build: async (request) => {
    const answer = await pool.build(request);
    await new Promise((resolve) => setTimeout(resolve, ms));
    return answer;
  },
  close: () => pool.close(),
});

const plane = (q: number) => ({
  design: { family: 'projective-plane', params: { q } },
  derivation: { kind: 'ldpc' as const, checks: 'blocks' as const },
});

let at: Awaited<ReturnType<typeof furnishedScratch>>;
beforeEach(async () => {
  at = await furnishedScratch();
});
afterEach(async () => {
  vi.restoreAllMocks();
  await at.db.destroy();
});

const ended = (jobId: string) =>
  vi.waitFor(
    async () => {
      const job = await getJob(at.context, jobId);
      expect(['done', 'failed']).toContain(job.state);
      return job;
    },
    { timeout: 20_000, interval: 50 },
  );

describe('keeping a code', () => {
  it('that is built within a second answers with the code', async () => {
    await pool.build(plane(2));
    const made = await createCode(at.context, pool, at.projectId, plane(4));
    expect(made).toMatchObject({ code: { n: 21, k: 11, rows: 21, ones: 105 } });
  });

  it('that takes longer answers with a job, which ends with the code', async () => {
    const made = await createCode(at.context, slow(1500), at.projectId, plane(4));
    if (!('job' in made)) throw new Error('a code at once');
    expect(made.job).toMatchObject({ state: 'working', codeId: null });
    const job = await ended(made.job.id);
    expect(job).toMatchObject({ state: 'done', error: null, codeId: expect.stringMatching(/^[0-9a-z]{26}$/) });
    expect(await at.db('codes').where({ id: job.codeId, project_id: at.projectId })).toHaveLength(1);
  });

  it('that is refused after a second ends its job with the reason', async () => {
    const made = await createCode(at.context, slow(1500), at.projectId, plane(6));
    if (!('job' in made)) throw new Error('no job');
    expect((await ended(made.job.id)).error).toMatchObject({ code: 'infeasible', message: expect.stringMatching(/6/) });
    expect(await at.db('codes')).toEqual([]);
  });
});

describe('a job that a restart interrupted', () => {
  const interrupted = async () => {
    const id = newId();
    const { projectId, context } = at;
    await insertJob(at.db, { id, projectId, request: plane(4), createdBy: context.caller.id, createdAt: nowText() });
    return id;
  };

  it('is taken up at the next start', async () => {
    const id = await interrupted();
    await redoInterruptedJobs(at.db, pool);
    expect(await ended(id)).toMatchObject({ state: 'done' });
    expect((await jobById(at.db, id))?.attempts).toBe(2);
  });

  it('a second time is given up, and says so', async () => {
    const id = await interrupted();
    await at.db('jobs').update({ attempts: 2 });
    await redoInterruptedJobs(at.db, pool);
    const job = await getJob(at.context, id);
    expect(job.error).toMatchObject({ code: 'interrupted', message: expect.stringMatching(/start it again/) });
  });
});

describe('the pool of build workers', () => {
  it('refuses when too much waits', async () => {
    const small = createBuildPool({ workers: 1, waiting: 1 });
    const first = small.build(plane(2));
    const second = small.build(plane(3));
    await expect(small.build(plane(4))).rejects.toMatchObject({ code: 'busy' });
    expect([(await first).ok, (await second).ok]).toEqual([true, true]);
    await small.close();
  });

  it('ends a build that takes too long, and goes on with the next', async () => {
    const hasty = createBuildPool({ workers: 1, timeoutMs: 1 });
    const answer = await hasty.build(plane(64));
    expect(answer).toMatchObject({ ok: false, failure: { code: 'limit' } });
    await hasty.close();
  });
});
