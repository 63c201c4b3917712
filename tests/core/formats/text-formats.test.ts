import { expect, test } from 'vitest';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { exportMatrix, importMatrix } from '@/core/formats/index.ts';

const bytes = (text: string) => new TextEncoder().encode(text);
const H = matrixFromRows(4, [
  [0, 1],
  [1, 2, 3],
]);

/** The layout as MacKay's page of sparse-graph codes describes it, written out by hand. */
const padded = '4 2\n2 3\n1 2 1 1\n2 3\n1 0\n1 2\n2 0\n2 0\n1 2 0\n2 3 4\n';
const unpadded = '4 2\n2 3\n1 2 1 1\n2 3\n1\n1 2\n2\n2\n1 2\n2 3 4\n';

const failure = (text: string, format: string): FormatError => {
  try {
    importMatrix(bytes(text), format);
  } catch (error) {
    if (error instanceof FormatError) return error;
    throw error;
  }
  throw new Error('was read');
};

test('alist is written padded, columns before rows, counted from 1', () => {
  expect(new TextDecoder().decode(exportMatrix(H, 'alist'))).toBe(padded);
});

test('alist is read padded and unpadded', () => {
  expect(importMatrix(bytes(padded), 'alist')).toEqual(H);
  expect(importMatrix(bytes(unpadded), 'alist')).toEqual(H);
});

test('alist that names rows before columns is told by its line of column weights', () => {
  expect(importMatrix(bytes(padded.replace('4 2\n2 3', '2 4\n3 2')), 'alist')).toEqual(H);
  expect(failure(padded.replace('1 2 1 1\n', '1 2 1 1 1 1 1\n'), 'alist').expected).toContain('weight');
});

test('sizes that the file has no room for are refused before memory is taken', () => {
  const banner = '%%MatrixMarket matrix coordinate pattern general\n';
  expect(failure(`${banner}1000000 1000000 40000000\n1 1\n`, 'mtx').expected).toContain('room');
});

test('alist names the line and column of an index that counts from 0', () => {
  const error = failure(padded.replace('1 2 0\n2 3 4', '0 1 0\n2 3 4'), 'alist');
  expect(error).toMatchObject({ line: 9, expected: expect.stringContaining('indices count from 1'), found: '0' });
});

test('alist refuses lists that disagree, a repeated index and weights that do not add up', () => {
  expect(failure(padded.replace('2 3 4', '1 3 4'), 'alist').expected).toContain('same ones');
  expect(failure(padded.replace('2 3 4', '3 3 4'), 'alist').found).toBe('3 twice');
  expect(failure(padded.replace('2 3\n1 0', '2 2\n1 0'), 'alist').expected).toContain('sum to 5');
});

test('Matrix Market is written with its banner, counted from 1', () => {
  expect(new TextDecoder().decode(exportMatrix(H, 'mtx'))).toBe(
    '%%MatrixMarket matrix coordinate pattern general\n2 4 5\n1 1\n1 2\n2 2\n2 3\n2 4\n',
  );
});

test('Matrix Market takes comments anywhere, any case in the banner, integer values 0 and 1', () => {
  const text =
    '%%matrixmarket MATRIX coordinate integer general\n% made by hand\n2 4 6\n1 1 1\n1 2 1\n%\n2 2 1\n2 3 1\n2 4 1\n1 4 0\n';
  expect(importMatrix(bytes(text), 'mtx')).toEqual(H);
});

test('Matrix Market refuses a doubled entry, an index out of range, NUL bytes and a symmetric matrix', () => {
  const head = '%%MatrixMarket matrix coordinate pattern general\n2 4 2\n';
  expect(failure(`${head}1 1\n1 1\n`, 'mtx').found).toContain('twice');
  expect(failure(`${head}1 1\n3 1\n`, 'mtx')).toMatchObject({ line: 4, found: '3' });
  expect(failure(`${head}1 1\n1 \0\n`, 'mtx')).toMatchObject({ line: 4, column: 3 });
  expect(failure('%%MatrixMarket matrix coordinate pattern symmetric\n1 1 0\n', 'mtx').line).toBe(1);
});

test('a size beyond the limits is refused before memory is taken', () => {
  expect(() => importMatrix(bytes('4000000000 4000000000\n1 1\n'), 'alist')).toThrow(LimitError);
  expect(() =>
    importMatrix(bytes('%%MatrixMarket matrix coordinate pattern general\n5 5 4000000000\n'), 'mtx'),
  ).toThrow(LimitError);
});
