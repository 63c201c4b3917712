import { createHash } from 'node:crypto';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { NewComment } from '@/api/sign-offs.ts';
import { runShard } from '@/core/simulation/shard.ts';
import { type Context, nowText } from '@/server/context.ts';
import { diskStorage } from '@/server/files/disk-storage.ts';
import { newId } from '@/server/ids.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createFilesPool } from '@/server/jobs/files-pool.ts';
import { codeById, matrixOf } from '@/server/repositories/codes.ts';
import { insertMembership } from '@/server/repositories/memberships.ts';
import { insertUser } from '@/server/repositories/users.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { deleteCode } from '@/server/use-cases/codes/delete-code.ts';
import { createMeasurement } from '@/server/use-cases/measurements/create-measurement.ts';
import { listNotices } from '@/server/use-cases/notices/list-notices.ts';
import { createRelease } from '@/server/use-cases/releases/create-release.ts';
import { getRelease, getReleaseFile } from '@/server/use-cases/releases/get-release.ts';
import { rebuildRelease } from '@/server/use-cases/releases/rebuild-release.ts';
import { putRequirements } from '@/server/use-cases/requirements/put-requirements.ts';
import { createRun } from '@/server/use-cases/runs/create-run.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { askSignOff } from '@/server/use-cases/sign-offs/ask-sign-off.ts';
import { commentSignOff } from '@/server/use-cases/sign-offs/comment-sign-off.ts';
import { decideSignOff } from '@/server/use-cases/sign-offs/decide-sign-off.ts';
import { getSignOff } from '@/server/use-cases/sign-offs/get-sign-off.ts';
import { listSignOffs } from '@/server/use-cases/sign-offs/list-sign-offs.ts';
import { scratchDir } from './built-server.ts';
import { furnishedScratch } from './scratch-database.ts';

const builds = createBuildPool();
const pool = createFilesPool();
const plane = {
  design: { family: 'projective-plane', params: { q: 4 } },
  derivation: { kind: 'ldpc' as const, checks: 'blocks' as const },
};
// Starts the worker, so that a code is built within the second that a request waits.
beforeAll(() => builds.build(plane));
afterAll(() => Promise.all([builds.close(), pool.close()]));

let at: Awaited<ReturnType<typeof furnishedScratch>>;
let codeId: string;
let engineer: Context;
let reviewer: Context;
beforeEach(async () => {
  at = await furnishedScratch();
  [engineer, reviewer] = [await memberAs('engineer'), await memberAs('reviewer')];
  await putRequirements(at.context, at.projectId, { targetFer: 0.2, channel: { kind: 'bsc', p: 0.04 }, lengthMax: 30 });
  const made = await createCode(at.context, builds, at.projectId, plane);
  if (!('code' in made)) throw new Error('a job');
  codeId = made.code.id;
});
afterEach(() => at.db.destroy());

async function memberAs(role: 'engineer' | 'reviewer' | 'viewer'): Promise<Context> {
  const caller = { id: newId(), email: `${newId()}@b.test`, name: role, role: 'member' as const };
  await insertUser(at.db, { ...caller, passwordHash: null, isDemo: false, createdAt: nowText() });
  await insertMembership(at.db, { projectId: at.projectId, userId: caller.id, role, createdAt: nowText() });
  return { db: at.db, caller };
}

/** A run of two points, measured by this engine, one shard each; `spoil` changes what is handed in. */
async function measure(spoil = 0): Promise<void> {
  const points = [0.04, 0.03].map((p) => ({
    ...{ codeId, channel: { kind: 'bsc' as const, p }, decoder: { kind: 'gallager-b' as const } },
  }));
  const stated = {
    name: 'Sweep',
    seed: 'sweep',
    framesPerShard: 4000,
    stopping: { frameErrors: 1e6, maxFrames: 4000 },
  };
  const run = await createRun(at.context, at.projectId, { ...stated, place: 'browser', points });
  const H = (await matrixOf(at.db, codeId))!;
  for (const { id, channel, decoder } of run.points) {
    const tally = await runShard({ H, channel, decoder, seed: 'sweep', framesPerShard: 4000 }, 0);
    const changed = { ...tally, undetected: tally.undetected - spoil };
    const receipt = await postShards(at.context, run.id, { shards: [{ pointId: id, index: 0, tally: changed }] });
    expect(receipt.accepted).toBe(1);
  }
}

const ask = () => askSignOff(engineer, pool, at.projectId, { codeId, note: 'Please look.' });
const checksOf = async (id: string) =>
  Object.fromEntries((await getSignOff(reviewer, id)).checks.map(({ check, outcome }) => [check, outcome]));

describe('a sign-off', () => {
  it('is about a snapshot whose SHA-256 is its digest, whatever becomes of the project', async () => {
    await measure();
    const { id, digest, state } = await ask();
    await putRequirements(at.context, at.projectId, { targetFer: 1e-9 });
    const { snapshot, verdicts } = await getSignOff(reviewer, id);
    expect([state, createHash('sha256').update(snapshot).digest('hex')]).toEqual(['open', digest]);
    expect(JSON.parse(snapshot)).toMatchObject({
      requirements: { stated: { targetFer: 0.2 } },
      measurements: [{ run: { seed: 'sweep' } }, { run: { seed: 'sweep' } }],
    });
    expect(verdicts.map(({ requirement, outcome }) => [requirement, outcome])).toEqual([
      ['greatest length', 'met'],
      ['target FER', 'met'],
    ]);
  });

  it('has its evidence checked, and a sample of its shards computed again', async () => {
    await measure();
    expect(await checksOf((await ask()).id)).toEqual({
      'the design is proved from its blocks': 'passed',
      'every requirement is met': 'passed',
      'every measured point has 100 frame errors, or none': 'passed',
      'the floor is looked for beyond the required channel': 'passed',
      'a sample of the shards, computed again, agrees': 'passed',
    });
  });

  it('finds a shard that was handed in wrong', async () => {
    await measure(1);
    const checks = await checksOf((await ask()).id);
    expect(checks['a sample of the shards, computed again, agrees']).toBe('failed');
  });

  it('counts weight strata at the required p, with the radius that is proved', async () => {
    await putRequirements(at.context, at.projectId, { targetFer: 1e-8, channel: { kind: 'bsc', p: 1e-4 } });
    const channel = { kind: 'stratum' as const, weight: 3 };
    const decoder = { kind: 'majority-logic' as const };
    const run = await createRun(at.context, at.projectId, {
      ...{ name: 'Weights', seed: 'weights', framesPerShard: 4000, place: 'browser' },
      stopping: { frameErrors: 1e6, maxFrames: 4000 },
      points: [{ codeId, channel, decoder }],
    });
    const H = (await matrixOf(at.db, codeId))!;
    const tally = await runShard({ H, channel, decoder, seed: 'weights', framesPerShard: 4000 }, 0);
    await postShards(at.context, run.id, { shards: [{ pointId: run.points[0]!.id, index: 0, tally }] });
    const { id } = await ask();
    const { verdicts, snapshot } = await getSignOff(reviewer, id);
    expect(verdicts).toMatchObject([{ requirement: 'target FER', outcome: 'met', grade: 'bounded' }]);
    expect(verdicts[0]!.method).toMatch(/weight strata of “Weights” with majority-logic: weights to 2 proved/);
    // 3 errors or more among 21 bits at p = 10⁻⁴ come 1330 · 10⁻¹² times.
    const [{ limits }] = JSON.parse(snapshot).strata;
    expect(limits[0].fer.upper).toBeLessThan(1.34e-9);
    expect(await checksOf(id)).toMatchObject({
      'every requirement is met': 'passed',
      'every measured point has 100 frame errors, or none': 'passed',
      'the floor is looked for beyond the required channel': 'passed',
      'a sample of the shards, computed again, agrees': 'passed',
    });
  });

  it('counts data measured elsewhere on a code of its size at the required p, and there alone', async () => {
    await putRequirements(at.context, at.projectId, { targetFer: 1e-8, channel: { kind: 'bsc', p: 1e-4 } });
    const { n, k } = (await codeById(at.db, codeId))!;
    const points = [{ p: 1e-4, frames: 1e9, frameErrors: 0, bitErrors: 0 }];
    const measured = { name: 'Bench B', fileName: 'b.csv', n, k, points };
    await createMeasurement(at.context, at.projectId, { ...measured, n: n + 1 });
    await createMeasurement(at.context, at.projectId, { ...measured, points: [{ ...points[0]!, p: 2e-4 }] });
    const before = await getSignOff(reviewer, (await ask()).id);
    expect(before.verdicts[0]).toMatchObject({ outcome: 'undecided', grade: 'bounded' });
    await createMeasurement(at.context, at.projectId, measured);
    const after = await getSignOff(reviewer, (await ask()).id);
    expect(after.verdicts[0]).toMatchObject({ outcome: 'met', grade: 'sampled' });
    expect(after.verdicts[0]!.method).toMatch(/“Bench B” \(b\.csv\), whose decoder is not stated: 0 frame errors/);
    expect(JSON.parse(after.snapshot).measuredData).toHaveLength(2);
  });

  it('says of a code that nobody measured what is missing', async () => {
    const checks = await checksOf((await ask()).id);
    expect(Object.values(checks)).toEqual(['passed', 'failed', 'failed', 'failed', 'failed']);
  });

  it('is told to those who decide, and its decision to the one who asked', async () => {
    const { id } = await ask();
    expect((await listNotices(reviewer, {})).notices[0]).toMatchObject({ kind: 'sign-off-asked' });
    expect((await listNotices(engineer, {})).notices).toEqual([]);
    await decideSignOff(reviewer, id, { outcome: 'returned', reason: 'Measure it first.' });
    const [told] = (await listNotices(engineer, {})).notices;
    expect(told).toMatchObject({ kind: 'sign-off-decided', text: 'reviewer: Measure it first.' });
  });

  it('takes comments on the whole, a property or a point, for good, which those concerned are told of', async () => {
    await measure();
    const { id } = await ask();
    const { snapshot } = await getSignOff(reviewer, id);
    const { measurements } = JSON.parse(snapshot);
    const say = (who: Context, about: NewComment['about'], text: string) => commentSignOff(who, id, { about, text });
    const { point } = measurements[0];
    await say(reviewer, { kind: 'point', point }, 'Why so few frames?');
    await say(engineer, { kind: 'property', key: 'girth' }, 'The girth is what counts.');
    await say(engineer, { kind: 'whole' }, 'Ready.');
    expect((await getSignOff(engineer, id)).comments).toMatchObject([
      { about: { kind: 'point', point }, text: 'Why so few frames?', by: 'reviewer' },
      { about: { kind: 'property', key: 'girth' }, by: 'engineer' },
      { about: { kind: 'whole' }, text: 'Ready.', by: 'engineer' },
    ]);
    const told = (await listNotices(engineer, {})).notices;
    expect(told).toMatchObject([{ kind: 'sign-off-comment', text: 'Why so few frames?' }]);
    expect((await listNotices(reviewer, {})).notices.map(({ kind }) => kind)).toEqual([
      'sign-off-comment',
      'sign-off-comment',
      'sign-off-asked',
    ]);
    await expect(say(engineer, { kind: 'property', key: 'beauty' }, 'x')).rejects.toMatchObject({
      detail: { fields: { 'about.key': expect.stringContaining('girth') } },
    });
    await expect(say(engineer, { kind: 'point', point: id }, 'x')).rejects.toMatchObject({ code: 'invalid' });
    await expect(say(await memberAs('viewer'), { kind: 'whole' }, 'x')).rejects.toMatchObject({ code: 'forbidden' });
    await expect(at.db('sign_off_comments').update({ text: 'x' })).rejects.toThrow(/never changed/);
    await expect(at.db('sign_off_comments').delete()).rejects.toThrow(/never changed/);
  });

  it('is decided once, with who, when and why', async () => {
    const { id } = await ask();
    const decided = await decideSignOff(reviewer, id, { outcome: 'approved', reason: 'Good enough.' });
    expect(decided).toMatchObject({ state: 'approved', decision: { by: 'reviewer', reason: 'Good enough.' } });
    const again = decideSignOff(at.context, id, { outcome: 'returned', reason: 'No.' });
    await expect(again).rejects.toMatchObject({ code: 'conflict' });
    expect((await listSignOffs(reviewer, at.projectId, {})).signOffs).toHaveLength(1);
  });

  it('cannot be changed or removed, nor decided by its asker, not even in the database', async () => {
    const { id } = await ask();
    const row = { sign_off_id: id, outcome: 'approved', reason: 'Myself.', created_by: engineer.caller.id };
    await expect(at.db('sign_off_decisions').insert({ ...row, created_at: nowText() })).rejects.toThrow(
      /does not decide/,
    );
    await decideSignOff(reviewer, id, { outcome: 'approved', reason: 'Good enough.' });
    await expect(at.db('sign_offs').update({ note: 'x' })).rejects.toThrow(/never changed/);
    await expect(at.db('sign_offs').delete()).rejects.toThrow(/never changed/);
    await expect(at.db('sign_off_decisions').update({ outcome: 'returned' })).rejects.toThrow(/never changed/);
    await expect(deleteCode(at.context, codeId)).rejects.toMatchObject({ code: 'in-use' });
  });
});

describe('the rights to a sign-off', () => {
  it('let owners and engineers ask, and owners and reviewers decide, but nobody on their own', async () => {
    for (const who of [reviewer, await memberAs('viewer')]) {
      await expect(askSignOff(who, pool, at.projectId, { codeId, note: '' })).rejects.toMatchObject({
        code: 'forbidden',
      });
    }
    const yes = { outcome: 'approved', reason: 'Good enough.' } as const;
    const { id } = await ask();
    await expect(decideSignOff(engineer, id, yes)).rejects.toMatchObject({ code: 'forbidden' });
    const own = await askSignOff(at.context, pool, at.projectId, { codeId, note: '' });
    await expect(decideSignOff(at.context, own.id, yes)).rejects.toMatchObject({
      code: 'forbidden',
      message: /asked for/,
    });
    expect((await decideSignOff(at.context, id, yes)).state).toBe('approved');
  });

  it('hide it from everybody outside the project', async () => {
    const { id } = await ask();
    const other = { ...at.context, caller: { ...at.context.caller, id: newId() } };
    await expect(getSignOff(other, id)).rejects.toMatchObject({ code: 'not-found' });
    await expect(listSignOffs(other, at.projectId, {})).rejects.toMatchObject({ code: 'not-found' });
    const no = decideSignOff(other, id, { outcome: 'returned', reason: 'No.' });
    await expect(no).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('a release after a sign-off', () => {
  it('carries its digest and the snapshot itself, and is rebuilt with both', async () => {
    const storage = diskStorage(scratchDir());
    const making = { pool, storage, signal: new AbortController().signal };
    const contents = { formats: ['alist' as const], generators: [], blocks: [] };
    const release = () => createRelease(at.context, making, at.projectId, { codeId, note: '', contents });
    const first = await ask();
    expect((await release()).signOff).toBeNull();
    await decideSignOff(reviewer, first.id, { outcome: 'approved', reason: 'Good enough.' });
    const made = await release();
    expect(made.signOff).toBe(first.digest);
    const { manifest } = await getRelease(at.context, made.id);
    expect(manifest).toMatchObject({ signOff: { digest: first.digest, by: 'reviewer', restated: false } });
    expect((manifest.cautions as string[])[0]).not.toMatch(/Nobody/);
    const { sha256 } = await getReleaseFile(at.context, storage, made.id, 'sign-off.json');
    expect(sha256).toBe(first.digest);
    expect((await rebuildRelease(at.context, pool, made.id, making.signal)).identical).toBe(true);

    await putRequirements(at.context, at.projectId, { targetFer: 1e-9 });
    expect((await getRelease(at.context, (await release()).id)).manifest).toMatchObject({
      signOff: { restated: true },
      cautions: expect.arrayContaining([expect.stringMatching(/stated anew/)]),
    });
    const second = await ask();
    await decideSignOff(reviewer, second.id, { outcome: 'returned', reason: 'Not any more.' });
    expect((await release()).signOff).toBeNull();
  });
});
