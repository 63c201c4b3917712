import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';
import { patchRun } from '@/server/use-cases/runs/patch-run.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { type Bench, openBench } from '../server/scheduling-kit.ts';

const point = { channel: { kind: 'bsc', p: 0.08 }, decoder: { kind: 'majority-logic' } } as const;
const [tab, other] = [
  { name: 'tab-1', label: 'Chromium' },
  { name: 'tab-2', label: 'Firefox' },
];
const dayMs = 24 * 3600 * 1000;

let at: Bench;
beforeEach(async () => {
  at = await openBench();
});
afterEach(async () => {
  vi.useRealTimers();
  vi.restoreAllMocks();
  await at.close();
});

const stated = (frames = 4000) => at.state({ stopping: { maxFrames: frames }, points: [point] });
const indicesOf = (leases: readonly { index: number }[]) => leases.map(({ index }) => index);

describe('a clock that is set', () => {
  it.each([
    ['forward', dayMs],
    ['backward', -dayMs],
  ])(
    'a day %s neither frees leases nor holds them for longer, and the run ends as it would have',
    async (_, jumpMs) => {
      const run = await stated();
      const first = await leaseShards(at.context, run.id, { count: 4, source: tab });
      vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + jumpMs });
      const second = await leaseShards(at.context, run.id, { count: 100, source: other });
      expect(indicesOf(second.leases)).toEqual(Array.from({ length: 16 }, (_, i) => 4 + i));
      await postShards(at.context, run.id, { shards: await at.computed(run, first.leases), source: tab });
      await postShards(at.context, run.id, { shards: await at.computed(run, second.leases), source: other });
      const { points } = await at.finished(run.id);
      expect(points[0]!.tally).toEqual(await at.quietTally(run, 0));
    },
  );

  it('does not use up a run’s budget of time', async () => {
    const run = await at.state({ stopping: { maxFrames: 4000, seconds: 3600 }, points: [point] });
    const { leases } = await leaseShards(at.context, run.id, { count: 4, source: tab });
    const shards = await at.computed(run, leases);
    await postShards(at.context, run.id, { shards: shards.slice(0, 2), source: tab });
    vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + dayMs });
    await postShards(at.context, run.id, { shards: shards.slice(2), source: tab });
    expect((await at.seen(run.id)).points[0]).toMatchObject({ done: false, nextIndex: 4 });
  });
});

/** The clock that leases and budgets go by, as after so long a sleep. */
function sleep(ms: number): void {
  const now = performance.now();
  vi.spyOn(performance, 'now').mockReturnValue(now + ms);
}

describe('a laptop that slept', () => {
  it('hands in late what another tab has computed meanwhile: it counts once, and nothing contradicts', async () => {
    const run = await stated(1000);
    const first = await leaseShards(at.context, run.id, { count: 5, source: tab });
    const late = await at.computed(run, first.leases);
    sleep(first.expiresInMs + 1);
    const again = await leaseShards(at.context, run.id, { count: 5, source: other });
    expect(indicesOf(again.leases)).toEqual(indicesOf(first.leases));
    const shards = await at.computed(run, again.leases);
    await postShards(at.context, run.id, { shards: shards.slice(0, 3), source: other });
    const receipt = await postShards(at.context, run.id, { shards: late, source: tab });
    expect(receipt).toMatchObject({ accepted: 2, duplicates: 3, conflicts: [] });
    const { points } = await at.finished(run.id);
    expect(points[0]!.tally).toEqual(await at.quietTally(run, 0));
  });

  it('has not worked while it slept, as a budget of time counts', async () => {
    const run = await at.state({ stopping: { maxFrames: 4000, seconds: 600 }, points: [point] });
    const { leases } = await leaseShards(at.context, run.id, { count: 4, source: tab });
    const shards = await at.computed(run, leases);
    await postShards(at.context, run.id, { shards: shards.slice(0, 2), source: tab });
    sleep(8 * 3600 * 1000);
    await postShards(at.context, run.id, { shards: shards.slice(2), source: tab });
    expect((await at.seen(run.id)).points[0]).toMatchObject({ done: false });
  });
});

describe('a tab that is killed', () => {
  it('costs what it had not handed in: its shards go to others once its lease is over', async () => {
    const run = await stated(1000);
    const first = await leaseShards(at.context, run.id, { count: 4, source: tab });
    const kept = await at.computed(run, first.leases.slice(0, 1));
    await postShards(at.context, run.id, { shards: kept, source: tab });
    await patchRun(at.context, run.id, { place: 'server' });
    at.startServer(1);
    // The server does what is not out, and the rest when the leases are over.
    await at.until(run.id, ({ run: { frames } }) => frames === 400);
    sleep(first.expiresInMs + 1);
    const { points } = await at.finished(run.id);
    expect(points[0]).toMatchObject({ nextIndex: 5, setAside: 0 });
    expect(points[0]!.tally).toEqual(await at.quietTally(run, 0));
  });
});
