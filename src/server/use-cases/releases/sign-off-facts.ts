import type { Database } from '../../db/database.ts';
import { approvalOf, snapshotOf } from '../../repositories/sign-offs.ts';
import type { CodeEvidence } from '../sign-offs/code-evidence.ts';
import type { ReleaseHead } from './release-facts.ts';

/** The approval that a release of this code rests on now, if there is one. */
export async function signOffFacts(db: Database, codeId: string): Promise<ReleaseHead['signOff']> {
  const approval = await approvalOf(db, codeId);
  if (!approval?.decision) return null;
  const { requirements } = JSON.parse((await snapshotOf(db, approval.id))!) as CodeEvidence;
  const { by, at, reason } = approval.decision;
  return { digest: approval.digest, by, at, reason, requirementsAt: requirements?.statedAt ?? null };
}
