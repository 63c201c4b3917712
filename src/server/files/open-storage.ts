import { join } from 'node:path';
import { dataDir, s3Settings } from '../config.ts';
import { diskStorage } from './disk-storage.ts';
import type { FileStorage } from './file-storage.ts';

let shared: Promise<FileStorage> | undefined;

/** The server's own store: an S3-compatible one where S3_BUCKET is set, else DATA_DIR/files. */
export function fileStorage(): Promise<FileStorage> {
  shared ??= open();
  return shared;
}

/** Where released files lie on this disk; undefined when they are in a bucket. */
export const filesFolder = (): string | undefined => (s3Settings() ? undefined : join(dataDir(), 'files'));

async function open(): Promise<FileStorage> {
  const settings = s3Settings();
  if (!settings) return diskStorage(filesFolder()!);
  // Loaded only where it is used: the client is large.
  const { s3Storage } = await import('./s3-storage.ts');
  return s3Storage(settings);
}
