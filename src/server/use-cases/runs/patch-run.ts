import type { z } from 'zod';
import type { Run, RunState, runPatchSchema } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { runEvents } from '../../events/run-events.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { runById, updateRun } from '../../repositories/runs.ts';
import { runToWrite } from './run-access.ts';

/** Where a run may go from each state by hand; it finishes by itself. Stopping is final, so that a stopped run's
 *  figures can be quoted. */
const next: Record<RunState, readonly RunState[]> = {
  ready: ['running', 'paused', 'stopped'],
  running: ['paused', 'stopped'],
  paused: ['running', 'stopped'],
  stopped: [],
  finished: [],
};

export async function patchRun(context: Context, runId: string, patch: z.output<typeof runPatchSchema>): Promise<Run> {
  await runToWrite(context, runId);
  const { db, caller } = context;
  const run = await inTransaction(db, async (trx) => {
    const before = (await runById(trx, runId))!;
    const state = patch.state === before.state ? undefined : patch.state;
    if (state && !next[before.state].includes(state)) throw noWay(before.state, state);
    const change = { ...(patch.name !== undefined && { name: patch.name }), ...(state && { state }) };
    if (Object.keys(change).length > 0) {
      await updateRun(trx, runId, change);
      const content = { before: { name: before.name, state: before.state }, change };
      await recordEvent(trx, caller, { projectId: before.projectId, kind: 'run.changed', subject: runId, content });
    }
    return (await runById(trx, runId))!;
  });
  runEvents.changed(runId);
  return run;
}

function noWay(from: RunState, to: RunState): Refusal {
  const ways = next[from];
  const accepted = ways.length > 0 ? ways.join(' or ') : `nothing: a ${from} run stays as it is`;
  return new Refusal('conflict', `state: a ${from} run cannot become ${to}; accepted is ${accepted}.`, {
    fields: { state: accepted },
  });
}
