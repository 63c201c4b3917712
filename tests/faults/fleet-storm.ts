import { expect } from 'vitest';
import type { Bench } from '../server/scheduling-kit.ts';
import { type FleetProcess, seconds, type startRedis } from './redis-kit.ts';

interface Storm {
  at: Bench;
  redis: Awaited<ReturnType<typeof startRedis>>;
  join(env?: Record<string, string>): FleetProcess;
  seconds: number;
  redisGoneSeconds: number;
  killEverySeconds: number;
}

/** Two processes of the fleet work on a run; one of the two is killed at random every few seconds and another takes its
 *  place, and once Redis is gone for a while and has forgotten everything when it comes back. When the storm is over the
 *  run must end, with the tallies of one quiet worker and every shard in its place. */
export async function stormOf({ at, redis, join, seconds: length, redisGoneSeconds, killEverySeconds }: Storm) {
  const run = await at.state({
    framesPerShard: 2000,
    stopping: { frameErrors: 3000 * length, maxFrames: 40_000 * length },
    place: 'fleet',
    points: [
      { channel: { kind: 'bsc', p: 0.03 }, decoder: { kind: 'sum-product' } },
      { channel: { kind: 'bsc', p: 0.05 }, decoder: { kind: 'gallager-b' } },
    ],
  });
  const machines = [join(), join({ FLEET_NAME: 'another machine' })];
  await at.until(run.id, ({ run: { frames } }) => frames > 0);
  const storm = async () => {
    for (let spent = 0; spent < length; spent += killEverySeconds) {
      await seconds(killEverySeconds);
      const victim = Math.floor(Math.random() * machines.length);
      await machines[victim]!.kill();
      machines[victim] = join();
    }
  };
  const outage = async () => {
    await seconds(length / 3);
    await redis.stop();
    redis.forget();
    await seconds(redisGoneSeconds);
    await redis.start();
  };
  await Promise.all([storm(), outage()]);
  const { points } = await at.finished(run.id, 60_000 + 10_000 * length);
  for (const [i, point] of points.entries()) {
    expect(point.tally).toEqual(await at.quietTally(run, i));
    expect(point.setAside).toBe(0);
  }
}
