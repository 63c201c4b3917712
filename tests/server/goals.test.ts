import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Goal } from '@/api/runs.ts';
import { enumerateStratum } from '@/core/simulation/enumerate-stratum.ts';
import { type Bench, openBench } from './scheduling-kit.ts';

let at: Bench;
beforeEach(async () => {
  at = await openBench();
});
afterEach(() => at.close());

const majority = { kind: 'majority-logic' } as const;

describe('a run to a goal', () => {
  it('measures a curve from where errors are plentiful down the waterfall, and ends complete', async () => {
    const goal: Goal = {
      kind: 'curve',
      curves: [{ codeId: at.codeId, decoder: majority }],
      from: 0.12,
      to: 0.01,
      points: 6,
    };
    const run = await at.state({ goal, place: 'server', stopping: { frameErrors: 20, maxFrames: 20_000 } });
    expect(run.points.map((point) => point.channel)).toEqual([{ kind: 'bsc', p: 0.12 }]);
    at.startServer(1);
    const { run: ended, points } = await at.finished(run.id);
    const ps = points.map(({ channel }) => (channel.kind === 'bsc' ? channel.p : 0));
    expect(points).toHaveLength(6);
    expect(Math.min(...ps)).toBeLessThan(0.04);
    expect(points.every((point) => point.tally.frameErrors >= 20 || point.stopReason === 'frames')).toBe(true);
    expect(ended.outcome).toMatchObject({ verdict: 'complete', text: '1 curve in 6 points.' });
  });

  it('shows that UBER keeps a limit far below what frames at that p could show, and tells the owner', async () => {
    const goal: Goal = {
      kind: 'limit',
      codeId: at.codeId,
      decoder: majority,
      p: 1e-3,
      rate: 'uber',
      target: 2e-7,
      level: 0.95,
    };
    const run = await at.state({ goal, place: 'server', stopping: { maxFrames: 1e6 } });
    at.startServer(1);
    const { run: ended, points } = await at.finished(run.id);
    expect(ended.outcome).toMatchObject({
      verdict: 'pass',
      text: expect.stringContaining('UBER at p = 0.001 is at most 2e-7'),
    });
    expect(ended.outcome!.upper).toBeLessThanOrEqual(2e-7);
    expect(await at.db('notices').where({ kind: 'verdict-reached' })).toHaveLength(1);
    // The smallest weight beyond the proved radius was tried whole: the sum of its shards is the enumeration's.
    const tried = points.filter((point) => point.plan?.enumerate);
    expect(tried.length).toBeGreaterThan(0);
    for (const point of tried) {
      const weight = point.channel.kind === 'stratum' ? point.channel.weight : 0;
      const spec = {
        H: at.H,
        channel: { kind: 'bsc' as const, p: 0.01 },
        decoder: majority,
        seed: '',
        framesPerShard: 1,
      };
      const whole = await enumerateStratum(spec, weight);
      expect([point.tally.frames, point.tally.frameErrors]).toEqual([whole.frames, whole.frameErrors]);
    }
  });

  it('says that a rate is above a limit it does not keep', async () => {
    const goal: Goal = {
      kind: 'limit',
      codeId: at.codeId,
      decoder: majority,
      p: 0.05,
      rate: 'fer',
      target: 1e-3,
      level: 0.95,
    };
    const run = await at.state({ goal, place: 'server', stopping: { maxFrames: 1e6 } });
    at.startServer(1);
    const { run: ended } = await at.finished(run.id);
    expect(ended.outcome).toMatchObject({ verdict: 'fail', text: expect.stringContaining('is above 0.001') });
    expect(ended.outcome!.lower).toBeGreaterThan(1e-3);
  });

  it('with a sequential test ends as soon as the verdict stands', async () => {
    const verdict = { limit: 0.5, ratio: 2, falsePass: 0.01, falseFail: 0.01 };
    const run = await at.state({
      place: 'server',
      stopping: { maxFrames: 1e6, verdict },
      points: [0.001, 0.3].map((p) => ({ channel: { kind: 'bsc' as const, p }, decoder: majority })),
    });
    at.startServer(1);
    const { points } = await at.finished(run.id);
    expect(points.map((point) => point.stopReason)).toEqual(['pass', 'fail']);
    expect(points.every((point) => point.tally.frames < 10_000)).toBe(true);
  });
});
