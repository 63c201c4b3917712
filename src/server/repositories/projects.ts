import type { Project } from '@/api/projects.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface NewProjectRow {
  id: string;
  name: string;
  description: string;
  isDemo: boolean;
  createdBy: string;
  createdAt: string;
}

export async function insertProject(db: Database, project: NewProjectRow): Promise<void> {
  await db('projects').insert({
    id: project.id,
    name: project.name,
    description: project.description,
    is_demo: project.isDemo ? 1 : 0,
    created_by: project.createdBy,
    created_at: project.createdAt,
  });
}

/** Projects a user belongs to, newest first. */
export async function projectsOf(db: Database, userId: string, page: PageRequest): Promise<Project[]> {
  const query = sharedWith(db, userId).orderBy('projects.id', 'desc').limit(page.limit);
  if (page.after) query.where('projects.id', '<', page.after);
  return (await query).map(toProject);
}

export async function projectOf(db: Database, id: string, userId: string): Promise<Project | undefined> {
  const row = await sharedWith(db, userId).where('projects.id', id).first();
  return row && toProject(row);
}

function sharedWith(db: Database, userId: string) {
  const countOf = (table: string, alias: string) =>
    db(table)
      .count('*')
      .whereRaw('?? = ??', [`${table}.project_id`, 'projects.id'])
      .as(alias);
  return db('projects')
    .join('memberships', 'memberships.project_id', 'projects.id')
    .where('memberships.user_id', userId)
    .select('projects.*', 'memberships.role as member_role')
    .select(countOf('requirements', 'requirement_count'), countOf('codes', 'code_count'), countOf('runs', 'run_count'))
    .select(countOf('runs', 'open_run_count').where('runs.state', 'running'))
    .select(countOf('releases', 'release_count'), countOf('sign_offs', 'sign_off_count'))
    .select(
      countOf('sign_offs', 'open_sign_off_count').whereNotExists(
        db('sign_off_decisions').whereRaw('sign_off_decisions.sign_off_id = sign_offs.id'),
      ),
    );
}

function toProject(row: Row): Project {
  return {
    id: row.id!,
    name: row.name!,
    description: row.description!,
    isDemo: row.is_demo === 1,
    role: row.member_role!,
    createdAt: row.created_at!,
    counts: {
      requirements: row.requirement_count!,
      codes: row.code_count!,
      runs: row.run_count!,
      runsUnderWay: row.open_run_count!,
      signOffs: row.sign_off_count!,
      signOffsOpen: row.open_sign_off_count!,
      releases: row.release_count!,
    },
  };
}
