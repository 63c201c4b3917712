import { describe, expect, test } from 'vitest';
import { type SparseMatrix, transpose } from '@/core/codes/sparse-matrix.ts';
import { summariseUpload, type UploadRequest, uploadedSheet } from '@/core/codes/uploaded-sheet.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { FormatError, LimitError, ParamError } from '@/core/errors.ts';
import { writeBlockListText } from '@/core/formats/block-list.ts';
import { exportMatrix } from '@/core/formats/index.ts';
import { readUpload, uploadLimits } from '@/core/formats/read-upload.ts';

const sheetOf = (bytes: Uint8Array, request: UploadRequest = {}) =>
  uploadedSheet(readUpload(bytes), request, { clock: () => 0 });
const text = (of: string) => new TextEncoder().encode(of);
const lines = buildDesign({ family: 'projective-plane', params: { q: 4 } });
const plane: SparseMatrix = { rows: lines.b, cols: lines.v, rowStart: lines.blockStart, colIndex: lines.blockPoints };
const triples = buildDesign({ family: 'steiner-triple', params: { v: 13, method: 'skolem' } });

describe('an uploaded matrix', () => {
  test('of PG(2,4), whose parameters every textbook states, is told n = 21, k = 11, girth 6', () => {
    const sheet = sheetOf(exportMatrix(plane, 'alist'), { checksAre: 'rows' });
    expect([sheet.n, sheet.k, sheet.format]).toEqual([21, 11, 'alist']);
    expect(sheet.properties.find(({ key }) => key === 'girth')?.text).toBe('6');
    expect(sheet.certificate).toBeNull();
    expect(sheet.derivation).toEqual({ kind: 'matrix', checksAre: 'rows' });
  });

  test('that is square does not tell which way it lies, and is asked for it by name', () => {
    expect(() => sheetOf(exportMatrix(plane, 'mtx'))).toThrow(expect.objectContaining({ param: 'checksAre' }));
    expect(() => sheetOf(exportMatrix(plane, 'mtx'))).toThrow(ParamError);
    expect(summariseUpload(readUpload(exportMatrix(plane, 'mtx')))).toMatchObject({ tellsChecks: false });
  });

  test('with columns as checks is turned over', () => {
    const wide: SparseMatrix = {
      rows: 2,
      cols: 3,
      rowStart: Uint32Array.of(0, 2, 4),
      colIndex: Uint32Array.of(0, 1, 1, 2),
    };
    const sheet = sheetOf(exportMatrix(transpose(wide), 'csv'), { checksAre: 'columns' });
    expect(sheet.H).toEqual(wide);
    expect(sheetOf(exportMatrix(wide, 'csv')).H).toEqual(wide);
  });
});

describe('uploaded blocks', () => {
  test('are verified for the largest t that holds', () => {
    const sheet = sheetOf(writeBlockListText(triples), { checks: 'points' });
    expect(sheet.certificate).toMatchObject({ holds: true, t: 2, lambda: 1, v: 13, b: 26 });
    expect(sheet.designTitle).toBe('Uploaded 2-(13, 3, 1) design');
    expect([sheet.n, sheet.H.rows]).toEqual([26, 13]);
  });

  test('are asked what a check stands for', () => {
    expect(() => sheetOf(writeBlockListText(triples))).toThrow(expect.objectContaining({ param: 'checks' }));
  });

  test('that are no design are taken as what they are', () => {
    const sheet = sheetOf(text('# points=5 blocks=3 counted-from=0\n0 1\n1 2 3\n3 4\n'), { checks: 'blocks' });
    expect(sheet.certificate?.holds).toBe(false);
    expect(sheet.designTitle).toBe('Uploaded blocks, 3 on 5 points');
  });
});

describe('a file that cannot be taken', () => {
  test('of no known format is told the formats', () => {
    expect(() => readUpload(text('<html>'))).toThrow(FormatError);
    expect(() => readUpload(text(''))).toThrow(/alist/);
  });

  test('of more than 200 MB is refused before it is read', () => {
    const file = {
      size: uploadLimits.bytes + 1,
      read: () => {
        throw new Error('was read');
      },
    };
    expect(() => readUpload(file)).toThrow(LimitError);
  });
});
