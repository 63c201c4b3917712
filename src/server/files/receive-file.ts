import { createHash } from 'node:crypto';
import { mkdir, open, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { dataDir } from '../config.ts';
import { newId } from '../ids.ts';
import { Refusal } from '../refusal.ts';

export interface ReceivedFile {
  path: string;
  sizeBytes: number;
  sha256: string;
  remove(): Promise<void>;
}

const folder = () => join(dataDir(), 'incoming');

/** Writes a request's body to the disk as it comes, so that no file is held in memory, and gives where it lies. Whoever
 *  asked for it removes it.
 *  @throws Refusal `media-type`, `too-large`, `invalid` for none at all, `storage` when the disk does not take it. */
export async function receiveFile(request: Request, limitBytes: number): Promise<ReceivedFile> {
  const mediaType = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase();
  if (mediaType !== 'application/octet-stream')
    throw new Refusal('media-type', 'The file is the body itself, with Content-Type: application/octet-stream.');
  const tooLarge = () => new Refusal('too-large', `A file may have at most ${limitBytes} bytes.`);
  if (Number(request.headers.get('content-length') ?? 0) > limitBytes) throw tooLarge();
  const path = join(folder(), newId());
  const remove = () => rm(path, { force: true });
  try {
    const { sizeBytes, sha256 } = await write(request, path, limitBytes, tooLarge);
    if (sizeBytes === 0) throw new Refusal('invalid', 'The file is empty.', { fields: { body: 'a file' } });
    return { path, sizeBytes, sha256, remove };
  } catch (error) {
    await remove();
    throw error;
  }
}

async function write(request: Request, path: string, limitBytes: number, tooLarge: () => Refusal) {
  await mkdir(folder(), { recursive: true, mode: 0o700 });
  const file = await open(path, 'wx', 0o600);
  const digest = createHash('sha256');
  let sizeBytes = 0;
  try {
    // Breaking out of the loop cancels the stream, so the rest is never read.
    for await (const chunk of (request.body ?? []) as unknown as AsyncIterable<Uint8Array>) {
      sizeBytes += chunk.length;
      if (sizeBytes > limitBytes) throw tooLarge();
      digest.update(chunk);
      await file.write(chunk).catch(unwritten);
    }
  } finally {
    await file.close();
  }
  return { sizeBytes, sha256: digest.digest('hex') };
}

function unwritten(error: unknown): never {
  console.error('An uploaded file could not be written:', error);
  throw new Refusal('storage', 'The file cannot be written just now (disk full or read-only); nothing was kept.');
}

/** Files left behind by a server that was killed while it read them. */
export async function removeLeftovers(): Promise<void> {
  const names = await readdir(folder()).catch(() => [] as string[]);
  await Promise.all(names.map((name) => rm(join(folder(), name), { force: true })));
}
