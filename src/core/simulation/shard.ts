import { ParamError } from '../errors.ts';
import { rank } from '../gf2/rank.ts';
import { fastShard, simdAvailable } from '../kernels/index.ts';
import { laneShard } from './lane-shard.ts';
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
 *  one for the decoder and the engine, 32 lanes of TypeScript for simple hard decisions elsewhere, and the readable
 *  reference for the rest; `describeKernel` says which. All give the same tally to the last integer, except sum-product,
 *  which agrees within its interval.
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
  if (fast) return fast;
  const lanes = kernel === 'wasm' ? laneShard(complete, index) : null;
  return drive(lanes ?? referenceShard(complete, index), options);
}

/** The path a shard takes: a kernel made for its matrix, 32 frames at a time in TypeScript, or one at a time. */
export interface KernelDescription {
  kernel: Kernel | 'lanes';
  reason: string;
}

/** Which path `runShard` takes for a spec, and why. Makes the kernel where there is one, and decodes a frame.
 *  @throws ParamError on a spec out of range. */
export async function describeKernel(spec: RunSpec): Promise<KernelDescription> {
  validateSpec(spec);
  if (spec.bits === 'information')
    return { kernel: 'reference', reason: 'errors of the information bits alone are counted one frame at a time' };
  const one = { ...withRate(spec), framesPerShard: 1 };
  const fast = fastShard(one, 0);
  if (fast) {
    await fast;
    return { kernel: 'wasm', reason: `a kernel made for this matrix and ${spec.decoder.kind}` };
  }
  const why = simdAvailable()
    ? `no fast kernel for ${spec.decoder.kind} on ${spec.channel.kind}`
    : 'this engine has no WebAssembly SIMD';
  const lanes = laneShard(one, 0);
  await drive(lanes ?? referenceShard(one, 0), {});
  return lanes
    ? { kernel: 'lanes', reason: `${why}: 32 frames at a time in TypeScript` }
    : { kernel: 'reference', reason: `${why}: one frame at a time` };
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
