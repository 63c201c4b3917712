import type { Goal, Outcome, PointPlan, Run } from '@/api/runs.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { binomial } from '@/core/designs/subset-rank.ts';
import { LimitError } from '@/core/errors.ts';
import { enumerateStratum } from '@/core/simulation/enumerate-stratum.ts';
import { guaranteedRadius } from '@/core/simulation/guaranteed-radius.ts';
import {
  type LimitGoal,
  limitVerdict,
  planStage,
  stageLevel,
  weightsToSample,
} from '@/core/simulation/limit-planning.ts';
import { provedStrata, type Stratum } from '@/core/simulation/stratified-rate.ts';
import { badFields } from '../../refusal.ts';
import type { StoredPoint } from '../../repositories/points.ts';
import type { PlannedPoint } from './replan.ts';

type GoalOfLimit = Extract<Goal, { kind: 'limit' }>;
type Enumeration = NonNullable<PointPlan['enumerate']>;

/** Patterns up to symmetry that a weight may have to be enumerated, and about so many a shard. */
const mostPatterns = 300_000;
const patternsAShard = 20_000;
const mostStrata = 200;
const mostStages = 8;

/** FER that the goal asks for: UBER counts errors per information bit. */
const targetFer = (goal: GoalOfLimit, k: number): number =>
  goal.rate === 'uber' ? goal.target * Math.max(1, k) : goal.target;

const limitGoal = (goal: GoalOfLimit, { n, k }: { n: number; k: number }): LimitGoal => ({
  ...{ n, p: goal.p, level: goal.level },
  target: targetFer(goal, k),
});

/** What a run to a limit begins with: the weights that a theorem settles, those small enough to be tried whole, and a
 *  shard of each other weight that matters, by which the frames that count are planned.
 *  @throws Refusal when too many weights matter for the target to be within reach. */
export async function firstStage(
  goal: GoalOfLimit,
  code: { H: SparseMatrix; n: number; k: number },
  { framesPerShard }: Pick<Run, 'framesPerShard'>,
): Promise<{ radius: number; points: PlannedPoint[] }> {
  const { H } = code;
  const { codeId, decoder } = goal;
  const radius = guaranteedRadius(H, decoder)?.value ?? 0;
  const proved = provedStrata(Math.min(radius, code.n));
  const needed = weightsToSample(proved, limitGoal(goal, code));
  // Where the proof alone would do, the first weight beyond it is looked at all the same: a run has something to run.
  const weights = needed.length > 0 ? needed : [Math.min(radius + 1, code.n)];
  if (weights.length > mostStrata) {
    const text = `a p and a target for which at most ${mostStrata} numbers of errors matter; here ${weights.length} do`;
    throw badFields({ 'goal.p': text });
  }
  const points: PlannedPoint[] = [];
  let isSmall = true;
  for (const weight of weights) {
    const enumerate: Enumeration | null = isSmall ? await enumerationOf(goal, H, weight, framesPerShard) : null;
    isSmall = enumerate !== null;
    const plan = enumerate
      ? { stage: 0, frames: 0, enumerate, stream: 'all' }
      : { stage: 0, frames: framesPerShard, stream: 'pilot' };
    points.push({ codeId, channel: { kind: 'stratum', weight }, decoder, plan });
  }
  return { radius, points };
}

async function enumerationOf(
  goal: GoalOfLimit,
  H: SparseMatrix,
  weight: number,
  framesPerShard: number,
): Promise<Enumeration | null> {
  const channel = { kind: 'bsc' as const, p: goal.p };
  const spec = { H, channel, decoder: goal.decoder, seed: '', framesPerShard };
  try {
    const part = await enumerateStratum(spec, weight, { from: 0, to: 0, limitPatterns: mostPatterns });
    const patterns = binomial(H.cols, weight) / part.symmetryOrder;
    const shards = Math.max(1, Math.min(part.branches, Math.ceil(patterns / patternsAShard)));
    if (part.branches === 0) return null;
    return { branches: part.branches, branchesPerShard: Math.ceil(part.branches / shards) };
  } catch (error) {
    if (error instanceof LimitError) return null;
    throw error;
  }
}

/** Judges a stage that is done and plans the next: the pilot's frames and those of earlier stages only plan, each stage
 *  counts its own. */
export function nextStage(
  run: Pick<Run, 'stopping' | 'framesPerShard'>,
  goal: GoalOfLimit,
  points: readonly StoredPoint[],
): { points: PlannedPoint[] } | { outcome: Outcome | null } {
  if (points.some((point) => !point.done)) return { outcome: null };
  const limit = limitGoal(goal, points[0]!);
  const known = settledStrata(goal, points);
  const stage = Math.max(0, ...points.map((point) => point.plan?.stage ?? 0));
  const isSettled = !points.some(isSampled);
  const judged = judge(goal, limit, known, points, stage);
  if (isSettled || (stage > 0 && judged.verdict)) return { outcome: judged.outcome };
  const spent = points.reduce((sum, point) => sum + (isSampled(point) ? point.tally.frames : 0), 0);
  const plan = planStage(known, priorStrata(points), limit, {
    level: stageLevel(goal.level, stage + 1),
    framesPerShard: run.framesPerShard,
    maxFrames: run.stopping.maxFrames - spent,
  });
  if (!plan.isEnough || stage >= mostStages) return { outcome: judged.outcome };
  const { codeId, decoder } = goal;
  const stream = `stage ${stage + 1}`;
  const added = plan.strata.map(({ weight, frames }): PlannedPoint => {
    return { codeId, channel: { kind: 'stratum', weight }, decoder, plan: { stage: stage + 1, frames, stream } };
  });
  return { points: added };
}

const isSampled = ({ plan }: StoredPoint): boolean => plan?.enumerate === undefined;

const stratumOf = ({ channel, tally }: StoredPoint): Stratum => ({
  weight: channel.kind === 'stratum' ? channel.weight : 0,
  frames: tally.frames,
  frameErrors: tally.frameErrors,
});

/** Proved, and tried whole: an enumeration of which a shard was set aside settles nothing. */
function settledStrata(goal: GoalOfLimit, points: readonly StoredPoint[]): Stratum[] {
  const tried = points.filter((point) => !isSampled(point) && point.done && point.setAside === 0);
  return [
    ...provedStrata(goal.radius ?? 0),
    ...tried.map((point) => ({ ...stratumOf(point), grade: 'computed' as const })),
  ];
}

/** The frames of a stage; a weight without any is left out, and so counts as failing. */
const stageStrata = (points: readonly StoredPoint[], stage: number): Stratum[] =>
  points
    .filter((point) => isSampled(point) && point.plan?.stage === stage && point.tally.frames > 0)
    .map((point) => stratumOf(point));

/** All frames of a weight so far, for planning. */
function priorStrata(points: readonly StoredPoint[]): Stratum[] {
  const sums = new Map<number, Stratum>();
  for (const point of points.filter(isSampled)) {
    const { weight, frames, frameErrors } = stratumOf(point);
    const sum = sums.get(weight) ?? { weight, frames: 0, frameErrors: 0 };
    sums.set(weight, { weight, frames: sum.frames + frames, frameErrors: sum.frameErrors + frameErrors });
  }
  return [...sums.values()];
}

const wordsOf = {
  pass: (target: number) => `is at most ${target}`,
  fail: (target: number) => `is above ${target}`,
  open: (target: number) => `could not be shown to be at most ${target}, nor above it, within the frames allowed`,
};

/** The limits from what is settled and one stage's frames, at that stage's level; the pilot's count as a first stage's
 *  where no other was worth stating, since they were planned by nothing. */
function judge(
  goal: GoalOfLimit,
  limit: LimitGoal,
  known: readonly Stratum[],
  points: readonly StoredPoint[],
  stage: number,
) {
  const isCertain = !points.some(isSampled);
  const level = isCertain ? goal.level : stageLevel(goal.level, Math.max(1, stage));
  const { verdict, ...rate } = limitVerdict([...known, ...stageStrata(points, stage)], limit, level);
  const scale = goal.target / limit.target;
  const figures = { estimate: rate.estimate * scale, lower: rate.lower * scale, upper: rate.upper * scale, level };
  const name = goal.rate === 'uber' ? 'UBER' : 'FER';
  const text =
    `${name} at p = ${goal.p} ${wordsOf[verdict ?? 'open'](goal.target)}: from ${figures.lower.toPrecision(3)} to ` +
    `${figures.upper.toPrecision(3)} at ${Number((100 * level).toPrecision(4))} %.`;
  return { verdict, outcome: { verdict: verdict ?? 'open', text, ...figures } satisfies Outcome };
}
