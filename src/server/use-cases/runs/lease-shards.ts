import type { z } from 'zod';
import type { leasesSchema, newLeasesSchema } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { leaseMs } from '../../jobs/lease-book.ts';
import { runToWrite } from './run-access.ts';
import { shownPoint } from './shown-point.ts';
import { sourceOfCaller } from './source-of-caller.ts';
import { takeLeases } from './take-leases.ts';

/** Gives a tab or script shards that nobody else has. A run at rest or over gives none, and says so. */
export async function leaseShards(
  context: Context,
  runId: string,
  { count, source: named }: z.output<typeof newLeasesSchema>,
): Promise<z.input<typeof leasesSchema>> {
  const run = await runToWrite(context, runId);
  const source = await sourceOfCaller(context, named);
  const isOpen = run.state === 'running' || run.state === 'ready';
  const leases = isOpen ? await takeLeases(context.db, run, { count, holder: source.id }) : [];
  const points = new Map(leases.map(({ point }) => [point.id, point]));
  return {
    leases: leases.map(({ point, index }) => ({ pointId: point.id, index })),
    expiresInMs: leaseMs,
    points: [...points.values()].map((point) => shownPoint(point, [])),
    over: isOpen ? null : run.state,
  };
}
