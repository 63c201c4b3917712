import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';
import { FormatError } from '@/core/errors.ts';
import { readAlist, writeAlist } from '@/core/formats/alist.ts';
import { readBlockListText } from '@/core/formats/block-list.ts';
import type { ByteSource, FileBytes } from '@/core/formats/byte-source.ts';
import { readCsv, writeCsv } from '@/core/formats/csv.ts';
import { readMatrixMarket, writeMatrixMarket } from '@/core/formats/matrix-market.ts';
import { smallMatrix } from '../../models/random-matrix.ts';

/** A source that gives a few bytes at a time, as a slow disk may. */
const source = (bytes: Uint8Array, most: number): ByteSource => ({
  size: bytes.length,
  read(position, into) {
    const part = bytes.subarray(position, position + Math.min(most, into.length));
    into.set(part);
    return part.length;
  },
});

const outcome = (read: (file: FileBytes) => unknown, file: FileBytes) => {
  try {
    return { value: read(file) };
  } catch (error) {
    if (error instanceof FormatError)
      return { line: error.line, column: error.column, expected: error.expected, found: error.found };
    throw error;
  }
};

const formats = [
  ['alist', writeAlist, readAlist],
  ['Matrix Market', writeMatrixMarket, readMatrixMarket],
  ['CSV', writeCsv, readCsv],
  ['blocks', writeCsv, readBlockListText],
] as const;

describe('a file read where it lies, piece by piece, says what the whole file in memory says', () => {
  test.each(formats)('%s, whole and damaged', (_, write, read: (file: FileBytes) => unknown) => {
    fc.assert(
      fc.property(
        smallMatrix,
        fc.integer({ min: 1, max: 9 }),
        fc.nat(),
        fc.integer({ min: 0, max: 255 }),
        (H, most, at, byte) => {
          const bytes = write(H);
          expect(outcome(read, source(bytes, most))).toEqual(outcome(read, bytes));
          bytes[at % bytes.length] = byte;
          expect(outcome(read, source(bytes, most))).toEqual(outcome(read, bytes));
        },
      ),
      { numRuns: 60 },
    );
  });

  test('across the end of the window of a megabyte', () => {
    const rows = Array.from({ length: 120_000 }, (_, i) => [i % 997, 997 + (i % 13)]);
    const H = matrixFromRows(1100, rows);
    for (const [, write, read] of formats.slice(0, 3)) {
      const bytes = write(H);
      expect(bytes.length).toBeGreaterThan(1 << 20);
      expect(outcome(read, source(bytes, 1 << 20))).toEqual({ value: H });
    }
  });
});
