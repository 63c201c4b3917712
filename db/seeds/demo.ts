import type { Knex } from 'knex';
import { hashPassword } from '@/server/auth/passwords.ts';
import { nowText } from '@/server/context.ts';
import { type Database, inTransaction } from '@/server/db/database.ts';
import { newId } from '@/server/ids.ts';
import { anyUser, insertUser } from '@/server/repositories/users.ts';
import { buildDemoCode } from './demo/build.ts';
import { demoAccounts, demoPassword, demoProjects } from './demo/scenario.ts';
import { type BuiltDemo, seedProject } from './demo/seed-project.ts';
import type { StoredResults } from './demo/stored-results.ts';

/** Fills an empty database with the demo, all or nothing.
 *  @returns false when the database has users already; then nothing is touched. */
export async function seedDemo(db: Database): Promise<boolean> {
  if (await anyUser(db)) return false;
  const results = (await import('./demo/runs.json', { with: { type: 'json' } })).default as unknown as StoredResults;
  const codes = demoProjects.flatMap((project) => project.codes);
  const built: BuiltDemo = new Map();
  for (const code of codes) built.set(code.key, await buildDemoCode(code));
  const passwordHashes = await Promise.all(demoAccounts.map(() => hashPassword(demoPassword)));
  await inTransaction(db, async (trx) => {
    const userIds = new Map<string, string>();
    for (const [i, { role, name, workspaceRole }] of demoAccounts.entries()) {
      const id = newId();
      userIds.set(role, id);
      const email = `${role}@demo.test`;
      const hash = passwordHashes[i]!;
      const user = { id, email, name, role: workspaceRole, passwordHash: hash, isDemo: true, createdAt: nowText() };
      await insertUser(trx, user);
    }
    for (const project of demoProjects) await seedProject(trx, project, { userIds, built, results });
  });
  return true;
}

/** For `npm run seed`. */
export async function seed(knex: Knex): Promise<void> {
  console.log((await seedDemo(knex)) ? 'Seeded the demo projects.' : 'The database has users; nothing was seeded.');
}
