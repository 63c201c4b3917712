import type { z } from 'zod';
import type { provenanceSchema } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { conflictsOf } from '../../repositories/shard-conflicts.ts';
import { setAsideOf } from '../../repositories/shard-failures.ts';
import { sourcesOf } from '../../repositories/sources.ts';
import { runToRead } from './run-access.ts';

/** Where the shards of a run, or of one of its points, were computed, which contradict each other and which were given
 *  up. */
export async function runProvenance(
  context: Context,
  runId: string,
  pointId?: string,
): Promise<z.input<typeof provenanceSchema>> {
  await runToRead(context, runId);
  const { db } = context;
  return {
    sources: await sourcesOf(db, runId, pointId),
    conflicts: await conflictsOf(db, runId, pointId),
    setAside: await setAsideOf(db, runId, pointId),
  };
}
