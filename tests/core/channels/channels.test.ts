import { describe, expect, it } from 'vitest';
import { noiseDeviation } from '../../../src/core/channels/awgn.ts';
import type { Channel } from '../../../src/core/channels/channel.ts';
import { createGaussian } from '../../../src/core/channels/gaussian.ts';
import { meanCrossover, stationaryBadShare } from '../../../src/core/channels/gilbert-elliott.ts';
import { channelReading } from '../../../src/core/channels/reading.ts';
import { erased } from '../../../src/core/decoders/decoder.ts';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { fixedPointChannel } from '../../../src/core/decoders/min-sum.ts';
import { ParamError } from '../../../src/core/errors.ts';
import { enumerateStratum } from '../../../src/core/simulation/enumerate-stratum.ts';
import { createFrameSource } from '../../../src/core/simulation/frames.ts';
import { createPatternSource } from '../../../src/core/simulation/patterns.ts';
import { randomFrom } from '../../../src/core/simulation/random.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { type Stratum, stratifiedRate } from '../../../src/core/simulation/stratified-rate.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';

const H = developed(21, planarDifferenceSets[4].set);
const spec = (channel: Channel, decoder: DecoderSpec = { kind: 'min-sum' }, over: Partial<RunSpec> = {}): RunSpec => ({
  H,
  channel,
  decoder,
  seed: 'channels',
  framesPerShard: 4000,
  ...over,
});
const burst: Extract<Channel, { kind: 'gilbert-elliott' }> = {
  kind: 'gilbert-elliott',
  pGood: 0.01,
  pBad: 0.3,
  goodToBad: 0.05,
  badToGood: 0.2,
};

/** Which positions were hit, by frame. */
async function hits(channel: Channel, frames: number): Promise<Uint8Array[]> {
  const source = await createPatternSource(spec(channel), 0);
  const into = new Uint32Array(21);
  return Array.from({ length: frames }, () => {
    const hit = new Uint8Array(21);
    const count = source.next(into);
    for (const j of into.subarray(0, count)) hit[j] = 1;
    return hit;
  });
}

describe('the Gilbert–Elliott channel', () => {
  it('is in its stationary state at every bit, the first included', async () => {
    expect(stationaryBadShare(burst)).toBe(0.2);
    expect(meanCrossover(burst)).toBeCloseTo(0.068, 12);
    const frames = 20_000;
    const counts = new Float64Array(21);
    for (const hit of await hits(burst, frames)) for (let j = 0; j < 21; j++) counts[j]! += hit[j]!;
    for (const count of counts)
      expect(Math.abs(count - frames * 0.068)).toBeLessThan(4.5 * Math.sqrt(frames * 0.068 * 0.932));
  });

  it('has the covariance of neighbours that the chain gives', async () => {
    // Cov = (pBad − pGood)²·π(1 − π)·(1 − g − b) at distance one.
    const covariance = 0.29 ** 2 * 0.2 * 0.8 * (1 - 0.05 - 0.2);
    let both = 0;
    const frames = 20_000;
    for (const hit of await hits(burst, frames)) for (let j = 0; j < 20; j++) both += hit[j]! & hit[j + 1]!;
    const pairs = 20 * frames;
    expect(Math.abs(both / pairs - 0.068 ** 2 - covariance)).toBeLessThan(0.001);
  });

  it('with both states alike is a binary symmetric channel', async () => {
    const alike = { ...burst, pGood: 0.05, pBad: 0.05 };
    const bursty = await runShard(spec(alike, { kind: 'gallager-b' }), 0);
    const plain = await runShard(spec({ kind: 'bsc', p: 0.05 }, { kind: 'gallager-b' }), 0);
    const spread = Math.sqrt((2 * 0.085 * 0.915) / 4000);
    expect(Math.abs(bursty.frameErrors - plain.frameErrors) / 4000).toBeLessThan(4.5 * spread);
  });
});

describe('the Z channel', () => {
  it('flips ones only, in words that are random by default', async () => {
    const source = await createFrameSource(spec({ kind: 'z', p: 0.4 }), 0);
    let ones = 0;
    let flipped = 0;
    for (let f = 0; f < 2000; f++) {
      const { sent, received } = source.next();
      sent.forEach((bit, j) => {
        if (bit === 0) expect(received[j]).toBe(0);
        ones += bit;
        flipped += bit & ~received[j]!;
      });
    }
    expect(Math.abs(ones / (2000 * 21) - 0.5)).toBeLessThan(0.02);
    expect(Math.abs(flipped / ones - 0.4)).toBeLessThan(0.015);
  });

  it('harms nothing when zeros are sent', async () => {
    const tally = await runShard(spec({ kind: 'z', p: 0.4 }, { kind: 'gallager-b' }, { sent: 'zero' }), 0);
    expect(tally.frameErrors).toBe(0);
  });

  it('is read by soft decoders as certain ones and doubtful zeros', () => {
    const into = new Float64Array(2);
    channelReading({ kind: 'z', p: 0.25 }, undefined)(Uint8Array.of(0, 1), into);
    expect(into[0]).toBeCloseTo(Math.log(4), 12);
    expect(into[1]).toBeLessThan(-20);
  });
});

describe('the erasure channel', () => {
  it.each<DecoderSpec>([{ kind: 'peeling' }, { kind: 'elimination' }])(
    'under $kind meets the exact rate from all erasure patterns',
    async (decoder) => {
      const [e, frames] = [0.4, 20_000];
      const strata: Stratum[] = [];
      for (let weight = 0; weight <= 21; weight++)
        strata.push({
          weight,
          ...(await enumerateStratum(spec({ kind: 'bec', e }, decoder), weight)),
          grade: 'computed',
        });
      const exact = stratifiedRate(strata, 21, e, 0.95);
      const tally = await runShard(spec({ kind: 'bec', e }, decoder, { framesPerShard: frames }), 0);
      const spread = Math.sqrt((exact.estimate * (1 - exact.estimate)) / frames);
      expect(Math.abs(tally.frameErrors / frames - exact.estimate)).toBeLessThan(4 * spread);
      expect(Math.abs(tally.bitErrors / tally.bits / exact.ber!.estimate - 1)).toBeLessThan(0.08);
    },
  );

  it('marks erased bits, and at e = 1 all of them', async () => {
    const source = await createFrameSource(spec({ kind: 'bec', e: 1 }, { kind: 'peeling' }), 0);
    expect(Array.from(source.next().received)).toEqual(new Array(21).fill(erased));
  });
});

describe('the Gaussian channel', () => {
  it('has noise of mean 0, the stated variance and the fourth moment of a Gaussian', () => {
    const gaussian = createGaussian(randomFrom([3, 5, 7, 9]));
    const draws = 300_000;
    let [sum, squares, fourth, beyond] = [0, 0, 0, 0];
    for (let i = 0; i < draws; i++) {
      const x = gaussian();
      sum += x;
      squares += x * x;
      fourth += x ** 4;
      if (Math.abs(x) > 3) beyond += 1;
    }
    expect(Math.abs(sum / draws)).toBeLessThan(5 / Math.sqrt(draws));
    expect(Math.abs(squares / draws - 1)).toBeLessThan(5 * Math.sqrt(2 / draws));
    expect(Math.abs(fourth / draws - 3)).toBeLessThan(5 * Math.sqrt(96 / draws));
    expect(Math.abs(beyond - draws * 0.0026997961)).toBeLessThan(5 * Math.sqrt(draws * 0.0027));
  });

  it('gives fewer failures to soft decoding than to hard decisions at the same Eb/N0', async () => {
    const soft = await runShard(spec({ kind: 'awgn', ebn0Db: 3 }, { kind: 'sum-product' }), 0);
    const fixed = await runShard(spec({ kind: 'awgn', ebn0Db: 3 }, { kind: 'min-sum', schedule: 'flooding' }), 0);
    const hard = await runShard(spec({ kind: 'awgn-hard', ebn0Db: 3 }, { kind: 'gallager-b' }), 0);
    expect(soft.frameErrors).toBeLessThan(hard.frameErrors / 2);
    expect(fixed.frameErrors).toBeLessThan(hard.frameErrors / 2);
    expect(soft.frameErrors).toBeGreaterThan(0);
  });

  it('fails alike whatever is sent', async () => {
    const zero = await runShard(spec({ kind: 'awgn', ebn0Db: 2 }), 0);
    expect(await runShard(spec({ kind: 'awgn', ebn0Db: 2 }, { kind: 'min-sum' }, { sent: 'random' }), 0)).toEqual(zero);
  });

  it('works out the rate from the matrix, 11/21 for PG(2,4), when none is given', async () => {
    const given = await runShard(spec({ kind: 'awgn', ebn0Db: 2 }, { kind: 'min-sum' }, { rate: 11 / 21 }), 0);
    expect(await runShard(spec({ kind: 'awgn', ebn0Db: 2 }), 0)).toEqual(given);
  });

  it('is read as 2y/σ², and by min-sum as y·c/2 rounded and cut at c', () => {
    const into = new Float64Array(2);
    channelReading({ kind: 'awgn', ebn0Db: 0 }, 0.5)(Float64Array.of(1, -0.25), into);
    expect(Array.from(into)).toEqual([2, -0.5]);
    expect(noiseDeviation(0, 0.5)).toBe(1);
    const fixed = new Int8Array(4);
    fixedPointChannel(Float64Array.of(1, -0.07, 3, -2.5), Uint8Array.of(0, 1, 0, 1), 16, fixed);
    expect(Array.from(fixed)).toEqual([8, -1, 16, -16]);
  });

  it('is no channel of a stratum, and none is erasures to a soft reading', () => {
    expect(() => channelReading({ kind: 'bec', e: 0.1 }, undefined)).toThrow(ParamError);
    expect(() => channelReading({ kind: 'stratum', weight: 1 }, undefined)).toThrow(ParamError);
  });
});

describe('codewords sent at random', () => {
  it('are codewords, and different ones', async () => {
    const source = await createFrameSource(
      spec({ kind: 'bsc', p: 0.1 }, { kind: 'gallager-b' }, { sent: 'random' }),
      0,
    );
    const seen = new Set<string>();
    for (let f = 0; f < 50; f++) {
      const { sent } = source.next();
      for (let i = 0; i < 21; i++)
        expect(H.colIndex.subarray(5 * i, 5 * i + 5).reduce((sum, j) => sum ^ sent[j]!, 0)).toBe(0);
      seen.add(sent.join(''));
    }
    expect(seen.size).toBeGreaterThan(40);
  });
});
