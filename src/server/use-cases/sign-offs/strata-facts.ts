import type { Code } from '@/api/codes.ts';
import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Graded } from '@/core/evidence.ts';
import { countedStrata, isStratum, knownStrata } from '@/core/simulation/known-strata.ts';
import type { Stratum } from '@/core/simulation/stratified-rate.ts';
import type { Database } from '../../db/database.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { refusalOfFailure } from '../../jobs/worker-refusal.ts';
import { matrixOf } from '../../repositories/codes.ts';

/** What is known of the weights of a code under one decoder from one run. */
export interface StrataFacts {
  run: { id: string; name: string };
  decoder: DecoderSpec;
  n: number;
  level: number;
  /** Up to where a theorem proves that nothing fails; null where none is known. */
  radius: Graded<number> | null;
  strata: Stratum[];
}

/** Weight strata among a code's points, by run and decoder, with what is proved beside them. The proof looks at every pair
 *  of bits, so that it is left to a worker. */
export async function strataFacts(
  db: Database,
  pool: FilesPool,
  code: Pick<Code, 'id' | 'n'>,
  points: readonly Point[],
  runName: (id: string) => string,
): Promise<StrataFacts[]> {
  const groups = new Map<string, Point[]>();
  for (const point of points.filter(isStratum)) {
    const key = `${point.runId} ${JSON.stringify(point.decoder)}`;
    groups.set(key, [...(groups.get(key) ?? []), point]);
  }
  if (groups.size === 0) return [];
  const lists = [...groups.values()];
  const decoders = lists.map(([point]) => point!.decoder);
  const answer = await pool.run({ kind: 'radius', H: (await matrixOf(db, code.id))!, decoders });
  if (!answer.ok) throw refusalOfFailure(answer.failure);
  return lists.map((list, i) => {
    const { runId, decoder, level } = list[0]!;
    const radius = answer.radii![i] ?? null;
    const strata = knownStrata({ n: code.n, points: countedStrata(list) }, radius?.value ?? null);
    return { run: { id: runId, name: runName(runId) }, decoder, n: code.n, level, radius, strata };
  });
}
