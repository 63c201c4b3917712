import { Recent } from '@workers/simulate/recent.ts';
import { type Job, Worker } from 'bullmq';
import type { FleetMachine } from '@/api/fleet.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { nowText } from '../context.ts';
import { unpackMatrix } from '../files/matrix-blob.ts';
import { type SimulationPool, sharedMatrix } from '../jobs/simulation-pool.ts';
import { openRedis, shownUrl } from './open-redis.ts';
import {
  heartbeatMs,
  keys,
  machineGoneMs,
  notCounted,
  otherRelease,
  prefix,
  queueName,
  type ShardJob,
  type ShardResult,
} from './protocol.ts';

export interface MachineOptions {
  redisUrl: string;
  /** Results are known by it, so it stays the same from one start to the next. */
  name: string;
  release: string;
  pool: SimulationPool;
  /** After how long without a word of a machine its shard is another's. */
  lockMs?: number;
  say(line: string): void;
}

/** One process of the fleet: takes shards from Redis as long as its release is the server's. */
export class Machine {
  /** Resolves with the reason when the machine leaves for good. */
  readonly left: Promise<string>;
  private leave!: (reason: string) => void;
  private readonly redis: ReturnType<typeof openRedis>;
  private readonly blocking: ReturnType<typeof openRedis>;
  private readonly matrices = new Recent<SparseMatrix>(32);
  private readonly since = nowText();
  private worker: Worker<ShardJob, ShardResult> | undefined;
  private heartbeat: NodeJS.Timeout | undefined;
  private shards = 0;
  private isTurnedAway = false;

  constructor(private readonly options: MachineOptions) {
    const { redisUrl, say } = options;
    this.left = new Promise((resolve) => {
      this.leave = resolve;
    });
    const away = (message: string) =>
      say(`Redis at ${shownUrl(redisUrl)} does not answer (${message}); trying again until it does.`);
    this.redis = openRedis(redisUrl, away);
    this.blocking = openRedis(redisUrl, () => {});
  }

  /** Joins once Redis answers. */
  async join(): Promise<void> {
    const { name, pool, say, lockMs = 6000, release } = this.options;
    if (await this.refusal()) return;
    this.heartbeat = setInterval(() => void this.beat(), heartbeatMs);
    await this.beat();
    this.worker = new Worker<ShardJob, ShardResult>(queueName, (job) => this.compute(job), {
      connection: this.blocking,
      prefix,
      concurrency: pool.threads,
      lockDuration: lockMs,
      stalledInterval: Math.max(500, lockMs / 2),
      maxStalledCount: 3,
    });
    // A lost connection is said by `openRedis`; a lost lock means that another machine has the shard.
    this.worker.on('error', () => {});
    say(`${name} joined the fleet with ${pool.threads} threads, release ${release}.`);
  }

  async close(): Promise<void> {
    clearInterval(this.heartbeat);
    await this.worker?.close(true);
    if (this.redis.status === 'ready' && !this.isTurnedAway) await this.redis.del(keys.machine(this.id));
    this.redis.disconnect();
    this.blocking.disconnect();
    await this.options.pool.close();
  }

  private get id(): string {
    return `${this.options.name} ${process.pid}`;
  }

  /** Says that the machine is there, and hears whether it is still wanted. */
  private async beat(): Promise<void> {
    // What waits in a queue of commands would be said late.
    if (this.redis.status !== 'ready') return;
    await this.refusal();
    await this.tell();
  }

  private async tell(refused?: string): Promise<void> {
    const { name, release, pool } = this.options;
    const word: FleetMachine = { name, release, threads: pool.threads, since: this.since, shards: this.shards };
    const text = JSON.stringify({ ...word, ...(refused && { refused }) });
    await this.redis.set(keys.machine(this.id), text, 'PX', refused ? 60_000 : machineGoneMs);
  }

  /** Why this machine may not take part; null when it may. Leaves when there is a reason. */
  private async refusal(): Promise<string | null> {
    const { name, release } = this.options;
    const server = await this.redis.get(keys.release);
    const reason =
      server !== null && server !== release ? otherRelease(release, server) : await this.redis.get(keys.refused(name));
    if (reason === null) return null;
    await this.turnAway(reason);
    return reason;
  }

  private async turnAway(reason: string): Promise<void> {
    if (this.isTurnedAway) return;
    this.isTurnedAway = true;
    clearInterval(this.heartbeat);
    this.options.say(reason);
    await this.tell(reason);
    this.leave(reason);
  }

  private async compute(job: Job<ShardJob, ShardResult>): Promise<ShardResult> {
    const { release, name, pool } = this.options;
    const { pointId, codeId, index, seed, framesPerShard, rate, channel, decoder, branchesPerShard } = job.data;
    if (job.data.release !== release) {
      const reason = otherRelease(release, job.data.release);
      void this.turnAway(reason);
      throw new Error(notCounted + reason);
    }
    const H = await this.matrix(codeId);
    const answer = await pool.shard({
      key: pointId,
      spec: { H, channel, decoder, seed, framesPerShard, rate },
      options: { matrixKey: codeId, ...(branchesPerShard !== undefined && { branchesPerShard }) },
      index,
    });
    if (!answer.ok) throw new Error(answer.failure.message);
    this.shards++;
    return { release, machine: name, tally: answer.tally, elapsedMs: answer.elapsedMs };
  }

  private async matrix(codeId: string): Promise<SparseMatrix> {
    const known = this.matrices.get(codeId);
    if (known) return known;
    const blob = await this.redis.getBuffer(keys.matrix(codeId));
    if (!blob) throw new Error(`${notCounted}the matrix of code ${codeId} is not in Redis`);
    const H = sharedMatrix(unpackMatrix(blob));
    this.matrices.set(codeId, H);
    return H;
  }
}
