import { z } from 'zod';
import { uploadFormats } from '@/core/formats/recognise.ts';

export const uploadFormatSchema = z.enum(uploadFormats);

/** What goes with a file that is sent as it is. */
export const uploadQueryParams = z.strictObject({
  /** Of the file, for the code's lineage; the code's name when none is given. */
  fileName: z.string().trim().min(1, 'a file name').max(200, 'at most 200 characters'),
  name: z.string().trim().min(1).max(120, 'at most 120 characters').optional(),
  /** Told by the file's first bytes when left out. */
  format: uploadFormatSchema.optional(),
  /** Of a matrix that has no more columns than rows: which of them are the checks. */
  checksAre: z.enum(['rows', 'columns']).optional(),
  /** Of a list of blocks: what one check stands for. */
  checks: z.enum(['blocks', 'points']).optional(),
});
export type UploadQuery = z.infer<typeof uploadQueryParams>;
