import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { demoClient } from './api-client.ts';
import { root, scratchDir, startServer } from './built-server.ts';
import { freshRun, tallyWith } from './run-kit.ts';
import { furnishedScratch } from './scratch-database.ts';

function command(name: 'backup' | 'restore', dataDir: string, ...files: string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', `src/server/commands/${name}.ts`, ...files],
    { cwd: root, env: { ...process.env, DATA_DIR: dataDir }, encoding: 'utf8' },
  );
  return { status, text: stdout + stderr };
}

it('a backup taken from a running server brings back that moment, and signs everybody out', async () => {
  const server = await startServer();
  const { dataDir } = server;
  const file = join(scratchDir(), 'backup.sqlite');
  const client = await demoClient(server.base, 'engineer');
  const { run, pointIds } = await freshRun(client);
  const post = (index: number) =>
    client.post(`/runs/${run.id}/shards`, { shards: [{ pointId: pointIds[0], index, tally: tallyWith(1) }] });
  await post(0);
  expect(command('backup', dataDir, file)).toMatchObject({ status: 0, text: expect.stringMatching(/checked/) });
  expect(statSync(file).mode & 0o777).toBe(0o600);
  await post(1);

  const tooSoon = command('restore', dataDir, file);
  expect(tooSoon).toMatchObject({ status: 1, text: expect.stringMatching(/A server has the database open/) });
  await server.stop();
  expect(command('restore', dataDir, file)).toMatchObject({ status: 0, text: expect.stringMatching(/Restored/) });
  expect(readdirSync(dataDir).filter((name) => name.startsWith('before-restore-'))).toHaveLength(1);

  const again = await startServer({ DATA_DIR: dataDir });
  try {
    const old = await fetch(`${again.base}/api/v1/projects`, {
      headers: { cookie: [...client.cookies].map((pair) => pair.join('=')).join('; ') },
    });
    expect(old.status).toBe(401);
    const back = await demoClient(again.base, 'engineer');
    expect((await back.get(`/runs/${run.id}`)).body.points[0]).toMatchObject({ nextIndex: 1, tally: { frames: 100 } });
  } finally {
    await again.stop();
  }
}, 300_000);

describe('a backup', () => {
  it('does not write over a file, and says so', async () => {
    const { dataDir, db } = await furnishedScratch();
    const file = join(scratchDir(), 'there');
    writeFileSync(file, 'mine');
    expect(command('backup', dataDir, file)).toMatchObject({ status: 1, text: expect.stringMatching(/there already/) });
    await db.destroy();
  });
  it('of a folder without a database is refused, and makes none', () => {
    const dataDir = scratchDir();
    const file = join(dataDir, 'b');
    expect(command('backup', dataDir, file)).toMatchObject({ status: 1, text: expect.stringMatching(/no database/) });
    expect(readdirSync(dataDir)).toEqual([]);
  });
  it('without a file name tells how to call it', () => {
    expect(command('backup', scratchDir())).toMatchObject({ status: 1, text: 'Usage: npm run backup FILE\n' });
  });
});

describe('restoring', () => {
  it.each([
    ['a text', 'hello'],
    ['an empty file', ''],
  ])('from %s is refused and changes nothing', async (_what, content) => {
    const { dataDir, db, file: database } = await furnishedScratch();
    await db.destroy();
    const file = join(scratchDir(), 'backup');
    writeFileSync(file, content);
    const size = statSync(database).size;
    expect(command('restore', dataDir, file)).toMatchObject({ status: 1, text: expect.stringMatching(/not a sound/) });
    expect(statSync(database).size).toBe(size);
  });
  it('into an empty folder works', async () => {
    const { dataDir, db } = await furnishedScratch();
    const file = join(scratchDir(), 'backup');
    command('backup', dataDir, file);
    await db.destroy();
    const empty = join(scratchDir(), 'new');
    expect(command('restore', empty, file).status).toBe(0);
    expect(existsSync(join(empty, 'blockwright.sqlite'))).toBe(true);
  });
});
