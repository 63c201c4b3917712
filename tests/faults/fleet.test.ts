import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { FleetRuns } from '@/server/fleet/fleet-runs.ts';
import { leaseShards } from '@/server/use-cases/runs/lease-shards.ts';
import { patchRun } from '@/server/use-cases/runs/patch-run.ts';
import { postShards } from '@/server/use-cases/runs/post-shards.ts';
import { runProvenance } from '@/server/use-cases/runs/run-provenance.ts';
import { programVersion } from '@/server/version.ts';
import { type Bench, openBench } from '../server/scheduling-kit.ts';
import { stormOf } from './fleet-storm.ts';
import { type FleetProcess, joinFleet, startRedis } from './redis-kit.ts';

let at: Bench;
let redis: Awaited<ReturnType<typeof startRedis>>;
let fleet: FleetRuns;
const machines: FleetProcess[] = [];

beforeEach(async () => {
  redis = await startRedis();
  vi.stubEnv('REDIS_URL', redis.url);
  vi.stubEnv('RECHECK_SHARE', '0');
  at = await openBench();
  fleet = new FleetRuns(at.db, redis.url, programVersion);
  // Redis' absence is logged as well.
  vi.spyOn(console, 'error').mockImplementation(() => {});
});
afterEach(async () => {
  await Promise.all(machines.splice(0).map((machine) => machine.kill()));
  await fleet.close();
  await redis.end();
  await at.close();
  vi.unstubAllEnvs();
  vi.restoreAllMocks();
});

const join = (env?: Record<string, string>) => {
  const machine = joinFleet(redis.url, env);
  machines.push(machine);
  return machine;
};
const points = [0.08, 0.05].map((p) => ({
  channel: { kind: 'bsc' as const, p },
  decoder: { kind: 'gallager-b' as const },
}));

describe('the fleet', () => {
  it('works off a run with a browser beside it, and says which machine computed what', async () => {
    const run = await at.state({ stopping: { maxFrames: 4_000 }, place: 'fleet', points });
    const tab = { name: 'tab', label: 'Chromium' };
    const { leases } = await leaseShards(at.context, run.id, { count: 5, source: tab });
    join();
    await postShards(at.context, run.id, { shards: await at.computed(run, leases), source: tab });
    const { points: ended } = await at.finished(run.id);
    for (const [i, point] of ended.entries()) expect(point.tally).toEqual(await at.quietTally(run, i));
    const { sources } = await runProvenance(at.context, run.id);
    expect(sources.map(({ kind, label }) => [kind, label])).toEqual([
      ['fleet', 'a machine'],
      ['browser', 'Chromium, A member'],
    ]);
  });

  it('refuses a machine of another release, and says which is which', async () => {
    await vi.waitFor(async () => expect(await fleet.state()).toMatchObject({ redis: 'up' }));
    const machine = join({ FLEET_RELEASE: '0.0.9' });
    expect(await machine.ended).toBe(2);
    expect(machine.said()).toContain(`has release 0.0.9, the server ${programVersion}`);
    const { machines: known } = await fleet.state();
    expect(known).toMatchObject([{ release: '0.0.9', refused: expect.stringContaining('Update the older one') }]);
  });

  it('stops taking shards when the server is of a newer release, and the shards are handed out anew', async () => {
    const old = join();
    await vi.waitFor(() => expect(old.said()).toContain('joined the fleet'), { timeout: 30_000 });
    await fleet.close();
    fleet = new FleetRuns(at.db, redis.url, '99.0.0');
    const run = await at.state({ stopping: { maxFrames: 400 }, place: 'fleet', points });
    expect(await old.ended).toBe(2);
    expect(old.said()).toContain('the server 99.0.0');
    join({ FLEET_RELEASE: '99.0.0' });
    const { points: ended } = await at.finished(run.id);
    expect(ended.map((point) => [point.tally.frames, point.setAside])).toEqual([
      [400, 0],
      [400, 0],
    ]);
  });

  it('hands a run over to the server when there is no machine', async () => {
    const run = await at.state({ stopping: { maxFrames: 2000 }, place: 'fleet', points });
    await vi.waitFor(async () => expect(await fleet.state()).toMatchObject({ redis: 'up' }));
    at.startServer(1);
    await patchRun(at.context, run.id, { place: 'server' });
    const { points: ended } = await at.finished(run.id);
    for (const [i, point] of ended.entries()) expect(point.tally).toEqual(await at.quietTally(run, i));
  });

  it('comes to the tallies of a quiet run though its processes are killed and Redis goes away', async () => {
    await stormOf({ at, redis, join, seconds: 14, redisGoneSeconds: 3, killEverySeconds: 4 });
  });
});
