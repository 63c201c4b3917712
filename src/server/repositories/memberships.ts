import type { ProjectRole } from '@/api/projects.ts';
import type { Database } from '../db/database.ts';

export async function insertMembership(
  db: Database,
  membership: { projectId: string; userId: string; role: ProjectRole; createdAt: string },
): Promise<void> {
  await db('memberships').insert({
    project_id: membership.projectId,
    user_id: membership.userId,
    role: membership.role,
    created_at: membership.createdAt,
  });
}

export async function roleIn(db: Database, projectId: string, userId: string): Promise<ProjectRole | undefined> {
  const row = await db('memberships').where({ project_id: projectId, user_id: userId }).first('role');
  return row?.role;
}
