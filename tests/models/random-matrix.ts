import fc from 'fast-check';
import { matrixFromRows, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Small irregular matrices without an empty column or row. */
export const smallMatrix: fc.Arbitrary<SparseMatrix> = fc
  .record({
    n: fc.integer({ min: 3, max: 10 }),
    m: fc.integer({ min: 2, max: 7 }),
    bits: fc.infiniteStream(fc.nat(99)),
  })
  .map(({ n, m, bits }) => {
    const rows = Array.from({ length: m }, () => Array.from({ length: n }, (_, j) => j).filter(() => next(bits) < 40));
    for (let j = 0; j < n; j++) if (!rows.some((row) => row.includes(j))) rows[next(bits) % m]!.push(j);
    for (const row of rows) if (row.length === 0) row.push(next(bits) % n);
    return matrixFromRows(n, rows);
  });

const next = (bits: IterableIterator<number>) => bits.next().value as number;

/** Small matrices made of circulants of one size, so that the shift within blocks is a symmetry. */
export const quasiCyclicMatrix: fc.Arbitrary<SparseMatrix> = fc
  .record({
    size: fc.integer({ min: 2, max: 5 }),
    shifts: fc.array(fc.array(fc.integer({ min: -1, max: 9 }), { minLength: 2, maxLength: 3 }), {
      minLength: 1,
      maxLength: 3,
    }),
  })
  .map(({ size, shifts }) => {
    const blocks = shifts[0]!.length;
    const table = shifts.map((row) => Array.from({ length: blocks }, (_, b) => row[b] ?? -1));
    for (let b = 0; b < blocks; b++) if (table.every((row) => row[b]! < 0)) table[0]![b] = 0;
    const kept = table.filter((row) => row.some((shift) => shift >= 0));
    const rows = kept.flatMap((row) =>
      Array.from({ length: size }, (_, i) =>
        row.flatMap((shift, b) => (shift < 0 ? [] : [b * size + ((i + shift) % size)])),
      ),
    );
    return matrixFromRows(blocks * size, rows);
  });
