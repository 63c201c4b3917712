import type { z } from 'zod';
import type { EvidenceCheck, signOffSheetSchema } from '@/api/sign-offs.ts';
import type { Context } from '../../context.ts';
import { commentsOf } from '../../repositories/sign-off-comments.ts';
import { snapshotOf } from '../../repositories/sign-offs.ts';
import type { CodeEvidence } from './code-evidence.ts';
import { signOffToRead } from './sign-off-access.ts';

/** A sign-off with the snapshot that it is about, and what was said on it. */
export async function getSignOff(context: Context, id: string): Promise<z.input<typeof signOffSheetSchema>> {
  const { signOff } = await signOffToRead(context, id);
  const snapshot = (await snapshotOf(context.db, id))!;
  const { requirements, checks } = JSON.parse(snapshot) as CodeEvidence & { checks: EvidenceCheck[] };
  const comments = await commentsOf(context.db, id);
  return { signOff, snapshot, verdicts: requirements?.verdicts ?? [], checks, comments };
}
