import type { Code } from '@/api/codes.ts';
import type { Project } from '@/api/projects.ts';
import type { Context } from '../../context.ts';
import { measuredPointsOf } from '../../repositories/points.ts';
import type { CodeFacts } from '../../repositories/releases.ts';
import { requirementsOf } from '../../repositories/requirements.ts';
import { runById } from '../../repositories/runs.ts';
import { programVersion } from '../../version.ts';
import { shownPoint } from '../runs/shown-point.ts';
import { requirementVerdicts } from './requirement-verdicts.ts';

const cautions = [
  'Measured error rates hold for the channel model and decoder stated, not for a device.',
  'Extrapolation below the measured region is not evidence, and an error floor can lie beneath it.',
  'The qualification standard of the product and the engineer responsible decide.',
];

export interface ReleaseHead {
  number: number;
  note: string;
  createdAt: string;
  signOff: { digest: string; by: string; at: string } | null;
}

/** All that the manifest says besides the files: where the code comes from, what is known of it and how, what it was
 *  to meet, and every measurement of it with the seed that repeats it. */
export async function releaseFacts(
  { db, caller }: Context,
  project: Project,
  code: Code,
  { number, note, createdAt, signOff }: ReleaseHead,
): Promise<CodeFacts> {
  const { requirements, updatedAt } = await requirementsOf(db, project.id);
  const points = (await measuredPointsOf(db, project.id, { codeId: code.id })).map((point) => shownPoint(point, []));
  const runs = new Map<string, Awaited<ReturnType<typeof runById>>>();
  for (const { runId } of points) if (!runs.has(runId)) runs.set(runId, await runById(db, runId));
  return {
    manifest: 'blockwright-release-1',
    title: `${project.name}, release ${number}`,
    program: { name: 'Blockwright', version: programVersion },
    project: { id: project.id, name: project.name },
    release: { number, note, releasedBy: caller.name, releasedAt: createdAt },
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
      const { runId, channel, decoder, tally, fer, ber, interval, berInterval, level, nextIndex } = point;
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
        ...{ grade: 'sampled', channel, decoder, tally: sums, level },
        fer: { value: tally.frameErrors > 0 ? fer : null, ...interval },
        ber: { value: tally.frameErrors > 0 ? ber : null, ...berInterval },
      };
    }),
    signOff,
    cautions: signOff ? cautions : ['Nobody has signed off on this code.', ...cautions],
  };
}
