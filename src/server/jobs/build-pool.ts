import type { Worker } from 'node:worker_threads';
import type { BuildAnswer } from '@workers/build/api.ts';
import type { NewCode } from '@/api/codes.ts';
import { Refusal } from '../refusal.ts';
import { startWorker } from './start-worker.ts';

export type BuildRequest = Pick<NewCode, 'design' | 'derivation'>;

export interface BuildPool {
  /** Builds in a worker thread. @throws Refusal `busy` when too much is waiting. */
  build(request: BuildRequest): Promise<BuildAnswer>;
  close(): Promise<void>;
}

interface Limits {
  workers: number;
  waiting: number;
  timeoutMs: number;
  heapMb: number;
  idleMs: number;
}

const usualLimits: Limits = { workers: 1, waiting: 20, timeoutMs: 15 * 60_000, heapMb: 2048, idleMs: 60_000 };

interface Task {
  request: BuildRequest;
  resolve(answer: BuildAnswer): void;
}

/** A pool of build workers: started when needed, ended when idle, replaced when one dies or takes too long. */
export function createBuildPool(limits: Partial<Limits> = {}): BuildPool {
  const { workers, waiting, timeoutMs, heapMb, idleMs } = { ...usualLimits, ...limits };
  const queue: Task[] = [];
  const idle = new Set<Worker>();
  const alive = new Set<Worker>();
  let nextId = 1;

  function start(): Worker {
    const worker = startWorker('build', { maxOldGenerationSizeMb: heapMb });
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
      const worker = idle.values().next().value ?? start();
      idle.delete(worker);
      give(worker, queue.shift()!);
    }
  }

  function give(worker: Worker, task: Task): void {
    const id = nextId++;
    const settle = (answer: BuildAnswer) => {
      clearTimeout(timer);
      worker.off('message', onMessage).off('error', onError).off('exit', onExit);
      task.resolve(answer);
    };
    const fail = (answer: BuildAnswer) => {
      settle(answer);
      void worker.terminate();
    };
    const onMessage = (message: { id: number; answer?: BuildAnswer }) => {
      if (message.id !== id || !message.answer) return;
      settle(message.answer);
      rest(worker);
    };
    const onError = (error: NodeJS.ErrnoException) => fail(deathOf(error, heapMb));
    const onExit = () => fail(deathOf(new Error('The build worker ended without an answer.'), heapMb));
    const timer = setTimeout(() => fail(tooLong(timeoutMs)), timeoutMs);
    worker.on('message', onMessage).on('error', onError).on('exit', onExit);
    worker.postMessage({ id, request: task.request });
  }

  function rest(worker: Worker): void {
    idle.add(worker);
    setTimeout(() => idle.has(worker) && void worker.terminate(), idleMs).unref();
    work();
  }

  return {
    build(request) {
      if (queue.length >= waiting) {
        return Promise.reject(new Refusal('busy', `${waiting} builds are waiting already; try again in a minute.`));
      }
      return new Promise((resolve) => {
        queue.push({ request, resolve });
        work();
      });
    },
    async close() {
      await Promise.all([...alive].map((worker) => worker.terminate()));
    },
  };
}

const tooLong = (timeoutMs: number): BuildAnswer => ({
  ok: false,
  failure: { code: 'limit', message: `The build took over ${timeoutMs / 60_000} minutes and was ended.`, data: {} },
});

function deathOf(error: NodeJS.ErrnoException, heapMb: number): BuildAnswer {
  const outOfMemory = error.code === 'ERR_WORKER_OUT_OF_MEMORY';
  const message = outOfMemory ? `The build passed its ${heapMb} MB of memory and was ended.` : error.message;
  return { ok: false, failure: { code: outOfMemory ? 'limit' : 'internal', message, data: {} } };
}

let shared: BuildPool | undefined;

/** The server's own pool. */
export function buildPool(): BuildPool {
  shared ??= createBuildPool();
  return shared;
}
