import { describe, expect, it } from 'vitest';
import { matrixFromRows } from '../../../src/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { ParamError } from '../../../src/core/errors.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { impossibleTally } from '../../../src/core/simulation/tally.ts';
import { developed } from '../../reference/difference-sets.ts';

const H = developed(21, [0, 1, 4, 14, 16]);
const spec = (decoder: DecoderSpec, over: Partial<RunSpec> = {}): RunSpec => ({
  H,
  channel: { kind: 'bsc', p: 0.05 },
  decoder,
  seed: 'shard test',
  framesPerShard: 400,
  ...over,
});

describe('a shard', () => {
  it.each<DecoderSpec>([
    { kind: 'majority-logic' },
    { kind: 'gallager-a' },
    { kind: 'gallager-b' },
    { kind: 'bit-flipping' },
    { kind: 'bit-flipping-max' },
    { kind: 'gradient-descent' },
    { kind: 'sum-product' },
    { kind: 'min-sum' },
    { kind: 'two-stage', stages: [{ kind: 'bit-flipping' }, { kind: 'sum-product' }] },
  ])('of $kind gives a possible tally, the same each time', async (decoder) => {
    const tally = await runShard(spec(decoder), 3);
    expect(impossibleTally(tally, 21, 400)).toBeNull();
    expect(tally.frameErrors).toBeGreaterThan(0);
    expect(await runShard(spec(decoder), 3)).toEqual(tally);
    const stages = decoder.kind === 'two-stage' ? decoder.stages : [decoder];
    // Floating point agrees within its interval only.
    if (stages.every(({ kind }) => kind !== 'sum-product'))
      expect(await runShard(spec(decoder), 3, 'reference')).toEqual(tally);
  });

  it('has other frames than the next shard', async () => {
    const decoder: DecoderSpec = { kind: 'bit-flipping' };
    expect(await runShard(spec(decoder), 1)).not.toEqual(await runShard(spec(decoder), 0));
  });

  it.each<DecoderSpec>([{ kind: 'gallager-b' }, { kind: 'min-sum' }, { kind: 'gradient-descent', flips: 'single' }])(
    'of $kind comes out the same whatever codewords are sent',
    async (decoder) => {
      const zero = await runShard(spec(decoder, { sent: 'zero' }), 0);
      expect(await runShard(spec(decoder, { sent: 'random' }), 0)).toEqual(zero);
    },
  );

  it('counts errors over the information bits alone when asked', async () => {
    const all = await runShard(spec({ kind: 'gallager-b' }), 0);
    const information = await runShard(spec({ kind: 'gallager-b' }, { bits: 'information' }), 0);
    expect(information.bits).toBe(400 * 11);
    expect(information.bitErrors).toBeLessThan(all.bitErrors);
    expect(information.bitErrors).toBeGreaterThan(0.3 * all.bitErrors);
    expect([information.frameErrors, information.iterations]).toEqual([all.frameErrors, all.iterations]);
  });

  it('pauses often enough to be stopped within 50 ms, and stops', async () => {
    const controller = new AbortController();
    let pauses = 0;
    const pause = async () => {
      if (++pauses === 3) controller.abort(new Error('stopped'));
    };
    const long = spec({ kind: 'sum-product' }, { framesPerShard: 1_000_000, channel: { kind: 'bsc', p: 0.2 } });
    const from = performance.now();
    await expect(runShard(long, 0, 'reference', { signal: controller.signal, pause })).rejects.toThrow('stopped');
    expect((performance.now() - from) / pauses).toBeLessThan(50);
  });
});

describe('a spec is refused', () => {
  const refused = (over: Partial<RunSpec>, param: string) => async () => {
    const error = await runShard({ ...spec({ kind: 'bit-flipping' }), ...over }, 0).catch((e: unknown) => e);
    expect(error).toBeInstanceOf(ParamError);
    expect((error as ParamError).param).toBe(param);
  };
  it('at p = 0', refused({ channel: { kind: 'bsc', p: 0 } }, 'channel.p'));
  it('at p over a half', refused({ channel: { kind: 'bsc', p: 0.51 } }, 'channel.p'));
  it('with zero frames', refused({ framesPerShard: 0 }, 'framesPerShard'));
  it('with half a frame', refused({ framesPerShard: 0.5 }, 'framesPerShard'));
  it(
    'with a threshold above the column weight',
    refused({ decoder: { kind: 'bit-flipping', threshold: 6 } }, 'decoder.threshold'),
  );
  it(
    'with a message threshold above the column weight',
    refused({ decoder: { kind: 'gallager-b', threshold: [3, 6] } }, 'decoder.threshold'),
  );
  it('where min-sum would saturate', refused({ decoder: { kind: 'min-sum', c: 16, rMax: 23 } }, 'decoder.rMax'));
  it('where the channel value leaves no room', refused({ decoder: { kind: 'min-sum', c: 123 } }, 'decoder.c'));
  it('with an empty column', refused({ H: matrixFromRows(4, [[0, 1, 2]]) }, 'H'));
  it('with a pattern weight over n', refused({ channel: { kind: 'stratum', weight: 22 } }, 'channel.weight'));
  it('with a decoder of errors on erasures', refused({ channel: { kind: 'bec', e: 0.1 } }, 'decoder.kind'));
  it('with a decoder of erasures on errors', refused({ decoder: { kind: 'peeling' } }, 'channel.kind'));
  it('with hard decisions on real outputs', refused({ channel: { kind: 'awgn', ebn0Db: 3 } }, 'decoder.kind'));
  it(
    'with sum-product on a stratum and no design p',
    refused({ channel: { kind: 'stratum', weight: 2 }, decoder: { kind: 'sum-product' } }, 'decoder.designP'),
  );
  it(
    'with more iterations than a tally holds',
    refused(
      {
        decoder: {
          kind: 'two-stage',
          stages: [
            { kind: 'gallager-b', iterations: 1000 },
            { kind: 'bit-flipping', iterations: 1000 },
          ],
        },
      },
      'decoder.iterations',
    ),
  );
  it('with a negative index', async () => {
    await expect(runShard(spec({ kind: 'bit-flipping' }), -1)).rejects.toThrow(ParamError);
  });
});
