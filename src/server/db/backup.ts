import { chmodSync, existsSync, renameSync, rmSync, statSync } from 'node:fs';
import Database from 'better-sqlite3';
import { checkBackup } from './check-backup.ts';

/** Copies a database that may be in use to one file, by SQLite's online backup (sqlite.org/backup.html), checks the
 *  copy, and only then gives it its name. The secret of local mode is not part of it.
 *  @returns the copy's size in bytes.
 *  @throws Error when the file is there already, or the copy does not check. */
export async function backUp(source: string, target: string): Promise<number> {
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
    renameSync(partial, target);
  } finally {
    rmSync(partial, { force: true });
  }
  return statSync(target).size;
}

/** A copy of a database in WAL mode would want its companions beside it; this one stands alone. */
function makeSingleFile(file: string): void {
  const db = new Database(file);
  db.pragma('journal_mode = DELETE');
  db.close();
}
