import { createHash } from 'node:crypto';
import { createReadStream, existsSync } from 'node:fs';
import { copyFile, mkdir, open, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { pathOf } from './file-storage.ts';

/** Copies files from one disk storage to another, each checked against its digest on the way; what is there already is
 *  checked and kept.
 *  @returns how many were copied.
 *  @throws Error when a file is missing or damaged, naming it. Files copied before stay: they harm nobody. */
export async function copyFiles(digests: readonly string[], from: string, to: string): Promise<number> {
  let copied = 0;
  for (const sha256 of digests) {
    const target = join(to, pathOf(sha256));
    if (existsSync(target) && (await digestOf(target)) === sha256) continue;
    await copyOne(sha256, join(from, pathOf(sha256)), target);
    copied++;
  }
  return copied;
}

async function copyOne(sha256: string, source: string, target: string): Promise<void> {
  if (!existsSync(source)) throw new Error(`The released file ${sha256} is not at ${source}.`);
  await mkdir(dirname(target), { recursive: true, mode: 0o700 });
  const partial = `${target}.partial`;
  try {
    await copyFile(source, partial);
    const file = await open(partial, 'r+');
    await file.chmod(0o600);
    await file.sync();
    await file.close();
    if ((await digestOf(partial)) !== sha256) {
      throw new Error(`The released file at ${source} is damaged: its SHA-256 is not its name.`);
    }
    await rename(partial, target);
  } finally {
    await rm(partial, { force: true });
  }
}

async function digestOf(path: string): Promise<string> {
  const hash = createHash('sha256');
  for await (const chunk of createReadStream(path)) hash.update(chunk as Buffer);
  return hash.digest('hex');
}
