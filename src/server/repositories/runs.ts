import type { Goal, NewRun, Outcome, Place, Run, RunState, Stopping } from '@/api/runs.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface NewRunRow extends Omit<NewRun, 'points' | 'goal'> {
  goal?: Goal | null;
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
    ...stoppingColumns(run.stopping),
    goal: run.goal ? JSON.stringify(run.goal) : null,
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

export interface RunChange {
  name?: string;
  state?: RunState;
  place?: Place;
  stopping?: Stopping;
  outcome?: Outcome | null;
}

export async function updateRun(db: Database, id: string, change: RunChange): Promise<void> {
  const { stopping, outcome, ...plain } = change;
  await db('runs')
    .where({ id })
    .update({
      ...plain,
      ...(stopping && stoppingColumns(stopping)),
      ...(outcome !== undefined && { outcome: outcome && JSON.stringify(outcome) }),
    });
}

/** Without a rule on errors, as many as there can be frames say the same. */
const stoppingColumns = (stopping: Stopping) => ({
  stopping: JSON.stringify(stopping),
  stop_frame_errors: stopping.frameErrors ?? stopping.maxFrames,
  stop_max_frames: stopping.maxFrames,
});

/** Runs under way at a place, in the order of their making. */
export async function runsUnderWay(db: Database, place: Place): Promise<Run[]> {
  const ids = await db('runs').where({ place, state: 'running' }).orderBy('id').pluck('id');
  const runs = await Promise.all(ids.map((id) => runById(db, id)));
  return runs.filter((run) => run !== undefined);
}

export async function authorIdOf(db: Database, id: string): Promise<string | undefined> {
  return (await db('runs').where({ id }).first('created_by'))?.created_by;
}

/** Adds to the time that a run was worked on. @returns all of it. */
export async function addTimeSpent(db: Database, id: string, elapsedMs: number): Promise<number> {
  await db('runs').where({ id }).increment('spent_ms', Math.round(elapsedMs));
  return Number((await db('runs').where({ id }).first('spent_ms'))?.spent_ms ?? 0);
}

function toRun(row: Row): Run {
  return {
    id: row.id!,
    projectId: row.project_id!,
    name: row.name!,
    seed: row.seed!,
    framesPerShard: row.frames_per_shard!,
    // Runs from before `stopping` was stored have the two that there were.
    stopping: row.stopping
      ? JSON.parse(row.stopping)
      : { frameErrors: row.stop_frame_errors!, maxFrames: row.stop_max_frames! },
    place: row.place!,
    goal: row.goal ? JSON.parse(row.goal) : null,
    outcome: row.outcome ? JSON.parse(row.outcome) : null,
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
