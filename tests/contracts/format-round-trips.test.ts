import { describe, expect, test } from 'vitest';
import { seededRandom } from '@/core/algebra/seeded-random.ts';
import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { exportMatrix, importMatrix, matrixFormats } from '@/core/formats/index.ts';

const random = seededRandom('a thousand matrices');

/** Any size from 1 × 1, rows of any weight, empty ones too; every tenth is larger. */
function anyMatrix(i: number): SparseMatrix {
  const most = i % 10 === 0 ? 300 : 40;
  const cols = 1 + random.below(most);
  const columns = Uint32Array.from({ length: cols }, (_, c) => c);
  const rows = Array.from({ length: 1 + random.below(most) }, () => {
    const weight = random.below(1 + random.below(1 + Math.min(cols, 30)));
    return random.shuffle(columns).slice(0, weight);
  });
  return matrixFromRows(cols, rows);
}

/** Made of circulants of one size, zero blocks and blocks of several shifts among them. */
function anyCirculants(): SparseMatrix {
  const z = 2 + random.below(30);
  const [high, wide] = [1 + random.below(4), 1 + random.below(6)];
  const table = Array.from({ length: high }, () =>
    Array.from({ length: wide }, () => [...new Set(Array.from({ length: random.below(4) }, () => random.below(z)))]),
  );
  const rows = table.flatMap((blocks) =>
    Array.from({ length: z }, (_, r) => blocks.flatMap((shifts, b) => shifts.map((s) => b * z + ((r + s) % z)))),
  );
  return matrixFromRows(z * wide, rows);
}

const same = (a: SparseMatrix, b: SparseMatrix) =>
  a.rows === b.rows &&
  a.cols === b.cols &&
  a.rowStart.every((start, i) => start === b.rowStart[i]) &&
  a.colIndex.length === b.colIndex.length &&
  a.colIndex.every((column, e) => column === b.colIndex[e]);

describe('a thousand random matrices', () => {
  const matrices = Array.from({ length: 1000 }, (_, i) => anyMatrix(i));
  const circulants = Array.from({ length: 1000 }, anyCirculants);

  test.each(matrixFormats.map((format) => [format.id, format] as const))('come back exactly from %s', (id, format) => {
    const fitting = id === 'qc' ? circulants : matrices;
    const written = fitting.filter((H) => format.writes?.(H) !== false);
    // An all-zero matrix of one block is still a table; a few others may happen to have none.
    expect(written.length).toBe(1000);
    expect(written.filter((H) => !same(H, importMatrix(exportMatrix(H, id), id)))).toEqual([]);
  });
});
