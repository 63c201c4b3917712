import type { Database } from '../db/database.ts';

/** Failures after which a shard is given up. */
export const failuresAllowed = 3;

/** Counts a failure of a shard. @returns whether it is set aside by this one. */
export async function countFailure(
  db: Database,
  failure: { pointId: string; index: number; message: string; sourceId: string; at: string },
): Promise<boolean> {
  const key = { point_id: failure.pointId, shard_index: failure.index };
  const latest = { message: failure.message, last_source_id: failure.sourceId, last_at: failure.at };
  await db('shard_failures')
    .insert({ ...key, ...latest, failures: 1 })
    .onConflict(['point_id', 'shard_index'])
    .merge({ ...latest, failures: db.raw('failures + 1') });
  const row = await db('shard_failures').where(key).first('failures', 'set_aside');
  if (row.set_aside === 1 || row.failures < failuresAllowed) return false;
  await db('shard_failures').where(key).update({ set_aside: 1 });
  return true;
}

/** Indices of a point that are set aside, ascending. */
export async function setAsideIndices(db: Database, pointId: string): Promise<number[]> {
  return db('shard_failures').where({ point_id: pointId, set_aside: 1 }).orderBy('shard_index').pluck('shard_index');
}

/** A shard that came after all is no longer set aside. */
export async function forgetFailures(db: Database, pointId: string, index: number): Promise<void> {
  await db('shard_failures').where({ point_id: pointId, shard_index: index }).delete();
}

/** Shards of a run, or of one point of it, that are set aside. */
export async function setAsideOf(db: Database, runId: string, pointId?: string) {
  const rows = await db('shard_failures')
    .join('points', 'points.id', 'shard_failures.point_id')
    .where('points.run_id', runId)
    .where({ 'shard_failures.set_aside': 1, ...(pointId && { 'points.id': pointId }) })
    .orderBy(['points.position', 'shard_failures.shard_index'])
    .limit(500)
    .select('shard_failures.*');
  return rows.map((row) => ({
    pointId: row.point_id as string,
    index: row.shard_index as number,
    failures: row.failures as number,
    message: row.message as string,
    at: row.last_at as string,
  }));
}
