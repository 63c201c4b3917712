import type { Requirements } from '@/api/projects.ts';
import type { Database } from '../db/database.ts';

export interface StoredRequirements {
  requirements: Requirements | null;
  updatedAt: string | null;
}

export async function requirementsOf(db: Database, projectId: string): Promise<StoredRequirements> {
  const row = await db('requirements').where({ project_id: projectId }).first();
  if (!row) return { requirements: null, updatedAt: null };
  return { requirements: JSON.parse(row.content), updatedAt: row.updated_at };
}

export async function saveRequirements(
  db: Database,
  projectId: string,
  content: Requirements,
  by: { userId: string; at: string },
): Promise<void> {
  const row = { content: JSON.stringify(content), updated_by: by.userId, updated_at: by.at };
  await db('requirements')
    .insert({ project_id: projectId, ...row })
    .onConflict('project_id')
    .merge(row);
}
