import type { Code } from '@/api/codes.ts';
import type { UploadQuery } from '@/api/uploads.ts';
import { uploadLimits } from '@/core/formats/read-upload.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { receiveFile } from '../../files/receive-file.ts';
import { newId } from '../../ids.ts';
import type { UploadPool } from '../../jobs/upload-pool.ts';
import { refusalOfFailure } from '../../jobs/worker-refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeById, insertCode } from '../../repositories/codes.ts';
import { projectToWrite } from '../rights.ts';
import { refuseDuplicate } from './keep-code.ts';

/** Keeps the code that a file holds: the file is received, read and analysed in a worker, and not kept itself; its digest
 *  is. A reader that goes away ends the work. */
export async function uploadCode(
  context: Context & { request: Request },
  pool: UploadPool,
  projectId: string,
  { fileName, name, ...meant }: UploadQuery,
): Promise<{ code: Code }> {
  await projectToWrite(context, projectId);
  const { db, caller, request } = context;
  const file = await receiveFile(request, uploadLimits.bytes);
  try {
    const answer = await pool.run({ ...meant, path: file.path }, { signal: request.signal });
    if (!answer.ok) throw refusalOfFailure(answer.failure);
    const { uploaded } = answer;
    const { sizeBytes, sha256 } = file;
    const design = { family: 'uploaded', params: { fileName, format: uploaded.format, sizeBytes, sha256 } };
    const { derivation, fingerprint } = uploaded;
    const code = { ...uploaded, id: newId(), projectId, name: name ?? fileName.slice(0, 120), design };
    await inTransaction(db, async (trx) => {
      await refuseDuplicate(trx, projectId, fingerprint);
      await insertCode(trx, { ...code, createdBy: caller.id, createdAt: nowText() });
      const content = { name: code.name, design, derivation, fingerprint };
      await recordEvent(trx, { id: caller.id }, { projectId, kind: 'code.uploaded', subject: code.id, content });
    });
    return { code: (await codeById(db, code.id))! };
  } finally {
    await file.remove();
  }
}
