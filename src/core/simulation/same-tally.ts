import type { Channel } from '../channels/channel.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import type { Tally } from './tally.ts';

/** Whether two computations of one shard may both be right. Hard decisions and fixed point give the same tally to the
 *  last integer everywhere. Where floating point decides, another engine's logarithm may turn a frame that stands on the
 *  edge: then at most two failed frames and one in a thousand may differ. */
export function sameTally(
  a: Tally,
  b: Tally,
  { decoder, channel }: { decoder: DecoderSpec; channel: Channel },
): boolean {
  if (isFloating(decoder) || channel.kind === 'awgn') {
    const leeway = 2 + a.frames / 1000;
    return a.frames === b.frames && a.bits === b.bits && Math.abs(a.frameErrors - b.frameErrors) <= leeway;
  }
  const { iterationHistogram: stepsOfA, ...sumsOfA } = a;
  const { iterationHistogram: stepsOfB, ...sumsOfB } = b;
  const names = Object.keys(sumsOfA) as (keyof typeof sumsOfA)[];
  return (
    names.every((name) => sumsOfA[name] === sumsOfB[name]) &&
    stepsOfA.length === stepsOfB.length &&
    stepsOfA.every((count, i) => count === stepsOfB[i])
  );
}

const isFloating = (decoder: DecoderSpec): boolean =>
  decoder.kind === 'sum-product' || (decoder.kind === 'two-stage' && decoder.stages.some(isFloating));
