import type { ShardAnswer } from '@workers/simulate/api.ts';
import type { Run } from '@/api/runs.ts';
import { sameTally } from '@/core/simulation/same-tally.ts';
import type { Database } from '../../db/database.ts';
import { pointById, type StoredPoint, setRecomputed } from '../../repositories/points.ts';
import { agreedRechecks, dropRecheck, endRecheck, waitingRechecks } from '../../repositories/rechecks.ts';
import { runById } from '../../repositories/runs.ts';
import { storedTallies } from '../../repositories/shards.ts';
import { quarantineSourceOf } from './quarantine-source.ts';

/** A stored shard that the server computes again. */
export interface Recheck {
  run: Run;
  point: StoredPoint;
  index: number;
}

/** Those under way, so that no two threads do the same. */
const underWay = new Set<string>();
const keyOf = ({ point, index }: Pick<Recheck, 'point' | 'index'>) => `${point.id} ${index}`;

export async function nextRechecks(db: Database, most: number): Promise<Recheck[]> {
  const rechecks: Recheck[] = [];
  for (const { pointId, index } of await waitingRechecks(db, most + underWay.size)) {
    const point = await pointById(db, pointId);
    const run = point && (await runById(db, point.runId));
    if (!point || !run || underWay.has(keyOf({ point, index })) || rechecks.length === most) continue;
    underWay.add(keyOf({ point, index }));
    rechecks.push({ run, point, index });
  }
  return rechecks;
}

/** Compares what the server computed with what was handed in. @returns the runs that this changed. */
export async function settleRecheck(trx: Database, recheck: Recheck, answer: ShardAnswer): Promise<string[]> {
  const { run, point, index } = recheck;
  underWay.delete(keyOf(recheck));
  const stored = (await storedTallies(trx, [{ pointId: point.id, index }])).get(`${point.id} ${index}`);
  if (!stored) {
    // Its source was quarantined meanwhile; whoever computes it anew may be sampled anew.
    await dropRecheck(trx, point.id, index);
    return [];
  }
  if (!answer.ok) {
    await endRecheck(trx, point.id, index, 'failed');
    return [];
  }
  if (sameTally(stored, answer.tally, point)) {
    await endRecheck(trx, point.id, index, 'agreed');
    await setRecomputed(trx, point.id, await agreedRechecks(trx, point.id));
    return [run.id];
  }
  await endRecheck(trx, point.id, index, 'differed');
  return quarantineSourceOf(trx, { run, point, index, stored, computed: answer.tally });
}
