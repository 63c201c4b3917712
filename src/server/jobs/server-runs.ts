import type { Run } from '@/api/runs.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import { type Database, inTransaction } from '../db/database.ts';
import { isStorageError } from '../db/storage-error.ts';
import { runEvents } from '../events/run-events.ts';
import { workEvents } from '../events/work-events.ts';
import { Refusal } from '../refusal.ts';
import type { StoredPoint } from '../repositories/points.ts';
import { runById, runsUnderWay } from '../repositories/runs.ts';
import { type FailedShard, noteFailures } from '../use-cases/runs/fail-shards.ts';
import { nextRechecks, type Recheck, settleRecheck } from '../use-cases/runs/recheck-shards.ts';
import { authorOfRun } from '../use-cases/runs/run-author.ts';
import { sourceOfServer } from '../use-cases/runs/source-of-caller.ts';
import { storeShards } from '../use-cases/runs/store-shards.ts';
import { takeLeases } from '../use-cases/runs/take-leases.ts';
import { leaseBook } from './lease-book.ts';
import { LookAgain } from './look-again.ts';
import { shardTask } from './shard-tasks.ts';
import type { SimulationPool } from './simulation-pool.ts';

interface Task {
  run: Run;
  point: StoredPoint;
  index: number;
}

const flushAfterMs = 200;
const flushAt = 50;
/** Work leased ahead, so that no thread waits for the database. */
const aheadMs = 400;
const mostAhead = 200;
/** Leases of tabs that are gone expire without a word. */
const lookAgainMs = 5000;
const retryMs = 1000;
const holder = 'server';
/** The server knows when it is done with a shard, however long it takes. */
const heldMs = 24 * 3600 * 1000;

/** Works off the runs whose place is the server, and computes again what others handed in. Everything it needs to go on
 *  is in the database, so that it goes on after any end of the process. */
export class ServerRuns {
  private queue: Task[] = [];
  private readonly underWay = new Map<string, { abort: AbortController; count: number }>();
  private rechecking = 0;
  private readonly computed = new Map<string, { pointId: string; index: number; tally: Tally }[]>();
  private readonly failed = new Map<string, FailedShard[]>();
  private readonly shardMs = new Map<string, number>();
  private timer: NodeJS.Timeout | undefined;
  private readonly looker = new LookAgain(
    () => this.lookOnce(),
    (error) => console.error('Looking for shards to compute:', error),
  );
  private flushing: Promise<void> | null = null;
  private isClosed = false;
  private readonly unwatch: () => void;
  private readonly interval: NodeJS.Timeout;

  constructor(
    private readonly db: Database,
    private readonly pool: SimulationPool,
  ) {
    this.unwatch = workEvents.watch(() => this.look());
    this.interval = setInterval(() => this.look(), lookAgainMs).unref();
    this.look();
  }

  /** Hands out nothing more and ends the threads. What was computed is stored. */
  async close(): Promise<void> {
    this.isClosed = true;
    this.unwatch();
    clearInterval(this.interval);
    await this.looker.close();
    await this.flush();
    clearTimeout(this.timer);
    for (const { point, index } of this.queue.splice(0)) leaseBook.release(point.id, index);
    await this.pool.close();
  }

  private look(): void {
    this.looker.look();
  }

  private async lookOnce(): Promise<void> {
    const runs = await runsUnderWay(this.db, 'server');
    await this.letGo(runs);
    await this.recheck();
    let wanted = this.lookahead() - this.queue.length - this.countUnderWay();
    for (const [i, run] of runs.entries()) {
      if (wanted <= 0) break;
      const share = Math.ceil(wanted / (runs.length - i));
      const leases = await takeLeases(this.db, run, { count: share, holder, ms: heldMs });
      this.queue.push(...leases.map((lease) => ({ run, ...lease })));
      wanted -= leases.length;
    }
    this.hand();
  }

  /** Drops what waits of runs that are no longer the server's, and ends what is under way of those that are over. */
  private async letGo(runs: readonly Run[]): Promise<void> {
    const ours = new Set(runs.map((run) => run.id));
    for (const { run, point, index } of this.queue) {
      if (!ours.has(run.id)) leaseBook.release(point.id, index);
    }
    this.queue = this.queue.filter(({ run }) => ours.has(run.id));
    for (const [runId, { abort }] of this.underWay) {
      if (ours.has(runId)) continue;
      const run = await runById(this.db, runId);
      if (!run || run.state === 'stopped' || run.state === 'finished') abort.abort();
    }
  }

  /** Shards to have in hand: enough for every thread for a while, by what a shard has taken. */
  private lookahead(): number {
    const known = [...this.shardMs.values()];
    const shortest = known.length > 0 ? Math.min(...known) : aheadMs;
    const forEach = 1 + Math.ceil(aheadMs / Math.max(1, shortest));
    return Math.min(mostAhead, this.pool.threads * forEach);
  }

  private countUnderWay(): number {
    return [...this.underWay.values()].reduce((sum, { count }) => sum + count, 0);
  }

  private hand(): void {
    // One more than there are threads, so that none waits for the next.
    while (!this.isClosed && this.queue.length > 0 && this.countUnderWay() + this.rechecking <= this.pool.threads) {
      void this.compute(this.queue.shift()!);
    }
  }

  private async compute({ run, point, index }: Task): Promise<void> {
    const work = this.underWay.get(run.id) ?? { abort: new AbortController(), count: 0 };
    this.underWay.set(run.id, work);
    work.count++;
    try {
      const task = await shardTask(this.db, run, point, index);
      const answer = await this.pool.shard(task, work.abort.signal);
      if (answer.ok) {
        this.shardMs.set(run.id, answer.elapsedMs);
        put(this.computed, run.id, { pointId: point.id, index, tally: answer.tally });
      } else put(this.failed, run.id, { pointId: point.id, index, message: answer.failure.message });
    } catch (error) {
      leaseBook.release(point.id, index);
      const message = error instanceof Error ? error.message : String(error);
      if (!work.abort.signal.aborted && !this.isClosed) {
        put(this.failed, run.id, { pointId: point.id, index, message });
      }
    }
    work.count--;
    if (work.count === 0) {
      this.underWay.delete(run.id);
      this.shardMs.delete(run.id);
    }
    this.hand();
    this.soonFlush(run.id);
  }

  private soonFlush(runId: string): void {
    if (this.isClosed) return;
    const isMuch = (this.computed.get(runId)?.length ?? 0) >= flushAt;
    if (isMuch || this.queue.length === 0) void this.flush();
    else this.timer ??= setTimeout(() => void this.flush(), flushAfterMs);
  }

  /** Stores what is computed; a database that cannot be written is waited for. */
  private flush(): Promise<void> {
    clearTimeout(this.timer);
    this.timer = undefined;
    this.flushing ??= this.flushAll().finally(() => {
      this.flushing = null;
      this.look();
    });
    return this.flushing;
  }

  private async flushAll(): Promise<void> {
    for (const runId of new Set([...this.computed.keys(), ...this.failed.keys()])) {
      const shards = this.computed.get(runId) ?? [];
      const failures = this.failed.get(runId) ?? [];
      this.computed.delete(runId);
      this.failed.delete(runId);
      try {
        await inTransaction(this.db, (trx) => this.store(trx, runId, shards, failures));
        runEvents.changed(runId);
      } catch (error) {
        this.keepOrDrop(error, runId, shards, failures);
      }
    }
  }

  private async store(
    trx: Database,
    runId: string,
    shards: readonly { pointId: string; index: number; tally: Tally }[],
    failures: readonly FailedShard[],
  ): Promise<void> {
    const run = await runById(trx, runId);
    if (!run) return;
    const by = { userId: await authorOfRun(trx, runId), source: await sourceOfServer(trx) };
    if (shards.length > 0) await storeShards(trx, run, shards, by);
    if (failures.length > 0) await noteFailures(trx, runId, failures, by);
  }

  private keepOrDrop(
    error: unknown,
    runId: string,
    shards: readonly { pointId: string; index: number; tally: Tally }[],
    failures: readonly FailedShard[],
  ): void {
    const isClosed = error instanceof Refusal && error.code === 'run-closed';
    if (!isClosed) console.error(`Shards of run ${runId} could not be stored:`, error);
    if (!isStorageError(error) || this.isClosed) {
      for (const { pointId, index } of [...shards, ...failures]) leaseBook.release(pointId, index);
      return;
    }
    this.computed.set(runId, [...shards, ...(this.computed.get(runId) ?? [])]);
    this.failed.set(runId, [...failures, ...(this.failed.get(runId) ?? [])]);
    this.timer ??= setTimeout(() => void this.flush(), retryMs);
  }

  /** Computes again what waits for it, beside the runs: half of the threads at most. */
  private async recheck(): Promise<void> {
    const most = Math.max(1, Math.floor(this.pool.threads / 2)) - this.rechecking;
    if (most <= 0) return;
    for (const recheck of await nextRechecks(this.db, most)) {
      this.rechecking++;
      void this.recheckOne(recheck).finally(() => {
        this.rechecking--;
        this.look();
      });
    }
  }

  private async recheckOne(recheck: Recheck): Promise<void> {
    try {
      const { run, point, index } = recheck;
      const answer = await this.pool.shard(await shardTask(this.db, run, point, index));
      const changed = await inTransaction(this.db, (trx) => settleRecheck(trx, recheck, answer));
      for (const runId of changed) runEvents.changed(runId);
    } catch (error) {
      if (this.isClosed) return;
      console.error(`Shard ${recheck.index} of point ${recheck.point.id} could not be computed again:`, error);
      const message = error instanceof Error ? error.message : String(error);
      const answer = { ok: false as const, failure: { code: 'internal', message } };
      await inTransaction(this.db, (trx) => settleRecheck(trx, recheck, answer)).catch(() => {});
    }
  }
}

function put<T>(map: Map<string, T[]>, key: string, value: T): void {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
}
