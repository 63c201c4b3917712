import { createHash } from 'node:crypto';
import { unzipSync } from 'fflate';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { NewRelease } from '@/api/releases.ts';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { importMatrix } from '@/core/formats/index.ts';
import { type Context, nowText } from '@/server/context.ts';
import { diskStorage } from '@/server/files/disk-storage.ts';
import type { FileStorage } from '@/server/files/file-storage.ts';
import { newId } from '@/server/ids.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createFilesPool } from '@/server/jobs/files-pool.ts';
import { insertMembership } from '@/server/repositories/memberships.ts';
import { insertUser } from '@/server/repositories/users.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { deleteCode } from '@/server/use-cases/codes/delete-code.ts';
import { createRelease } from '@/server/use-cases/releases/create-release.ts';
import { endRelease } from '@/server/use-cases/releases/end-release.ts';
import { getRelease, getReleaseFile } from '@/server/use-cases/releases/get-release.ts';
import { listReleases } from '@/server/use-cases/releases/list-releases.ts';
import { rebuildRelease } from '@/server/use-cases/releases/rebuild-release.ts';
import { putRequirements } from '@/server/use-cases/requirements/put-requirements.ts';
import { scratchDir } from './built-server.ts';
import { furnishedScratch } from './scratch-database.ts';

const builds = createBuildPool();
const pool = createFilesPool();
afterAll(() => Promise.all([builds.close(), pool.close()]));

const plane = {
  design: { family: 'projective-plane', params: { q: 4 } },
  derivation: { kind: 'ldpc' as const, checks: 'blocks' as const },
};
// Starts the worker, so that a code is built within the second that a request waits.
beforeAll(() => builds.build(plane));

let at: Awaited<ReturnType<typeof furnishedScratch>>;
let storage: FileStorage;
let codeId: string;
beforeEach(async () => {
  at = await furnishedScratch();
  storage = diskStorage(scratchDir());
  await putRequirements(at.context, at.projectId, {
    ...{ targetFer: 1e-3, channel: { kind: 'bsc', p: 0.01 }, lengthMax: 20, rateMin: 0.5, structure: 'cyclic' },
  });
  const made = await createCode(at.context, builds, at.projectId, plane);
  if (!('code' in made)) throw new Error('a job');
  codeId = made.code.id;
});
afterEach(async () => {
  vi.restoreAllMocks();
  await at.db.destroy();
});

const making = (signal = new AbortController().signal) => ({ pool, storage, signal });
const asked = (contents: Partial<NewRelease['contents']> = {}): NewRelease => ({
  codeId,
  note: 'For the decoder team.',
  contents: { formats: ['alist', 'npz'], generators: ['polynomial'], blocks: ['text'], ...contents },
});
const make = (context: Context = at.context, contents = {}) =>
  createRelease(context, making(), at.projectId, asked(contents));

async function memberAs(role: 'owner' | 'engineer' | 'reviewer' | 'viewer'): Promise<Context> {
  const caller = { id: newId(), email: `${newId()}@b.test`, name: role, role: 'member' as const };
  await insertUser(at.db, { ...caller, passwordHash: null, isDemo: false, createdAt: nowText() });
  await insertMembership(at.db, { projectId: at.projectId, userId: caller.id, role, createdAt: nowText() });
  return { db: at.db, caller };
}

async function bytesOf(releaseId: string, name: string): Promise<Buffer> {
  const { open, sha256, sizeBytes } = await getReleaseFile(at.context, storage, releaseId, name);
  const bytes = Buffer.from(await new Response(await open()).arrayBuffer());
  expect([createHash('sha256').update(bytes).digest('hex'), bytes.length]).toEqual([sha256, sizeBytes]);
  return bytes;
}

describe('a release', () => {
  it('has the project’s next number, and its files in the store under their digests', async () => {
    const first = await make();
    const second = await make();
    expect([first.number, second.number, second.state]).toEqual([1, 2, 'current']);
    expect((await listReleases(at.context, at.projectId, {})).releases.map(({ number }) => number)).toEqual([2, 1]);
    const { files, release } = await getRelease(at.context, first.id);
    expect(files.map(({ name }) => name)).toEqual([
      ...['manifest.json', 'SHA256SUMS', 'README.txt', 'H.alist', 'H.npz', 'generator.polynomial.txt', 'blocks.txt'],
      ...['verify.py', 'verify.sh'],
    ]);
    for (const { name } of files) await bytesOf(first.id, name);
    const zip = unzipSync(await bytesOf(first.id, release.bundle.name));
    expect(Object.keys(zip)).toEqual(files.map(({ name }) => `scratch-release-1/${name}`));
    expect(await fingerprint(importMatrix(zip['scratch-release-1/H.alist']!, 'alist'))).toBe(release.fingerprint);
  });

  it('says in its manifest where the code is from, what is known and how, and what of the requirements is met', async () => {
    const { id } = await make();
    const manifest = JSON.parse((await bytesOf(id, 'manifest.json')).toString());
    expect(manifest).toMatchObject({
      manifest: 'blockwright-release-1',
      title: 'Scratch, release 1',
      release: { number: 1, note: 'For the decoder team.', releasedBy: 'A member' },
      lineage: { design: { family: 'projective-plane', params: { q: 4 } }, certificate: { holds: true } },
      signOff: null,
      measurements: [],
    });
    expect(manifest.properties.every((p: { grade: string; method: string }) => p.grade && p.method)).toBe(true);
    const verdicts = manifest.requirements.verdicts.map((v: Record<string, unknown>) => [
      v.requirement,
      v.outcome,
      v.grade,
    ]);
    expect(verdicts).toEqual([
      ['greatest length', 'missed', 'computed'],
      ['least rate', 'met', 'computed'],
      ['structure', 'met', 'computed'],
      ['target FER', 'undecided', 'bounded'],
    ]);
    expect(manifest.cautions[0]).toMatch(/Nobody has signed off/);
    expect((await getRelease(at.context, id)).manifest).toEqual(manifest);
  });

  it('comes out the same to the byte when made again, whatever order its parts were asked for in', async () => {
    const { id, bundle } = await make(at.context, {
      formats: ['npz', 'alist', 'npz'],
      generators: ['systematic', 'polynomial'],
    });
    const again = await rebuildRelease(at.context, pool, id, making().signal);
    expect(again).toEqual({ identical: true, released: bundle.sha256, rebuilt: bundle.sha256 });
    await putRequirements(at.context, at.projectId, { targetFer: 0.5 });
    expect((await rebuildRelease(at.context, pool, id, making().signal)).identical).toBe(true);
  });

  it('cannot be changed or removed, nor can its files and endings, not even in the database', async () => {
    const { id } = await make();
    await endRelease(at.context, id, { kind: 'withdrawn', reason: 'A wrong code.' });
    for (const table of ['releases', 'release_files', 'release_endings']) {
      const column = table === 'release_endings' ? 'reason' : 'title';
      await expect(at.db(table).update({ [column]: 'Another' }), table).rejects.toThrow(/never changed/);
      await expect(at.db(table).delete(), table).rejects.toThrow(/never changed/);
    }
    const file = { name: 'more.txt', title: 'x', media_type: 'text/plain', size_bytes: 1, sha256: '0'.repeat(64) };
    const late = at.db('release_files').insert({ release_id: id, position: 99, is_bundle: 0, ...file });
    await expect(late).rejects.toThrow(/never changed/);
  });

  it('keeps its code: that is not removed any more', async () => {
    await make();
    await expect(deleteCode(at.context, codeId)).rejects.toMatchObject({ code: 'in-use', message: /One release/ });
  });

  it('is not made of what the code has not, and the refusal names the field', async () => {
    const vectors = { forms: ['hex' as const], seed: 's', count: 5, channel: { kind: 'bec' as const, e: 0.1 } };
    await expect(
      make(at.context, { vectors: { ...vectors, decoders: [{ kind: 'gallager-b' }] } }),
    ).rejects.toMatchObject({
      code: 'param',
      detail: { fields: { 'contents.vectors.decoders.kind': expect.stringMatching(/peeling/) } },
    });
    await expect(
      createRelease(at.context, making(), at.projectId, { ...asked(), codeId: newId() }),
    ).rejects.toMatchObject({ code: 'invalid', detail: { fields: { codeId: expect.any(String) } } });
    expect((await listReleases(at.context, at.projectId, {})).releases).toEqual([]);
  });

  it('is not made when the one who asked has gone, or when the store refuses', async () => {
    const gone = new AbortController();
    const pending = createRelease(at.context, making(gone.signal), at.projectId, asked());
    setTimeout(() => gone.abort(), 20);
    await expect(pending).rejects.toThrow(/abort/i);
    const broken = { ...storage, put: () => Promise.reject(new Error('the store is full')) };
    await expect(createRelease(at.context, { ...making(), storage: broken }, at.projectId, asked())).rejects.toThrow(
      /full/,
    );
    expect((await listReleases(at.context, at.projectId, {})).releases).toEqual([]);
  });

  it('gives two who release at once two numbers, or one of them a conflict', async () => {
    const outcomes = await Promise.allSettled([make(), make()]);
    const made = outcomes.filter((one) => one.status === 'fulfilled');
    const refused = outcomes.filter((one) => one.status === 'rejected');
    expect(made.length).toBeGreaterThanOrEqual(1);
    for (const { reason } of refused) expect(reason).toMatchObject({ code: 'conflict' });
    const numbers = (await listReleases(at.context, at.projectId, {})).releases.map(({ number }) => number);
    expect(numbers).toEqual(Array.from({ length: made.length }, (_, i) => made.length - i));
  });
});

describe('the rights to a release', () => {
  it.each(['owner', 'engineer'] as const)('let a project’s %s make one', async (role) => {
    expect((await make(await memberAs(role))).number).toBe(1);
  });

  it.each(['reviewer', 'viewer'] as const)('let a %s only read', async (role) => {
    const { id } = await make();
    const context = await memberAs(role);
    await expect(make(context)).rejects.toMatchObject({ code: 'forbidden' });
    expect((await getRelease(context, id)).release.id).toBe(id);
    expect((await rebuildRelease(context, pool, id, making().signal)).identical).toBe(true);
  });

  it('let owners, engineers and reviewers end one, and no viewer', async () => {
    const ending = { kind: 'withdrawn', reason: 'A wrong code.' } as const;
    for (const role of ['owner', 'engineer', 'reviewer'] as const) {
      const { id } = await make();
      expect((await endRelease(await memberAs(role), id, ending)).state).toBe('withdrawn');
    }
    const { id } = await make();
    await expect(endRelease(await memberAs('viewer'), id, ending)).rejects.toMatchObject({ code: 'forbidden' });
  });

  it('hide it from everybody outside the project', async () => {
    const { id } = await make();
    const other = { ...at.context, caller: { ...at.context.caller, id: newId() } };
    for (const deed of [
      () => getRelease(other, id),
      () => getReleaseFile(other, storage, id, 'manifest.json'),
      () => rebuildRelease(other, pool, id, making().signal),
      () => endRelease(other, id, { kind: 'withdrawn', reason: 'Mine now.' }),
      () => listReleases(other, at.projectId, {}),
    ]) {
      await expect(deed()).rejects.toMatchObject({ code: 'not-found' });
    }
  });
});

describe('the end of a release', () => {
  it('names who, when, why, and the one that takes its place', async () => {
    const [first, second] = [await make(), await make()];
    const ended = await endRelease(at.context, first.id, {
      ...{ kind: 'superseded', reason: 'More formats.', successorId: second.id },
    });
    expect(ended).toMatchObject({
      state: 'superseded',
      endings: [
        { kind: 'superseded', reason: 'More formats.', successor: { id: second.id, number: 2 }, by: 'A member' },
      ],
    });
    const withdrawn = await endRelease(at.context, first.id, { kind: 'withdrawn', reason: 'Unsafe.' });
    expect([withdrawn.state, withdrawn.endings.length]).toEqual(['withdrawn', 2]);
  });

  it('is said once, and only of an earlier release by a later one that holds', async () => {
    const [first, second] = [await make(), await make()];
    const by = (successorId: string) => ({ kind: 'superseded', reason: 'Better.', successorId }) as const;
    await expect(endRelease(at.context, second.id, by(first.id))).rejects.toMatchObject({ code: 'invalid' });
    await expect(endRelease(at.context, first.id, by(first.id))).rejects.toMatchObject({ code: 'invalid' });
    await expect(endRelease(at.context, first.id, by('nothing'))).rejects.toMatchObject({ code: 'invalid' });
    await endRelease(at.context, second.id, { kind: 'withdrawn', reason: 'Unsafe.' });
    await expect(endRelease(at.context, first.id, by(second.id))).rejects.toMatchObject({ code: 'invalid' });
    await expect(endRelease(at.context, second.id, { kind: 'withdrawn', reason: 'Twice.' })).rejects.toMatchObject({
      code: 'conflict',
    });
  });
});
