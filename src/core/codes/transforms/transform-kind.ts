import type { z } from 'zod';
import { ParamError } from '../../errors.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';

/** A matrix on its way through the transforms, with the resolution classes that its rows or columns still carry. */
export interface TransformState {
  H: SparseMatrix;
  rowClasses?: Uint32Array;
  columnClasses?: Uint32Array;
}

/** One kind of transform: what it takes, and what it makes of a matrix. Nothing is edited in place. */
export interface TransformKind<P = unknown> {
  kind: string;
  title: string;
  schema: z.ZodType<P>;
  /** @throws ParamError when this matrix does not allow it. */
  apply(state: TransformState, params: P): TransformState;
}

export function defineTransform<S extends z.ZodType>(definition: {
  kind: string;
  title: string;
  schema: S;
  apply(state: TransformState, params: z.infer<S>): TransformState;
}): TransformKind<z.infer<S>> {
  return definition as TransformKind<z.infer<S>>;
}

/** Refuses a matrix that is no code: without rows or columns, or with a bit that no check meets. */
export function requireCode(H: SparseMatrix, kind: string): void {
  if (H.rows === 0 || H.cols === 0) {
    throw new ParamError(`transforms.${kind}`, `${H.rows} × ${H.cols}`, 'a transform that leaves rows and columns');
  }
  const met = new Uint8Array(H.cols);
  for (const c of H.colIndex) met[c] = 1;
  const bare = met.indexOf(0);
  if (bare >= 0) {
    throw new ParamError(
      `transforms.${kind}`,
      `column ${bare} without a one`,
      'a transform that leaves every bit checked',
    );
  }
}
