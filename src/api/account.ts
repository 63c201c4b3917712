import { z } from 'zod';

export const accountSchema = z.object({
  email: z.string(),
  name: z.string(),
  role: z.enum(['administrator', 'member', 'guest']),
});
export type Account = z.infer<typeof accountSchema>;

const nameAccepted = 'a name of 1 to 80 characters';
export const accountPatchSchema = z.strictObject({
  name: z.string(nameAccepted).trim().min(1, nameAccepted).max(80, nameAccepted),
});

/** Length is what makes a password hard to guess; which characters it is made of is its owner's choice. */
const passwordAccepted = 'a password of 12 to 200 characters';
export const newPasswordSchema = z.strictObject({
  current: z.string('the present password').min(1, 'the present password').max(200, 'the present password'),
  next: z.string(passwordAccepted).min(12, passwordAccepted).max(200, passwordAccepted),
});

export const passwordChangeSchema = z.object({
  /** How many other sessions were ended. */
  sessionsEnded: z.number(),
});
