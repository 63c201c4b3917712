import type { Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../db/database.ts';
import { tallyFromColumns, tallyToColumns } from './tally-columns.ts';

export interface StoredShard {
  pointId: string;
  index: number;
  tally: Tally;
}

// SQLite takes at most 500 rows in one compound statement.
const rowsAStatement = 400;

/** Of the shards named, the tallies stored, by `pointId index`. */
export async function storedTallies(
  db: Database,
  shards: readonly Pick<StoredShard, 'pointId' | 'index'>[],
): Promise<Map<string, Tally>> {
  const found = new Map<string, Tally>();
  for (let from = 0; from < shards.length; from += rowsAStatement) {
    const keys = shards.slice(from, from + rowsAStatement).map(({ pointId, index }) => [pointId, index]);
    const rows = await db('shards').whereIn(['point_id', 'shard_index'], keys);
    for (const row of rows) found.set(`${row.point_id} ${row.shard_index}`, tallyFromColumns(row));
  }
  return found;
}

export async function insertShards(
  db: Database,
  shards: readonly StoredShard[],
  by: { userId: string; at: string; sourceId?: string },
): Promise<void> {
  const rows = shards.map((shard) => ({
    point_id: shard.pointId,
    shard_index: shard.index,
    ...tallyToColumns(shard.tally),
    posted_by: by.userId,
    posted_at: by.at,
    source_id: by.sourceId ?? null,
  }));
  for (let from = 0; from < rows.length; from += rowsAStatement) {
    await db('shards').insert(rows.slice(from, from + rowsAStatement));
  }
}

/** Indices stored from `from` on, ascending. */
export async function shardIndicesFrom(db: Database, pointId: string, from: number): Promise<number[]> {
  return db('shards')
    .where({ point_id: pointId })
    .where('shard_index', '>=', from)
    .orderBy('shard_index')
    .pluck('shard_index');
}

/** Shards stored from `from` on, ascending, `most` at a time. */
export async function shardsFrom(
  db: Database,
  pointId: string,
  from: number,
  most: number,
): Promise<{ index: number; tally: Tally }[]> {
  const rows = await db('shards')
    .where({ point_id: pointId })
    .where('shard_index', '>=', from)
    .orderBy('shard_index')
    .limit(most);
  return rows.map((row) => ({ index: row.shard_index, tally: tallyFromColumns(row) }));
}

export async function shardSource(db: Database, pointId: string, index: number): Promise<string | undefined> {
  const row = await db('shards').where({ point_id: pointId, shard_index: index }).first('source_id');
  return row?.source_id ?? undefined;
}

/** For points of a run, the indices stored beyond the unbroken beginning. */
export async function extraIndicesOfRun(db: Database, runId: string): Promise<Map<string, number[]>> {
  const rows = await db('shards')
    .join('points', 'points.id', 'shards.point_id')
    .where('points.run_id', runId)
    .whereRaw('shards.shard_index >= points.next_index')
    .orderBy('shards.shard_index')
    .select('shards.point_id', 'shards.shard_index');
  const extra = new Map<string, number[]>();
  for (const { point_id, shard_index } of rows) {
    extra.set(point_id, [...(extra.get(point_id) ?? []), shard_index]);
  }
  return extra;
}

/** The same for some points of it. */
export async function extraIndicesOf(
  db: Database,
  points: readonly { id: string; nextIndex: number }[],
): Promise<Map<string, number[]>> {
  const extra = new Map<string, number[]>();
  for (const { id, nextIndex } of points) {
    const indices = await shardIndicesFrom(db, id, nextIndex);
    if (indices.length > 0) extra.set(id, indices);
  }
  return extra;
}
