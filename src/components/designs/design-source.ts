import { matrixOf } from '@/client/code-matrix.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import type { DesignSource } from '@/core/designs/open-design.ts';
import type { DesignCode } from './use-design.ts';

/** Where the blocks of a kept code's design come from: its spec, or the matrix that was uploaded.
 *  @throws ApiFailure when the matrix cannot be fetched. */
export async function sourceOf(code: DesignCode): Promise<DesignSource> {
  const { design, derivation } = code;
  if (design.family !== 'uploaded') return { kind: 'spec', spec: design as DesignSpec };
  const points = derivation.kind === 'ldpc' && derivation.checks === 'points';
  return { kind: 'matrix', H: await matrixOf(code), blocksAre: points ? 'columns' : 'rows' };
}
