import { z } from 'zod';
import type { Caller } from '../context.ts';
import type { Database } from '../db/database.ts';
import { userWithPassword } from '../repositories/users.ts';
import { passwordFits } from './passwords.ts';
import { beginTry, endTry } from './throttle.ts';

const credentialsSchema = z.object({ email: z.email().max(254), password: z.string().min(1).max(200) });

export type SignIn = { user: Caller } | { refused: 'wrong' } | { refused: 'slow-down'; waitMs: number };

/** Tries an e-mail address and a password. A refusal does not tell an unknown account from a wrong password, neither
 *  by words nor by time. */
export async function signIn(db: Database, input: unknown, address: string): Promise<SignIn> {
  const parsed = credentialsSchema.safeParse(input);
  if (!parsed.success) return { refused: 'wrong' };
  const { email, password } = parsed.data;
  const waitMs = await beginTry(db, email, address);
  if (waitMs > 0) return { refused: 'slow-down', waitMs };
  const found = await userWithPassword(db, email);
  if (!(await passwordFits(password, found?.passwordHash)) || !found) return { refused: 'wrong' };
  await endTry(db, email, address);
  return { user: { id: found.id, email: found.email, name: found.name, role: found.role } };
}
