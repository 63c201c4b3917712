import { expect, vi } from 'vitest';
import type { NewRun, Point, Run } from '@/api/runs.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { runShard } from '@/core/simulation/shard.ts';
import { countedShards } from '@/core/simulation/stopping.ts';
import type { Context } from '@/server/context.ts';
import { ServerRuns } from '@/server/jobs/server-runs.ts';
import { createSimulationPool } from '@/server/jobs/simulation-pool.ts';
import { keepCode } from '@/server/use-cases/codes/keep-code.ts';
import { createRun } from '@/server/use-cases/runs/create-run.ts';
import { getRun } from '@/server/use-cases/runs/get-run.ts';
import { buildDemoCode } from '../../db/seeds/demo/build.ts';
import { furnishedScratch } from './scratch-database.ts';

const plane4 = {
  key: 'pg4',
  name: 'PG(2,4)',
  design: { family: 'projective-plane', params: { q: 4 } },
  derivation: { kind: 'ldpc', checks: 'blocks' },
} as const;

export type Stated = Run & { points: Point[] };
type PointInput = Omit<NewRun['points'][number], 'codeId'>;

/** A scratch database with the code of the plane of order 4, and servers to start and stop on it. */
export async function openBench(dataDir?: string) {
  const scratch = await furnishedScratch(dataDir);
  const { context, projectId } = scratch;
  const built = await buildDemoCode(plane4);
  const { design, derivation } = plane4;
  const keeping = { projectId, userId: context.caller.id, request: { design, derivation } };
  const codeId = await keepCode(context.db, built, keeping);
  let server: ServerRuns | undefined;

  const seen = (runId: string) => getRun(context, runId);
  const until = (runId: string, holds: (run: Awaited<ReturnType<typeof seen>>) => boolean, timeout = 55_000) =>
    vi.waitFor(
      async () => {
        const now = await seen(runId);
        expect(holds(now)).toBe(true);
        return now;
      },
      { timeout, interval: 25 },
    );

  return {
    ...scratch,
    codeId,
    H: built.H as SparseMatrix,
    seen,
    until,
    finished: (runId: string, timeout?: number) => until(runId, ({ run }) => run.state === 'finished', timeout),
    /** Resolves once nothing has come in for a while. */
    async settled(runId: string): Promise<void> {
      for (let before = -1; ; ) {
        const { frames } = (await seen(runId)).run;
        if (frames === before) return;
        before = frames;
        await new Promise((resolve) => setTimeout(resolve, 400));
      }
    },
    state: ({ points = [], ...over }: Partial<Omit<NewRun, 'points'>> & { points?: PointInput[] }): Promise<Stated> =>
      createRun(context, projectId, {
        name: 'A run',
        seed: 'a seed',
        framesPerShard: 200,
        stopping: { frameErrors: 50, maxFrames: 10_000 },
        place: 'browser',
        points: points.map((point) => ({ codeId, ...point })),
        ...over,
      }),
    /** What one worker that does a point's shards one after the other comes to. */
    async quietTally(run: Stated, position: number) {
      const { channel, decoder } = run.points[position]!;
      const spec = { H: built.H, channel, decoder, seed: run.seed, framesPerShard: run.framesPerShard };
      let counted = countedShards([], run.stopping);
      while (!counted.reason) {
        counted = countedShards([await runShard(spec, counted.count)], run.stopping, counted);
      }
      return counted.tally;
    },
    /** The shards of leases, as an honest worker computes them. */
    computed: (run: Stated, leases: readonly { pointId: string; index: number }[]) =>
      Promise.all(
        leases.map(async ({ pointId, index }) => {
          const { channel, decoder } = run.points.find((point) => point.id === pointId)!;
          const { seed, framesPerShard } = run;
          const tally = await runShard({ H: built.H, channel, decoder, seed, framesPerShard }, index);
          return { pointId, index, tally };
        }),
      ),
    startServer(threads: number, pool = createSimulationPool(threads)): void {
      server = new ServerRuns(context.db, pool);
    },
    async stopServer(): Promise<void> {
      await server?.close();
      server = undefined;
    },
    async close(): Promise<void> {
      await server?.close();
      await scratch.db.destroy();
    },
  };
}

export type Bench = Awaited<ReturnType<typeof openBench>>;
export type { Context };
