import type { Code } from '@/api/codes.ts';
import type { EvidenceCheck } from '@/api/sign-offs.ts';
import type { Database } from '../../db/database.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { matrixOf } from '../../repositories/codes.ts';
import { storedTallies } from '../../repositories/shards.ts';
import type { CodeEvidence } from './code-evidence.ts';

const mostShards = 4;
const patienceMs = 20_000;
const check = 'a sample of the shards, computed again, agrees';

/** Computes the first shard of some of a code's points again and compares it with the one that was handed in. Points of
 *  floating-point decoders are left out: their tallies may differ in the last frame from machine to machine; so are weights
 *  that were tried whole, whose shards are no samples. */
export async function recomputeSample(
  db: Database,
  pool: FilesPool,
  code: Pick<Code, 'id' | 'n' | 'k'>,
  measurements: CodeEvidence['measurements'],
): Promise<EvidenceCheck> {
  const exact = measurements.filter(
    ({ decoder, run, grade }) => run && grade === 'sampled' && !JSON.stringify(decoder).includes('sum-product'),
  );
  const step = Math.max(1, exact.length / mostShards);
  const chosen = exact.filter((_, i) => Math.floor(i / step) !== Math.floor((i - 1) / step)).slice(0, mostShards);
  const stored = await storedTallies(
    db,
    chosen.map(({ point }) => ({ pointId: point, index: 0 })),
  );
  const kept = chosen.filter(({ point }) => stored.has(`${point} 0`));
  if (kept.length === 0) return { check, outcome: 'failed', words: 'there is no shard that could be computed again' };
  const shards = kept.map(({ channel, decoder, run }) => {
    const { seed, framesPerShard } = run!;
    return { channel, decoder, seed, framesPerShard, rate: code.k / code.n, index: 0 };
  });
  try {
    const request = { kind: 'shards', H: (await matrixOf(db, code.id))!, shards } as const;
    const answer = await pool.run(request, { signal: AbortSignal.timeout(patienceMs) });
    if (!answer.ok) return { check, outcome: 'failed', words: answer.failure.message };
    const wrong = kept.filter(
      ({ point }, i) => JSON.stringify(answer.tallies![i]) !== JSON.stringify(stored.get(`${point} 0`)),
    );
    if (wrong.length > 0) {
      return { check, outcome: 'failed', words: `${wrong.length} of ${kept.length} shards came out otherwise` };
    }
    return {
      check,
      outcome: 'passed',
      words: `${kept.length} of ${kept.length} shards came out the same to the frame`,
    };
  } catch (error) {
    if ((error as Error).name !== 'TimeoutError') throw error;
    return { check, outcome: 'failed', words: `not finished within ${patienceMs / 1000} seconds` };
  }
}
