import type { Code } from '@/api/codes.ts';
import type { Database } from '../../db/database.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { seedOf } from '../../jobs/shard-tasks.ts';
import { measurementsOf } from '../../repositories/measurements.ts';
import { pointsWanted } from '../../repositories/points.ts';
import { requirementsOf } from '../../repositories/requirements.ts';
import { runById } from '../../repositories/runs.ts';
import { shownMeasurement } from '../measurements/shown-measurement.ts';
import { shownPoint } from '../runs/shown-point.ts';
import { ofStrata, rateEvidence } from './rate-evidence.ts';
import { requirementVerdicts } from './requirement-verdicts.ts';
import { strataFacts } from './strata-facts.ts';

/** All that is known of a code at this moment: where it comes from, its properties with their grades, how it stands to
 *  what is required, and every measurement of it with the seed that repeats it; data measured elsewhere are those of a code of
 *  its length and dimension. */
export async function codeEvidence(db: Database, pool: FilesPool, projectId: string, code: Code) {
  const { requirements, updatedAt } = await requirementsOf(db, projectId);
  const measured = await pointsWanted(db, { projectId, codeId: code.id, measured: true });
  const points = measured.map((point) => shownPoint(point, []));
  const runs = new Map<string, Awaited<ReturnType<typeof runById>>>();
  for (const { runId } of points) if (!runs.has(runId)) runs.set(runId, await runById(db, runId));
  const strata = await strataFacts(db, pool, code, points, (id) => runs.get(id)?.name ?? id);
  const measuredData = (await measurementsOf(db, projectId))
    .filter(({ n, k }) => n === code.n && k === code.k)
    .map(shownMeasurement);
  const channel = requirements?.channel;
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
      verdicts: requirementVerdicts(requirements, code, rateEvidence(requirements, points, strata, measuredData)),
    },
    strata: strata.map((facts) => ({
      ...facts,
      grade: 'bounded' as const,
      // What the weights say where it is asked for, and ten times further out.
      limits:
        channel?.kind === 'bsc'
          ? [channel.p, channel.p / 10].map((p) => {
              const { fer, ber } = ofStrata(facts, p);
              return { p, fer, ber };
            })
          : [],
    })),
    measuredData: measuredData.map(({ projectId: _project, ...data }) => ({ ...data, grade: 'sampled' as const })),
    measurements: points.map((point) => {
      const { id, runId, channel, decoder, tally, fer, ber, interval, berInterval, level, nextIndex, plan } = point;
      const { iterationHistogram: _histogram, ...sums } = tally;
      const run = runs.get(runId);
      const isWhole = plan?.enumerate !== undefined && point.done && point.setAside === 0;
      return {
        run: run && {
          id: runId,
          name: run.name,
          seed: seedOf(run, { plan }),
          framesPerShard: run.framesPerShard,
          shards: nextIndex,
        },
        // Of a weight that was tried whole the share of failures is known exactly.
        ...{
          point: id,
          grade: isWhole ? ('computed' as const) : ('sampled' as const),
          channel,
          decoder,
          tally: sums,
          level,
        },
        fer: isWhole ? exactly(fer) : { value: tally.frameErrors > 0 ? fer : null, ...interval },
        ber: isWhole ? exactly(ber) : { value: tally.frameErrors > 0 ? ber : null, ...berInterval },
      };
    }),
  };
}

const exactly = (value: number) => ({ value, lower: value, upper: value });

export type CodeEvidence = Awaited<ReturnType<typeof codeEvidence>>;
