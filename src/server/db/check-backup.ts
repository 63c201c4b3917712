import Database from 'better-sqlite3';

/** @throws Error unless the file is a whole Blockwright database. */
export function checkBackup(file: string): void {
  let db: Database.Database | undefined;
  try {
    db = new Database(file, { readonly: true, fileMustExist: true });
    const verdict = db.pragma('integrity_check', { simple: true });
    if (verdict !== 'ok') throw new Error(String(verdict));
    const broken = db.pragma('foreign_key_check') as unknown[];
    if (broken.length > 0) throw new Error(`${broken.length} rows refer to rows that are not there`);
    const tables = "SELECT count(*) FROM sqlite_schema WHERE name IN ('knex_migrations', 'projects', 'shards')";
    if (db.prepare(tables).pluck().get() !== 3) throw new Error('it holds another program’s tables, or none');
  } catch (error) {
    throw new Error(`${file} is not a sound Blockwright database: ${(error as Error).message}.`);
  } finally {
    db?.close();
  }
}
