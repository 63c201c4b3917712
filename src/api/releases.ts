import { z } from 'zod';
import { channelSchema } from '@/core/channels/channel.ts';
import { decoderSchema } from '@/core/decoders/decoder-spec.ts';
import { matrixFormatSchema } from './codes.ts';

export const generatorFormSchema = z.enum(['polynomial', 'circulants', 'systematic']);
export const blockFormSchema = z.enum(['text', 'json']);
export const wordFormSchema = z.enum(['text', 'csv']);
export const vectorFormSchema = z.enum(['jsonl', 'hex']);

/** A part of a query that is JSON text, since an address holds only text. */
const jsonText = <T extends z.ZodType>(schema: T) =>
  z
    .string('JSON text')
    .transform((text, context) => {
      try {
        return JSON.parse(text) as unknown;
      } catch {
        context.addIssue({ code: 'custom', message: 'JSON text' });
        return z.NEVER;
      }
    })
    .pipe(schema);

const decodersSchema = z.array(decoderSchema).min(1, 'at least one decoder').max(8, 'at most 8 decoders');
const seedSchema = z.string('a text of 1 to 200 characters').min(1).max(200, 'a text of 1 to 200 characters');
const frameCount = 'a whole number of frames from 1 to 100 000';

export const vectorQueryParams = z.strictObject({
  form: vectorFormSchema,
  seed: seedSchema,
  count: z.coerce.number(frameCount).int(frameCount).min(1, frameCount).max(100_000, frameCount),
  channel: jsonText(channelSchema),
  decoders: jsonText(decodersSchema),
});

const formSchema = z.object({ id: z.string(), title: z.string() });

/** The files that a code can be given as: a shift table needs circulants, a block list a design, and so on. */
export const codeFormsSchema = z.object({
  formats: z.array(formSchema.extend({ id: matrixFormatSchema })),
  generators: z.array(formSchema.extend({ id: generatorFormSchema })),
  blocks: z.array(formSchema.extend({ id: blockFormSchema })),
  /** Of a constant-weight code. */
  words: z.array(formSchema.extend({ id: wordFormSchema })),
});
export type CodeForms = z.infer<typeof codeFormsSchema>;

/** What a release gives of its code. */
export const releaseContentsSchema = z.strictObject({
  formats: z.array(matrixFormatSchema).min(1, 'at least one matrix format').max(9),
  generators: z.array(generatorFormSchema).max(3).default([]),
  blocks: z.array(blockFormSchema).max(2).default([]),
  vectors: z
    .strictObject({
      forms: z.array(vectorFormSchema).min(1, 'at least one form of the vectors').max(2),
      seed: seedSchema,
      count: z.int(frameCount).min(1, frameCount).max(100_000, frameCount),
      channel: channelSchema,
      decoders: decodersSchema,
    })
    .optional(),
});

export const newReleaseSchema = z.strictObject({
  codeId: z.string('the id of a code of this project'),
  /** For whom or what for; stands in the manifest. */
  note: z.string().trim().max(2000, 'at most 2000 characters').default(''),
  contents: releaseContentsSchema,
});
export type NewRelease = z.infer<typeof newReleaseSchema>;

const reason = 'a reason of 3 to 2000 characters';
export const newEndingSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('superseded'),
    reason: z.string(reason).trim().min(3, reason).max(2000, reason),
    /** The release of the same project that takes its place. */
    successorId: z.string('the id of a later release of this project'),
  }),
  z.strictObject({ kind: z.literal('withdrawn'), reason: z.string(reason).trim().min(3, reason).max(2000, reason) }),
]);
export type NewEnding = z.infer<typeof newEndingSchema>;

export const releaseFileSchema = z.object({
  name: z.string(),
  title: z.string(),
  mediaType: z.string(),
  sizeBytes: z.number(),
  sha256: z.string(),
});
export type ReleaseFile = z.infer<typeof releaseFileSchema>;

export const releaseEndingSchema = z.object({
  kind: z.enum(['superseded', 'withdrawn']),
  reason: z.string(),
  successor: z.object({ id: z.string(), number: z.number() }).nullable(),
  by: z.string(),
  at: z.string(),
});

export const releaseSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  /** 1, 2, 3 … within the project. */
  number: z.number(),
  title: z.string(),
  note: z.string(),
  codeId: z.string(),
  codeName: z.string(),
  n: z.number(),
  k: z.number(),
  fingerprint: z.string(),
  /** Withdrawn once it was withdrawn; otherwise superseded once it was. */
  state: z.enum(['current', 'superseded', 'withdrawn']),
  endings: z.array(releaseEndingSchema),
  /** Digest of the sign-off it rests on. */
  signOff: z.string().nullable(),
  bundle: releaseFileSchema,
  createdBy: z.string(),
  createdAt: z.string(),
});
export type Release = z.infer<typeof releaseSchema>;

/** A release with the files of its bundle and the manifest as it stands in it. */
export const releaseSheetSchema = z.object({
  release: releaseSchema,
  files: z.array(releaseFileSchema),
  manifest: z.looseObject({}),
});

/** Whether the stored code and contents still give the released bytes. */
export const rebuildSchema = z.object({ identical: z.boolean(), released: z.string(), rebuilt: z.string() });
