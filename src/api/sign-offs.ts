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

const key = z.string('a key').min(1, 'a key').max(200, 'at most 200 characters');
const aboutSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('whole') }),
  /** A property of the snapshot, by its key. */
  z.strictObject({ kind: z.literal('property'), key }),
  /** A measured point of the snapshot, by its id. */
  z.strictObject({ kind: z.literal('point'), point: key }),
]);
const commentText = 'a text of 1 to 2000 characters';
export const newCommentSchema = z.strictObject({
  about: aboutSchema.default({ kind: 'whole' }),
  text: z.string(commentText).trim().min(1, commentText).max(2000, commentText),
});
export type NewComment = z.infer<typeof newCommentSchema>;

export const signOffCommentSchema = z.object({
  id: z.string(),
  about: aboutSchema,
  text: z.string(),
  by: z.string(),
  at: z.string(),
});
export type SignOffComment = z.infer<typeof signOffCommentSchema>;

/** A sign-off with its snapshot, as text: its SHA-256 is the digest. */
export const signOffSheetSchema = z.object({
  signOff: signOffSchema,
  snapshot: z.string(),
  verdicts: z.array(verdictSchema),
  checks: z.array(evidenceCheckSchema),
  /** Oldest first. */
  comments: z.array(signOffCommentSchema),
});
