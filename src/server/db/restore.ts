import { copyFileSync, existsSync, mkdirSync, renameSync, rmSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import Database from 'better-sqlite3';
import { copyFiles } from '../files/copy-files.ts';
import { filesBeside } from './backup.ts';
import { checkBackup } from './check-backup.ts';
import { releasedFiles } from './released-files.ts';

/** Puts a backup in the database's place, and the released files beside it among the released files. The database that was there is kept beside it. Sessions of the backup are
 *  dropped, so that nobody who signed out since is signed in again; migrations that came after it run at the next
 *  start.
 *  @param files the folder of the released files; undefined when they lie elsewhere.
 *  @returns where the database that was there is now, if there was one.
 *  @throws Error when the file is not a backup, a released file is neither there nor with it, or a server has the
 *  database open. */
export async function restore(target: string, backup: string, files: string | undefined): Promise<string | undefined> {
  if (resolve(backup) === resolve(target)) throw new Error(`${backup} is the database itself, not a backup.`);
  checkBackup(backup);
  if (files !== undefined) await copyFiles(releasedFiles(backup), filesBeside(backup), files);
  mkdirSync(dirname(target), { recursive: true, mode: 0o700 });
  const partial = `${target}.partial`;
  try {
    copyFileSync(backup, partial);
    const db = new Database(partial);
    db.pragma('synchronous = FULL');
    db.exec('DELETE FROM sessions');
    db.close();
    const aside = existsSync(target) ? moveAside(target) : undefined;
    renameSync(partial, target);
    return aside;
  } finally {
    rmSync(partial, { force: true });
  }
}

function moveAside(target: string): string {
  closeWriteAheadLog(target);
  const stamp = new Date().toISOString().replace(/[:.]/g, '-');
  const aside = join(dirname(target), `before-restore-${stamp}.sqlite`);
  renameSync(target, aside);
  return aside;
}

/** Folds the write-ahead log into the database, which SQLite does only for the last connection to it.
 *  @throws Error when there is another. */
function closeWriteAheadLog(file: string): void {
  const db = new Database(file, { timeout: 500 });
  try {
    db.pragma('journal_mode = DELETE');
  } catch (error) {
    if ((error as { code?: string }).code !== 'SQLITE_BUSY') throw error;
    throw new Error('A server has the database open; stop it first. Nothing was changed.');
  } finally {
    db.close();
  }
}
