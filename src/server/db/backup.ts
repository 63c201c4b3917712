import { chmodSync, existsSync, renameSync, rmSync, statSync } from 'node:fs';
import Database from 'better-sqlite3';
import { copyFiles } from '../files/copy-files.ts';
import { checkBackup } from './check-backup.ts';
import { releasedFiles } from './released-files.ts';

/** Where the released files of a backup lie: beside it. */
export const filesBeside = (backup: string): string => `${backup}.files`;

/** Copies a database that may be in use to one file, by SQLite's online backup (sqlite.org/backup.html), and the
 *  released files that it names to a folder beside; checks both, and only then gives the copy its name. The secret of
 *  local mode is not part of it.
 *  @param files the folder of the released files; undefined when they lie elsewhere.
 *  @returns the copy's size in bytes, and the number of released files with it.
 *  @throws Error when the file is there already, or a copy does not check. */
export async function backUp(
  source: string,
  target: string,
  files: string | undefined,
): Promise<{ bytes: number; released: number }> {
  if (!existsSync(source)) throw new Error(`There is no database at ${source}; set DATA_DIR to its folder.`);
  if (existsSync(target)) throw new Error(`${target} is there already; name a file that is not.`);
  const partial = `${target}.partial`;
  const db = new Database(source, { readonly: true });
  try {
    await db.backup(partial);
  } finally {
    db.close();
  }
  try {
    chmodSync(partial, 0o600);
    makeSingleFile(partial);
    checkBackup(partial);
    const digests = files === undefined ? [] : releasedFiles(partial);
    if (files !== undefined) await copyFiles(digests, files, filesBeside(target));
    renameSync(partial, target);
    return { bytes: statSync(target).size, released: digests.length };
  } finally {
    rmSync(partial, { force: true });
  }
}

/** A copy of a database in WAL mode would want its companions beside it; this one stands alone. */
function makeSingleFile(file: string): void {
  const db = new Database(file);
  db.pragma('journal_mode = DELETE');
  db.close();
}
