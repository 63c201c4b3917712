import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { NewRun } from '@/api/runs.ts';
import { getRun } from '@/server/use-cases/runs/get-run.ts';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';
import { patchRun } from '@/server/use-cases/runs/patch-run.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { type Bench, openBench } from './scheduling-kit.ts';

let at: Bench;
beforeEach(async () => {
  at = await openBench();
});
afterEach(async () => {
  vi.restoreAllMocks();
  await at.close();
});

const stated = (over: Partial<Omit<NewRun, 'points'>> = {}) =>
  at.state({
    stopping: { frameErrors: 40, maxFrames: 20_000 },
    place: 'server',
    points: [
      { channel: { kind: 'bsc', p: 0.08 }, decoder: { kind: 'majority-logic' } },
      { channel: { kind: 'bsc', p: 0.02 }, decoder: { kind: 'gallager-b' } },
      { channel: { kind: 'bsc', p: 0.04 }, decoder: { kind: 'sum-product' } },
    ],
    ...over,
  });

describe('a run of the server', () => {
  it('begins by itself and ends with the tallies of one quiet worker, to the integer', async () => {
    const run = await stated();
    expect(run.state).toBe('running');
    at.startServer(2);
    const { points } = await at.finished(run.id);
    for (const [position, point] of points.entries()) {
      expect(point.tally).toEqual(await at.quietTally(run, position));
    }
    expect(points.map((point) => point.stopReason)).toEqual(['errors', 'errors', 'errors']);
    const [first] = points;
    expect(first!.stopped!.lower).toBeLessThan(first!.stopped!.estimate);
    expect(first!.stopped!.upper).toBeGreaterThan(first!.stopped!.estimate);
  });

  it('rests when paused, goes on when resumed, and is over when stopped', async () => {
    const run = await stated({ stopping: { frameErrors: 1e6, maxFrames: 1e9 } });
    at.startServer(1);
    await at.until(run.id, ({ run: { frames } }) => frames > 0);
    await patchRun(at.context, run.id, { state: 'paused' });
    await at.settled(run.id);
    const atRest = (await getRun(at.context, run.id)).run.frames;
    await patchRun(at.context, run.id, { state: 'running' });
    await at.until(run.id, ({ run: { frames } }) => frames > atRest);
    await patchRun(at.context, run.id, { state: 'stopped' });
    await at.settled(run.id);
    expect((await getRun(at.context, run.id)).run.state).toBe('stopped');
  });

  it('is taken up by the next server where the last one left it', async () => {
    const run = await stated({ stopping: { maxFrames: 6_000 } });
    at.startServer(1);
    await at.until(run.id, ({ run: { frames } }) => frames > 0);
    await at.stopServer();
    const left = await getRun(at.context, run.id);
    expect(left.run.state).toBe('running');
    at.startServer(1);
    const { points } = await at.finished(run.id);
    for (const [position, point] of points.entries()) expect(point.tally).toEqual(await at.quietTally(run, position));
  });

  it('moves to the browser and back between two shards', async () => {
    const run = await stated({ stopping: { maxFrames: 2_000 } });
    await patchRun(at.context, run.id, { place: 'browser' });
    at.startServer(1);
    const tab = { name: 'tab-1', label: 'Chromium' };
    const { leases } = await leaseShards(at.context, run.id, { count: 3, source: tab });
    const shards = await at.computed(run, leases);
    await postShards(at.context, run.id, { shards, source: tab });
    expect((await getRun(at.context, run.id)).run.frames).toBe(3 * run.framesPerShard);
    await patchRun(at.context, run.id, { place: 'server' });
    const { points } = await at.finished(run.id);
    for (const [position, point] of points.entries()) expect(point.tally).toEqual(await at.quietTally(run, position));
  });
});
