import { describe, expect, test } from 'vitest';
import { seededRandom } from '@/core/algebra/seeded-random.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { exportMatrix, importMatrix, matrixFormats } from '@/core/formats/index.ts';
import { anyCirculants, anyMatrix } from '../models/seeded-matrices.ts';

const random = seededRandom('a thousand matrices');

const same = (a: SparseMatrix, b: SparseMatrix) =>
  a.rows === b.rows &&
  a.cols === b.cols &&
  a.rowStart.every((start, i) => start === b.rowStart[i]) &&
  a.colIndex.length === b.colIndex.length &&
  a.colIndex.every((column, e) => column === b.colIndex[e]);

describe('a thousand random matrices', () => {
  const matrices = Array.from({ length: 1000 }, (_, i) => anyMatrix(random, i % 10 === 0 ? 300 : 40));
  const circulants = Array.from({ length: 1000 }, () => anyCirculants(random));

  test.each(matrixFormats.map((format) => [format.id, format] as const))('come back exactly from %s', (id, format) => {
    const fitting = id === 'qc' ? circulants : matrices;
    const written = fitting.filter((H) => format.writes?.(H) !== false);
    // An all-zero matrix of one block is still a table; a few others may happen to have none.
    expect(written.length).toBe(1000);
    expect(written.filter((H) => !same(H, importMatrix(exportMatrix(H, id), id)))).toEqual([]);
  });
});
