import type { ShardAnswer } from '@workers/simulate/api.ts';
import type { Point, Run } from '@/api/runs.ts';
import { mergeTallies, type Tally } from '@/core/simulation/tally.ts';
import { ApiFailure } from './api.ts';
import {
  acknowledge,
  fractionDone,
  framesLeft,
  type PointProgress,
  progressOf,
  reachedStop,
  shardCap,
} from './run-plan.ts';

export interface DriverView {
  status: 'idle' | 'running' | 'pausing' | 'paused' | 'waiting-for-server' | 'finished' | 'stopped' | 'failed';
  workers: number;
  framesPerSecond: number;
  /** The pace when it was last at work here; 0 before. */
  lastFramesPerSecond?: number;
  /** null while nothing is known yet. */
  timeLeftMs: number | null;
  fractionDone: number;
  /** What happened, in a sentence, when there is something to say. */
  message: string | null;
  /** Acknowledged sums by point id. */
  pointTallies: ReadonlyMap<string, Tally>;
}

interface ShardResult {
  pointId: string;
  index: number;
  tally: Tally;
}

/** Shards that are this page's to compute, or word that there will be no more. */
export interface Leases {
  leases: { pointId: string; index: number }[];
  points: Point[];
  over: Run['state'] | null;
}

/** What the driver needs from outside: workers, the server, a clock. */
export interface DriverPorts {
  workers: number;
  lease(count: number): Promise<Leases>;
  failed(failure: { pointId: string; index: number; message: string }): Promise<unknown>;
  compute(point: Point, index: number, signal: AbortSignal): Promise<ShardAnswer>;
  post(shards: ShardResult[]): Promise<{ conflicts: { pointId: string; index: number }[] }>;
  setState(state: 'running' | 'paused' | 'stopped'): Promise<void>;
  now(): number;
  wait(ms: number): Promise<void>;
  onView(view: DriverView): void;
}

const flushAfterMs = 400;
const batchLimit = 100;
/** Computed shards waiting for the server at which workers stand still, so that little is lost with a closed tab. */
const backlogLimit = 200;
/** While other workers have all that is left, this often it is asked whether something has come back. */
const askAgainMs = 1500;
/** So many failures in a row are not one shard's fault. */
const failuresInARow = 3;

/** Works off one run in this page: hands out shards, posts results in batches, and counts only what the server has
 *  acknowledged. A server that cannot write makes it wait, not fail. */
export class RunDriver {
  private readonly points: PointProgress[];
  private readonly pointById: Map<string, Point>;
  private readonly leased: { point: PointProgress; index: number }[] = [];
  private leasing: Promise<void> | null = null;
  private over: Run['state'] | null = null;
  private failures = 0;
  private readonly backlog: ShardResult[] = [];
  private readonly rates: { at: number; frames: number }[] = [];
  private lastRate = 0;
  private status: DriverView['status'] = 'idle';
  private message: string | null = null;
  private inFlight = 0;
  private abort = new AbortController();
  private flushing: Promise<void> | null = null;
  private settling: Promise<void> | null = null;

  constructor(
    private readonly run: Run,
    points: readonly Point[],
    private readonly ports: DriverPorts,
  ) {
    this.points = points.map(progressOf);
    this.pointById = new Map(points.map((point) => [point.id, point]));
    if (run.state === 'finished' || run.state === 'stopped') this.status = run.state;
    else if (run.state === 'paused') this.status = 'paused';
  }

  view(): DriverView {
    const { stopping } = this.run;
    const rate = this.framesPerSecond();
    const left = this.points.reduce((sum, point) => sum + framesLeft(point, stopping), 0);
    return {
      status: this.status,
      workers: this.ports.workers,
      framesPerSecond: rate,
      lastFramesPerSecond: this.lastRate,
      timeLeftMs: rate > 0 ? (left / rate) * 1000 : null,
      fractionDone: this.points.reduce((sum, point) => sum + fractionDone(point, stopping), 0) / this.points.length,
      message: this.message,
      pointTallies: new Map(this.points.map((point) => [point.pointId, point.tally])),
    };
  }

  async start(): Promise<void> {
    if (this.isActive() || this.status === 'finished' || this.status === 'stopped') return;
    if (!(await this.tellServer('running'))) return;
    this.abort = new AbortController();
    this.over = null;
    this.failures = 0;
    this.become('running');
    this.handOut();
  }

  /** Lets shards under way end and be acknowledged, then rests. */
  async pause(): Promise<void> {
    if (this.status !== 'running' && this.status !== 'waiting-for-server') return;
    this.become('pausing');
    await this.settle();
  }

  /** Ends the run; shards under way are given up, those computed are still handed in. */
  async stop(): Promise<void> {
    if (this.status === 'finished' || this.status === 'stopped') return;
    this.abort.abort(new DOMException('The run was stopped.', 'AbortError'));
    await this.flush();
    if (await this.tellServer('stopped')) this.become('stopped');
  }

  /** Leaves the page: nothing more is handed out, and workers are let go. */
  dispose(): void {
    this.abort.abort(new DOMException('The page was left.', 'AbortError'));
  }

  private isActive(): boolean {
    return this.status === 'running' || this.status === 'waiting-for-server' || this.status === 'pausing';
  }

  private handOut(): void {
    // Between the word to stop and the server's answer the status still says running; nothing new may start then.
    if (this.abort.signal.aborted) return;
    while (this.status === 'running' && this.inFlight < this.ports.workers && this.backlog.length < backlogLimit) {
      const next = this.leased.shift();
      if (!next) {
        if (this.over === null) void this.lease();
        break;
      }
      next.point.out.add(next.index);
      this.inFlight++;
      void this.computeOne(next.point, next.index);
    }
    if (this.status === 'running' && this.over !== null && this.inFlight === 0) void this.settle();
  }

  /** Asks the server for shards that nobody else has. */
  private lease(): Promise<void> {
    this.leasing ??= this.leaseOnce().finally(() => {
      this.leasing = null;
      this.handOut();
    });
    return this.leasing;
  }

  private async leaseOnce(): Promise<void> {
    try {
      // What is computed counts before more is asked for: the point may be done.
      if (this.inFlight === 0) await this.flush();
      const { leases, points, over } = await this.ports.lease(2 * this.ports.workers);
      for (const point of points) this.meet(point);
      for (const { pointId, index } of leases) {
        this.leased.push({ point: this.points.find((known) => known.pointId === pointId)!, index });
      }
      if (this.status === 'waiting-for-server') this.become('running', null);
      if (over === 'paused') this.become('pausing');
      this.over = over;
      if (over === 'paused') void this.settle();
      else if (leases.length === 0 && over === null) await this.ports.wait(askAgainMs);
    } catch (error) {
      if (!(error instanceof ApiFailure) || !error.passing) return this.refuse(error);
      if (this.status === 'running') this.become('waiting-for-server', error.message);
      await this.ports.wait(askAgainMs);
      if (this.status === 'waiting-for-server') this.become('running');
    }
  }

  /** A point that the planner has added since, or one that others work on too. */
  private meet(point: Point): void {
    const known = this.points.find(({ pointId }) => pointId === point.id);
    this.pointById.set(point.id, point);
    if (!known) this.points.push(progressOf(point));
    else if (point.tally.frames > known.tally.frames) known.tally = point.tally;
  }

  private async computeOne(point: PointProgress, index: number): Promise<void> {
    try {
      const answer = await this.ports.compute(this.pointById.get(point.pointId)!, index, this.abort.signal);
      if (answer.ok) {
        this.backlog.push({ pointId: point.pointId, index, tally: answer.tally });
        this.noteRate(answer.tally.frames);
        this.failures = 0;
      } else await this.noteFailure(point, index, answer.failure.message);
    } catch (error) {
      point.out.delete(index);
      if (!this.abort.signal.aborted) this.fail(error instanceof Error ? error.message : String(error));
    }
    this.inFlight--;
    void this.flush();
    this.handOut();
  }

  /** The server counts it; a shard that fails here may succeed elsewhere. */
  private async noteFailure(point: PointProgress, index: number, message: string): Promise<void> {
    point.out.delete(index);
    this.failures++;
    await this.ports.failed({ pointId: point.pointId, index, message }).catch(() => {});
    if (this.failures >= failuresInARow) this.fail(message);
  }

  /** Posts what is computed, in batches, until nothing is left; waits as long as the server cannot take it. */
  private flush(): Promise<void> {
    this.flushing ??= this.flushAll().finally(() => {
      this.flushing = null;
    });
    return this.flushing;
  }

  private async flushAll(): Promise<void> {
    await this.ports.wait(this.status === 'running' ? flushAfterMs : 0);
    let delayMs = 500;
    while (this.backlog.length > 0) {
      const batch = this.backlog.slice(0, batchLimit);
      try {
        const receipt = await this.ports.post(batch);
        this.backlog.splice(0, batch.length);
        this.credit(batch, receipt.conflicts);
        if (this.status === 'waiting-for-server') this.become('running', null);
        delayMs = 500;
      } catch (error) {
        if (!(error instanceof ApiFailure) || !error.passing) return this.refuse(error);
        if (this.status === 'running') this.become('waiting-for-server', error.message);
        await this.ports.wait(delayMs);
        delayMs = Math.min(8000, delayMs * 2);
        if (this.abort.signal.aborted && this.status !== 'pausing') return;
      }
    }
    this.handOut();
  }

  private credit(batch: readonly ShardResult[], conflicts: readonly { pointId: string; index: number }[]): void {
    for (const { pointId, index, tally } of batch) {
      const point = this.points.find((p) => p.pointId === pointId)!;
      acknowledge(point, index);
      point.done ||= point.nextIndex >= shardCap(this.run.stopping, this.run.framesPerShard);
      if (conflicts.some((c) => c.pointId === pointId && c.index === index)) {
        this.message = `The server holds another tally for shard ${index} of a point; this page's was not counted.`;
        continue;
      }
      point.tally = mergeTallies(point.tally, tally);
      point.done ||= reachedStop(point.tally, this.run.stopping);
    }
    this.show();
  }

  /** Waits for shards under way and for the server, then says that the run rests or is finished. */
  private settle(): Promise<void> {
    this.settling ??= this.settleOnce().finally(() => {
      this.settling = null;
    });
    return this.settling;
  }

  private async settleOnce(): Promise<void> {
    while (this.inFlight > 0) await this.ports.wait(20);
    await this.flush();
    if (this.over === 'finished' || this.over === 'stopped') this.become(this.over);
    else if (this.status === 'pausing' && (await this.tellServer('paused'))) this.become('paused');
  }

  private async tellServer(state: 'running' | 'paused' | 'stopped'): Promise<boolean> {
    try {
      await this.ports.setState(state);
      return true;
    } catch (error) {
      this.message = error instanceof Error ? error.message : String(error);
      this.show();
      return false;
    }
  }

  private refuse(error: unknown): void {
    const stoppedElsewhere = error instanceof ApiFailure && error.code === 'run-closed';
    this.backlog.length = 0;
    this.abort.abort(error);
    this.become(stoppedElsewhere ? 'stopped' : 'failed', error instanceof Error ? error.message : String(error));
  }

  private fail(message: string): void {
    this.abort.abort(new Error(message));
    this.become('failed', message);
  }

  private become(status: DriverView['status'], message = this.message): void {
    this.status = status;
    this.message = message;
    this.show();
  }

  private show(): void {
    this.ports.onView(this.view());
  }

  private noteRate(frames: number): void {
    this.rates.push({ at: this.ports.now(), frames });
    if (this.rates.length > 64) this.rates.shift();
    this.lastRate = this.framesPerSecond() || this.lastRate;
    this.show();
  }

  private framesPerSecond(): number {
    const first = this.rates[0];
    const last = this.rates.at(-1);
    if (!this.isActive() || !first || !last || last.at === first.at) return 0;
    const frames = this.rates.slice(1).reduce((sum, rate) => sum + rate.frames, 0);
    return (frames / (last.at - first.at)) * 1000;
  }
}
