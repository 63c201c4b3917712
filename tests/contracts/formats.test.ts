import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError, LimitError, ParamError } from '@/core/errors.ts';
import { exportMatrix, importMatrix, matrixFormats } from '@/core/formats/index.ts';

/** Any matrix up to 12 × 15, empty rows and columns included. */
const anyMatrix: fc.Arbitrary<SparseMatrix> = fc
  .tuple(fc.integer({ min: 1, max: 12 }), fc.integer({ min: 1, max: 15 }))
  .chain(([rows, cols]) =>
    fc
      .array(fc.uniqueArray(fc.integer({ min: 0, max: cols - 1 })), { minLength: rows, maxLength: rows })
      .map((lists) => matrixFromRows(cols, lists)),
  );

const plain = (H: SparseMatrix) => ({ ...H, rowStart: [...H.rowStart], colIndex: [...H.colIndex] });

describe.each(matrixFormats.map((format) => [format.id, format] as const))('%s', (id, format) => {
  test('every matrix comes back as it was', () => {
    fc.assert(
      fc.property(anyMatrix, (H) => {
        fc.pre(format.writes?.(H) ?? true);
        expect(plain(importMatrix(exportMatrix(H, id), id))).toEqual(plain(H));
      }),
      { numRuns: 200 },
    );
  });

  test('the same matrix gives the same bytes', () => {
    const H = matrixFromRows(7, [
      [0, 1, 3],
      [1, 2, 4],
      [2, 3, 5],
      [3, 4, 6],
    ]);
    if (format.writes && !format.writes(H)) return;
    expect(exportMatrix(H, id)).toEqual(exportMatrix(H, id));
  });

  test('a cut or altered file is a typed error or another matrix, never anything else', () => {
    const H = matrixFromRows(6, [
      [0, 1, 3],
      [1, 2, 4],
      [2, 3, 5],
    ]);
    const whole = exportMatrix(H, format.writes && !format.writes(H) ? 'mtx' : id);
    const mutation = fc.record({ cut: fc.nat(whole.length), at: fc.nat(whole.length - 1), byte: fc.nat(255) });
    fc.assert(
      fc.property(mutation, ({ cut, at, byte }) => {
        const bytes = whole.slice(0, cut);
        if (at < bytes.length) bytes[at] = byte;
        try {
          importMatrix(bytes, id);
        } catch (error) {
          expect(
            [FormatError, LimitError, ParamError].some((kind) => error instanceof kind),
            String(error),
          ).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });

  test('an empty file says what was expected, and where', () => {
    expect(() => importMatrix(new Uint8Array(), id)).toThrow(FormatError);
  });
});

const isText = (mediaType: string) => mediaType.startsWith('text/') || mediaType === 'application/json';

describe.each(matrixFormats.filter((f) => isText(f.mediaType)).map((format) => [format.id, format] as const))(
  '%s as text',
  (id, format) => {
    test('CRLF, a byte order mark and a missing last newline change nothing', () => {
      const H = matrixFromRows(7, [
        [0, 1, 3],
        [1, 2, 4],
        [2, 3, 5],
        [3, 4, 6],
      ]);
      if (format.writes && !format.writes(H)) return;
      const text = new TextDecoder().decode(exportMatrix(H, id));
      const other = `\uFEFF${text.trimEnd().replaceAll('\n', '\r\n')}`;
      expect(plain(importMatrix(new TextEncoder().encode(other), id))).toEqual(plain(H));
    });
  },
);

test('an unknown format names the known ones', () => {
  const H = matrixFromRows(1, [[0]]);
  expect(() => exportMatrix(H, 'tiff')).toThrow(/format.*alist, mtx/);
});
