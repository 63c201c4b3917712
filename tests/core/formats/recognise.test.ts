import { describe, expect, test } from 'vitest';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { writeBlockListText } from '@/core/formats/block-list.ts';
import { writeBlockListJson } from '@/core/formats/block-list-json.ts';
import { matrixFormats } from '@/core/formats/index.ts';
import { recogniseFormat, uploadFormats } from '@/core/formats/recognise.ts';

const bytes = (text: string) => new TextEncoder().encode(text);
const circulant = matrixFromRows(6, [
  [0, 3],
  [1, 4],
  [2, 5],
]);

describe('a file is recognised by its first bytes', () => {
  test.each(matrixFormats.map((format) => [format.id, format] as const))('%s', (id, format) => {
    expect(recogniseFormat(format.write(circulant))).toBe(id);
  });

  test('every matrix format is among those that can be uploaded', () => {
    expect(uploadFormats.slice(0, -2)).toEqual(matrixFormats.map(({ id }) => id));
  });

  test('block lists, with and without their size line', () => {
    const design = buildDesign({ family: 'witt', params: { v: 11 } });
    expect(recogniseFormat(writeBlockListText(design))).toBe('blocks');
    expect(recogniseFormat(writeBlockListJson(design))).toBe('blocks-json');
    expect(recogniseFormat(bytes('0 1 3\n1 2 4\n2 3 5\n'))).toBe('blocks');
    expect(recogniseFormat(bytes('0: 0 1 3\n1: 1 2 4\n'))).toBe('blocks');
  });

  test('with a byte order mark, blank lines and CRLF before the content', () => {
    expect(recogniseFormat(bytes('\uFEFF\r\n4 2\r\n2 3\r\n1 2 1 1\r\n2 3\r\n'))).toBe('alist');
    expect(recogniseFormat(bytes('\uFEFF%%MatrixMarket matrix coordinate pattern general\r\n'))).toBe('mtx');
  });

  test('anything else is not guessed at', () => {
    for (const text of ['', 'hello', '<svg>', '1.5 2.5\n', '\0\0\0\0']) expect(recogniseFormat(bytes(text))).toBeNull();
  });
});
