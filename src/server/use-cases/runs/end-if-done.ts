import type { Run } from '@/api/runs.ts';
import type { Database } from '../../db/database.ts';
import { openPointCount, stopReasonsOf } from '../../repositories/points.ts';
import { runById, updateRun } from '../../repositories/runs.ts';
import { tellRunOwner } from '../notices/tell-run-owner.ts';
import { replan } from './replan.ts';
import { runSums } from './run-sums.ts';

/** Lets the planner add points to a run whose points are done, and finishes it when there is nothing to add.
 *  @returns whether it is finished. */
export async function endIfDone(trx: Database, run: Run): Promise<boolean> {
  if (run.goal) await replan(trx, run);
  if ((await openPointCount(trx, run.id)) > 0) return false;
  await updateRun(trx, run.id, { state: 'finished' });
  const ended = (await runById(trx, run.id))!;
  const reasons = await stopReasonsOf(trx, run.id);
  const sums = runSums(ended);
  if (reasons.has('failed')) {
    const text = `${sums} Points of which shard after shard failed were given up; the run’s page says why.`;
    await tellRunOwner(trx, ended, 'run-failed', text);
  } else if (ended.outcome && ended.outcome.verdict !== 'complete') {
    await tellRunOwner(trx, ended, 'verdict-reached', `${ended.outcome.text} ${sums}`);
  } else if (reasons.has('pass') || reasons.has('fail')) {
    const text = `${reasons.get('pass') ?? 0} points keep the limit, ${reasons.get('fail') ?? 0} do not. ${sums}`;
    await tellRunOwner(trx, ended, 'verdict-reached', text);
  } else await tellRunOwner(trx, ended, 'run-finished', sums);
  return true;
}
