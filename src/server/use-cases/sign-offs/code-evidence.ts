import type { Code } from '@/api/codes.ts';
import type { Database } from '../../db/database.ts';
import { measuredPointsOf } from '../../repositories/points.ts';
import { requirementsOf } from '../../repositories/requirements.ts';
import { runById } from '../../repositories/runs.ts';
import { shownPoint } from '../runs/shown-point.ts';
import { requirementVerdicts } from './requirement-verdicts.ts';

/** All that is known of a code at this moment: where it comes from, its properties with their grades, how it stands to
 *  what is required, and every measurement of it with the seed that repeats it. */
export async function codeEvidence(db: Database, projectId: string, code: Code) {
  const { requirements, updatedAt } = await requirementsOf(db, projectId);
  const points = (await measuredPointsOf(db, projectId, { codeId: code.id })).map((point) => shownPoint(point, []));
  const runs = new Map<string, Awaited<ReturnType<typeof runById>>>();
  for (const { runId } of points) if (!runs.has(runId)) runs.set(runId, await runById(db, runId));
  return {
    code: { id: code.id, name: code.name, n: code.n, k: code.k, rows: code.rows, ones: code.ones },
    fingerprint: code.fingerprint,
    fingerprintDefinition:
      'SHA-256 over little-endian 32-bit words: rows, cols, then for each row its weight and its columns ascending.',
    lineage: {
      design: code.design,
      designTitle: code.designTitle,
      derivation: code.derivation,
      certificate: code.certificate,
      keptBy: code.createdBy,
      keptAt: code.createdAt,
    },
    properties: code.properties.map(({ elapsedMs: _time, ...known }) => known),
    weights: { rows: code.rowWeights, columns: code.columnWeights },
    requirements: requirements && {
      stated: requirements,
      statedAt: updatedAt,
      verdicts: requirementVerdicts(requirements, code, points),
    },
    measurements: points.map((point) => {
      const { id, runId, channel, decoder, tally, fer, ber, interval, berInterval, level, nextIndex } = point;
      const { iterationHistogram: _histogram, ...sums } = tally;
      const run = runs.get(runId);
      return {
        run: run && {
          id: runId,
          name: run.name,
          seed: run.seed,
          framesPerShard: run.framesPerShard,
          shards: nextIndex,
        },
        ...{ point: id, grade: 'sampled' as const, channel, decoder, tally: sums, level },
        fer: { value: tally.frameErrors > 0 ? fer : null, ...interval },
        ber: { value: tally.frameErrors > 0 ? ber : null, ...berInterval },
      };
    }),
  };
}

export type CodeEvidence = Awaited<ReturnType<typeof codeEvidence>>;
