import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { getRun } from '@/server/use-cases/runs/get-run.ts';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { runProvenance } from '@/server/use-cases/runs/run-provenance.ts';
import { type Bench, openBench } from './scheduling-kit.ts';

const tab = { name: 'tab-1', label: 'Chromium' };
const other = { name: 'tab-2', label: 'Firefox' };
const point = { channel: { kind: 'bsc', p: 0.08 }, decoder: { kind: 'majority-logic' } } as const;

let at: Bench;
beforeEach(async () => {
  vi.stubEnv('RECHECK_SHARE', '0.02');
  at = await openBench();
});
afterEach(async () => {
  vi.unstubAllEnvs();
  await at.close();
});

const stated = (shards: number) => at.state({ stopping: { maxFrames: shards * 200 }, points: [point] });
const provenance = (runId: string) => runProvenance(at.context, runId);

/** The whole of a small run from one tab; shard `wrong` with a frame error too many. */
async function handIn(runId: string, run: Awaited<ReturnType<typeof stated>>, wrong = -1, source = tab) {
  const { leases } = await leaseShards(at.context, runId, { count: 50, source });
  const shards = await at.computed(run, leases);
  for (const { index, tally } of shards) {
    if (index === wrong) Object.assign(tally, { frameErrors: tally.frameErrors - 1, undetected: 0 });
  }
  return postShards(at.context, runId, { shards, source });
}

describe('shards from a browser', () => {
  it('name their source, and at least one a point is computed again by the server', async () => {
    const run = await stated(4);
    expect((await handIn(run.id, run)).accepted).toBe(4);
    at.startServer(1);
    const { points } = await at.until(run.id, ({ points: [only] }) => only!.recomputed >= 1);
    expect(points[0]).toMatchObject({ done: true, stopReason: 'frames' });
    const { sources, conflicts, setAside } = await provenance(run.id);
    expect(sources).toMatchObject([
      { kind: 'browser', label: 'Chromium, A member', shards: 4, frames: 800, quarantinedAt: null },
    ]);
    expect(sources[0]!.recomputed).toBe(points[0]!.recomputed);
    expect([conflicts, setAside]).toEqual([[], []]);
  });

  it('of which one is wrong are all set aside: the run opens again, its owner is told, and the source is refused', async () => {
    const run = await stated(1);
    const honest = await at.state({ stopping: { maxFrames: 400 }, points: [point] });
    await handIn(honest.id, honest);
    await handIn(run.id, run, 0);
    at.startServer(1);
    const opened = await at.until(run.id, ({ run: { state } }) => state === 'paused');
    expect([opened.run.frames, opened.points[0]!.done]).toEqual([0, false]);
    // What it handed in elsewhere is not believed either.
    expect((await getRun(at.context, honest.id)).run).toMatchObject({ state: 'paused', frames: 0 });
    const { sources } = await provenance(run.id);
    expect(sources).toMatchObject([{ shards: 0, quarantinedShards: 1, quarantinedAt: expect.any(String) }]);
    const notices = await at.db('notices').where({ kind: 'quarantine' });
    expect(notices.map((notice) => notice.text)).toEqual([
      expect.stringMatching(/Chromium, A member again and found \d+ frame errors where \d+/),
      expect.stringContaining('set aside'),
    ]);
    expect(await at.db('audit_events').where({ kind: 'source.quarantined' })).toHaveLength(2);
    await expect(leaseShards(at.context, run.id, { count: 1, source: tab })).rejects.toMatchObject({
      code: 'quarantined',
      message: expect.stringContaining('Another browser'),
    });
    // An honest one may do them over.
    await at.db('runs').where({ id: run.id }).update({ state: 'running' });
    expect((await handIn(run.id, run, -1, other)).accepted).toBe(1);
    await at.until(run.id, ({ run: { state }, points: [only] }) => state === 'finished' && only!.recomputed === 1);
  });

  it('that contradict each other are settled by the server: the one found wrong goes', async () => {
    const run = await stated(6);
    const { leases } = await leaseShards(at.context, run.id, { count: 1, source: tab });
    const shards = await at.computed(run, leases);
    const wrong = shards.map((shard) => ({
      ...shard,
      tally: { ...shard.tally, frameErrors: shard.tally.frameErrors - 1, undetected: 0 },
    }));
    await postShards(at.context, run.id, { shards: wrong, source: other });
    const receipt = await postShards(at.context, run.id, { shards, source: tab });
    expect(receipt).toMatchObject({ accepted: 0, conflicts: [{ index: 0 }] });
    expect((await provenance(run.id)).conflicts).toMatchObject([{ index: 0, posted: shards[0]!.tally }]);
    at.startServer(1);
    await at.until(run.id, ({ run: { frames } }) => frames === 0);
    expect((await provenance(run.id)).sources).toMatchObject([{ label: 'Firefox, A member', quarantinedShards: 1 }]);
  });

  it('are handed out to one tab only, until its lease is over', async () => {
    const run = await stated(10);
    const first = await leaseShards(at.context, run.id, { count: 4, source: tab });
    const second = await leaseShards(at.context, run.id, { count: 50, source: other });
    const indices = [...first.leases, ...second.leases].map(({ index }) => index).sort((a, b) => a - b);
    expect(indices).toEqual(Array.from({ length: 10 }, (_, i) => i));
    expect(first.leases).toHaveLength(4);
    expect((await leaseShards(at.context, run.id, { count: 5, source: tab })).leases).toEqual([]);
    const now = performance.now();
    vi.spyOn(performance, 'now').mockReturnValue(now + first.expiresInMs + 1);
    expect((await leaseShards(at.context, run.id, { count: 50, source: tab })).leases).toHaveLength(10);
    vi.restoreAllMocks();
  });
});
