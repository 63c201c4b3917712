import { z } from 'zod';
import { ParamError } from '../errors.ts';

const whole = (words: string) => z.int(words).min(0, words);
const range = z.strictObject({ min: z.number().optional(), max: z.number().optional() });

export const sortColumns = [
  'n',
  'k',
  'rate',
  'girth',
  'distance',
  'radius',
  'columnWeight',
  'rowWeight',
  'parity',
] as const;
export type SortColumn = (typeof sortColumns)[number];

/** What is asked of the catalogue. Every part may be left out. */
export const catalogueQuerySchema = z.strictObject({
  /** Code length, dimension and rate, each a window whose ends count; of the shortened code when one is asked for. */
  n: range.optional(),
  k: range.optional(),
  rate: range.optional(),
  columnWeight: range.optional(),
  rowWeight: range.optional(),
  girthMin: whole('a whole number').optional(),
  distanceMin: whole('a whole number').optional(),
  /** Errors that one step of majority logic always corrects. */
  radiusMin: whole('a whole number of errors').optional(),
  structure: z.enum(['cyclic', 'quasi-cyclic']).optional(),
  resolvable: z.boolean().optional(),
  families: z.array(z.string()).optional(),
  /** Length to shorten to; hit exactly. */
  shortenTo: whole('a whole number of bits').min(1).optional(),
  /** Information bits after shortening; hit exactly. */
  payloadBits: whole('a whole number of bits').min(1).optional(),
  /** Parity bits n − k; hit exactly. */
  parityBits: whole('a whole number of bits').min(1).optional(),
  /** Raw crossover probability and the frame error rate wanted at it; they say something together. */
  p: z.number().gt(0).max(0.5).optional(),
  targetFer: z.number().gt(0).lt(1).optional(),
  sort: z.enum(sortColumns).optional(),
  descending: z.boolean().optional(),
  /** Those that surely meet everything come before those that may. */
  meetsFirst: z.boolean().optional(),
  offset: whole('a whole number of rows').optional(),
  limit: z.int().min(1).max(5000).optional(),
});
export type CatalogueQuery = z.input<typeof catalogueQuerySchema>;

/** @throws ParamError naming the part and what it accepts. */
export function parseQuery(query: CatalogueQuery): CatalogueQuery {
  const parsed = catalogueQuerySchema.safeParse(query);
  if (parsed.success) return parsed.data;
  const issue = parsed.error.issues[0]!;
  const unknown = issue.code === 'unrecognized_keys' ? issue.keys[0] : undefined;
  const path = unknown ?? issue.path.join('.');
  const given =
    unknown ?? issue.path.reduce<unknown>((value, key) => (value as Record<PropertyKey, unknown>)?.[key], query);
  throw new ParamError(
    path,
    given,
    unknown ? `one of ${Object.keys(catalogueQuerySchema.shape).join(', ')}` : issue.message,
  );
}
