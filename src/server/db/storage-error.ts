/** Whether an error means that the database cannot take or give data just now: disk full, read-only, input or output
 *  failing, locked by another process, or damaged. Codes: SQLite's result codes, sqlite.org/rescode.html. */
export function isStorageError(error: unknown): boolean {
  const code = (error as { code?: unknown } | null)?.code;
  return typeof code === 'string' && /^SQLITE_(FULL|READONLY|IOERR|CANTOPEN|BUSY|LOCKED|CORRUPT|NOTADB)/.test(code);
}
