import { type Remote, releaseProxy, wrap } from 'comlink';

interface Seat<T> {
  worker: Worker;
  remote: Remote<T>;
  busy: boolean;
  /** Anything loaded into this worker that later tasks rely on. */
  loaded: Set<string>;
}

interface Waiting<T> {
  task: (remote: Remote<T>, loaded: Set<string>) => Promise<unknown>;
  resolve: (value: never) => void;
  reject: (reason: unknown) => void;
  signal?: AbortSignal;
}

export interface WorkerPool<T> {
  readonly size: number;
  /** Runs a task on a free worker, or waits for one. When the signal fires while it runs, its worker is ended, so that
   *  the answer to cancel never waits for a computation. */
  run<R>(task: (remote: Remote<T>, loaded: Set<string>) => Promise<R>, signal?: AbortSignal): Promise<R>;
  close(): void;
}

/** One worker per core less one, and at least one. */
export const defaultPoolSize = () => Math.max(1, (navigator.hardwareConcurrency || 2) - 1);

/** Workers are started when first needed and ended after `idleMs` without work. */
export function createWorkerPool<T>(spawn: () => Worker, size = defaultPoolSize(), idleMs = 30_000): WorkerPool<T> {
  const seats: Seat<T>[] = [];
  const queue: Waiting<T>[] = [];
  let idleTimer: ReturnType<typeof setTimeout> | undefined;

  const dismiss = (seat: Seat<T>) => {
    seats.splice(seats.indexOf(seat), 1);
    seat.remote[releaseProxy]();
    seat.worker.terminate();
  };

  const seatFor = (): Seat<T> | undefined => {
    const free = seats.find((seat) => !seat.busy);
    if (free || seats.length >= size) return free;
    const worker = spawn();
    const seat: Seat<T> = { worker, remote: wrap<T>(worker), busy: false, loaded: new Set() };
    seats.push(seat);
    return seat;
  };

  const settleIdle = () => {
    clearTimeout(idleTimer);
    if (queue.length > 0 || seats.some((seat) => seat.busy)) return;
    idleTimer = setTimeout(() => {
      for (const seat of [...seats]) dismiss(seat);
    }, idleMs);
  };

  const next = () => {
    for (;;) {
      if (queue.length === 0) return settleIdle();
      const seat = seatFor();
      if (!seat) return;
      void occupy(seat, queue.shift()!);
    }
  };

  const occupy = async (seat: Seat<T>, waiting: Waiting<T>) => {
    if (waiting.signal?.aborted) return waiting.reject(waiting.signal.reason);
    seat.busy = true;
    clearTimeout(idleTimer);
    try {
      const result = await Promise.race([waiting.task(seat.remote, seat.loaded), ending(seat.worker, waiting.signal)]);
      waiting.resolve(result as never);
    } catch (reason) {
      dismiss(seat);
      waiting.reject(reason);
    }
    seat.busy = false;
    next();
  };

  return {
    size,
    run: (task, signal) =>
      new Promise((resolve, reject) => {
        queue.push({ task, resolve: resolve as (value: never) => void, reject, signal });
        next();
      }),
    close() {
      clearTimeout(idleTimer);
      for (const waiting of queue.splice(0)) waiting.reject(new DOMException('The pool was closed.', 'AbortError'));
      for (const seat of [...seats]) dismiss(seat);
    },
  };
}

/** Rejects when the worker fails to load or throws outside a call, or when the signal fires. */
function ending(worker: Worker, signal?: AbortSignal): Promise<never> {
  return new Promise((_, reject) => {
    worker.addEventListener('error', (event) => reject(new Error(event.message || 'a worker could not be loaded')), {
      once: true,
    });
    signal?.addEventListener('abort', () => reject(signal.reason), { once: true });
  });
}
