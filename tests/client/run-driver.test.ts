import { expect, test } from 'vitest';
import type { Point, Run } from '@/api/runs.ts';
import { ApiFailure } from '@/client/api.ts';
import { type DriverPorts, type DriverView, RunDriver } from '@/client/run-driver.ts';
import { acknowledge, nextShard, progressOf, reachedStop, shardCap } from '@/client/run-plan.ts';
import { emptyTally, mergeTallies, type Tally } from '@/core/simulation/tally.ts';

const framesPerShard = 100;
const n = 7;

/** One failed frame a shard, three wrong bits in it. */
const shardTally = (): Tally => ({
  ...emptyTally(),
  frames: framesPerShard,
  frameErrors: 1,
  bitErrors: 3,
  bitErrorsSquared: 9,
  bits: framesPerShard * n,
  iterations: framesPerShard,
  iterationHistogram: [0, framesPerShard],
});

function aRun(over: Partial<Run> = {}): Run {
  return {
    id: 'r',
    projectId: 'p',
    name: 'run',
    seed: 's',
    framesPerShard,
    stopping: { frameErrors: 5, maxFrames: 10_000 },
    place: 'browser',
    goal: null,
    outcome: null,
    state: 'ready',
    createdAt: '',
    createdBy: '',
    isDemo: false,
    pointCount: 1,
    pointsDone: 0,
    frames: 0,
    frameErrors: 0,
    revision: 0,
    ...over,
  };
}

function aPoint(id: string, over: Partial<Point> = {}): Point {
  const interval = { lower: 0, upper: 1 };
  return {
    id,
    runId: 'r',
    codeId: 'c',
    codeLabel: '(7,3)',
    n,
    k: 3,
    channel: { kind: 'bsc', p: 0.1 },
    decoder: { kind: 'majority-logic' },
    tally: emptyTally(),
    nextIndex: 0,
    extra: [],
    done: false,
    stopReason: null,
    stopped: null,
    recomputed: 0,
    setAside: 0,
    plan: null,
    fer: 0,
    ber: 0,
    interval,
    berInterval: interval,
    level: 0.95,
    ...over,
  };
}

/** A server and workers that live in memory, with faults that a test can switch on. */
function world(run: Run, points: Point[]) {
  const stored = new Map<string, Tally>();
  const progress = points.map(progressOf);
  const failures: string[] = [];
  const states: string[] = [];
  const views: DriverView[] = [];
  const faults = { serverDown: 0, computeFails: false };
  const computed = { count: 0 };
  let clock = 0;
  const ports: DriverPorts = {
    workers: 3,
    async lease(count) {
      const leases: { pointId: string; index: number }[] = [];
      while (leases.length < count) {
        const next = nextShard(progress, run.stopping, run.framesPerShard);
        if (!next) break;
        next.point.out.add(next.index);
        leases.push({ pointId: next.point.pointId, index: next.index });
      }
      return { leases, points: [], over: progress.every((point) => point.done) ? 'finished' : null };
    },
    async failed({ pointId, index, message }) {
      failures.push(`${pointId}/${index}: ${message}`);
    },
    async compute(_point, _index, signal) {
      signal.throwIfAborted();
      computed.count++;
      await Promise.resolve();
      return faults.computeFails
        ? { ok: false, failure: { code: 'param', message: 'threshold: too large' } }
        : { ok: true, tally: shardTally(), elapsedMs: 1 };
    },
    async post(shards) {
      if (faults.serverDown > 0) {
        faults.serverDown--;
        throw new ApiFailure(503, 'storage', 'The database cannot be written just now.');
      }
      for (const { pointId, index, tally } of shards) {
        stored.set(`${pointId}/${index}`, tally);
        const point = progress.find((one) => one.pointId === pointId)!;
        acknowledge(point, index);
        point.tally = mergeTallies(point.tally, tally);
        point.done ||=
          reachedStop(point.tally, run.stopping) || point.nextIndex >= shardCap(run.stopping, run.framesPerShard);
      }
      return { conflicts: [] };
    },
    async setState(state) {
      states.push(state);
    },
    now: () => clock,
    wait: (ms) => {
      clock += ms;
      return new Promise((done) => setTimeout(done, 0));
    },
    onView: (view) => views.push(view),
  };
  return { driver: new RunDriver(run, points, ports), failures, stored, states, views, faults, computed };
}

async function until(condition: () => boolean): Promise<void> {
  for (let i = 0; i < 5000 && !condition(); i++) await new Promise((done) => setTimeout(done, 0));
  expect(condition()).toBe(true);
}

test('a run goes on until each point has its frame errors, and counts only what the server acknowledged', async () => {
  const { driver, stored, states } = world(aRun(), [aPoint('a'), aPoint('b')]);
  await driver.start();
  await until(() => driver.view().status === 'finished');
  expect(states).toEqual(['running']);
  for (const id of ['a', 'b']) {
    const tally = driver.view().pointTallies.get(id)!;
    expect(tally.frameErrors).toBeGreaterThanOrEqual(5);
    expect([...stored.keys()].filter((key) => key.startsWith(`${id}/`)).length).toBe(tally.frames / framesPerShard);
  }
  expect(driver.view().fractionDone).toBe(1);
});

test('the cap on frames ends a point whose errors never come', async () => {
  const run = aRun({ stopping: { frameErrors: 1_000_000, maxFrames: 700 } });
  const { driver, stored } = world(run, [aPoint('a')]);
  await driver.start();
  await until(() => driver.view().status === 'finished');
  expect([...stored.keys()].sort()).toEqual([0, 1, 2, 3, 4, 5, 6].map((i) => `a/${i}`));
});

test('a returning page goes on at the lowest index nobody has handed in', async () => {
  const tally = { ...shardTally(), frames: 300, frameErrors: 3 };
  const run = aRun({ state: 'paused', stopping: { frameErrors: 6, maxFrames: 10_000 } });
  const { driver, stored } = world(run, [aPoint('a', { tally, nextIndex: 2, extra: [3] })]);
  expect(driver.view().status).toBe('paused');
  await driver.start();
  await until(() => driver.view().status === 'finished');
  expect(stored.has('a/2')).toBe(true);
  expect(stored.has('a/3')).toBe(false);
  expect(stored.has('a/4')).toBe(true);
});

test('a server that cannot write makes the run wait, and nothing is lost', async () => {
  const { driver, faults, views } = world(aRun(), [aPoint('a')]);
  faults.serverDown = 4;
  await driver.start();
  await until(() => driver.view().status === 'finished');
  const waiting = views.find((view) => view.status === 'waiting-for-server');
  expect(waiting?.message).toContain('cannot be written');
  expect(driver.view().pointTallies.get('a')!.frameErrors).toBeGreaterThanOrEqual(5);
});

test('pause lets shards under way be acknowledged and tells the server', async () => {
  const run = aRun({ stopping: { frameErrors: 1_000_000, maxFrames: 1e9 } });
  const { driver, stored, states } = world(run, [aPoint('a')]);
  await driver.start();
  await until(() => stored.size > 3);
  await driver.pause();
  expect(driver.view().status).toBe('paused');
  expect(states).toEqual(['running', 'paused']);
  expect(driver.view().pointTallies.get('a')!.frames).toBe(stored.size * framesPerShard);
  await driver.start();
  const before = stored.size;
  await until(() => stored.size > before);
  await driver.stop();
  expect(driver.view().status).toBe('stopped');
});

test('a run that is stopped, or whose page is left, hands out nothing more', async () => {
  for (const leave of ['stop', 'dispose'] as const) {
    const { driver, stored, computed } = world(aRun({ stopping: { frameErrors: 1_000_000, maxFrames: 1e9 } }), [
      aPoint('a'),
    ]);
    await driver.start();
    await until(() => stored.size > 3);
    const left = driver[leave]();
    const before = computed.count;
    await left;
    await until(() => true);
    expect(computed.count).toBe(before);
  }
});

test('a worker that refuses its spec fails the run with the reason', async () => {
  const { driver, faults, failures } = world(aRun(), [aPoint('a')]);
  faults.computeFails = true;
  await driver.start();
  await until(() => driver.view().status === 'failed');
  expect(driver.view().message).toBe('threshold: too large');
  // Each was told to the server, which sets a shard aside at the third.
  expect(failures.length).toBeGreaterThanOrEqual(3);
});

test('time left falls as errors come in, and is unknown before the first shard', async () => {
  const run = aRun({ stopping: { frameErrors: 50, maxFrames: 1e9 } });
  const { driver, views } = world(run, [aPoint('a')]);
  expect(driver.view().timeLeftMs).toBeNull();
  await driver.start();
  await until(() => driver.view().status === 'finished');
  const known = views
    .filter((view) => view.timeLeftMs !== null && view.status === 'running')
    .map((view) => view.timeLeftMs!);
  expect(known.length).toBeGreaterThan(3);
  expect(known.at(-1)!).toBeLessThan(known[0]!);
});
