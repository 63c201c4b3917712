import type { Run } from '@/api/runs.ts';
import { impossibleTally } from '@/core/simulation/tally.ts';
import { badFields } from '../../refusal.ts';
import type { StoredPoint } from '../../repositories/points.ts';
import { shardCap } from './recount-point.ts';
import type { Shard } from './sort-shards.ts';

/** Shards that no computation of this run can give.
 *  @throws Refusal naming every bad field by its place in the batch. */
export function refuseBadShards(
  shards: readonly Shard[],
  run: Pick<Run, 'framesPerShard' | 'stopping'>,
  points: ReadonlyMap<string, StoredPoint>,
): void {
  const fields: Record<string, string> = {};
  shards.forEach((shard, i) => {
    const point = points.get(shard.pointId);
    if (!point) {
      fields[`shards.${i}.pointId`] = 'the id of a point of this run';
      return;
    }
    const cap = shardCap(run, point);
    if (shard.index >= cap) {
      fields[`shards.${i}.index`] = `from 0 to ${cap - 1}, as the stopping rule allows ${cap} shards`;
    }
    // A shard of an enumeration holds as many patterns as its branches do.
    const frames = point.plan?.enumerate ? shard.tally.frames : run.framesPerShard;
    const bad = impossibleTally(shard.tally, point.n, frames);
    if (bad) fields[`shards.${i}.tally.${bad.field}`] = bad.accepted;
  });
  if (Object.keys(fields).length > 0) throw badFields(fields);
}
