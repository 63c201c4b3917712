import Database from 'better-sqlite3';

/** Digests of the files that the releases of a database name. */
export function releasedFiles(file: string): string[] {
  const db = new Database(file, { readonly: true, fileMustExist: true });
  try {
    const isThere = db.prepare("SELECT count(*) FROM sqlite_schema WHERE name = 'release_files'").pluck();
    // A backup may be older than releases.
    if (isThere.get() === 0) return [];
    return db.prepare('SELECT DISTINCT sha256 FROM release_files ORDER BY sha256').pluck().all() as string[];
  } finally {
    db.close();
  }
}
