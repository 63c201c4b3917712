import type { Channel } from '../channels/channel.ts';
import { channelReading } from '../channels/reading.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { ParamError } from '../errors.ts';
import { bitFlipping, bitFlippingMax } from './bit-flipping.ts';
import type { Decoder } from './decoder.ts';
import type { DecoderSpec } from './decoder-spec.ts';
import { elimination } from './elimination.ts';
import { finiteAlphabet } from './finite-alphabet.ts';
import { gallager } from './gallager.ts';
import { gradientDescent } from './gradient-descent.ts';
import { majorityLogic } from './majority-logic.ts';
import { minSum } from './min-sum.ts';
import { peeling } from './peeling.ts';
import { flippingThresholds, iterationCap, messageThresholds, minSumSettings } from './settings.ts';
import { sumProduct } from './sum-product.ts';
import { columnDegrees, type TannerGraph, tannerGraph } from './tanner-graph.ts';
import { twoStage } from './two-stage.ts';

/** The most iterations a frame may take, all stages together: what a tally's histogram holds. */
export const mostIterations = 1024;

/** The readable decoder a spec names, for the outputs of a channel.
 *  @param rate k/n, needed on the AWGN channel.
 *  @throws ParamError on a setting this matrix or this channel does not allow. */
export function createDecoder(H: SparseMatrix, spec: DecoderSpec, channel: Channel, rate?: number): Decoder {
  const cap = iterationCap(spec);
  if (cap > mostIterations)
    throw new ParamError('decoder.iterations', cap, `at most ${mostIterations} iterations in all`);
  refuseMismatch(spec, channel);
  return build(tannerGraph(H), columnDegrees(H), spec, channel, rate);
}

function build(
  graph: TannerGraph,
  degrees: Uint32Array,
  spec: DecoderSpec,
  channel: Channel,
  rate: number | undefined,
): Decoder {
  const cap = iterationCap(spec);
  switch (spec.kind) {
    case 'majority-logic':
      return majorityLogic(graph);
    case 'gallager-a':
    case 'gallager-b':
      return gallager(graph, messageThresholds(degrees, spec), cap);
    case 'bit-flipping':
      return bitFlipping(graph, flippingThresholds(degrees, spec), cap);
    case 'bit-flipping-max':
      return bitFlippingMax(graph, cap);
    case 'gradient-descent':
      return gradientDescent(graph, spec, cap);
    case 'finite-alphabet':
      return finiteAlphabet(graph, degrees, spec, cap);
    case 'peeling':
      return peeling(graph, cap);
    case 'elimination':
      return elimination(graph);
    case 'sum-product':
      return sumProduct(graph, channelReading(channel, rate, spec.designP), cap);
    case 'min-sum':
      return minSum(graph, minSumSettings(degrees, spec));
    case 'two-stage':
      return twoStage(spec.stages.map((stage) => build(graph, degrees, stage, channel, rate)));
  }
}

/** Decoders of erasures. */
const erasureKinds: ReadonlySet<DecoderSpec['kind']> = new Set(['peeling', 'elimination']);
/** Decoders that read real channel outputs. */
const softKinds: ReadonlySet<DecoderSpec['kind']> = new Set(['sum-product', 'min-sum']);

export function decodesErasures(spec: DecoderSpec): boolean {
  return erasureKinds.has(spec.kind);
}

/** @throws ParamError when the channel's outputs are not what the decoder reads. On a stratum a decoder of erasures
 *  reads the pattern as erasures, any other as errors. */
function refuseMismatch(spec: DecoderSpec, channel: Channel): void {
  const stages = spec.kind === 'two-stage' ? spec.stages : [spec];
  for (const { kind } of stages) {
    const erasing = erasureKinds.has(kind);
    if (erasing && spec.kind === 'two-stage')
      throw new ParamError('decoder.stages', kind, 'decoders of errors; elimination alone does what peeling does');
    if (erasing && channel.kind !== 'bec' && channel.kind !== 'stratum')
      throw new ParamError('channel.kind', channel.kind, `the erasure channel "bec" or a "stratum" for ${kind}`);
    if (!erasing && channel.kind === 'bec')
      throw new ParamError('decoder.kind', kind, '"peeling" or "elimination" on the erasure channel');
    if (channel.kind === 'awgn' && !softKinds.has(kind))
      throw new ParamError('decoder.kind', kind, '"sum-product" or "min-sum" on "awgn", or this one on "awgn-hard"');
  }
}
