import type { z } from 'zod';
import type { Run, RunState, runPatchSchema } from '@/api/runs.ts';
import { redisUrl } from '../../config.ts';
import type { Context } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { runEvents } from '../../events/run-events.ts';
import { workEvents } from '../../events/work-events.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { type RunChange, runById, updateRun } from '../../repositories/runs.ts';
import { extendRun } from './extend-run.ts';
import { noFleet } from './refuse-bad-run.ts';
import { runToWrite } from './run-access.ts';

type Patch = z.output<typeof runPatchSchema>;

/** Where a run may go from each state by hand; it finishes by itself. Stopping is final, so that a stopped run's
 *  figures can be quoted. */
const next: Record<RunState, readonly RunState[]> = {
  ready: ['running', 'paused', 'stopped'],
  running: ['paused', 'stopped'],
  paused: ['running', 'stopped'],
  stopped: [],
  finished: [],
};

/** Changes a run between two shards: those under way are still taken, wherever they are computed. */
export async function patchRun(context: Context, runId: string, patch: Patch): Promise<Run> {
  await runToWrite(context, runId);
  const { db, caller } = context;
  const run = await inTransaction(db, async (trx) => {
    const before = (await runById(trx, runId))!;
    const change = await changeOf(trx, before, patch);
    if (Object.keys(change).length > 0) {
      await updateRun(trx, runId, change);
      const { name, state, place, stopping } = before;
      const content = { before: { name, state, place, stopping }, change };
      await recordEvent(trx, caller, { projectId: before.projectId, kind: 'run.changed', subject: runId, content });
    }
    return (await runById(trx, runId))!;
  });
  runEvents.changed(runId);
  workEvents.changed();
  return run;
}

async function changeOf(trx: Database, before: Run, { name, state, place, extend }: Patch): Promise<RunChange> {
  const extended = extend ? await extendRun(trx, before, extend) : {};
  const from = extended.state ?? before.state;
  if (state && state !== from && !next[from].includes(state)) throw noWay(from, state);
  if (place && (from === 'stopped' || from === 'finished')) throw noMove(from);
  if (place === 'fleet' && !redisUrl()) throw badFields({ place: noFleet });
  return {
    ...extended,
    ...(name !== undefined && { name }),
    ...(state && state !== before.state && { state }),
    ...(place && place !== before.place && { place, ...startingAt(place, state ?? from) }),
  };
}

/** The server and the fleet begin by themselves. */
const startingAt = (place: Run['place'], state: RunState): RunChange =>
  place !== 'browser' && state === 'ready' ? { state: 'running' } : {};

function noWay(from: RunState, to: RunState): Refusal {
  const ways = next[from];
  const accepted = ways.length > 0 ? ways.join(' or ') : `nothing: a ${from} run stays as it is`;
  return new Refusal('conflict', `state: a ${from} run cannot become ${to}; accepted is ${accepted}.`, {
    fields: { state: accepted },
  });
}

function noMove(from: RunState): Refusal {
  const accepted = `nothing: a ${from} run has no shards left to compute`;
  return new Refusal('conflict', `place: accepted is ${accepted}.`, { fields: { place: accepted } });
}
