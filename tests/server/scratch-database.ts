import { join } from 'node:path';
import knex, { type Knex } from 'knex';
import type { Context } from '@/server/context.ts';
import { nowText } from '@/server/context.ts';
import { knexConfig } from '@/server/db/knex-config.ts';
import { migrateSafely } from '@/server/db/migrate.ts';
import { migrationSource } from '@/server/db/migration-source.ts';
import { newId } from '@/server/ids.ts';
import { insertUser } from '@/server/repositories/users.ts';
import { createProject } from '@/server/use-cases/projects/create-project.ts';
import { scratchDir } from './built-server.ts';

export interface Scratch {
  db: Knex;
  file: string;
  dataDir: string;
}

/** An empty database file of its own, with the server's pragmas. */
export function openScratch(dataDir = scratchDir()): Scratch {
  const file = join(dataDir, 'blockwright.sqlite');
  return { db: knex(knexConfig(file)), file, dataDir };
}

/** A migrated database with one member, who owns one project. */
export async function furnishedScratch(dataDir?: string): Promise<Scratch & { context: Context; projectId: string }> {
  const scratch = openScratch(dataDir);
  await migrateSafely(scratch.db, migrationSource);
  const caller = { id: newId(), email: 'a@b.test', name: 'A member', role: 'member' as const };
  await insertUser(scratch.db, { ...caller, passwordHash: null, isDemo: false, createdAt: nowText() });
  const context = { db: scratch.db, caller };
  const project = await createProject(context, { name: 'Scratch' });
  return { ...scratch, context, projectId: project.id };
}
