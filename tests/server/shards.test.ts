import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RunSpec } from '@/core/simulation/run-spec.ts';
import { runShard } from '@/core/simulation/shard.ts';
import { buildDemoCode } from '../../db/seeds/demo/build.ts';
import { demoProjects } from '../../db/seeds/demo/scenario.ts';
import { type ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { framesPerShard, freshRun, tallyWith } from './run-kit.ts';

let server: RunningServer;
let client: ApiClient;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'engineer');
}, 300_000);
afterAll(() => server.stop());

const pg16 = demoProjects.flatMap((project) => project.codes).find((code) => code.key === 'pg16')!;

const shard = (pointId: string, index: number, frameErrors: number) => ({
  pointId,
  index,
  tally: tallyWith(frameErrors),
});

describe('handing in shards', () => {
  it('adds them to their points and counts a second posting as a duplicate', async () => {
    const { run, pointIds } = await freshRun(client);
    const path = `/runs/${run.id}/shards`;
    const shards = [shard(pointIds[0]!, 0, 2), shard(pointIds[0]!, 2, 3), shard(pointIds[1]!, 0, 0)];
    expect((await client.post(path, { shards })).body).toEqual({ accepted: 3, duplicates: 0, conflicts: [] });
    expect((await client.post(path, { shards })).body).toEqual({ accepted: 0, duplicates: 3, conflicts: [] });
    const { body } = await client.get(`/runs/${run.id}`);
    expect(body.run).toMatchObject({ state: 'running', frames: 300, frameErrors: 5 });
    const [first, second] = body.points;
    expect(first.tally).toMatchObject({ frames: 200, frameErrors: 5, iterationHistogram: [0, 200] });
    expect([first.nextIndex, first.extra, first.fer]).toEqual([1, [2], 0.025]);
    // Nothing seen: the one-sided limit 1 − 0.05^(1/100).
    expect(second.interval.lower).toBe(0);
    expect(second.interval.upper).toBeCloseTo(1 - 0.05 ** (1 / 100), 10);
  });

  it('keeps the first of two tallies that differ and records the conflict', async () => {
    const { run, pointIds } = await freshRun(client);
    const path = `/runs/${run.id}/shards`;
    await client.post(path, { shards: [shard(pointIds[0]!, 0, 2)] });
    const { status, body } = await client.post(path, {
      shards: [shard(pointIds[0]!, 0, 3), shard(pointIds[0]!, 1, 1)],
    });
    expect([status, body]).toEqual([
      200,
      { accepted: 1, duplicates: 0, conflicts: [{ pointId: pointIds[0], index: 0 }] },
    ]);
    expect((await client.get(`/runs/${run.id}`)).body.run.frameErrors).toBe(3);
    const db = new Database(`${server.dataDir}/blockwright.sqlite`, { readonly: true });
    const event = db.prepare("SELECT content FROM audit_events WHERE kind = 'shard.conflict' AND subject = ?");
    const { content } = event.get(pointIds[0]) as { content: string };
    db.close();
    expect(JSON.parse(content)).toMatchObject({ index: 0, posted: { frameErrors: 3 }, stored: { frameErrors: 2 } });
  });

  it('finishes a point by frame errors or by frames, and the run with its last point', async () => {
    const { run, pointIds } = await freshRun(client, { frameErrors: 4, maxFrames: 2 * framesPerShard });
    const path = `/runs/${run.id}/shards`;
    await client.post(path, { shards: [shard(pointIds[0]!, 0, 4)] });
    const half = (await client.get(`/runs/${run.id}`)).body;
    expect([half.run.state, half.points.map((point: { done: boolean }) => point.done)]).toEqual([
      'running',
      [true, false],
    ]);
    await client.post(path, { shards: [shard(pointIds[1]!, 0, 1), shard(pointIds[1]!, 1, 0)] });
    expect((await client.get(`/runs/${run.id}`)).body.run).toMatchObject({ state: 'finished', pointsDone: 2 });
    // Finished: nothing new, but what is there may be repeated.
    const fresh = await client.post(path, { shards: [shard(pointIds[0]!, 0, 4), shard(pointIds[0]!, 1, 0)] });
    expect([fresh.status, fresh.body.error.code]).toEqual([409, 'run-closed']);
    expect((await client.post(path, { shards: [shard(pointIds[0]!, 0, 4)] })).body.duplicates).toBe(1);
  });

  it('takes what the engine computes from the run’s own statement', async () => {
    const { run, pointIds } = await freshRun(client);
    const { H } = await buildDemoCode(pg16);
    const tallies = await Promise.all(
      run.points.map(({ channel, decoder }: RunSpec) =>
        runShard({ H, channel, decoder, seed: run.seed, framesPerShard: run.framesPerShard }, 0),
      ),
    );
    const shards = tallies.map((tally, i) => ({ pointId: pointIds[i], index: 0, tally }));
    expect((await client.post(`/runs/${run.id}/shards`, { shards })).body.accepted).toBe(2);
  });

  it('takes 500 in one batch', async () => {
    const { run, pointIds } = await freshRun(client, { frameErrors: 1000, maxFrames: 500 * framesPerShard });
    const shards = Array.from({ length: 500 }, (_, index) => shard(pointIds[0]!, index, 1));
    expect((await client.post(`/runs/${run.id}/shards`, { shards })).body.accepted).toBe(500);
    expect((await client.get(`/runs/${run.id}`)).body.points[0]).toMatchObject({ nextIndex: 500, done: true });
  });
});

describe('a run’s state', () => {
  it('goes from running to paused and back, and stopping is final', async () => {
    const { run, pointIds } = await freshRun(client);
    const patch = (state: string) => client.call('PATCH', `/runs/${run.id}`, { state });
    for (const state of ['running', 'paused', 'running', 'running', 'stopped']) {
      const { status, body } = await patch(state);
      expect([status, body.run.state]).toEqual([200, state]);
    }
    const again = await patch('running');
    expect([again.status, again.body.error.code]).toEqual([409, 'conflict']);
    const late = await client.post(`/runs/${run.id}/shards`, { shards: [shard(pointIds[0]!, 0, 0)] });
    expect([late.status, late.body.error.code]).toEqual([409, 'run-closed']);
  });

  it('still takes shards that were under way when it was paused', async () => {
    const { run, pointIds } = await freshRun(client);
    await client.call('PATCH', `/runs/${run.id}`, { state: 'running' });
    await client.call('PATCH', `/runs/${run.id}`, { state: 'paused' });
    const { body } = await client.post(`/runs/${run.id}/shards`, { shards: [shard(pointIds[0]!, 0, 0)] });
    expect(body.accepted).toBe(1);
    expect((await client.get(`/runs/${run.id}`)).body.run.state).toBe('paused');
  });
});
