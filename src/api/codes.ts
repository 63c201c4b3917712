import { z } from 'zod';

/** A design's spec as JSON; operations hold an inner spec. The engine refuses what its family does not accept. */
export const designSpecSchema: z.ZodType<{ family: string; params: Record<string, unknown> }> = z.strictObject({
  family: z.string().min(1).max(60),
  params: z.record(z.string(), z.unknown()),
});

export const derivationSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('ldpc'),
    checks: z.enum(['blocks', 'points']),
    transforms: z
      .array(z.looseObject({ kind: z.string() }))
      .max(12)
      .optional(),
  }),
  z.strictObject({ kind: z.literal('constant-weight'), complement: z.boolean().optional() }),
]);

const fingerprintSchema = z.string().regex(/^[0-9a-f]{64}$/, '64 hexadecimal digits');

/** Steps from a matrix that was uploaded to the project, named by its fingerprint; no construction gives it anew. */
export const storedDerivationSchema = z.strictObject({
  kind: z.literal('stored'),
  base: fingerprintSchema,
  transforms: z
    .array(z.looseObject({ kind: z.string() }))
    .min(1)
    .max(12),
});

/** How a kept code's matrix came from its design or, of an uploaded one, from the file. */
const keptDerivationSchema = z.discriminatedUnion('kind', [
  ...derivationSchema.options,
  storedDerivationSchema,
  z.strictObject({ kind: z.literal('matrix'), checksAre: z.enum(['rows', 'columns']) }),
]);

export const newCodeSchema = z
  .strictObject({
    name: z.string().trim().min(1).max(120).optional(),
    /** Left out for a stored derivation, whose base names it. */
    design: designSpecSchema.optional(),
    derivation: z.discriminatedUnion('kind', [...derivationSchema.options, storedDerivationSchema]),
    /** The fingerprint the browser computed; the server refuses the code when its own differs. */
    fingerprint: fingerprintSchema.optional(),
  })
  .superRefine(({ design, derivation }, context) => {
    const isStored = derivation.kind === 'stored';
    if (isStored === (design === undefined)) return;
    const message = isStored ? 'none: derivation.base names the matrix' : 'a design: {"family", "params"}';
    context.addIssue({ code: 'custom', path: ['design'], message });
  });
export type NewCode = z.infer<typeof newCodeSchema>;

const gradeSchema = z.enum(['proved', 'computed', 'bounded', 'sampled']);
export const gradedSchema = <T extends z.ZodType>(value: T) =>
  z.object({
    value,
    grade: gradeSchema,
    method: z.string(),
    source: z.unknown().optional(),
    elapsedMs: z.number().optional(),
  });

/** One line of a code's sheet, ready to show: value, grade, method, source. */
export const propertySchema = z.object({
  key: z.string(),
  label: z.string(),
  /** As shown; numbers are also in `number` for sorting. */
  text: z.string(),
  number: z.number().optional(),
  grade: gradeSchema,
  method: z.string(),
  source: z.string().optional(),
  elapsedMs: z.number().optional(),
});
export type Property = z.infer<typeof propertySchema>;

export const certificateSchema = z.object({
  holds: z.boolean(),
  t: z.number(),
  lambda: z.number(),
  v: z.number(),
  k: z.number(),
  b: z.number(),
  r: z.number(),
  /** How it was checked: every t-subset, or orbit representatives of a verified group. */
  method: z.string(),
  subsetsCounted: z.number().optional(),
  elapsedMs: z.number().optional(),
});

export const codeSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  name: z.string(),
  design: designSpecSchema,
  /** The design in words: "Projective plane PG(2,16)". */
  designTitle: z.string(),
  derivation: keptDerivationSchema,
  n: z.number(),
  k: z.number(),
  rows: z.number(),
  ones: z.number(),
  fingerprint: z.string(),
  certificate: certificateSchema.nullable(),
  properties: z.array(propertySchema),
  rowWeights: z.array(z.tuple([z.number(), z.number()])),
  columnWeights: z.array(z.tuple([z.number(), z.number()])),
  createdAt: z.string(),
  createdBy: z.string(),
});
export type Code = z.infer<typeof codeSchema>;

export const jobSchema = z.object({
  id: z.string(),
  kind: z.literal('build-code'),
  state: z.enum(['waiting', 'working', 'done', 'failed']),
  codeId: z.string().nullable(),
  error: z.object({ code: z.string(), message: z.string() }).nullable(),
});

export const matrixFormatSchema = z.enum(['alist', 'mtx', 'csv', 'json', 'npz', 'npy', 'mat', 'c', 'qc']);
export type MatrixFormat = z.infer<typeof matrixFormatSchema>;
