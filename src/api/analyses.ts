import { z } from 'zod';
import { codeQuestionIds } from '@/core/codes/questions/question-ids.ts';
import { propertySchema } from './codes.ts';

export const newAnalysisSchema = z.strictObject({
  question: z.enum(codeQuestionIds),
  /** What a search may spend, in seconds of a usual machine, counted in operations. */
  seconds: z.int().min(1).max(600).default(10),
});
export type NewAnalysis = z.output<typeof newAnalysisSchema>;

export const analysisSchema = z.object({
  id: z.string(),
  codeId: z.string(),
  question: z.enum(codeQuestionIds),
  seconds: z.number(),
  state: z.enum(['working', 'done', 'failed', 'cancelled']),
  /** Share done, while it works and where it is known. */
  share: z.number().nullable(),
  /** What it told, where that was more than was known. */
  lines: z.array(propertySchema),
  histogram: z.object({ of: z.string(), bars: z.array(z.tuple([z.number(), z.number()])) }).nullable(),
  /** Values side by side, which the lines hold too. */
  table: z
    .object({ of: z.string(), columns: z.array(z.string()), rows: z.array(z.array(z.union([z.string(), z.number()]))) })
    .nullable(),
  /** Keys of the code's properties that it added or narrowed. */
  improved: z.array(z.string()),
  /** Name of the list it found, given at /analyses/:id/list. */
  listName: z.string().nullable(),
  error: z.object({ code: z.string(), message: z.string() }).nullable(),
  elapsedMs: z.number().nullable(),
  createdBy: z.string(),
  createdAt: z.string(),
});
export type Analysis = z.infer<typeof analysisSchema>;
