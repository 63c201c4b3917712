import type { Channel } from '../channels/channel.ts';
import { provedStrata, type Stratum } from './stratified-rate.ts';
import type { Tally } from './tally.ts';

/** What a point of a stratified run has to say of itself. */
export interface StratumPoint {
  channel: Channel;
  tally: Pick<Tally, 'frames' | 'frameErrors' | 'bitErrors' | 'bitErrorsSquared'>;
  done: boolean;
  /** Shards given up. */
  setAside: number;
  /** Stage 0 is the pilot; null of points that were stated by hand. */
  plan: { stage: number; enumerate?: unknown } | null;
}

export const isStratum = (point: Pick<StratumPoint, 'channel'>): boolean => point.channel.kind === 'stratum';

export const weightOf = (point: Pick<StratumPoint, 'channel'>): number =>
  point.channel.kind === 'stratum' ? point.channel.weight : Number.NaN;

const isWhole = ({ plan }: Pick<StratumPoint, 'plan'>) => plan?.enumerate !== undefined;
const stageOf = ({ plan }: Pick<StratumPoint, 'plan'>) => plan?.stage ?? 1;

/** The points that count, one a weight, ascending: weights tried whole, and of sampled ones the last stage. The frames of
 *  a pilot only planned, and are left out. */
export function countedStrata<P extends StratumPoint>(points: readonly P[]): P[] {
  const counted = new Map<number, P>();
  for (const point of points) {
    if (!isStratum(point) || (stageOf(point) === 0 && !isWhole(point))) continue;
    const twin = counted.get(weightOf(point));
    const isBetter = !twin || (isWhole(point) ? !isWhole(twin) : !isWhole(twin) && stageOf(point) > stageOf(twin));
    if (isBetter) counted.set(weightOf(point), point);
  }
  return [...counted.values()].sort((a, b) => weightOf(a) - weightOf(b));
}

/** What is known of each weight: proved up to the radius, else computed where all patterns were tried, else the sample.
 *  A weight that was not tried at all is not there. */
export function knownStrata(
  { n, points }: { n: number; points: readonly StratumPoint[] },
  radius: number | null,
  computed: ReadonlyMap<number, Stratum> = new Map(),
): Stratum[] {
  const known = new Map<number, Stratum>();
  for (const point of points) {
    const { frames, frameErrors, bitErrors, bitErrorsSquared } = point.tally;
    const weight = weightOf(point);
    // An enumeration is whole only at its end and with all its shards; a part of it is no sample.
    if (frames === 0 || (isWhole(point) && (!point.done || point.setAside > 0))) continue;
    const grade = isWhole(point) ? 'computed' : 'sampled';
    known.set(weight, { weight, frames, frameErrors, bitErrors, bitErrorsSquared, grade });
  }
  for (const [weight, stratum] of computed) known.set(weight, stratum);
  if (radius !== null) for (const stratum of provedStrata(Math.min(radius, n))) known.set(stratum.weight, stratum);
  return [...known.values()].sort((a, b) => a.weight - b.weight);
}
