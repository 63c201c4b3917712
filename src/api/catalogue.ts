import { z } from 'zod';
import { type CatalogueQuery, sortColumns } from '@/core/catalogue/query.ts';
import { designSpecSchema } from './codes.ts';

/** A window as text: `900..1100`, `0.8..`, `..2000`, or one value. */
const windowSchema = z
  .string()
  .regex(/^(\d+(\.\d+)?)?(\.\.)?(\d+(\.\d+)?)?$/, 'a window such as 900..1100, 0.8.. or ..2000')
  .refine((text) => text !== '' && text !== '..', 'a window such as 900..1100, 0.8.. or ..2000')
  .transform((text) => {
    if (!text.includes('..')) return { min: Number(text), max: Number(text) };
    const [min, max] = text.split('..');
    return { ...(min && { min: Number(min) }), ...(max && { max: Number(max) }) };
  });

const count = z.coerce.number('a whole number').int('a whole number').min(0, 'a whole number');
const positive = z.coerce
  .number('a whole number of bits')
  .int('a whole number of bits')
  .min(1, 'a whole number of bits from 1');

/** The catalogue's query as an address holds it. */
export const catalogueQueryParams = z.strictObject({
  n: windowSchema.optional(),
  k: windowSchema.optional(),
  rate: windowSchema.optional(),
  columnWeight: windowSchema.optional(),
  rowWeight: windowSchema.optional(),
  girthMin: count.optional(),
  distanceMin: count.optional(),
  radiusMin: count.optional(),
  structure: z.enum(['cyclic', 'quasi-cyclic']).optional(),
  resolvable: z
    .enum(['true', 'false'])
    .transform((text) => text === 'true')
    .optional(),
  /** Family ids, joined by commas. */
  families: z
    .string()
    .transform((text) => text.split(',').filter(Boolean))
    .optional(),
  /** Hit exactly, by shortening. */
  shortenTo: positive.optional(),
  payloadBits: positive.optional(),
  parityBits: positive.optional(),
  p: z.coerce
    .number()
    .gt(0, 'a probability above 0 and at most 0.5')
    .max(0.5, 'a probability above 0 and at most 0.5')
    .optional(),
  targetFer: z.coerce.number().gt(0, 'a rate above 0 and below 1').lt(1, 'a rate above 0 and below 1').optional(),
  sort: z.enum(sortColumns).optional(),
  descending: z
    .enum(['true', 'false'])
    .transform((text) => text === 'true')
    .optional(),
  meetsFirst: z
    .enum(['true', 'false'])
    .transform((text) => text === 'true')
    .optional(),
  offset: count.optional(),
  limit: z.coerce.number().int().min(1).max(5000).optional(),
}) satisfies z.ZodType<CatalogueQuery>;

const grade = z.enum(['proved', 'computed', 'bounded', 'sampled']);
const knownSchema = z.object({ lower: z.number(), upper: z.number(), grade, method: z.string() });

export const candidateSchema = z.object({
  id: z.string(),
  design: designSpecSchema,
  checks: z.enum(['blocks', 'points']),
  transforms: z.array(z.looseObject({ kind: z.string() })),
  keptClasses: z.number().optional(),
  n: z.number(),
  rank: knownSchema,
  girth: knownSchema,
  distance: knownSchema,
  radius: z.number(),
  radiusGrade: grade,
  columnWeight: z.number(),
  rowWeight: z.number(),
  structure: z.enum(['cyclic', 'quasi-cyclic', 'none']),
  resolvable: z.boolean(),
  shortenBy: z.object({ lower: z.number(), upper: z.number() }).optional(),
  verdicts: z.array(
    z.object({ requirement: z.string(), outcome: z.enum(['meets', 'misses', 'unknown']), grade, method: z.string() }),
  ),
});
export type CandidateRow = z.infer<typeof candidateSchema>;

export const catalogueAnswerSchema = z.object({
  candidates: z.array(candidateSchema),
  /** Offset of the next page, when there is one. */
  next: z.number().optional(),
  matching: z.number(),
  total: z.number(),
  /** When nothing matches: what comes nearest with one requirement given up. */
  nearest: z.array(
    z.object({
      givenUp: z.string(),
      direction: z.enum(['below', 'above', 'other']),
      words: z.string(),
      entry: candidateSchema,
    }),
  ),
  /** When nothing matches: theorems that forbid what was asked. */
  obstacles: z.array(z.object({ rule: z.string(), statement: z.string(), source: z.unknown() })),
});

const within = (min: number, max: number, words: string) => z.int(words).min(min, words).max(max, words);

/** Where all that matches lies, for a drawing: cells of neighbours, each with the length and least rate of one of them. */
export const catalogueMapSchema = z.object({
  cells: z.array(
    z.object({
      n: z.number(),
      rate: z.number(),
      structure: z.enum(['cyclic', 'quasi-cyclic', 'none']),
      count: z.number(),
    }),
  ),
  matching: z.number(),
});

/** A candidate by its id, judged by the rest of the query. */
export const candidateQueryParams = catalogueQueryParams.extend({
  id: z.string('the id of a candidate').min(1).max(400),
});
export const candidateAnswerSchema = z.object({ candidate: candidateSchema.nullable() });

export const feasibilityQuerySchema = z.strictObject({
  t: within(1, 8, 'a whole number from 1 to 8'),
  v: within(2, 1_000_000, 'a whole number from 2 to 1 000 000'),
  k: within(1, 1_000_000, 'a whole number from t to v'),
  lambda: within(1, 1e9, 'a whole number from 1 to 10^9'),
  resolvable: z.boolean().optional(),
});

export const feasibilityAnswerSchema = z.object({
  verdict: z.enum(['exists', 'impossible', 'open']),
  words: z.string(),
  reasons: z.array(z.object({ rule: z.string(), statement: z.string(), source: z.unknown() })),
  construction: designSpecSchema.nullable(),
});
