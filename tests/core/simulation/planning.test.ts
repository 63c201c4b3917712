import { describe, expect, it } from 'vitest';
import { ParamError } from '../../../src/core/errors.ts';
import { calibrate } from '../../../src/core/simulation/calibrate.ts';
import { framesLeft, framesToPlan, guessRate } from '../../../src/core/simulation/planning.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { describeKernel, runShard } from '../../../src/core/simulation/shard.ts';
import { countedShards, stoppingReason } from '../../../src/core/simulation/stopping.ts';
import { emptyTally, type Tally } from '../../../src/core/simulation/tally.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';
import { simulatedCodes } from '../../reference/simulated-codes.ts';

const shard = (frames: number, frameErrors: number): Tally => ({ ...emptyTally(), frames, frameErrors });
const rule = { frameErrors: 10, maxFrames: 1000 };

describe('stopping', () => {
  it('is on errors or on frames, whichever comes first', () => {
    expect(stoppingReason(shard(100, 9), rule)).toBeNull();
    expect(stoppingReason(shard(100, 10), rule)).toBe('errors');
    expect(stoppingReason(shard(1000, 3), rule)).toBe('frames');
  });

  it('counts shards in index order up to the first that meets the rule, and none after a gap', () => {
    const shards = [shard(100, 4), shard(100, 4), shard(100, 4), shard(100, 4)];
    const counted = countedShards(shards, rule);
    expect([counted.count, counted.tally.frameErrors, counted.before.frameErrors, counted.reason]).toEqual([
      3,
      12,
      8,
      'errors',
    ]);
    expect(countedShards([shards[0], undefined, shards[2]], rule)).toMatchObject({ count: 1, reason: null });
    expect(countedShards([], rule)).toMatchObject({ count: 0, reason: null });
  });
});

describe('planning', () => {
  it('tells the frames left, with limits, and only the end of the rule while there is no error', () => {
    const left = framesLeft(shard(1000, 5), { frameErrors: 10, maxFrames: 1e6 });
    expect(left.expected).toBe(1000);
    expect(left.lower).toBeLessThan(1000);
    expect(left.upper).toBeGreaterThan(1000);
    expect(framesLeft(shard(1000, 0), { frameErrors: 10, maxFrames: 1e6 }).expected).toBe(999_000);
    expect(framesLeft(shard(1000, 10), { frameErrors: 10, maxFrames: 1e6 }).expected).toBe(0);
    expect(framesLeft(shard(0, 0), rule)).toEqual({ expected: 1000, lower: 10, upper: 1000 });
  });

  it('guesses a rate by a power law between and beyond measured points', () => {
    const points = [0.01, 0.02, 0.04].map((p) => ({ p, fer: 1000 * p ** 4 }));
    for (const p of [0.005, 0.015, 0.03, 0.05]) expect(guessRate(points, p)).toBeCloseTo(1000 * p ** 4, 10);
    expect(() => guessRate(points.slice(0, 1), 0.02)).toThrow(ParamError);
  });

  it('plans whole shards', () => {
    expect(framesToPlan(1e-3, { frameErrors: 100, maxFrames: 1e9 }, 30_000)).toBe(120_000);
    expect(framesToPlan(0, rule, 300)).toBe(1200);
  });
});

describe('calibration', () => {
  const plane16: RunSpec = {
    H: simulatedCodes.pg16!(),
    channel: { kind: 'bsc', p: 0.028 },
    decoder: { kind: 'min-sum', iterations: 15 },
    seed: 'calibration',
    framesPerShard: 1500,
  };

  it('of min-sum on PG(2,16) finds a small scale far better than none', async () => {
    const { decoder, trials } = await calibrate(plane16);
    expect(decoder).toMatchObject({ kind: 'min-sum' });
    const unscaled = trials.find((trial) => 'scale' in trial.decoder && trial.decoder.scale === '1')!;
    expect(trials[0]!.tally.frameErrors).toBeLessThan(unscaled.tally.frameErrors / 2);
    expect(await runShard({ ...plane16, decoder }, 0)).toEqual(trials[0]!.tally);
  });

  it('of bit flipping returns the threshold with the fewest failures', async () => {
    const { decoder, trials } = await calibrate({
      ...plane16,
      channel: { kind: 'bsc', p: 0.014 },
      decoder: { kind: 'bit-flipping' },
    });
    expect(decoder).toMatchObject({ kind: 'bit-flipping' });
    expect(trials.length).toBe(10);
    expect(trials[0]!.tally.frameErrors).toBe(Math.min(...trials.map(({ tally }) => tally.frameErrors)));
  });

  it('is refused for decoders without settings', async () => {
    await expect(calibrate({ ...plane16, decoder: { kind: 'majority-logic' } })).rejects.toThrow(ParamError);
  });
});

describe('the path a shard takes', () => {
  const plane4 = developed(21, planarDifferenceSets[4].set);
  const spec = (decoder: RunSpec['decoder'], channel: RunSpec['channel']): RunSpec => ({
    H: plane4,
    channel,
    decoder,
    seed: '',
    framesPerShard: 10,
  });

  it('is the fast kernel for bit flipping on the binary symmetric channel', async () => {
    const { kernel } = await describeKernel(spec({ kind: 'bit-flipping' }, { kind: 'bsc', p: 0.1 }));
    expect(kernel).toBe('wasm');
  });

  it('is the reference, with the reason, where there is no kernel', async () => {
    const described = await describeKernel(spec({ kind: 'sum-product' }, { kind: 'awgn', ebn0Db: 3 }));
    expect(described.kernel).toBe('reference');
    expect(described.reason).toContain('awgn');
  });
});
