import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import type { ShardAnswer, ShardTask } from '@workers/simulate/api.ts';
import { Piscina } from 'piscina';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';

export interface SimulationPool {
  readonly threads: number;
  /** Computes a shard in a worker thread. A thread that dies, or that the signal ends, is replaced.
   *  @throws Error when the thread died; AbortError when the signal fired. */
  shard(task: ShardTask, signal?: AbortSignal): Promise<ShardAnswer>;
  close(): Promise<void>;
}

const isBundled = !import.meta.url.endsWith('.ts');

/** The bundled worker beside the built server, or the TypeScript source where the server runs from its sources. */
function workerFile(): string {
  const parts = isBundled ? ['dist', 'server', 'workers', 'simulate.mjs'] : ['workers', 'simulate', 'from-source.mjs'];
  return join(process.cwd(), ...parts);
}

/** Threads for simulation when nothing else is said: one is left for requests, where there is more than one. */
export const usualThreads = (): number => Math.max(1, availableParallelism() - 1);

export function createSimulationPool(threads = usualThreads(), filename = workerFile()): SimulationPool {
  const pool = new Piscina<ShardTask, ShardAnswer>({
    filename,
    minThreads: 0,
    maxThreads: threads,
    idleTimeout: 30_000,
    // The pages go before the shards.
    niceIncrement: isBundled ? 5 : 0,
    execArgv: [],
    resourceLimits: { maxOldGenerationSizeMb: 1024 },
    // A thread that waits by Atomics would not let asynchronous kernels be made.
    atomics: 'disabled',
  });
  // A thread that has died has failed its task already, and a task given up may still be answered; the pool says both
  // here once more.
  pool.on('error', (error: Error) => {
    if (!error.message.startsWith('Unexpected message')) console.error('A simulation thread:', error.message);
  });
  return {
    threads,
    shard: (task, signal) => pool.run(task, signal ? { signal } : {}),
    close: () => pool.destroy(),
  };
}

/** A matrix in memory that threads share instead of copying. */
export function sharedMatrix({ rows, cols, rowStart, colIndex }: SparseMatrix): SparseMatrix {
  const shared = (from: Uint32Array) => {
    const to = new Uint32Array(new SharedArrayBuffer(from.byteLength));
    to.set(from);
    return to;
  };
  return { rows, cols, rowStart: shared(rowStart), colIndex: shared(colIndex) };
}
