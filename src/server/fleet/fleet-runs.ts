import { type Job, Queue, QueueEvents } from 'bullmq';
import { type FleetMachine, machineSchema } from '@/api/fleet.ts';
import type { Run } from '@/api/runs.ts';
import { type Database, inTransaction } from '../db/database.ts';
import { runEvents } from '../events/run-events.ts';
import { workEvents } from '../events/work-events.ts';
import { packMatrix } from '../files/matrix-blob.ts';
import { leaseBook } from '../jobs/lease-book.ts';
import { LookAgain } from '../jobs/look-again.ts';
import { seedOf } from '../jobs/shard-tasks.ts';
import { Refusal } from '../refusal.ts';
import { matrixOf } from '../repositories/codes.ts';
import { runById, runsUnderWay } from '../repositories/runs.ts';
import { noteFailures } from '../use-cases/runs/fail-shards.ts';
import { authorOfRun } from '../use-cases/runs/run-author.ts';
import { refuseQuarantined, sourceOfMachine } from '../use-cases/runs/source-of-caller.ts';
import { storeShards } from '../use-cases/runs/store-shards.ts';
import { type Lease, takeLeases } from '../use-cases/runs/take-leases.ts';
import { openRedis, shownUrl } from './open-redis.ts';
import {
  heartbeatMs,
  keys,
  machineGoneMs,
  notCounted,
  prefix,
  queueName,
  type ShardJob,
  type ShardResult,
  shardResultSchema,
} from './protocol.ts';

interface Out {
  runId: string;
  pointId: string;
  index: number;
  since: number;
}

const lookMs = 1000;
const reconcileMs = 5000;
const jobsAtOnce = 200;
/** Shards in the queue before any machine is known, so that the first to join finds work. */
const leastOut = 8;
/** A minute of Redis' absence must not make a shard another's while it waits in the queue. */
const heldMs = 24 * 3600 * 1000;
const aheadMs = 2000;

/** Gives the shards of the fleet's runs to Redis and takes the tallies out of it. A result leaves Redis only once it is
 *  committed here. What Redis loses is handed out again; what it gives twice counts once. */
export class FleetRuns {
  private readonly redis: ReturnType<typeof openRedis>;
  private readonly queue: Queue<ShardJob, ShardResult>;
  private readonly events: QueueEvents;
  private readonly out = new Map<string, Out>();
  private readonly matricesSent = new Set<string>();
  private readonly timer: NodeJS.Timeout;
  private readonly unwatch: () => void;
  private readonly looker = new LookAgain(
    () => this.lookOnce(),
    (error) => this.redis.status === 'ready' && console.error('The fleet’s shards:', error),
  );
  private reconciledAt = 0;
  private toldAt = Number.NEGATIVE_INFINITY;
  private shardMs = aheadMs;

  constructor(
    private readonly db: Database,
    url: string,
    private readonly release: string,
  ) {
    const away = (message: string) =>
      console.error(`Redis at ${shownUrl(url)} does not answer (${message}). Runs of the fleet wait; nothing is lost.`);
    this.redis = openRedis(url, away);
    // After an absence it may have forgotten everything.
    this.redis.on('ready', () => this.matricesSent.clear());
    this.queue = new Queue(queueName, { connection: this.redis, prefix });
    this.events = new QueueEvents(queueName, { connection: openRedis(url, () => {}), prefix });
    // What is wrong with Redis is said by `openRedis`.
    this.queue.on('error', () => {});
    this.events.on('error', () => {});
    for (const event of ['completed', 'failed'] as const) this.events.on(event, () => this.look());
    this.unwatch = workEvents.watch(() => this.look());
    this.timer = setInterval(() => this.look(), lookMs).unref();
    this.look();
  }

  /** Whether Redis answers, and who has joined. */
  async state(): Promise<{ redis: 'up' | 'down'; machines: FleetMachine[] }> {
    if (this.redis.status !== 'ready') return { redis: 'down', machines: [] };
    return { redis: 'up', machines: await this.machines() };
  }

  async close(): Promise<void> {
    clearInterval(this.timer);
    this.unwatch();
    this.redis.disconnect();
    await Promise.allSettled([this.looker.close(), this.events.close()]);
  }

  private look(): void {
    this.looker.look();
  }

  private async lookOnce(): Promise<void> {
    // Commands would wait in a queue until Redis is back.
    if (this.redis.status !== 'ready') return;
    await this.tell();
    await this.takeIn();
    const runs = await runsUnderWay(this.db, 'fleet');
    await this.letGo(new Set(runs.map((run) => run.id)));
    await this.reconcile();
    await this.handOut(runs);
  }

  private async tell(): Promise<void> {
    if (performance.now() - this.toldAt < heartbeatMs) return;
    this.toldAt = performance.now();
    await this.redis.set(keys.release, this.release, 'PX', machineGoneMs);
  }

  private async machines(): Promise<FleetMachine[]> {
    const found = await this.redis.keys(keys.machines);
    const words = found.length > 0 ? await this.redis.mget(found) : [];
    const parsed = words.map((word) => machineSchema.safeParse(JSON.parse(word ?? 'null')));
    return parsed.flatMap((word) => (word.success ? [word.data] : [])).sort((a, b) => (a.name < b.name ? -1 : 1));
  }

  private async handOut(runs: readonly Run[]): Promise<void> {
    if (runs.length === 0) return;
    const threads = (await this.machines()).reduce((sum, word) => sum + (word.refused ? 0 : word.threads), 0);
    const forEach = 1 + Math.ceil(aheadMs / Math.max(1, this.shardMs));
    let wanted = Math.min(jobsAtOnce, Math.max(leastOut, threads * forEach)) - this.out.size;
    for (const [i, run] of runs.entries()) {
      if (wanted <= 0) return;
      const count = Math.ceil(wanted / (runs.length - i));
      const leases = await takeLeases(this.db, run, { count, holder: 'fleet', ms: heldMs });
      await this.send(run, leases);
      wanted -= leases.length;
    }
  }

  private async send(run: Run, leases: readonly Lease[]): Promise<void> {
    if (leases.length === 0) return;
    const since = performance.now();
    for (const { point, index } of leases) {
      this.out.set(`${point.id}-${index}`, { runId: run.id, pointId: point.id, index, since });
    }
    for (const codeId of new Set(leases.map(({ point }) => point.codeId))) await this.sendMatrix(codeId);
    await this.queue.addBulk(
      leases.map(({ point, index }) => ({
        name: 'shard',
        data: this.jobOf(run, point, index),
        opts: { jobId: `${point.id}-${index}`, attempts: 1 },
      })),
    );
  }

  private jobOf(run: Run, point: Lease['point'], index: number): ShardJob {
    const { codeId, channel, decoder, k, n, plan } = point;
    const branchesPerShard = plan?.enumerate?.branchesPerShard;
    return {
      release: this.release,
      ...{ runId: run.id, pointId: point.id, codeId, index, channel, decoder, rate: k / n },
      ...{ seed: seedOf(run, point), framesPerShard: run.framesPerShard },
      ...(branchesPerShard !== undefined && { branchesPerShard }),
    };
  }

  private async sendMatrix(codeId: string): Promise<void> {
    if (this.matricesSent.has(codeId)) return;
    const H = await matrixOf(this.db, codeId);
    if (!H) throw new Error(`The code ${codeId} is gone.`);
    await this.redis.set(keys.matrix(codeId), packMatrix(H), 'EX', 7 * 24 * 3600);
    this.matricesSent.add(codeId);
  }

  /** Takes results and failures out of Redis, those of a run in one transaction, and removes them once committed. */
  private async takeIn(): Promise<void> {
    const jobs = await this.queue.getJobs(['completed', 'failed'], 0, jobsAtOnce - 1, true);
    const byRun = new Map<string, Job<ShardJob, ShardResult>[]>();
    for (const job of jobs) {
      // A job that was removed meanwhile has no data.
      if (job?.data?.runId) byRun.set(job.data.runId, [...(byRun.get(job.data.runId) ?? []), job]);
    }
    for (const [runId, ofRun] of byRun) {
      await this.store(runId, ofRun);
      for (const job of ofRun) {
        this.out.delete(job.id!);
        leaseBook.release(job.data.pointId, job.data.index);
        await job.remove().catch(() => {});
      }
      runEvents.changed(runId);
    }
    if (jobs.length === jobsAtOnce) this.look();
  }

  private async store(runId: string, jobs: readonly Job<ShardJob, ShardResult>[]): Promise<void> {
    for (const [machine, ofMachine] of groupByMachine(jobs)) {
      try {
        await inTransaction(this.db, (trx) => this.storeOf(trx, runId, machine, ofMachine));
      } catch (error) {
        // A run that is over, or a machine that is believed no more: nothing to keep.
        if (!(error instanceof Refusal)) throw error;
        if (error.code === 'quarantined') await this.redis.set(keys.refused(machine), error.message, 'EX', 24 * 3600);
      }
    }
  }

  private async storeOf(trx: Database, runId: string, machine: string, jobs: readonly Job<ShardJob, ShardResult>[]) {
    const run = await runById(trx, runId);
    if (!run) return;
    const source = await sourceOfMachine(trx, machine);
    refuseQuarantined(source);
    const by = { userId: await authorOfRun(trx, runId), source };
    const shards = jobs.flatMap((job) => {
      const result = shardResultSchema.safeParse(job.returnvalue);
      if (!result.success || result.data.release !== this.release) return [];
      this.shardMs = 0.8 * this.shardMs + 0.2 * result.data.elapsedMs;
      return [{ pointId: job.data.pointId, index: job.data.index, tally: result.data.tally }];
    });
    const failures = jobs
      .filter((job) => job.failedReason && !job.failedReason.startsWith(notCounted))
      .map((job) => ({ pointId: job.data.pointId, index: job.data.index, message: job.failedReason! }));
    // A matrix that Redis has lost is sent anew.
    if (jobs.some((job) => job.failedReason?.startsWith(notCounted))) this.matricesSent.clear();
    if (shards.length > 0) await storeShards(trx, run, shards, by);
    if (failures.length > 0) await noteFailures(trx, runId, failures, by);
  }

  /** Takes what waits of runs that are no longer the fleet's out of the queue; what is under way is still taken in. */
  private async letGo(ours: ReadonlySet<string>): Promise<void> {
    for (const [id, { runId, pointId, index }] of this.out) {
      if (ours.has(runId)) continue;
      const removed = await this.queue.remove(id).catch(() => 0);
      if (removed === 0 && (await this.queue.getJobState(id)) === 'active') continue;
      this.out.delete(id);
      leaseBook.release(pointId, index);
    }
  }

  /** Shards that Redis knows nothing of any more are handed out again. */
  private async reconcile(): Promise<void> {
    if (this.out.size === 0 || performance.now() - this.reconciledAt < reconcileMs) return;
    this.reconciledAt = performance.now();
    for (const [id, { pointId, index, since }] of this.out) {
      if (this.reconciledAt - since < reconcileMs || (await this.queue.getJobState(id)) !== 'unknown') continue;
      this.out.delete(id);
      leaseBook.release(pointId, index);
    }
  }
}

/** Failures without a result are put down to the fleet as a whole. */
function groupByMachine(jobs: readonly Job<ShardJob, ShardResult>[]) {
  const groups = new Map<string, Job<ShardJob, ShardResult>[]>();
  for (const job of jobs) {
    const machine = job.returnvalue?.machine ?? 'the fleet';
    groups.set(machine, [...(groups.get(machine) ?? []), job]);
  }
  return groups;
}
