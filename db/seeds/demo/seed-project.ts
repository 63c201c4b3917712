import type { BuiltCode } from '@workers/build/api.ts';
import { nowText } from '@/server/context.ts';
import type { Database } from '@/server/db/database.ts';
import { newId } from '@/server/ids.ts';
import { insertCode } from '@/server/repositories/codes.ts';
import { insertMembership } from '@/server/repositories/memberships.ts';
import { insertPoints, pointsOfRun, type StoredPoint } from '@/server/repositories/points.ts';
import { insertProject } from '@/server/repositories/projects.ts';
import { saveRequirements } from '@/server/repositories/requirements.ts';
import { insertRun } from '@/server/repositories/runs.ts';
import { insertShards } from '@/server/repositories/shards.ts';
import { recountPoint } from '@/server/use-cases/runs/recount-point.ts';
import { type DemoProject, type DemoRun, demoAccounts } from './scenario.ts';
import { type PackedTally, type StoredResults, unpackTally } from './stored-results.ts';

export type BuiltDemo = Map<string, BuiltCode>;

interface Material {
  /** Ids of the demo accounts by role. */
  userIds: ReadonlyMap<string, string>;
  built: BuiltDemo;
  results: StoredResults;
}

export async function seedProject(db: Database, project: DemoProject, material: Material): Promise<void> {
  const { userIds, built, results } = material;
  const id = newId();
  const engineer = userIds.get('engineer')!;
  const { name, description, requirements } = project;
  await insertProject(db, {
    id,
    name,
    description,
    isDemo: true,
    createdBy: userIds.get('owner')!,
    createdAt: nowText(),
  });
  for (const { role } of demoAccounts) {
    await insertMembership(db, { projectId: id, userId: userIds.get(role)!, role, createdAt: nowText() });
  }
  await saveRequirements(db, id, requirements, { userId: engineer, at: nowText() });
  const codeIds = new Map<string, string>();
  for (const { key, name: codeName, design, derivation } of project.codes) {
    const code = built.get(key)!;
    if (code.fingerprint !== results.fingerprints[key]) {
      throw new Error(`The demo's results are of another matrix than ${key}; run db/seeds/demo/compute-runs.ts.`);
    }
    const row = { ...code, id: newId(), projectId: id, name: codeName, design, derivation };
    codeIds.set(key, row.id);
    await insertCode(db, { ...row, createdBy: engineer, createdAt: nowText() });
  }
  for (const run of project.runs) await seedRun(db, run, { projectId: id, engineer, codeIds, results });
}

async function seedRun(
  db: Database,
  run: DemoRun,
  at: { projectId: string; engineer: string; codeIds: ReadonlyMap<string, string>; results: StoredResults },
): Promise<void> {
  const id = newId();
  const { key, points: planned, ...stated } = run;
  const own = { id, projectId: at.projectId, isDemo: true, createdBy: at.engineer, createdAt: nowText() };
  await insertRun(db, { ...stated, ...own, place: 'browser', state: 'finished' });
  const rows = planned.map(({ code, channel, decoder }, position) => {
    return { id: newId(), runId: id, position, codeId: at.codeIds.get(code)!, channel, decoder };
  });
  await insertPoints(db, rows);
  for (const point of await pointsOfRun(db, id)) {
    await seedShards(db, run, point, at.results.runs[key]![point.position]!, at.engineer);
  }
}

async function seedShards(
  db: Database,
  run: DemoRun,
  point: StoredPoint,
  packed: readonly PackedTally[],
  userId: string,
): Promise<void> {
  const tallies = packed.map((shard) => unpackTally(shard, run.framesPerShard, point.n));
  const shards = tallies.map((tally, index) => ({ pointId: point.id, index, tally }));
  await insertShards(db, shards, { userId, at: nowText() });
  await recountPoint(db, run, point);
}
