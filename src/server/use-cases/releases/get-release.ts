import type { z } from 'zod';
import type { ReleaseFile, releaseSheetSchema } from '@/api/releases.ts';
import type { Context } from '../../context.ts';
import type { FileStorage } from '../../files/file-storage.ts';
import { notFound } from '../../refusal.ts';
import { filesOfRelease, releaseFile, releaseSource } from '../../repositories/releases.ts';
import { releaseToRead } from './release-access.ts';

/** A release with its files, and the manifest as it stands in the bundle. */
export async function getRelease(context: Context, releaseId: string): Promise<z.input<typeof releaseSheetSchema>> {
  const { release } = await releaseToRead(context, releaseId);
  const files = await filesOfRelease(context.db, releaseId);
  const { facts } = (await releaseSource(context.db, releaseId))!;
  const unlisted = ['manifest.json', 'SHA256SUMS'];
  return { release, files, manifest: { ...facts, files: files.filter(({ name }) => !unlisted.includes(name)) } };
}

/** A file of a release and how to read it. */
export async function getReleaseFile(
  context: Context,
  storage: FileStorage,
  releaseId: string,
  name: string,
): Promise<ReleaseFile & { open: (range?: { from: number; to: number }) => ReturnType<FileStorage['open']> }> {
  await releaseToRead(context, releaseId);
  const file = await releaseFile(context.db, releaseId, name);
  if (!file) throw notFound('file');
  return { ...file, open: (range) => storage.open(file.sha256, range) };
}
