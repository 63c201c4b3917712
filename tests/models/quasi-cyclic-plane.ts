import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';

/** A matrix of 7 × 7 circulant blocks, two by two, square, so that every format can write it. */
export const quasiCyclicPlane: SparseMatrix = matrixFromRows(
  14,
  Array.from({ length: 14 }, (_, i) => {
    const shifts = i < 7 ? [0, 1] : [2, 4];
    return shifts.map((s, block) => 7 * block + ((i + s) % 7));
  }),
);
