import type { Code } from '@/api/codes.ts';
import type { Project } from '@/api/projects.ts';
import type { Context } from '../../context.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import type { CodeFacts } from '../../repositories/releases.ts';
import { programVersion } from '../../version.ts';
import { codeEvidence } from '../sign-offs/code-evidence.ts';

const cautions = [
  'Measured error rates hold for the channel model and decoder stated, not for a device.',
  'Extrapolation below the measured region is not evidence, and an error floor can lie beneath it.',
  'The qualification standard of the product and the engineer responsible decide.',
];

export interface ReleaseHead {
  number: number;
  note: string;
  createdAt: string;
  signOff: {
    digest: string;
    by: string;
    at: string;
    reason: string;
    /** When the requirements in its snapshot were stated. */
    requirementsAt: string | null;
  } | null;
}

/** All that the manifest says besides the files: where the code comes from, what is known of it and how, what it was
 *  to meet, and every measurement of it with the seed that repeats it. */
export async function releaseFacts(
  { db, caller }: Context,
  pool: FilesPool,
  project: Project,
  code: Code,
  { number, note, createdAt, signOff }: ReleaseHead,
): Promise<CodeFacts> {
  const evidence = await codeEvidence(db, pool, project.id, code);
  const standing = signOff && {
    ...signOff,
    restated: signOff.requirementsAt !== (evidence.requirements?.statedAt ?? null),
  };
  return {
    manifest: 'blockwright-release-1',
    title: `${project.name}, release ${number}`,
    program: { name: 'Blockwright', version: programVersion },
    project: { id: project.id, name: project.name },
    release: { number, note, releasedBy: caller.name, releasedAt: createdAt },
    ...evidence,
    signOff: standing,
    cautions: [...signOffCautions(standing), ...cautions],
  };
}

function signOffCautions(standing: { restated: boolean } | null): string[] {
  if (!standing) return ['Nobody has signed off on this code.'];
  return standing.restated ? ['The requirements were stated anew after this code was signed off.'] : [];
}
