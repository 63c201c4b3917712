import type { Knex } from 'knex';
import type { Point, PointPlan } from '@/api/runs.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import { emptyTally, type Tally } from '@/core/simulation/tally.ts';
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
  plan?: PointPlan | null;
}

export type StopReason = NonNullable<Point['stopReason']>;

export interface StoredPoint extends NewPointRow {
  n: number;
  k: number;
  designTitle: string;
  tally: Tally;
  /** Shards 0 … nextIndex − 1 are counted or set aside. */
  nextIndex: number;
  done: boolean;
  /** Sum of the counted ones. */
  counted: Tally;
  /** Frames and errors before the last counted one. */
  before: { frames: number; frameErrors: number };
  stopReason: StopReason | null;
  /** The number of errors that it stopped on, if it did. */
  stopTarget: number | null;
  recomputed: number;
  setAside: number;
  plan: PointPlan | null;
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
    plan: point.plan ? JSON.stringify(point.plan) : null,
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

/** Where a point stands in a chart, without what is shown beside it. */
export interface PointOutline {
  id: string;
  /** Points of one curve have it in common. */
  curve: string;
  /** What the channel's kind is measured by, to be read on a logarithmic axis; null where it is not one number. */
  x: number | null;
  frames: number;
  frameErrors: number;
}

export interface PointsWanted {
  projectId?: string;
  runId?: string;
  codeId?: string;
  /** Only points with frames. */
  measured?: boolean;
}

/** The query, joined to the runs of its points, narrowed to those wanted. */
const narrowed = (query: Knex.QueryBuilder, { projectId, runId, codeId, measured }: PointsWanted) => {
  query.join('runs', 'runs.id', 'points.run_id');
  if (projectId) query.where('runs.project_id', projectId);
  if (runId) query.where('points.run_id', runId);
  if (codeId) query.where('points.code_id', codeId);
  if (measured) query.where('points.frames', '>', 0);
  return query;
};

export async function pointCount(db: Database, wanted: PointsWanted): Promise<number> {
  return Number((await narrowed(db('points'), wanted).count({ points: '*' }).first())?.points ?? 0);
}

export async function pointOutlines(db: Database, wanted: PointsWanted): Promise<PointOutline[]> {
  const rows = await narrowed(db('points'), wanted).select(
    'points.id',
    'points.frames',
    'points.frame_errors as frameErrors',
    db.raw("points.run_id || points.code_id || points.decoder || json_extract(channel, '$.kind') AS curve"),
    db.raw("coalesce(channel ->> '$.p', channel ->> '$.e', channel ->> '$.weight', exp(channel ->> '$.ebn0Db')) AS x"),
  );
  return rows as PointOutline[];
}

/** Points by their ids, in the order of their runs. */
export async function pointsWithIds(db: Database, ids: readonly string[]): Promise<StoredPoint[]> {
  const found: StoredPoint[] = [];
  for (let from = 0; from < ids.length; from += rowsAStatement) {
    const rows = await shown(db).whereIn('points.id', ids.slice(from, from + rowsAStatement));
    found.push(...rows.map(toPoint));
  }
  return found.sort((a, b) => (a.runId === b.runId ? a.position - b.position : a.runId < b.runId ? -1 : 1));
}

/** Points in the order of their runs, oldest run first. */
export async function pointsWanted(db: Database, wanted: PointsWanted): Promise<StoredPoint[]> {
  const query = narrowed(shown(db), wanted);
  return (await query.orderBy([{ column: 'points.run_id' }, { column: 'points.position' }])).map(toPoint);
}

export type PointProgress = Pick<
  StoredPoint,
  'tally' | 'counted' | 'before' | 'nextIndex' | 'done' | 'stopReason' | 'stopTarget' | 'setAside'
>;

export async function savePointProgress(db: Database, id: string, progress: PointProgress): Promise<void> {
  await db('points')
    .where({ id })
    .update({
      ...tallyToColumns(progress.tally),
      next_index: progress.nextIndex,
      done: progress.done ? 1 : 0,
      counted: JSON.stringify(progress.counted),
      before_frames: progress.before.frames,
      before_errors: progress.before.frameErrors,
      stop_reason: progress.stopReason,
      stop_target: progress.stopTarget,
      set_aside: progress.setAside,
    });
}

/** Points of a run that are not done, in their order. */
export async function openPointsOf(db: Database, runId: string, most: number): Promise<StoredPoint[]> {
  const query = shown(db).where('points.run_id', runId).where('points.done', 0);
  return (await query.orderBy('points.position').limit(most)).map(toPoint);
}

export async function pointById(db: Database, id: string): Promise<StoredPoint | undefined> {
  const row = await shown(db).where('points.id', id).first();
  return row && toPoint(row);
}

/** Closes what is open of a run whose time is over. */
export async function closeOpenPoints(db: Database, runId: string, stopReason: StopReason): Promise<void> {
  await db('points').where({ run_id: runId, done: 0 }).update({ done: 1, stop_reason: stopReason });
}

export async function setRecomputed(db: Database, id: string, recomputed: number): Promise<void> {
  await db('points').where({ id }).update({ recomputed });
}

export async function openPointCount(db: Database, runId: string): Promise<number> {
  const row = await db('points').where({ run_id: runId, done: 0 }).count({ open: '*' }).first();
  return Number(row?.open ?? 0);
}

/** How many points ended for which reason. */
export async function stopReasonsOf(db: Database, runId: string): Promise<Map<StopReason, number>> {
  const rows: { stop_reason: StopReason; points: number }[] = await db('points')
    .where({ run_id: runId })
    .whereNotNull('stop_reason')
    .groupBy('stop_reason')
    .select('stop_reason')
    .select(db.raw('count(*) AS points'));
  return new Map(rows.map((row) => [row.stop_reason, row.points]));
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
    counted: row.counted ? JSON.parse(row.counted) : emptyTally(),
    before: { frames: row.before_frames ?? 0, frameErrors: row.before_errors ?? 0 },
    stopReason: row.stop_reason ?? null,
    stopTarget: row.stop_target ?? null,
    recomputed: row.recomputed ?? 0,
    setAside: row.set_aside ?? 0,
    plan: row.plan ? JSON.parse(row.plan) : null,
  };
}
