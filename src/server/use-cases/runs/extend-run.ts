import type { z } from 'zod';
import type { Run, runPatchSchema } from '@/api/runs.ts';
import type { Database } from '../../db/database.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { pointsOfRun } from '../../repositories/points.ts';
import type { RunChange } from '../../repositories/runs.ts';
import { recountPoint } from './recount-point.ts';

type Extension = NonNullable<z.output<typeof runPatchSchema>['extend']>;

/** Raises what a run's points stop at. Points that were done go on from the shards they have; a finished run that has
 *  work again goes on, one of the browser when somebody opens it.
 *  @throws Refusal when the run was stopped, follows a goal of its own, or would get less than before. */
export async function extendRun(trx: Database, run: Run, extension: Extension): Promise<RunChange> {
  if (run.state === 'stopped') {
    throw new Refusal('conflict', 'extend: a stopped run stays as it is, so that its figures can be quoted.');
  }
  if (run.goal?.kind === 'limit') {
    throw new Refusal('conflict', 'extend: this run plans its own frames; state another with a larger maxFrames.');
  }
  const { frameErrors, maxFrames } = extension;
  const fields: Record<string, string> = {};
  const { stopping } = run;
  if (frameErrors !== undefined && frameErrors < (stopping.frameErrors ?? 0)) {
    fields['extend.frameErrors'] = `at least ${stopping.frameErrors}, as before`;
  }
  if (maxFrames !== undefined && maxFrames < stopping.maxFrames) {
    fields['extend.maxFrames'] = `at least ${stopping.maxFrames}, as before`;
  }
  if (Object.keys(fields).length > 0) throw badFields(fields);
  const longer = {
    ...stopping,
    ...(frameErrors !== undefined && { frameErrors }),
    ...(maxFrames !== undefined && { maxFrames }),
  };
  let isOpen = false;
  for (const point of await pointsOfRun(trx, run.id)) {
    if (!point.done) continue;
    const again = await recountPoint(trx, { ...run, stopping: longer }, { ...point, done: false, stopReason: null });
    isOpen ||= !again.done;
  }
  const goesOn = run.state === 'finished' && isOpen;
  return { stopping: longer, ...(goesOn && { state: run.place === 'browser' ? 'paused' : 'running', outcome: null }) };
}
