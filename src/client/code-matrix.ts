import type { Code } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import { fingerprint, wordsFingerprint } from '@/core/codes/fingerprint.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { readMatrixMarket } from '@/core/formats/matrix-market.ts';
import { ApiFailure, addressOf } from './api.ts';

const known = new Map<string, Promise<SparseMatrix>>();

/** The matrix of a kept code, of a constant-weight one its words, fetched once a page and held against the code's fingerprint.
 *  @throws ApiFailure when it cannot be fetched or is not the matrix that the fingerprint names. */
export function matrixOf(code: Pick<Code, 'id' | 'fingerprint'>): Promise<SparseMatrix> {
  const matrix = known.get(code.id) ?? fetchMatrix(code);
  known.set(code.id, matrix);
  matrix.catch(() => known.delete(code.id));
  return matrix;
}

async function fetchMatrix(code: Pick<Code, 'id' | 'fingerprint'>): Promise<SparseMatrix> {
  const address = addressOf(endpoints.getMatrix, { params: { id: code.id }, query: { format: 'mtx' } });
  const response = await fetch(address).catch(() => null);
  if (!response?.ok)
    throw new ApiFailure(response?.status ?? 0, 'matrix', 'The matrix could not be fetched; try again in a moment.');
  const H = readMatrixMarket(new Uint8Array(await response.arrayBuffer()));
  if ((await fingerprint(H)) !== code.fingerprint && (await wordsFingerprint(H)) !== code.fingerprint)
    throw new ApiFailure(
      409,
      'fingerprint',
      'The matrix received is not the one its fingerprint names; nothing was run.',
    );
  return H;
}
