import type { NewRelease, Release, ReleaseFile } from '@/api/releases.ts';
import type { BundledFile } from '@/core/release/bundle.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import type { FileStorage } from '../../files/file-storage.ts';
import { isId, newId } from '../../ids.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeById } from '../../repositories/codes.ts';
import { insertRelease, lastReleaseNumber, releaseById } from '../../repositories/releases.ts';
import { projectToWrite } from '../rights.ts';
import { makeBundle } from './make-bundle.ts';
import { releaseFacts } from './release-facts.ts';
import { signOffFacts } from './sign-off-facts.ts';

export interface Making {
  pool: FilesPool;
  storage: FileStorage;
  /** Fires when the one who asked is gone: nothing is released then. */
  signal: AbortSignal;
}

/** Makes a bundle, stores its files and freezes it under the project's next number. Files are safe before the release
 *  is written, so that a release never lacks one. */
export async function createRelease(
  context: Context,
  { pool, storage, signal }: Making,
  projectId: string,
  { codeId, note, contents }: NewRelease,
): Promise<Release> {
  const project = await projectToWrite(context, projectId);
  const { db, caller } = context;
  const code = isId(codeId) ? await codeById(db, codeId) : undefined;
  if (code?.projectId !== projectId || code.derivation.kind === 'constant-weight')
    throw badFields({ codeId: 'the id of a code of this project, with parity checks' });
  const number = (await lastReleaseNumber(db, projectId)) + 1;
  const createdAt = nowText();
  const signOff = await signOffFacts(db, codeId);
  const facts = await releaseFacts(context, pool, project, code, { number, note, createdAt, signOff });
  const folder = `${stemOf(project.name)}-release-${number}`;
  const bundle = await makeBundle(db, pool, { codeId, contents, facts, folder }, signal);
  for (const file of bundle.files) await storage.put(file.sha256, file.bytes);
  await storage.put(bundle.zipSha256, bundle.zip);
  signal.throwIfAborted();
  const id = newId();
  await inTransaction(db, async (trx) => {
    // Somebody else's release may have been frozen while this one was made.
    if ((await lastReleaseNumber(trx, projectId)) !== number - 1) {
      throw new Refusal('conflict', `Release ${number} was made by somebody else meanwhile; make this one again.`);
    }
    const { title, fingerprint } = facts;
    await insertRelease(
      trx,
      {
        ...{ id, projectId, number, title, note, codeId, fingerprint, contents, facts, createdAt },
        signOff: signOff?.digest ?? null,
        createdBy: caller.id,
      },
      bundle.files.map(listed),
      {
        name: `${folder}.zip`,
        title: 'the whole release',
        mediaType: 'application/zip',
        sizeBytes: bundle.zip.length,
        sha256: bundle.zipSha256,
      },
    );
    const content = { number, codeId, fingerprint, bundle: bundle.zipSha256 };
    await recordEvent(trx, caller, { projectId, kind: 'release.made', subject: id, content });
  });
  return (await releaseById(db, id))!;
}

const listed = ({ name, title, mediaType, bytes, sha256 }: BundledFile): ReleaseFile => ({
  ...{ name, title, mediaType, sha256 },
  sizeBytes: bytes.length,
});

const stemOf = (name: string): string =>
  name
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 40) || 'project';
