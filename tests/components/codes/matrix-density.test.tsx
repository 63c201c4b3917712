import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { countTile, fullShade, onesIn, TILE } from '@/components/codes/matrix-plot/density.ts';
import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';

/** Every cell looked up by itself: slow and plain. */
function isOne(H: SparseMatrix, r: number, c: number): boolean {
  return H.colIndex.subarray(H.rowStart[r], H.rowStart[r + 1]).includes(c);
}

function onesPlainly(H: SparseMatrix, row0: number, row1: number, col0: number, col1: number): number {
  let ones = 0;
  for (let r = row0; r < row1; r++) for (let c = col0; c < col1; c++) if (isOne(H, r, c)) ones++;
  return ones;
}

const smallMatrix = fc.integer({ min: 1, max: 40 }).chain((cols) =>
  fc
    .array(fc.uniqueArray(fc.integer({ min: 0, max: cols - 1 }), { maxLength: cols }), {
      minLength: 1,
      maxLength: 40,
    })
    .map((rows) => matrixFromRows(cols, rows)),
);

describe('density of a matrix', () => {
  test('a range counted by search agrees with every cell looked up', () => {
    fc.assert(
      fc.property(smallMatrix, fc.array(fc.nat(40), { minLength: 4, maxLength: 4 }), (H, cuts) => {
        const [row0, row1] = [cuts[0]!, cuts[1]!].map((n) => Math.min(n, H.rows)).sort((a, b) => a - b) as [
          number,
          number,
        ];
        const [col0, col1] = [cuts[2]!, cuts[3]!].map((n) => Math.min(n, H.cols)).sort((a, b) => a - b) as [
          number,
          number,
        ];
        expect(onesIn(H, { row0, row1, col0, col1 })).toBe(onesPlainly(H, row0, row1, col0, col1));
      }),
    );
  });

  test('a tile holds the ones of each of its squares, at every level', () => {
    const counts = new Uint32Array(TILE * TILE);
    fc.assert(
      fc.property(smallMatrix, fc.integer({ min: 0, max: 4 }), (H, level) => {
        countTile(H, level, 0, 0, counts);
        const side = 2 ** level;
        for (let y = 0; y * side < H.rows; y++) {
          for (let x = 0; x * side < H.cols; x++) {
            const plain = onesPlainly(
              H,
              y * side,
              Math.min(H.rows, (y + 1) * side),
              x * side,
              Math.min(H.cols, (x + 1) * side),
            );
            expect(counts[y * TILE + x]).toBe(plain);
          }
        }
      }),
      { numRuns: 40 },
    );
  });

  test('tiles of a matrix wider than one tile hold each one once', () => {
    const rows = Array.from({ length: 700 }, (_, r) => [r, (r + 250) % 700, (r + 511) % 700]);
    const H = matrixFromRows(700, rows);
    const counts = new Uint32Array(TILE * TILE);
    for (const level of [0, 1]) {
      let ones = 0;
      const tiles = Math.ceil(700 / (TILE * 2 ** level));
      for (let ty = 0; ty < tiles; ty++) {
        for (let tx = 0; tx < tiles; tx++) {
          countTile(H, level, tx, ty, counts);
          ones += counts.reduce((sum, count) => sum + count, 0);
        }
      }
      expect(ones).toBe(2100);
    }
  });

  test('a lone one is drawn in full ink however sparse the matrix', () => {
    expect(fullShade(matrixFromRows(1000, [[3], [], []]), 3)).toBe(1);
  });

  test('full ink stands for three times the mean', () => {
    const dense = matrixFromRows(
      16,
      Array.from({ length: 16 }, (_, r) => [r, (r + 1) % 16, (r + 3) % 16, (r + 7) % 16]),
    );
    expect(fullShade(dense, 2)).toBe(12);
  });
});
