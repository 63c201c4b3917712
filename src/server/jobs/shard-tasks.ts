import type { ShardTask } from '@workers/simulate/api.ts';
import { Recent } from '@workers/simulate/recent.ts';
import type { Run } from '@/api/runs.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { Database } from '../db/database.ts';
import { matrixOf } from '../repositories/codes.ts';
import type { StoredPoint } from '../repositories/points.ts';
import { sharedMatrix } from './simulation-pool.ts';

/** The run's own seed, so that two decoders at the same channel point meet the same patterns; in a stratified run one
 *  for each stage, whose frames must be its own. */
export const seedOf = (run: Pick<Run, 'seed'>, { plan }: Pick<StoredPoint, 'plan'>): string =>
  plan ? `${run.seed} ${plan.stream}` : run.seed;

/** All that a shard of a point depends on, besides the matrix. */
export function specOf(run: Pick<Run, 'seed' | 'framesPerShard'>, point: StoredPoint, H: SparseMatrix) {
  const { channel, decoder, k, n } = point;
  return { H, channel, decoder, seed: seedOf(run, point), framesPerShard: run.framesPerShard, rate: k / n };
}

const matrices = new Recent<SparseMatrix>(32);

/** A point's shard as a worker takes it. @throws Error when the code is gone. */
export async function shardTask(
  db: Database,
  run: Pick<Run, 'seed' | 'framesPerShard'>,
  point: StoredPoint,
  index: number,
): Promise<ShardTask> {
  const H = matrices.get(point.codeId) ?? (await loadMatrix(db, point.codeId));
  const branchesPerShard = point.plan?.enumerate?.branchesPerShard;
  return {
    key: point.id,
    spec: specOf(run, point, H),
    options: { matrixKey: point.codeId, ...(branchesPerShard !== undefined && { branchesPerShard }) },
    index,
  };
}

async function loadMatrix(db: Database, codeId: string): Promise<SparseMatrix> {
  const stored = await matrixOf(db, codeId);
  if (!stored) throw new Error(`The code ${codeId} is gone.`);
  const H = sharedMatrix(stored);
  matrices.set(codeId, H);
  return H;
}
