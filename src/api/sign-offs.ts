import { z } from 'zod';

export const newSignOffSchema = z.strictObject({
  codeId: z.string('the id of a code of this project'),
  /** What the one who asks wants the reviewer to know. */
  note: z.string().trim().max(2000, 'at most 2000 characters').default(''),
});
export type NewSignOff = z.infer<typeof newSignOffSchema>;

const reason = 'a reason of 3 to 2000 characters';
export const newDecisionSchema = z.strictObject({
  outcome: z.enum(['approved', 'returned'], 'approved or returned'),
  reason: z.string(reason).trim().min(3, reason).max(2000, reason),
});
export type NewDecision = z.infer<typeof newDecisionSchema>;

export const signOffSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  codeId: z.string(),
  codeName: z.string(),
  note: z.string(),
  state: z.enum(['open', 'approved', 'returned']),
  /** SHA-256 of the snapshot's text. */
  digest: z.string(),
  askedBy: z.string(),
  askedAt: z.string(),
  /** Whether the reader asked for it, and so may not decide. */
  isOwn: z.boolean(),
  decision: z.object({ reason: z.string(), by: z.string(), at: z.string() }).nullable(),
});
export type SignOff = z.infer<typeof signOffSchema>;

const gradeSchema = z.enum(['proved', 'computed', 'bounded', 'sampled']);
export const verdictSchema = z.object({
  requirement: z.string(),
  asked: z.union([z.number(), z.string()]),
  outcome: z.enum(['met', 'missed', 'undecided']),
  grade: gradeSchema,
  method: z.string(),
});
export type RequirementVerdict = z.infer<typeof verdictSchema>;

/** One question that the program itself puts to the evidence. */
export const evidenceCheckSchema = z.object({
  check: z.string(),
  outcome: z.enum(['passed', 'failed']),
  words: z.string(),
});
export type EvidenceCheck = z.infer<typeof evidenceCheckSchema>;

/** A sign-off with its snapshot, as text: its SHA-256 is the digest. */
export const signOffSheetSchema = z.object({
  signOff: signOffSchema,
  snapshot: z.string(),
  verdicts: z.array(verdictSchema),
  checks: z.array(evidenceCheckSchema),
});
