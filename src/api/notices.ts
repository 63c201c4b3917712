import { z } from 'zod';

/** What people are told about, with the words by which they choose. */
export const noticeKinds = {
  'run-finished': 'A run of mine is finished',
  'run-failed': 'A run of mine has failed',
  'verdict-reached': 'A run of mine has reached its verdict',
  quarantine: 'Results of a run of mine were set aside',
  'sign-off-asked': 'A sign-off is asked for that I may decide on',
  'sign-off-comment': 'Somebody comments on a sign-off of mine, or one that I decide or spoke on',
  'sign-off-decided': 'A sign-off that I asked for is decided',
} as const;
export type NoticeKind = keyof typeof noticeKinds;

const kinds = Object.keys(noticeKinds) as [NoticeKind, ...NoticeKind[]];
export const noticeKindSchema = z.enum(kinds, `one of ${kinds.join(', ')}`);

export const noticeSchema = z.object({
  id: z.string(),
  kind: noticeKindSchema,
  title: z.string(),
  text: z.string(),
  /** Where it leads, as a path of this site. */
  path: z.string(),
  createdAt: z.string(),
  readAt: z.string().nullable(),
});
export type Notice = z.infer<typeof noticeSchema>;

export const noticePatchSchema = z.strictObject({ read: z.boolean('true or false') });
export const unreadSchema = z.object({ unread: z.number() });

/** How mail leaves this server: by SMTP, into the mailbox of local mode, or not at all. */
export const mailModeSchema = z.enum(['smtp', 'local', 'off']);
export type MailMode = z.infer<typeof mailModeSchema>;

const choice = z.strictObject({ kind: noticeKindSchema, byMail: z.boolean('true or false') });
export const noticeChoicesSchema = z.object({ mail: mailModeSchema, choices: z.array(choice) });
export type NoticeChoices = z.infer<typeof noticeChoicesSchema>;
export const noticeChoicesPatchSchema = z.strictObject({
  choices: z.array(choice, 'a list of kinds with byMail').min(1, 'at least one kind').max(kinds.length),
});

/** A letter that could not be delivered, for the administrator. */
export const deadLetterSchema = z.object({
  id: z.string(),
  recipient: z.string(),
  subject: z.string(),
  attempts: z.number(),
  lastError: z.string(),
  createdAt: z.string(),
  endedAt: z.string(),
});
export type DeadLetter = z.infer<typeof deadLetterSchema>;
