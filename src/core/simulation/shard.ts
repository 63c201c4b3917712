import { ParamError } from '../errors.ts';
import { rank } from '../gf2/rank.ts';
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
  return drive(referenceShard(withRate(spec), index), options);
}

async function drive(shard: AsyncGenerator<number, Tally>, { signal, pause }: ShardOptions): Promise<Tally> {
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
