import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { columnDegrees, largestDegree } from '../decoders/tanner-graph.ts';
import { ParamError } from '../errors.ts';
import type { RunSpec } from './run-spec.ts';
import { runShard, type ShardOptions } from './shard.ts';
import type { Tally } from './tally.ts';

export interface Calibration {
  /** The decoder with the settings that did best, all of them said: what a run stores. */
  decoder: DecoderSpec;
  /** Every setting tried, best first. */
  trials: { decoder: DecoderSpec; tally: Tally }[];
}

export interface CalibrationOptions extends ShardOptions {
  /** Told after each setting how many of all have been tried. */
  onTrial?: (done: number, all: number) => void;
}

type MinSum = Extract<DecoderSpec, { kind: 'min-sum' }>;
const scales = ['1/8', '1/4', '1/2', '3/4', '1', 'offset-1'] as const;
const channelValues = [4, 8, 16, 24, 32];

/** Tries min-sum's scales and channel values, or bit flipping's thresholds, on one short seeded shard each, all on the
 *  same frames, and returns the one with the fewest failed frames; at a tie that with the fewest iterations, then the
 *  first tried. The best of a short run is likely, not certain, to be the best of a long one: take a channel at which
 *  some per cent of the frames fail.
 *  @throws ParamError for other decoders, and on a spec out of range. */
export async function calibrate(spec: RunSpec, options: CalibrationOptions = {}): Promise<Calibration> {
  const trials: Calibration['trials'] = [];
  const tried = candidates(spec);
  for (const decoder of tried) {
    trials.push({ decoder, tally: await runShard({ ...spec, decoder }, 0, 'wasm', options) });
    options.onTrial?.(trials.length, tried.length);
  }
  trials.sort((a, b) => a.tally.frameErrors - b.tally.frameErrors || a.tally.iterations - b.tally.iterations);
  return { decoder: trials[0]!.decoder, trials };
}

function candidates({ H, decoder }: RunSpec): DecoderSpec[] {
  const most = largestDegree(columnDegrees(H));
  if (decoder.kind === 'min-sum') return minSumCandidates(decoder, most);
  if (decoder.kind === 'bit-flipping') {
    const from = Math.max(1, Math.floor(most / 2));
    return Array.from({ length: most - from + 1 }, (_, i) => ({ ...decoder, threshold: from + i }));
  }
  throw new ParamError('decoder.kind', decoder.kind, '"min-sum" or "bit-flipping", which have settings to try');
}

/** Every scale with every channel value that leaves room for messages of at least 1. */
function minSumCandidates(decoder: MinSum, most: number): DecoderSpec[] {
  const fitting = channelValues.filter((c) => c + most <= 127);
  if (fitting.length === 0) throw new ParamError('H', `column weight ${most}`, 'min-sum up to column weight 123');
  return fitting.flatMap((c) => scales.map((scale) => ({ ...decoder, scale, c, rMax: Math.floor((127 - c) / most) })));
}
