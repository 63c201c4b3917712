import { expect, test, vi } from 'vitest';
import { FleetRuns } from '@/server/fleet/fleet-runs.ts';
import { programVersion } from '@/server/version.ts';
import { stormOf } from '../faults/fleet-storm.ts';
import { type FleetProcess, joinFleet, startRedis } from '../faults/redis-kit.ts';
import { openBench } from '../server/scheduling-kit.ts';

test('two minutes of killed machines, and Redis gone for one of them, end with the tallies of a quiet run', async () => {
  const redis = await startRedis();
  vi.stubEnv('REDIS_URL', redis.url);
  vi.stubEnv('RECHECK_SHARE', '0');
  vi.spyOn(console, 'error').mockImplementation(() => {});
  const at = await openBench();
  const fleet = new FleetRuns(at.db, redis.url, programVersion);
  const machines: FleetProcess[] = [];
  const join = (env?: Record<string, string>) => {
    const machine = joinFleet(redis.url, env);
    machines.push(machine);
    return machine;
  };
  await stormOf({ at, redis, join, seconds: 120, redisGoneSeconds: 60, killEverySeconds: 5 });
  expect(machines.length).toBeGreaterThan(10);
  await Promise.all(machines.map((machine) => machine.kill()));
  await fleet.close();
  await redis.end();
  await at.close();
  vi.unstubAllEnvs();
  vi.restoreAllMocks();
});
