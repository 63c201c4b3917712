import type { NewRun, Run, RunState } from '@/api/runs.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface NewRunRow extends Omit<NewRun, 'points'> {
  id: string;
  projectId: string;
  isDemo: boolean;
  state: RunState;
  createdBy: string;
  createdAt: string;
}

export async function insertRun(db: Database, run: NewRunRow): Promise<void> {
  await db('runs').insert({
    id: run.id,
    project_id: run.projectId,
    name: run.name,
    seed: run.seed,
    frames_per_shard: run.framesPerShard,
    stop_frame_errors: run.stopping.frameErrors,
    stop_max_frames: run.stopping.maxFrames,
    place: run.place,
    state: run.state,
    is_demo: run.isDemo ? 1 : 0,
    created_by: run.createdBy,
    created_at: run.createdAt,
  });
}

const shown = (db: Database) => {
  const points = () => db('points').whereRaw('points.run_id = runs.id');
  return db('runs')
    .join('users', 'users.id', 'runs.created_by')
    .select('runs.*', 'users.name as author')
    .select(points().count('*').as('point_count'), points().sum('done').as('points_done'))
    .select(points().sum('frames').as('frame_sum'), points().sum('frame_errors').as('frame_error_sum'));
};

export async function runById(db: Database, id: string): Promise<Run | undefined> {
  const row = await shown(db).where('runs.id', id).first();
  return row && toRun(row);
}

/** How often a run has changed, and whose it is; undefined when there is none. */
export async function revisionOfRun(
  db: Database,
  id: string,
): Promise<{ revision: number; projectId: string } | undefined> {
  return db('runs').where({ id }).first('revision', 'project_id as projectId');
}

/** Runs of a project, newest first. */
export async function runsOf(db: Database, projectId: string, page: PageRequest): Promise<Run[]> {
  const query = shown(db).where('runs.project_id', projectId).orderBy('runs.id', 'desc').limit(page.limit);
  if (page.after) query.where('runs.id', '<', page.after);
  return (await query).map(toRun);
}

export async function updateRun(db: Database, id: string, change: { name?: string; state?: RunState }): Promise<void> {
  await db('runs').where({ id }).update(change);
}

function toRun(row: Row): Run {
  return {
    id: row.id!,
    projectId: row.project_id!,
    name: row.name!,
    seed: row.seed!,
    framesPerShard: row.frames_per_shard!,
    stopping: { frameErrors: row.stop_frame_errors!, maxFrames: row.stop_max_frames! },
    place: row.place!,
    state: row.state!,
    createdAt: row.created_at!,
    createdBy: row.author!,
    isDemo: row.is_demo === 1,
    pointCount: row.point_count ?? 0,
    pointsDone: row.points_done ?? 0,
    frames: row.frame_sum ?? 0,
    frameErrors: row.frame_error_sum ?? 0,
    revision: row.revision!,
  };
}
