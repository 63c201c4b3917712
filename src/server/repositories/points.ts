import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';
import { type TallyColumns, tallyFromColumns, tallyToColumns } from './tally-columns.ts';

export interface NewPointRow {
  id: string;
  runId: string;
  position: number;
  codeId: string;
  channel: Channel;
  decoder: DecoderSpec;
}

export interface StoredPoint extends NewPointRow {
  n: number;
  k: number;
  designTitle: string;
  tally: Tally;
  nextIndex: number;
  done: boolean;
}

// SQLite takes at most 500 rows in one compound statement.
const rowsAStatement = 400;

export async function insertPoints(db: Database, points: readonly NewPointRow[]): Promise<void> {
  const rows = points.map((point) => ({
    id: point.id,
    run_id: point.runId,
    position: point.position,
    code_id: point.codeId,
    channel: JSON.stringify(point.channel),
    decoder: JSON.stringify(point.decoder),
  }));
  for (let from = 0; from < rows.length; from += rowsAStatement) {
    await db('points').insert(rows.slice(from, from + rowsAStatement));
  }
}

const shown = (db: Database) =>
  db('points')
    .join('codes', 'codes.id', 'points.code_id')
    .select('points.*', 'codes.n', 'codes.k', 'codes.design_title');

export async function pointsOfRun(db: Database, runId: string): Promise<StoredPoint[]> {
  return (await shown(db).where('points.run_id', runId).orderBy('points.position')).map(toPoint);
}

/** Points of a run that have changed after that revision of it. */
export async function pointsChangedSince(db: Database, runId: string, revision: number): Promise<StoredPoint[]> {
  const query = shown(db).where('points.run_id', runId).where('points.revision', '>', revision);
  return (await query.orderBy('points.position')).map(toPoint);
}

/** Points of a run in their order, from the one after `after` on. */
export async function pointsOfRunPage(db: Database, runId: string, page: PageRequest): Promise<StoredPoint[]> {
  const query = shown(db).where('points.run_id', runId).orderBy('points.position').limit(page.limit);
  if (page.after) {
    const before = db('points').where({ run_id: runId, id: page.after }).select('position');
    query.where('points.position', '>', before);
  }
  return (await query).map(toPoint);
}

/** Those of the ids that are points of the run. */
export async function pointsByIds(db: Database, runId: string, ids: readonly string[]): Promise<StoredPoint[]> {
  return (await shown(db).where('points.run_id', runId).whereIn('points.id', ids)).map(toPoint);
}

/** Points of a project that have frames, oldest run first. */
export async function measuredPointsOf(
  db: Database,
  projectId: string,
  only: { codeId?: string; runId?: string },
): Promise<StoredPoint[]> {
  const query = shown(db)
    .join('runs', 'runs.id', 'points.run_id')
    .where('runs.project_id', projectId)
    .where('points.frames', '>', 0)
    .orderBy([{ column: 'points.run_id' }, { column: 'points.position' }]);
  if (only.codeId) query.where('points.code_id', only.codeId);
  if (only.runId) query.where('points.run_id', only.runId);
  return (await query).map(toPoint);
}

export async function savePointProgress(
  db: Database,
  id: string,
  progress: Pick<StoredPoint, 'tally' | 'nextIndex' | 'done'>,
): Promise<void> {
  await db('points')
    .where({ id })
    .update({ ...tallyToColumns(progress.tally), next_index: progress.nextIndex, done: progress.done ? 1 : 0 });
}

export async function openPointCount(db: Database, runId: string): Promise<number> {
  const row = await db('points').where({ run_id: runId, done: 0 }).count({ open: '*' }).first();
  return Number(row?.open ?? 0);
}

function toPoint(row: Row): StoredPoint {
  return {
    id: row.id!,
    runId: row.run_id!,
    position: row.position!,
    codeId: row.code_id!,
    channel: JSON.parse(row.channel!),
    decoder: JSON.parse(row.decoder!),
    n: row.n!,
    k: row.k!,
    designTitle: row.design_title!,
    tally: tallyFromColumns(row as unknown as TallyColumns),
    nextIndex: row.next_index!,
    done: row.done === 1,
  };
}
