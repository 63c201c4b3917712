import { createHash } from 'node:crypto';
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { backUp, filesBeside } from '@/server/db/backup.ts';
import { releasedFiles } from '@/server/db/released-files.ts';
import { restore } from '@/server/db/restore.ts';
import { diskStorage } from '@/server/files/disk-storage.ts';
import { pathOf } from '@/server/files/file-storage.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createFilesPool } from '@/server/jobs/files-pool.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { createRelease } from '@/server/use-cases/releases/create-release.ts';
import { getRelease, getReleaseFile } from '@/server/use-cases/releases/get-release.ts';
import { scratchDir } from './built-server.ts';
import { furnishedScratch, openScratch } from './scratch-database.ts';

const builds = createBuildPool();
const pool = createFilesPool();
const plane = {
  design: { family: 'projective-plane', params: { q: 4 } },
  derivation: { kind: 'ldpc' as const, checks: 'blocks' as const },
};
const files = join(scratchDir(), 'files');
let database: string;
let digests: string[];

beforeAll(async () => {
  await builds.build(plane);
  const { db, file, context, projectId } = await furnishedScratch();
  const made = await createCode(context, builds, projectId, plane);
  if (!('code' in made)) throw new Error('a job');
  const making = { pool, storage: diskStorage(files), signal: new AbortController().signal };
  const contents = { formats: ['alist' as const], generators: [], blocks: [] };
  await createRelease(context, making, projectId, { codeId: made.code.id, note: 'n', contents });
  await db.destroy();
  database = file;
  digests = releasedFiles(file);
});
afterAll(() => Promise.all([builds.close(), pool.close()]));

const backup = () => join(scratchDir(), 'backup.sqlite');

describe('a backup of a project with a release', () => {
  it('holds the released files, and puts them back where they are missing', async () => {
    const file = backup();
    expect((await backUp(database, file, files)).released).toBe(digests.length);
    expect(digests.length).toBeGreaterThan(2);
    const home = scratchDir();
    await restore(join(home, 'blockwright.sqlite'), file, join(home, 'files'));
    for (const sha256 of digests) {
      const [before, after] = [files, join(home, 'files')].map((root) => readFileSync(join(root, pathOf(sha256))));
      expect(after).toEqual(before);
    }
  });

  it('when restored elsewhere gives its release to download, whole and as it was', async () => {
    const file = backup();
    await backUp(database, file, files);
    const home = scratchDir();
    await restore(join(home, 'blockwright.sqlite'), file, join(home, 'files'));
    const { db } = openScratch(home);
    try {
      const { id } = await db('releases').first('id');
      const { id: userId } = await db('users').where({ email: 'a@b.test' }).first('id');
      const caller = { id: userId, email: 'a@b.test', name: 'A member', role: 'member' as const };
      const { files: listed } = await getRelease({ db, caller }, id);
      expect(listed.map(({ name }) => name)).toContain('H.alist');
      for (const { name, sha256 } of listed) {
        const { open } = await getReleaseFile({ db, caller }, diskStorage(join(home, 'files')), id, name);
        const bytes = new Uint8Array(await new Response((await open()) ?? null).arrayBuffer());
        expect(createHash('sha256').update(bytes).digest('hex')).toBe(sha256);
      }
    } finally {
      await db.destroy();
    }
  });

  it('is not made when a released file is missing or damaged', async () => {
    const broken = join(scratchDir(), 'files');
    const file = backup();
    await expect(backUp(database, file, broken)).rejects.toThrow(/released file [0-9a-f]{64} is not at/);
    const copy = backup();
    await backUp(database, copy, files);
    writeFileSync(join(filesBeside(copy), pathOf(digests[1]!)), 'other bytes');
    await expect(backUp(database, file, filesBeside(copy))).rejects.toThrow(/damaged/);
    expect(existsSync(file)).toBe(false);
  });

  it('whose released files are gone is not restored, unless they are there', async () => {
    const file = backup();
    await backUp(database, file, files);
    rmSync(filesBeside(file), { recursive: true });
    const home = scratchDir();
    const target = join(home, 'blockwright.sqlite');
    await expect(restore(target, file, join(home, 'files'))).rejects.toThrow(/is not at .*backup\.sqlite\.files/);
    expect(existsSync(target)).toBe(false);
    await restore(target, file, files);
    expect(releasedFiles(target)).toEqual(digests);
  });

  it('leaves files alone that lie in a bucket', async () => {
    const file = backup();
    expect((await backUp(database, file, undefined)).released).toBe(0);
    expect(existsSync(filesBeside(file))).toBe(false);
  });
});
