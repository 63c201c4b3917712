import type { NewRun } from '@/api/runs.ts';
import { redisUrl } from '../../config.ts';
import { badFields } from '../../refusal.ts';

/** What is accepted as a place when there is no Redis. */
export const noFleet = '"browser" or "server"; a fleet needs a server started with REDIS_URL';

const largestIndex = 1e9;

/** Codes that a run's points or its goal name. */
export function codesNamed({ points, goal }: NewRun): string[] {
  const ofGoal = goal?.kind === 'curve' ? goal.curves.map(({ codeId }) => codeId) : goal ? [goal.codeId] : [];
  return [...new Set([...points.map((point) => point.codeId), ...ofGoal])];
}

/** What the schema cannot see: codes of the project, and figures that must fit each other.
 *  @param lengths n of each code of the project that the run names.
 *  @throws Refusal naming every bad field. */
export function refuseBadRun(run: NewRun, lengths: ReadonlyMap<string, number>): void {
  const fields: Record<string, string> = {};
  if (run.place === 'fleet' && !redisUrl()) fields.place = noFleet;
  if (run.stopping.maxFrames / run.framesPerShard > largestIndex) {
    fields.framesPerShard = `at least ${Math.ceil(run.stopping.maxFrames / largestIndex)} for so many frames`;
  }
  refuseBadGoal(run, lengths, fields);
  const seen = new Map<string, number>();
  run.points.forEach((point, i) => {
    const n = lengths.get(point.codeId);
    if (n === undefined) {
      fields[`points.${i}.codeId`] = 'the id of a code of this project, with parity checks';
      return;
    }
    if (point.channel.kind === 'stratum' && point.channel.weight > n) {
      fields[`points.${i}.channel.weight`] = `a whole number from 0 to ${n}, the code's length`;
    }
    const key = JSON.stringify([point.codeId, point.channel, point.decoder]);
    const twin = seen.get(key);
    if (twin !== undefined) fields[`points.${i}`] = `a point that differs from point ${twin}`;
    else seen.set(key, i);
  });
  for (const n of lengths.values()) {
    // The sum of squared bit errors of a shard must stay an exact integer.
    const mostFrames = Math.floor(Number.MAX_SAFE_INTEGER / n ** 2);
    if (run.framesPerShard > mostFrames) fields.framesPerShard = `at most ${mostFrames} for a code of length ${n}`;
  }
  if (Object.keys(fields).length > 0) throw badFields(fields);
}

function refuseBadGoal({ goal }: NewRun, lengths: ReadonlyMap<string, number>, fields: Record<string, string>): void {
  if (goal?.kind === 'limit') {
    if (!lengths.has(goal.codeId)) fields['goal.codeId'] = 'the id of a code of this project, with parity checks';
    const stages = goal.decoder.kind === 'two-stage' ? goal.decoder.stages : [goal.decoder];
    if (stages.some((stage) => stage.kind === 'sum-product' && stage.designP === undefined)) {
      fields['goal.decoder.designP'] = 'a fixed p for sum-product to assume, since what fails must not depend on p';
    }
    return;
  }
  goal?.curves.forEach(({ codeId }, i) => {
    if (!lengths.has(codeId))
      fields[`goal.curves.${i}.codeId`] = 'the id of a code of this project, with parity checks';
  });
}
