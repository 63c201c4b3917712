import { lowerLimit, upperLimit } from '../statistics/binomial-interval.ts';
import { type Fractions, fractionsByWeight, type Stratum, weightLaw } from './stratified-rate.ts';

/** What one weight contributes to the failure rate at some p. */
export interface Contribution {
  weight: number;
  /** P(W = w). */
  probability: number;
  /** Its part of the estimate, of the upper limit, and of the width between the limits, each as a share of the whole. */
  estimateShare: number;
  upperShare: number;
  widthShare: number;
}

/** The weights that matter at p, those of the largest part of the upper limit first: where the failures come from, and
 *  where the evidence is thin. */
export function dominantStrata(
  strata: readonly Stratum[],
  n: number,
  p: number,
  level: number,
  most = 8,
): Contribution[] {
  return contributions(fractionsByWeight(strata, n, level), p, most);
}

/** The same from the shares of each weight, 0 to n. */
export function contributions(fractions: readonly Fractions[], p: number, most = 8): Contribution[] {
  const law = weightLaw(fractions.length - 1, p);
  const parts = fractions.map(({ frames }, weight) => ({
    weight,
    probability: law[weight]!,
    estimate: law[weight]! * frames.estimate,
    upper: law[weight]! * frames.upper,
    width: law[weight]! * (frames.upper - frames.lower),
  }));
  const total = (of: 'estimate' | 'upper' | 'width') => parts.reduce((sum, part) => sum + part[of], 0) || 1;
  const [estimate, upper, width] = [total('estimate'), total('upper'), total('width')];
  return parts
    .sort((a, b) => b.upper - a.upper)
    .slice(0, most)
    .map((part) => ({
      weight: part.weight,
      probability: part.probability,
      estimateShare: part.estimate / estimate,
      upperShare: part.upper / upper,
      widthShare: part.width / width,
    }));
}

export interface Allocation {
  weight: number;
  shards: number;
}

/** Where the next shards narrow the interval at p most: one shard at a time to the stratum whose part of the width
 *  would shrink most if it went on failing as it has. A weight not sampled yet is taken to fail as the next heavier
 *  given one does. A plan, not a guarantee: the limits stay valid however the frames are spread, provided the spread
 *  does not depend on the failures of the very frames that are counted. */
export function allocateShards(
  strata: readonly Stratum[],
  n: number,
  p: number,
  level: number,
  shards: number,
  framesPerShard: number,
): Allocation[] {
  const law = weightLaw(n, p);
  const fractions = fractionsByWeight(strata, n, level);
  const known = new Map(strata.map((stratum) => [stratum.weight, stratum]));
  const sampled = Math.max(1, strata.filter(({ grade }) => (grade ?? 'sampled') === 'sampled').length);
  const tail = (1 - level) / (2 * sampled);
  const open = fractions.flatMap(({ frames: { estimate } }, weight) => {
    const stratum = known.get(weight);
    const exact = weight === 0 || (stratum !== undefined && (stratum.grade ?? 'sampled') !== 'sampled');
    return exact ? [] : [candidate(weight, law[weight]!, estimate, stratum?.frames ?? 0, tail, framesPerShard)];
  });
  const planned = new Map<number, number>();
  for (let s = 0; s < shards; s++) {
    const best = open.reduce((a, b) => (b.gain > a.gain ? b : a));
    if (!(best.gain > 0)) break;
    planned.set(best.weight, (planned.get(best.weight) ?? 0) + 1);
    best.take();
  }
  return [...planned].map(([weight, count]) => ({ weight, shards: count })).sort((a, b) => a.weight - b.weight);
}

function candidate(
  weight: number,
  probability: number,
  estimate: number,
  frames: number,
  tail: number,
  framesPerShard: number,
) {
  const width = (sampled: number) => {
    if (sampled === 0) return probability;
    const x = Math.round(estimate * sampled);
    return probability * (upperLimit(x, sampled, tail) - lowerLimit(x, sampled, tail));
  };
  let count = frames;
  const gainAt = (sampled: number) => width(sampled) - width(sampled + framesPerShard);
  return {
    weight,
    gain: gainAt(count),
    take() {
      count += framesPerShard;
      this.gain = gainAt(count);
    },
  };
}
