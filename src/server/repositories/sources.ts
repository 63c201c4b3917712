import type { z } from 'zod';
import type { sourceSchema } from '@/api/runs.ts';
import type { Database } from '../db/database.ts';
import type { Row } from './row.ts';
import { tallyFromColumns } from './tally-columns.ts';

export type ShownSource = z.infer<typeof sourceSchema>;

/** Something that computes shards: a browser's tab, a script, this server, a machine of the fleet. */
export interface Source {
  id: string;
  kind: ShownSource['kind'];
  userId: string | null;
  name: string;
  label: string;
  createdAt: string;
  quarantinedAt: string | null;
}

export async function findSource(
  db: Database,
  { kind, userId, name }: Pick<Source, 'kind' | 'userId' | 'name'>,
): Promise<Source | undefined> {
  const row = await db('sources').where({ kind, user_id: userId, name }).first();
  return row && toSource(row);
}

export async function sourceById(db: Database, id: string): Promise<Source | undefined> {
  const row = await db('sources').where({ id }).first();
  return row && toSource(row);
}

export async function insertSource(db: Database, source: Omit<Source, 'quarantinedAt'>): Promise<void> {
  const { id, kind, userId, name, label, createdAt } = source;
  await db('sources').insert({ id, kind, user_id: userId, name, label, created_at: createdAt });
}

export async function markQuarantined(db: Database, id: string, at: string): Promise<void> {
  await db('sources').where({ id }).update({ quarantined_at: at });
}

/** Takes every shard of a source out of the count and keeps it aside. @returns the points that lost some. */
export async function setShardsAside(db: Database, sourceId: string, at: string): Promise<string[]> {
  const pointIds = await db('shards').where({ source_id: sourceId }).distinct('point_id').pluck('point_id');
  for (const pointId of pointIds) {
    const rows = await db('shards').where({ source_id: sourceId, point_id: pointId });
    for (const row of rows) {
      const tally = JSON.stringify(tallyFromColumns(row));
      await db('quarantined_shards')
        .insert({ point_id: pointId, shard_index: row.shard_index, source_id: sourceId, tally, at })
        .onConflict()
        .ignore();
    }
    const indices = db('shards').where({ source_id: sourceId, point_id: pointId }).select('shard_index');
    // Whoever computes them anew may be looked at anew.
    await db('rechecks').where({ point_id: pointId }).whereIn('shard_index', indices).delete();
    await db('shards').where({ source_id: sourceId, point_id: pointId }).delete();
  }
  return pointIds;
}

/** Sources of a run's shards, or of one point's, most shards first; what came before sources were noted is left out. */
export async function sourcesOf(db: Database, runId: string, pointId?: string): Promise<ShownSource[]> {
  const points = db('points')
    .where({ run_id: runId, ...(pointId && { id: pointId }) })
    .select('id');
  const stored: Row[] = await db('shards')
    .whereIn('point_id', points.clone())
    .whereNotNull('source_id')
    .groupBy('source_id')
    .select('source_id')
    .select(db.raw('count(*) AS shards, sum(frames) AS frames'));
  const aside: Row[] = await db('quarantined_shards')
    .whereIn('point_id', points.clone())
    .groupBy('source_id')
    .select('source_id')
    .select(db.raw('count(*) AS shards'));
  const agreed: Row[] = await db('rechecks')
    .join('shards', (on) => {
      on.on('shards.point_id', 'rechecks.point_id').andOn('shards.shard_index', 'rechecks.shard_index');
    })
    .whereIn('rechecks.point_id', points.clone())
    .where('rechecks.state', 'agreed')
    .groupBy('shards.source_id')
    .select('shards.source_id')
    .select(db.raw('count(*) AS shards'));
  const figure = (rows: readonly Row[], id: string, name: string) =>
    Number(rows.find((row) => row.source_id === id)?.[name] ?? 0);
  const ids = [...new Set([...stored, ...aside].map((row) => String(row.source_id)))];
  const sources = (await db('sources').whereIn('id', ids)).map(toSource);
  return sources
    .map(({ id, kind, label, quarantinedAt }) => ({
      id,
      kind,
      label,
      quarantinedAt,
      shards: figure(stored, id, 'shards'),
      frames: figure(stored, id, 'frames'),
      recomputed: figure(agreed, id, 'shards'),
      quarantinedShards: figure(aside, id, 'shards'),
    }))
    .sort((a, b) => b.shards - a.shards);
}

function toSource(row: Row): Source {
  return {
    id: row.id!,
    kind: row.kind!,
    userId: row.user_id ?? null,
    name: row.name!,
    label: row.label!,
    createdAt: row.created_at!,
    quarantinedAt: row.quarantined_at ?? null,
  };
}
