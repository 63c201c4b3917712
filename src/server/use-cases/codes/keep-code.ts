import type { BuiltCode } from '@workers/build/api.ts';
import type { NewCode } from '@/api/codes.ts';
import { nowText } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeIdByFingerprint, insertCode } from '../../repositories/codes.ts';
import { endJob } from '../../repositories/jobs.ts';
import { designOf } from './stored-base.ts';

export interface Keeping {
  projectId: string;
  userId: string;
  request: NewCode;
  /** The job to end in the same transaction, when the build outlived its request. */
  jobId?: string;
}

/** Stores a built code and gives its id.
 *  @throws Refusal when the browser's fingerprint differs, or the project holds the same matrix already. */
export async function keepCode(db: Database, built: BuiltCode, keeping: Keeping): Promise<string> {
  const { projectId, userId, request } = keeping;
  if (request.fingerprint !== undefined && request.fingerprint !== built.fingerprint) {
    const accepted = `${built.fingerprint}, the fingerprint of the matrix built here`;
    const message = 'The matrix built on the server is not the one the browser built; nothing was kept.';
    throw new Refusal('fingerprint', message, { fields: { fingerprint: accepted } });
  }
  const id = newId();
  const createdAt = nowText();
  await inTransaction(db, async (trx) => {
    await refuseDuplicate(trx, projectId, built.fingerprint);
    const { derivation } = request;
    const design = await designOf(trx, projectId, request);
    const name = request.name ?? nameOf(built, derivation.kind);
    await insertCode(trx, { ...built, id, projectId, name, design, derivation, createdBy: userId, createdAt });
    const content = { name, design, derivation, fingerprint: built.fingerprint };
    await recordEvent(trx, { id: userId }, { projectId, kind: 'code.created', subject: id, content });
    if (keeping.jobId) await endJob(trx, keeping.jobId, { codeId: id }, createdAt);
  });
  return id;
}

function nameOf({ n, k, H, rowWeights, designTitle }: BuiltCode, kind: NewCode['derivation']['kind']): string {
  if (kind !== 'constant-weight') return `(${n},${k}) ${designTitle}`;
  return `${H.rows} words of ${n} bits, weight ${rowWeights[0]?.[0] ?? 0}: ${designTitle}`;
}

/** @throws Refusal naming the code that holds the same matrix. */
export async function refuseDuplicate(db: Database, projectId: string, fingerprint: string): Promise<void> {
  const existing = await codeIdByFingerprint(db, projectId, fingerprint);
  if (existing === undefined) return;
  throw new Refusal('duplicate', `This project already keeps the same matrix, as code ${existing}.`, {
    fields: { fingerprint: `a matrix that the project does not hold; code ${existing} is this one` },
    existing,
  });
}
