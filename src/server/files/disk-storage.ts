import { createReadStream } from 'node:fs';
import { mkdir, open, rename, rm, stat } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { Readable } from 'node:stream';
import { newId } from '../ids.ts';
import { Refusal } from '../refusal.ts';
import { type FileStorage, pathOf } from './file-storage.ts';

/** Files in a folder. A file gets its name only when its bytes are on the disk, so that a power cut leaves no half of
 *  one. */
export function diskStorage(root: string): FileStorage {
  return {
    async put(sha256, bytes) {
      const target = join(root, pathOf(sha256));
      const partial = `${target}.${newId()}.partial`;
      try {
        if ((await sizeOf(target)) === bytes.length) return;
        await mkdir(dirname(target), { recursive: true, mode: 0o700 });
        await writeDurably(partial, bytes);
        await rename(partial, target);
        await syncFolder(dirname(target));
      } catch (error) {
        await rm(partial, { force: true }).catch(() => {});
        throw unwritten(error);
      }
    },

    async open(sha256, range) {
      const path = join(root, pathOf(sha256));
      if ((await sizeOf(path)) === undefined) return undefined;
      const stream = createReadStream(path, range && { start: range.from, end: range.to });
      return Readable.toWeb(stream) as ReadableStream<Uint8Array>;
    },
  };
}

async function sizeOf(path: string): Promise<number | undefined> {
  try {
    return (await stat(path)).size;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

async function writeDurably(path: string, bytes: Uint8Array): Promise<void> {
  const file = await open(path, 'wx', 0o600);
  try {
    await file.writeFile(bytes);
    await file.sync();
  } finally {
    await file.close();
  }
}

/** Makes the new name itself durable. */
async function syncFolder(path: string): Promise<void> {
  const folder = await open(path, 'r');
  try {
    await folder.sync();
  } finally {
    await folder.close();
  }
}

const unwritten = (error: unknown) => {
  console.error('A file could not be stored:', error);
  const message = 'The files cannot be written just now (disk full or read-only). Nothing was released; try again.';
  return new Refusal('storage', message);
};
