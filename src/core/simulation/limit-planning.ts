import { lowerLimit, upperLimit } from '../statistics/binomial-interval.ts';
import { type StratifiedRate, type Stratum, stratifiedRate, weightLaw } from './stratified-rate.ts';

/** That the frame error rate at p keeps a limit, at a level. */
export interface LimitGoal {
  n: number;
  p: number;
  target: number;
  level: number;
}

export interface StratumFrames {
  weight: number;
  frames: number;
}

export interface StagePlan {
  strata: StratumFrames[];
  /** Whether the frames allowed are expected to decide it. */
  isEnough: boolean;
  /** The upper limit, or when the rate seems to be above the target the lower one, that is expected. */
  expected: number;
}

/** Heavier weights are left out, together at most that share of the target: they count as failing. */
const leftOut = 0.05;
/** The limit is planned to be met with some room, since the frames to come will not fall out as those before. */
const room = 0.85;

/** Level of a stage's limits. Stage s may err with (1 − level)/2^s, so that all stages together err with 1 − level at
 *  most, however many there are. */
export const stageLevel = (level: number, stage: number): number => 1 - (1 - level) / 2 ** stage;

/** The weights to be sampled: those neither proved nor enumerated, up to where the rest hardly matters. */
export function weightsToSample(known: readonly Stratum[], { n, p, target }: LimitGoal): number[] {
  const law = weightLaw(n, p);
  const settled = new Set([0, ...known.map((stratum) => stratum.weight)]);
  let tail = 0;
  let heaviest = n;
  while (heaviest > 0 && tail + law[heaviest]! <= leftOut * target) {
    tail += law[heaviest]!;
    heaviest--;
  }
  return Array.from({ length: heaviest + 1 }, (_, weight) => weight).filter((weight) => !settled.has(weight));
}

/** How many fresh frames each weight should get so that the rate at p is decided, as few as possible in all: starting
 *  from a shard each, the weight whose part of the limit shrinks most for its frames is doubled (Neyman's allocation,
 *  J. Roy. Statist. Soc. 97, 1934, with exact limits in place of variances).
 *  @param prior what earlier frames showed, which are not counted again. */
export function planStage(
  known: readonly Stratum[],
  prior: readonly Stratum[],
  goal: LimitGoal,
  { level, framesPerShard, maxFrames }: { level: number; framesPerShard: number; maxFrames: number },
): StagePlan {
  const law = weightLaw(goal.n, goal.p);
  const weights = weightsToSample(known, goal);
  const seen = new Map(prior.map((stratum) => [stratum.weight, stratum]));
  const tail = (1 - level) / (2 * Math.max(1, weights.length));
  const settled = known.reduce((sum, { weight, frames, frameErrors, grade }) => {
    return sum + (grade === 'computed' ? law[weight]! * (frameErrors / frames) : 0);
  }, 0);
  const inside = new Set([0, ...known.map(({ weight }) => weight), ...weights]);
  const outside = law.reduce((sum, probability, weight) => sum + (inside.has(weight) ? 0 : probability), 0);
  const share = (weight: number) => {
    const { frames, frameErrors } = seen.get(weight) ?? { frames: 0, frameErrors: 0 };
    return frames > 0 ? frameErrors / frames : 0;
  };
  const estimate = settled + weights.reduce((sum, weight) => sum + law[weight]! * share(weight), 0);
  const fails = estimate > goal.target;
  const limitOf = (weight: number, frames: number) => {
    const errors = Math.round(share(weight) * frames);
    return law[weight]! * (fails ? lowerLimit(errors, frames, tail) : upperLimit(errors, frames, tail));
  };
  const open = weights.map((weight) => ({ weight, frames: framesPerShard, limit: limitOf(weight, framesPerShard) }));
  const total = () => open.reduce((sum, { limit }) => sum + limit, settled + (fails ? 0 : outside));
  const isMet = () => (fails ? total() * room >= goal.target : total() <= room * goal.target);
  let spent = open.length * framesPerShard;
  while (!isMet()) {
    const gains = open.map((stratum) => {
      const doubled = limitOf(stratum.weight, 2 * stratum.frames);
      return { stratum, doubled, gain: Math.abs(stratum.limit - doubled) / stratum.frames };
    });
    const best = gains.reduce((a, b) => (b && a && b.gain > a.gain ? b : a), gains[0]);
    if (!best || !(best.gain > 0) || spent + best.stratum.frames > maxFrames) break;
    spent += best.stratum.frames;
    Object.assign(best.stratum, { frames: 2 * best.stratum.frames, limit: best.doubled });
  }
  return {
    strata: open.map(({ weight, frames }) => ({ weight, frames })),
    isEnough: isMet() && spent <= maxFrames,
    expected: total(),
  };
}

export interface LimitVerdict extends StratifiedRate {
  verdict: 'pass' | 'fail' | null;
}

/** What strata show of the goal. Proved and enumerated ones are certain; of the sampled ones only frames of one stage may
 *  be given, with that stage's level. */
export function limitVerdict(strata: readonly Stratum[], { n, p, target }: LimitGoal, level: number): LimitVerdict {
  const rate = stratifiedRate(strata, n, p, level);
  return { ...rate, verdict: rate.upper <= target ? 'pass' : rate.lower > target ? 'fail' : null };
}
