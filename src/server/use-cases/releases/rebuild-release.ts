import type { z } from 'zod';
import type { rebuildSchema } from '@/api/releases.ts';
import type { Context } from '../../context.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { releaseSource } from '../../repositories/releases.ts';
import { makeBundle } from './make-bundle.ts';
import { releaseToRead } from './release-access.ts';

/** Makes a release's bundle again from the stored code and what was asked for, and compares the digests. Any reader may:
 *  it changes nothing. */
export async function rebuildRelease(
  context: Context,
  pool: FilesPool,
  releaseId: string,
  signal: AbortSignal,
): Promise<z.input<typeof rebuildSchema>> {
  const { release } = await releaseToRead(context, releaseId);
  const { contents, facts } = (await releaseSource(context.db, releaseId))!;
  const folder = release.bundle.name.replace(/\.zip$/, '');
  const { zipSha256 } = await makeBundle(context.db, pool, { codeId: release.codeId, contents, facts, folder }, signal);
  return { identical: zipSha256 === release.bundle.sha256, released: release.bundle.sha256, rebuilt: zipSha256 };
}
