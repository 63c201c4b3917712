import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Code } from '@/api/codes.ts';
import { nowText } from '@/server/context.ts';
import { newId } from '@/server/ids.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createExaminePool } from '@/server/jobs/examine-pool.ts';
import { insertMembership } from '@/server/repositories/memberships.ts';
import { insertUser } from '@/server/repositories/users.ts';
import { cancelAnalysis } from '@/server/use-cases/analyses/cancel-analysis.ts';
import { failInterruptedAnalyses } from '@/server/use-cases/analyses/fail-interrupted-analyses.ts';
import { getAnalysis, getAnalysisList, listAnalyses } from '@/server/use-cases/analyses/get-analysis.ts';
import { startAnalysis } from '@/server/use-cases/analyses/start-analysis.ts';
import { getCode } from '@/server/use-cases/codes/get-code.ts';
import { keepCode } from '@/server/use-cases/codes/keep-code.ts';
import { furnishedScratch } from './scratch-database.ts';

const build = createBuildPool();
const pool = createExaminePool();
let at: Awaited<ReturnType<typeof furnishedScratch>>;

const plane = (q: number, transforms: { kind: string }[] = []) => ({
  design: { family: 'projective-plane', params: { q } },
  derivation: { kind: 'ldpc' as const, checks: 'blocks' as const, ...(transforms.length > 0 && { transforms }) },
});

async function keep(request: ReturnType<typeof plane>): Promise<Code> {
  const answer = await build.build(request);
  if (!answer.ok) throw new Error(answer.failure.message);
  const { projectId, context } = at;
  const id = await keepCode(at.db, answer.built, { projectId, userId: context.caller.id, request });
  return getCode(context, id);
}

const ended = (id: string) =>
  vi.waitFor(
    async () => {
      const analysis = await getAnalysis(at.context, id);
      expect(analysis.state).not.toBe('working');
      return analysis;
    },
    { timeout: 60_000, interval: 50 },
  );

const ask = async (code: Code, question: Parameters<typeof startAnalysis>[3]['question'], seconds = 1) =>
  ended((await startAnalysis(at.context, pool, code.id, { question, seconds })).id);

const line = async (code: Code, key: string) =>
  (await getCode(at.context, code.id)).properties.find((one) => one.key === key);

beforeAll(async () => {
  at = await furnishedScratch();
}, 60_000);
afterAll(async () => {
  await Promise.all([build.close(), pool.close()]);
  await at.db.destroy();
});

describe('an analysis on the server', () => {
  it('adds what it told to the code, with grade, method and time, and gives its list', async () => {
    const code = await keep(plane(4));
    const analysis = await ask(code, 'stoppingSets');
    expect(analysis).toMatchObject({ state: 'done', listName: 'stopping-sets.csv' });
    expect(analysis.improved).toContain('stopping-size');
    // The smallest stopping sets of a plane of even order q are its hyperovals, of q + 2 points (Kashyap and Vardy 2003).
    expect(await line(code, 'stopping-size')).toMatchObject({ text: '6', grade: 'computed' });
    expect((await line(code, 'stopping-size'))?.elapsedMs).toBeGreaterThan(0);
    // The plane of order 4 has 168 hyperovals (Hirschfeld 1998, ch. 14).
    expect(await line(code, 'stopping-count')).toMatchObject({ text: '168' });
    const { bytes } = await getAnalysisList(at.context, analysis.id);
    expect(new TextDecoder().decode(bytes).split('\n')[0]).toBe('size,bits');
  });

  it('that tells nothing new leaves the code as it was', async () => {
    const code = await keep(plane(2));
    const first = await ask(code, 'cycles');
    const before = (await getCode(at.context, code.id)).properties;
    const again = await ask(code, 'cycles');
    expect(again).toMatchObject({ state: 'done', improved: [], lines: [] });
    expect((await getCode(at.context, code.id)).properties).toEqual(before);
    expect((await listAnalyses(at.context, code.id)).map(({ id }) => id)).toEqual([again.id, first.id]);
  });

  it('never takes a proof off the sheet', async () => {
    const code = await keep(plane(8));
    expect(await line(code, 'distance')).toMatchObject({ text: '10', grade: 'proved' });
    await ask(code, 'distance');
    expect(await line(code, 'distance')).toMatchObject({ text: '10', grade: 'proved' });
  });

  it('that does not fit the code is refused with what is asked for', async () => {
    const code = await keep(plane(16));
    const asked = startAnalysis(at.context, pool, code.id, { question: 'weights', seconds: 1 });
    await expect(asked).rejects.toMatchObject({ code: 'param', message: expect.stringContaining('up to 26') });
  });
});

describe('a long analysis', () => {
  let code: Code;
  beforeAll(async () => {
    code = await keep(plane(17));
  });
  afterEach(async () => {
    for (const { id, state } of await listAnalyses(at.context, code.id))
      if (state === 'working') await cancelAnalysis(at.context, id);
  });

  it('goes on by itself, and is ended at once by a cancel', async () => {
    const analysis = await startAnalysis(at.context, pool, code.id, { question: 'stoppingSets', seconds: 600 });
    expect(analysis.state).toBe('working');
    const twice = startAnalysis(at.context, pool, code.id, { question: 'stoppingSets', seconds: 1 });
    await expect(twice).rejects.toMatchObject({ code: 'conflict' });
    const from = performance.now();
    await cancelAnalysis(at.context, analysis.id);
    expect(performance.now() - from).toBeLessThan(1000);
    expect(await getAnalysis(at.context, analysis.id)).toMatchObject({ state: 'cancelled', share: null });
  });

  it('that a restart cut off is failed, and said to be', async () => {
    const id = newId();
    const row = { id, code_id: code.id, question: 'distance', seconds: 60, state: 'working' };
    await at.db('analyses').insert({ ...row, created_by: at.context.caller.id, created_at: nowText() });
    await failInterruptedAnalyses(at.db);
    expect(await getAnalysis(at.context, id)).toMatchObject({ state: 'failed', error: { code: 'interrupted' } });
  });
});

describe('rights', () => {
  it('let a viewer read analyses and not start or end one; to outsiders there are none', async () => {
    const code = await keep(plane(3));
    const analysis = await ask(code, 'cycles');
    const someone = async (email: string) => {
      const caller = { id: newId(), email, name: email, role: 'member' as const };
      await insertUser(at.db, { ...caller, passwordHash: null, isDemo: false, createdAt: nowText() });
      return { db: at.db, caller };
    };
    const viewer = await someone('viewer@b.test');
    await insertMembership(at.db, {
      projectId: at.projectId,
      userId: viewer.caller.id,
      role: 'viewer',
      createdAt: nowText(),
    });
    expect(await getAnalysis(viewer, analysis.id)).toMatchObject({ id: analysis.id });
    await expect(cancelAnalysis(viewer, analysis.id)).rejects.toMatchObject({ code: 'forbidden' });
    const starting = startAnalysis(viewer, pool, code.id, { question: 'distance', seconds: 1 });
    await expect(starting).rejects.toMatchObject({ code: 'forbidden' });
    const outsider = await someone('outsider@b.test');
    await expect(getAnalysis(outsider, analysis.id)).rejects.toMatchObject({ code: 'not-found' });
    await expect(listAnalyses(outsider, code.id)).rejects.toMatchObject({ code: 'not-found' });
  });
});
