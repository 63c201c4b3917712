import { hash, verify } from '@node-rs/argon2';

/** argon2id (the library's default algorithm) with OWASP's first recommendation: 19 MiB, two passes, one lane. */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), cost);

let decoy: Promise<string> | undefined;

/** Whether the password fits. Without a hash the same work is done on a decoy, so that the time taken does not tell
 *  which accounts exist. */
export async function passwordFits(password: string, stored: string | null | undefined): Promise<boolean> {
  decoy ??= hashPassword('a password that nobody has');
  const fits = await verify(stored ?? (await decoy), password.normalize('NFKC'));
  return fits && typeof stored === 'string';
}
