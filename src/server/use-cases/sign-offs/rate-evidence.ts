import type { Measurement } from '@/api/measurements.ts';
import type { Requirements } from '@/api/projects.ts';
import type { Point } from '@/api/runs.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { Enclosure, Grade } from '@/core/evidence.ts';
import { fractionsByWeight, ratesAt } from '@/core/simulation/stratified-rate.ts';
import type { StrataFacts } from './strata-facts.ts';

/** One enclosure of the error rates at the required channel, and in words what it rests on. */
export interface RateEvidence {
  fer: Enclosure;
  ber: Enclosure;
  level: number;
  grade: Extract<Grade, 'sampled' | 'bounded'>;
  words: string;
}

/** All that speaks of the rates at the required channel under the required decoder (any, where none is required): points
 *  measured there; weight strata, whose limits hold at every p; and data measured elsewhere on a code of this size, which
 *  do not say their decoder. Nothing is read off between points. */
export function rateEvidence(
  requirements: Pick<Requirements, 'channel' | 'decoder'>,
  points: readonly Point[],
  strata: readonly StrataFacts[],
  measured: readonly Measurement[],
): RateEvidence[] {
  const { channel, decoder } = requirements;
  const isDecoder = (of: { decoder: unknown }) => decoder === undefined || same(of.decoder, decoder);
  return [
    ...points
      .filter((point) => point.channel.kind !== 'stratum' && point.tally.frames > 0 && isDecoder(point))
      .filter((point) => channel === undefined || same(point.channel, channel))
      .map(ofPoint),
    ...(channel?.kind === 'bsc' ? strata.filter(isDecoder).map((facts) => ofStrata(facts, channel.p)) : []),
    ...measured.flatMap((data) => ofMeasured(data, channel)),
  ];
}

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);

function ofPoint({ tally, decoder, interval, berInterval, level }: Point): RateEvidence {
  const words = `${tally.frameErrors} frame errors in ${tally.frames} frames with ${decoder.kind}`;
  return { fer: interval, ber: berInterval, level, grade: 'sampled', words };
}

/** Rigorous limits at one p. */
export function ofStrata({ n, strata, level, decoder, radius, run }: StrataFacts, p: number): RateEvidence {
  const rate = ratesAt(fractionsByWeight(strata, n, level), [p])[0]!;
  const count = (grade: Grade) => strata.filter((stratum) => stratum.grade === grade).length;
  const proved = radius === null ? 'no weight proved' : `weights to ${radius.value} proved`;
  const words = `weight strata of “${run.name}” with ${decoder.kind}: ${proved}, ${count('computed')} tried whole, ${count('sampled')} sampled`;
  // A failed frame has one wrong bit at least and n at most.
  const ber = rate.ber ?? { lower: rate.lower / n, upper: rate.upper };
  return { fer: limits(rate), ber: limits(ber), level, grade: 'bounded', words };
}

const limits = ({ lower, upper }: Enclosure): Enclosure => ({ lower, upper });

function ofMeasured({ name, fileName, n, level, points }: Measurement, channel: Channel | undefined): RateEvidence[] {
  return points
    .filter((point) => isMeasuredAt(point, channel))
    .map(({ frames, frameErrors, interval }) => ({
      fer: interval,
      ber: { lower: interval.lower / n, upper: interval.upper },
      level,
      grade: 'sampled',
      words: `measured data “${name}” (${fileName}), whose decoder is not stated: ${frameErrors} frame errors in ${frames} frames`,
    }));
}

function isMeasuredAt({ p, ebn0Db }: Measurement['points'][number], channel: Channel | undefined): boolean {
  if (channel === undefined) return true;
  if (channel.kind === 'awgn-hard') return ebn0Db !== undefined && Math.abs(ebn0Db - channel.ebn0Db) < 1e-9;
  return channel.kind === 'bsc' && Math.abs(p / channel.p - 1) < 1e-9;
}
