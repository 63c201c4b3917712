import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createSimulationPool } from '@/server/jobs/simulation-pool.ts';
import { failShards } from '@/server/use-cases/runs/fail-shards.ts';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { runProvenance } from '@/server/use-cases/runs/run-provenance.ts';
import { type Bench, openBench } from '../server/scheduling-kit.ts';

const point = { channel: { kind: 'bsc', p: 0.08 }, decoder: { kind: 'majority-logic' } } as const;
const tab = { name: 'tab-1', label: 'Chromium' };

let at: Bench;
beforeEach(async () => {
  at = await openBench();
  // A dying thread is logged as well.
  vi.spyOn(console, 'error').mockImplementation(() => {});
});
afterEach(async () => {
  vi.restoreAllMocks();
  await at.close();
});

/** A pool in which the shards chosen fail. */
function poolThat(fails: (index: number) => boolean) {
  const pool = createSimulationPool(1);
  return {
    ...pool,
    async shard(...[task, signal]: Parameters<typeof pool.shard>) {
      if (!fails(task.index)) return pool.shard(task, signal);
      return { ok: false as const, failure: { code: 'internal', message: 'the kernel threw' } };
    },
  };
}

describe('a worker that throws', () => {
  it('three times at one shard has it set aside, and the run ends without it and says so', async () => {
    const run = await at.state({ stopping: { maxFrames: 1000 }, place: 'server', points: [point] });
    at.startServer(
      1,
      poolThat((index) => index === 2),
    );
    const { points } = await at.finished(run.id);
    expect(points[0]).toMatchObject({ setAside: 1, nextIndex: 5, tally: { frames: 800 } });
    const { setAside } = await runProvenance(at.context, run.id);
    expect(setAside).toMatchObject([{ index: 2, failures: 3, message: 'the kernel threw' }]);
  });

  it('at shard after shard ends the point as given up, and tells the run’s owner that it failed', async () => {
    const run = await at.state({ stopping: { maxFrames: 1e9 }, place: 'server', points: [point] });
    at.startServer(
      1,
      poolThat(() => true),
    );
    const { points } = await at.finished(run.id);
    expect(points[0]).toMatchObject({ done: true, stopReason: 'failed', tally: { frames: 0 } });
    expect(await at.db('notices').where({ kind: 'run-failed' })).toHaveLength(1);
  });

  it('and takes its thread with it costs that shard alone', async () => {
    const run = await at.state({ stopping: { maxFrames: 600 }, place: 'server', points: [point] });
    at.startServer(1, createSimulationPool(1, fileURLToPath(new URL('dying-worker.mjs', import.meta.url))));
    const { points } = await at.finished(run.id);
    expect(points[0]).toMatchObject({ setAside: 1, tally: { frames: 400 } });
  });

  it('in a tab is counted likewise, and a shard that comes after all counts again', async () => {
    const run = await at.state({ stopping: { maxFrames: 600 }, points: [point] });
    const pointId = run.points[0]!.id;
    for (let time = 1; time <= 3; time++) {
      const failures = [{ pointId, index: 0, message: 'no WebAssembly here' }];
      const answer = await failShards(at.context, run.id, { failures, source: tab });
      expect(answer.setAside).toBe(time === 3 ? 1 : 0);
    }
    const { leases } = await leaseShards(at.context, run.id, { count: 10, source: tab });
    expect(leases.map(({ index }) => index)).toEqual([1, 2]);
    const late = await at.computed(run, [{ pointId, index: 0 }]);
    await postShards(at.context, run.id, { shards: late, source: tab });
    const shards = await at.computed(run, leases);
    await postShards(at.context, run.id, { shards, source: tab });
    const { points } = await at.finished(run.id);
    expect(points[0]).toMatchObject({ setAside: 0, nextIndex: 3, tally: { frames: 600 } });
  });
});
