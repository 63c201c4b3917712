import type { Worker } from 'node:worker_threads';
import type { WorkerFailure } from '@workers/failure.ts';
import { Refusal } from '../refusal.ts';
import { type NodeJob, startWorker } from './start-worker.ts';

export interface PoolLimits {
  workers: number;
  waiting: number;
  timeoutMs: number;
  heapMb: number;
  idleMs: number;
}

export type Failed = { ok: false; failure: WorkerFailure };

interface RunOptions<Part> {
  /** What the worker sends before its answer. */
  onPart?: (part: Part) => void;
  /** Ends the worker; the promise then rejects with the signal's reason. */
  signal?: AbortSignal;
}

export interface WorkerPool<Request, Answer, Part> {
  /** Works on a request in a worker thread. @throws Refusal `busy` when too much is waiting. */
  run(request: Request, options?: RunOptions<Part>): Promise<Answer | Failed>;
  close(): Promise<void>;
}

interface Task<Request, Answer, Part> {
  request: Request;
  onPart?: ((part: Part) => void) | undefined;
  signal?: AbortSignal | undefined;
  resolve(answer: Answer | Failed): void;
  reject(reason: unknown): void;
}

/** A pool of one job's workers: started when needed, ended when idle, replaced when one dies or takes too long.
 *  @param what The work in words, to begin a sentence: "build".
 *  A worker takes `{id, request}` and posts `{id, part}` as often as it likes, then `{id, answer}`. */
export function createWorkerPool<Request, Answer, Part = never>(
  job: NodeJob,
  what: string,
  { workers, waiting, timeoutMs, heapMb, idleMs }: PoolLimits,
): WorkerPool<Request, Answer, Part> {
  type OwnTask = Task<Request, Answer, Part>;
  const queue: OwnTask[] = [];
  /** Resting workers, each with the timer that ends it. */
  const idle = new Map<Worker, NodeJS.Timeout>();
  const alive = new Set<Worker>();
  let nextId = 1;

  function start(): Worker {
    const worker = startWorker(job, { maxOldGenerationSizeMb: heapMb });
    alive.add(worker);
    worker.once('exit', () => {
      alive.delete(worker);
      idle.delete(worker);
      work();
    });
    worker.unref();
    return worker;
  }

  function work(): void {
    while (queue.length > 0 && (idle.size > 0 || alive.size < workers)) {
      const worker = idle.keys().next().value ?? start();
      clearTimeout(idle.get(worker));
      idle.delete(worker);
      give(worker, queue.shift()!);
    }
  }

  function give(worker: Worker, task: OwnTask): void {
    const id = nextId++;
    const settle = () => {
      clearTimeout(timer);
      worker.off('message', onMessage).off('error', onError).off('exit', onExit);
      task.signal?.removeEventListener('abort', onAbort);
    };
    const fail = (answer: Failed) => {
      settle();
      task.resolve(answer);
      void worker.terminate();
    };
    const onMessage = (message: { id: number; part?: Part; answer?: Answer }) => {
      if (message.id !== id) return;
      if (message.part !== undefined) task.onPart?.(message.part);
      if (message.answer === undefined) return;
      settle();
      task.resolve(message.answer);
      rest(worker);
    };
    const onError = (error: NodeJS.ErrnoException) => fail(deathOf(error, what, heapMb));
    const onExit = () => fail(deathOf(new Error(`The ${what} worker ended without an answer.`), what, heapMb));
    const onAbort = () => {
      settle();
      task.reject(task.signal?.reason);
      void worker.terminate();
    };
    const timer = setTimeout(() => fail(tooLong(what, timeoutMs)), timeoutMs);
    worker.on('message', onMessage).on('error', onError).on('exit', onExit);
    task.signal?.addEventListener('abort', onAbort, { once: true });
    worker.postMessage({ id, request: task.request });
  }

  function rest(worker: Worker): void {
    const end = () => {
      // Out of the resting ones first, or a task could still be given to a worker on its way out.
      idle.delete(worker);
      void worker.terminate();
    };
    idle.set(worker, setTimeout(end, idleMs).unref());
    work();
  }

  return {
    run(request, { onPart, signal } = {}) {
      if (signal?.aborted) return Promise.reject(signal.reason);
      if (queue.length >= waiting) {
        return Promise.reject(new Refusal('busy', `${waiting} ${what}s are waiting already; try again in a minute.`));
      }
      return new Promise((resolve, reject) => {
        const task: OwnTask = { request, onPart, signal, resolve, reject };
        const leave = () => {
          const at = queue.indexOf(task);
          if (at < 0) return;
          queue.splice(at, 1);
          reject(signal?.reason);
        };
        signal?.addEventListener('abort', leave, { once: true });
        queue.push(task);
        work();
      });
    },
    async close() {
      await Promise.all([...alive].map((worker) => worker.terminate()));
    },
  };
}

const tooLong = (what: string, timeoutMs: number): Failed => ({
  ok: false,
  failure: { code: 'limit', message: `The ${what} took over ${timeoutMs / 60_000} minutes and was ended.`, data: {} },
});

function deathOf(error: NodeJS.ErrnoException, what: string, heapMb: number): Failed {
  const outOfMemory = error.code === 'ERR_WORKER_OUT_OF_MEMORY';
  const message = outOfMemory ? `The ${what} passed its ${heapMb} MB of memory and was ended.` : error.message;
  return { ok: false, failure: { code: outOfMemory ? 'limit' : 'internal', message, data: {} } };
}
