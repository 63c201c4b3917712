import type { NoticeKind } from '@/api/notices.ts';
import type { Run } from '@/api/runs.ts';
import { paths } from '@/paths.ts';
import type { Database } from '../../db/database.ts';
import { ownerOfRun } from '../../repositories/notices.ts';
import { tell } from './tell.ts';

type RunNotice = Exclude<NoticeKind, 'sign-off-asked' | 'sign-off-comment' | 'sign-off-decided'>;

const what: Record<RunNotice, string> = {
  'run-finished': 'is finished',
  'run-failed': 'has failed',
  'verdict-reached': 'has reached its verdict',
  quarantine: 'had results set aside',
};

/** Tells whoever stated a run what became of it, within the transaction in which it did.
 *  @param text particulars, in a sentence or two. */
export async function tellRunOwner(
  trx: Database,
  run: Pick<Run, 'id' | 'projectId' | 'name'>,
  kind: RunNotice,
  text: string,
): Promise<void> {
  const owner = await ownerOfRun(trx, run.id);
  if (!owner) return;
  const title = `Run “${run.name}” ${what[kind]}`;
  const path = paths.run(run.projectId, run.id);
  await tell(trx, owner, { kind, projectId: run.projectId, title, text, path, label: 'Open the run' });
}
