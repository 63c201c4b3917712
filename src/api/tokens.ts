import { z } from 'zod';

/** What a token may be used for. Every endpoint names those that open it (`scopes`), or none: then it takes a session.
 *
 *  - `read`: everything that its owner may read.
 *  - `run`: start projects, keep codes, state runs, steer them and hand in their shards.
 *  - `release:read`: releases and their files, and nothing else. */
export const scopeSchema = z.enum(['read', 'run', 'release:read'], 'read, run or release:read');
export type Scope = z.infer<typeof scopeSchema>;

export const longestTokenDays = 366;

export const newTokenSchema = z.strictObject({
  name: z
    .string('a name of 1 to 80 characters')
    .trim()
    .min(1, 'a name of 1 to 80 characters')
    .max(80, 'a name of 1 to 80 characters'),
  scopes: z
    .array(scopeSchema, 'a list of read, run, release:read')
    .min(1, 'at least one of read, run, release:read')
    .max(3, 'each of read, run, release:read once')
    .refine((scopes) => new Set(scopes).size === scopes.length, 'each of read, run, release:read once'),
  /** It expires so many days after it was made. */
  days: z
    .int(`a whole number of days from 1 to ${longestTokenDays}`)
    .min(1, `a whole number of days from 1 to ${longestTokenDays}`)
    .max(longestTokenDays, `a whole number of days from 1 to ${longestTokenDays}`),
});
export type NewToken = z.infer<typeof newTokenSchema>;

export const tokenSchema = z.object({
  id: z.string(),
  name: z.string(),
  scopes: z.array(scopeSchema),
  /** Its last four characters, to tell tokens apart. */
  ending: z.string(),
  createdAt: z.string(),
  expiresAt: z.string(),
  /** To the minute; null as long as it was never used. */
  lastUsedAt: z.string().nullable(),
});
export type Token = z.infer<typeof tokenSchema>;
