import type { NewSignOff, SignOff } from '@/api/sign-offs.ts';
import { paths } from '@/paths.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { sha256Hex } from '../../files/matrix-blob.ts';
import { isId, newId } from '../../ids.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { badFields } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeById } from '../../repositories/codes.ts';
import { decidersBut, insertSignOff, signOffById } from '../../repositories/sign-offs.ts';
import { programVersion } from '../../version.ts';
import { tell } from '../notices/tell.ts';
import { projectToWrite } from '../rights.ts';
import { codeEvidence } from './code-evidence.ts';
import { evidenceChecks } from './evidence-checks.ts';
import { recomputeSample } from './recompute-sample.ts';

/** Takes a snapshot of a code, its requirements and its measurements, checks the evidence, and puts it before those who
 *  decide. What is decided on is the snapshot, whatever becomes of the project. */
export async function askSignOff(
  context: Context,
  pool: FilesPool,
  projectId: string,
  { codeId, note }: NewSignOff,
): Promise<SignOff> {
  const project = await projectToWrite(context, projectId);
  const { db, caller } = context;
  const code = isId(codeId) ? await codeById(db, codeId) : undefined;
  if (code?.projectId !== projectId || code.derivation.kind === 'constant-weight')
    throw badFields({ codeId: 'the id of a code of this project, with parity checks' });
  const id = newId();
  const createdAt = nowText();
  const evidence = await codeEvidence(db, pool, projectId, code);
  const checks = [...evidenceChecks(evidence), await recomputeSample(db, pool, code, evidence.measurements)];
  const head = {
    snapshot: 'blockwright-sign-off-1',
    program: { name: 'Blockwright', version: programVersion },
    project: { id: projectId, name: project.name },
    signOff: { id, note, askedBy: caller.name, askedAt: createdAt },
  };
  const snapshot = `${JSON.stringify({ ...head, ...evidence, checks }, null, 2)}\n`;
  const digest = sha256Hex(new TextEncoder().encode(snapshot));
  await inTransaction(db, async (trx) => {
    await insertSignOff(trx, { id, projectId, codeId, note, snapshot, digest, createdBy: caller.id, createdAt });
    const content = { codeId, fingerprint: code.fingerprint, digest };
    await recordEvent(trx, caller, { projectId, kind: 'sign-off.asked', subject: id, content });
    const title = `${caller.name} asks for a sign-off on “${code.name}”`;
    const failed = checks.filter(({ outcome }) => outcome === 'failed').length;
    const text = failed === 0 ? 'Every check of the evidence passed.' : `${failed} of ${checks.length} checks failed.`;
    for (const decider of await decidersBut(trx, projectId, caller.id)) {
      const path = paths.signOff(projectId, id);
      await tell(trx, decider, { kind: 'sign-off-asked', projectId, title, text, path, label: 'Open the sign-off' });
    }
  });
  return (await signOffById(db, id, caller.id))!;
}
