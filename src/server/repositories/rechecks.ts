import type { Database } from '../db/database.ts';

export type RecheckState = 'waiting' | 'agreed' | 'differed' | 'failed';

/** Asks for shards to be computed again; one that was asked for before stays as it is. */
export async function askRechecks(db: Database, shards: readonly { pointId: string; index: number }[]): Promise<void> {
  if (shards.length === 0) return;
  const rows = shards.map(({ pointId, index }) => ({ point_id: pointId, shard_index: index, state: 'waiting' }));
  await db('rechecks').insert(rows).onConflict().ignore();
}

/** Of the points given, those of which no shard was asked for yet. */
export async function pointsWithoutRecheck(db: Database, pointIds: readonly string[]): Promise<Set<string>> {
  const asked = await db('rechecks')
    .whereIn('point_id', [...pointIds])
    .distinct('point_id')
    .pluck('point_id');
  const known = new Set<string>(asked);
  return new Set(pointIds.filter((id) => !known.has(id)));
}

export async function waitingRechecks(db: Database, most: number): Promise<{ pointId: string; index: number }[]> {
  const rows = await db('rechecks').where({ state: 'waiting' }).limit(most);
  return rows.map((row) => ({ pointId: row.point_id, index: row.shard_index }));
}

export async function endRecheck(db: Database, pointId: string, index: number, state: RecheckState): Promise<void> {
  await db('rechecks').where({ point_id: pointId, shard_index: index }).update({ state });
}

export async function dropRecheck(db: Database, pointId: string, index: number): Promise<void> {
  await db('rechecks').where({ point_id: pointId, shard_index: index }).delete();
}

/** Shards of a point that were computed again, found the same, and still count. */
export async function agreedRechecks(db: Database, pointId: string): Promise<number> {
  const row = await db('rechecks')
    .join('shards', (on) => {
      on.on('shards.point_id', 'rechecks.point_id').andOn('shards.shard_index', 'rechecks.shard_index');
    })
    .where({ 'rechecks.point_id': pointId, 'rechecks.state': 'agreed' })
    .count({ agreed: '*' })
    .first();
  return Number(row?.agreed ?? 0);
}
