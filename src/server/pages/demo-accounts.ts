import { isProduction } from '../config.ts';
import { database } from '../db/database.ts';
import { demoEmails } from '../repositories/users.ts';

/** For the sign-in page: the demo accounts of local mode, none in production. */
export async function demoAccounts(): Promise<{ emails: string[]; password: string } | null> {
  if (isProduction()) return null;
  const emails = await demoEmails(database());
  return emails.length > 0 ? { emails, password: 'shore-archive' } : null;
}
