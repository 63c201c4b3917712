import { describeMatrix } from './describe-matrix.ts';
import type { Transform } from './ldpc.ts';
import type { CodeSheet, SheetStep } from './sheet.ts';
import type { SparseMatrix } from './sparse-matrix.ts';
import { applyTransforms } from './transforms/registry.ts';

/** Steps from a matrix that is kept, where no construction gives it anew: an uploaded one. */
export interface StoredRequest {
  matrix: SparseMatrix;
  designTitle: string;
  transforms: Transform[];
}

/** A sheet without a certificate: the matrix stands by itself. */
export type StoredSheet = Omit<CodeSheet, 'certificate'> & { certificate: null };

/** Transforms a stored matrix and analyses what comes of it. Transforms that need more than a matrix, such as parallel
 *  classes, are refused.
 *  @throws ParamError as the transforms do; LimitError on size. */
export function storedSheet(
  { matrix, designTitle, transforms }: StoredRequest,
  { clock, onStep }: { clock(): number; onStep?(step: SheetStep): void },
): StoredSheet {
  onStep?.('derive');
  const { H } = applyTransforms({ H: matrix }, transforms);
  onStep?.('analyse');
  const code = { H, checks: 'blocks' as const, transforms: [...transforms] };
  return { ...describeMatrix(code, clock), designTitle, certificate: null };
}
