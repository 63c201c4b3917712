import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Channel } from '../../../src/core/channels/channel.ts';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { laneShard } from '../../../src/core/simulation/lane-shard.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { describeKernel, drive, runShard } from '../../../src/core/simulation/shard.ts';
import { quasiCyclicMatrix, smallMatrix } from '../../models/random-matrix.ts';
import { simulatedCodes } from '../../reference/simulated-codes.ts';

const burst: Channel = { kind: 'gilbert-elliott', pGood: 0.01, pBad: 0.3, goodToBad: 0.05, badToGood: 0.2 };
const inLanes = (spec: RunSpec, index = 0) => drive(laneShard(spec, index)!, {});

const decoders: DecoderSpec[] = [
  { kind: 'majority-logic' },
  { kind: 'gallager-a', iterations: 7 },
  { kind: 'gallager-b', iterations: 1 },
  { kind: 'gallager-b' },
  { kind: 'gallager-b', threshold: 1 },
  { kind: 'bit-flipping' },
  { kind: 'bit-flipping', threshold: 1, iterations: 3 },
];
const channels: Channel[] = [{ kind: 'bsc', p: 0.1 }, { kind: 'z', p: 0.3 }, { kind: 'stratum', weight: 2 }, burst];

describe('a shard in 32 lanes', () => {
  it('has the tally of the reference to the last integer, for any matrix, decoder, channel and number of frames', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(smallMatrix, quasiCyclicMatrix),
        fc.constantFrom(...decoders),
        fc.constantFrom(...channels),
        fc.integer({ min: 1, max: 150 }),
        fc.string({ maxLength: 4 }),
        async (H, decoder, channel, framesPerShard, seed) => {
          const spec: RunSpec = { H, channel, decoder, seed, framesPerShard };
          expect(await inLanes(spec)).toEqual(await runShard(spec, 0, 'reference'));
        },
      ),
      { numRuns: 250 },
    );
  });

  it.each<DecoderSpec>([{ kind: 'bit-flipping', threshold: 10 }, { kind: 'gallager-b' }, { kind: 'majority-logic' }])(
    'of $kind on PG(2,16) has the tally of the reference and of the kernel',
    async (decoder) => {
      const spec: RunSpec = {
        H: simulatedCodes.pg16!(),
        channel: { kind: 'bsc', p: 0.018 },
        decoder,
        seed: 'lanes',
        framesPerShard: 700,
      };
      const lanes = await inLanes(spec, 4);
      expect(lanes).toEqual(await runShard(spec, 4, 'reference'));
      expect(lanes).toEqual(await runShard(spec, 4, 'wasm'));
    },
  );

  it('serves channels that no kernel draws, and says so', async () => {
    const spec: RunSpec = {
      H: simulatedCodes.pg8!(),
      channel: burst,
      decoder: { kind: 'bit-flipping' },
      seed: '',
      framesPerShard: 100,
    };
    const described = await describeKernel(spec);
    expect(described.kernel).toBe('lanes');
    expect(described.reason).toContain('gilbert-elliott');
    expect(await runShard(spec, 0, 'wasm')).toEqual(await runShard(spec, 0, 'reference'));
  });

  it('is not there for other decoders, changing thresholds, erasures and real outputs', () => {
    const H = simulatedCodes.pg8!();
    const spec = { H, channel: { kind: 'bsc', p: 0.1 } as Channel, seed: '', framesPerShard: 1 };
    expect(laneShard({ ...spec, decoder: { kind: 'min-sum' } }, 0)).toBeNull();
    expect(laneShard({ ...spec, decoder: { kind: 'gallager-b', threshold: [5, 4] } }, 0)).toBeNull();
    expect(laneShard({ ...spec, channel: { kind: 'bec', e: 0.1 }, decoder: { kind: 'bit-flipping' } }, 0)).toBeNull();
    expect(
      laneShard({ ...spec, channel: { kind: 'awgn', ebn0Db: 1 }, decoder: { kind: 'bit-flipping' } }, 0),
    ).toBeNull();
  });
});
