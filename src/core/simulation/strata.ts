import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { ParamError } from '../errors.ts';
import type { RunSpec } from './run-spec.ts';
import { type Kernel, runShard, type ShardOptions } from './shard.ts';
import type { Tally } from './tally.ts';

/** Decodes a shard of uniformly random patterns of one weight: errors, or erasures for a decoder of these. The strata of
 *  a seed and index share their stream, so that their counts are not independent of each other; `stratifiedRate` does
 *  not need them to be.
 *  @throws ParamError on a weight over n, on a decoder that would need to know p, on a channel without strata. */
export async function runStratum(
  spec: RunSpec,
  weight: number,
  index: number,
  kernel: Kernel = 'wasm',
  options: ShardOptions = {},
): Promise<Tally> {
  return runShard(stratumSpec(spec, weight), index, kernel, options);
}

/** The spec with its channel replaced by a stratum of it. */
export function stratumSpec(spec: RunSpec, weight: number): RunSpec {
  if (!Number.isInteger(weight) || weight < 0 || weight > spec.H.cols)
    throw new ParamError('weight', weight, `a whole number from 0 to ${spec.H.cols}`);
  if (!hasStrata(spec.channel.kind))
    throw new ParamError('channel.kind', spec.channel.kind, 'a channel of independent errors or erasures: bsc, bec');
  refuseKnowingDecoder(spec.decoder);
  return { ...spec, channel: { kind: 'stratum', weight } };
}

/** Given their number, errors are equally likely to be anywhere: only where bits fail independently and alike. */
function hasStrata(kind: RunSpec['channel']['kind']): boolean {
  return kind === 'bsc' || kind === 'awgn-hard' || kind === 'bec' || kind === 'stratum';
}

/** What fails at one weight must not depend on p. */
function refuseKnowingDecoder(decoder: DecoderSpec): void {
  for (const stage of decoder.kind === 'two-stage' ? decoder.stages : [decoder]) {
    if (stage.kind === 'sum-product' && stage.designP === undefined)
      throw new ParamError('decoder.designP', undefined, 'a fixed p for sum-product to assume in strata');
  }
}
