import type { Run } from '@/api/runs.ts';
import { errorTarget, type StoppingReason, type StoppingRule, stoppingReason } from '@/core/simulation/stopping.ts';
import { emptyTally, mergeTallies, type Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../../db/database.ts';
import { Refusal } from '../../refusal.ts';
import { type PointProgress, type StoredPoint, savePointProgress } from '../../repositories/points.ts';
import { setAsideIndices } from '../../repositories/shard-failures.ts';
import { shardsFrom } from '../../repositories/shards.ts';

export type Statement = Pick<Run, 'stopping' | 'framesPerShard'>;

/** A point of which so many shards were given up has failed. */
export const mostSetAside = 8;

const shardsAPage = 500;

/** The rule that a point stops by: the run's, or the frames that its plan gives it. */
export const ruleOf = ({ stopping }: Statement, { plan }: Pick<StoredPoint, 'plan'>): StoppingRule =>
  plan ? { maxFrames: plan.enumerate ? Number.MAX_SAFE_INTEGER : plan.frames } : stopping;

/** Shards that a point can have at most. */
export function shardCap(run: Statement, point: Pick<StoredPoint, 'plan'>): number {
  const { plan } = point;
  if (plan?.enumerate) return Math.ceil(plan.enumerate.branches / plan.enumerate.branchesPerShard);
  return Math.ceil((plan?.frames ?? run.stopping.maxFrames) / run.framesPerShard);
}

/** Brings a point up to date with its stored shards, from `counted` on. What decides when it is done, and is its tally
 *  from then on, is the sum in index order up to the first shard that meets the rule: the same whoever computed what,
 *  and in whatever order it came. Until then all that is stored is shown. */
export async function recountPoint(db: Database, run: Statement, point: StoredPoint): Promise<PointProgress> {
  const walk = new Walk(point, ruleOf(run, point), shardCap(run, point), await aside(db, point));
  let from = point.nextIndex;
  for (;;) {
    const page = await shardsFrom(db, point.id, from, shardsAPage);
    for (const { index, tally } of page) walk.meet(index, tally);
    if (page.length < shardsAPage || walk.reason) break;
    from = page.at(-1)!.index + 1;
  }
  const progress = walk.progress();
  refuseInexact(progress.tally);
  await savePointProgress(db, point.id, progress);
  return progress;
}

/** For counting a point anew from its first shard. */
export const fromTheStart = () => ({
  counted: emptyTally(),
  before: { frames: 0, frameErrors: 0 },
  nextIndex: 0,
  done: false,
  stopReason: null,
  stopTarget: null,
});

const aside = async (db: Database, { id, setAside }: StoredPoint): Promise<ReadonlySet<number>> =>
  setAside > 0 ? new Set(await setAsideIndices(db, id)) : new Set();

class Walk {
  reason: StoppingReason | 'failed' | null = null;
  private counted: Tally;
  private before: PointProgress['before'];
  private next: number;
  private rest: Tally | null = null;

  constructor(
    private readonly point: StoredPoint,
    private readonly rule: StoppingRule,
    private readonly cap: number,
    private readonly aside: ReadonlySet<number>,
  ) {
    this.counted = point.counted;
    this.before = point.before;
    this.next = point.nextIndex;
    this.pass();
    // A rule that was changed may be met by what is counted already.
    if (this.counted.frames > 0) this.reason ??= stoppingReason(this.counted, rule);
  }

  meet(index: number, tally: Tally): void {
    if (this.reason) return;
    if (index !== this.next) {
      this.rest = this.rest ? mergeTallies(this.rest, tally) : tally;
      return;
    }
    const { frames, frameErrors } = this.counted;
    this.before = { frames, frameErrors };
    this.counted = mergeTallies(this.counted, tally);
    this.next++;
    this.reason = stoppingReason(this.counted, this.rule);
    this.pass();
  }

  progress(): PointProgress {
    if (this.aside.size >= mostSetAside) this.reason ??= 'failed';
    const isDone = this.reason !== null;
    return {
      tally: isDone || !this.rest ? this.counted : mergeTallies(this.counted, this.rest),
      counted: this.counted,
      before: this.before,
      nextIndex: this.next,
      done: isDone,
      stopReason: this.reason,
      stopTarget: this.reason === 'errors' || this.reason === 'width' ? errorTarget(this.rule) : null,
      setAside: this.point.setAside,
    };
  }

  /** Steps over what was set aside, and ends at the cap. */
  private pass(): void {
    if (this.reason) return;
    while (this.aside.has(this.next)) this.next++;
    if (this.next >= this.cap) this.reason = 'frames';
  }
}

/** Sums are kept as exact integers or not at all. */
function refuseInexact(tally: Tally): void {
  for (const [name, value] of Object.entries(tally)) {
    if (typeof value === 'number' && !Number.isSafeInteger(value)) {
      throw new Refusal('limit', `${name}: the point's sum would pass 2^53 and no longer be exact; stop the run here.`);
    }
  }
}
