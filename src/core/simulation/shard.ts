import { ParamError } from '../errors.ts';
import { rank } from '../gf2/rank.ts';
import { fastShard, simdAvailable } from '../kernels/index.ts';
import { referenceShard } from './reference-shard.ts';
import type { RunSpec } from './run-spec.ts';
import type { Tally } from './tally.ts';
import { validateSpec } from './validate-spec.ts';

export type Kernel = 'reference' | 'wasm';

/** How a long shard stays polite: core has no clock and no timers of its own, so whoever runs it brings the pause. */
export interface ShardOptions {
  /** Checked at every pause; once aborted the shard rejects with the signal's reason. */
  signal?: AbortSignal;
  /** Awaited about every 10 ms of work; a worker passes one that lets its messages in. */
  pause?: () => Promise<void>;
}

/** Decodes the frames of shard `index`; a pure function of spec and index. `wasm` runs the fast kernel where there is
 *  one for the decoder and the engine, and the readable reference elsewhere; `describeKernel` says which. Both give the
 *  same tally to the last integer, except sum-product, which agrees within its interval.
 *  @throws ParamError on a spec out of range. */
export async function runShard(
  spec: RunSpec,
  index: number,
  kernel: Kernel = 'wasm',
  options: ShardOptions = {},
): Promise<Tally> {
  checkCall(index, kernel);
  validateSpec(spec);
  const complete = withRate(spec);
  const fast = kernel === 'wasm' && spec.bits !== 'information' ? fastShard(complete, index, options) : null;
  return fast ?? drive(referenceShard(complete, index), options);
}

/** Which path `runShard` takes for a spec, and why. Makes the kernel where there is one, and decodes a frame.
 *  @throws ParamError on a spec out of range. */
export async function describeKernel(spec: RunSpec): Promise<{ kernel: Kernel; reason: string }> {
  validateSpec(spec);
  if (!simdAvailable())
    return { kernel: 'reference', reason: 'this engine has no WebAssembly SIMD, so frames are decoded one at a time' };
  if (spec.bits === 'information')
    return { kernel: 'reference', reason: 'errors of the information bits alone are counted one frame at a time' };
  const fast = fastShard({ ...withRate(spec), framesPerShard: 1 }, 0);
  if (!fast)
    return {
      kernel: 'reference',
      reason: `no fast kernel for ${spec.decoder.kind} on ${spec.channel.kind}: frames are decoded one at a time`,
    };
  await fast;
  return { kernel: 'wasm', reason: `a kernel made for this matrix and ${spec.decoder.kind}` };
}

/** Runs a shard that hands back control now and then, to its end or until it is stopped. */
export async function drive<T>(shard: AsyncGenerator<unknown, T>, { signal, pause }: ShardOptions): Promise<T> {
  for (;;) {
    signal?.throwIfAborted();
    const step = await shard.next();
    if (step.done) return step.value;
    if (pause) await pause();
  }
}

function checkCall(index: number, kernel: Kernel): void {
  if (kernel !== 'reference' && kernel !== 'wasm') throw new ParamError('kernel', kernel, '"reference" or "wasm"');
  if (!Number.isSafeInteger(index) || index < 0) throw new ParamError('index', index, 'a shard index from 0');
}

/** The spec with its rate filled in where the channel is stated by Eb/N0. */
export function withRate(spec: RunSpec): RunSpec {
  if (spec.rate !== undefined || (spec.channel.kind !== 'awgn' && spec.channel.kind !== 'awgn-hard')) return spec;
  return { ...spec, rate: (spec.H.cols - rank(spec.H)) / spec.H.cols };
}
