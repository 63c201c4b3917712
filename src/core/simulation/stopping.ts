import { errorsForPrecision } from '../statistics/stopped-run.ts';
import { type SequentialTest, sequentialVerdict } from './sequential-test.ts';
import { emptyTally, mergeTallies, type Tally } from './tally.ts';

/** When a point is finished: by the first of its rules that is met. The cap on frames is always there. */
export interface StoppingRule {
  /** So many frame errors. */
  frameErrors?: number | undefined;
  maxFrames: number;
  /** Both limits of the rate within that factor of its estimate, at that level. Carried out as a number of errors, for
   *  which the interval of a stopped run is exact; looking at the interval after every shard would spoil it. */
  width?: { factor: number; level: number } | undefined;
  /** Until it is decided whether the frame error rate keeps a limit. */
  verdict?: SequentialTest | undefined;
}

export type StoppingReason = 'errors' | 'frames' | 'width' | 'pass' | 'fail';

/** Why a point with this tally is finished; null while it is not. */
export function stoppingReason(
  tally: Pick<Tally, 'frames' | 'frameErrors'>,
  rule: StoppingRule,
): StoppingReason | null {
  const decided = rule.verdict && sequentialVerdict(tally, rule.verdict);
  if (decided) return decided;
  if (rule.frameErrors !== undefined && tally.frameErrors >= rule.frameErrors) return 'errors';
  if (rule.width && tally.frameErrors >= widthErrors(rule.width)) return 'width';
  return tally.frames >= rule.maxFrames ? 'frames' : null;
}

/** The number of frame errors on which a rule stops, the least of those it states; null when it states none. */
export function errorTarget({ frameErrors, width }: StoppingRule): number | null {
  const targets = [frameErrors, width && widthErrors(width)].filter((target) => target !== undefined);
  return targets.length > 0 ? Math.min(...targets) : null;
}

const known = new Map<string, number>();

function widthErrors({ factor, level }: { factor: number; level: number }): number {
  const key = `${factor} ${level}`;
  const errors = known.get(key) ?? errorsForPrecision(factor, level);
  known.set(key, errors);
  return errors;
}

export interface CountedShards {
  tally: Tally;
  /** Shards 0 … count − 1 make up the tally. */
  count: number;
  /** The tally without the last shard, which `stoppedRate` needs. */
  before: Tally;
  reason: StoppingReason | null;
}

/** The shards that count: those in index order up to the first at which the rule is met. Later shards that other
 *  workers had already done are left out, as are those after a gap; counting whatever came back first would favour
 *  shards that are quick, which are those with few errors.
 *  @param from What is counted already, for taking it up where it was left. */
export function countedShards(
  shards: readonly (Tally | undefined)[],
  rule: StoppingRule,
  from: Pick<CountedShards, 'tally' | 'count'> = { tally: emptyTally(), count: 0 },
): CountedShards {
  let { tally } = from;
  let before = tally;
  for (let at = 0; at < shards.length; at++) {
    const shard = shards[at];
    if (!shard) return { tally, count: from.count + at, before, reason: null };
    before = tally;
    tally = mergeTallies(tally, shard);
    const reason = stoppingReason(tally, rule);
    if (reason) return { tally, count: from.count + at + 1, before, reason };
  }
  return { tally, count: from.count + shards.length, before, reason: null };
}
