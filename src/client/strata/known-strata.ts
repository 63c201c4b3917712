import { provedStrata, type Stratum } from '@/core/simulation/stratified-rate.ts';
import { type StratumGroup, weightOf } from './stratum-groups.ts';

/** What is known of each weight: proved up to the radius, else computed where all patterns were tried, else the sample.
 *  A weight that was not tried at all is not there. */
export function knownStrata(
  group: Pick<StratumGroup, 'n' | 'points'>,
  radius: number | null,
  computed: ReadonlyMap<number, Stratum> = new Map(),
): Stratum[] {
  const known = new Map<number, Stratum>();
  for (const point of group.points) {
    const { frames, frameErrors, bitErrors, bitErrorsSquared } = point.tally;
    const weight = weightOf(point);
    const isWhole = point.plan?.enumerate !== undefined;
    // The server's enumeration is whole only at its end; a part of it is no sample.
    if (frames === 0 || (isWhole && !point.done)) continue;
    const grade = isWhole ? 'computed' : 'sampled';
    known.set(weight, { weight, frames, frameErrors, bitErrors, bitErrorsSquared, grade });
  }
  for (const [weight, stratum] of computed) known.set(weight, stratum);
  if (radius !== null)
    for (const stratum of provedStrata(Math.min(radius, group.n))) known.set(stratum.weight, stratum);
  return [...known.values()].sort((a, b) => a.weight - b.weight);
}
