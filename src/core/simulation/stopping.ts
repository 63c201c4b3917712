import { emptyTally, mergeTallies, type Tally } from './tally.ts';

/** A point is finished at so many frame errors, or at so many frames, whichever comes first. */
export interface StoppingRule {
  frameErrors: number;
  maxFrames: number;
}

export type StoppingReason = 'errors' | 'frames';

/** Why a point with this tally is finished; null while it is not. */
export function stoppingReason(
  tally: Pick<Tally, 'frames' | 'frameErrors'>,
  rule: StoppingRule,
): StoppingReason | null {
  if (tally.frameErrors >= rule.frameErrors) return 'errors';
  return tally.frames >= rule.maxFrames ? 'frames' : null;
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
 *  shards that are quick, which are those with few errors. */
export function countedShards(shards: readonly (Tally | undefined)[], rule: StoppingRule): CountedShards {
  let tally = emptyTally();
  let before = tally;
  for (let index = 0; index < shards.length; index++) {
    const shard = shards[index];
    if (!shard) return { tally, count: index, before, reason: null };
    before = tally;
    tally = mergeTallies(tally, shard);
    const reason = stoppingReason(tally, rule);
    if (reason) return { tally, count: index + 1, before, reason };
  }
  return { tally, count: shards.length, before, reason: null };
}
