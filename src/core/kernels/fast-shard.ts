import { hardCrossover } from '../channels/awgn.ts';
import { channelReading } from '../channels/reading.ts';
import { streamState } from '../simulation/random.ts';
import type { RunSpec } from '../simulation/run-spec.ts';
import type { Tally } from '../simulation/tally.ts';
import { bscWeightTable, type WeightTable } from '../simulation/weight-table.ts';
import { begin, type CompiledKernel, type Draws, giveBack, kernelOf, readTally } from './compiled-kernel.ts';
import { emitterFor } from './kernel-for.ts';
import { simdAvailable } from './simd-available.ts';

export interface FastShardOptions {
  /** Looked at before each slice of work; once aborted the shard rejects with the signal's reason. */
  signal?: AbortSignal;
  /** Awaited between slices of about 10 ms, so that messages get in. */
  pause?: () => Promise<void>;
}

/** The shard decoded by a kernel made for its matrix; null where there is none for the decoder and the channel, and on an
 *  engine without SIMD. Equal to the reference to the last integer; the sum-product kernel within its interval.
 *  @throws ParamError on settings that the matrix does not allow, as the reference does. */
export function fastShard(spec: RunSpec, index: number, options: FastShardOptions = {}): Promise<Tally> | null {
  if (!simdAvailable()) return null;
  const weights = patternWeights(spec);
  const bias = zeroBias(spec);
  if (weights === null) return null;
  const kernel = kernelFor(spec);
  return kernel && runOn(kernel, spec, index, { weights, bias }, options);
}

/** How the channel's patterns are weighted; null where they are not independent of what is sent or of each other. */
function patternWeights({ H, channel, rate }: RunSpec): (() => Draws['weights']) | null {
  switch (channel.kind) {
    case 'bsc':
      return () => weightTable(H.cols, channel.p);
    case 'bec':
      return () => weightTable(H.cols, channel.e);
    case 'awgn-hard':
      return rate === undefined ? null : () => weightTable(H.cols, hardCrossover(channel.ebn0Db, rate));
    case 'stratum':
      return () => channel.weight;
    default:
      return null;
  }
}

/** Tables of the latest laws: a long word's takes longer to work out than a short shard to decode. */
const tables = new Map<string, WeightTable>();
const mostTables = 16;

function weightTable(n: number, p: number): WeightTable {
  const key = `${n} ${p}`;
  const table = tables.get(key) ?? bscWeightTable(n, p);
  tables.delete(key);
  tables.set(key, table);
  if (tables.size > mostTables) tables.delete(tables.keys().next().value!);
  return table;
}

/** P(0) − P(1) = tanh(L/2) of a received 0 where the decoder reads it, else 0.
 *  @throws ParamError where the channel has no such ratio, as the reference does. */
function zeroBias({ channel, decoder, rate }: RunSpec): number {
  if (decoder.kind !== 'sum-product') return 0;
  const ratios = new Float64Array(1);
  channelReading(channel, rate, decoder.designP)(new Uint8Array(1), ratios);
  return Math.tanh(ratios[0]! / 2);
}

function kernelFor({ H, decoder, channel }: RunSpec): Promise<CompiledKernel> | null {
  const erasing = decoder.kind === 'peeling';
  if (channel.kind !== 'stratum' && erasing !== (channel.kind === 'bec')) return null;
  const emit = emitterFor(decoder, H);
  // The design p reaches the kernel as a number at run time.
  return emit && kernelOf(H, JSON.stringify({ ...decoder, designP: undefined }), emit);
}

/** Work between two pauses. */
const sliceNs = 8e6;

async function runOn(
  compiling: Promise<CompiledKernel>,
  spec: RunSpec,
  index: number,
  draws: { weights: () => Draws['weights']; bias: number },
  { signal, pause }: FastShardOptions,
): Promise<Tally> {
  const kernel = await compiling;
  const { image } = kernel;
  const instance = await kernel.take();
  const random = await streamState(spec.seed, index);
  const { bias } = draws;
  begin(instance, image, { frames: spec.framesPerShard, random, weights: draws.weights(), bias });
  const steps = Math.max(1, Math.floor(sliceNs / image.stepNs));
  signal?.throwIfAborted();
  while (instance.run(steps) === 0) {
    if (pause) await pause();
    signal?.throwIfAborted();
  }
  const tally = readTally(instance, image, spec.framesPerShard);
  giveBack(kernel, instance);
  return tally;
}
